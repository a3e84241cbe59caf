/** Reading and changing a document by path, as issues name it: `magnets.0.length`. Nothing is changed in place. */

/** A draft as it stands in the form: any JSON object. */
export type Draft = Record<string, unknown>;

const keysOf = (path: string): string[] => (path === '' ? [] : path.split('.'));

const isContainer = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null;

export function readAt(document: unknown, path: string): unknown {
  let value = document;
  for (const key of keysOf(path)) {
    if (!isContainer(value)) return undefined;
    value = value[key];
  }
  return value;
}

function write(container: unknown, keys: readonly string[], value: unknown): unknown {
  const [key, ...rest] = keys;
  if (key === undefined) return value;
  if (Array.isArray(container)) {
    const copy: unknown[] = [...container];
    copy[Number(key)] = write(copy[Number(key)], rest, value);
    return copy;
  }
  const copy: Record<string, unknown> = isContainer(container) ? { ...container } : {};
  const next = write(copy[key], rest, value);
  if (next === undefined) delete copy[key];
  else copy[key] = next;
  return copy;
}

/**
 * The document with one value changed. `undefined` takes a key away, so that its default holds; in a list the place stays, because
 * its neighbours must not move.
 */
export const writeAt = (document: Draft, path: string, value: unknown): Draft =>
  write(document, keysOf(path), value) as Draft;

/** The document with an entry added to the list at a path. */
export function insertAt(document: Draft, path: string, value: unknown): Draft {
  const list = readAt(document, path);
  return writeAt(document, path, Array.isArray(list) ? [...(list as unknown[]), value] : [value]);
}

/** The document without one entry of the list at a path. */
export function removeAt(document: Draft, path: string, index: number): Draft {
  const list = readAt(document, path);
  if (!Array.isArray(list)) return document;
  return writeAt(
    document,
    path,
    list.filter((_, at) => at !== index),
  );
}

export const listLength = (document: unknown, path: string): number => {
  const list = readAt(document, path);
  return Array.isArray(list) ? list.length : 0;
};

/** Paths of all leaves whose values differ, with both values; what is missing on one side is undefined there. */
export function differences(
  mine: unknown,
  theirs: unknown,
  path = '',
): { path: string; mine: unknown; theirs: unknown }[] {
  if (isContainer(mine) && isContainer(theirs) && Array.isArray(mine) === Array.isArray(theirs)) {
    const keys = [...new Set([...Object.keys(mine), ...Object.keys(theirs)])];
    return keys.flatMap((key) => differences(mine[key], theirs[key], path === '' ? key : `${path}.${key}`));
  }
  return Object.is(mine, theirs) ? [] : [{ path, mine, theirs }];
}

export const sameDocument = (a: unknown, b: unknown): boolean => a === b || differences(a, b).length === 0;

/**
 * My changes put onto their document, where both started from the same `base`. Null where the two cannot be told apart by value: one
 * side added or removed an entry of a list, so that its places no longer mean the same.
 * @returns the joined document, and the paths that both changed to different values; there mine stands.
 */
export function joined(base: Draft, mine: Draft, theirs: Draft): { document: Draft; clashes: string[] } | null {
  const listsChanged = (document: Draft) =>
    differences(document, base).some(({ path }) => {
      const parent = path.split('.').slice(0, -1).join('.');
      return Array.isArray(readAt(base, parent)) && listLength(base, parent) !== listLength(document, parent);
    });
  if (listsChanged(mine) || listsChanged(theirs)) return null;
  const ours = differences(mine, base);
  const others = new Set(differences(theirs, base).map(({ path }) => path));
  return {
    document: ours.reduce((document, { path, mine: value }) => writeAt(document, path, value), theirs),
    clashes: ours
      .filter(({ path, mine: value }) => others.has(path) && !Object.is(readAt(theirs, path), value))
      .map(({ path }) => path),
  };
}
