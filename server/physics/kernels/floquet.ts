import { differentiateInto, fourierTable, synthesiseInto } from './fourier-table';
import { admitInto } from './harmonic-balance';
import type { PortOscillator } from './harmonic-balance';
import { solveInPlace } from './linear-solve';

/** Largest modulus among the roots of μ² − trace μ + det. */
function largestOfTwo(trace: number, det: number): number {
  const half = 0.5 * trace;
  const disc = half * half - det;
  return disc < 0 ? Math.sqrt(det) : Math.abs(half) + Math.sqrt(disc);
}

/** Largest modulus among the eigenvalues of a 2 × 2 or 3 × 3 matrix (row-major). */
export function largestEigenvalueModulus(matrix: Float64Array, n: number): number {
  const at = (r: number, c: number): number => matrix[r * n + c]!;
  if (n === 1) return Math.abs(at(0, 0));
  if (n === 2) return largestOfTwo(at(0, 0) + at(1, 1), at(0, 0) * at(1, 1) - at(0, 1) * at(1, 0));
  if (n !== 3) throw new RangeError(`matrix must have 1 to 3 rows, got ${n}`);
  const trace = at(0, 0) + at(1, 1) + at(2, 2);
  const minors =
    at(0, 0) * at(1, 1) -
    at(0, 1) * at(1, 0) +
    at(0, 0) * at(2, 2) -
    at(0, 2) * at(2, 0) +
    at(1, 1) * at(2, 2) -
    at(1, 2) * at(2, 1);
  const det =
    at(0, 0) * (at(1, 1) * at(2, 2) - at(1, 2) * at(2, 1)) -
    at(0, 1) * (at(1, 0) * at(2, 2) - at(1, 2) * at(2, 0)) +
    at(0, 2) * (at(1, 0) * at(2, 1) - at(1, 1) * at(2, 0));
  const polynomial = (x: number): number => ((x - trace) * x + minors) * x - det;
  // a cubic has a real root; Cauchy's bound encloses it
  let low = -1 - Math.max(Math.abs(trace), Math.abs(minors), Math.abs(det));
  let high = -low;
  for (let n2 = 0; n2 < 200 && high - low > 1e-15 * Math.max(1, Math.abs(low)); n2++) {
    const middle = 0.5 * (low + high);
    if (polynomial(middle) > 0) high = middle;
    else low = middle;
  }
  const root = 0.5 * (low + high);
  const restTrace = trace - root;
  return Math.max(Math.abs(root), largestOfTwo(restTrace, minors - root * restTrace));
}

/**
 * Largest modulus of the Floquet multipliers of a periodic orbit of a port oscillator: below 1 it is stable.
 * The variational equations are stepped once round by the trapezoidal rule (A-stable, second order).
 *
 * @param coefficients of u (mean, cos 1, sin 1, …); @param omega fundamental, rad/s.
 * Source: Nayfeh & Balachandran, Applied Nonlinear Dynamics (1995), sec. 3.2.
 */
export function largestMultiplier(oscillator: PortOscillator, coefficients: Float64Array, omega: number): number {
  const harmonics = (coefficients.length - 1) / 2;
  const samples = Math.max(256, 8 * harmonics);
  const table = fourierTable(harmonics, samples);
  const step = (2 * Math.PI) / (omega * samples);
  const { mass, damping, drag, resistance, inductance } = oscillator;
  const open = !Number.isFinite(resistance);
  // a current that settles within a fiftieth of a step follows the EMF at once
  const inductive = !open && inductance > 0 && (resistance * step) / inductance < 50;
  const n = inductive ? 3 : 2;
  const u = new Float64Array(samples);
  const v = new Float64Array(samples);
  const current = new Float64Array(samples);
  const velocity = new Float64Array(coefficients.length);
  differentiateInto(coefficients, omega, velocity);
  synthesiseInto(table, coefficients, u);
  synthesiseInto(table, velocity, v);
  if (inductive) {
    const emf = new Float64Array(samples);
    for (let s = 0; s < samples; s++) emf[s] = oscillator.coupling(u[s]!) * v[s]!;
    const wide = new Float64Array(coefficients.length);
    for (let s = 0; s < samples; s++)
      for (let k = 0; k < wide.length; k++)
        wide[k]! += ((k === 0 ? 1 : 2) / samples) * emf[s]! * table.basis[s * wide.length + k]!;
    const admitted = new Float64Array(wide.length);
    admitInto(wide, omega, resistance, inductance, admitted);
    synthesiseInto(table, admitted, current);
  }
  const fill = (s: number, out: Float64Array): void => {
    const theta = oscillator.coupling(u[s]!);
    const slope = oscillator.couplingSlope(u[s]!);
    const resistive = damping + 2 * drag * Math.abs(v[s]!);
    const stiffness = oscillator.restoringSlope(u[s]!);
    out.fill(0);
    out[1] = 1;
    if (inductive) {
      out[3] = -(stiffness + slope * current[s]!) / mass;
      out[4] = -resistive / mass;
      out[5] = -theta / mass;
      out[6] = (slope * v[s]!) / inductance;
      out[7] = theta / inductance;
      out[8] = -resistance / inductance;
    } else {
      const conductance = open ? 0 : 1 / resistance;
      out[2] = -(stiffness + 2 * conductance * theta * slope * v[s]!) / mass;
      out[3] = -(resistive + conductance * theta * theta) / mass;
    }
  };
  const rates = new Float64Array(n * n);
  const matrix = new Float64Array(n * n);
  const copy = new Float64Array(n * n);
  const column = new Float64Array(n);
  const monodromy = new Float64Array(n * n);
  for (let k = 0; k < n; k++) monodromy[k * n + k] = 1;
  fill(0, rates);
  const half = 0.5 * step;
  const right = new Float64Array(n * n);
  for (let s = 1; s <= samples; s++) {
    for (let r = 0; r < n; r++)
      for (let c = 0; c < n; c++) {
        let sum = monodromy[r * n + c]!;
        for (let k = 0; k < n; k++) sum += half * rates[r * n + k]! * monodromy[k * n + c]!;
        right[r * n + c] = sum;
      }
    fill(s % samples, rates);
    for (let k = 0; k < n * n; k++) matrix[k] = -half * rates[k]!;
    for (let k = 0; k < n; k++) matrix[k * n + k]! += 1;
    for (let c = 0; c < n; c++) {
      copy.set(matrix);
      for (let r = 0; r < n; r++) column[r] = right[r * n + c]!;
      solveInPlace(copy, column, n);
      for (let r = 0; r < n; r++) monodromy[r * n + c] = column[r]!;
    }
  }
  return largestEigenvalueModulus(monodromy, n);
}
