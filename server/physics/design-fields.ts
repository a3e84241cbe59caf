import { circuitFields } from './design-fields-circuit';
import { magneticFields } from './design-fields-magnetics';
import { mechanicalFields } from './design-fields-mechanics';
import type { DocumentField } from './document-field';

export type { DocumentField } from './document-field';

/**
 * Every number of a design document by path pattern: `*` stands for a place in a list, `{kind}` picks the kind of
 * magnet, coil, suspension or circuit. `designField` finds the entry for a real path.
 */
export const designFields = { ...mechanicalFields, ...magneticFields, ...circuitFields } as const;

const named: Readonly<Record<string, DocumentField>> = designFields;

/**
 * Finds the entry of `designFields` for a real path.
 * @param path as in error messages, `magnets.0.size.2` or `circuit.capacitance`.
 * @param kind shape of the magnet or coil, or kind of suspension or circuit, that stands at that path.
 * @returns undefined where the path holds no number.
 */
export function designField(path: string, kind?: string): DocumentField | undefined {
  const levitated = path.startsWith('suspension.fixed.') ? path.replace('suspension.fixed.', 'magnets.') : path;
  const pattern = levitated.replace(/^(magnets|coils)\.\d+/, '$1.*');
  const braced =
    kind === undefined ? undefined : pattern.replace(/^(magnets\.\*|coils\.\*|suspension|circuit)/, `$1{${kind}}`);
  const listed = /^(suspension\.(?:displacement|force)|asMeasured\.coupling\.(?:position|coupling))\.\d+$/.exec(
    pattern,
  );
  const table = listed?.[1]?.replace(/^suspension\./, 'suspension{table}.');
  return (braced === undefined ? undefined : named[braced]) ?? named[table ?? pattern];
}
