import type { Dimension } from './quantity-dimensions';

/** What a form and the validation need to know of one number of a document. Limits and default are SI (°C, rad). */
export interface DocumentField {
  readonly label: string;
  readonly dimension: Dimension;
  /** Unit that the field shows first and takes where none is typed; an SI unit or a prefixed one. */
  readonly unit: string;
  readonly minimum: number;
  readonly maximum: number;
  /** True where the minimum itself is refused: lengths, masses, resistances are above zero. */
  readonly above?: boolean;
  /** True where only whole numbers make sense. */
  readonly whole?: boolean;
  /** Sensible step of a stepper, SI. */
  readonly step: number;
  /** Written out where the document leaves it out; a required field has none. */
  readonly default?: number;
  readonly help: string;
}

/** A length shown in millimetres. */
export const mm = (
  label: string,
  minimum: number,
  maximum: number,
  help: string,
  more: Partial<DocumentField> = {},
): DocumentField => ({
  label,
  dimension: 'length',
  unit: 'mm',
  minimum,
  maximum,
  step: 1e-4,
  help,
  ...more,
});
/** A dimension of a part, above zero. */
export const size = (label: string, help: string): DocumentField => mm(label, 1e-5, 1, help);
/** A position in the device. */
export const place = (label: string, help: string, more: Partial<DocumentField> = {}): DocumentField =>
  mm(label, -10, 10, help, more);
