import { innerPeak, innerTurn } from '../kernels/hermite-extremum';
import { exponentialStep } from '../kernels/matrix-exponential';
import type { LinearDevice } from './linear-response';

/** What a record did to a linear device that started at rest; means over the record. SI. */
export interface LinearRecord {
  duration: number;
  mechanicalIn: number;
  mechanicalLoss: number;
  current2: number;
  emf2: number;
  displacement2: number;
  displacementPeak: number;
  emfPeak: number;
  /** Energy in spring, mass and coil at the end, over the duration, W. */
  stored: number;
  displacement: Float64Array;
  velocity: Float64Array;
  current: Float64Array;
}

const SHOWN = 4096;

/**
 * Runs a linear device from rest through a sampled acceleration, straight lines between the samples. Each sample is one
 * exact step (matrix exponential of the ramp), powers and mean squares are exact integrals over it; peaks between the
 * samples come from the quintic through displacement, velocity and acceleration at both ends.
 *
 * @param acceleration m/s², at least two samples; @param rate Hz.
 * @throws RangeError where there are fewer than two samples or the rate is not above 0.
 */
export function runLinearRecord(device: LinearDevice, acceleration: Float64Array, rate: number): LinearRecord {
  const samples = acceleration.length;
  if (samples < 2) throw new RangeError(`acceleration must hold at least 2 samples, got ${samples}`);
  if (!(rate > 0)) throw new RangeError(`rate must be above 0, got ${rate} Hz`);
  const { mass, damping, stiffness, coupling, coilResistance, coilInductance: inductance, resistance } = device;
  const total = coilResistance + resistance;
  const open = !Number.isFinite(total);
  const inductive = !open && inductance > 0;
  const conductance = open || inductive ? 0 : 1 / total;
  // state (ωu, v, i) keeps the matrix balanced; then the ramp: a and its change over the step
  const n = inductive ? 5 : 4;
  const [A, D] = [n - 2, n - 1];
  const omega = Math.sqrt(Math.abs(stiffness) / mass) || 1;
  const currentScale = inductive ? Math.sqrt(mass / inductance) : 1;
  const matrix = new Float64Array(n * n);
  matrix[1] = omega;
  matrix[n] = -stiffness / (mass * omega);
  matrix[n + 1] = -(damping + conductance * coupling * coupling) / mass;
  matrix[n + A] = -1;
  if (inductive) {
    matrix[n + 2] = (-coupling / mass) * currentScale;
    matrix[2 * n + 1] = coupling / inductance / currentScale;
    matrix[2 * n + 2] = -total / inductance;
  }
  matrix[A * n + D] = rate;
  const form = (r: number, c: number): Float64Array => {
    const out = new Float64Array(n * n);
    out[r * n + c]! += 0.5;
    out[c * n + r]! += 0.5;
    return out;
  };
  const forms = [form(0, 0), form(1, 1), form(1, A)];
  if (inductive) forms.push(form(2, 2));
  const { step, integrals } = exponentialStep(matrix, n, 1 / rate, forms);
  const state = new Float64Array(n);
  const next = new Float64Array(n);
  const sums = new Float64Array(forms.length);
  const every = Math.max(1, Math.ceil(samples / SHOWN));
  const shown = Math.ceil(samples / every);
  const kept = { u: new Float64Array(shown), v: new Float64Array(shown), i: new Float64Array(shown) };
  let displacementPeak = 0;
  let velocityPeak = 0;
  const h = 1 / rate;
  const keep = (sample: number): void => {
    if (sample % every !== 0) return;
    kept.u[sample / every] = state[0]! / omega;
    kept.v[sample / every] = state[1]!;
    kept.i[sample / every] = inductive ? state[2]! * currentScale : conductance * coupling * state[1]!;
  };
  const accelerationAt = (a: number): number =>
    -(stiffness / (mass * omega)) * state[0]! +
    matrix[n + 1]! * state[1]! +
    (inductive ? matrix[n + 2]! * state[2]! : 0) -
    a;
  keep(0);
  for (let sample = 1; sample < samples; sample++) {
    const a0 = acceleration[sample - 1]!;
    const a1 = acceleration[sample]!;
    state[A] = a0;
    state[D] = a1 - a0;
    for (let f = 0; f < integrals.length; f++) {
      const integral = integrals[f]!;
      let sum = 0;
      for (let r = 0; r < n; r++) {
        let inner = 0.5 * integral[r * n + r]! * state[r]!;
        for (let c = r + 1; c < n; c++) inner += integral[r * n + c]! * state[c]!;
        sum += state[r]! * inner;
      }
      sums[f]! += 2 * sum;
    }
    const u0 = state[0]! / omega;
    const v0 = state[1]!;
    const acc0 = accelerationAt(a0);
    for (let r = 0; r < n; r++) {
      let sum = 0;
      for (let c = 0; c < n; c++) sum += step[r * n + c]! * state[c]!;
      next[r] = sum;
    }
    state.set(next);
    const v1 = state[1]!;
    const acc1 = accelerationAt(a1);
    displacementPeak = Math.max(displacementPeak, Math.abs(state[0]! / omega));
    velocityPeak = Math.max(velocityPeak, Math.abs(v1));
    if (v0 * v1 < 0)
      displacementPeak = Math.max(displacementPeak, Math.abs(innerTurn(h, u0, v0, acc0, state[0]! / omega, v1, acc1)));
    if (acc0 * acc1 < 0) velocityPeak = Math.max(velocityPeak, innerPeak(h, v0, acc0, v1, acc1));
    keep(sample);
  }
  const duration = (samples - 1) / rate;
  const mean = (f: number): number => sums[f]! / duration;
  const u = state[0]! / omega;
  const v = state[1]!;
  const i = inductive ? state[2]! * currentScale : 0;
  return {
    duration,
    mechanicalIn: -mass * mean(2),
    mechanicalLoss: damping * mean(1),
    current2: inductive
      ? currentScale * currentScale * mean(3)
      : conductance * conductance * coupling * coupling * mean(1),
    emf2: coupling * coupling * mean(1),
    displacement2: mean(0) / (omega * omega),
    displacementPeak,
    emfPeak: Math.abs(coupling) * velocityPeak,
    stored: (0.5 * mass * v * v + 0.5 * stiffness * u * u + 0.5 * inductance * i * i) / duration,
    displacement: kept.u,
    velocity: kept.v,
    current: kept.i,
  };
}
