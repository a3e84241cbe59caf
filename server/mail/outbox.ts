import { randomUUID } from 'node:crypto';
import { EventEmitter } from 'node:events';
import type { Knex } from 'knex';
import { z } from 'zod';

/** Kept as JSON; turned into text and HTML when it is sent or shown. */
export const MailContent = z.strictObject({
  paragraphs: z.array(z.string()),
  /** `href` is a path of the client, such as /designs/…; the address of this installation is put before it. */
  action: z.strictObject({ label: z.string(), href: z.string() }).optional(),
});

export interface OutgoingMail extends z.infer<typeof MailContent> {
  /** What happened. One message for each event and recipient, however often it is asked for. */
  eventId: string;
  recipientId: string;
  subject: string;
  /** Messages about one thing (a design) hang together. */
  threadId: string;
  at: string;
}

/** Tells the worker that a transaction with mail has been committed. */
export const outboxFilled = new EventEmitter();

/** Puts messages into the outbox, in the transaction of what they tell of. People who may no longer sign in get none. */
export async function enqueueMail(trx: Knex.Transaction, messages: OutgoingMail[]): Promise<void> {
  if (messages.length === 0) return;
  const people = await trx('people')
    .whereIn('id', [...new Set(messages.map(({ recipientId }) => recipientId))])
    .where({ active: 1 })
    .select<{ id: string; name: string; email: string }[]>('id', 'name', 'email');
  const byId = new Map(people.map((person) => [person.id, person]));
  for (const { eventId, recipientId, subject, threadId, at, paragraphs, action } of messages) {
    const person = byId.get(recipientId);
    if (person === undefined) continue;
    await trx('mail_messages')
      .insert({
        id: randomUUID(),
        event_id: eventId,
        recipient_id: recipientId,
        thread_id: threadId,
        recipient_name: person.name,
        recipient_address: person.email,
        subject,
        content: JSON.stringify(MailContent.parse({ paragraphs, action })),
        created_at: at,
        due_at: at,
      })
      .onConflict(['event_id', 'recipient_id'])
      .ignore();
  }
  void trx.executionPromise.then(
    () => outboxFilled.emit('filled'),
    () => undefined,
  );
}
