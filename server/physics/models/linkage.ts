/** Entries that a linkage writes: λ (V·s), θ = dλ/dx (V·s/m), dθ/dx (V·s/m²), d²θ/dx² (V·s/m³). */
export const LINKAGE_TERMS = 4;

/** Flux linkage of all coils in series with all magnets as a function of the position x of the moving assembly. */
export interface Linkage {
  /** Writes λ, θ, dθ/dx, d²θ/dx² at x (m) into out[0..3]. */
  at(x: number, out: Float64Array): void;
  /** Positions (m) where an edge of a magnet passes an edge of a winding: there the coupling turns fastest. */
  readonly passages: readonly number[];
}
