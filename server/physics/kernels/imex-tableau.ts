/**
 * Additive Runge–Kutta pair of order 4 with an embedded third order: an explicit and an L-stable, stiffly accurate
 * implicit tableau on the same six nodes with the same weights; the first implicit stage is explicit.
 * Source: Kennedy & Carpenter, Appl. Numer. Math. 44 (2003) 139, ARK4(3)6L[2]SA.
 */
export const STAGES = 6;

/** Diagonal of the implicit tableau. */
export const GAMMA = 1 / 4;

export const NODES = Float64Array.of(0, 1 / 2, 83 / 250, 31 / 50, 17 / 20, 1);

/** Row-major 6 × 6, strictly lower triangular. */
export const EXPLICIT = Float64Array.of(
  ...[0, 0, 0, 0, 0, 0],
  ...[1 / 2, 0, 0, 0, 0, 0],
  ...[13861 / 62500, 6889 / 62500, 0, 0, 0, 0],
  ...[-116923316275 / 2393684061468, -2731218467317 / 15368042101831, 9408046702089 / 11113171139209, 0, 0, 0],
  ...[
    -451086348788 / 2902428689909,
    -2682348792572 / 7519795681897,
    12662868775082 / 11960479115383,
    3355817975965 / 11060851509271,
    0,
    0,
  ],
  ...[
    647845179188 / 3216320057751,
    73281519250 / 8382639484533,
    552539513391 / 3454668386233,
    3354512671639 / 8306763924573,
    4040 / 17871,
    0,
  ],
);

/** Row-major 6 × 6, lower triangular with γ on the diagonal from the second row. */
export const IMPLICIT = Float64Array.of(
  ...[0, 0, 0, 0, 0, 0],
  ...[1 / 4, 1 / 4, 0, 0, 0, 0],
  ...[8611 / 62500, -1743 / 31250, 1 / 4, 0, 0, 0],
  ...[5012029 / 34652500, -654441 / 2922500, 174375 / 388108, 1 / 4, 0, 0],
  ...[15267082809 / 155376265600, -71443401 / 120774400, 730878875 / 902184768, 2285395 / 8070912, 1 / 4, 0],
  ...[82889 / 524892, 0, 15625 / 83664, 69875 / 102672, -2260 / 8211, 1 / 4],
);

/** Weights of the fourth-order result, shared by both tableaux. */
export const WEIGHTS = Float64Array.of(82889 / 524892, 0, 15625 / 83664, 69875 / 102672, -2260 / 8211, 1 / 4);

/** Weights of the fourth order less those of the embedded third: the error of a step. */
export const ERROR_WEIGHTS = Float64Array.of(
  82889 / 524892 - 4586570599 / 29645900160,
  0,
  15625 / 83664 - 178811875 / 945068544,
  69875 / 102672 - 814220225 / 1159782912,
  -2260 / 8211 + 3700637 / 11593932,
  1 / 4 - 61727 / 225920,
);
