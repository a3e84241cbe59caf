import { z } from 'zod';
import type { DocumentField } from './document-field';
import { formatQuantity, parseQuantity } from './quantity';

/** Why a number is outside what its field takes; undefined where it is inside. */
export function limitProblem(field: DocumentField, value: number): { message: string; limit: number } | undefined {
  const shown = (limit: number): string => formatQuantity(limit, field.dimension, 4);
  const mine = formatQuantity(value, field.dimension, 4);
  if (value < field.minimum || (field.above === true && value === field.minimum)) {
    const bound = field.above === true ? 'more than' : 'at least';
    return { message: `${mine} is too small; ${bound} ${shown(field.minimum)} is needed`, limit: field.minimum };
  }
  if (value > field.maximum) {
    return { message: `${mine} is too large; at most ${shown(field.maximum)} is taken`, limit: field.maximum };
  }
  return undefined;
}

/** A number read from a document, or what is wrong with it. */
export function readNumber(
  field: DocumentField,
  input: unknown,
): { value: number } | { message: string; limit?: number } {
  let value: number;
  if (typeof input === 'string') {
    const reading = parseQuantity(input, field.dimension);
    if (!reading.ok) return { message: reading.message };
    value = reading.value;
  } else if (typeof input === 'number') {
    value = input;
  } else {
    const expected = `a number in SI or a text with unit is needed`;
    return { message: input === undefined ? `is missing; ${expected}` : `must be a quantity; ${expected}` };
  }
  if (!Number.isFinite(value)) return { message: `${String(value)} is not a finite number` };
  if (field.whole === true && !Number.isInteger(value)) return { message: 'must be a whole number' };
  return limitProblem(field, value) ?? { value: value + 0 };
}

/** A quantity: an SI number, or text with a unit. Comes out as the SI number, within the field's limits. */
export const quantity = (field: DocumentField) =>
  z.unknown().transform((input, context): number => {
    const read = readNumber(field, input);
    if ('value' in read) return read.value;
    context.addIssue({ code: 'custom', message: read.message, params: { limit: read.limit } });
    return z.NEVER;
  });

/** A quantity with its default written out where the document leaves it out. */
export const quantityOr = (field: DocumentField, fallback = field.default ?? 0) => quantity(field).default(fallback);

/** A quantity, or null for "none", which is also what leaving it out means. */
export const quantityOrNull = (field: DocumentField) =>
  z
    .unknown()
    .transform((input, context): number | null => {
      if (input === null) return null;
      const read = readNumber(field, input);
      if ('value' in read) return read.value;
      context.addIssue({ code: 'custom', message: read.message, params: { limit: read.limit } });
      return z.NEVER;
    })
    .default(null);

/** A list of quantities. Its length is checked before any entry is looked at. */
export const quantityList = (field: DocumentField, least: number, most: number) =>
  z.unknown().transform((input, context): number[] => {
    if (!Array.isArray(input)) {
      context.addIssue({
        code: 'custom',
        message: input === undefined ? 'is missing; a list is needed' : 'must be a list',
      });
      return z.NEVER;
    }
    if (input.length < least || input.length > most) {
      const bound = input.length < least ? `at least ${least}` : `at most ${most}`;
      context.addIssue({
        code: 'custom',
        message: `${bound} entries are needed; there are ${input.length}`,
        params: { limit: input.length < least ? least : most },
      });
      return z.NEVER;
    }
    const values: number[] = new Array<number>(input.length);
    for (let index = 0; index < input.length; index += 1) {
      const read = readNumber(field, input[index]);
      if ('value' in read) {
        values[index] = read.value;
        continue;
      }
      context.addIssue({ code: 'custom', message: read.message, params: { limit: read.limit }, path: [index] });
      return z.NEVER;
    }
    return values;
  });

/** Index of the first entry that does not exceed the one before it; −1 where the list rises throughout. */
export function firstNotRising(values: readonly number[]): number {
  for (let index = 1; index < values.length; index += 1) {
    if (!((values[index] ?? 0) > (values[index - 1] ?? 0))) return index;
  }
  return -1;
}

/** A choice between numbers such as a polarity; written out where the document leaves it out. */
export const sign = z.literal([1, -1]).default(1);

/** What zod hands to refinements and transforms. */
export type Context = z.core.$RefinementCtx;

/** Reports a problem at a path below the value under test. */
export function refuse(context: Context, message: string, path: PropertyKey[] = [], limit?: number): void {
  context.addIssue({ code: 'custom', message, path, params: { limit } });
}

/** Passes the issues of a schema that was chosen while reading on to the document's. */
export function passOn(error: z.ZodError, input: unknown, context: Context): never {
  for (const issue of error.issues) context.issues.push({ ...issue, input } as z.core.$ZodRawIssue);
  return z.NEVER;
}
