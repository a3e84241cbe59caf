import type { Knex } from 'knex';
import type { Role } from '#workflows/revision';
import { peopleByRole } from '../features/people/reads';
import { enqueueMail } from '../mail/outbox';

/** Who is told, and what it means for them. */
export interface Notice {
  to: readonly string[];
  /** What is asked of them, or why they are told. */
  means: string;
}

interface Happening {
  eventId: string;
  at: string;
  actorId: string;
  designId: string;
  /** “FN-014 B” */
  name: string;
  letter: string;
  designTitle: string;
  /** What happened, as a sentence with the name of who did it. */
  sentence: string;
  /** Short form for the subject: “submitted for review”. */
  short: string;
}

/** Ids of everybody who holds one of the roles and may sign in. */
export async function holdersOf(db: Knex, ...roles: Role[]): Promise<string[]> {
  const held = await Promise.all(roles.map((role) => peopleByRole(db, role)));
  return [...new Set(held.flat().map(({ id }) => id))];
}

/** One message for each person concerned, by the first notice that names them; never to who did it. */
export async function tell(trx: Knex.Transaction, happening: Happening, notices: readonly Notice[]): Promise<void> {
  const told = new Set([happening.actorId]);
  const { eventId, at, designId, name, letter, designTitle, sentence, short } = happening;
  for (const { to, means } of notices) {
    const recipients = [...new Set(to)].filter((id) => !told.has(id));
    for (const id of recipients) told.add(id);
    await enqueueMail(
      trx,
      recipients.map((recipientId) => ({
        eventId,
        recipientId,
        at,
        threadId: `design ${designId}`,
        subject: `${name} ${short}: ${designTitle}`,
        paragraphs: [sentence, means],
        action: { label: `Open ${name}`, href: `/designs/${designId}/${letter}` },
      })),
    );
  }
}
