import type { ReactNode } from 'react';
import type { Estimate } from '#contracts/estimates';
import { formatNumber, formatPercent } from '../../lib/format';
import { classNames } from '../../ui/class-names';
import { previousFigures } from './freshness-words';
import { Caution } from '../../ui/caution';
import { KeyFigures } from '../../ui/key-figures';
import { Figure, LeadFigure, Quantity } from '../../ui/quantity';
import { doubtAbout, headlineOf, loadWords } from './figures';

interface HeadlineProps {
  estimate: Estimate | null;
  document: unknown;
  /** The figures belong to an earlier state. */
  previous: boolean;
  /** Words on what state the figures are of. */
  state: ReactNode;
}

/** The one figure of the page, and how far it can be relied on. */
export function Headline({ estimate, document, previous, state }: HeadlineProps) {
  const { number, unit } = headlineOf(estimate);
  const doubt = estimate ? doubtAbout(estimate) : null;
  const absent = estimate?.response.loadPower === null;
  return (
    <div className="flex flex-col gap-1.5">
      <div className={classNames(previous && previousFigures)}>
        {estimate === null || absent ? (
          <p className="text-xl leading-tight text-graphite italic">
            {absent ? 'power not computed' : 'no figures yet'}
          </p>
        ) : (
          <LeadFigure number={number} unit={unit} after={loadWords(document)} />
        )}
      </div>
      <div aria-live="polite" className="min-h-5">
        {state}
      </div>
      {doubt ? <Caution severity="stop">{doubt}</Caution> : null}
    </div>
  );
}

/** The same in one line, for the top of a small screen. */
export function HeadlineBar({
  estimate,
  document,
  previous,
  words,
}: Omit<HeadlineProps, 'state'> & { words: string | null }) {
  const { number, unit } = headlineOf(estimate);
  return (
    <p className="flex flex-wrap items-baseline gap-x-2">
      {estimate === null ? (
        <span className="text-graphite italic">no figures yet</span>
      ) : (
        <span className={classNames(previous && previousFigures)}>
          <span className="font-mono text-lg font-bold">{number}</span>
          <span className="text-graphite">
            {' '}
            {unit} {estimate.response.loadPower === null ? '' : loadWords(document)}
          </span>
        </span>
      )}
      {words === null ? null : <span className="ml-auto text-sm text-amber">{words}</span>}
    </p>
  );
}

/** The figures one looks at first, beside the headline. */
export function KeyResults({ estimate, previous }: { estimate: Estimate; previous: boolean }) {
  const { response, coil, bounds, power, mechanics } = estimate;
  return (
    <KeyFigures
      className={classNames(previous && previousFigures)}
      figures={[
        { label: 'EMF, loaded', value: <Quantity value={response.emfRms} dimension="voltage" after="rms" /> },
        {
          label: 'EMF, open circuit',
          value: <Quantity value={response.openCircuitEmfRms} dimension="voltage" after="rms" />,
        },
        {
          label: 'Across the load',
          value: <Quantity value={response.loadVoltageRms} dimension="voltage" after="rms" />,
        },
        {
          label: 'Coil',
          value: (
            <>
              <Quantity value={coil.resistance} dimension="resistance" /> <span className="text-graphite">·</span>{' '}
              <Quantity value={coil.inductance} dimension="inductance" />
            </>
          ),
        },
        { label: 'Resonance', value: <Quantity value={mechanics.naturalFrequency} dimension="frequency" /> },
        {
          label: 'Travel',
          value: <Quantity value={response.displacementPeak} dimension="length" unit="mm" after="peak" />,
        },
        {
          label: 'Of the bound',
          value:
            bounds.effectiveness === null ? (
              <span className="text-graphite italic">not computed</span>
            ) : (
              <Figure number={formatPercent(bounds.effectiveness, 2).replace(' %', '')} unit="%" />
            ),
        },
        {
          label: 'Energy balance',
          value:
            power.residual === null ? (
              <span className="text-graphite italic">not computed</span>
            ) : (
              <span className="font-mono">{formatNumber(power.residual, 2)}</span>
            ),
        },
      ]}
    />
  );
}
