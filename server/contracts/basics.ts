import { z } from 'zod';

/** Identifier of anything stored: a UUID. */
export const Id = z.uuid();
/** ISO-8601 time in UTC. */
export const Time = z.iso.datetime();
export const Version = z.number().int().min(1);

const text = (most: number) => z.string().trim().max(most, `At most ${most} characters.`);
/** One line that must say something. */
export const Line = text(200).min(1, 'Say something here.');
export const OptionalLine = text(200);
/** Several sentences. */
export const Prose = text(10_000);
export const SomeProse = Prose.min(1, 'Say something here.');

export const PersonName = z.strictObject({ id: Id, name: z.string() });
export type PersonName = z.infer<typeof PersonName>;
