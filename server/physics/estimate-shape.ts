/** SI; null where not computed, with the reason among the notes. */
export type Figure = number | null;

/** How much attention something asks for: worth knowing, to be weighed, or reason not to go on as it is. */
export type CautionSeverity = 'info' | 'caution' | 'stop';

/** Something that the person should know before relying on a figure or touching the device. */
export interface Caution {
  readonly code: string;
  readonly severity: CautionSeverity;
  readonly message: string;
  /** Where in the design document it has its cause; null where it has no one place. */
  readonly path: string | null;
}

/** Everything computed from one design document under one vibration. */
export interface Estimate {
  engine: string;
  /** SHA-256 over both canonical documents. */
  digest: string;
  coil: {
    resistance: Figure;
    inductance: Figure;
    wireLength: Figure;
    fillFactor: Figure;
    copperMass: Figure;
    windable: boolean | null;
  };
  mechanics: {
    movingMass: Figure;
    restPosition: Figure;
    stiffness: Figure;
    cubic: Figure;
    naturalFrequency: Figure;
    dampingCoefficient: Figure;
    quality: Figure;
  };
  curve: {
    position?: number[];
    fluxLinkage?: number[];
    coupling?: number[];
    couplingAtRest: Figure;
    couplingPeak: Figure;
    couplingPeakAt: Figure;
  };
  response: {
    method: string;
    converged: boolean;
    openCircuitEmfRms: Figure;
    openCircuitEmfPeak: Figure;
    emfRms: Figure;
    loadVoltageRms: Figure;
    loadVoltageMean: Figure;
    coilCurrentRms: Figure;
    loadPower: Figure;
    displacementPeak: Figure;
    displacementRms: Figure;
    phase: Figure;
    harmonicDistortion: Figure;
    stopContact: boolean | null;
    branches: { displacementPeak: Figure; loadPower: Figure; stable: boolean | null }[];
  };
  power: {
    mechanicalIn: Figure;
    load: Figure;
    coil: Figure;
    rectifier: Figure;
    converter: Figure;
    mechanicalLoss: Figure;
    stops: Figure;
    stored: Figure;
    residual: Figure;
  };
  bounds: {
    resonant: Figure;
    travelLimited: Figure;
    broadband: Figure;
    effectiveness: Figure;
    normalisedPowerDensity: Figure;
    bestResistiveLoad: Figure;
    bestLoadPower: Figure;
  };
  waveforms: {
    time: number[];
    displacement: number[];
    emf: number[];
    loadVoltage: number[];
    coilCurrent: number[];
  } | null;
  cautions: Caution[];
  notes: string[];
}
