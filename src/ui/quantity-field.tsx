import { useEffect, useRef, useState } from 'react';
import type { Ref } from 'react';
import { formatInUnit, formatQuantity, formatSi, readQuantity, readQuantityFully } from '../lib/quantities';
import type { Dimension, QuantityReading } from '../lib/quantities';
import { Field } from './field';
import type { BoundProps, FieldProps } from './field';
import { classNames } from './class-names';

export interface QuantityLimits {
  /** Limits in SI (°C for temperatures); a value at the limit is allowed unless `above`/`below` says otherwise. */
  least?: number | undefined;
  most?: number | undefined;
  above?: number | undefined;
  below?: number | undefined;
}

export interface QuantityFieldProps extends FieldProps, BoundProps<string>, QuantityLimits {
  dimension: Dimension;
  /** Unit meant where none is typed; stands in the box. '' for plain numbers. */
  unit: string;
  /** Told whenever the meaning of the text changes: the SI value, or null while there is none. */
  onUnderstood?: (value: number | null) => void;
  /** Value that holds where the field is left empty, in words: “default 1.05”. */
  source?: string;
  placeholder?: string;
  autoFocus?: boolean;
}

const show = (value: number, dimension: Dimension, unit: string) => formatInUnit(value, dimension, unit, 4);

/** What is wrong with an understood value, naming field, value and limit. */
export function limitProblem(
  label: string,
  value: number,
  dimension: Dimension,
  unit: string,
  { least, most, above, below }: QuantityLimits,
): string | undefined {
  const given = `${label}: ${show(value, dimension, unit)}`;
  if (least !== undefined && value < least) return `${given} is below the limit of ${show(least, dimension, unit)}.`;
  if (most !== undefined && value > most) return `${given} is above the limit of ${show(most, dimension, unit)}.`;
  if (above !== undefined && value <= above) return `${given} must be more than ${show(above, dimension, unit)}.`;
  if (below !== undefined && value >= below) return `${given} must be less than ${show(below, dimension, unit)}.`;
  return undefined;
}

/** The meaning of a text; arithmetic is worked out a moment later, the reading is null until then. */
export function useReading(text: string, dimension: Dimension, unit: string): QuantityReading | null {
  const [worked, setWorked] = useState<{ text: string; reading: QuantityReading } | null>(null);
  const empty = text.trim() === '';
  const atOnce = empty ? null : readQuantity(text, dimension, unit);
  const pending = atOnce === 'pending';
  useEffect(() => {
    if (!pending) return;
    let current = true;
    void readQuantityFully(text, dimension, unit).then((reading) => {
      if (current) setWorked({ text, reading });
    });
    return () => {
      current = false;
    };
  }, [pending, text, dimension, unit]);
  if (pending) return worked?.text === text ? worked.reading : null;
  return atOnce;
}

const plain = /^[-−+]?[\d.]+(?:[eE][-−+]?\d+)?$/;

/** What was understood: in the field's unit where the text is in another, and in SI. */
export function understoodWords(text: string, value: number, dimension: Dimension, unit: string): string {
  const si = formatSi(value, dimension, 3);
  const handy = unit === '' ? formatQuantity(value, dimension, 3) : formatInUnit(value, dimension, unit, 3);
  const typed = text.trim();
  if (
    plain.test(typed) ||
    si === handy ||
    (unit !== '' && typed.endsWith(unit) && !/[*/+(]/.test(typed.slice(0, -unit.length)))
  )
    return `= ${si}`;
  return `= ${handy} = ${si}`;
}

/**
 * A quantity as an engineer types it: `12 mm`, `0.47 in`, `0.5 g`, `4k7`, `12mm/2`. The text stays as it was left; what
 * was understood stands under it; what cannot be used is said there too, once the field is left.
 */
export function QuantityField(props: QuantityFieldProps) {
  const { value, onChange, onBlur, name, ref, disabled, dimension, unit, onUnderstood, source, error, hint, ...rest } =
    props;
  const { least, most, above, below, placeholder, autoFocus, ...fieldRest } = rest;
  const [editing, setEditing] = useState(false);
  const reading = useReading(value, dimension, unit);
  const limit =
    reading?.ok === true
      ? limitProblem(rest.label, reading.value, dimension, unit, { least, most, above, below })
      : undefined;
  const usable = reading?.ok === true && limit === undefined ? reading.value : null;
  const unreadable = reading?.ok === false ? `${rest.label}: ${reading.message}` : undefined;
  // A half-typed text is not yet wrong: say so only when the field is left.
  const problem = (editing ? limit : (unreadable ?? limit)) ?? error;

  const told = useRef<number | null | undefined>(undefined);
  useEffect(() => {
    if (told.current === usable) return;
    told.current = usable;
    onUnderstood?.(usable);
  }, [usable, onUnderstood]);

  // On a dense sheet a plain number beside its unit says enough: no second line for it.
  const evident = rest.layout === 'inline' && (plain.test(value.trim()) || value.trim() === '');
  const understood =
    reading?.ok === true && !evident ? understoodWords(value, reading.value, dimension, unit) : undefined;
  const meaning =
    understood ??
    (value.trim() === ''
      ? source
      : reading === null
        ? 'working it out …'
        : editing && unreadable
          ? 'not understood yet'
          : undefined);
  const hasOwnUnit = reading?.ok === true && !plain.test(value.trim());
  return (
    <Field
      {...fieldRest}
      error={problem}
      hint={hint}
      below={
        meaning === undefined ? undefined : (
          <span className={classNames(understood !== undefined && 'font-mono')}>{meaning}</span>
        )
      }
    >
      {(control) => (
        <span className="field-box" data-invalid={problem ? '' : undefined} data-disabled={disabled ? '' : undefined}>
          <input
            {...control}
            {...{ name, disabled, placeholder, autoFocus }}
            ref={ref as Ref<HTMLInputElement>}
            type="text"
            autoComplete="off"
            autoCapitalize="none"
            spellCheck={false}
            value={value}
            onFocus={() => setEditing(true)}
            onChange={(event) => onChange(event.target.value)}
            onBlur={() => {
              setEditing(false);
              onBlur?.();
            }}
            className="font-mono"
          />
          {unit === '' ? null : (
            <span
              className={classNames('shrink-0 pr-2.5 text-graphite', hasOwnUnit && 'sr-only')}
              title={`${unit} is meant where no unit is typed`}
            >
              {unit}
            </span>
          )}
        </span>
      )}
    </Field>
  );
}
