/** Entries that a linkage writes: λ (V·s), θ = dλ/dx (V·s/m), dθ/dx (V·s/m²), d²θ/dx² (V·s/m³). */
export const LINKAGE_TERMS = 4;

/** Flux linkage of all coils in series with all magnets as a function of the position x of the moving assembly. */
export interface Linkage {
  /** Writes λ, θ, dθ/dx, d²θ/dx² at x (m) into out[0..3]. */
  at(x: number, out: Float64Array): void;
  /** θ alone at x (m), V·s/m. */
  couplingAt(x: number): number;
  /**
   * The same linkage made for many evaluations: within 1e-9 of the largest value, from tables that are filled where they
   * are asked for; itself where evaluation is cheap already.
   */
  tabulated(): Linkage;
  /** Positions (m) where an edge of a magnet passes an edge of a winding: there the coupling turns fastest. */
  readonly passages: readonly number[];
}
