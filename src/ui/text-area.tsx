import type { Ref } from 'react';
import { Field } from './field';
import type { BoundProps, FieldProps } from './field';

export interface TextAreaProps extends FieldProps, BoundProps<string> {
  rows?: number;
  maxLength?: number;
  placeholder?: string;
  autoFocus?: boolean;
}

/** Several sentences; grows with what is written. */
export function TextArea(props: TextAreaProps) {
  const { value, onChange, onBlur, name, ref, disabled, rows = 3, maxLength, placeholder, autoFocus, ...rest } = props;
  const nearlyFull = maxLength !== undefined && value.length > maxLength * 0.9;
  return (
    <Field {...rest} below={nearlyFull ? `${value.length} of ${maxLength} characters` : undefined}>
      {(control) => (
        <span
          className="field-box"
          data-invalid={rest.error ? '' : undefined}
          data-disabled={disabled ? '' : undefined}
        >
          <textarea
            {...control}
            {...{ name, disabled, rows, placeholder, autoFocus }}
            ref={ref as Ref<HTMLTextAreaElement>}
            value={value}
            onChange={(event) => onChange(event.target.value)}
            onBlur={onBlur}
            className="field-sizing-content max-h-96 resize-y leading-normal"
            style={{ minHeight: `${rows * 1.5 + 0.7}em` }}
          />
        </span>
      )}
    </Field>
  );
}
