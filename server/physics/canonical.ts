import type { DesignDocument } from './design-document';
import type { VibrationDocument } from './vibration-document';

/**
 * Canonical text of a parsed document: JSON without spaces, keys in schema order, numbers in the shortest form that
 * reads back to the same double (ECMA-262 Number::toString), so that equal documents have equal text on every machine.
 */
export const canonicalText = (document: DesignDocument | VibrationDocument): string => JSON.stringify(document);
