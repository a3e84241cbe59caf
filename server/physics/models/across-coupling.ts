import { integratedTable } from '../kernels/integrated-table';
import { addEdgeOverElement, addEdgeOverSide, EDGE_TERMS, thirdOverElements, thirdOverSides } from './block-edge';
import type { CoilShape } from './coil';
import { MAGNETIC_CONSTANT } from './constants';
import { flatTurns, outlineOf } from './flat-turns';
import type { FlatTurns } from './flat-turns';
import type { Linkage } from './linkage';

/** A block with sides along the axes, magnetised along z. */
export interface FlatMagnet {
  /** Sides (m). */
  readonly size: readonly number[];
  /** Centre for x = 0 (m). */
  readonly at: readonly number[];
  /** Magnetisation along +z, signed (A/m). */
  readonly magnetisation: number;
}

/** One height difference between a face of the blocks and a face of the winding. */
interface Height {
  readonly w: number;
  readonly sign: number;
  readonly turns: FlatTurns;
}

/** E, E′, E″, E‴ of one x-edge of a block against its place t along the coil (m from the coil's centre). */
interface EdgeFunction {
  allAt(t: number, out: Float64Array): void;
}

/** All x-edges of blocks with the same extent in y and z over one coil: λ(x) = Σ weight E(x + shift). */
interface EdgeGroup {
  readonly table: EdgeFunction;
  readonly shift: Float64Array;
  readonly weight: Float64Array;
}

/** Quadrature error aimed at along a turn and across the build, relative to the field's own size. */
const TURN_TOLERANCE = 1e-9;
/** Length of a panel along the travel per distance to the nearest singular point. */
const PANEL_PER_CLEARANCE = 1.8;
/** Least distance, relative to the coil's outline, that the panels along the travel resolve. */
const LEAST_PANEL_CLEARANCE = 0.01;

/**
 * Distance to the singular points that the rules along and across the turns are made for. Below some hundredths of the
 * outline they are so weak (w² ln w) that rules for twice the distance do, and rules for 3 % of the outline always do:
 * see the tests.
 */
function turnClearance(w: number, outer: number): number {
  const distance = Math.abs(w);
  return Math.max(distance, Math.min(2 * distance, 0.06 * outer), 0.03 * outer);
}

/**
 * Linkage of blocks passing across the face of flat coils.
 *
 * A block is two charged faces (±M), their potential averaged over the winding's thickness is known in closed form, and
 * so is its flux through a strip of a turn: only the curved parts of the turns and the build are integrated
 * numerically, by rules sized by the clearance between block and winding. Along the travel a block is the difference of
 * two edges; the function E of one edge is made once for all blocks with the same extent in y and z.
 *
 * @throws RangeError where a coil does not stand at a point or has no build
 * Validity: blocks do not overlap windings. Accuracy: 1e-8 of the largest value for gaps above a thousandth of the
 * coil. Sources: Furlani (2001) sec. 4.2; Yang et al. (1990); Akoun & Yonnet (1984).
 */
export function acrossLinkage(magnets: readonly FlatMagnet[], coils: readonly CoilShape[]): Linkage {
  const groups = coils.flatMap((coil, i) => groupsOf(magnets, coil, i));
  const terms = new Float64Array(EDGE_TERMS);
  const single = new Float64Array(EDGE_TERMS);
  const linkage: Linkage = {
    couplingAt: (x) => {
      linkage.at(x, single);
      return single[1]!;
    },
    // the edge functions are tables already
    tabulated: () => linkage,
    at: (x, out) => {
      out.fill(0);
      for (const { table, shift, weight } of groups) {
        for (let e = 0; e < shift.length; e++) {
          table.allAt(x + shift[e]!, terms);
          const w = weight[e]!;
          for (let k = 0; k < EDGE_TERMS; k++) out[k]! += w * terms[k]!;
        }
      }
    },
    passages: passagesOf(magnets, coils),
  };
  return linkage;
}

function groupsOf(magnets: readonly FlatMagnet[], coil: CoilShape, index: number): EdgeGroup[] {
  if (typeof coil.at === 'number') throw new RangeError(`coils.${index}.at must be a point in the across layout`);
  const [cx, cy, cz] = coil.at as [number, number, number];
  const found = new Map<string, { table: EdgeFunction; edges: [number, number][] }>();
  for (const { size, at, magnetisation } of magnets) {
    const extent = [1, 2].flatMap((axis) => [at[axis]! - size[axis]! / 2, at[axis]! + size[axis]! / 2]);
    const [yLow, yHigh, zLow, zHigh] = extent as [number, number, number, number];
    const key = extent.map((value) => value.toPrecision(13)).join('|');
    let group = found.get(key);
    if (!group) {
      const heights = heightsOf(coil, zLow - cz, zHigh - cz);
      group = { table: edgeFunction(coil, heights, yLow - cy, yHigh - cy), edges: [] };
      found.set(key, group);
    }
    const strength = magnetisation * coil.sense;
    group.edges.push([at[0]! - size[0]! / 2 - cx, strength], [at[0]! + size[0]! / 2 - cx, -strength]);
  }
  return [...found.values()].map(({ table, edges }) => ({
    table,
    shift: Float64Array.from(edges, ([shift]) => shift),
    weight: Float64Array.from(edges, ([, weight]) => weight),
  }));
}

/** Faces of the block (charge ±) against faces of the winding, each with turns resolved for its own clearance. */
function heightsOf(coil: CoilShape, zLow: number, zHigh: number): Height[] {
  const { outer } = outlineOf(coil);
  const heights: Height[] = [];
  for (const [face, charge] of [
    [zLow, -1],
    [zHigh, 1],
  ] as const) {
    for (const side of [1, -1]) {
      const w = side * (coil.length / 2) - face;
      const clearance = turnClearance(w, outer);
      // B averaged over the thickness is −μ0 (potential at the top less that at the bottom)/thickness
      const sign = (-MAGNETIC_CONSTANT * charge * side) / (4 * Math.PI * coil.length);
      heights.push({ w, sign, turns: flatTurns(coil, clearance, TURN_TOLERANCE) });
    }
  }
  return heights;
}

/**
 * E of one x-edge with the given extent in y. The coil is even in x, so that E′ is even: half of it is tabulated. The
 * third derivative is free of logarithms and built up from there; the start at zero is evaluated in full.
 */
function edgeFunction(coil: CoilShape, heights: readonly Height[], yLow: number, yHigh: number): EdgeFunction {
  // a block centred on the coil in y: both y-edges do the same
  const centred = Math.abs(yLow + yHigh) < 1e-9 * (yHigh - yLow);
  const yEdges: [number, number][] = centred
    ? [[yLow, 2]]
    : [
        [yLow, 1],
        [yHigh, -1],
      ];
  const start = new Float64Array(EDGE_TERMS);
  for (const { w, sign, turns } of heights) {
    for (const [yEdge, weight] of yEdges) addTurns(start, turns, sign * weight, 0, yEdge, w);
  }
  const third = (t: number): number => {
    let sum = 0;
    for (const { w, sign, turns } of heights) {
      for (const [yEdge, weight] of yEdges) {
        sum += sign * weight * (thirdOverElements(turns, t, yEdge, w) + thirdOverSides(turns, t, yEdge, w));
      }
    }
    return sum;
  };
  const { outer } = outlineOf(coil);
  const clearance = Math.max(Math.min(...heights.map(({ w }) => Math.abs(w))), LEAST_PANEL_CLEARANCE * outer);
  const table = integratedTable(
    third,
    [start[0]!, start[1]!, 0],
    (t) => PANEL_PER_CLEARANCE * Math.hypot(clearance, Math.max(0, t - outer)),
  );
  return {
    allAt: (t, out) => {
      table.allAt(Math.abs(t), out);
      if (t < 0) {
        out[0] = 2 * start[0]! - out[0]!;
        out[2] = -out[2]!;
      }
    },
  };
}

function addTurns(out: Float64Array, turns: FlatTurns, weight: number, t: number, yEdge: number, w: number): void {
  const { x, y, extent, endX, endY, endTurns } = turns;
  for (let i = 0; i < x.length; i++) addEdgeOverElement(out, weight * extent[i]!, x[i]! - t, y[i]! - yEdge, w);
  for (let i = 0; i < endX.length; i++) addEdgeOverSide(out, weight * endTurns[i]!, endX[i]! - t, endY[i]! - yEdge, w);
}

function passagesOf(magnets: readonly FlatMagnet[], coils: readonly CoilShape[]): number[] {
  const passages: number[] = [];
  for (const coil of coils) {
    if (typeof coil.at === 'number') continue;
    const { inner, outer } = outlineOf(coil);
    for (const { size, at } of magnets) {
      for (const edge of [at[0]! - size[0]! / 2, at[0]! + size[0]! / 2]) {
        for (const place of [-outer, -inner, inner, outer]) passages.push(coil.at[0]! + place - edge);
      }
    }
  }
  return passages;
}
