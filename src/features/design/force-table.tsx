import { useState } from 'react';
import { TextArea } from '../../ui/text-area';
import { readAt, writeAt } from './document-path';
import { useDocumentForm } from './document-form';
import { fieldAnchor } from './value-fields';

const asText = (value: unknown, unit: string) => (typeof value === 'number' ? `${value} ${unit}` : String(value ?? ''));

/** Lines “displacement, force” of a table suspension. */
export function tableText(document: unknown): string {
  const displacement = readAt(document, 'suspension.displacement');
  const force = readAt(document, 'suspension.force');
  if (!Array.isArray(displacement) || !Array.isArray(force)) return '';
  const count = Math.max(displacement.length, force.length);
  return Array.from({ length: count }, (_, at) => `${asText(displacement[at], 'm')}, ${asText(force[at], 'N')}`).join(
    '\n',
  );
}

/** The two lists of a typed table: comma, semicolon or tab between the columns. */
export function tableLists(text: string): { displacement: string[]; force: string[] } {
  const rows = text
    .split('\n')
    .map((line) => line.trim())
    .filter((line) => line !== '')
    .map((line) => line.split(/\s*[,;\t]\s*/));
  return { displacement: rows.map(([first = '']) => first), force: rows.map(([, second = '']) => second) };
}

/** A measured force curve, a line for each point. */
export function ForceTable({ hint }: { hint?: string | undefined }) {
  const { document, change, issueAt, readOnly } = useDocumentForm();
  const stored = tableText(document);
  const [text, setText] = useState(stored);
  const [written, setWritten] = useState(stored);
  if (stored !== written) {
    setWritten(stored);
    setText(stored);
  }
  const count = text.split('\n').length;
  const issue = Array.from({ length: count }, (_, at) => at).reduce<string | undefined>(
    (found, at) => {
      if (found !== undefined) return found;
      const wrong = issueAt(`suspension.displacement.${at}`) ?? issueAt(`suspension.force.${at}`);
      return wrong === undefined ? undefined : `Line ${at + 1}: ${wrong}.`;
    },
    [issueAt('suspension.displacement'), issueAt('suspension.force')].find((each) => each !== undefined),
  );
  if (readOnly) return <pre className="font-mono text-sm whitespace-pre-wrap">{text}</pre>;
  return (
    <div id={fieldAnchor('suspension.displacement')}>
      <TextArea
        label="Displacement, force"
        hint={hint ?? 'One point a line: 2 mm, -4.9 N'}
        value={text}
        error={issue}
        onChange={(next) => {
          const lists = tableLists(next);
          const changed = writeAt(
            writeAt(document, 'suspension.displacement', lists.displacement),
            'suspension.force',
            lists.force,
          );
          setText(next);
          setWritten(tableText(changed));
          change(changed);
        }}
      />
    </div>
  );
}
