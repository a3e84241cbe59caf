import { Pause, Play as PlayIcon, StepForward, Undo2 } from 'lucide-react';
import type { ReactNode } from 'react';
import { formatNumber } from '../../lib/format';
import { IconButton } from '../../ui/button';
import { Figure, Quantity } from '../../ui/quantity';
import type { Motion } from './motion';
import { slowdownWords } from './motion';
import type { Play } from './use-play';

const scopeWidth = 116;
const scopeHeight = 30;

/** EMF over one cycle, drawn in time beside the moving assembly. */
function Scope({ motion, play }: { motion: Motion; play: Play }) {
  const peak = Math.max(...motion.emf.map(Math.abs)) || 1;
  const px = (time: number) => 2 + ((time % motion.duration) / motion.duration) * (scopeWidth - 4);
  const py = (volts: number) => scopeHeight / 2 - (volts / peak) * (scopeHeight / 2 - 3);
  const every = Math.max(1, Math.floor(motion.time.length / 240));
  const path = motion.time
    .filter((_, index) => index % every === 0)
    .map(
      (time, index) =>
        `${index === 0 ? 'M' : 'L'}${px(time).toFixed(1)} ${py(motion.emf[index * every] ?? 0).toFixed(1)}`,
    )
    .join('');
  return (
    <svg width={scopeWidth} height={scopeHeight} aria-hidden className="shrink-0 rounded-[3px] border border-rule">
      <line x1={0} x2={scopeWidth} y1={scopeHeight / 2} y2={scopeHeight / 2} className="stroke-rule" />
      <path d={path} fill="none" className="stroke-copper" strokeWidth={1.3} />
      {play.time === null ? null : (
        <circle cx={px(play.time)} cy={py(play.emf)} r={3} className="fill-sheet stroke-copper" strokeWidth={1.6} />
      )}
    </svg>
  );
}

const ReadOut = ({ name, children }: { name: string; children: ReactNode }) => (
  <div className="flex items-baseline justify-between gap-1.5 whitespace-nowrap">
    <dt className="text-graphite">{name}</dt>
    <dd className="min-w-[4.5em] text-right font-semibold">{children}</dd>
  </div>
);

const Text = ({ parts }: { parts: [string, string] | undefined }) =>
  parts ? <Figure number={parts[0]} unit={parts[1]} /> : <span className="font-normal text-graphite">–</span>;

interface StripHeaderProps {
  play: Play;
  motion: Motion | null;
  /** mm. */
  position: number;
  /** Figures under the cursor as text with their units; null where there are none. */
  at: { fluxLinkage: [string, string]; coupling: [string, string] } | null;
  /** Estimated peak excursion, m. */
  travel: number | null;
  moved: boolean;
  onReset: () => void;
}

/** Play button with its rate, and the figures under the cursor. */
export function StripHeader({ play, motion, position, at, travel, moved, onReset }: StripHeaderProps) {
  const steps = play.mode === 'steps';
  const icon = steps ? StepForward : play.playing ? Pause : PlayIcon;
  const label = steps ? 'Step through the motion' : play.playing ? 'Pause the motion' : 'Play the motion';
  return (
    <div className="@container">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <div className="flex items-center gap-2.5">
          <IconButton
            icon={icon}
            label={motion ? label : 'No motion was computed'}
            variant="secondary"
            disabled={motion === null}
            onPress={play.toggle}
            className="rounded-full! border-copper! text-copper! disabled:border-(--edge)! disabled:text-graphite!"
          />
          {motion ? (
            <>
              <Scope {...{ motion, play }} />
              <span className="text-sm leading-tight text-graphite">
                {steps ? 'in steps, as less motion was asked for' : slowdownWords(play.slowdown)}
                <span className="block font-mono">
                  EMF {play.time === null ? '–' : <Quantity value={play.emf} dimension="voltage" unit="V" signed />}
                </span>
              </span>
            </>
          ) : (
            <span className="text-sm text-graphite">no motion computed</span>
          )}
          {moved ? (
            <IconButton icon={Undo2} size="small" label="Put the assembly back at rest" onPress={onReset} />
          ) : null}
        </div>
        <dl className="ml-auto grid grid-cols-2 gap-x-5 leading-snug @[52rem]:flex @[52rem]:gap-x-4">
          <ReadOut name="position">
            <Text parts={[formatPlace(position), 'mm']} />
          </ReadOut>
          <ReadOut name="flux">
            <Text parts={at?.fluxLinkage} />
          </ReadOut>
          <ReadOut name="coupling">
            <Text parts={at?.coupling} />
          </ReadOut>
          <ReadOut name="travel">
            <Text parts={travel === null ? undefined : [`±${formatNumber(travel * 1000)}`, 'mm']} />
          </ReadOut>
        </dl>
      </div>
    </div>
  );
}

/** A position to a hundredth of a millimetre, or finer where the stretch is small; a true minus. */
export const formatPlace = (mm: number): string => (Math.abs(mm) < 0.005 ? '0.00' : mm.toFixed(2).replace('-', '−'));
