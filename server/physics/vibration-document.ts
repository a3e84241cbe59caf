import { z } from 'zod';
import { DocumentError, issuesOf } from './document-error';
import type { DocumentIssue } from './document-error';
import { firstNotRising, limitProblem, quantity, quantityOr, readNumber, refuse } from './document-schema';
import { parseQuantity } from './quantity';
import { vibrationFields as fields } from './vibration-fields';

export { vibrationFields } from './vibration-fields';

/** Format name that a vibration document carries. */
export const vibrationFormat = 'tremolode-vibration/1';

/** Most samples of a recording; longer ones are cut or resampled before they come here. */
export const longestRecording = 2_000_000;

const format = z.literal(vibrationFormat).default(vibrationFormat);
const as = z.enum(['peak', 'rms']);

const toneParts = {
  frequency: quantity(fields.frequency),
  acceleration: quantity(fields.acceleration),
  as,
  phase: quantityOr(fields.phase),
};

const tone = z.strictObject({ format, kind: z.literal('tone'), ...toneParts });

const tones = z.strictObject({
  format,
  kind: z.literal('tones'),
  tones: z.array(z.strictObject(toneParts)).min(1).max(50),
});

const densityUnit = '(m/s^2)^2/Hz';
const sampleUnit = 'm/s^2';

/** SI value of one of the unit in which bare numbers of a list are stated. */
function unitFactor(unit: string, dimension: 'acceleration' | 'accelerationDensity'): number | undefined {
  const reading = parseQuantity(`1 ${unit}`, dimension);
  return reading.ok && unit.trim() !== '' ? reading.value : undefined;
}

const unitText = z.string().max(40);

const spectrum = z
  .strictObject({
    format,
    kind: z.literal('spectrum'),
    points: z
      .array(z.tuple([quantity(fields.pointFrequency), z.unknown()]))
      .min(2)
      .max(500),
    unit: unitText,
    duration: quantityOr(fields.duration),
    seed: quantityOr(fields.seed),
  })
  .transform((value, context) => {
    const factor = unitFactor(value.unit, 'accelerationDensity');
    if (factor === undefined) {
      refuse(context, `is no unit of an acceleration density; write g^2/Hz or ${densityUnit}`, ['unit']);
      return z.NEVER;
    }
    const points: [number, number][] = [];
    for (const [index, [frequency, density]] of value.points.entries()) {
      const scaled = typeof density === 'number' ? density * factor : density;
      const read = readNumber(fields.pointDensity, scaled);
      if (!('value' in read)) {
        refuse(context, read.message, ['points', index, 1], read.limit);
        return z.NEVER;
      }
      points.push([frequency, read.value]);
    }
    const stuck = firstNotRising(points.map(([frequency]) => frequency));
    if (stuck >= 0) {
      refuse(context, 'frequencies must rise from point to point', ['points', stuck, 0]);
      return z.NEVER;
    }
    return { ...value, points, unit: densityUnit };
  });

const recording = z
  .strictObject({
    format,
    kind: z.literal('recording'),
    rate: quantity(fields.rate),
    unit: unitText,
    acceleration: z.unknown(),
  })
  .transform((value, context) => {
    const samples = value.acceleration;
    if (!Array.isArray(samples) && !(samples instanceof Float64Array)) {
      refuse(context, samples === undefined ? 'is missing; a list is needed' : 'must be a list', ['acceleration']);
      return z.NEVER;
    }
    if (samples.length < 2 || samples.length > longestRecording) {
      const limit = samples.length < 2 ? 2 : longestRecording;
      const bound = samples.length < 2 ? 'at least' : 'at most';
      refuse(context, `${bound} ${limit} samples are taken; there are ${samples.length}`, ['acceleration'], limit);
      return z.NEVER;
    }
    const factor = unitFactor(value.unit, 'acceleration');
    if (factor === undefined) {
      refuse(context, `is no unit of an acceleration; write ${sampleUnit} or g`, ['unit']);
      return z.NEVER;
    }
    const acceleration: number[] = new Array<number>(samples.length);
    for (let index = 0; index < samples.length; index += 1) {
      const sample: unknown = samples[index];
      if (typeof sample !== 'number' || !Number.isFinite(sample)) {
        refuse(context, 'every sample must be a finite number', ['acceleration', index]);
        return z.NEVER;
      }
      const problem = limitProblem(fields.sample, sample * factor);
      if (problem) {
        refuse(context, problem.message, ['acceleration', index], problem.limit);
        return z.NEVER;
      }
      acceleration[index] = sample * factor + 0;
    }
    return { ...value, unit: sampleUnit, acceleration };
  });

/**
 * The vibration document `tremolode-vibration/1`. Canonical: densities in (m/s²)²/Hz and samples in m/s² whatever unit
 * they were stated in; a tone keeps whether its acceleration is peak or rms.
 */
export const vibrationDocumentSchema = z.discriminatedUnion('kind', [tone, tones, spectrum, recording]);

/** A vibration document in canonical form, SI throughout. */
export type VibrationDocument = z.output<typeof vibrationDocumentSchema>;

/** The canonical form, or everything that keeps the text from being a vibration document. */
export type VibrationReading =
  | { readonly ok: true; readonly document: VibrationDocument }
  | { readonly ok: false; readonly issues: DocumentIssue[] };

/** Reads a vibration document without throwing. */
export function readVibrationDocument(input: unknown): VibrationReading {
  const result = vibrationDocumentSchema.safeParse(input);
  return result.success ? { ok: true, document: result.data } : { ok: false, issues: issuesOf(result.error, input) };
}

/** Reads a vibration document; throws `DocumentError` with every issue found. */
export function parseVibrationDocument(input: unknown): VibrationDocument {
  const reading = readVibrationDocument(input);
  if (!reading.ok) throw new DocumentError(reading.issues);
  return reading.document;
}
