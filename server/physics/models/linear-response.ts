/** A linear generator on a resistance: one degree of freedom, constant coupling. SI. */
export interface LinearDevice {
  mass: number;
  damping: number;
  stiffness: number;
  /** θ, V s/m. */
  coupling: number;
  coilResistance: number;
  coilInductance: number;
  /** Load, Ω; Infinity leaves the circuit open. */
  resistance: number;
}

/** Complex answers to a base acceleration of 1 m/s² at one frequency (time factor e^{+jωt}). */
export interface Transfer {
  /** Displacement, m. */
  uRe: number;
  uIm: number;
  /** EMF, V. */
  eRe: number;
  eIm: number;
  /** Coil current, A. */
  iRe: number;
  iIm: number;
}

/**
 * Transfer from base acceleration of the linear device at ω (rad/s):
 * u = −m / (k − mω² + jω(c + θ²/(Rc + R + jωL))), e = jωθu, i = e/(Rc + R + jωL).
 * Exact; at ω = 0 the static answer.
 */
export function transferAt(device: LinearDevice, omega: number): Transfer {
  const { mass, damping, stiffness, coupling } = device;
  const resistance = device.coilResistance + device.resistance;
  const reactance = omega * device.coilInductance;
  const open = !Number.isFinite(resistance);
  const size = resistance * resistance + reactance * reactance;
  const yRe = open ? 0 : resistance / size;
  const yIm = open ? 0 : -reactance / size;
  const theta2 = coupling * coupling;
  // jω(c + θ²Y) splits into a stiffness −ωθ² Im Y and a resistance ω(c + θ² Re Y)
  const zRe = stiffness - mass * omega * omega - omega * theta2 * yIm;
  const zIm = omega * (damping + theta2 * yRe);
  const z2 = zRe * zRe + zIm * zIm;
  const uRe = (-mass * zRe) / z2;
  const uIm = (mass * zIm) / z2;
  const eRe = -omega * coupling * uIm;
  const eIm = omega * coupling * uRe;
  return { uRe, uIm, eRe, eIm, iRe: eRe * yRe - eIm * yIm, iIm: eRe * yIm + eIm * yRe };
}

/** Means of the squares and of the powers that a unit mean-square acceleration at ω causes. */
export interface Squares {
  displacement: number;
  velocity: number;
  emf: number;
  current: number;
  /** Power entering the device, W. */
  mechanicalIn: number;
}

/** The same transfer, squared: multiply by the mean square of the acceleration (m²/s⁴). */
export function squaresAt(device: LinearDevice, omega: number): Squares {
  const t = transferAt(device, omega);
  const displacement = t.uRe * t.uRe + t.uIm * t.uIm;
  return {
    displacement,
    velocity: omega * omega * displacement,
    emf: t.eRe * t.eRe + t.eIm * t.eIm,
    current: t.iRe * t.iRe + t.iIm * t.iIm,
    // −m a v: the velocity's part in phase with the acceleration
    mechanicalIn: device.mass * omega * t.uIm,
  };
}
