import type { Change } from '#contracts/error';
import type { Revision } from '#contracts/revisions';
import { isRequestError, messageOf } from '../../lib/request-error';
import { sameDocument } from './document-path';
import type { Draft } from './document-path';

export type SaveState =
  | { kind: 'saved'; at: string }
  /** Something was typed; it is sent when the typing pauses. */
  | { kind: 'waiting' }
  | { kind: 'saving' }
  /** The server did not answer: the draft is kept in this browser and tried again. */
  | { kind: 'offline'; message: string }
  /** Somebody else saved in between. Nothing is sent until the person has chosen. */
  | { kind: 'conflict'; changed: Change[]; message: string }
  /** The server will not take it, for a reason that trying again does not change. */
  | { kind: 'refused'; message: string };

export interface Kept {
  version: number;
  document: Draft;
  at: string;
}

/** Where a draft is kept until the server has it; the browser's storage, or nothing where that is forbidden. */
export interface Keep {
  read: () => Kept | null;
  write: (kept: Kept) => void;
  clear: () => void;
}

export function keepInBrowser(revisionId: string, storage: Storage | null = browserStorage()): Keep {
  const key = `tremolode.draft.${revisionId}`;
  return {
    read() {
      try {
        const kept: unknown = JSON.parse(storage?.getItem(key) ?? 'null');
        const candidate = kept as Partial<Kept> | null;
        return candidate &&
          typeof candidate.version === 'number' &&
          typeof candidate.document === 'object' &&
          candidate.document !== null
          ? { version: candidate.version, document: candidate.document, at: String(candidate.at ?? '') }
          : null;
      } catch {
        return null;
      }
    },
    write(kept) {
      try {
        storage?.setItem(key, JSON.stringify(kept));
      } catch {
        // Full or forbidden: the page itself still holds the draft.
      }
    },
    clear() {
      try {
        storage?.removeItem(key);
      } catch {
        // Nothing was kept then.
      }
    },
  };
}

function browserStorage(): Storage | null {
  try {
    return window.localStorage;
  } catch {
    return null;
  }
}

interface DraftSaverOptions {
  revision: Pick<Revision, 'version' | 'document' | 'updatedAt'>;
  save: (version: number, document: Draft) => Promise<Revision>;
  /** Told of every answer, so that the page's other parts follow. */
  onSaved?: (revision: Revision) => void;
  keep: Keep;
  now?: () => Date;
  /** ms after the last change. */
  pause?: number;
  /** ms before the first further try without an answer; doubles up to a minute. */
  retryAfter?: number;
}

const asDraft = (document: unknown): Draft =>
  typeof document === 'object' && document !== null && !Array.isArray(document) ? (document as Draft) : {};

/**
 * Saves a draft while it is typed: one request at a time, the newest state last, nothing ever lost. What the server does not have
 * yet lies in the browser's storage.
 */
export class DraftSaver {
  private draft: Draft;
  private sent: Draft;
  private version: number;
  private state: SaveState;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private running: Promise<void> | null = null;
  private failures = 0;
  private readonly listeners = new Set<() => void>();
  private readonly options: Required<DraftSaverOptions>;
  private snapshot: { draft: Draft; base: Draft; state: SaveState; restored: boolean };
  private restored = false;
  private stopped = false;

  constructor(options: DraftSaverOptions) {
    this.options = { onSaved: () => undefined, now: () => new Date(), pause: 1000, retryAfter: 3000, ...options };
    const { revision, keep } = this.options;
    this.version = revision.version;
    this.sent = asDraft(revision.document);
    this.draft = this.sent;
    this.state = { kind: 'saved', at: revision.updatedAt };
    const kept = keep.read();
    if (kept && !sameDocument(kept.document, this.sent)) {
      this.draft = kept.document;
      this.restored = true;
      // Kept against an older version: somebody saved since, and only the person can say which is right.
      this.state =
        kept.version === revision.version
          ? { kind: 'waiting' }
          : {
              kind: 'conflict',
              changed: [],
              message: 'This draft was changed after what you typed here was last saved.',
            };
    } else if (kept) keep.clear();
    this.snapshot = { draft: this.draft, base: this.sent, state: this.state, restored: this.restored };
  }

  /** Begins to save what was restored; called once the page is there. */
  start(): void {
    this.stopped = false;
    if (this.state.kind === 'waiting') this.schedule(this.options.pause);
  }

  /** Ends all timers, after a last try to send what is not yet saved. */
  stop(): void {
    if (this.state.kind === 'waiting') void this.run();
    this.stopped = true;
    clearTimeout(this.timer);
  }

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  read = () => this.snapshot;

  edit(draft: Draft): void {
    this.draft = draft;
    this.restored = false;
    this.options.keep.write({ version: this.version, document: draft, at: this.options.now().toISOString() });
    // A conflict waits for the person; what is typed meanwhile belongs to "mine".
    if (this.state.kind === 'conflict') return this.tell();
    if (this.running === null) this.state = { kind: 'waiting' };
    this.schedule(this.options.pause);
    this.tell();
  }

  /** Sends what is pending now. Rejects where it could not be saved, with words for the person. */
  async flush(): Promise<void> {
    clearTimeout(this.timer);
    if (this.state.kind === 'conflict') throw new Error('Choose first which of the two drafts is to stand.');
    while (this.running !== null || !sameDocument(this.draft, this.sent)) {
      await (this.running ?? this.run());
      const { kind } = this.read().state;
      if (kind === 'conflict')
        throw new Error('Somebody changed this draft in the meantime: choose first which is to stand.');
      if (kind === 'offline')
        throw new Error('The server did not answer, so the draft could not be saved. It is kept in this browser.');
      if (kind === 'refused')
        throw new Error(`The draft could not be saved. ${(this.state as { message: string }).message}`);
    }
  }

  /** Tries again at once, as when the connection comes back. */
  retry(): void {
    if (this.state.kind !== 'offline' && this.state.kind !== 'refused') return;
    this.failures = 0;
    void this.run();
  }

  /** Follows a newer state from the server where nothing of one's own is pending; otherwise the next save will find out. */
  adopt(revision: Pick<Revision, 'version' | 'document' | 'updatedAt'>): void {
    if (revision.version <= this.version) return;
    const theirs = asDraft(revision.document);
    const pending = !sameDocument(this.draft, this.sent);
    if (sameDocument(theirs, this.sent)) {
      // Something besides the document moved on, as a remark does.
      this.version = revision.version;
    } else if (!pending && this.running === null) {
      this.version = revision.version;
      this.sent = theirs;
      this.draft = theirs;
      this.state = { kind: 'saved', at: revision.updatedAt };
    }
    this.tell();
  }

  takeTheirs(revision: Pick<Revision, 'version' | 'document' | 'updatedAt'>): void {
    this.version = revision.version;
    this.sent = asDraft(revision.document);
    this.draft = this.sent;
    this.state = { kind: 'saved', at: revision.updatedAt };
    this.restored = false;
    this.options.keep.clear();
    this.tell();
  }

  /** Saves a document over theirs: mine as it stands, or both joined. */
  keep(revision: Pick<Revision, 'version' | 'document'>, document: Draft = this.draft): void {
    this.version = revision.version;
    this.sent = asDraft(revision.document);
    this.draft = document;
    this.state = { kind: 'waiting' };
    this.restored = false;
    this.options.keep.write({ version: this.version, document, at: this.options.now().toISOString() });
    this.tell();
    void this.run();
  }

  private schedule(after: number): void {
    clearTimeout(this.timer);
    if (this.stopped) return;
    this.timer = setTimeout(() => void this.run(), after);
  }

  private run(): Promise<void> {
    this.running ??= this.send().finally(() => {
      this.running = null;
      if (this.state.kind === 'waiting') this.schedule(this.options.pause);
    });
    return this.running;
  }

  private async send(): Promise<void> {
    const { save, keep, now, onSaved, retryAfter } = this.options;
    const sending = this.draft;
    this.state = { kind: 'saving' };
    this.tell();
    try {
      const revision = await save(this.version, sending);
      this.failures = 0;
      this.version = revision.version;
      this.sent = sending;
      if (sameDocument(this.draft, sending)) {
        this.state = { kind: 'saved', at: now().toISOString() };
        keep.clear();
      } else {
        this.state = { kind: 'waiting' };
        keep.write({ version: this.version, document: this.draft, at: now().toISOString() });
      }
      onSaved(revision);
    } catch (error) {
      if (isRequestError(error, 'conflict')) {
        this.state = { kind: 'conflict', changed: error.changed, message: error.message };
      } else if (isRequestError(error, 'offline', 'unavailable', 'tooMany', 'unauthenticated', 'bug', 'unreadable')) {
        this.failures += 1;
        this.state = { kind: 'offline', message: messageOf(error) };
        this.schedule(Math.min(60_000, retryAfter * 2 ** (this.failures - 1)));
      } else {
        this.state = { kind: 'refused', message: messageOf(error) };
      }
    }
    this.tell();
  }

  private tell(): void {
    this.snapshot = { draft: this.draft, base: this.sent, state: this.state, restored: this.restored };
    for (const listener of this.listeners) listener();
  }
}
