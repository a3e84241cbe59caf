import { createTransport } from 'nodemailer';
import type { Config } from '../config';
import { messageIdOf, renderRow, threadIdOf } from './messages';
import type { MessageRow } from './messages';
import { oneLine } from './templates';

export interface MailTransport {
  /** Hands the message to the mail server; rejects when that does not take it. */
  deliver(row: MessageRow): Promise<void>;
  close(): void;
}

/** A mail server that answers with 5xx means it for good; everything else may pass. */
export const isPermanent = (error: unknown): boolean =>
  error instanceof Error &&
  'responseCode' in error &&
  typeof error.responseCode === 'number' &&
  error.responseCode >= 500 &&
  error.responseCode < 600;

/** Sends by SMTP; patient, because some mail servers make strangers wait. */
export function smtpTransport(smtpUrl: string, config: Pick<Config, 'mail' | 'baseUrl'>): MailTransport {
  const transport = createTransport({
    url: smtpUrl,
    connectionTimeout: 20_000,
    greetingTimeout: 40_000,
    socketTimeout: 120_000,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return {
    async deliver(row) {
      const thread = threadIdOf(row, config);
      await transport.sendMail({
        from: config.mail.from,
        // An object, never a joined string: the address stays the only recipient whatever the name holds.
        to: { name: oneLine(row.recipient_name), address: oneLine(row.recipient_address) },
        subject: oneLine(row.subject),
        messageId: messageIdOf(row, config),
        inReplyTo: thread,
        references: thread,
        date: new Date(row.created_at),
        headers: { 'Auto-Submitted': 'auto-generated', 'X-Auto-Response-Suppress': 'All' },
        ...renderRow(row, config),
      });
    },
    close: () => transport.close(),
  };
}
