import { addCoaxialCircles, CIRCLE_TERMS } from './coaxial-circles';

/** Width of a panel in the stretched variable at which the quintic's error is below 1e-9 of the largest flux. */
const WIDEST_STEP = 0.09;
/** Distance covered in the stretched variable: ten thousand million gaps. */
const REACH = 24;
const COEFFICIENTS = 6;

/** The function Ψ of one edge of a sheet against one edge of a winding, tabulated over their axial distance. */
export interface EdgeProfile {
  /** Adds weight × (Ψ, Ψ′, Ψ″, Ψ‴) at axial distance u (m) to out[0..3]. */
  addAt(out: Float64Array, weight: number, u: number): void;
  /** Ψ′ alone: the flux, of which the coupling is made. */
  fluxAt(u: number): number;
}

/**
 * Tabulates Ψ(u) = Σ_j w_j G(a, r_j, u) on demand, as quintics in t = asinh(u/gap).
 *
 * The singular points of Ψ lie on the imaginary axis at a distance of `gap` and beyond; in t they lie on the lines
 * Im t = ±π/2, so that one step serves every distance. Ψ is even. Panels are made when first asked for and depend on
 * nothing but their place.
 *
 * @param sheetRadius a (m)
 * @param radius, weight rule over the winding's radius
 * @param gap least distance of the sheet's radius from the winding (m), positive
 * @param differences product of the lengths over which second differences of Ψ will be taken, over gap² (1 where they
 *   are long): short windings are small differences of large values, and the step shrinks with their sixth root
 * @throws RangeError where gap is not positive
 */
export function edgeProfile(
  sheetRadius: number,
  radius: Float64Array,
  weight: Float64Array,
  gap: number,
  differences: number,
): EdgeProfile {
  if (!(gap > 0)) throw new RangeError(`gap must be positive, got ${gap} m`);
  const step = WIDEST_STEP * Math.min(1, Math.max(differences, 1e-9)) ** (1 / 6);
  const panels = Math.ceil(REACH / step);
  const made = new Uint8Array(panels);
  const potential = new Float64Array(COEFFICIENTS * panels);
  const flux = new Float64Array(COEFFICIENTS * panels);
  const known = new Uint8Array(panels + 1);
  // value, slope and curvature along t, per step, of Ψ and Ψ′ at each node
  const potentialJets = new Float64Array(3 * (panels + 1));
  const fluxJets = new Float64Array(3 * (panels + 1));
  const sample = new Float64Array(CIRCLE_TERMS);

  const know = (node: number): void => {
    if (known[node] !== 0) return;
    const u = gap * Math.sinh(node * step);
    const stretch = gap * Math.cosh(node * step) * step;
    sample.fill(0);
    for (let j = 0; j < radius.length; j++) addCoaxialCircles(sample, weight[j]!, sheetRadius, radius[j]!, u);
    const F = sample[1]!;
    const M = sample[2]!;
    const k = 3 * node;
    potentialJets[k] = sample[0]!;
    potentialJets[k + 1] = F * stretch;
    potentialJets[k + 2] = M * stretch * stretch + F * u * step * step;
    fluxJets[k] = F;
    fluxJets[k + 1] = M * stretch;
    fluxJets[k + 2] = sample[3]! * stretch * stretch + M * u * step * step;
    known[node] = 1;
  };
  const make = (panel: number): void => {
    know(panel);
    know(panel + 1);
    quintic(potential, panel * COEFFICIENTS, potentialJets, 3 * panel);
    quintic(flux, panel * COEFFICIENTS, fluxJets, 3 * panel);
    made[panel] = 1;
  };
  const panelAt = (share: number): number => {
    const panel = share | 0;
    if (panel >= panels) throw new RangeError(`distance must be within the profile, is ${share} steps out`);
    if (made[panel] === 0) make(panel);
    return panel;
  };

  return {
    addAt: (out, scale, u) => {
      const size = Math.abs(u) / gap;
      const root = Math.sqrt(1 + size * size);
      const share = Math.log(size + root) / step;
      const panel = panelAt(share);
      const s = share - panel;
      const j = panel * COEFFICIENTS;
      const c = flux;
      const value = c[j]! + s * (c[j + 1]! + s * (c[j + 2]! + s * (c[j + 3]! + s * (c[j + 4]! + s * c[j + 5]!))));
      const first =
        (c[j + 1]! + s * (2 * c[j + 2]! + s * (3 * c[j + 3]! + s * (4 * c[j + 4]! + s * 5 * c[j + 5]!)))) / step;
      const second = (2 * c[j + 2]! + s * (6 * c[j + 3]! + s * (12 * c[j + 4]! + s * 20 * c[j + 5]!))) / (step * step);
      const g = potential;
      const stretch = gap * root;
      const slope = first / stretch;
      const curvature = (second - (first * size) / root) / (stretch * stretch);
      out[0]! +=
        scale * (g[j]! + s * (g[j + 1]! + s * (g[j + 2]! + s * (g[j + 3]! + s * (g[j + 4]! + s * g[j + 5]!)))));
      out[1]! += u < 0 ? -scale * value : scale * value;
      out[2]! += scale * slope;
      out[3]! += u < 0 ? -scale * curvature : scale * curvature;
    },
    fluxAt: (u) => {
      const size = Math.abs(u) / gap;
      const share = Math.log(size + Math.sqrt(1 + size * size)) / step;
      const panel = panelAt(share);
      const s = share - panel;
      const j = panel * COEFFICIENTS;
      const c = flux;
      const value = c[j]! + s * (c[j + 1]! + s * (c[j + 2]! + s * (c[j + 3]! + s * (c[j + 4]! + s * c[j + 5]!))));
      return u < 0 ? -value : value;
    },
  };
}

/** Coefficients in s = 0…1 of the quintic with value, slope and curvature (per unit of s) of two jets in a row. */
function quintic(out: Float64Array, at: number, jets: Float64Array, first: number): void {
  const y0 = jets[first]!;
  const d0 = jets[first + 1]!;
  const e0 = 0.5 * jets[first + 2]!;
  const rise = jets[first + 3]! - y0;
  const d1 = jets[first + 4]!;
  const e1 = 0.5 * jets[first + 5]!;
  out[at] = y0;
  out[at + 1] = d0;
  out[at + 2] = e0;
  out[at + 3] = 10 * rise - 6 * d0 - 4 * d1 - 3 * e0 + e1;
  out[at + 4] = -15 * rise + 8 * d0 + 7 * d1 + 3 * e0 - 2 * e1;
  out[at + 5] = 6 * rise - 3 * (d0 + d1) - e0 + e1;
}
