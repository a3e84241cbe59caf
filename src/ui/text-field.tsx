import { Eye, EyeOff, Search, X } from 'lucide-react';
import { useState } from 'react';
import type { HTMLInputAutoCompleteAttribute, InputHTMLAttributes, Ref } from 'react';
import { IconButton } from './button';
import { classNames } from './class-names';
import { Field } from './field';
import type { BoundProps, FieldProps } from './field';

export interface TextFieldProps extends FieldProps, BoundProps<string> {
  type?: 'text' | 'email' | 'url' | 'tel' | 'date' | 'datetime-local' | 'time';
  /** Figures, ids and codes are set in the mono face. */
  mono?: boolean;
  /** Stands in the box after the text, lighter. */
  unit?: string;
  placeholder?: string;
  maxLength?: number;
  autoComplete?: HTMLInputAutoCompleteAttribute;
  inputMode?: InputHTMLAttributes<HTMLInputElement>['inputMode'];
  autoFocus?: boolean;
  readOnly?: boolean;
}

export function TextField(props: TextFieldProps) {
  const { value, onChange, onBlur, name, ref, disabled, mono, unit, type = 'text', ...rest } = props;
  const { placeholder, maxLength, autoComplete, inputMode, autoFocus, readOnly } = props;
  return (
    <Field {...rest}>
      {(control) => (
        <span
          className="field-box"
          data-invalid={rest.error ? '' : undefined}
          data-disabled={disabled ? '' : undefined}
        >
          <input
            {...control}
            {...{ placeholder, maxLength, autoComplete, inputMode, autoFocus, readOnly, name, disabled, type }}
            ref={ref as Ref<HTMLInputElement>}
            value={value}
            onChange={(event) => onChange(event.target.value)}
            onBlur={onBlur}
            className={classNames(mono && 'font-mono')}
          />
          {unit ? <span className="shrink-0 pr-2.5 text-graphite">{unit}</span> : null}
        </span>
      )}
    </Field>
  );
}

export interface PasswordFieldProps extends Omit<TextFieldProps, 'type' | 'mono' | 'unit'> {
  autoComplete: 'current-password' | 'new-password';
}

/** A password that one may look at while typing it. */
export function PasswordField(props: PasswordFieldProps) {
  const { value, onChange, onBlur, name, ref, disabled, ...rest } = props;
  const [shown, setShown] = useState(false);
  return (
    <Field {...rest}>
      {(control) => (
        <span
          className="field-box"
          data-invalid={rest.error ? '' : undefined}
          data-disabled={disabled ? '' : undefined}
        >
          <input
            {...control}
            {...{ name, disabled }}
            autoComplete={props.autoComplete}
            autoFocus={props.autoFocus}
            maxLength={props.maxLength}
            ref={ref as Ref<HTMLInputElement>}
            type={shown ? 'text' : 'password'}
            spellCheck={false}
            autoCapitalize="none"
            value={value}
            onChange={(event) => onChange(event.target.value)}
            onBlur={onBlur}
            className={classNames(shown && 'font-mono')}
          />
          <IconButton
            size="small"
            icon={shown ? EyeOff : Eye}
            label={shown ? 'Hide password' : 'Show password'}
            onPress={() => setShown(!shown)}
            className="mr-0.5 min-h-7! w-7!"
          />
        </span>
      )}
    </Field>
  );
}

export interface SearchFieldProps extends BoundProps<string> {
  label: string;
  placeholder?: string;
  className?: string;
}

/** Narrows a list while typing; Escape clears it. */
export function SearchField({ label, value, onChange, placeholder, className, ref, name, onBlur }: SearchFieldProps) {
  return (
    <span role="search" className={classNames('field-box', className)}>
      <Search aria-hidden className="ml-2.5 size-4 shrink-0 text-graphite" />
      <input
        ref={ref as Ref<HTMLInputElement>}
        name={name}
        onBlur={onBlur}
        type="text"
        role="searchbox"
        aria-label={label}
        placeholder={placeholder ?? label}
        value={value}
        onChange={(event) => onChange(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === 'Escape' && value !== '') {
            event.stopPropagation();
            onChange('');
          }
        }}
      />
      {value === '' ? null : (
        <IconButton size="small" icon={X} label="Clear" onPress={() => onChange('')} className="mr-0.5 min-h-7! w-7!" />
      )}
    </span>
  );
}
