import type { FullMessage } from '#contracts/mail';
import type { Deps } from '../../app';
import { appendAudit } from '../../audit';
import { conflict, notFound } from '../../errors';
import { readMessage } from '../../mail/messages';
import type { MessageRow } from '../../mail/messages';
import { outboxFilled } from '../../mail/outbox';
import { personContact } from '../people/reads';

/** Puts a message that failed, or that was kept for want of a mail server, back among the waiting; to today's address. */
export async function resendMessage(
  { db, config, now }: Pick<Deps, 'db' | 'config' | 'now'>,
  id: string,
  actorId: string,
): Promise<FullMessage> {
  const at = now().toISOString();
  const message = await db.transaction(async (trx) => {
    const row = await trx<MessageRow>('mail_messages').where({ id }).first();
    if (row === undefined) throw notFound('This message');
    if (row.state === 'sent') throw conflict('This message has been sent already.');
    if (row.state !== 'failed' && row.state !== 'kept') throw conflict('This message is on its way.');
    if (row.state === 'kept' && config.mail.smtpUrl === null) {
      throw conflict('Without a mail server messages are kept here and read here.');
    }
    const recipient = await personContact(trx, row.recipient_id);
    await trx<MessageRow>('mail_messages').where({ id }).update({
      state: 'waiting',
      attempts: 0,
      last_error: null,
      due_at: at,
      recipient_name: recipient.name,
      recipient_address: recipient.email,
    });
    await appendAudit(trx, {
      at,
      actorId,
      action: 'resent',
      subject: 'message',
      subjectId: id,
      detail: { to: recipient.email, subject: row.subject },
    });
    return readMessage(trx, id, config);
  });
  outboxFilled.emit('filled');
  if (message === null) throw notFound('This message');
  return message;
}
