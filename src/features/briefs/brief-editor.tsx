import { useCallback, useId, useState } from 'react';
import type { ReactNode } from 'react';
import type { Brief, BriefDocument } from '#contracts/briefs';
import type { Change } from '#contracts/error';
import { formatAgo } from '../../lib/format';
import { isRequestError, RequestError } from '../../lib/request-error';
import { Button } from '../../ui/button';
import { Caution } from '../../ui/caution';
import { applyIssues } from '../../ui/form';
import { PageBody } from '../../ui/page-header';
import { briefFieldName, readBrief } from './brief-document';
import { briefFields, emptyBrief } from './brief-fields';
import type { BriefFields } from './brief-fields';
import { BriefForm, useBriefForm } from './brief-form';
import { useKeptDraft } from './kept-draft';

interface BriefEditorProps {
  /** The brief that is changed; null for a new one. */
  brief: Brief | null;
  /** Draws the head of the page around the button that saves. */
  header: (save: ReactNode) => ReactNode;
  saveLabel: string;
  /** Saves; `version` is the one that the text was written on. */
  save: (document: BriefDocument, version: number | null) => Promise<Brief>;
  onSaved: (brief: Brief) => void;
}

/** Writing or changing a brief: keeps the text while it is written, puts what is wrong at its field, never overwrites. */
export function BriefEditor({ brief, header, saveLabel, save, onSaved }: BriefEditorProps) {
  const formId = useId();
  const { found, keep, forget } = useKeptDraft<BriefFields>(brief?.id ?? 'new');
  // Text that was found goes on from the version it was written on: a newer one is told about, not overwritten.
  const [base, setBase] = useState(found === null ? (brief?.version ?? null) : found.version);
  const [restored, setRestored] = useState(found !== null);
  const [merged, setMerged] = useState(false);
  const [changed, setChanged] = useState<Change[] | null>(null);
  const saved = () => (brief === null ? emptyBrief() : briefFields(brief.document));
  const [start] = useState(() => {
    const from = saved();
    return found === null
      ? { from, values: null }
      : { from: { ...from, ...found.from }, values: { ...from, ...found.values } };
  });
  const [from, setFrom] = useState(start.from);
  const form = useBriefForm(
    start,
    useCallback((values) => keep(values, from, base), [keep, from, base]),
  );
  // Read here so that the form keeps count of it: merging needs to know which fields were changed.
  const { isSubmitting, dirtyFields } = form.formState;
  void dirtyFields;

  const send = (version: number | null) =>
    form.handleSubmit(async (fields) => {
      const reading = await readBrief(fields);
      if (!reading.ok) {
        applyIssues(form, new RequestError(422, 'invalid', 'The brief is not complete.', { issues: reading.issues }));
        return;
      }
      try {
        const answer = await save(reading.document, version);
        forget();
        onSaved(answer);
      } catch (error) {
        if (isRequestError(error, 'conflict')) setChanged(error.changed);
        else applyIssues(form, error, { rename: (path) => briefFieldName(path, fields.vibration.kind) });
      }
    });

  const goOnFrom = (fields: BriefFields) => {
    setFrom(fields);
    setRestored(false);
    setChanged(null);
    setBase(brief?.version ?? null);
  };
  const startAgain = () => {
    forget();
    const fields = saved();
    form.reset(fields);
    goOnFrom(fields);
    setMerged(false);
  };
  const merge = () => {
    const fields = saved();
    form.reset(fields, { keepDirtyValues: true });
    goOnFrom(fields);
    setMerged(true);
  };

  return (
    <>
      {header(
        <Button variant="primary" type="submit" form={formId} pending={isSubmitting} disabled={changed !== null}>
          {saveLabel}
        </Button>,
      )}
      <PageBody className="flex flex-col gap-5">
        {merged ? (
          <Caution severity="info" title="Both are below." className="max-w-6xl">
            Fields that you changed hold your text, the others what is saved. Look it over, then save.
          </Caution>
        ) : null}
        {restored && found ? (
          <Caution severity="info" title="Text that was not saved is shown." className="max-w-6xl">
            It was written on this device {formatAgo(found.at)}.{' '}
            <Button size="small" onPress={startAgain}>
              Discard it
            </Button>
          </Caution>
        ) : null}
        {changed !== null && brief !== null ? (
          <StaleBrief changed={changed} brief={brief} onMerge={merge} onTheirs={startAgain} />
        ) : null}
        <BriefForm id={formId} form={form} onSubmit={() => void send(base)()} />
      </PageBody>
    </>
  );
}

interface StaleBriefProps {
  changed: readonly Change[];
  brief: Brief;
  onMerge: () => void;
  onTheirs: () => void;
}

/** Somebody saved in the meantime: says what, and asks whose text is to hold. */
function StaleBrief({ changed, brief, onMerge, onTheirs }: StaleBriefProps) {
  return (
    <div role="alert" className="flex max-w-6xl flex-col items-start gap-2 border-l-4 border-amber bg-wash px-4 py-3">
      <h2>Somebody changed this brief while you wrote</h2>
      <ul className="list-disc pl-5">
        {changed.map((change) => (
          <li key={`${change.version} ${change.at}`}>
            {change.what}{' '}
            <span className="text-graphite">
              ({change.by ?? 'the server'}, {formatAgo(change.at)})
            </span>
          </li>
        ))}
      </ul>
      <p>Nothing was saved; your text is kept below. The brief is now at version {brief.version}.</p>
      <div className="flex flex-wrap gap-2">
        <Button onPress={onMerge}>Keep my changes, take theirs for the rest</Button>
        <Button onPress={onTheirs}>Discard mine and load theirs</Button>
      </div>
    </div>
  );
}
