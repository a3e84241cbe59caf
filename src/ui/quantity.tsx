import type { ReactNode } from 'react';
import { quantityParts, unitScale } from '../lib/quantities';
import type { Dimension } from '../lib/quantities';
import { formatNumber, formatSigned } from '../lib/format';
import { classNames } from './class-names';

export interface QuantityProps {
  /** SI value; null or undefined is shown as not computed, never as zero. */
  value: number | null | undefined;
  dimension: Dimension;
  /** Unit to show it in; without one the prefix an engineer would choose. */
  unit?: string;
  /** Words after the unit: “rms”, “into 804 Ω”. */
  after?: string;
  digits?: number;
  /** Margins and deviations carry their sign always. */
  signed?: boolean;
  /** Words in place of a value that is not there. */
  absent?: string;
  className?: string;
}

/** A figure in the mono face with its unit lighter. */
export function Quantity(props: QuantityProps) {
  const { value, dimension, unit, after, digits = 3, signed, absent = 'not computed', className } = props;
  if (value === null || value === undefined || !Number.isFinite(value))
    return <span className={classNames('text-graphite italic', className)}>{absent}</span>;
  const scale = unit === undefined ? null : unitScale(dimension, unit);
  const auto = quantityParts(value, dimension, digits);
  const number =
    scale === null
      ? signed && value > 0
        ? `+${auto.number}`
        : auto.number
      : (signed ? formatSigned : formatNumber)(value / scale, digits);
  return (
    <Figure number={number} unit={scale === null ? auto.unit : (unit ?? '')} after={after} className={className} />
  );
}

interface FigureProps {
  number: ReactNode;
  unit?: string;
  after?: string | undefined;
  className?: string | undefined;
}

/** A number that is already text, with its unit lighter. */
export function Figure({ number, unit, after, className }: FigureProps) {
  return (
    <span className={classNames('whitespace-nowrap', className)}>
      <span className="font-mono">{number}</span>
      {unit ? <span className="font-normal text-graphite">{unit === '°' ? '°' : `\u00A0${unit}`}</span> : null}
      {after ? <span className="font-normal text-graphite"> {after}</span> : null}
    </span>
  );
}

/** The one large figure of a page. */
export function LeadFigure({ number, unit, after }: Omit<FigureProps, 'className'>) {
  return (
    <p className="flex flex-wrap items-baseline gap-x-2 leading-none">
      <span className="font-mono text-4xl font-bold tracking-tight">{number}</span>
      <span className="text-lg text-graphite">
        {unit}
        {after ? ` ${after}` : ''}
      </span>
    </p>
  );
}
