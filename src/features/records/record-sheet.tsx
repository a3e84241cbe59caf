import type { ReactNode } from 'react';
import type { ReleaseRecord } from '#contracts/records';
import { estimateMargins } from '#contracts/requirement';
import type { Margin } from '#contracts/requirement';
import { signedWordsOf } from '#workflows/revision';
import { formatCount, formatDateTime } from '../../lib/format';
import { Caution } from '../../ui/caution';
import { KeyFigures } from '../../ui/key-figures';
import { Quantity } from '../../ui/quantity';
import { Status } from '../../ui/status';
import { DossierRuns } from './dossier-runs';
import { RequirementLine } from './requirement-line';

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="flex flex-col gap-2">
      <h2 className="border-b border-rule pb-1">{title}</h2>
      {children}
    </section>
  );
}

/** A time as it is signed: in UTC, with the second, whoever reads it wherever. */
export const utc = (time: string): string => `${time.slice(0, 10)} ${time.slice(11, 19)} UTC`;

function Margins({ margins }: { margins: readonly Margin[] }) {
  if (margins.length === 0) return <p className="text-graphite">The brief asks for nothing that an estimate shows.</p>;
  return (
    <ul>
      {margins.map(({ requirement, value, margin, verdict }) => (
        <RequirementLine
          key={requirement.id}
          requirement={requirement}
          shown={{ words: 'estimate', value, absent: 'not computed' }}
          margin={margin}
          verdict={verdict}
        />
      ))}
    </ul>
  );
}

interface RecordSheetProps {
  record: ReleaseRecord;
  /** The aligned strip of the released design, drawn by the page. */
  strip: ReactNode;
}

/** The sheet of a release: what, who, when, on which evidence. Reads the same on paper. */
export function RecordSheet({ record, strip }: RecordSheetProps) {
  const { dossier, digest, intact, recall, supersededBy } = record;
  const { response, engine, cautions } = dossier.estimate;
  const margins = estimateMargins(dossier.brief.document.requirements, dossier.estimate);
  return (
    <article
      className="sheet mx-auto flex w-full max-w-4xl flex-col gap-7 px-5 py-6 sm:px-9 sm:py-8 print:max-w-none print:border-0 print:p-0"
      aria-label={`Record ${record.releaseNumber}`}
    >
      {recall ? (
        <div role="note" className="flex flex-col gap-1 border-2 border-cinnabar px-4 py-3">
          <p className="text-lg font-bold text-cinnabar">Recalled</p>
          <p className="wrap-anywhere whitespace-pre-line">{recall.reason}</p>
          <p className="text-graphite">
            {recall.by.name}, {utc(recall.at)}
          </p>
        </div>
      ) : null}
      {supersededBy === null ? null : (
        <Caution severity="info" title="Superseded.">
          A later revision has been released: {supersededBy}.
        </Caution>
      )}
      {intact ? null : (
        <Caution severity="stop" title="This record is not intact.">
          Its content no longer fits its digest. Do not rely on it; tell an administrator, who can check the audit
          trail.
        </Caution>
      )}
      <header className="flex flex-wrap items-start justify-between gap-x-8 gap-y-4">
        <div className="min-w-0">
          <p className="text-graphite">Release record</p>
          <p className="font-mono text-3xl font-bold">{record.releaseNumber}</p>
          <p className="mt-1 text-lg wrap-anywhere">
            {dossier.design.title}, <span className="font-mono">{dossier.design.number}</span> revision{' '}
            {dossier.design.letter}
          </p>
        </div>
        {strip}
      </header>
      <KeyFigures
        ruled
        figures={[
          { label: 'Released', value: utc(record.releasedAt) },
          { label: 'By', value: record.releasedBy.name },
          { label: 'Authors', value: dossier.authors.map(({ name }) => name).join(', ') },
          {
            label: 'For brief',
            value: `${dossier.brief.number}, version ${dossier.brief.version}: ${dossier.brief.document.title}`,
          },
          { label: 'Estimated power', value: <Quantity value={response.loadPower} dimension="power" /> },
          { label: 'Engine', value: `${engine}, ${response.method}${response.converged ? '' : ', not converged'}` },
        ]}
      />
      <Part title="Estimate against the brief">
        <Margins margins={margins} />
      </Part>
      <Part title="Bench">
        <DossierRuns runs={dossier.runs} />
      </Part>
      <Part title="Signatures">
        <ol className="flex flex-col gap-3">
          {dossier.signatures.map((signature) => (
            <li key={signature.id} className="grid gap-x-4 sm:grid-cols-[14rem_1fr]">
              <p>
                <span className="font-semibold">{signature.by.name}</span>
                <span className="block text-sm text-graphite">
                  {signedWordsOf(signature.event)}
                  <br />
                  {utc(signature.at)}
                </span>
              </p>
              <div className="min-w-0">
                <p>“{signature.meaning}”</p>
                {signature.statement === '' ? null : (
                  <p className="wrap-anywhere whitespace-pre-line">{signature.statement}</p>
                )}
                <p className="font-mono text-xs break-all text-graphite">{signature.digest}</p>
              </div>
            </li>
          ))}
        </ol>
      </Part>
      <Part title="Remarks">
        {dossier.remarks.length === 0 ? (
          <p className="text-graphite">None were made.</p>
        ) : (
          <ul className="flex flex-col gap-2">
            {dossier.remarks.map((remark) => (
              <li key={remark.id} className="wrap-anywhere whitespace-pre-line">
                <span className="font-semibold">{remark.by.name}:</span> {remark.text}
                {remark.closed ? (
                  <span className="block pl-4 text-graphite">
                    {remark.closed.by.name}: {remark.closed.answer}
                  </span>
                ) : (
                  <span className="block pl-4 text-graphite">Left open.</span>
                )}
              </li>
            ))}
          </ul>
        )}
      </Part>
      {cautions.length === 0 ? null : (
        <Part title="Cautions">
          {cautions.map((caution) => (
            <Caution key={`${caution.code} ${caution.path ?? ''}`} severity={caution.severity}>
              {caution.message}
            </Caution>
          ))}
          <p className="text-sm text-graphite">
            Local codes and competent persons decide on use, above all in vehicles, aircraft, explosive atmospheres and
            medicine.
          </p>
        </Part>
      )}
      <footer className="flex flex-col gap-1 border-t border-rule pt-3 text-sm">
        <p className="flex flex-wrap items-baseline gap-x-3">
          <Status tone={intact ? 'good' : 'bad'}>{intact ? 'intact' : 'not intact'}</Status>
          <span className="text-graphite">
            {intact ? 'The dossier fits its digest' : 'The dossier does not fit its digest'}; checked when this page was
            loaded, {formatDateTime(new Date())}. {formatCount(dossier.signatures.length, 'signature')},{' '}
            {formatCount(dossier.runs.length, 'run')}.
          </span>
        </p>
        <p className="font-mono text-xs break-all">
          <span className="font-sans text-graphite">SHA-256 of the dossier </span>
          {digest}
        </p>
        <p className="font-mono text-xs break-all">
          <span className="font-sans text-graphite">SHA-256 of the design document </span>
          {dossier.documentDigest}
        </p>
      </footer>
    </article>
  );
}
