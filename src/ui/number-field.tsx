import { useState } from 'react';
import type { Ref } from 'react';
import { Field } from './field';
import type { BoundProps, FieldProps } from './field';

export interface NumberFieldProps extends FieldProps, BoundProps<number | null> {
  least?: number;
  most?: number;
  /** Counts take whole numbers only. */
  whole?: boolean;
  unit?: string;
}

const read = (text: string) => Number(text.replace(/[\s\u2009]/g, '').replace('−', '-'));

/** What is wrong with a typed number, naming value and limit; undefined where it may be used. */
export function numberProblem(
  text: string,
  label: string,
  limits: Pick<NumberFieldProps, 'least' | 'most' | 'whole'>,
): string | undefined {
  if (text.trim() === '') return undefined;
  const value = read(text);
  if (!Number.isFinite(value)) return `${label}: “${text.trim()}” is not a number.`;
  if (limits.whole && !Number.isInteger(value)) return `${label}: ${text.trim()} is not a whole number.`;
  if (limits.least !== undefined && value < limits.least)
    return `${label}: ${value} is below the limit of ${limits.least}.`;
  if (limits.most !== undefined && value > limits.most)
    return `${label}: ${value} is above the limit of ${limits.most}.`;
  return undefined;
}

/**
 * A plain number such as a count of turns. Hands on the number, or null while there is none or it may not be used;
 * the text stays as it was typed.
 */
export function NumberField(props: NumberFieldProps) {
  const { value, onChange, onBlur, name, ref, disabled, least, most, whole, unit, error, ...rest } = props;
  const [text, setText] = useState(value === null ? '' : String(value));
  const [handedOn, setHandedOn] = useState(value);
  if (value !== handedOn && !(Number.isNaN(value) && Number.isNaN(handedOn))) {
    // Changed from outside (loaded, reset): show that.
    setHandedOn(value);
    setText(value === null ? '' : String(value));
  }
  const problem = numberProblem(text, rest.label, { least, most, whole }) ?? error;
  return (
    <Field {...rest} error={problem}>
      {(control) => (
        <span className="field-box" data-invalid={problem ? '' : undefined} data-disabled={disabled ? '' : undefined}>
          <input
            {...control}
            {...{ name, disabled, onBlur }}
            ref={ref as Ref<HTMLInputElement>}
            type="text"
            inputMode={whole ? 'numeric' : 'decimal'}
            autoComplete="off"
            value={text}
            onChange={(event) => {
              const typed = event.target.value;
              const usable =
                typed.trim() !== '' && numberProblem(typed, rest.label, { least, most, whole }) === undefined;
              const next = usable ? read(typed) : null;
              setText(typed);
              setHandedOn(next);
              onChange(next);
            }}
            className="font-mono"
          />
          {unit ? <span className="shrink-0 pr-2.5 text-graphite">{unit}</span> : null}
        </span>
      )}
    </Field>
  );
}
