import type { Knex } from 'knex';

/** Kinds of numbered things: prefix, and digits at least. */
const kinds = {
  brief: { prefix: 'BR', digits: 3 },
  design: { prefix: 'FN', digits: 3 },
  run: { prefix: 'RUN', digits: 4 },
  instrument: { prefix: 'IN', digits: 3 },
} as const;

async function next(trx: Knex.Transaction, name: string): Promise<number> {
  const [row] = await trx('number_sequences')
    .insert({ name, last: 1 })
    .onConflict('name')
    .merge({ last: trx.raw('number_sequences.last + 1') })
    .returning<{ last: number }[]>('last');
  if (row === undefined) throw new Error(`The sequence ${name} gave no number.`);
  return row.last;
}

const numbered = (prefix: string, digits: number, value: number): string =>
  `${prefix}-${String(value).padStart(digits, '0')}`;

/** The next number of a kind, such as FN-014; given back when the transaction fails. */
export async function nextNumber(trx: Knex.Transaction, kind: keyof typeof kinds): Promise<string> {
  const { prefix, digits } = kinds[kind];
  return numbered(prefix, digits, await next(trx, prefix));
}

/** The next release number of the year of `at`, such as REL-2027-003. */
export async function nextReleaseNumber(trx: Knex.Transaction, at: string): Promise<string> {
  const prefix = `REL-${at.slice(0, 4)}`;
  return numbered(prefix, 3, await next(trx, prefix));
}

/** The letter after this one: A … Z, AA, AB … */
export function letterAfter(letter: string): string {
  const last = letter.at(-1) ?? '@';
  if (last !== 'Z') return letter.slice(0, -1) + String.fromCharCode(last.charCodeAt(0) + 1);
  return letter.length === 1 ? 'AA' : `${letterAfter(letter.slice(0, -1))}A`;
}
