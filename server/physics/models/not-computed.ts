import type { DeviceResponse } from './device';

/** An answer without figures that says why. */
export function notComputed(reason: string): DeviceResponse {
  return {
    response: {
      method: 'none',
      converged: false,
      openCircuitEmfRms: null,
      openCircuitEmfPeak: null,
      emfRms: null,
      loadVoltageRms: null,
      loadVoltageMean: null,
      coilCurrentRms: null,
      loadPower: null,
      displacementPeak: null,
      displacementRms: null,
      phase: null,
      harmonicDistortion: null,
      stopContact: null,
      branches: [],
    },
    power: {
      mechanicalIn: null,
      load: null,
      coil: null,
      rectifier: null,
      converter: null,
      mechanicalLoss: null,
      stops: null,
      stored: null,
      residual: null,
    },
    waveforms: null,
    solution: { harmonics: null, steps: null, residual: null },
    notes: [reason],
  };
}
