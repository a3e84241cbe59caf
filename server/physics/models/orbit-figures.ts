import { admitInto } from '../kernels/harmonic-balance';
import { analyseInto, differentiateInto, fourierTable, synthesiseInto } from '../kernels/fourier-table';
import type { PeriodicOrbit } from '../kernels/periodic-orbit';
import type { Device } from './device';

/** What a periodic motion of the device into a resistance amounts to. SI; means over the period. */
export interface OrbitFigures {
  /** Both from the rest position, the mean included, m. */
  displacementPeak: number;
  displacementRms: number;
  emfRms: number;
  emfPeak: number;
  currentRms: number;
  load: number;
  coil: number;
  mechanicalLoss: number;
  /** rms of the EMF's harmonics above the first over its first; null where the first vanishes. */
  harmonicDistortion: number | null;
  /** Samples over one period, from t = 0. */
  time: Float64Array;
  displacement: Float64Array;
  emf: Float64Array;
  current: Float64Array;
}

/** Points of a shown period. */
const POINTS = 256;

/** Largest |value| of evenly spaced samples of a periodic function, refined by the parabola through its neighbours. */
export function refinedPeak(values: Float64Array): number {
  const n = values.length;
  let best = 0;
  for (let k = 0; k < n; k++) if (Math.abs(values[k]!) > Math.abs(values[best]!)) best = k;
  const before = values[(best + n - 1) % n]!;
  const at = values[best]!;
  const after = values[(best + 1) % n]!;
  const bend = before - 2 * at + after;
  if (bend === 0) return Math.abs(at);
  const slope = 0.5 * (after - before);
  return Math.abs(at - (0.5 * slope * slope) / bend);
}

const meanSquare = (values: Float64Array): number => {
  let sum = 0;
  for (let k = 0; k < values.length; k++) sum += values[k]! * values[k]!;
  return sum / values.length;
};

/** rms from coefficients (mean, cos 1, sin 1, …), the mean left out. */
export function rmsOfHarmonics(coefficients: Float64Array, fromHarmonic = 1): number {
  let sum = 0;
  for (let k = 2 * fromHarmonic - 1; k < coefficients.length; k++) sum += coefficients[k]! * coefficients[k]!;
  return Math.sqrt(0.5 * sum);
}

/**
 * Powers, rms and peaks of an orbit of the device into a resistance (Ω; Infinity for open). EMF and current are
 * resolved on at least 256 points and eight per harmonic; peaks are refined between them.
 */
export function figuresOf(
  device: Device,
  orbit: Pick<PeriodicOrbit, 'omega' | 'displacement'>,
  resistance: number,
): OrbitFigures {
  const { omega } = orbit;
  const harmonics = (orbit.displacement.length - 1) / 2;
  const factor = Math.max(4, Math.ceil((8 * harmonics) / POINTS));
  const samples = POINTS * factor;
  const kept = Math.max(16, 2 * harmonics);
  const table = fourierTable(kept, samples);
  const velocityCoefficients = new Float64Array(orbit.displacement.length);
  differentiateInto(orbit.displacement, omega, velocityCoefficients);
  const u = new Float64Array(samples);
  const v = new Float64Array(samples);
  const emf = new Float64Array(samples);
  const current = new Float64Array(samples);
  synthesiseInto(table, orbit.displacement, u);
  synthesiseInto(table, velocityCoefficients, v);
  let loss = 0;
  for (let n = 0; n < samples; n++) {
    const speed = v[n]!;
    emf[n] = device.coupling.at(device.restPosition + u[n]!) * speed;
    loss += (device.damping + device.quadraticDrag * Math.abs(speed)) * speed * speed;
  }
  const emfCoefficients = new Float64Array(2 * kept + 1);
  analyseInto(table, emf, emfCoefficients);
  const total = device.coilResistance + resistance;
  if (Number.isFinite(total)) {
    if (device.coilInductance > 0) {
      const admitted = new Float64Array(emfCoefficients.length);
      admitInto(emfCoefficients, omega, total, device.coilInductance, admitted);
      synthesiseInto(table, admitted, current);
    } else for (let n = 0; n < samples; n++) current[n] = emf[n]! / total;
  }
  const current2 = meanSquare(current);
  const first = Math.hypot(emfCoefficients[1]!, emfCoefficients[2]!) / Math.SQRT2;
  const emfRms = Math.sqrt(meanSquare(emf));
  const every = (values: Float64Array): Float64Array =>
    Float64Array.from({ length: POINTS }, (_, n) => values[n * factor]!);
  return {
    displacementPeak: refinedPeak(u),
    displacementRms: Math.hypot(orbit.displacement[0]!, rmsOfHarmonics(orbit.displacement)),
    emfRms,
    emfPeak: refinedPeak(emf),
    currentRms: Math.sqrt(current2),
    load: Number.isFinite(resistance) ? resistance * current2 : 0,
    coil: device.coilResistance * current2,
    mechanicalLoss: loss / samples,
    harmonicDistortion: first > 1e-6 * emfRms ? rmsOfHarmonics(emfCoefficients, 2) / first : null,
    time: Float64Array.from({ length: POINTS }, (_, n) => (2 * Math.PI * n) / (omega * POINTS)),
    displacement: every(u),
    emf: every(emf),
    current: every(current),
  };
}
