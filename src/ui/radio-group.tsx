import { useId } from 'react';
import type { Ref } from 'react';
import { Field } from './field';
import type { BoundProps, FieldProps } from './field';
import type { Choice } from './select';
import { classNames } from './class-names';

export interface RadioGroupProps<T extends string> extends FieldProps, BoundProps<T | ''> {
  choices: readonly Choice<T>[];
  /** Side by side where they are short. */
  direction?: 'down' | 'across';
}

/** One of a few, all visible. */
export function RadioGroup<T extends string>(props: RadioGroupProps<T>) {
  const { value, onChange, onBlur, name, ref, disabled, choices, direction = 'down', ...rest } = props;
  const fallbackName = useId();
  return (
    <Field {...rest} group>
      {() => (
        <div className={classNames('flex', direction === 'down' ? 'flex-col' : 'flex-wrap gap-x-5')}>
          {choices.map((choice, index) => (
            <label key={choice.value} className="flex w-fit cursor-pointer items-start gap-2 py-1 leading-snug">
              <input
                type="radio"
                className="mt-[0.2em] size-[1.05em] shrink-0 accent-copper"
                ref={index === 0 ? (ref as Ref<HTMLInputElement>) : undefined}
                name={name ?? fallbackName}
                onBlur={onBlur}
                disabled={disabled === true || choice.disabled === true}
                checked={value === choice.value}
                onChange={() => onChange(choice.value)}
              />
              <span>
                {choice.label}
                {choice.detail ? <span className="block text-sm text-graphite">{choice.detail}</span> : null}
              </span>
            </label>
          ))}
        </div>
      )}
    </Field>
  );
}
