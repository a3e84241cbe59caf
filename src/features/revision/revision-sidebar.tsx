import { MessageSquarePlus } from 'lucide-react';
import { useState } from 'react';
import type { Remark, Revision, Signature } from '#contracts/revisions';
import { eventWords, signedWordsOf } from '#workflows/revision';
import { formatAgo, formatCount, formatDateTime } from '../../lib/format';
import { ActionButton } from '../../ui/action-button';
import { Button } from '../../ui/button';
import { Section } from '../../ui/page-header';
import { Status } from '../../ui/status';
import { Digest } from './digest';
import { EventDialog } from './event-dialog';
import { revisionSubject, targetWords } from './revision-subject';

const Moment = ({ at }: { at: string }) => (
  <time dateTime={at} title={formatDateTime(at)} className="whitespace-nowrap">
    {formatAgo(at)}
  </time>
);

interface RemarksProps {
  revision: Revision;
  /** Path of a value for which the dialog of a new remark is to be open. */
  target?: string | null | undefined;
  onTargetDone?: () => void;
}

/** The remarks on a revision, open ones first, each with its answer; new ones are written and closed here. */
export function RevisionRemarks({ revision, target, onTargetDone }: RemarksProps) {
  const [writing, setWriting] = useState(false);
  const [closing, setClosing] = useState<Remark | null>(null);
  const { remarks, availableEvents, whyNot } = revision;
  const subject = revisionSubject(revision);
  const open = remarks.filter(({ closed }) => closed === null);
  const blocking = open.filter((remark) => remark.blocking);
  const mayRemark = availableEvents.includes('remark');
  const known = mayRemark || whyNot.remark !== undefined;
  const ordered = [...open, ...remarks.filter(({ closed }) => closed !== null)];
  const finish = () => {
    setWriting(false);
    setClosing(null);
    onTargetDone?.();
  };
  return (
    <Section
      title="Remarks"
      aside={
        remarks.length === 0 ? null : (
          <span className="text-sm text-graphite">
            {open.length === 0
              ? 'all closed'
              : `${open.length} open${blocking.length > 0 ? `, ${blocking.length} blocking` : ''}`}
          </span>
        )
      }
    >
      {remarks.length === 0 ? (
        <p className="text-graphite">
          No remarks.{' '}
          {known ? 'A remark can be about a value, a result or the whole.' : 'Remarks are written during review.'}
        </p>
      ) : (
        <ul className="flex flex-col gap-4">
          {ordered.map((remark) => (
            <RemarkItem
              key={remark.id}
              remark={remark}
              onClose={
                availableEvents.includes('closeRemark') && remark.closed === null ? () => setClosing(remark) : null
              }
            />
          ))}
        </ul>
      )}
      {known ? (
        <div>
          <ActionButton
            size="small"
            icon={MessageSquarePlus}
            whyNot={mayRemark ? null : whyNot.remark}
            onPress={() => setWriting(true)}
          >
            {eventWords.remark}
          </ActionButton>
        </div>
      ) : null}
      {writing || (target !== undefined && target !== null) ? (
        <EventDialog event="remark" subject={subject} target={target ?? undefined} onClose={finish} onDone={finish} />
      ) : null}
      {closing ? (
        <EventDialog event="closeRemark" subject={subject} remark={closing} onClose={finish} onDone={finish} />
      ) : null}
    </Section>
  );
}

function RemarkItem({ remark, onClose }: { remark: Remark; onClose: (() => void) | null }) {
  const { by, at, text, blocking, target, closed } = remark;
  return (
    <li className="flex flex-col gap-1 border-l-[3px] border-rule pl-3">
      <p className="flex flex-wrap items-baseline gap-x-3 text-sm text-graphite">
        <span className="font-semibold text-ink">{by.name}</span>
        <Moment at={at} />
        {closed ? (
          <Status tone="good">closed</Status>
        ) : (
          <Status tone={blocking ? 'attention' : 'neutral'}>{blocking ? 'blocking' : 'open'}</Status>
        )}
      </p>
      {target ? (
        <a href={`#field-${target}`} className="link w-fit text-sm wrap-anywhere">
          {targetWords(target)}
        </a>
      ) : null}
      <p className="wrap-anywhere whitespace-pre-line">{text}</p>
      {closed ? (
        <p className="border-l-[3px] border-rule pl-3 wrap-anywhere whitespace-pre-line">
          {closed.answer}
          <span className="block text-sm text-graphite">
            {closed.by.name}, <Moment at={closed.at} />
          </span>
        </p>
      ) : null}
      {onClose ? (
        <div>
          <Button
            size="small"
            variant="quiet"
            onPress={onClose}
            aria-label={`${eventWords.closeRemark} of ${by.name}`}
            className="-ml-2.5"
          >
            {eventWords.closeRemark}
          </Button>
        </div>
      ) : null}
    </li>
  );
}

/** What happened to a revision, newest first, in sentences. */
export function RevisionHistory({ revision }: { revision: Revision }) {
  const entries = [...revision.activity].sort((a, b) => b.at.localeCompare(a.at));
  const [all, setAll] = useState(false);
  const shown = all ? entries : entries.slice(0, 8);
  return (
    <Section title="What happened">
      {entries.length === 0 ? <p className="text-graphite">Nothing yet.</p> : null}
      <ol className="flex flex-col gap-2">
        {shown.map((entry, index) => (
          <li key={`${entry.at} ${index}`} className="flex flex-col">
            <span className="wrap-anywhere">{entry.sentence}</span>
            <span className="text-sm text-graphite">
              <Moment at={entry.at} />
            </span>
          </li>
        ))}
      </ol>
      {shown.length < entries.length ? (
        <Button size="small" variant="quiet" className="self-start" onPress={() => setAll(true)}>
          Show {formatCount(entries.length - shown.length, 'earlier entry', 'earlier entries')}
        </Button>
      ) : null}
    </Section>
  );
}

/** Who signed what, in which words, and the digest of exactly that. */
export function RevisionSignatures({ revision }: { revision: Revision }) {
  const { signatures, approvalsNeeded } = revision;
  const approvals = signatures.filter(({ event }) => event === 'approve').length;
  return (
    <Section
      title="Signatures"
      aside={
        <span className="text-sm text-graphite">
          {approvals} of {formatCount(approvalsNeeded, 'approval')}
        </span>
      }
    >
      {signatures.length === 0 ? (
        <p className="text-graphite">Nobody has signed this revision.</p>
      ) : (
        <ol className="flex flex-col gap-4">
          {signatures.map((signature) => (
            <SignatureItem key={signature.id} signature={signature} />
          ))}
        </ol>
      )}
    </Section>
  );
}

function SignatureItem({ signature: { by, at, event, meaning, statement, digest } }: { signature: Signature }) {
  return (
    <li className="flex flex-col gap-1 border-l-[3px] border-copper pl-3">
      <p className="flex flex-wrap items-baseline gap-x-3">
        <span className="font-semibold">{by.name}</span>
        <span className="text-sm text-graphite">
          {signedWordsOf(event)}, <time dateTime={at}>{formatDateTime(at)}</time>
        </span>
      </p>
      <p className="text-graphite">“{meaning}”</p>
      {statement ? <p className="wrap-anywhere whitespace-pre-line">{statement}</p> : null}
      <details>
        <summary className="text-sm text-graphite">Digest of what was signed</summary>
        <Digest value={digest} />
      </details>
    </li>
  );
}
