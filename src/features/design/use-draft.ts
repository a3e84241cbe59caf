import { useCallback, useEffect, useMemo, useState, useSyncExternalStore } from 'react';
import type { Revision } from '#contracts/revisions';
import { DraftSaver, keepInBrowser } from './draft-saver';
import type { SaveState } from './draft-saver';
import type { Draft } from './document-path';
import { readRevision, saveDraft } from './queries';

export interface DraftInHand {
  draft: Draft;
  /** What the server had when the changes in hand were begun. */
  base: Draft;
  state: SaveState;
  /** What is shown was typed earlier in this browser and had not reached the server. */
  restored: boolean;
  edit: (draft: Draft) => void;
  /** Saves what is pending and answers the revision as it then stands. */
  flush: () => Promise<Revision>;
  retry: () => void;
  takeTheirs: (revision: Revision) => void;
  /** Saves over theirs what is in hand, or another document made of both. */
  keep: (revision: Revision, document?: Draft) => void;
}

/** The draft of one revision in the hands of the person at this page. */
export function useDraft(revision: Revision, onSaved: (revision: Revision) => void): DraftInHand {
  const [saver] = useState(
    () =>
      new DraftSaver({
        revision,
        save: (version, document) => saveDraft(revision.id, version, document),
        onSaved,
        keep: keepInBrowser(revision.id),
      }),
  );
  useEffect(() => {
    saver.start();
    const online = () => saver.retry();
    // The page may be gone in a moment: send at once what is pending.
    const hidden = () => {
      if (document.visibilityState === 'hidden') void saver.flush().catch(() => undefined);
    };
    window.addEventListener('online', online);
    document.addEventListener('visibilitychange', hidden);
    return () => {
      window.removeEventListener('online', online);
      document.removeEventListener('visibilitychange', hidden);
      saver.stop();
    };
  }, [saver]);
  useEffect(() => saver.adopt(revision), [saver, revision]);
  const { draft, base, state, restored } = useSyncExternalStore(saver.subscribe, saver.read);
  const edit = useCallback((next: Draft) => saver.edit(next), [saver]);
  const flush = useCallback(async () => {
    await saver.flush();
    return readRevision(revision.id);
  }, [saver, revision.id]);
  return useMemo(
    () => ({
      draft,
      base,
      state,
      restored,
      edit,
      flush,
      retry: () => saver.retry(),
      takeTheirs: (theirs: Revision) => saver.takeTheirs(theirs),
      keep: (theirs: Revision, document?: Draft) => saver.keep(theirs, document),
    }),
    [draft, base, state, restored, edit, flush, saver],
  );
}
