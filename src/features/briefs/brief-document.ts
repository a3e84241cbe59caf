import { BriefDocument } from '#contracts/briefs';
import type { Issue } from '#contracts/error';
import { requirementQuantities } from '#contracts/requirement';
import { formatInUnit, parseQuantity, quantityParts, readQuantityFully } from '../../lib/quantities';
import type { Dimension } from '../../lib/quantities';
import { briefUnits, requirementUnit, unitInText } from './brief-fields';
import type { BriefFields, RequirementFields } from './brief-fields';
import { readVibration } from './vibration-document';
import type { VibrationFields } from './vibration-fields';

export type BriefReading = { ok: true; document: BriefDocument } | { ok: false; issues: Issue[] };

interface Bounds {
  dimension: Dimension;
  unit: string;
  least?: number;
  most?: number;
}

/** Collects what is wrong while the fields are read, so that all of it is told at once. */
class Reader {
  readonly issues: Issue[] = [];

  /** The SI value of a field; null where it is empty or cannot be used, which is then among the issues. */
  async quantity(
    path: string,
    text: string,
    what: string | null,
    { dimension, unit, least, most }: Bounds,
  ): Promise<number | null> {
    if (text.trim() === '') {
      if (what !== null) this.issues.push({ path, value: text, message: `Give ${what}.` });
      return null;
    }
    const reading = await readQuantityFully(text, dimension, unit);
    const say = (value: number) => formatInUnit(value, dimension, unit, 4);
    if (!reading.ok) this.issues.push({ path, value: text, message: reading.message });
    else if (least !== undefined && reading.value < least)
      this.issues.push({
        path,
        value: text,
        message: `${say(reading.value)} is below the limit of ${say(least)}.`,
        limit: least,
      });
    else if (most !== undefined && reading.value > most)
      this.issues.push({
        path,
        value: text,
        message: `${say(reading.value)} is above the limit of ${say(most)}.`,
        limit: most,
      });
    else return reading.value;
    return null;
  }

  async envelope(fields: BriefFields['envelope']): Promise<unknown> {
    const length = (path: string, text: string, what: string) =>
      this.quantity(`envelope.${path}`, text, what, briefUnits.length);
    if (fields.shape === 'cylinder')
      return {
        shape: 'cylinder',
        diameter: await length('diameter', fields.diameter, 'a diameter'),
        length: await length('length', fields.length, 'a length'),
      };
    const size = [];
    for (const [index, what] of ['a length', 'a width', 'a height'].entries())
      size.push(await length(`size.${index}`, fields.size[index] ?? '', what));
    return { shape: 'box', size };
  }

  async requirement(fields: RequirementFields, index: number): Promise<unknown> {
    const { dimension } = requirementQuantities[fields.quantity];
    const own = requirementUnit(fields.quantity);
    const limit = await this.quantity(`requirements.${index}.limit`, fields.limit, 'a limit', { dimension, unit: own });
    return { ...fields, title: fields.title.trim(), limit, unit: shownUnit(fields.limit, dimension, own) };
  }
}

/** The unit the writer thinks in: the one typed, or the field's; a letter code such as 4k7 has none of its own. */
function shownUnit(text: string, dimension: Dimension, own: string): string {
  const found = unitInText(text);
  if (found === '') return own;
  const one = parseQuantity('1', dimension, found);
  if (one.ok && found.length <= 20) return found;
  const reading = parseQuantity(text, dimension, own);
  return reading.ok ? quantityParts(reading.value, dimension).unit : own;
}

/** Reads the fields of a brief: the document, or everything that is missing or wrong, at the names of the fields. */
export async function readBrief(fields: BriefFields): Promise<BriefReading> {
  const reader = new Reader();
  const vibration = await readVibration(fields.vibration);
  reader.issues.push(...vibration.issues);
  const candidate = {
    title: fields.title,
    machine: fields.machine,
    place: fields.place,
    customerContact: fields.customerContact,
    vibration: vibration.document,
    powerNeeded: await reader.quantity('powerNeeded', fields.powerNeeded, 'the power needed', briefUnits.powerNeeded),
    loadNote: fields.loadNote,
    envelope: await reader.envelope(fields.envelope),
    massLimit: await reader.quantity('massLimit', fields.massLimit, null, briefUnits.massLimit),
    temperature: {
      lowest: await reader.quantity(
        'temperature.lowest',
        fields.temperature.lowest,
        'the lowest temperature',
        briefUnits.temperature,
      ),
      highest: await reader.quantity(
        'temperature.highest',
        fields.temperature.highest,
        'the highest temperature',
        briefUnits.temperature,
      ),
    },
    lifeCycles: await reader.quantity('lifeCycles', fields.lifeCycles, null, briefUnits.lifeCycles),
    orientation: fields.orientation,
    requirements: await Promise.all(fields.requirements.map((each, index) => reader.requirement(each, index))),
    notes: fields.notes,
  };
  const parsed = BriefDocument.safeParse(candidate);
  const told = new Set(reader.issues.map(({ path }) => path));
  for (const { path, message } of parsed.error?.issues ?? []) {
    const name = path.join('.');
    if (!told.has(name)) reader.issues.push({ path: name, message });
  }
  return parsed.success && reader.issues.length === 0
    ? { ok: true, document: parsed.data }
    : { ok: false, issues: reader.issues };
}

/** The field that a path of the sent document belongs to: the fields of a vibration stand one level deeper. */
export function briefFieldName(path: string, kind: VibrationFields['kind']): string {
  const name = path.replace(/^document\./, '');
  const inside = /^vibration\.(.+)$/.exec(name)?.[1];
  if (inside === undefined) return name;
  if (kind === 'tone') return `vibration.tone.${inside}`;
  if (kind === 'tones') return `vibration.${inside}`;
  if (kind === 'spectrum')
    return `vibration.spectrum.${inside.replace(/^(points\.\d+)\.0$/, '$1.frequency').replace(/^(points\.\d+)\.1$/, '$1.density')}`;
  return name;
}
