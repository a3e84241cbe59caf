import type { CouplingTable } from './coupling';

/**
 * Static force of the suspension on the moving assembly, gravity along the travel included, as a function of
 * u = x − restPosition (m). At u = 0 the force is zero and its slope is minus the small-signal stiffness.
 */
export interface Suspension {
  /** Force on the assembly, N: zero at rest, negative on the far side of a stable rest. */
  force(u: number): number;
  /** dF/du, N/m. */
  forceSlope(u: number): number;
  /** Potential energy −∫F du from rest, J. */
  energy(u: number): number;
  /** F = −k u − k2 u² − k3 u³ where that is exact; null for a tabulated or computed force. */
  polynomial: { k: number; k2: number; k3: number } | null;
  /** Every equilibrium relative to the rest position (0 is one of them), ascending, m. */
  equilibria: number[];
  /** Range of u in which the force is known, m; infinite for formulas. */
  from: number;
  to: number;
}

/** Elastic stops in travel coordinates x (m): in contact F = −stiffness·δ − damping·ẋ, never pulling. */
export interface Stops {
  lower: number | null;
  upper: number | null;
  /** N/m. */
  stiffness: number;
  /** N s/m. */
  damping: number;
}

/** Shockley diode with series resistance, or a fixed drop that conducts one way only. */
export type Diode =
  | {
      kind: 'shockley';
      /** A. */
      saturationCurrent: number;
      emissionCoefficient: number;
      /** Ω. */
      seriesResistance: number;
      /** V; kT/q at the diode's temperature. */
      thermalVoltage: number;
    }
  | { kind: 'drop'; drop: number };

/** A node that wakes once per period: the burst comes first, and below the minimum voltage it draws nothing. */
export interface NodeLoad {
  sleepCurrent: number;
  activeCurrent: number;
  activeTime: number;
  period: number;
  minimumVoltage: number;
}

/** What the coil's terminals see. SI throughout. */
export type Circuit =
  | { kind: 'resistor'; resistance: number }
  | { kind: 'bridge'; resistance: number; capacitance: number; diode: Diode }
  | { kind: 'doubler'; resistance: number; capacitance: number; diode: Diode }
  | { kind: 'store'; voltage: number; diode: Diode }
  | { kind: 'tracker'; inputResistance: number; startVoltage: number; efficiency: number; diode: Diode }
  | {
      kind: 'supercapacitor';
      capacitance: number;
      seriesResistance: number;
      leakageResistance: number;
      initialVoltage: number;
      diode: Diode;
      node: NodeLoad;
      duration: number;
    };

/** One generator as the solvers see it: no magnets, no turns, only what enters the equations of motion. SI. */
export interface Device {
  mass: number;
  /** Viscous coefficient c, N s/m. */
  damping: number;
  /** N s²/m²; force −q|ẋ|ẋ. */
  quadraticDrag: number;
  suspension: Suspension;
  /** x at rest, m. */
  restPosition: number;
  stops: Stops | null;
  /** θ(x) with its slope and flux linkage, in travel coordinates x. */
  coupling: CouplingTable;
  coilResistance: number;
  coilInductance: number;
  circuit: Circuit;
}

/** a(t) = acceleration · sin(2π frequency t + phase); acceleration is the peak in m/s². */
export interface Tone {
  frequency: number;
  acceleration: number;
  phase: number;
}

/** Base acceleration, canonical: peaks in m/s², one-sided densities in (m/s²)²/Hz, recordings in m/s². */
export type Vibration =
  | { kind: 'tone'; tone: Tone }
  | { kind: 'tones'; tones: Tone[] }
  | { kind: 'spectrum'; points: [frequency: number, density: number][]; duration: number; seed: number }
  | { kind: 'recording'; rate: number; acceleration: Float64Array };

/** One steady response of period one. */
export interface Branch {
  displacementPeak: number;
  loadPower: number;
  stable: boolean;
}

/** SI numbers; null where not computed, with the reason among the notes. */
export interface Response {
  method: string;
  converged: boolean;
  openCircuitEmfRms: number | null;
  openCircuitEmfPeak: number | null;
  emfRms: number | null;
  loadVoltageRms: number | null;
  loadVoltageMean: number | null;
  coilCurrentRms: number | null;
  loadPower: number | null;
  /** Largest excursion from the rest position, m. */
  displacementPeak: number | null;
  /** rms of the excursion from the rest position, its mean included, m. */
  displacementRms: number | null;
  /** Of displacement relative to base acceleration, rad, in (−π, π]. */
  phase: number | null;
  /** rms of the EMF's harmonics above the first over its first, under load. */
  harmonicDistortion: number | null;
  /** True where a stop is touched; null without stops. */
  stopContact: boolean | null;
  branches: Branch[];
}

/** Means over the period or the record, W; `residual` is the unbalanced part over `mechanicalIn`. */
export interface Power {
  mechanicalIn: number | null;
  load: number | null;
  coil: number | null;
  rectifier: number | null;
  converter: number | null;
  mechanicalLoss: number | null;
  stops: number | null;
  stored: number | null;
  residual: number | null;
}

export interface Waveforms {
  /** s; one period for a tone, an even selection of a record otherwise. */
  time: Float64Array;
  /** From the rest position, m. */
  displacement: Float64Array;
  emf: Float64Array;
  loadVoltage: Float64Array;
  coilCurrent: Float64Array;
}

/** How the answer was reached, for the record. */
export interface Solution {
  /** Harmonics of the balance; null where it was not one. */
  harmonics: number | null;
  /** Time steps taken; null where there were none. */
  steps: number | null;
  /** Largest residual of the equations solved, relative to the drive; null where exact by construction. */
  residual: number | null;
}

/** All that one device does under one vibration. */
export interface DeviceResponse {
  response: Response;
  power: Power;
  waveforms: Waveforms | null;
  solution: Solution;
  notes: string[];
}
