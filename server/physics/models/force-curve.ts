import { monotoneCubic, monotoneCubicAt, monotoneCubicSlopeAt } from '../kernels/pchip';
import type { RestingSuspension } from './suspension';
import { NoRestError, weightAlongTravel } from './suspension';

/** A force on the assembly as a function of x, gravity left out. */
export interface ForceCurve {
  /** N at x (m). */
  forceAt(x: number): number;
  /** dF/dx, N/m. */
  slopeAt(x: number): number;
  /** −∫F dx from any fixed place, J. */
  energyAt(x: number): number;
  /** −F‴/6, N/m³. */
  cubicAt(x: number): number;
  /** Range in which the curve is known, m, finite. */
  from: number;
  to: number;
}

/** Places where the curve is looked at for a change of sign. */
const SCANNED = 4000;

/**
 * Finds where a force curve and the weight along the travel let the assembly rest: of several stable places within the
 * range the deepest, of two equal ones the + one.
 *
 * @param axisAngle ψ, rad above horizontal.
 * @throws NoRestError where no stable equilibrium lies within the range.
 */
export function suspensionOnCurve(curve: ForceCurve, mass: number, axisAngle: number): RestingSuspension {
  const weight = weightAlongTravel(mass, axisAngle);
  const { from, to } = curve;
  const total = (x: number): number => curve.forceAt(x) - weight;
  const energy = (x: number): number => curve.energyAt(x) + weight * x;
  const zeros: number[] = [];
  let before = total(from);
  for (let n = 1; n <= SCANNED; n++) {
    const left = from + ((to - from) * (n - 1)) / SCANNED;
    const right = from + ((to - from) * n) / SCANNED;
    const after = total(right);
    if (before === 0) zeros.push(left);
    else if (before * after < 0) zeros.push(bisect(total, left, right, before));
    before = after;
  }
  if (before === 0) zeros.push(to);
  const stable = zeros.filter((x) => curve.slopeAt(x) < 0);
  if (stable.length === 0)
    throw new NoRestError(
      zeros.length === 0
        ? `The suspension cannot hold the weight anywhere between ${from} m and ${to} m: no rest position is stable.`
        : 'The suspension pushes away from each of its equilibria: no rest position is stable.',
    );
  const depth = Math.max(...stable.map((x) => Math.abs(energy(x) - energy(from))), 1e-300);
  let rest = stable[0]!;
  for (const x of stable) if (energy(x) <= energy(rest) + 1e-9 * depth) rest = x;
  const zero = energy(rest);
  return {
    restPosition: rest,
    stiffness: -curve.slopeAt(rest),
    cubic: curve.cubicAt(rest),
    suspension: {
      force: (u) => total(rest + u),
      forceSlope: (u) => curve.slopeAt(rest + u),
      energy: (u) => energy(rest + u) - zero,
      polynomial: null,
      equilibria: zeros.map((x) => x - rest),
      from: from - rest,
      to: to - rest,
    },
  };
}

function bisect(of: (x: number) => number, left: number, right: number, atLeft: number): number {
  let [low, high] = [left, right];
  for (let n = 0; n < 200; n++) {
    const middle = 0.5 * (low + high);
    if (middle <= low || middle >= high) break;
    if (of(middle) * atLeft > 0) low = middle;
    else high = middle;
  }
  return 0.5 * (low + high);
}

/**
 * A tabulated force: monotone cubic (PCHIP) between the points, straight on with the end slopes beyond them.
 *
 * @param displacement rising, m; @param force on the assembly there, N.
 * @throws RangeError where the lists differ in length, hold fewer than two points, or displacement does not rise.
 */
export function tabulatedForce(displacement: ArrayLike<number>, force: ArrayLike<number>): ForceCurve {
  const curve = monotoneCubic(displacement, force);
  const { position, value, slope } = curve;
  const last = position.length - 1;
  const [from, to] = [position[0]!, position[last]!];
  const work = new Float64Array(last + 1);
  for (let n = 0; n < last; n++) {
    const h = position[n + 1]! - position[n]!;
    work[n + 1] = work[n]! + h * (0.5 * (value[n]! + value[n + 1]!) + (h * (slope[n]! - slope[n + 1]!)) / 12);
  }
  const panelOf = (x: number): number => {
    let [low, high] = [0, last];
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (position[middle]! <= x) low = middle;
      else high = middle;
    }
    return low;
  };
  const forceAt = (x: number): number => {
    if (x < from) return value[0]! + slope[0]! * (x - from);
    if (x > to) return value[last]! + slope[last]! * (x - to);
    return monotoneCubicAt(curve, x);
  };
  return {
    from,
    to,
    forceAt,
    slopeAt: (x) => (x < from ? slope[0]! : x > to ? slope[last]! : monotoneCubicSlopeAt(curve, x)),
    energyAt: (x) => {
      const n = panelOf(Math.min(to, Math.max(from, x)));
      const a = x < from ? from : x > to ? to : position[n]!;
      const start = x > to ? work[last]! : work[n]!;
      // Simpson is exact for the cubic of a panel and for the straight ends
      return -(start + ((x - a) / 6) * (forceAt(a) + 4 * forceAt(0.5 * (a + x)) + forceAt(x)));
    },
    cubicAt: (x) => {
      if (x < from || x > to) return 0;
      const n = panelOf(x);
      const h = position[n + 1]! - position[n]!;
      const secant = (value[n + 1]! - value[n]!) / h;
      return -(slope[n]! + slope[n + 1]! - 2 * secant) / (h * h);
    },
  };
}
