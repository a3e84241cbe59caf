import { readFileSync } from 'node:fs';

/** One row of tests/reference/handbook: numbers, words or lists by key, the unit at the end of the key. */
export interface HandbookValue {
  readonly id: string;
  readonly grade: string;
  readonly given: Readonly<Record<string, unknown>>;
  readonly expected: Readonly<Record<string, unknown>>;
}

const reference = new URL('../reference/', import.meta.url);

/** The row `id` of handbook/`file`.json. */
export function handbookValue(file: string, id: string): HandbookValue {
  const { values } = JSON.parse(readFileSync(new URL(`handbook/${file}.json`, reference), 'utf8')) as {
    values: HandbookValue[];
  };
  const row = values.find((value) => value.id === id);
  if (!row) throw new Error(`no row ${id} in handbook/${file}.json`);
  return row;
}

/** All rows of handbook/`file`.json whose id begins with `prefix`. */
export function handbookValues(file: string, prefix: string): HandbookValue[] {
  const { values } = JSON.parse(readFileSync(new URL(`handbook/${file}.json`, reference), 'utf8')) as {
    values: HandbookValue[];
  };
  return values.filter((value) => value.id.startsWith(prefix));
}

/** A key of a row as a number. */
export function numberOf(row: Readonly<Record<string, unknown>>, key: string): number {
  const value = row[key];
  if (typeof value !== 'number') throw new Error(`${key} is not a number`);
  return value;
}

/** A key of a row as a list of numbers. */
export function numbersOf(row: Readonly<Record<string, unknown>>, key: string): number[] {
  const value = row[key];
  if (!Array.isArray(value)) throw new Error(`${key} is not a list`);
  return value as number[];
}

/** A reference case as it stands on disk. */
export interface ReferenceCase {
  readonly id: string;
  readonly design: Record<string, unknown>;
  readonly positions?: number[];
  readonly expect: readonly {
    path: string;
    value: unknown;
    relative?: number;
    absolute?: number;
    relativeToPeak?: number;
  }[];
}

/** The case `id` of tests/reference/cases. */
export function referenceCase(id: string): ReferenceCase {
  return JSON.parse(readFileSync(new URL(`cases/${id}.json`, reference), 'utf8')) as ReferenceCase;
}

/** What the case `id` expects at `path`. */
export function expectedOf(reference: ReferenceCase, path: string): unknown {
  const found = reference.expect.find((entry) => entry.path === path);
  if (!found) throw new Error(`case ${reference.id} expects nothing at ${path}`);
  return found.value;
}

/** Largest difference over the largest expected magnitude. */
export function errorToPeak(expected: ArrayLike<number>, actual: ArrayLike<number>): number {
  let peak = 0;
  let difference = 0;
  for (let i = 0; i < expected.length; i++) {
    peak = Math.max(peak, Math.abs(expected[i]!));
    difference = Math.max(difference, Math.abs(expected[i]! - actual[i]!));
  }
  return difference / peak;
}
