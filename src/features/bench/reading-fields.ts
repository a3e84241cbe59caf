import { requirementQuantities } from '#contracts/requirement';
import type { Requirement, RequirementQuantity } from '#contracts/requirement';
import { ReadingCreate } from '#contracts/runs';
import type { Instrument } from '#contracts/instruments';
import type { Issue } from '#contracts/error';
import { quantityParts, readQuantityFully, unitScale } from '../../lib/quantities';
import type { Dimension } from '../../lib/quantities';
import { benchUnits } from './reading-words';

/** A reading as it is entered. */
export interface ReadingFields {
  /** Requirement it counts for; '' for one that is taken for information. */
  requirementId: string;
  quantity: RequirementQuantity;
  value: string;
  instrumentId: string;
  outOfCalibrationReason: string;
  note: string;
}

export const emptyReading = (requirement: Requirement | undefined, instrumentId: string): ReadingFields => ({
  requirementId: requirement?.id ?? '',
  quantity: requirement?.quantity ?? 'loadPower',
  value: '',
  instrumentId,
  outOfCalibrationReason: '',
  note: '',
});

/** What is measured and the unit that is meant where none is typed: the requirement's own where there is one. */
export function measuredAs(
  fields: Pick<ReadingFields, 'requirementId' | 'quantity'>,
  requirements: readonly Requirement[],
): { quantity: RequirementQuantity; dimension: Dimension; unit: string } {
  const requirement = requirements.find(({ id }) => id === fields.requirementId);
  const quantity = requirement?.quantity ?? fields.quantity;
  const { dimension } = requirementQuantities[quantity];
  const own = requirement?.unit ?? '';
  const unit = own !== '' && unitScale(dimension, own) !== null ? own : (benchUnits[dimension] ?? '');
  return { quantity, dimension, unit };
}

const unitTyped = (text: string): string =>
  text
    .trim()
    .replace(/^[+−-]?(\d+\.?\d*|\.\d+)(?:[eE][+−-]?\d+)?/, '')
    .trim();

/** The unit to show the reading in: the one typed, else the one that was meant. */
function shownUnit(text: string, value: number, dimension: Dimension, unit: string): string {
  const own = unitTyped(text);
  if (own === '') return unit;
  return own.length <= 20 && unitScale(dimension, own) !== null ? own : quantityParts(value, dimension).unit;
}

type ReadReading = { ok: true; body: ReadingCreate } | { ok: false; issues: Issue[] };

/** The reading as it is sent, or what is missing or not understood, at the names of the fields. */
export async function readReading(
  fields: ReadingFields,
  requirements: readonly Requirement[],
  instruments: readonly Instrument[],
): Promise<ReadReading> {
  const issues: Issue[] = [];
  const { quantity, dimension, unit } = measuredAs(fields, requirements);
  let value: number | null = null;
  if (fields.value.trim() === '') issues.push({ path: 'value', message: 'Give what was read, with its unit.' });
  else {
    const reading = await readQuantityFully(fields.value, dimension, unit);
    if (reading.ok) value = reading.value;
    else issues.push({ path: 'value', value: fields.value, message: reading.message });
  }
  const instrument = instruments.find(({ id }) => id === fields.instrumentId);
  if (instrument === undefined)
    issues.push({ path: 'instrumentId', message: 'Choose the instrument it was read from.' });
  const reason = fields.outOfCalibrationReason.trim();
  const outside = instrument !== undefined && !instrument.inCalibration;
  if (outside && reason === '')
    issues.push({
      path: 'outOfCalibrationReason',
      message: `${instrument.number} is out of calibration: say why it was used.`,
    });
  if (issues.length > 0 || value === null) return { ok: false, issues };
  const parsed = ReadingCreate.safeParse({
    requirementId: fields.requirementId === '' ? null : fields.requirementId,
    quantity,
    value,
    unit: shownUnit(fields.value, value, dimension, unit),
    instrumentId: fields.instrumentId,
    outOfCalibrationReason: outside ? reason : null,
    note: fields.note,
  });
  if (parsed.success) return { ok: true, body: parsed.data };
  return { ok: false, issues: parsed.error.issues.map(({ path, message }) => ({ path: path.join('.'), message })) };
}
