import { gradedRule } from '../kernels/graded-rule';
import { sheetsOf } from './axial-magnet';
import type { AxialMagnet } from './axial-magnet';
import { addComplexCircles, COMPLEX_CIRCLE_TERMS } from './complex-circles';
import type { Linkage } from './linkage';
import type { AxialCoil } from './through-coupling';

/** How the moving assembly sits off the coil's axis. */
export interface Misalignment {
  /** Sideways (m). */
  readonly offset: number;
  /** About the assembly's middle in the plane of the offset, positive where the +x end leans towards it (rad). */
  readonly tilt: number;
}

const RADIAL_TOLERANCE = 1e-10;
/** Error aimed at in the mean over the angle, relative. */
const ANGLE_TOLERANCE = 1e-9;
const MOST_ANGLES = 96;
const LARGEST_TILT = Math.PI / 4;

/** One edge of one sheet against one edge of one winding, for one angle of the mean. */
interface Term {
  readonly weight: number;
  readonly weighti: number;
  readonly radius: number;
  readonly radiusi: number;
  readonly shift: number;
  readonly shifti: number;
  readonly rule: number;
}

/**
 * Linkage of an assembly that is offset and tilted as one rigid body; a function of its travel along the coil's axis.
 *
 * By Whittaker's integral the axisymmetric potential of the coil anywhere is the mean over an angle α of its values on
 * the axis at the complex place z + i (x cos α + y sin α). Under that mean a magnet tilted by τ is a magnet on the axis
 * with radius, length and place multiplied by s = cos τ + i sin τ cos α and its middle moved by i·offset·cos α, and its
 * linkage is the closed form of coaxial sheets, continued to complex arguments, over s². Only one integral more than
 * aligned, over a smooth periodic function: midpoints in α converge geometrically.
 *
 * @throws RangeError where the tilt is more than 45°, or offset or tilt is not finite
 * Validity: the assembly keeps clear of the windings; accuracy 1e-8 of the largest value while the nearest distance to
 * the winding is more than a tenth of the gap.
 * Sources: E. T. Whittaker, Math. Ann. 57 (1903) 333; F. W. Grover, Proc. IRE 32 (1944) 620; S. Babic et al., IEEE
 * Trans. Magn. 46 (2010) 3591.
 */
export function misalignedLinkage(
  magnets: readonly AxialMagnet[],
  coils: readonly AxialCoil[],
  misalignment: Misalignment,
): Linkage {
  const { offset, tilt } = misalignment;
  if (!Number.isFinite(offset)) throw new RangeError(`offset must be finite, got ${offset} m`);
  if (!(Math.abs(tilt) <= LARGEST_TILT)) throw new RangeError(`tilt must be at most 45°, got ${tilt} rad`);
  const middle = middleOf(magnets);
  const angles = anglesFor(magnets, coils, misalignment, middle);
  const rules = new Map<string, { index: number; nodes: Float64Array; weights: Float64Array }>();
  const terms: Term[] = [];
  for (let k = 0; k < angles; k++) {
    const cosine = Math.cos((Math.PI * (k + 0.5)) / (2 * angles));
    const s = { re: Math.cos(tilt), im: Math.sin(tilt) * cosine };
    for (const magnet of magnets) {
      for (const [radius, sign] of sheetsOf(magnet)) {
        for (const coil of coils) {
          const key = `${radius}|${coil.innerRadius}|${coil.outerRadius}`;
          let rule = rules.get(key);
          if (!rule) {
            const graded = gradedRule(coil.innerRadius, coil.outerRadius, radius, RADIAL_TOLERANCE);
            rule = { index: rules.size, nodes: graded.nodes, weights: graded.weights };
            rules.set(key, rule);
          }
          const density = coil.signedTurns / (coil.length * (coil.outerRadius - coil.innerRadius));
          const strength = (sign * magnet.magnetisation * density) / angles;
          terms.push(...edgeTerms(magnet, coil, { middle, offset, cosine, s, radius, strength, rule: rule.index }));
        }
      }
    }
  }
  const radii = [...rules.values()];
  const scratch = new Float64Array(COMPLEX_CIRCLE_TERMS);
  const single = new Float64Array(COMPLEX_CIRCLE_TERMS);
  const linkage: Linkage = {
    couplingAt: (x) => {
      linkage.at(x, single);
      return single[1]!;
    },
    tabulated: () => linkage,
    at: (x, out) => {
      scratch.fill(0);
      for (const term of terms) {
        const { nodes, weights } = radii[term.rule]!;
        for (let j = 0; j < nodes.length; j++) {
          addComplexCircles(
            scratch,
            term.weight * weights[j]!,
            term.weighti * weights[j]!,
            term.radius,
            term.radiusi,
            nodes[j]!,
            x + term.shift,
            term.shifti,
          );
        }
      }
      out.set(scratch);
    },
    passages: passagesOf(magnets, coils, tilt, middle),
  };
  return linkage;
}

interface EdgeContext {
  readonly middle: number;
  readonly offset: number;
  readonly cosine: number;
  readonly s: { readonly re: number; readonly im: number };
  readonly radius: number;
  readonly strength: number;
  readonly rule: number;
}

function edgeTerms(magnet: AxialMagnet, coil: AxialCoil, context: EdgeContext): Term[] {
  const { middle, offset, cosine, s, radius, strength, rule } = context;
  // strength / s²
  const square = s.re * s.re + s.im * s.im;
  const weight = (strength * (s.re * s.re - s.im * s.im)) / (square * square);
  const weighti = (-strength * 2 * s.re * s.im) / (square * square);
  const terms: Term[] = [];
  for (const i of [1, -1]) {
    const along = magnet.at - middle + 0.5 * i * magnet.length;
    for (const j of [1, -1]) {
      terms.push({
        weight: i * j * weight,
        weighti: i * j * weighti,
        radius: radius * s.re,
        radiusi: radius * s.im,
        shift: middle + along * s.re - coil.at + 0.5 * j * coil.length,
        shifti: along * s.im + offset * cosine,
        rule,
      });
    }
  }
  return terms;
}

/** Midway between the assembly's ends (m, for x = 0). */
function middleOf(magnets: readonly AxialMagnet[]): number {
  const low = Math.min(...magnets.map(({ at, length }) => at - length / 2));
  const high = Math.max(...magnets.map(({ at, length }) => at + length / 2));
  return 0.5 * (low + high);
}

/**
 * Midpoints needed in a quarter turn. As a function of cos α the integrand is analytic in an ellipse that reaches to
 * where the complex edge of a sheet meets a winding's radius; the ellipse's size gives the rate.
 */
function anglesFor(
  magnets: readonly AxialMagnet[],
  coils: readonly AxialCoil[],
  { offset, tilt }: Misalignment,
  middle: number,
): number {
  const sine = Math.sin(tilt);
  const cosine = Math.cos(tilt);
  let least = Infinity;
  for (const magnet of magnets) {
    for (const i of [0.5, -0.5]) {
      const lean = offset + (magnet.at - middle + i * magnet.length) * sine;
      for (const [radius] of sheetsOf(magnet)) {
        for (const coil of coils) {
          const inside = coil.innerRadius - radius * cosine;
          const gap = inside > 0 ? inside : radius * cosine - coil.outerRadius;
          if (gap > 0) least = Math.min(least, ellipseSum(gap, lean, radius * sine));
        }
      }
    }
  }
  // largest semi-axes' sum of the ellipse: rho; n midpoints in a quarter are 4n in a turn
  const rho = Math.max(least, 1.02);
  return Math.min(MOST_ANGLES, Math.max(2, Math.ceil(-Math.log(ANGLE_TOLERANCE) / (4 * Math.log(rho)))));
}

/** Smallest |c + √(c² − 1)| over the places c = (i gap − Z)/(i lean − turn), Z real. */
function ellipseSum(gap: number, lean: number, turn: number): number {
  let least = Infinity;
  for (const side of [turn, -turn]) {
    const size = lean * lean + side * side;
    if (size === 0) continue;
    for (let k = -40; k <= 40; k++) {
      const Z = (gap * k) / 10;
      // (i gap − Z)(−i lean − side)/size
      const re = (gap * lean + Z * side) / size;
      const im = (-gap * side + Z * lean) / size;
      // semi-axes' sum from the distances to the foci ±1
      const axes = 0.5 * (Math.hypot(re - 1, im) + Math.hypot(re + 1, im));
      least = Math.min(least, axes + Math.sqrt(Math.max(0, axes * axes - 1)));
    }
  }
  return least;
}

function passagesOf(
  magnets: readonly AxialMagnet[],
  coils: readonly AxialCoil[],
  tilt: number,
  middle: number,
): number[] {
  const passages: number[] = [];
  for (const magnet of magnets) {
    for (const i of [0.5, -0.5]) {
      const end = middle + (magnet.at - middle + i * magnet.length) * Math.cos(tilt);
      for (const coil of coils) passages.push(coil.at - coil.length / 2 - end, coil.at + coil.length / 2 - end);
    }
  }
  return passages;
}
