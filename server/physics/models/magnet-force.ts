import { sheetsOf } from './axial-magnet';
import type { AxialMagnet } from './axial-magnet';
import { addCoaxialCircles, CIRCLE_TERMS } from './coaxial-circles';

/** Entries that a force writes: energy −potential (J), force (N), dF/dx (N/m), d²F/dx² (N/m²), d³F/dx³ (N/m³). */
export const FORCE_TERMS = CIRCLE_TERMS;

/** Axial force of fixed coaxial magnets on moving ones as a function of the moving assembly's position x. */
export interface AxialForce {
  /**
   * Writes W, F = dW/dx, F′, F″, F‴ at x (m) into out[0..4]; W is minus the potential energy, up to a constant. Where
   * edges of equal diameter touch, F is finite but its derivatives are not.
   */
  at(x: number, out: Float64Array): void;
}

interface EdgePair {
  readonly a: number;
  readonly b: number;
  readonly shift: number;
  readonly weight: number;
}

/**
 * Force between coaxial axially magnetised cylinders and rings, in closed form: each is one or two current sheets, and
 * the force between two sheets is a second difference of the same function of their edges as in a coil.
 *
 * @param moving magnets of the assembly, `at` for x = 0
 * @param fixed magnets in the coil's frame
 * Sign: positive pushes the assembly towards +x; like magnetisations attract. Validity: magnets do not overlap, rigid
 * magnetisation.
 * Source: W. Robertson, B. Cazzolato, A. Zander, IEEE Trans. Magn. 47 (2011) 2045.
 */
export function axialForce(moving: readonly AxialMagnet[], fixed: readonly AxialMagnet[]): AxialForce {
  const pairs: EdgePair[] = [];
  for (const m of moving) for (const f of fixed) pairs.push(...edgePairs(m, f));
  return {
    at: (x, out) => {
      out.fill(0);
      for (const { a, b, shift, weight } of pairs) addCoaxialCircles(out, weight, a, b, x + shift);
    },
  };
}

function edgePairs(m: AxialMagnet, f: AxialMagnet): EdgePair[] {
  const pairs: EdgePair[] = [];
  const strength = m.magnetisation * f.magnetisation;
  for (const [a, signA] of sheetsOf(m)) {
    for (const [b, signB] of sheetsOf(f)) {
      for (const i of [1, -1]) {
        for (const j of [1, -1]) {
          const shift = m.at - f.at + 0.5 * (i * m.length + j * f.length);
          pairs.push({ a, b, shift, weight: strength * signA * signB * i * j });
        }
      }
    }
  }
  return pairs;
}

/**
 * Force between two coaxial magnets.
 *
 * @returns N; positive pushes `moving` towards +x
 */
export function forceBetween(moving: AxialMagnet, fixed: AxialMagnet): number {
  const out = new Float64Array(FORCE_TERMS);
  axialForce([moving], [fixed]).at(0, out);
  return out[1]!;
}
