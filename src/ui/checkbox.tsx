import { useId } from 'react';
import type { ReactNode, Ref } from 'react';
import { Field } from './field';
import type { BoundProps, FieldProps } from './field';
import type { Choice } from './select';

const box = 'mt-[0.2em] size-[1.05em] shrink-0 accent-copper';

export interface CheckboxProps extends BoundProps<boolean> {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  disabled?: boolean;
  className?: string;
}

export function Checkbox({
  label,
  hint,
  error,
  value,
  onChange,
  onBlur,
  name,
  ref,
  disabled,
  className,
}: CheckboxProps) {
  const id = useId();
  return (
    <div className={className}>
      <label className="flex w-fit cursor-pointer items-start gap-2 py-1 leading-snug">
        <input
          type="checkbox"
          className={box}
          ref={ref as Ref<HTMLInputElement>}
          {...{ name, disabled, onBlur }}
          checked={value}
          onChange={(event) => onChange(event.target.checked)}
          aria-invalid={error ? true : undefined}
          aria-describedby={[error && `${id}-error`, hint && `${id}-hint`].filter(Boolean).join(' ') || undefined}
        />
        <span>{label}</span>
      </label>
      {error ? (
        <p id={`${id}-error`} className="ml-6 text-sm text-cinnabar">
          {error}
        </p>
      ) : null}
      {hint ? (
        <p id={`${id}-hint`} className="ml-6 text-sm text-graphite">
          {hint}
        </p>
      ) : null}
    </div>
  );
}

export interface CheckboxGroupProps<T extends string> extends FieldProps, BoundProps<T[]> {
  choices: readonly Choice<T>[];
}

/** Any of a few. */
export function CheckboxGroup<T extends string>(props: CheckboxGroupProps<T>) {
  const { value, onChange, onBlur, name, ref, disabled, choices, ...rest } = props;
  return (
    <Field {...rest} group>
      {() => (
        <div className="flex flex-col">
          {choices.map((choice, index) => (
            <Checkbox
              key={choice.value}
              {...{ name, onBlur }}
              ref={index === 0 ? ref : undefined}
              label={choice.label}
              hint={choice.detail}
              disabled={disabled === true || choice.disabled === true}
              value={value.includes(choice.value)}
              onChange={(chosen) =>
                onChange(
                  choices
                    .map((each) => each.value)
                    .filter((each) => (each === choice.value ? chosen : value.includes(each))),
                )
              }
            />
          ))}
        </div>
      )}
    </Field>
  );
}
