import { canonicalJson } from '../canonical-json';
import { invalid } from '../errors';

const longestDraft = 256 * 1024;

/** The draft as text, refused where it could not be given back as it came. */
export function draftText(document: Record<string, unknown>): string {
  const refuse = (message: string, limit?: number) =>
    invalid([{ path: 'document', message, ...(limit === undefined ? {} : { limit }) }], message);
  try {
    const text = canonicalJson(document);
    if (Buffer.byteLength(text) <= longestDraft) return JSON.stringify(document);
  } catch (error) {
    if (error instanceof TypeError) throw refuse('The document holds a number that is too large to be kept.');
    throw error;
  }
  throw refuse('The document is longer than 256 kB.', longestDraft);
}
