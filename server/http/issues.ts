import type { z } from 'zod';
import type { Issue } from '#contracts/error';

type RawIssue = z.core.$ZodRawIssue;

const nouns: Record<string, string> = {
  string: 'text',
  number: 'a number',
  int: 'a whole number',
  boolean: 'true or false',
  array: 'a list',
  tuple: 'a list',
  object: 'an object',
  record: 'an object',
  null: 'null',
  date: 'a date',
};
const noun = (type: unknown): string => nouns[String(type)] ?? String(type);

const formats: Record<string, string> = {
  uuid: 'This is not an identifier.',
  datetime: 'This is not a time such as 2027-03-31T12:00:00Z.',
  date: 'This is not a day such as 2027-03-31.',
  email: 'This is not an e-mail address.',
};

const countable: Record<string, string> = { string: ' characters', array: ' entries', set: ' entries' };

/** Plain words for what zod finds, used where a contract has no words of its own. */
export function plainWords(issue: RawIssue): string | undefined {
  switch (issue.code) {
    case 'invalid_type':
      if (issue.input === undefined) return 'This is missing.';
      if (issue.expected === 'number' && (issue.input === Infinity || issue.input === -Infinity))
        return 'This is not a finite number.';
      return `This must be ${noun(issue.expected)}.`;
    case 'too_small':
      return `${issue.inclusive === false ? 'More than' : 'At least'} ${String(issue.minimum)}${countable[issue.origin] ?? ''}.`;
    case 'too_big':
      return `${issue.inclusive === false ? 'Less than' : 'At most'} ${String(issue.maximum)}${countable[issue.origin] ?? ''}.`;
    case 'invalid_value':
      return `This must be ${issue.values.length === 1 ? '' : 'one of '}${issue.values.map(String).join(', ')}.`;
    case 'invalid_format':
      return formats[issue.format];
    case 'unrecognized_keys':
      return 'This key is not known here.';
    case 'invalid_union':
      return 'None of the permitted forms fits.';
    default:
      return undefined;
  }
}

const secret = /password|secret|token/i;
const longestShown = 200;

/** The value that was refused, where it is short and not secret. */
function shown(input: unknown, path: PropertyKey[]): unknown {
  if (path.some((step) => secret.test(String(step)))) return undefined;
  let value = input;
  for (const step of path) {
    if (typeof value !== 'object' || value === null || !Object.hasOwn(value, step)) return undefined;
    value = (value as Record<PropertyKey, unknown>)[step];
  }
  if (typeof value === 'string') return value.length > longestShown ? `${value.slice(0, longestShown)}…` : value;
  return typeof value === 'object' && value !== null ? undefined : value;
}

function limitOf(issue: z.core.$ZodIssue): string | number | undefined {
  if (issue.code === 'too_small') return Number(issue.minimum);
  if (issue.code === 'too_big') return Number(issue.maximum);
  if (issue.code === 'invalid_value') return issue.values.map(String).join(', ');
  if (issue.code === 'not_multiple_of') return issue.divisor;
  return undefined;
}

/** Zod's findings as issues: one for each unknown key; path, value, words and limit for everything else. */
export function toIssues(error: z.ZodError, input: unknown): Issue[] {
  return error.issues.flatMap((issue): Issue[] => {
    if (issue.code === 'unrecognized_keys') {
      return issue.keys.map((key) => {
        const path = [...issue.path, key];
        return { path: path.join('.'), value: shown(input, path), message: 'This key is not known here.' };
      });
    }
    const entry: Issue = { path: issue.path.join('.'), message: issue.message };
    const value = shown(input, issue.path);
    const limit = limitOf(issue);
    if (value !== undefined) entry.value = value;
    if (limit !== undefined) entry.limit = limit;
    return [entry];
  });
}
