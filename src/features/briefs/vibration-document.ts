import type { Issue } from '#contracts/error';
import { readQuantityFully } from '../../lib/quantities';
import type { Dimension } from '../../lib/quantities';
import { densityUnitWords } from './vibration-fields';
import type { PointFields, SpectrumFields, ToneFields, VibrationFields } from './vibration-fields';

export interface VibrationReading {
  document: unknown;
  /** What is missing or not understood, at the names of the fields. */
  issues: Issue[];
}

interface Asked {
  what: string;
  dimension: Dimension;
  unit: string;
  /** Zero and less mean nothing here. */
  positive: boolean;
}

const frequency: Asked = { what: 'a frequency', dimension: 'frequency', unit: 'Hz', positive: true };
const acceleration: Asked = { what: 'an acceleration', dimension: 'acceleration', unit: 'm/s²', positive: true };
const phase: Asked = { what: 'a phase', dimension: 'angle', unit: 'deg', positive: false };
const duration: Asked = { what: 'a duration', dimension: 'time', unit: 's', positive: true };

const capital = (text: string) => text.replace(/^./, (first) => first.toUpperCase());

/** Reads one field; what is wrong goes to `issues`. */
async function readField(path: string, value: string, asked: Asked, issues: Issue[]): Promise<number | null> {
  const { what, dimension, unit, positive } = asked;
  if (value.trim() === '') {
    issues.push({ path, value, message: `Give ${what}.` });
    return null;
  }
  const reading = await readQuantityFully(value, dimension, unit);
  if (!reading.ok) issues.push({ path, value, message: reading.message });
  else if (positive && reading.value <= 0)
    issues.push({ path, value, message: `${capital(what)} is more than 0; this is ${value.trim()}.`, limit: 0 });
  else return reading.value;
  return null;
}

/** A number typed without unit gets the one its field shows, so that the document says what was meant. */
const withUnit = (value: string, unit: string): string =>
  /^[+−-]?[\d.]+(?:[eE][+-]?\d+)?$/.test(value.trim()) ? `${value.trim().replace('−', '-')} ${unit}` : value.trim();

/** Keeps what was typed where the document may hold it; sums are worked out, since a document holds plain quantities. */
async function kept(value: string, asked: Asked, unit: string): Promise<string | number> {
  const plain = withUnit(value, unit);
  if (!/[*/+()×·]|\d\s*[−-]/.test(value.replace(/[eE][+−-]?\d+/, '').replace(/m\/s(\^2|²)/g, ''))) return plain;
  const reading = await readQuantityFully(value, asked.dimension, asked.unit);
  return reading.ok ? reading.value : plain;
}

async function readTone(fields: ToneFields, at: string, issues: Issue[]) {
  await readField(`${at}.frequency`, fields.frequency, frequency, issues);
  await readField(`${at}.acceleration`, fields.acceleration, acceleration, issues);
  return {
    frequency: await kept(fields.frequency, frequency, 'Hz'),
    acceleration: await kept(fields.acceleration, acceleration, 'm/s^2'),
    as: fields.as,
  };
}

async function readTones(tones: ToneFields[], issues: Issue[]) {
  const documents = [];
  for (const [index, tone] of tones.entries()) {
    const at = `vibration.tones.${index}`;
    const read = await readTone(tone, at, issues);
    await readField(`${at}.phase`, tone.phase, phase, issues);
    documents.push({ ...read, phase: await kept(tone.phase, phase, 'deg') });
  }
  return { kind: 'tones', tones: documents };
}

async function readSpectrum(fields: SpectrumFields, issues: Issue[]) {
  const unit = densityUnitWords[fields.unit];
  const density: Asked = { what: 'a density', dimension: 'accelerationDensity', unit, positive: true };
  const one = await readQuantityFully('1', 'accelerationDensity', unit);
  const scale = one.ok ? one.value : 1;
  const points: [number, number][] = [];
  for (const [index, point] of fields.points.entries()) {
    const at = `vibration.spectrum.points.${index}`;
    const f = await readField(`${at}.frequency`, point.frequency, frequency, issues);
    const s = await readField(`${at}.density`, point.density, density, issues);
    if (f === null || s === null) continue;
    const before = points[points.length - 1]?.[0];
    if (before !== undefined && f <= before)
      issues.push({
        path: `${at}.frequency`,
        value: point.frequency,
        message: `Frequencies rise from point to point; the one before is ${before} Hz, this is ${f} Hz.`,
      });
    points.push([f, Number((s / scale).toPrecision(15))]);
  }
  await readField('vibration.spectrum.duration', fields.duration, duration, issues);
  const seed = Number(fields.seed);
  if (fields.seed.trim() === '' || !Number.isInteger(seed) || seed < 0)
    issues.push({
      path: 'vibration.spectrum.seed',
      value: fields.seed,
      message: `The seed is a whole number from 0; “${fields.seed}” is not.`,
    });
  return { kind: 'spectrum', points, unit: fields.unit, duration: await kept(fields.duration, duration, 's'), seed };
}

/** Turns the fields into a vibration document in the writer's own units, and names what is missing or not understood. */
export async function readVibration(fields: VibrationFields): Promise<VibrationReading> {
  const issues: Issue[] = [];
  if (fields.kind === 'tone')
    return { document: { kind: 'tone', ...(await readTone(fields.tone, 'vibration.tone', issues)) }, issues };
  if (fields.kind === 'tones') return { document: await readTones(fields.tones, issues), issues };
  if (fields.kind === 'spectrum') return { document: await readSpectrum(fields.spectrum, issues), issues };
  return { document: fields.kept, issues };
}

/**
 * Points as pasted from a table: one a line, frequency then density, parted by tab, semicolon, spaces or a comma that is
 * followed by a space. Lines that hold no two numbers (headings) are told.
 */
export function readPastedPoints(pasted: string): { points: PointFields[]; skipped: string[] } {
  const points: PointFields[] = [];
  const skipped: string[] = [];
  for (const line of pasted.split(/\r?\n/)) {
    const clean = line.trim();
    if (clean === '') continue;
    const parts = (/[\t;]/.test(clean) ? clean.split(/[\t;]/) : clean.split(/,\s+|\s+|,(?=[^,]*$)/)).map((part) =>
      part.trim(),
    );
    const [frequency, density] = parts;
    if (parts.length >= 2 && frequency && density && /^[+-]?[\d.]/.test(frequency) && /^[+-]?[\d.]/.test(density))
      points.push({ frequency, density });
    else skipped.push(clean);
  }
  return { points, skipped };
}
