import { gaussLegendre } from '../kernels/gauss-legendre';
import type { CoilShape } from './coil';

/**
 * The turns of a flat coil as a quadrature rule for ∮ f(x, y) dy summed over the turns: line elements on curved parts,
 * ends of straight sides (along y) where the integral is known in closed form. Coordinates from the coil's centre; the
 * normal is +z, the turns run counter-clockwise.
 */
export interface FlatTurns {
  /** Line elements: place and extent along y times turns (m). */
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly extent: Float64Array;
  /** Ends of straight sides: place and ± turns. */
  readonly endX: Float64Array;
  readonly endY: Float64Array;
  readonly endTurns: Float64Array;
}

const LEAST_POINTS = 6;
const MOST_POINTS = 256;
const MOST_STEPS = 2500;

/**
 * Turns spread evenly over the build, resolved for integrands whose singular points keep `clearance` away from the
 * plane of the turns.
 *
 * @param clearance least distance of the field's sources from the plane (m), positive
 * @param tolerance error aimed at, relative
 * @throws RangeError where the outline has no build
 */
export function flatTurns(coil: CoilShape, clearance: number, tolerance: number): FlatTurns {
  const lines: number[][] = [[], [], []];
  const ends: number[][] = [[], [], []];
  const addEnd = (x: number, y: number, turns: number): void => {
    ends[0]!.push(x);
    ends[1]!.push(y);
    ends[2]!.push(turns);
  };
  /** Both straight sides of one turn: at x = ±X from −Y to Y. */
  const addSides = (X: number, Y: number, turns: number): void => {
    for (const i of [1, -1]) for (const j of [1, -1]) addEnd(i * X, j * Y, i * j * turns);
  };
  const addArc = (radius: number, centreY: number, from: number, to: number, turns: number, closed: boolean): void => {
    // a closed turn is periodic: even steps converge geometrically and need fewer points than Gauss
    const rule = closed ? undefined : gaussLegendre(pointsFor(radius * (to - from), clearance, tolerance));
    const count = rule ? rule.nodes.length : stepsRound(radius, clearance, tolerance);
    for (let k = 0; k < count; k++) {
      const share = rule ? 0.5 * (1 + rule.nodes[k]!) : (k + 0.5) / count;
      const angle = from + (to - from) * share;
      const step = (rule ? 0.5 * rule.weights[k]! : 1 / count) * (to - from);
      lines[0]!.push(radius * Math.cos(angle));
      lines[1]!.push(centreY + radius * Math.sin(angle));
      lines[2]!.push(turns * radius * Math.cos(angle) * step);
    }
  };

  const { inner, outer } = outlineOf(coil);
  if (!(outer > inner) || !(inner >= 0))
    throw new RangeError(`outer outline must lie outside the inner one, got ${inner}, ${outer} m`);
  const across = gaussLegendre(pointsFor(outer - inner, clearance, tolerance));
  for (let i = 0; i < across.nodes.length; i++) {
    const share = 0.5 * (1 + across.nodes[i]!);
    const turns = 0.5 * across.weights[i]! * coil.turns;
    const reach = inner + (outer - inner) * share;
    switch (coil.shape) {
      case 'round':
        addArc(reach, 0, 0, 2 * Math.PI, turns, true);
        break;
      case 'racetrack': {
        const half = coil.straight / 2;
        addSides(reach, half, turns);
        addArc(reach, half, 0, Math.PI, turns, false);
        addArc(reach, -half, Math.PI, 2 * Math.PI, turns, false);
        break;
      }
      case 'rectangular':
        addSides(reach, 0.5 * (coil.inner[1]! + (coil.outer[1]! - coil.inner[1]!) * share), turns);
        break;
    }
  }
  const [x, y, extent, endX, endY, endTurns] = [...lines, ...ends].map((list) => Float64Array.from(list));
  return { x: x!, y: y!, extent: extent!, endX: endX!, endY: endY!, endTurns: endTurns! };
}

/** Distance of the innermost and outermost turn from the coil's centre line, along x. */
export function outlineOf(coil: CoilShape): { inner: number; outer: number } {
  switch (coil.shape) {
    case 'round':
      return { inner: coil.innerDiameter / 2, outer: coil.outerDiameter / 2 };
    case 'racetrack':
      return { inner: coil.innerEndRadius, outer: coil.outerEndRadius };
    case 'rectangular':
      return { inner: coil.inner[0]! / 2, outer: coil.outer[0]! / 2 };
  }
}

/** Gauss points on a length whose integrand is analytic up to `clearance` beside it. */
function pointsFor(length: number, clearance: number, tolerance: number): number {
  const q = (2 * clearance) / length;
  const rate = Math.log(q + Math.sqrt(1 + q * q));
  return Math.min(MOST_POINTS, Math.max(LEAST_POINTS, Math.ceil(-Math.log(tolerance) / (2 * rate))));
}

/** Even steps round a circle whose integrand is analytic up to `clearance` beside it: sinh β = clearance/radius. */
function stepsRound(radius: number, clearance: number, tolerance: number): number {
  return Math.min(MOST_STEPS, Math.max(8, Math.ceil(-Math.log(tolerance) / Math.asinh(clearance / radius))));
}
