import type { Tone } from './device';

/**
 * One-sided density ((m/s²)²/Hz) of a spectrum at a frequency (Hz): points joined straight on log–log paper, zero
 * outside them. Where two points share a frequency the later one holds from there on.
 */
export function densityAt(points: readonly (readonly [number, number])[], frequency: number): number {
  const last = points.length - 1;
  if (last < 0 || frequency < points[0]![0] || frequency > points[last]![0]) return 0;
  let n = 0;
  while (n < last - 1 && frequency >= points[n + 1]![0]) n++;
  if (last === 0) return points[0]![1];
  const [f1, g1] = points[n]!;
  const [f2, g2] = points[n + 1]!;
  if (frequency === f1 || f1 === f2) return frequency === f2 ? g2 : g1;
  if (!(g1 > 0) || !(g2 > 0)) return 0;
  return g1 * Math.exp((Math.log(g2 / g1) * Math.log(frequency / f1)) / Math.log(f2 / f1));
}

/** Mean square of a spectrum, (m/s²)²: each segment integrated in closed form. */
export function meanSquareOf(points: readonly (readonly [number, number])[]): number {
  let sum = 0;
  for (let n = 1; n < points.length; n++) {
    const [f1, g1] = points[n - 1]!;
    const [f2, g2] = points[n]!;
    if (!(f2 > f1) || !(g1 > 0) || !(g2 > 0)) continue;
    const ratio = Math.log(f2 / f1);
    const growth = Math.log(g2 / g1) + ratio;
    // ∫ g df = g1 f1 ∫ e^{growth s} ratio ds over s in [0, 1]
    sum += g1 * f1 * ratio * (Math.abs(growth) < 1e-8 ? 1 + growth / 2 : Math.expm1(growth) / growth);
  }
  return sum;
}

/** Tones of one frequency added up as phasors; by frequency, ascending. */
export function mergedTones(tones: readonly Tone[]): Tone[] {
  const byFrequency = new Map<number, { c: number; s: number }>();
  for (const { frequency, acceleration, phase } of tones) {
    const sum = byFrequency.get(frequency) ?? { c: 0, s: 0 };
    sum.c += acceleration * Math.cos(phase);
    sum.s += acceleration * Math.sin(phase);
    byFrequency.set(frequency, sum);
  }
  return [...byFrequency]
    .map(([frequency, { c, s }]) => ({ frequency, acceleration: Math.hypot(c, s), phase: Math.atan2(s, c) }))
    .sort((a, b) => a.frequency - b.frequency);
}

/**
 * The highest frequency of which all are whole multiples to 1e-10, or null where the ratio of each to it would exceed
 * `most`: then they have no common period worth the name.
 */
export function commonFrequency(frequencies: readonly number[], most: number): number | null {
  const lowest = Math.min(...frequencies);
  for (let divisor = 1; divisor <= most; divisor++) {
    const base = lowest / divisor;
    const fits = frequencies.every((f) => {
      const ratio = f / base;
      return ratio < most + 0.5 && Math.abs(ratio - Math.round(ratio)) <= 1e-10 * ratio;
    });
    if (fits) return base;
  }
  return null;
}
