import { useId } from 'react';
import type { ReactNode, Ref } from 'react';
import { classNames } from './class-names';

export type FieldLayout = 'stacked' | 'inline';

/** What every field takes, whatever is in its box. */
export interface FieldProps {
  label: string;
  /** One line under the field: what belongs here, or where the value comes from. */
  hint?: ReactNode;
  /** What is wrong, in words that name value and limit. */
  error?: string | undefined;
  required?: boolean;
  disabled?: boolean;
  /** `inline` puts the label on the left, as on a data sheet. */
  layout?: FieldLayout;
  /** Keeps the label for screen readers only. */
  labelHidden?: boolean;
  className?: string;
}

/** Attributes that tie a control to its label, hint and error. */
export interface ControlProps {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
  'aria-required': true | undefined;
}

interface FieldBaseProps extends FieldProps {
  children: (control: ControlProps) => ReactNode;
  /** Stands between box and hint: what was understood, a count. */
  below?: ReactNode;
  /** The control is a group with own labels: the label is not tied to one element. */
  group?: boolean;
}

/** The one base of all fields: label, box, hint, error. */
export function Field({
  label,
  hint,
  error,
  required,
  layout = 'stacked',
  labelHidden,
  below,
  group,
  className,
  children,
}: FieldBaseProps) {
  const id = useId();
  const hintId = `${id}-hint`;
  const errorId = `${id}-error`;
  const belowId = `${id}-below`;
  const describedBy = [error && errorId, below && belowId, hint && hintId].filter(Boolean).join(' ') || undefined;
  const inline = layout === 'inline' && !labelHidden;
  const control = children({
    id,
    'aria-describedby': describedBy,
    'aria-invalid': error ? true : undefined,
    'aria-required': required ? true : undefined,
  });
  const labelClass = classNames(
    labelHidden && 'sr-only',
    inline ? 'pt-1.5 text-graphite leading-tight' : 'font-medium leading-tight',
  );
  const labelText = (
    <>
      {label}
      {required && !inline ? <span className="font-normal text-graphite"> (required)</span> : null}
    </>
  );
  return (
    <div
      className={classNames(
        inline
          ? 'grid grid-cols-[minmax(5.5rem,9fr)_minmax(0,13fr)] items-start gap-x-2 gap-y-0.5'
          : 'flex flex-col gap-1',
        className,
      )}
      role={group ? 'group' : undefined}
      aria-labelledby={group ? `${id}-label` : undefined}
      aria-describedby={group ? describedBy : undefined}
    >
      {group ? (
        <span id={`${id}-label`} className={labelClass}>
          {labelText}
        </span>
      ) : (
        <label htmlFor={id} className={labelClass}>
          {labelText}
        </label>
      )}
      {control}
      <FieldNotes
        inline={inline}
        below={below}
        belowId={belowId}
        hint={hint}
        hintId={hintId}
        error={error}
        errorId={errorId}
      />
    </div>
  );
}

interface NotesProps {
  inline: boolean;
  below: ReactNode;
  belowId: string;
  hint: ReactNode;
  hintId: string;
  error: string | undefined;
  errorId: string;
}

function FieldNotes({ inline, below, belowId, hint, hintId, error, errorId }: NotesProps) {
  if (!below && !hint && !error) return null;
  return (
    <div className={classNames('flex flex-col text-sm leading-snug', inline && 'col-span-2 pb-0.5 text-right')}>
      {error ? (
        <span id={errorId} className="text-cinnabar">
          <span aria-hidden className="mr-1 font-bold">
            ×
          </span>
          {error}
        </span>
      ) : null}
      {below ? (
        <span id={belowId} className="text-graphite">
          {below}
        </span>
      ) : null}
      {hint ? (
        <span id={hintId} className="text-graphite">
          {hint}
        </span>
      ) : null}
    </div>
  );
}

/** What a form library gives a field; see form.tsx. */
export interface BoundProps<T> {
  value: T;
  onChange: (value: T) => void;
  onBlur?: (() => void) | undefined;
  name?: string | undefined;
  ref?: Ref<HTMLElement> | undefined;
}
