import { HarmonicBalance } from './harmonic-balance';
import type { PortOscillator } from './harmonic-balance';
import { solveByNewton } from './newton';
import type { NewtonResult } from './newton';

/** A periodic solution of a port oscillator as harmonic balance found it. */
export interface PeriodicOrbit {
  omega: number;
  harmonics: number;
  /** Coefficients (mean, cos 1, sin 1, …) of u, m. */
  displacement: Float64Array;
  converged: boolean;
  /** Residual of the balance over the drive. */
  residual: number;
  /** Size of the last harmonics of the EMF over the whole: what truncation leaves out. */
  tail: number;
  iterations: number;
}

const STEPS = [8, 16, 32, 64, 128];
const TAIL = 3e-9;

function energy(values: Float64Array, from: number): number {
  let sum = 0;
  for (let k = from; k < values.length; k++) sum += values[k]! * values[k]!;
  return sum;
}

/** Share of the last quarter of the harmonics in motion and EMF, as a ratio of rms values. */
function tailOf(balance: HarmonicBalance, x: Float64Array): number {
  const from = 2 * Math.floor(0.75 * balance.harmonics) + 1;
  const emf = new Float64Array(balance.size);
  for (let n = 0; n < balance.table.samples; n++)
    for (let k = 0; k < balance.size; k++) emf[k]! += balance.emf[n]! * balance.table.basis[n * balance.size + k]!;
  const share = (values: Float64Array): number => {
    const all = energy(values, 1);
    return all > 0 ? Math.sqrt(energy(values, from) / all) : 0;
  };
  return Math.max(share(x), share(emf));
}

/** One Newton solution with a fixed number of harmonics; null where there is none near the start. */
export function orbitWith(
  oscillator: PortOscillator,
  harmonics: number,
  omega: number,
  drive: Float64Array,
  start: Float64Array,
): Float64Array | null {
  const balance = new HarmonicBalance(oscillator, harmonics);
  const result = newtonOn(balance, omega, drive, withHarmonics(start, harmonics));
  return result.converged ? result.x : null;
}

function newtonOn(balance: HarmonicBalance, omega: number, drive: Float64Array, start: Float64Array): NewtonResult {
  return solveByNewton(
    {
      size: balance.size,
      residualInto: (at, out) => balance.residualInto(at, omega, drive, out),
      jacobianInto: (out) => balance.jacobianInto(omega, out),
    },
    start,
    Math.sqrt(energy(drive, 0)),
  );
}

/** Pads or cuts a coefficient vector to a number of harmonics. */
export function withHarmonics(coefficients: Float64Array, harmonics: number): Float64Array {
  const out = new Float64Array(2 * harmonics + 1);
  out.set(coefficients.subarray(0, Math.min(coefficients.length, out.length)));
  return out;
}

/**
 * Periodic orbit near a start, with harmonics doubled until the last quarter of them is below 3e-9 of the whole.
 *
 * @param drive coefficients of the drive force p(t), N; @param omega rad/s; @param start coefficients of u, m.
 * @returns the orbit; `converged` false where Newton fails or 128 harmonics leave a tail above 1e-6.
 */
export function findOrbit(
  oscillator: PortOscillator,
  omega: number,
  drive: Float64Array,
  start: Float64Array,
): PeriodicOrbit {
  const lowest = (drive.length - 1) / 2;
  let x: Float64Array = start;
  let orbit: PeriodicOrbit | null = null;
  let iterations = 0;
  for (const harmonics of STEPS) {
    if (harmonics < 2 * lowest && harmonics < 128) continue;
    const balance = new HarmonicBalance(oscillator, harmonics);
    const result = newtonOn(balance, omega, drive, withHarmonics(x, harmonics));
    iterations += result.iterations;
    if (!result.converged) {
      const failed = { omega, harmonics, displacement: result.x, converged: false, residual: result.residual };
      return orbit ?? { ...failed, tail: 1, iterations };
    }
    x = result.x;
    const tail = tailOf(balance, x);
    orbit = { omega, harmonics, displacement: x, converged: tail < 1e-6, residual: result.residual, tail, iterations };
    if (tail < TAIL) break;
  }
  return orbit!;
}
