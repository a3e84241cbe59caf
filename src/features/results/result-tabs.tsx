import type { Estimate } from '#contracts/estimates';
import { formatCount, formatNumber, formatPercent } from '../../lib/format';
import { classNames } from '../../ui/class-names';
import { KeyFigures } from '../../ui/key-figures';
import { Figure, Quantity } from '../../ui/quantity';
import { Status } from '../../ui/status';
import { Tabs } from '../../ui/tabs';
import { previousFigures } from './freshness-words';
import { PowerFlow } from './power-flow';
import { WaveformPlots } from './waveforms';

interface ResultTabsProps {
  estimate: Estimate | null;
  periodic: boolean;
  previous: boolean;
  /** Puts paths of the document in a message into words. */
  say: (message: string) => string;
  selected: string;
  onSelect: (tab: string) => void;
}

const angle = (radians: number | null) => <Quantity value={radians} dimension="angle" />;
const share = (value: number | null) =>
  value === null ? (
    <span className="text-graphite italic">not computed</span>
  ) : (
    <Figure number={formatPercent(value, 3).replace(' %', '')} unit="%" />
  );

function Response({ estimate: { response } }: { estimate: Estimate }) {
  const { branches } = response;
  const chosen = branches.findIndex(({ stable }) => stable === true);
  return (
    <div className="grid gap-x-10 gap-y-4 @3xl:grid-cols-2">
      <KeyFigures
        ruled
        figures={[
          { label: 'Displacement, peak', value: <Quantity value={response.displacementPeak} dimension="length" /> },
          { label: 'Displacement, rms', value: <Quantity value={response.displacementRms} dimension="length" /> },
          { label: 'Phase to base acceleration', value: angle(response.phase) },
          { label: 'Load voltage, mean', value: <Quantity value={response.loadVoltageMean} dimension="voltage" /> },
          { label: 'Coil current, rms', value: <Quantity value={response.coilCurrentRms} dimension="current" /> },
          {
            label: 'EMF, open circuit, peak',
            value: <Quantity value={response.openCircuitEmfPeak} dimension="voltage" />,
          },
          { label: 'Harmonics of the EMF', value: share(response.harmonicDistortion) },
          {
            label: 'Stops',
            value: response.stopContact === null ? 'none' : response.stopContact ? 'touched' : 'not touched',
          },
        ]}
      />
      <div>
        <h3 className="pb-1">Steady responses</h3>
        {branches.length === 0 ? (
          <p className="text-graphite">Steady responses are told for a single tone only.</p>
        ) : (
          <table className="w-full">
            <thead>
              <tr className="border-b border-rule text-left text-graphite">
                <th scope="col" className="py-1 font-normal">
                  Response
                </th>
                <th scope="col" className="text-right font-normal">
                  Displacement
                </th>
                <th scope="col" className="text-right font-normal">
                  Load power
                </th>
                <th scope="col" className="pl-4 font-normal">
                  Stability
                </th>
              </tr>
            </thead>
            <tbody>
              {branches.map(({ displacementPeak, loadPower, stable }, index) => (
                <tr key={index} className="border-b border-rule">
                  <th scope="row" className="py-1.5 text-left font-normal">
                    {index + 1}
                    {index === chosen && branches.length > 1 ? (
                      <span className="text-graphite"> (headline)</span>
                    ) : null}
                  </th>
                  <td className="text-right">
                    <Quantity value={displacementPeak} dimension="length" />
                  </td>
                  <td className="text-right">
                    <Quantity value={loadPower} dimension="power" />
                  </td>
                  <td className="pl-4">
                    {stable === null ? (
                      <span className="text-graphite italic">not computed</span>
                    ) : (
                      <Status tone={stable ? 'good' : 'attention'}>{stable ? 'stable' : 'unstable'}</Status>
                    )}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        )}
      </div>
    </div>
  );
}

function Parts({ estimate: { coil, mechanics, curve } }: { estimate: Estimate }) {
  return (
    <div className="grid gap-x-10 gap-y-4 @2xl:grid-cols-2">
      <section>
        <h3 className="pb-1">Coil, all in series</h3>
        <KeyFigures
          ruled
          figures={[
            { label: 'Resistance', value: <Quantity value={coil.resistance} dimension="resistance" /> },
            { label: 'Inductance', value: <Quantity value={coil.inductance} dimension="inductance" /> },
            { label: 'Wire length', value: <Quantity value={coil.wireLength} dimension="length" unit="m" /> },
            { label: 'Copper', value: <Quantity value={coil.copperMass} dimension="mass" /> },
            { label: 'Fill factor', value: share(coil.fillFactor) },
            {
              label: 'Can be wound',
              value:
                coil.windable === null ? (
                  <span className="text-graphite italic">not computed</span>
                ) : (
                  <Status tone={coil.windable ? 'good' : 'bad'}>{coil.windable ? 'yes' : 'no'}</Status>
                ),
            },
            { label: 'Coupling at rest', value: <Quantity value={curve.couplingAtRest} dimension="coupling" /> },
            {
              label: 'Largest coupling',
              value: (
                <>
                  <Quantity value={curve.couplingPeak} dimension="coupling" />
                  {curve.couplingPeakAt === null ? null : (
                    <span className="text-graphite">
                      {' '}
                      at {formatNumber(Number((curve.couplingPeakAt * 1000).toFixed(3)))} mm
                    </span>
                  )}
                </>
              ),
            },
          ]}
        />
      </section>
      <section>
        <h3 className="pb-1">Mechanics, at rest</h3>
        <KeyFigures
          ruled
          figures={[
            { label: 'Moving mass', value: <Quantity value={mechanics.movingMass} dimension="mass" /> },
            { label: 'Rest position', value: <Quantity value={mechanics.restPosition} dimension="length" unit="mm" /> },
            { label: 'Stiffness', value: <Quantity value={mechanics.stiffness} dimension="stiffness" /> },
            { label: 'Cubic stiffness', value: <Quantity value={mechanics.cubic} dimension="cubicStiffness" /> },
            {
              label: 'Natural frequency',
              value: <Quantity value={mechanics.naturalFrequency} dimension="frequency" />,
            },
            {
              label: 'Damping coefficient',
              value: <Quantity value={mechanics.dampingCoefficient} dimension="dampingCoefficient" />,
            },
            { label: 'Quality factor', value: <Quantity value={mechanics.quality} dimension="number" /> },
          ]}
        />
      </section>
    </div>
  );
}

function Method({ estimate, say }: { estimate: Estimate; say: (message: string) => string }) {
  const { response, bounds, power, notes, engine, digest } = estimate;
  return (
    <div className="grid gap-x-10 gap-y-4 @2xl:grid-cols-2">
      <section className="flex flex-col gap-2">
        <h3>How it was computed</h3>
        <p>
          {response.method.charAt(0).toUpperCase() + response.method.slice(1)}.{' '}
          <Status tone={response.converged ? 'good' : 'bad'}>
            {response.converged ? 'converged' : 'did not converge'}
          </Status>
        </p>
        <p className="text-graphite">
          Energy balance open by{' '}
          {power.residual === null ? 'an unknown part' : formatNumber(Math.abs(power.residual), 2)} of what enters.
        </p>
        <h3 className="pt-2">{formatCount(notes.length, 'note')}</h3>
        {notes.length === 0 ? (
          <p className="text-graphite">Everything asked for was computed.</p>
        ) : (
          <ul className="list-disc pl-5">
            {notes.map((note) => (
              <li key={note} className="py-0.5">
                {say(note)}
              </li>
            ))}
          </ul>
        )}
        <p className="pt-2 text-sm wrap-anywhere text-graphite">
          Engine {engine}, inputs <code>{digest}</code>
        </p>
      </section>
      <section>
        <h3 className="pb-1">Bounds</h3>
        <KeyFigures
          ruled
          figures={[
            { label: 'Resonant bound', value: <Quantity value={bounds.resonant} dimension="power" /> },
            { label: 'Travel-limited bound', value: <Quantity value={bounds.travelLimited} dimension="power" /> },
            { label: 'Broadband bound', value: <Quantity value={bounds.broadband} dimension="power" /> },
            { label: 'Effectiveness', value: share(bounds.effectiveness) },
            {
              label: 'Normalised power density',
              value:
                bounds.normalisedPowerDensity === null ? (
                  <span className="text-graphite italic">not computed</span>
                ) : (
                  <Figure number={formatNumber(bounds.normalisedPowerDensity)} unit="kg·s/m³" />
                ),
            },
            {
              label: 'Best resistive load',
              value: <Quantity value={bounds.bestResistiveLoad} dimension="resistance" />,
            },
            { label: 'Power there', value: <Quantity value={bounds.bestLoadPower} dimension="power" /> },
          ]}
        />
      </section>
    </div>
  );
}

/** Everything computed, a sheet for each question. */
export function ResultTabs({ estimate, periodic, previous, say, selected, onSelect }: ResultTabsProps) {
  const none = <p className="text-graphite italic">No figures yet.</p>;
  const dimmed = (content: React.ReactNode) => (
    <div className={classNames('@container', previous && previousFigures)}>{content}</div>
  );
  return (
    <Tabs
      label="Results"
      selected={selected}
      onSelect={onSelect}
      tabs={[
        {
          id: 'waveforms',
          label: 'Waveforms',
          content: estimate ? <WaveformPlots waveforms={estimate.waveforms} {...{ periodic, previous }} /> : none,
        },
        { id: 'response', label: 'Response', content: estimate ? dimmed(<Response estimate={estimate} />) : none },
        { id: 'power', label: 'Power flow', content: estimate ? dimmed(<PowerFlow power={estimate.power} />) : none },
        { id: 'parts', label: 'Coil and mechanics', content: estimate ? dimmed(<Parts estimate={estimate} />) : none },
        {
          id: 'method',
          label: 'Method and notes',
          count: estimate ? estimate.notes.length : undefined,
          content: estimate ? dimmed(<Method estimate={estimate} say={say} />) : none,
        },
      ]}
    />
  );
}
