import type { DocumentField } from '#contracts/design-document';
import { textInUnit } from '../../lib/quantities';

/**
 * Between the text in a field and what stands in the document. The document keeps what was typed; a number without unit is
 * written with the unit that the field shows, because the document itself would take it for SI.
 */

type Shown = Pick<DocumentField, 'dimension' | 'unit'>;

const plainNumber = /^[-−+]?(?:\d+\.?\d*|\.\d+)(?:[eE][-−+]?\d+)?$/;

/** The text that a field shows for a value of the document. */
export function textOfValue(value: unknown, { dimension, unit }: Shown): string {
  if (typeof value === 'number') return Number.isFinite(value) ? textInUnit(value, dimension, unit) : String(value);
  if (typeof value !== 'string') return '';
  if (unit !== '' && value.endsWith(` ${unit}`)) {
    const bare = value.slice(0, -unit.length - 1);
    if (plainNumber.test(bare)) return bare;
  }
  return value;
}

/** What the document keeps for a typed text; undefined for an empty field, so that the default holds. */
export function valueOfText(text: string, { unit }: Shown): string | undefined {
  const trimmed = text.trim();
  if (trimmed === '') return undefined;
  return unit !== '' && plainNumber.test(trimmed) ? `${trimmed} ${unit}` : trimmed;
}

/** What the document keeps for a sum once it is worked out: its value in the field's unit. */
export function valueOfResult(value: number, { dimension, unit }: Shown): string {
  const text = textInUnit(value, dimension, unit);
  return unit === '' ? text : `${text} ${unit}`;
}
