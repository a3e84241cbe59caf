import { useQuery, useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useEffect, useMemo, useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import type { Estimate } from '#contracts/estimates';
import type { Revision } from '#contracts/revisions';
import { ConflictNotice } from '../features/design/conflict-notice';
import { DesignFields } from '../features/design/design-fields';
import { DesignPageLayout } from '../features/design/design-page-layout';
import { DocumentForm } from '../features/design/document-form';
import type { Draft } from '../features/design/document-path';
import { FrozenNotice, RestoredNotice } from '../features/design/draft-notices';
import { hintsOf } from '../features/design/hints';
import { messageInWords, pathInWords } from '../features/design/labels';
import { catalogueQuery, readRevision } from '../features/design/queries';
import { SaveWords } from '../features/design/save-words';
import { useDraft } from '../features/design/use-draft';
import { designQuery, revisionPath } from '../features/designs/queries';
import { envelopeLimits } from '../features/results/envelope-limits';
import { EstimateCautions } from '../features/results/estimate-cautions';
import { FreshnessWords, freshnessInAWord } from '../features/results/freshness-words';
import { Headline, HeadlineBar, KeyResults } from '../features/results/headline';
import { designPath, issueAt } from '../features/results/live-estimate';
import { RequirementMargins } from '../features/results/requirement-margins';
import { ResultTabs } from '../features/results/result-tabs';
import { useLiveEstimate } from '../features/results/use-live-estimate';
import { RevisionActions } from '../features/revision/revision-actions';
import { revisionQuery } from '../features/revision/queries';
import { RevisionHistory, RevisionRemarks, RevisionSignatures } from '../features/revision/revision-sidebar';
import { RevisionWay } from '../features/revision/revision-way';
import { AlignedStrip, drawDevice } from '../features/strip/aligned-strip';
import { readStripDevice, sizeOf } from '../features/strip/device';
import { positionsOf } from '../features/strip/domain';
import { queryClient } from '../lib/query-client';
import { RequestError } from '../lib/request-error';
import { ButtonLink } from '../ui/button';
import { PageHeader } from '../ui/page-header';

/** The revision's line in its design; looked up anew where a cached design does not know the letter yet. */
async function lineOf(designId: string, letter: string) {
  for (const staleTime of ['static', 0] as const) {
    const design = await queryClient.query({ ...designQuery(designId), staleTime });
    const line = design.revisions.find((revision) => revision.letter.toLowerCase() === letter.toLowerCase());
    if (line) return line;
  }
  throw new RequestError(404, 'notFound', `This design has no revision ${letter.toUpperCase()} that is open to you.`);
}

export async function loader({ params }: LoaderFunctionArgs) {
  const line = await lineOf(params.designId ?? '', params.letter ?? '');
  await queryClient.query({ ...revisionQuery(line.id), staleTime: 'static' });
  return null;
}

export function Component() {
  const { designId = '', letter = '' } = useParams();
  const design = useSuspenseQuery(designQuery(designId)).data;
  const line = design.revisions.find((revision) => revision.letter.toLowerCase() === letter.toLowerCase());
  if (!line)
    throw new RequestError(404, 'notFound', `This design has no revision ${letter.toUpperCase()} that is open to you.`);
  return <RevisionPage key={line.id} revisionId={line.id} letters={design.revisions.map((each) => each.letter)} />;
}

function RevisionPage({ revisionId, letters }: { revisionId: string; letters: string[] }) {
  const revision = useSuspenseQuery(revisionQuery(revisionId)).data;
  return revision.mayEdit ? (
    <DraftPage key="draft" {...{ revision, letters }} />
  ) : (
    <ReadingPage key="reading" {...{ revision, letters }} />
  );
}

interface PageProps {
  revision: Revision;
  letters: string[];
}

/** A draft in the hands of somebody who may edit it. */
function DraftPage({ revision, letters }: PageProps) {
  const client = useQueryClient();
  const draft = useDraft(revision, (saved) => client.setQueryData(revisionQuery(revision.id).queryKey, saved));
  const { state } = draft;
  const { kind } = state;
  useEffect(() => {
    // What differs is shown against the draft as it is now, not as it was when this page was opened.
    if (kind === 'conflict') void client.invalidateQueries({ queryKey: revisionQuery(revision.id).queryKey });
  }, [kind, client, revision.id]);
  const theirs = async () => {
    const newest = await readRevision(revision.id);
    client.setQueryData(revisionQuery(revision.id).queryKey, newest);
    return newest;
  };
  return (
    <RevisionScreen
      {...{ revision, letters }}
      document={draft.draft}
      onChange={draft.edit}
      saved={<SaveWords state={state} onRetry={draft.retry} />}
      beforeSend={draft.flush}
      notices={
        state.kind === 'conflict' ? (
          <ConflictNotice
            message={state.message}
            changed={state.changed}
            mine={draft.draft}
            theirs={revision}
            onTakeTheirs={async () => draft.takeTheirs(await theirs())}
            base={draft.base}
            onKeep={async (make) => {
              const newest = await theirs();
              draft.keep(newest, make(newest.document as Draft));
            }}
          />
        ) : (
          <RestoredNotice
            restored={draft.restored}
            saved={state.kind === 'saved'}
            refused={state.kind === 'refused' ? state.message : null}
          />
        )
      }
    />
  );
}

/** A revision that is frozen, or somebody else's draft. */
function ReadingPage({ revision, letters }: PageProps) {
  return (
    <RevisionScreen
      {...{ revision, letters }}
      document={(revision.document ?? {}) as Draft}
      notices={<FrozenNotice revision={revision} />}
    />
  );
}

interface ScreenProps extends PageProps {
  document: Draft;
  /** Absent where the document cannot be changed here. */
  onChange?: (document: Draft) => void;
  saved?: React.ReactNode;
  beforeSend?: () => Promise<Revision>;
  notices: React.ReactNode;
}

/** The estimate shown: the one stored at submission, else one that follows the document. */
function useShownEstimate(revision: Revision, document: Draft) {
  const [travel, setTravel] = useState(0);
  const positions = useMemo(() => {
    const { domain } = drawDevice(readStripDevice(document), travel);
    // The server takes no positions beyond 10 m.
    return positionsOf({ from: Math.max(-9999, domain.from), to: Math.min(9999, domain.to) });
  }, [document, travel]);
  const { vibration, temperature } = revision.brief.document;
  const { lowest: coldest, highest: hottest } = temperature;
  const stored = revision.estimate;
  const live = useLiveEstimate(
    stored ? null : { design: document, vibration, positions, temperatureRange: { coldest, hottest } },
  );
  const peak = Math.round((live.shown?.response.displacementPeak ?? 0) * 1e6) / 1e3;
  if (peak !== travel) setTravel(peak);
  return { live, estimate: stored ?? live.shown, freshness: stored ? ('current' as const) : live.freshness };
}

function RevisionScreen({ revision, letters, document, onChange, saved, beforeSend, notices }: ScreenProps) {
  const { design, brief } = revision;
  const { live, estimate, freshness } = useShownEstimate(revision, document);
  const catalogue = useQuery({ ...catalogueQuery, enabled: onChange !== undefined }).data?.entries;
  const [shelf] = useState(() => new Map<string, unknown>());
  const [tab, setTab] = useState('waveforms');
  const [remarkOn, setRemarkOn] = useState<string | null>(null);
  const previous = freshness !== 'current';
  const shownDocument = previous && estimate ? live.shownDesign : document;
  const device = useMemo(() => readStripDevice(document, live.shownDesign ?? undefined), [document, live.shownDesign]);
  const say = (message: string) => messageInWords(document, message);
  const mayRemark = revision.availableEvents.includes('remark');
  const form = useMemo(
    () => ({
      document,
      readOnly: onChange === undefined,
      catalogue: catalogue ?? [],
      hints: hintsOf(estimate),
      issueAt: (path: string) => {
        const message = issueAt({ refused: live.refused }, document, path);
        return message === undefined ? undefined : messageInWords(document, message);
      },
      change: onChange ?? (() => undefined),
      shelf,
      onRemark: mayRemark ? setRemarkOn : undefined,
    }),
    [document, onChange, catalogue, estimate, live.refused, shelf, mayRemark],
  );
  const wrong =
    freshness === 'faulty'
      ? (live.refused?.issues ?? []).map(({ path }) => {
          const within = designPath(path);
          return within === null
            ? { path: '', label: 'The brief’s vibration' }
            : { path: within, label: pathInWords(document, within) };
        })
      : [];
  const words = (
    <FreshnessWords
      {...{ freshness, wrong }}
      shown={estimate !== null}
      calm={estimate?.response.method ?? ''}
      failure={live.failed?.message}
      onRetry={live.again}
    />
  );
  const { requirements } = brief.document;
  return (
    <>
      <PageHeader
        title={design.title}
        documentTitle={`${design.number} ${revision.letter} ${design.title}`}
        crumbs={[{ label: 'Designs', to: '/designs' }, { label: design.number }]}
        meta={
          <>
            <RevisionWay revision={revision} />
            <RevisionLetters designId={design.id} letters={letters} current={revision.letter} />
          </>
        }
        actions={
          <>
            {saved}
            <ButtonLink to={`/designs/new?from=${revision.id}`}>Make a variant</ButtonLink>
            <RevisionActions revision={revision} beforeSend={beforeSend} />
          </>
        }
      />
      <DesignPageLayout
        notices={notices}
        bar={<HeadlineBar {...{ estimate, previous }} document={shownDocument} words={freshnessInAWord(freshness)} />}
        fields={
          <DocumentForm value={form}>
            <DesignFields />
          </DocumentForm>
        }
        strip={
          <div className="sheet p-3 @[720px]:p-4">
            <AlignedStrip {...{ device, estimate, previous }} absent={absentWords(estimate, freshness)} />
          </div>
        }
        results={
          <div className="sheet p-3 @[720px]:p-4">
            <ResultTabs
              {...{ estimate, previous, say }}
              periodic={isTone(brief.document.vibration)}
              selected={tab}
              onSelect={setTab}
            />
          </div>
        }
        figures={
          <>
            <Headline {...{ estimate, previous }} document={shownDocument} state={words} />
            {estimate ? <KeyResults {...{ estimate, previous }} /> : null}
            <section>
              <h2 className="border-b border-rule pb-1.5">
                Brief{' '}
                <Link to={`/briefs/${brief.id}`} className="font-mono hover:underline">
                  {brief.number}
                </Link>
              </h2>
              <RequirementMargins
                {...{ requirements, estimate, previous }}
                others={envelopeLimits(brief.document, sizeOf(device), estimate)}
              />
            </section>
            {estimate ? <EstimateCautions {...{ estimate, say }} /> : null}
          </>
        }
        more={
          <>
            <RevisionRemarks revision={revision} target={remarkOn} onTargetDone={() => setRemarkOn(null)} />
            {revision.submittedAt === null ? null : <RevisionSignatures revision={revision} />}
            <RevisionHistory revision={revision} />
          </>
        }
      />
    </>
  );
}

const isTone = (vibration: unknown): boolean =>
  typeof vibration === 'object' && vibration !== null && (vibration as { kind?: unknown }).kind === 'tone';

const absentWords = (estimate: Estimate | null, freshness: string): string =>
  estimate === null && freshness !== 'faulty' && freshness !== 'failed' ? 'being computed' : 'not computed';

function RevisionLetters({ designId, letters, current }: { designId: string; letters: string[]; current: string }) {
  if (letters.length < 2) return null;
  return (
    <nav aria-label="Revisions" className="flex gap-x-2">
      {letters.map((letter) =>
        letter === current ? (
          <span key={letter} aria-current="page" className="font-mono font-bold text-ink">
            {letter}
          </span>
        ) : (
          <Link key={letter} to={revisionPath(designId, letter)} className="link font-mono">
            {letter}
          </Link>
        ),
      )}
    </nav>
  );
}
