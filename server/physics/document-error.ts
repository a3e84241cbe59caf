import type { z } from 'zod';

/** One thing that is wrong with a document, said so that its field can be found and mended. */
export interface DocumentIssue {
  /** Where, as in `magnets.0.length`; empty for the document as a whole. */
  readonly path: string;
  /** What stands there, shortened where it is long; null where nothing does. */
  readonly value: string | number | boolean | null;
  /** In plain words, with the limit where there is one. */
  readonly message: string;
  /** The limit that was passed, SI (°C, rad); absent where none is involved. */
  readonly limit?: number;
  /** Which of the documents, where two were read together. */
  readonly document?: 'design' | 'vibration';
}

/** Thrown for a document that cannot be computed; `issues` has at least one entry. */
export class DocumentError extends Error {
  override readonly name = 'DocumentError';
  constructor(readonly issues: readonly DocumentIssue[]) {
    super(issues.map(({ path, message }) => (path === '' ? message : `${path}: ${message}`)).join('\n'));
  }
}

/** Most issues reported at once; a document with more is a different kind of file. */
const mostIssues = 50;

/** Shortens any value for an error message; numbers that JSON cannot carry become words. */
export function issueValue(value: unknown): string | number | boolean | null {
  if (value === undefined || value === null) return null;
  if (typeof value === 'boolean') return value;
  if (typeof value === 'number') return Number.isFinite(value) ? value : String(value);
  if (typeof value === 'string') return value.length > 80 ? `${value.slice(0, 80)}…` : value;
  if (Array.isArray(value)) return `a list of ${value.length}`;
  return typeof value === 'object' ? 'an object' : typeof value;
}

function valueAt(input: unknown, path: readonly PropertyKey[]): unknown {
  let value = input;
  for (const key of path) {
    if (typeof value !== 'object' || value === null) return undefined;
    value = (value as Record<PropertyKey, unknown>)[key];
  }
  return value;
}

const kindWords: Readonly<Record<string, string>> = {
  object: 'an object',
  array: 'a list',
  string: 'a text',
  boolean: 'true or false',
  number: 'a number',
  tuple: 'a list',
};

/** zod's own wording is for programmers; this is for the person who typed the document. */
function messageOf(issue: z.core.$ZodIssue, value: unknown): string {
  switch (issue.code) {
    case 'custom':
      return issue.message;
    case 'invalid_type':
      return value === undefined
        ? `is missing; ${kindWords[issue.expected] ?? 'a value'} is needed`
        : `must be ${kindWords[issue.expected] ?? issue.expected}`;
    case 'invalid_value':
      return `${value === undefined ? 'is missing; it' : 'it'} must be ${issue.values.map((choice) => String(choice)).join(' or ')}`;
    case 'invalid_union': {
      const options = 'options' in issue && Array.isArray(issue.options) ? issue.options.map(String) : [];
      const needed = options.length > 0 ? `must be one of ${options.join(', ')}` : 'is not understood';
      return value === undefined ? `is missing; it ${needed}` : needed;
    }
    case 'too_small':
      return `needs at least ${String(issue.minimum)}`;
    case 'too_big':
      return `takes at most ${String(issue.maximum)}`;
    default:
      return issue.message;
  }
}

function limitOf(issue: z.core.$ZodIssue): number | undefined {
  if (issue.code === 'custom') {
    const limit: unknown = issue.params?.['limit'];
    return typeof limit === 'number' ? limit : undefined;
  }
  if (issue.code === 'too_small') return Number(issue.minimum);
  if (issue.code === 'too_big') return Number(issue.maximum);
  return undefined;
}

/** Translates what zod found into issues with path, value, message and limit. */
export function issuesOf(error: z.ZodError, input: unknown): DocumentIssue[] {
  const issues: DocumentIssue[] = [];
  for (const issue of error.issues) {
    const path = issue.path.map(String);
    if (issue.code === 'unrecognized_keys') {
      for (const key of issue.keys) {
        issues.push({
          path: [...path, key].join('.'),
          value: issueValue(valueAt(input, [...issue.path, key])),
          message: `the key “${key}” is not known here`,
        });
      }
      continue;
    }
    const value = valueAt(input, issue.path);
    const limit = limitOf(issue);
    issues.push({
      path: path.join('.'),
      value: issueValue(value),
      message: messageOf(issue, value),
      ...(limit === undefined ? {} : { limit }),
    });
  }
  return issues.slice(0, mostIssues);
}
