import { useId } from 'react';
import type { FormEvent, ReactNode } from 'react';
import { Controller } from 'react-hook-form';
import type { Control, FieldPath, FieldPathValue, FieldValues, UseFormReturn } from 'react-hook-form';
import type { Issue } from '#contracts/error';
import { RequestError } from '../lib/request-error';
import type { BoundProps } from './field';
import { classNames } from './class-names';

interface FormFieldProps<V extends FieldValues, N extends FieldPath<V>> {
  control: Control<V>;
  name: N;
  /** Draws the field: `{(bind) => <TextField label="Title" {...bind} />}`. */
  children: (bind: BoundProps<FieldPathValue<V, N>> & { error: string | undefined }) => ReactNode;
}

/** Ties one field of this kit to a form: value, changes, focus on error, and the error's words. */
export function FormField<V extends FieldValues, N extends FieldPath<V>>({
  control,
  name,
  children,
}: FormFieldProps<V, N>) {
  return (
    <Controller
      control={control}
      name={name}
      render={({ field, fieldState }) => (
        <>
          {children({
            name: field.name,
            value: field.value,
            onChange: field.onChange,
            onBlur: field.onBlur,
            ref: field.ref,
            error: fieldState.error?.message,
          })}
        </>
      )}
    />
  );
}

/** `requirements[0].limit`, `/requirements/0/limit` and `requirements.0.limit` mean one field. */
export const fieldPath = (path: string): string =>
  path
    .replace(/^[/$.]+/, '')
    .replace(/\[(\w+)\]/g, '.$1')
    .replace(/\//g, '.');

/** An issue in words that name value and limit where the server told them. */
export function issueWords({ message, limit, value }: Issue): string {
  const parts = [message.replace(/\.$/, '')];
  if (limit !== undefined && !message.includes(String(limit))) parts.push(`limit ${limit}`);
  const short = typeof value === 'number' || typeof value === 'string' ? String(value) : '';
  if (short !== '' && short.length < 40 && !message.includes(short)) parts.push(`was ${short}`);
  return `${parts.join('; ')}.`;
}

const knows = (values: unknown, path: string): boolean => {
  let here: unknown = values;
  for (const step of path.split('.')) {
    if (here === null || typeof here !== 'object' || !(step in here)) return false;
    here = (here as Record<string, unknown>)[step];
  }
  return path !== '';
};

interface ApplyOptions {
  /** Turns a path of the request into the name of the field, where they differ; null where there is no field. */
  rename?: (path: string) => string | null;
}

/**
 * Puts what the server found wrong at the fields and takes the focus to the first. What belongs to no field goes to the
 * form's `root` error, which `FormError` shows.
 */
export function applyIssues<V extends FieldValues>(
  form: UseFormReturn<V>,
  error: unknown,
  { rename }: ApplyOptions = {},
): void {
  if (!(error instanceof RequestError)) {
    form.setError('root', { type: 'server', message: 'Something went wrong in this page. What you typed is kept.' });
    return;
  }
  const unplaced: string[] = [];
  let first = true;
  for (const issue of error.issues) {
    const path = fieldPath(issue.path);
    const name = rename ? rename(path) : path;
    if (name !== null && knows(form.getValues(), name)) {
      form.setError(name as FieldPath<V>, { type: 'server', message: issueWords(issue) }, { shouldFocus: first });
      first = false;
    } else unplaced.push(`${path === '' ? '' : `${path}: `}${issueWords(issue)}`);
  }
  if (error.issues.length === 0) unplaced.push(error.message);
  if (unplaced.length > 0) form.setError('root', { type: 'server', message: unplaced.join('\n') });
}

/** What is wrong with the form as a whole; read out when it appears. */
export function FormError({ message }: { message: string | undefined }) {
  if (!message) return null;
  return (
    <div role="alert" className="border-l-4 border-cinnabar bg-wash px-3 py-2 whitespace-pre-line">
      {message}
    </div>
  );
}

interface FormProps {
  onSubmit: () => void;
  children: ReactNode;
  className?: string;
  id?: string;
  label?: string;
}

/** A form that leaves checking to contracts and never reloads the page. */
export function Form({ onSubmit, children, className, id, label }: FormProps) {
  const submit = (event: FormEvent) => {
    event.preventDefault();
    event.stopPropagation();
    onSubmit();
  };
  return (
    <form
      noValidate
      id={id}
      aria-label={label}
      onSubmit={submit}
      className={classNames('flex flex-col gap-4', className)}
    >
      {children}
    </form>
  );
}

interface FieldGroupProps {
  title: string;
  /** Stands at the right of the title, lighter: a choice made elsewhere, a count. */
  aside?: ReactNode;
  children: ReactNode;
  className?: string;
}

/** Fields that belong together, under a title and closed by a rule, as on a data sheet. */
export function FieldGroup({ title, aside, children, className }: FieldGroupProps) {
  const id = useId();
  return (
    <section aria-labelledby={id} className={classNames('flex flex-col gap-1.5 border-b border-rule pb-4', className)}>
      <div className="flex items-baseline justify-between gap-3 pb-1">
        <h2 id={id} className="text-base">
          {title}
        </h2>
        {aside ? <div className="text-sm text-graphite">{aside}</div> : null}
      </div>
      {children}
    </section>
  );
}
