import type { Device, DeviceResponse, Vibration } from './device';
import { linearised } from './linear-device';
import { respondToSpectrum } from './spectrum-response';
import { respondToToneWithResistor } from './tone-response';
import { respondToTonesLinearly } from './tones-response';
import { mergedTones } from './vibration';

/** The response of a device to a vibration, by the method that is exact for the pair. */
export function respond(device: Device, vibration: Vibration): DeviceResponse {
  const linear = linearised(device);
  switch (vibration.kind) {
    case 'tone':
      if (device.circuit.kind === 'resistor' && device.stops === null)
        return respondToToneWithResistor(device, vibration.tone, device.circuit.resistance);
      break;
    case 'tones': {
      const tones = mergedTones(vibration.tones);
      if (tones.length === 1) return respond(device, { kind: 'tone', tone: tones[0]! });
      if (linear) return respondToTonesLinearly(device, linear, tones);
      break;
    }
    case 'spectrum':
      if (linear) return respondToSpectrum(device, linear, vibration);
      break;
    case 'recording':
  }
  return notComputed(`Not computed, because there is no method yet for ${vibration.kind} into ${device.circuit.kind}.`);
}

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
