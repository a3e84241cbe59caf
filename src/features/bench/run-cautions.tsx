import type { Run } from '#contracts/runs';
import { Caution } from '../../ui/caution';
import { Quantity } from '../../ui/quantity';

/** What to know before touching the specimen or the shaker. Points out; local codes and competent persons decide. */
export function RunCautions({ run }: { run: Run }) {
  const peak = run.lines.find(({ requirement }) => requirement.quantity === 'openCircuitEmfPeak')?.estimated ?? null;
  return (
    <div className="flex flex-col gap-2.5">
      <Caution title="Strong magnets.">
        They pinch and shatter, wipe media, and disturb pacemakers and other implants: 0.5 mT is the usual limit there.
        Keep them apart from each other and from steel.
      </Caution>
      <Caution title="Shaker and moving mass.">
        Parts can come loose and fly. Check the fixing before starting, keep clear of the axis of travel, and wear eye
        protection.
      </Caution>
      <Caution title="Open circuit.">
        A coil of many turns can give a shock with no load connected
        {peak === null ? '; the peak is not among this run’s figures' : ''}.{' '}
        {peak === null ? null : (
          <>
            Estimated peak: <Quantity value={peak} dimension="voltage" />.{' '}
          </>
        )}
        Connect the load before the shaker starts.
      </Caution>
      <p className="text-sm text-graphite">
        Local codes and the competent person of your laboratory decide what is allowed; this list does not replace them.
      </p>
    </div>
  );
}
