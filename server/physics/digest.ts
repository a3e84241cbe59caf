import { createHash } from 'node:crypto';
import { canonicalText } from './canonical';
import type { DesignDocument } from './design-document';
import type { VibrationDocument } from './vibration-document';

const sha256 = (text: string): string => createHash('sha256').update(text, 'utf8').digest('hex');

/** SHA-256 of one canonical document, 64 hexadecimal digits. */
export const digestOfDocument = (document: DesignDocument | VibrationDocument): string =>
  sha256(canonicalText(document));

/** SHA-256 over both canonical documents, the design first, one a line: names the input of an estimate. */
export const digestOfInputs = (design: DesignDocument, vibration: VibrationDocument): string =>
  sha256(`${canonicalText(design)}\n${canonicalText(vibration)}\n`);
