import { spectralRadius } from '../kernels/eigenvalues';
import { solveInPlace } from '../kernels/linear-solve';
import type { CircuitModel } from './circuit-model';
import type { Device, Tone } from './device';
import { Motion, SUM } from './motion';

/** State of device and circuit at the start of a period. */
export interface PeriodStart {
  u: number;
  v: number;
  current: number;
  voltage: number[];
}

/** A motion that repeats every period of the tone, found by shooting. SI; powers are means over the period. */
export interface PeriodicMotion {
  start: PeriodStart;
  converged: boolean;
  /** Mismatch of the state after one period, relative to its size. */
  residual: number;
  steps: number;
  stable: boolean;
  multiplier: number;
  mean: Record<keyof typeof SUM, number>;
  stored: number;
  displacementPeak: number;
  touched: boolean;
  time: Float64Array;
  displacement: Float64Array;
  emf: Float64Array;
  loadVoltage: Float64Array;
  current: Float64Array;
}

/** A base acceleration that repeats. */
export interface PeriodicDrive {
  /** s. */
  period: number;
  /** A rate typical of the motion, rad/s. */
  omega: number;
  /** Points shown per period. */
  points: number;
  /** A size of the acceleration, m/s². */
  size: number;
  accelerationAt(t: number): number;
}

const POINTS = 256;
/** Most points shown of a common period. */
const MOST_POINTS = 4096;

/** Tones that share a frequency of which all are whole multiples. */
export function periodicDrive(tones: readonly Tone[], frequency: number): PeriodicDrive {
  const parts = tones.map((tone) => ({
    omega: 2 * Math.PI * tone.frequency,
    size: tone.acceleration,
    phase: tone.phase,
  }));
  const fastest = Math.max(...tones.map((tone) => tone.frequency));
  const strongest = tones.reduce((best, tone) => (tone.acceleration > best.acceleration ? tone : best));
  const only = parts[0]!;
  return {
    period: 1 / frequency,
    omega: 2 * Math.PI * strongest.frequency,
    points: Math.min(MOST_POINTS, POINTS * Math.round(fastest / frequency)),
    size: parts.reduce((sum, part) => sum + part.size, 0),
    accelerationAt:
      parts.length === 1
        ? (t) => only.size * Math.sin(only.omega * t + only.phase)
        : (t) => {
            let sum = 0;
            for (const { omega, size, phase } of parts) sum += size * Math.sin(omega * t + phase);
            return sum;
          },
  };
}

const MOST_ITERATIONS = 30;

/**
 * Shooting: Newton's method on the state at the start of a period so that the end equals it. The Jacobian comes from
 * differences of runs that repeat the same step lengths, so it is that of a smooth map; with stops each run locates its
 * own contacts. The coil current has forgotten its start long before the period ends and is carried over from run to
 * run. A capacitor's voltage is solved for like any state: a time constant of many periods costs nothing.
 *
 * @param tolerance error of a step relative to the motion.
 * Source: Nayfeh & Balachandran, Applied Nonlinear Dynamics (1995), sec. 6.2.
 */
export function shoot(
  device: Device,
  circuit: CircuitModel,
  drive: PeriodicDrive,
  guess: PeriodStart,
  tolerance: number,
): PeriodicMotion {
  const { omega, period, points, accelerationAt } = drive;
  const n = 2 + circuit.capacitors;
  const size = Math.max(Math.hypot(guess.u, guess.v / omega), drive.size / (omega * omega));
  const motion = new Motion(device, circuit, accelerationAt, {
    tolerance,
    period: (2 * Math.PI) / omega,
    most: 20 * points,
    smallest: 0.5 * size,
  });
  const scale = Float64Array.from({ length: n }, (_, k) => (k === 0 ? size : k === 1 ? omega * size : 1));
  for (let c = 0; c < circuit.capacitors; c++) scale[2 + c] = Math.max(Math.abs(guess.voltage[c]!), 1e-2);
  let current = guess.current;
  const z = Float64Array.of(guess.u, guess.v, ...guess.voltage);
  const place = (state: Float64Array, i: number): void => motion.place(0, state[0]!, state[1]!, i, state.subarray(2));
  const end = (out: Float64Array): void => {
    out[0] = motion.u;
    out[1] = motion.v;
    for (let c = 0; c < circuit.capacitors; c++) out[2 + c] = motion.voltage[c]!;
  };
  const run = (each?: (k: number) => void): boolean => {
    for (let k = 1; k <= points; k++) {
      each?.(k - 1);
      if (!motion.advance((period * k) / points, period / points)) return false;
    }
    return true;
  };
  const smooth = device.stops === null;
  const nudge = smooth ? 1e-6 : 1e-5;
  const residual = new Float64Array(n);
  const image = new Float64Array(n);
  const nudged = new Float64Array(n);
  const monodromy = new Float64Array(n * n);
  const matrix = new Float64Array(n * n);
  const step = new Float64Array(n);
  let plan: number[] = [];
  let mismatch = Infinity;
  let known = false;
  let fine = false;
  let steps = 0;
  for (let iteration = 0; iteration < MOST_ITERATIONS; iteration++) {
    place(z, current);
    if (fine && smooth) motion.replay(plan);
    else {
      motion.plan = plan = [];
      if (!run()) break;
      motion.plan = null;
    }
    steps = plan.length;
    end(image);
    const currentAfter = motion.current;
    let next = 0;
    for (let k = 0; k < n; k++) {
      residual[k] = image[k]! - z[k]!;
      next = Math.max(next, Math.abs(residual[k]!) / scale[k]!);
    }
    if (!Number.isFinite(next)) break;
    // the Jacobian is kept while the mismatch falls by ten each time
    if (!known || next > 0.1 * mismatch) {
      for (let k = 0; k < n; k++) {
        nudged.set(z);
        nudged[k]! += nudge * scale[k]!;
        place(nudged, current);
        if (smooth) motion.replay(plan);
        else run();
        end(step);
        for (let r = 0; r < n; r++) monodromy[r * n + k] = (step[r]! - image[r]!) / (nudge * scale[k]!);
      }
      known = true;
    }
    mismatch = next;
    for (let r = 0; r < n; r++)
      for (let c = 0; c < n; c++)
        matrix[r * n + c] = ((r === c ? 1 : 0) - monodromy[r * n + c]!) * (scale[c]! / scale[r]!);
    for (let r = 0; r < n; r++) step[r] = residual[r]! / scale[r]!;
    if (solveInPlace(matrix, step, n) === 0) break;
    let length = 0;
    for (let k = 0; k < n; k++) length = Math.max(length, Math.abs(step[k]!));
    const shorten = length > 3 ? 3 / length : 1;
    for (let k = 0; k < n; k++) z[k]! += shorten * step[k]! * scale[k]!;
    current = currentAfter;
    const grown = Math.max(Math.hypot(z[0]!, z[1]! / omega), 1e-12);
    scale[0] = grown;
    scale[1] = omega * grown;
    for (let c = 0; c < circuit.capacitors; c++) scale[2 + c] = Math.max(Math.abs(z[2 + c]!), 1e-2);
    if (length < 1e-3) fine = true;
    if (length < (smooth ? 1e-10 : 1e-8)) break;
  }
  place(z, current);
  const before = motion.energy();
  const series = (): Float64Array => new Float64Array(points);
  const [displacement, emf, loadVoltage, coil] = [series(), series(), series(), series()];
  const finite = run((k) => {
    displacement[k] = motion.u;
    emf[k] = motion.emf;
    loadVoltage[k] = motion.loadVoltage;
    coil[k] = motion.current;
  });
  end(image);
  let worst = 0;
  for (let k = 0; k < n; k++) worst = Math.max(worst, Math.abs(image[k]! - z[k]!) / scale[k]!);
  const multiplier = known ? spectralRadius(monodromy, n) : Infinity;
  const mean = Object.fromEntries(
    Object.entries(SUM).map(([key, place_]) => [key, motion.sums[place_]! / period]),
  ) as PeriodicMotion['mean'];
  return {
    start: { u: z[0]!, v: z[1]!, current, voltage: [...z.subarray(2)] },
    converged: finite && worst < 1e-6,
    residual: worst,
    steps,
    stable: multiplier < 1,
    multiplier,
    mean,
    stored: (motion.energy() - before) / period,
    displacementPeak: motion.peak,
    touched: motion.touched,
    time: Float64Array.from({ length: points }, (_, k) => (period * k) / points),
    displacement,
    emf,
    loadVoltage,
    current: coil,
  };
}
