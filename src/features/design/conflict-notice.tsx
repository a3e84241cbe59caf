import { Download } from 'lucide-react';
import { useState } from 'react';
import type { Change } from '#contracts/error';
import type { Revision } from '#contracts/revisions';
import { download } from '../../lib/download';
import { formatAgo, formatCount } from '../../lib/format';
import { messageOf } from '../../lib/request-error';
import { Button } from '../../ui/button';
import { differences, joined, sameDocument } from './document-path';
import type { Draft } from './document-path';
import { pathInWords } from './labels';

interface ConflictNoticeProps {
  message: string;
  changed: readonly Change[];
  mine: Draft;
  /** What both started from. */
  base: Draft;
  /** The draft as it stands on the server; asked for anew before either is chosen. */
  theirs: Revision;
  onTakeTheirs: () => Promise<void>;
  onKeep: (make: (theirs: Draft) => Draft) => Promise<void>;
}

const shown = (value: unknown): string =>
  value === undefined ? 'left out' : typeof value === 'string' ? value : JSON.stringify(value);

/** Two drafts of one revision: what differs, and the choice between them. Neither is lost by looking. */
export function ConflictNotice({ message, changed, mine, base, theirs, onTakeTheirs, onKeep }: ConflictNoticeProps) {
  const [problem, setProblem] = useState<string | null>(null);
  const [busy, setBusy] = useState<'mine' | 'theirs' | 'both' | null>(null);
  const differing = differences(mine, theirs.document);
  const closed = !theirs.mayEdit;
  const document = theirs.document as Draft;
  const both = sameDocument(base, document) ? null : joined(base, mine, document);
  const joinable = !closed && both !== null && both.clashes.length === 0;
  const choose = (which: 'mine' | 'theirs' | 'both', act: () => Promise<void>) => () => {
    setBusy(which);
    setProblem(null);
    act()
      .catch((error: unknown) => setProblem(messageOf(error)))
      .finally(() => setBusy(null));
  };
  return (
    <section role="alert" className="flex flex-col gap-2 border-l-4 border-cinnabar bg-wash px-4 py-3">
      <h2>Somebody else changed this draft</h2>
      <p>
        {message}{' '}
        {closed
          ? (theirs.whyNotEdit ?? 'It can no longer be edited.')
          : 'Nothing of yours is lost: choose which is to stand.'}
      </p>
      {changed.length > 0 ? (
        <ul className="list-disc pl-5 text-graphite">
          {changed.map((change) => (
            <li key={`${change.version} ${change.at}`}>
              {change.what} ({change.by ?? 'the server'}, {formatAgo(change.at)})
            </li>
          ))}
        </ul>
      ) : null}
      {differing.length > 0 ? (
        <div className="max-h-60 overflow-auto" tabIndex={0} role="region" aria-label="What differs">
          <table className="w-full max-w-3xl">
            <thead>
              <tr className="border-b border-rule text-left text-graphite">
                <th scope="col" className="py-1 pr-4 font-normal">
                  {formatCount(differing.length, 'value')}
                </th>
                <th scope="col" className="pr-4 font-normal">
                  Mine
                </th>
                <th scope="col" className="font-normal">
                  Theirs
                </th>
              </tr>
            </thead>
            <tbody>
              {differing.map(({ path, mine: here, theirs: there }) => (
                <tr key={path} className="border-b border-rule">
                  <th scope="row" className="py-1 pr-4 text-left font-normal">
                    {pathInWords(mine, path)}
                  </th>
                  <td className="pr-4 font-mono wrap-anywhere">{shown(here)}</td>
                  <td className="font-mono wrap-anywhere">{shown(there)}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      ) : (
        <p className="text-graphite">The two documents are alike.</p>
      )}
      {problem ? <p className="text-cinnabar">{problem}</p> : null}
      <div className="flex flex-wrap gap-2.5">
        {joinable ? (
          <Button
            variant="primary"
            pending={busy === 'both'}
            onPress={choose('both', () => onKeep((newest) => joined(base, mine, newest)?.document ?? mine))}
          >
            Keep both changes
          </Button>
        ) : null}
        {closed ? null : (
          <Button
            variant={joinable ? 'secondary' : 'primary'}
            pending={busy === 'mine'}
            onPress={choose('mine', () => onKeep(() => mine))}
          >
            Keep mine only
          </Button>
        )}
        <Button pending={busy === 'theirs'} onPress={choose('theirs', onTakeTheirs)}>
          Take theirs
        </Button>
        <Button
          variant="quiet"
          icon={Download}
          onPress={() => download('my-draft.json', JSON.stringify(mine, null, 2), 'application/json')}
        >
          Download mine
        </Button>
      </div>
    </section>
  );
}
