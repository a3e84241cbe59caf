import { followCurve } from '../kernels/continuation';
import { describedStarts } from '../kernels/describing-function';
import { largestMultiplier } from '../kernels/floquet';
import { HarmonicBalance } from '../kernels/harmonic-balance';
import type { PortOscillator } from '../kernels/harmonic-balance';
import { findOrbit, orbitWith } from '../kernels/periodic-orbit';
import type { PeriodicOrbit } from '../kernels/periodic-orbit';
import { uniformRandom } from '../kernels/random';

/** A steady response of period one with its stability. */
export interface SteadyOrbit extends PeriodicOrbit {
  /** Largest Floquet multiplier's modulus is below 1. */
  stable: boolean;
}

/** Harmonics while a curve is being followed; the orbits found are refined afterwards. */
const TRACED = 8;
const RANDOM_STARTS = 16;

/** Coefficients (0, cos, sin) of the drive m a(t) for a = A sin(ωt + phase), N. */
export function driveOf(mass: number, acceleration: number, phase: number): Float64Array {
  return Float64Array.of(0, mass * acceleration * Math.sin(phase), mass * acceleration * Math.cos(phase));
}

/** Coefficients of the response linearised about u with stiffness k, without the port's reactance. */
function linearStart(oscillator: PortOscillator, omega: number, drive: Float64Array, u: number): Float64Array {
  const theta = oscillator.coupling(u);
  const resistive =
    oscillator.damping + (Number.isFinite(oscillator.resistance) ? (theta * theta) / oscillator.resistance : 0);
  const harmonics = (drive.length - 1) / 2;
  const out = new Float64Array(drive.length);
  out[0] = u;
  for (let h = 1; h <= harmonics; h++) {
    const rate = h * omega;
    const spring = oscillator.restoringSlope(u) - oscillator.mass * rate * rate;
    const damper = rate * resistive;
    const scale = 1 / (spring * spring + damper * damper || 1e-300);
    const [c, s] = [drive[2 * h - 1]!, drive[2 * h]!];
    // (spring + jωc)(uc − j us) = −(c − j s)
    out[2 * h - 1] = -scale * (spring * c - damper * s);
    out[2 * h] = -scale * (damper * c + spring * s);
  }
  return out;
}

/** The one steady orbit of an oscillator that is known to have no other, from its linear response. */
export function onlyOrbit(oscillator: PortOscillator, omega: number, drive: Float64Array): SteadyOrbit {
  const orbit = findOrbit(oscillator, omega, drive, linearStart(oscillator, omega, drive, 0));
  return { ...orbit, stable: orbit.converged && largestMultiplier(oscillator, orbit.displacement, omega) < 1 };
}

/**
 * Every steady orbit of period one that can be reached: along the amplitude of the drive from each equilibrium, from each
 * sinusoid that balances the drive, along the frequency at full drive from each orbit so found, and from random starts
 * (seeded) for those on curves of their own.
 *
 * @returns orbits by size of their motion, ascending; distinct to 1e-6 of the largest.
 */
export function everyOrbit(
  oscillator: PortOscillator,
  omega: number,
  drive: Float64Array,
  equilibria: readonly number[],
): SteadyOrbit[] {
  const found: Float64Array[] = [];
  /** Orbits that a curve in frequency has passed: the same curve need not be followed again from them. */
  const passed = new Set<Float64Array>();
  const keep = (start: Float64Array): Float64Array | null => {
    const orbit = orbitWith(oscillator, TRACED, omega, drive, start);
    if (!orbit) return null;
    const known = sameAs(orbit, found);
    if (!known) found.push(orbit);
    return known ?? orbit;
  };
  const force = Math.hypot(...drive);
  const reach = force / (oscillator.damping * omega + 0.05 * oscillator.mass * omega * omega);
  const balance = new HarmonicBalance(oscillator, TRACED);
  const scaledDrive = new Float64Array(drive.length);
  for (const u of equilibria) {
    const start = new Float64Array(balance.size);
    start[0] = u;
    const system = {
      size: balance.size,
      residualInto: (x: Float64Array, share: number, out: Float64Array): void => {
        for (let k = 0; k < drive.length; k++) scaledDrive[k] = share * drive[k]!;
        balance.residualInto(x, omega, scaledDrive, out);
      },
      jacobianInto: (out: Float64Array): void => balance.jacobianInto(omega, out),
      parameterSlopeInto: (out: Float64Array): void => {
        out.fill(0);
        out.set(drive.subarray(0, Math.min(drive.length, out.length)));
      },
    };
    const options = {
      scale: reach,
      parameterScale: 1,
      residualScale: force,
      firstStep: 0.02,
      largestStep: 0.25,
      most: 300,
    };
    collect(system, start, 0, 1, { ...options, direction: 1 }, (share) => share > -0.01 && share < 3, keep);
  }
  if (drive.length === 3) {
    const [low, high] = [Math.min(...equilibria), Math.max(...equilibria)];
    const margin = Math.max(high - low, reach);
    for (const start of describedStarts(oscillator, omega, drive, [low - margin, high + margin])) keep(start);
  }
  if (found.length === 0) keep(linearStart(oscillator, omega, drive, 0));
  for (const orbit of found) {
    if (passed.has(orbit)) continue;
    const pass = (start: Float64Array): void => {
      const at = keep(start);
      if (at) passed.add(at);
    };
    let atOmega = omega;
    const system = {
      size: balance.size,
      residualInto: (x: Float64Array, rate: number, out: Float64Array): void => {
        atOmega = rate;
        balance.residualInto(x, rate, drive, out);
      },
      jacobianInto: (out: Float64Array): void => balance.jacobianInto(atOmega, out),
      parameterSlopeInto: (out: Float64Array): void => slopeInFrequency(balance, atOmega, drive, out),
    };
    const start = orbit;
    const scale = Math.max(spread(orbit), 0.1 * reach);
    const options = {
      scale,
      parameterScale: 0.02 * omega,
      residualScale: force,
      firstStep: 0.05,
      largestStep: 1,
      most: 250,
    };
    const within = (rate: number): boolean => rate > 0.4 * omega && rate < 2.5 * omega;
    collect(system, start, omega, omega, { ...options, direction: 1 }, within, pass);
    collect(system, start, omega, omega, { ...options, direction: -1 }, within, pass);
  }
  const random = uniformRandom(1);
  const largest = Math.max(reach, ...found.map(spread));
  for (let n = 0; n < RANDOM_STARTS; n++) {
    const start = new Float64Array(2 * TRACED + 1);
    const size = largest * 3 ** (2 * random() - 1);
    const phase = 2 * Math.PI * random();
    start[0] = equilibria[Math.floor(random() * equilibria.length)]! + 0.3 * size * (2 * random() - 1);
    start[1] = size * Math.cos(phase);
    start[2] = size * Math.sin(phase);
    keep(start);
  }
  const refined: SteadyOrbit[] = [];
  for (const start of found) {
    const orbit = findOrbit(oscillator, omega, drive, start);
    const others = refined.map((other) => other.displacement);
    if (!orbit.converged || sameAs(orbit.displacement, others)) continue;
    refined.push({ ...orbit, stable: largestMultiplier(oscillator, orbit.displacement, omega) < 1 });
  }
  return refined.sort((a, b) => peak(a.displacement) - peak(b.displacement));
}

type Curve = Parameters<typeof followCurve>[0];
type Options = Parameters<typeof followCurve>[3];

/** Follows a curve and hands on, interpolated, each place where it passes the target. */
function collect(
  system: Curve,
  start: Float64Array,
  parameter: number,
  target: number,
  options: Options,
  within: (parameter: number) => boolean,
  keep: (x: Float64Array) => unknown,
): void {
  let before: Float64Array | null = null;
  let from = parameter;
  followCurve(system, start, parameter, options, (x, value) => {
    if (before && (from - target) * (value - target) <= 0 && from !== value && from !== target) {
      const share = (target - from) / (value - from);
      const previous = before;
      keep(x.map((at, k) => previous[k]! + share * (at - previous[k]!)));
    }
    before = Float64Array.from(x);
    from = value;
    return within(value);
  });
}

/** dR/dω by central difference: the balance is a low polynomial in ω, so the step may be large. */
function slopeInFrequency(balance: HarmonicBalance, omega: number, drive: Float64Array, out: Float64Array): void {
  const x = balance.lastPoint;
  const step = 1e-5 * omega;
  const below = new Float64Array(balance.size);
  const at = Float64Array.from(x);
  balance.residualInto(at, omega - step, drive, below);
  balance.residualInto(at, omega + step, drive, out);
  for (let k = 0; k < out.length; k++) out[k] = (out[k]! - below[k]!) / (2 * step);
}

/** Size of the motion in a coefficient vector. */
function spread(coefficients: Float64Array): number {
  let sum = 0;
  for (let k = 1; k < coefficients.length; k++) sum += coefficients[k]! * coefficients[k]!;
  return Math.sqrt(sum);
}

function peak(coefficients: Float64Array): number {
  let largest = 0;
  for (let n = 0; n < 64; n++) {
    let value = coefficients[0]!;
    for (let k = 1; k + 1 < coefficients.length; k += 2) {
      const angle = (((k + 1) / 2) * 2 * Math.PI * n) / 64;
      value += coefficients[k]! * Math.cos(angle) + coefficients[k + 1]! * Math.sin(angle);
    }
    largest = Math.max(largest, Math.abs(value));
  }
  return largest;
}

/** The one among the others that is the same orbit to 1e-6 of the largest. */
function sameAs(orbit: Float64Array, others: Float64Array[]): Float64Array | undefined {
  const size = Math.max(spread(orbit), ...others.map(spread));
  return others.find((other) => gap(orbit, other) < 1e-6 * size);
}

function gap(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let k = 0; k < Math.max(a.length, b.length); k++) sum += ((a[k] ?? 0) - (b[k] ?? 0)) ** 2;
  return Math.sqrt(sum);
}
