import { gaussLegendre } from '../kernels/gauss-legendre';
import { mutualOfWindings } from './coaxial-inductance';
import type { CoilShape } from './coil';
import { MAGNETIC_CONSTANT } from './constants';
import { outlineOf } from './flat-turns';
import { pairOfNestedTurns } from './nested-turns';
import { axialEnds } from './winding-pairs';
import type { AxialEnd } from './winding-pairs';

/** Line elements of all turns of a flat coil: place, direction times length, weighted with turns. Coil frame x, y. */
interface TurnElements {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly dx: Float64Array;
  readonly dy: Float64Array;
}

/** Error aimed at in the mutual inductance of coils that stand apart, relative. */
const APART_TOLERANCE = 1e-6;

/**
 * Distance to the kernel's singular points that the rules are made for. For coils closer than some hundredths of their
 * size these are so weak (ρ² ln ρ) that rules for a multiple of the distance do.
 */
function resolvedDistance(distance: number, outer: number): number {
  return Math.max(distance, Math.min(3 * distance, 0.25 * outer), 0.05 * outer);
}

/**
 * Mutual inductance of two flat coils with parallel axes (self-inductance where both are the same), positive where
 * currents of like sense help each other.
 *
 * Coaxial round coils and coils of one outline above each other: closed forms along the turns, accuracy 1e-8. Coils
 * beside each other or of different outline: Neumann's integral over both coils' turns with the thickness averaged in
 * closed form; accuracy 2e-5 of the mutual inductance while they are apart by some hundredths of their size.
 *
 * @returns H; turns counted, sense not
 * @throws RangeError where a coil does not stand at a point
 * Sources: F. E. Neumann (1845); Rosa & Grover (1912) for the averaging over sections.
 */
export function mutualOfFlatCoils(p: CoilShape, q: CoilShape): number {
  const [px, py, pz] = pointOf(p);
  const [qx, qy, qz] = pointOf(q);
  const one = { length: p.length, at: pz };
  const two = { length: q.length, at: qz };
  const aligned = Math.hypot(px - qx, py - qy) < 1e-9 * (outlineOf(p).outer + outlineOf(q).outer);
  if (aligned && p.shape === 'round' && q.shape === 'round') {
    return mutualOfWindings(
      { innerRadius: p.innerDiameter / 2, outerRadius: p.outerDiameter / 2, turns: p.turns, ...one },
      { innerRadius: q.innerDiameter / 2, outerRadius: q.outerDiameter / 2, turns: q.turns, ...two },
    );
  }
  const ends = axialEnds(one, two);
  const factor = (1e-7 * (MAGNETIC_CONSTANT / (4e-7 * Math.PI)) * p.turns * q.turns) / (p.length * q.length);
  if (aligned && p.shape !== 'round' && sameOutline(p, q)) return factor * pairOfNestedTurns(p, ends);

  const distance = distanceOf(p, q);
  const smaller = Math.min(outlineOf(p).outer, outlineOf(q).outer);
  const resolved = resolvedDistance(distance, smaller);
  return factor * neumann(elementsOf(p, resolved), elementsOf(q, resolved), [px - qx, py - qy], ends);
}

function pointOf(coil: CoilShape): [number, number, number] {
  if (typeof coil.at === 'number') throw new RangeError('a flat coil must stand at a point [x, y, z]');
  return [coil.at[0]!, coil.at[1]!, coil.at[2]!];
}

function sameOutline(p: CoilShape, q: CoilShape): boolean {
  if (p.shape === 'racetrack' && q.shape === 'racetrack') {
    return p.straight === q.straight && p.innerEndRadius === q.innerEndRadius && p.outerEndRadius === q.outerEndRadius;
  }
  return (
    p.shape === 'rectangular' &&
    q.shape === 'rectangular' &&
    [0, 1].every((i) => p.inner[i] === q.inner[i] && p.outer[i] === q.outer[i])
  );
}

/** Σ over both coils' elements of dl·dl′ times 1/r summed over the ends of the lengths. */
function neumann(
  a: TurnElements,
  b: TurnElements,
  offset: readonly [number, number],
  ends: readonly AxialEnd[],
): number {
  let sum = 0;
  for (let i = 0; i < a.x.length; i++) {
    const ax = a.x[i]! + offset[0];
    const ay = a.y[i]! + offset[1];
    const adx = a.dx[i]!;
    const ady = a.dy[i]!;
    for (let j = 0; j < b.x.length; j++) {
      const dot = adx * b.dx[j]! + ady * b.dy[j]!;
      if (dot === 0) continue;
      const x = ax - b.x[j]!;
      const y = ay - b.y[j]!;
      const rho2 = x * x + y * y + 1e-30;
      const rho = Math.sqrt(rho2);
      let kernel = 0;
      for (const { distance: z, sign } of ends) {
        const r = Math.sqrt(rho2 + z * z);
        kernel += sign * (z * Math.log((z + r) / rho) - r);
      }
      sum += dot * kernel;
    }
  }
  return sum;
}

/** Least distance between the windings' outlines, by samples; vertical distance included. */
function distanceOf(p: CoilShape, q: CoilShape): number {
  const [px, py, pz] = pointOf(p);
  const [qx, qy, qz] = pointOf(q);
  const vertical = Math.max(0, Math.abs(pz - qz) - 0.5 * (p.length + q.length));
  const a = outlinePoints(p);
  const b = outlinePoints(q);
  let least = Infinity;
  for (const [x, y] of a) for (const [u, v] of b) least = Math.min(least, Math.hypot(x + px - u - qx, y + py - v - qy));
  return Math.hypot(least, vertical);
}

/** Points on the innermost and outermost turn. */
function outlinePoints(coil: CoilShape): [number, number][] {
  const points: [number, number][] = [];
  for (const share of [0, 1]) {
    const pieces = piecesOf(coil, share);
    for (const piece of pieces) for (let k = 0; k <= 16; k++) points.push(piece.at(k / 16));
  }
  return points;
}

/** A smooth piece of a turn: place and derivative for a share 0…1 of it. */
interface Piece {
  readonly length: number;
  at(share: number): [number, number];
  slope(share: number): [number, number];
}

const arc = (radius: number, y: number, from: number, to: number): Piece => ({
  length: radius * (to - from),
  at: (s) => [radius * Math.cos(from + (to - from) * s), y + radius * Math.sin(from + (to - from) * s)],
  slope: (s) => [
    -(to - from) * radius * Math.sin(from + (to - from) * s),
    (to - from) * radius * Math.cos(from + (to - from) * s),
  ],
});

const line = (x0: number, y0: number, x1: number, y1: number): Piece => ({
  length: Math.hypot(x1 - x0, y1 - y0),
  at: (s) => [x0 + (x1 - x0) * s, y0 + (y1 - y0) * s],
  slope: () => [x1 - x0, y1 - y0],
});

/** The turn at a share 0…1 of the build, counter-clockwise. */
function piecesOf(coil: CoilShape, share: number): Piece[] {
  const { inner, outer } = outlineOf(coil);
  const reach = inner + (outer - inner) * share;
  switch (coil.shape) {
    case 'round':
      return [arc(reach, 0, 0, Math.PI), arc(reach, 0, Math.PI, 2 * Math.PI)];
    case 'racetrack': {
      const half = coil.straight / 2;
      return [
        line(reach, -half, reach, half),
        arc(reach, half, 0, Math.PI),
        line(-reach, half, -reach, -half),
        arc(reach, -half, Math.PI, 2 * Math.PI),
      ];
    }
    case 'rectangular': {
      const Y = 0.5 * (coil.inner[1]! + (coil.outer[1]! - coil.inner[1]!) * share);
      return [
        line(reach, -Y, reach, Y),
        line(reach, Y, -reach, Y),
        line(-reach, Y, -reach, -Y),
        line(-reach, -Y, reach, -Y),
      ];
    }
  }
}

function elementsOf(coil: CoilShape, distance: number): TurnElements {
  const { inner, outer } = outlineOf(coil);
  const across = gaussLegendre(pointsFor(outer - inner, distance));
  const lists: number[][] = [[], [], [], []];
  for (let i = 0; i < across.nodes.length; i++) {
    for (const piece of piecesOf(coil, 0.5 * (1 + across.nodes[i]!))) {
      const along = gaussLegendre(pointsFor(piece.length, distance));
      for (let k = 0; k < along.nodes.length; k++) {
        const share = 0.5 * (1 + along.nodes[k]!);
        const weight = 0.25 * across.weights[i]! * along.weights[k]!;
        const [x, y] = piece.at(share);
        const [dx, dy] = piece.slope(share);
        [x, y, weight * dx, weight * dy].forEach((value, n) => lists[n]!.push(value));
      }
    }
  }
  const [x, y, dx, dy] = lists.map((list) => Float64Array.from(list));
  return { x: x!, y: y!, dx: dx!, dy: dy! };
}

/** Gauss points on a length whose integrand is analytic up to `distance` beside it. */
function pointsFor(length: number, distance: number): number {
  const q = (2 * distance) / length;
  const rate = Math.log(q + Math.sqrt(1 + q * q));
  return Math.min(64, Math.max(4, Math.ceil(-Math.log(APART_TOLERANCE) / (2 * rate))));
}
