import { MessageSquarePlus } from 'lucide-react';
import { useState } from 'react';
import type { ReactNode } from 'react';
import { designField } from '#contracts/design-document';
import type { DocumentField } from '#contracts/design-document';
import { readQuantity, textInUnit } from '../../lib/quantities';
import { IconButton } from '../../ui/button';
import { Checkbox } from '../../ui/checkbox';
import { ComboBox } from '../../ui/combo-box';
import { QuantityField } from '../../ui/quantity-field';
import { Figure } from '../../ui/quantity';
import type { Choice } from '../../ui/select';
import { Select } from '../../ui/select';
import { TextField } from '../../ui/text-field';
import { useDocumentForm } from './document-form';
import { textOfValue, valueOfResult, valueOfText } from './typed-text';

export const fieldAnchor = (path: string): string => `field-${path}`;

interface ReadOnlyLineProps {
  path: string;
  label: string;
  children: ReactNode;
  hint?: ReactNode;
}

/** A value of a frozen document: label at the left, value at the right, and a way to remark on it. */
export function ReadOnlyLine({ path, label, children, hint }: ReadOnlyLineProps) {
  const { onRemark } = useDocumentForm();
  return (
    <div
      id={fieldAnchor(path)}
      className="group grid scroll-mt-24 grid-cols-[minmax(0,1fr)_auto_auto] items-center gap-x-1.5 rounded py-0.5 target:bg-wash"
    >
      <span className="text-graphite">{label}</span>
      <span className="text-right wrap-anywhere">{children}</span>
      {onRemark ? (
        <IconButton
          icon={MessageSquarePlus}
          size="small"
          label={`Remark on ${label.toLowerCase()}`}
          onPress={() => onRemark(path)}
          className="min-h-7! w-7! text-graphite!"
        />
      ) : null}
      {hint ? <span className="col-span-2 text-right text-sm text-graphite">{hint}</span> : null}
    </div>
  );
}

interface QuantityAtProps {
  path: string;
  /** Shape or kind of what stands there, where the field depends on it. */
  kind?: string;
  label?: string;
  hint?: ReactNode;
}

function readOnlyText(stored: unknown, field: DocumentField): ReactNode {
  if (stored === undefined || stored === null) {
    return field.default === undefined ? (
      <span className="text-graphite">none</span>
    ) : (
      <Figure number={textInUnit(field.default, field.dimension, field.unit)} unit={field.unit} />
    );
  }
  if (typeof stored === 'number') {
    const figure = Number(Number(textInUnit(stored, field.dimension, field.unit)).toPrecision(6));
    return <Figure number={String(figure).replace('-', '−')} unit={field.unit} />;
  }
  return <span className="font-mono">{typeof stored === 'string' ? stored : JSON.stringify(stored)}</span>;
}

/** One quantity of the document: keeps what is typed, says what it was understood to be and what is wrong with it. */
export function QuantityAt({ path, kind, label, hint }: QuantityAtProps) {
  const { valueAt, setAt, issueAt, readOnly } = useDocumentForm();
  const field = designField(path, kind);
  const stored = valueAt(path);
  const [text, setText] = useState(() => (field ? textOfValue(stored, field) : ''));
  const [written, setWritten] = useState(stored);
  const [focused, setFocused] = useState(false);
  const [understood, setUnderstood] = useState(true);
  if (field && !Object.is(stored, written)) {
    // Changed from outside: another draft taken over, a kind chosen.
    setWritten(stored);
    setText(textOfValue(stored, field));
  }
  if (!field) return null;
  const name = label ?? field.label;
  if (readOnly)
    return (
      <ReadOnlyLine path={path} label={name} hint={hint}>
        {readOnlyText(stored, field)}
      </ReadOnlyLine>
    );
  const put = (value: string | undefined) => {
    setWritten(value);
    setAt(path, value);
  };
  const { dimension, unit, minimum, maximum, above } = field;
  // What is being typed is not yet wrong, whatever the server thinks of it.
  const issue = focused && !understood ? undefined : issueAt(path);
  return (
    <div
      id={fieldAnchor(path)}
      className="scroll-mt-24"
      title={field.help}
      onFocus={() => setFocused(true)}
      onBlur={() => setFocused(false)}
    >
      <QuantityField
        layout="inline"
        label={name}
        {...{ dimension, unit }}
        value={text}
        onChange={(next) => {
          setText(next);
          put(valueOfText(next, field));
        }}
        onUnderstood={(value) => {
          setUnderstood(value !== null || text.trim() === '');
          if (value !== null && readQuantity(text, dimension, unit) === 'pending') put(valueOfResult(value, field));
        }}
        least={above ? undefined : minimum}
        above={above ? minimum : undefined}
        most={maximum}
        hint={hint}
        error={issue === undefined ? undefined : `${name}: ${issue}.`}
        placeholder={field.default === undefined ? undefined : textInUnit(field.default, dimension, unit)}
      />
    </div>
  );
}

interface ChoiceAtProps<T extends string> {
  path: string;
  label: string;
  choices: readonly Choice<T>[];
  /** Between the document's value and the choice; text alike unless given. */
  read?: (value: unknown) => T;
  write?: (choice: T) => unknown;
  /** In place of writing one value, where the choice changes more than that. */
  onChoose?: (choice: T) => void;
  hint?: ReactNode;
}

/** One of a few, in the document as it stands or as `write` makes it. */
export function ChoiceAt<T extends string>({ path, label, choices, read, write, onChoose, hint }: ChoiceAtProps<T>) {
  const { valueAt, setAt, issueAt, readOnly } = useDocumentForm();
  const value = read ? read(valueAt(path)) : (String(valueAt(path) ?? '') as T);
  const issue = issueAt(path);
  if (readOnly)
    return (
      <ReadOnlyLine path={path} label={label} hint={hint}>
        {choices.find((choice) => choice.value === value)?.label ?? value}
      </ReadOnlyLine>
    );
  return (
    <div id={fieldAnchor(path)} className="scroll-mt-24">
      <Select
        layout="inline"
        {...{ label, value, choices, hint }}
        error={issue === undefined ? undefined : `${label}: ${issue}.`}
        onChange={(choice) => (onChoose ? onChoose(choice) : setAt(path, write ? write(choice) : choice))}
      />
    </div>
  );
}

const signChoices = (positive: string, negative: string) =>
  [
    { value: '1', label: positive },
    { value: '-1', label: negative },
  ] as const;

/** Plus or minus one, in the words of what it turns round. */
export const SignAt = ({
  path,
  label,
  positive,
  negative,
}: {
  path: string;
  label: string;
  positive: string;
  negative: string;
}) => (
  <ChoiceAt
    {...{ path, label }}
    choices={signChoices(positive, negative)}
    read={(value) => (Number(value ?? 1) < 0 ? '-1' : '1')}
    write={Number}
  />
);

/** True or false. */
export function SwitchAt({
  path,
  label,
  fallback,
  hint,
}: {
  path: string;
  label: string;
  fallback: boolean;
  hint?: string;
}) {
  const { valueAt, setAt, readOnly } = useDocumentForm();
  const value = valueAt(path);
  const on = typeof value === 'boolean' ? value : fallback;
  if (readOnly)
    return (
      <ReadOnlyLine path={path} label={label}>
        {on ? 'yes' : 'no'}
      </ReadOnlyLine>
    );
  return (
    <div id={fieldAnchor(path)}>
      <Checkbox label={label} hint={hint} value={on} onChange={(next) => setAt(path, next)} />
    </div>
  );
}

/** A line of text such as a name. */
export function TextAt({ path, label }: { path: string; label: string }) {
  const { valueAt, setAt, issueAt, readOnly } = useDocumentForm();
  const value = String(valueAt(path) ?? '');
  const issue = issueAt(path);
  if (readOnly)
    return (
      <ReadOnlyLine path={path} label={label}>
        {value === '' ? <span className="text-graphite">none</span> : value}
      </ReadOnlyLine>
    );
  return (
    <div id={fieldAnchor(path)}>
      <TextField
        layout="inline"
        {...{ label, value }}
        maxLength={200}
        onChange={(next) => setAt(path, next === '' ? undefined : next)}
        error={issue === undefined ? undefined : `${label}: ${issue}.`}
      />
    </div>
  );
}

interface CatalogueAtProps {
  path: string;
  label: string;
  kind: 'magnetMaterial' | 'wire' | 'diode';
  /** What a person's own properties start from. */
  own: () => unknown;
  ownLabel: string;
  hint?: ReactNode;
  /** Fields of the properties themselves, shown where they are stated. */
  children: ReactNode;
}

const ownKey = '\u0000own';

/** A catalogue key, or properties of one's own. */
export function CatalogueAt({ path, label, kind, own, ownLabel, hint, children }: CatalogueAtProps) {
  const { valueAt, setAt, issueAt, readOnly, catalogue, shelf } = useDocumentForm();
  const stored = valueAt(path);
  const stated = typeof stored === 'object' && stored !== null;
  const key = typeof stored === 'string' ? stored : '';
  const issue = issueAt(path);
  const name = stated ? String((stored as { name?: unknown }).name ?? 'as stated') : key;
  if (readOnly)
    return (
      <>
        <ReadOnlyLine path={path} label={label} hint={hint}>
          {name === '' ? <span className="text-graphite">none</span> : <span className="font-mono">{name}</span>}
        </ReadOnlyLine>
        {stated ? (
          <details className="ml-2 border-l border-rule pl-2.5">
            <summary className="text-sm text-graphite hover:text-ink">its properties</summary>
            {children}
          </details>
        ) : null}
      </>
    );
  const known = catalogue
    .filter((entry) => entry.kind === kind)
    .map((entry): Choice => ({ value: entry.key, label: entry.key }));
  const choices: Choice[] = [
    ...(key !== '' && !known.some(({ value }) => value === key) ? [{ value: key, label: key }] : []),
    ...known,
    { value: ownKey, label: ownLabel },
  ];
  const choose = (choice: string) => {
    if (stored !== undefined) shelf.set(`${path} ${stated ? 'own' : 'key'}`, stored);
    if (choice === ownKey) setAt(path, shelf.get(`${path} own`) ?? own());
    else if (choice !== '') setAt(path, choice);
  };
  return (
    <div id={fieldAnchor(path)} className="flex scroll-mt-24 flex-col gap-1.5">
      <ComboBox
        layout="inline"
        {...{ label, choices, hint }}
        value={stated ? ownKey : key}
        onChange={choose}
        error={issue === undefined ? undefined : `${label}: ${issue}.`}
      />
      {stated ? <div className="ml-1 flex flex-col gap-1.5 border-l-2 border-rule pl-2.5">{children}</div> : null}
    </div>
  );
}
