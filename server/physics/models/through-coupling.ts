import { gradedRule } from '../kernels/graded-rule';
import type { QuadratureRule } from '../kernels/gauss-legendre';
import { sheetsOf } from './axial-magnet';
import type { AxialMagnet } from './axial-magnet';
import { addCoaxialCircles, addCoaxialFlux, CIRCLE_TERMS } from './coaxial-circles';
import { edgeProfile } from './edge-profile';
import type { EdgeProfile } from './edge-profile';
import type { Linkage } from './linkage';

/** A round coil on the axis; turns spread evenly over the window. */
export interface AxialCoil {
  readonly innerRadius: number;
  readonly outerRadius: number;
  readonly length: number;
  /** Centre on the axis (m). */
  readonly at: number;
  /** Turns times sense. */
  readonly signedTurns: number;
}

/**
 * All pairs of a sheet of one radius with windings of the same radii: λ(x) = Σ_e weight_e Ψ(x + shift_e), where Ψ(u)
 * is the function G of coaxial circles integrated over the winding's radius.
 */
interface EdgeGroup {
  readonly sheetRadius: number;
  readonly innerRadius: number;
  readonly outerRadius: number;
  /** Least product of a magnet's and a winding's length (m²). */
  readonly shortest: number;
  readonly radius: Float64Array;
  readonly radiusWeight: Float64Array;
  readonly shift: Float64Array;
  readonly weight: Float64Array;
}

/** Gap between sheet and winding, relative to the sheet's radius, below which no table is made. */
const LEAST_GAP = 1e-7;
/** Aimed at in the integral over the winding's radius; what is reached is some thousand times better (tests). */
const RADIAL_TOLERANCE = 1e-9;

/**
 * Prepares the linkage of coaxial magnets and coils.
 *
 * A magnet's end and a winding's end meet in one term: over the axis of both, the double integral of Maxwell's mutual
 * inductance is the second difference of its second integral G in closed form, so only the winding's radius is
 * integrated numerically, by a rule graded towards the sheet's radius. Terms of like radii and like shift are merged.
 *
 * Validity: magnets and windings do not overlap. Accuracy: 1e-11 of the largest value; see the tests.
 * Source: Maxwell, Treatise art. 701; Rosa & Grover (1912); Derby & Olbert, Am. J. Phys. 78 (2010) 229 (cylinder as
 * sheet).
 */
export function axialLinkage(magnets: readonly AxialMagnet[], coils: readonly AxialCoil[]): Linkage {
  const groups = groupEdges(magnets, coils);
  const scratch = new Float64Array(CIRCLE_TERMS);
  const at = (x: number, out: Float64Array): void => {
    scratch.fill(0);
    for (const group of groups) addGroup(scratch, group, x);
    out[0] = scratch[0]!;
    out[1] = scratch[1]!;
    out[2] = scratch[2]!;
    out[3] = scratch[3]!;
  };
  const passages = passagesOf(magnets, coils);
  const couplingAt = (x: number): number => {
    scratch[0] = 0;
    for (const { sheetRadius, radius, radiusWeight, shift, weight } of groups) {
      for (let e = 0; e < shift.length; e++) {
        const z = x + shift[e]!;
        const w = weight[e]!;
        for (let j = 0; j < radius.length; j++)
          addCoaxialFlux(scratch, w * radiusWeight[j]!, sheetRadius, radius[j]!, z);
      }
    }
    return scratch[0]!;
  };
  return { at, couplingAt, passages, tabulated: () => tabulatedLinkage(groups, passages) };
}

/**
 * The same linkage through tables of Ψ, one per pair of radii, made where they are asked for: some ten times faster,
 * within 1e-9 of the largest value, whatever the number of magnets and coils.
 */
function tabulatedLinkage(groups: readonly EdgeGroup[], passages: readonly number[]): Linkage {
  const exact: EdgeGroup[] = [];
  const tabulated: { group: EdgeGroup; profile: EdgeProfile }[] = [];
  for (const group of groups) {
    const { sheetRadius, radius, radiusWeight, innerRadius, outerRadius } = group;
    const gap = Math.max(innerRadius - sheetRadius, sheetRadius - outerRadius);
    // a sheet within the winding's radii has singular points on the axis of distance itself: no table there
    if (gap > LEAST_GAP * sheetRadius) {
      tabulated.push({
        group,
        profile: edgeProfile(sheetRadius, radius, radiusWeight, gap, group.shortest / (gap * gap)),
      });
    } else exact.push(group);
  }
  const scratch = new Float64Array(CIRCLE_TERMS);
  const linkage: Linkage = {
    passages,
    at: (x, out) => {
      scratch.fill(0);
      for (const group of exact) addGroup(scratch, group, x);
      for (const { group, profile } of tabulated) {
        const { shift, weight } = group;
        for (let e = 0; e < shift.length; e++) profile.addAt(scratch, weight[e]!, x + shift[e]!);
      }
      out[0] = scratch[0]!;
      out[1] = scratch[1]!;
      out[2] = scratch[2]!;
      out[3] = scratch[3]!;
    },
    couplingAt: (x) => {
      let sum = 0;
      if (exact.length > 0) {
        scratch.fill(0);
        for (const group of exact) addGroup(scratch, group, x);
        sum = scratch[1]!;
      }
      for (const { group, profile } of tabulated) {
        const { shift, weight } = group;
        for (let e = 0; e < shift.length; e++) sum += weight[e]! * profile.fluxAt(x + shift[e]!);
      }
      return sum;
    },
    tabulated: () => linkage,
  };
  return linkage;
}

function addGroup(scratch: Float64Array, group: EdgeGroup, x: number): void {
  const { sheetRadius, radius, radiusWeight, shift, weight } = group;
  for (let e = 0; e < shift.length; e++) {
    const z = x + shift[e]!;
    const w = weight[e]!;
    for (let j = 0; j < radius.length; j++)
      addCoaxialCircles(scratch, w * radiusWeight[j]!, sheetRadius, radius[j]!, z);
  }
}

interface GroupInMaking {
  readonly sheetRadius: number;
  readonly coil: AxialCoil;
  readonly rule: QuadratureRule;
  readonly edges: Edge[];
  shortest: number;
}

function groupEdges(magnets: readonly AxialMagnet[], coils: readonly AxialCoil[]): EdgeGroup[] {
  const found = new Map<string, GroupInMaking>();
  for (const magnet of magnets) {
    for (const [sheetRadius, sign] of sheetsOf(magnet)) {
      for (const coil of coils) {
        const key = `${sheetRadius}|${coil.innerRadius}|${coil.outerRadius}`;
        let group = found.get(key);
        if (!group) {
          const rule = gradedRule(coil.innerRadius, coil.outerRadius, sheetRadius, RADIAL_TOLERANCE);
          group = { sheetRadius, coil, rule, edges: [], shortest: Infinity };
          found.set(key, group);
        }
        group.shortest = Math.min(group.shortest, magnet.length * coil.length);
        const density = coil.signedTurns / (coil.length * (coil.outerRadius - coil.innerRadius));
        addEdges(group.edges, sign * magnet.magnetisation * density, magnet, coil);
      }
    }
  }
  return [...found.values()].map(({ sheetRadius, coil, rule, edges, shortest }) => {
    const kept = edges.filter(({ weight }) => weight !== 0);
    return {
      sheetRadius,
      innerRadius: coil.innerRadius,
      outerRadius: coil.outerRadius,
      shortest,
      radius: rule.nodes,
      radiusWeight: rule.weights,
      shift: Float64Array.from(kept, ({ shift }) => shift),
      weight: Float64Array.from(kept, ({ weight }) => weight),
    };
  });
}

interface Edge {
  readonly shift: number;
  weight: number;
}

/** The four ends of the second difference of G, those that coincide up to rounding merged. */
function addEdges(edges: Edge[], weight: number, magnet: AxialMagnet, coil: AxialCoil): void {
  const offset = magnet.at - coil.at;
  for (const magnetEnd of [1, -1]) {
    for (const coilEnd of [1, -1]) {
      const shift = offset + 0.5 * (magnetEnd * magnet.length + coilEnd * coil.length);
      const same = edges.find((known) => Math.abs(known.shift - shift) < 1e-12 * magnet.length);
      const signed = magnetEnd * coilEnd * weight;
      if (same) same.weight += signed;
      else edges.push({ shift, weight: signed });
    }
  }
}

function passagesOf(magnets: readonly AxialMagnet[], coils: readonly AxialCoil[]): number[] {
  const passages: number[] = [];
  for (const magnet of magnets) {
    for (const coil of coils) {
      for (const magnetEnd of [-0.5, 0.5]) {
        for (const coilEnd of [-0.5, 0.5]) {
          passages.push(coil.at + coilEnd * coil.length - magnet.at - magnetEnd * magnet.length);
        }
      }
    }
  }
  return passages;
}
