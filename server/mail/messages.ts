import type { Knex } from 'knex';
import type { FullMessage, Message } from '#contracts/mail';
import type { Config } from '../config';
import { MailContent } from './outbox';
import { renderMail } from './templates';

export interface MessageRow {
  id: string;
  event_id: string;
  recipient_id: string;
  thread_id: string;
  recipient_name: string;
  recipient_address: string;
  subject: string;
  content: string;
  state: Message['state'];
  attempts: number;
  last_error: string | null;
  created_at: string;
  due_at: string;
  lease_until: string | null;
  sent_at: string | null;
}

type MailPlace = Pick<Config, 'mail' | 'baseUrl'>;

/** Only what may stand in the left part of a Message-ID. */
const atom = (text: string): string => text.replace(/[^A-Za-z0-9.-]/g, '-');
const senderHost = ({ mail, baseUrl }: MailPlace): string =>
  /@([A-Za-z0-9.-]+)>?\s*$/.exec(mail.from)?.[1] ?? new URL(baseUrl).hostname;

/** The same for every attempt, so that a receiver recognises a message that was sent twice around a crash. */
export const messageIdOf = ({ event_id, recipient_id }: MessageRow, place: MailPlace): string =>
  `<${atom(event_id)}.${atom(recipient_id)}@${senderHost(place)}>`;

/** What all messages about one thing refer to. */
export const threadIdOf = ({ thread_id }: MessageRow, place: MailPlace): string =>
  `<thread.${atom(thread_id)}@${senderHost(place)}>`;

const present = (row: MessageRow, place: MailPlace): Message => ({
  id: row.id,
  messageId: messageIdOf(row, place),
  to: `${row.recipient_name} <${row.recipient_address}>`,
  subject: row.subject,
  state: row.state,
  attempts: row.attempts,
  lastError: row.last_error,
  createdAt: row.created_at,
  sentAt: row.sent_at,
});

export const renderRow = (row: MessageRow, { baseUrl }: MailPlace): { text: string; html: string } =>
  renderMail(row.recipient_name, MailContent.parse(JSON.parse(row.content)), baseUrl);

const newestShown = 500;

export async function listMessages(db: Knex, place: MailPlace): Promise<Message[]> {
  const rows = await db<MessageRow>('mail_messages').orderBy('created_at', 'desc').orderBy('id').limit(newestShown);
  return rows.map((row) => present(row, place));
}

export async function readMessage(db: Knex, id: string, place: MailPlace): Promise<FullMessage | null> {
  const row = await db<MessageRow>('mail_messages').where({ id }).first();
  return row === undefined ? null : { ...present(row, place), ...renderRow(row, place) };
}
