import { formatQuantity } from '#physics/quantity';
import { readVibrationDocument } from '#physics/vibration-document';
import type { VibrationDocument } from '#physics/vibration-document';

const frequency = (value: number): string => formatQuantity(value, 'frequency');
const acceleration = (value: number): string => formatQuantity(value, 'acceleration');

type Tone = Extract<VibrationDocument, { kind: 'tones' }>['tones'][number];
const peakOf = ({ acceleration: value, as }: Pick<Tone, 'acceleration' | 'as'>): number =>
  as === 'peak' ? value : value * Math.SQRT2;

/** Area under straight lines on log-log paper, as spectra are drawn. */
function rmsOfSpectrum(points: readonly (readonly [number, number])[]): number {
  let area = 0;
  points.forEach(([f1, g1], index) => {
    const next = points[index + 1];
    if (next === undefined || g1 <= 0 || next[1] <= 0) return;
    const [f2, g2] = next;
    const slope = Math.log(g2 / g1) / Math.log(f2 / f1);
    area += Math.abs(slope + 1) < 1e-9 ? g1 * f1 * Math.log(f2 / f1) : (g2 * f2 - g1 * f1) / (slope + 1);
  });
  return Math.sqrt(area);
}

/** The strongest line of a sampled signal, Hz: a plain Fourier sum over at most 2048 samples, enough to tune to. */
function strongestLine({ acceleration: samples, rate }: Extract<VibrationDocument, { kind: 'recording' }>): number {
  const length = Math.min(samples.length, 2048);
  const mean = samples.slice(0, length).reduce((sum, sample) => sum + sample, 0) / length;
  let best = { power: -1, frequency: rate / length };
  for (let line = 1; line < length / 2; line += 1) {
    let real = 0;
    let imaginary = 0;
    for (let index = 0; index < length; index += 1) {
      const angle = (2 * Math.PI * line * index) / length;
      const sample = (samples[index] ?? 0) - mean;
      real += sample * Math.cos(angle);
      imaginary += sample * Math.sin(angle);
    }
    const power = real * real + imaginary * imaginary;
    if (power > best.power) best = { power, frequency: (line * rate) / length };
  }
  return best.frequency;
}

const largest = <T>(items: readonly T[], size: (item: T) => number): T | undefined =>
  items.reduce<T | undefined>((best, item) => (best === undefined || size(item) > size(best) ? item : best), undefined);

/** The frequency a device is tuned to first, Hz; null where the vibration cannot be read. */
export function mainTone(vibration: unknown): number | null {
  const reading = readVibrationDocument(vibration);
  if (!reading.ok) return null;
  const { document } = reading;
  switch (document.kind) {
    case 'tone':
      return document.frequency;
    case 'tones':
      return largest(document.tones, peakOf)?.frequency ?? null;
    case 'spectrum':
      return largest(document.points, ([, density]) => density)?.[0] ?? null;
    case 'recording':
      return strongestLine(document);
  }
}

/** The vibration in one line, e.g. “50.0 Hz, 1.00 m/s² peak”. */
export function vibrationInWords(vibration: unknown): string {
  const reading = readVibrationDocument(vibration);
  if (!reading.ok) return 'not readable';
  const { document } = reading;
  switch (document.kind) {
    case 'tone':
      return `${frequency(document.frequency)}, ${acceleration(document.acceleration)} ${document.as}`;
    case 'tones': {
      const main = largest(document.tones, peakOf);
      const count = document.tones.length === 1 ? '1 tone' : `${document.tones.length} tones`;
      return main === undefined
        ? count
        : `${count}, the largest ${frequency(main.frequency)}, ${acceleration(main.acceleration)} ${main.as}`;
    }
    case 'spectrum': {
      const [first, last] = [document.points[0], document.points.at(-1)];
      const band = first && last ? `, ${frequency(first[0])} to ${frequency(last[0])}` : '';
      return `Spectrum${band}, ${acceleration(rmsOfSpectrum(document.points))} rms`;
    }
    case 'recording': {
      const { acceleration: samples, rate } = document;
      const rms = Math.sqrt(samples.reduce((sum, sample) => sum + sample * sample, 0) / samples.length);
      const duration = formatQuantity((samples.length - 1) / rate, 'time');
      return `Recording, ${duration} at ${frequency(rate)}, ${acceleration(rms)} rms`;
    }
  }
}
