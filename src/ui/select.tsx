import { ChevronDown } from 'lucide-react';
import type { Ref } from 'react';
import { Field } from './field';
import type { BoundProps, FieldProps } from './field';

export interface Choice<T extends string = string> {
  value: T;
  label: string;
  /** Second line in lists that have room for one. */
  detail?: string;
  disabled?: boolean;
}

export interface SelectProps<T extends string> extends FieldProps, BoundProps<T> {
  choices: readonly Choice<T>[];
  /** Words of the empty choice, where none is an answer or nothing is chosen yet; its value is ''. */
  placeholder?: string;
}

/** One of a few. The system's own list: it works best with thumbs, keyboards and screen readers. */
export function Select<T extends string>(props: SelectProps<T>) {
  const { value, onChange, onBlur, name, ref, disabled, choices, placeholder, ...rest } = props;
  return (
    <Field {...rest}>
      {(control) => (
        <span
          className="field-box relative"
          data-invalid={rest.error ? '' : undefined}
          data-disabled={disabled ? '' : undefined}
        >
          <select
            {...control}
            {...{ name, disabled }}
            ref={ref as Ref<HTMLSelectElement>}
            value={value}
            onChange={(event) => onChange(event.target.value as T)}
            onBlur={onBlur}
          >
            {placeholder === undefined ? null : <option value="">{placeholder}</option>}
            {choices.map((choice) => (
              <option key={choice.value} value={choice.value} disabled={choice.disabled}>
                {choice.label}
              </option>
            ))}
          </select>
          <ChevronDown aria-hidden className="pointer-events-none absolute right-2 size-4 text-graphite" />
        </span>
      )}
    </Field>
  );
}
