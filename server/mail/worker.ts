import type { Knex } from 'knex';
import type { Logger } from 'pino';
import type { MessageRow } from './messages';
import { outboxFilled } from './outbox';
import { isPermanent } from './transport';
import type { MailTransport } from './transport';

export interface MailWorker {
  /** Ends after the message under way, or a little later where that takes long. */
  stop(): Promise<void>;
}

interface Needed {
  db: Knex;
  log: Logger;
  now: () => Date;
  /** Null where there is no mail server: messages are kept and read under Administration → Mail. */
  transport: MailTransport | null;
}

interface Timing {
  pollMs: number;
  /** Renewed while an attempt lasts. After a crash a message that was taken stays taken so long. */
  leaseMs: number;
}

export const mostAttempts = 8;
const seconds = 1000;
/** How long stopping waits for the message under way. */
const patience = 5 * seconds;
const longestPause = 6 * 60 * 60 * seconds;

/** Half a minute, then four times as long each time, six hours at most: 15 hours in all. */
export const pauseAfter = (attempts: number): number => Math.min(longestPause, 30 * seconds * 4 ** (attempts - 1));

const later = (time: Date, milliseconds: number): string => new Date(time.getTime() + milliseconds).toISOString();

/** Takes the oldest due message, or one whose lease ran out, for this worker alone. */
async function claim({ db, now }: Needed, leaseMs: number): Promise<MessageRow | undefined> {
  const time = now();
  const at = time.toISOString();
  const [row] = (await db('mail_messages')
    .where(
      'id',
      db('mail_messages')
        .where((due) => due.where({ state: 'waiting' }).where('due_at', '<=', at))
        .orWhere((lost) => lost.where({ state: 'sending' }).where('lease_until', '<=', at))
        .orderBy(['created_at', 'id'])
        .limit(1)
        .select('id'),
    )
    .update({ state: 'sending', attempts: db.raw('attempts + 1'), lease_until: later(time, leaseMs) })
    .returning('*')) as MessageRow[];
  return row;
}

/** Keeps a claimed message for this worker as long as its attempt takes; after a crash nobody does, and the lease runs out. */
function keepLease({ db, log, now }: Needed, { id, lease_until }: MessageRow, leaseMs: number) {
  let until = lease_until;
  let renewal = Promise.resolve();
  const held = () => db<MessageRow>('mail_messages').where({ id, state: 'sending', lease_until: until });
  const renew = async () => {
    const next = later(now(), leaseMs);
    try {
      if ((await held().update({ lease_until: next })) === 1) until = next;
    } catch (error) {
      log.error({ err: error, message: id }, 'The lease of a message could not be renewed');
    }
  };
  const timer = setInterval(() => {
    renewal = renewal.then(renew);
  }, leaseMs / 3);
  return {
    /** Writes down how the attempt went, and lets the message go. */
    async settle(change: Partial<MessageRow>): Promise<void> {
      clearInterval(timer);
      await renewal;
      await held().update({ lease_until: null, ...change });
    },
  };
}

/** Delivers one claimed message and writes down how it went. */
async function handle(needed: Needed, row: MessageRow, leaseMs: number): Promise<void> {
  const { log, now, transport } = needed;
  const lease = keepLease(needed, row, leaseMs);
  if (transport === null) {
    await lease.settle({ state: 'kept' });
    return;
  }
  try {
    if (row.attempts > mostAttempts) throw new Error('Broken off too often.');
    await transport.deliver(row);
  } catch (error) {
    const last_error = error instanceof Error ? error.message : String(error);
    const gaveUp = isPermanent(error) || row.attempts >= mostAttempts;
    log.warn({ message: row.id, attempts: row.attempts, gaveUp, err: error }, 'Mail was not taken');
    await lease.settle(
      gaveUp
        ? { state: 'failed', last_error }
        : { state: 'waiting', last_error, due_at: later(now(), pauseAfter(row.attempts)) },
    );
    return;
  }
  await lease.settle({ state: 'sent', sent_at: now().toISOString(), last_error: null });
}

/**
 * Empties the outbox: at once when a transaction with mail is committed, else by polling. Each message is leased before it
 * is sent, so that after a crash it is sent again once the lease is over, under the same Message-ID: at least once, never lost.
 */
export function startMailWorker(
  needed: Needed,
  { pollMs, leaseMs }: Timing = { pollMs: 5 * seconds, leaseMs: 15 * seconds },
): MailWorker {
  let stopped = false;
  let again = false;
  let running: Promise<void> | null = null;
  let timer: NodeJS.Timeout | null = null;

  const drain = async (): Promise<void> => {
    try {
      do {
        again = false;
        for (let row = await claim(needed, leaseMs); row !== undefined; row = await claim(needed, leaseMs)) {
          await handle(needed, row, leaseMs);
          if (stopped) return;
        }
      } while (again && !stopped);
    } catch (error) {
      needed.log.error({ err: error }, 'The outbox could not be read or written; it will be tried again');
    }
  };
  const nudge = (): void => {
    again = true;
    if (stopped || running !== null) return;
    if (timer !== null) clearTimeout(timer);
    running = drain().finally(() => {
      running = null;
      if (!stopped) timer = setTimeout(nudge, pollMs);
    });
  };

  outboxFilled.on('filled', nudge);
  nudge();
  return {
    async stop() {
      stopped = true;
      outboxFilled.off('filled', nudge);
      if (timer !== null) clearTimeout(timer);
      // A message that takes longer is left to its lease: it is sent again after the next start, under the same Message-ID.
      await Promise.race([running, new Promise((resolve) => setTimeout(resolve, patience).unref())]);
      needed.transport?.close();
    },
  };
}
