import type { PortOscillator } from './harmonic-balance';

const POINTS = 32;
const AMPLITUDES = 96;
const OFFSETS = 48;

/** One sinusoid about an offset: u = offset + amplitude · cos(ωt + …). */
interface Sinusoid {
  offset: number;
  amplitude: number;
}

/**
 * Starts for harmonic balance from one harmonic and a mean: every amplitude at which a sinusoid balances the drive,
 * m ü + … = −F cos, with restoring force and damping replaced by their describing functions, the mean force being zero.
 * Amplitudes run up to F/(cω), which no sinusoidal motion can exceed.
 *
 * @param drive coefficients (0, cos, sin) of the drive p(t), N; @param omega rad/s.
 * @param range displacements between which offsets are looked for, m.
 * @returns coefficients (mean, cos, sin) of u.
 * Source: Nayfeh & Mook, Nonlinear Oscillations (1979), sec. 2.3 (method of harmonic balance).
 */
export function describedStarts(
  oscillator: PortOscillator,
  omega: number,
  drive: Float64Array,
  range: readonly [number, number],
): Float64Array[] {
  const force = Math.hypot(drive[1]!, drive[2]!);
  const largest = force / (oscillator.damping * omega);
  const smallest = force / (oscillator.mass * omega * omega) / 1e3;
  if (!(largest > smallest) || !Number.isFinite(largest)) return [];
  const width = range[1] - range[0];
  const meanForce = ({ offset, amplitude }: Sinusoid): number => {
    let sum = 0;
    for (let n = 0; n < POINTS; n++)
      sum += oscillator.restoring(offset + amplitude * Math.cos((2 * Math.PI * (n + 0.5)) / POINTS));
    return sum / POINTS;
  };
  /** Reactive and resistive parts of the impedance force per amplitude at a sinusoid. */
  const partsOf = ({ offset, amplitude }: Sinusoid): { spring: number; damper: number } => {
    let spring = 0;
    let taken = 0;
    for (let n = 0; n < POINTS; n++) {
      const angle = (2 * Math.PI * (n + 0.5)) / POINTS;
      const u = offset + amplitude * Math.cos(angle);
      const v = -omega * amplitude * Math.sin(angle);
      const theta = oscillator.coupling(u);
      const port = Number.isFinite(oscillator.resistance) ? (theta * theta) / oscillator.resistance : 0;
      spring += (2 * oscillator.restoring(u) * Math.cos(angle)) / (POINTS * amplitude);
      taken += (2 * (port + oscillator.drag * Math.abs(v)) * Math.sin(angle) ** 2) / POINTS;
    }
    return { spring: spring - oscillator.mass * omega * omega, damper: omega * (oscillator.damping + taken) };
  };
  const excess = (at: Sinusoid): number => {
    const { spring, damper } = partsOf(at);
    return Math.hypot(spring, damper) * at.amplitude - force;
  };
  /** Offsets of zero mean force at an amplitude, ascending. */
  const offsetsAt = (amplitude: number): number[] => {
    const offsets: number[] = [];
    let before = meanForce({ offset: range[0], amplitude });
    for (let n = 1; n <= OFFSETS; n++) {
      const to = range[0] + (width * n) / OFFSETS;
      const after = meanForce({ offset: to, amplitude });
      if (before * after <= 0 && after !== 0) {
        let [low, high] = [to - width / OFFSETS, to];
        for (let k = 0; k < 30; k++) {
          const middle = 0.5 * (low + high);
          if (meanForce({ offset: middle, amplitude }) * before > 0) low = middle;
          else high = middle;
        }
        offsets.push(0.5 * (low + high));
      }
      before = after;
    }
    return offsets;
  };
  const starts: Float64Array[] = [];
  const push = (at: Sinusoid): void => {
    const { spring, damper } = partsOf(at);
    // U (spring + j damper) = −P with P = cos − j sin
    const scale = 1 / (spring * spring + damper * damper || 1e-300);
    const [c, s] = [drive[1]!, drive[2]!];
    starts.push(Float64Array.of(at.offset, -scale * (spring * c - damper * s), -scale * (damper * c + spring * s)));
  };
  /** The offset of zero mean force at another amplitude, near one that is known: a few secant steps. */
  const offsetNear = (amplitude: number, guess: number): number => {
    let [x0, x1] = [guess, guess + 1e-3 * amplitude];
    let [f0, f1] = [meanForce({ offset: x0, amplitude }), meanForce({ offset: x1, amplitude })];
    for (let n = 0; n < 8 && f1 !== f0; n++) {
      const next = x1 - (f1 * (x1 - x0)) / (f1 - f0);
      if (!Number.isFinite(next) || Math.abs(next - guess) > amplitude) break;
      [x0, f0] = [x1, f1];
      x1 = next;
      f1 = meanForce({ offset: x1, amplitude });
    }
    return x1;
  };
  /** Bisects for a change of sign of a quantity between two sinusoids of one family. */
  const between = (from: Sinusoid, to: Sinusoid, of: (at: Sinusoid) => number): Sinusoid => {
    let [low, high] = [from, to];
    const sign = of(low);
    for (let n = 0; n < 24; n++) {
      const amplitude = 0.5 * (low.amplitude + high.amplitude);
      const middle = { amplitude, offset: offsetNear(amplitude, 0.5 * (low.offset + high.offset)) };
      if (of(middle) * sign > 0) low = middle;
      else high = middle;
    }
    return high;
  };
  const springOf = (at: Sinusoid): number => partsOf(at).spring;
  let earlier: Sinusoid[] = [];
  for (let n = 0; n <= AMPLITUDES; n++) {
    const amplitude = 1.05 * smallest * (largest / smallest) ** (n / AMPLITUDES);
    const here = offsetsAt(amplitude).map((offset) => ({ offset, amplitude }));
    if (here.length === earlier.length)
      here.forEach((now, k) => {
        const past = earlier[k]!;
        const stations = [past, now];
        // at resonance two balances may lie closer together than two amplitudes that are looked at
        if (springOf(past) * springOf(now) < 0) stations.splice(1, 0, between(past, now, springOf));
        for (let m = 1; m < stations.length; m++)
          if (excess(stations[m - 1]!) * excess(stations[m]!) <= 0)
            push(between(stations[m - 1]!, stations[m]!, excess));
      });
    earlier = here;
  }
  return starts;
}
