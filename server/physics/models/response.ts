import type { Device, DeviceResponse, Tone, Vibration } from './device';
import { linearised } from './linear-device';
import { notComputed } from './not-computed';
import {
  respondByStepping,
  respondToRecordByStepping,
  tonesExcitation,
  whyTooLong,
  STEPS_PER_PERIOD,
} from './record-response';
import { respondToRecordingLinearly } from './recording-response';
import { openFigures, respondToPeriodByShooting } from './shooting-response';
import { respondToSpectrum } from './spectrum-response';
import { respondToSpectrumByStepping } from './spectrum-stepping';
import { respondToToneWithResistor } from './tone-response';
import { respondToTonesLinearly } from './tones-response';
import { respondToTonesByStepping } from './tones-stepping';
import { commonFrequency, mergedTones } from './vibration';

/** The response of a device to a vibration, by the method that is exact for the pair. */
export function respond(device: Device, vibration: Vibration): DeviceResponse {
  const linear = linearised(device);
  switch (vibration.kind) {
    case 'tone':
      return respondToTone(device, vibration.tone);
    case 'tones': {
      const tones = mergedTones(vibration.tones);
      if (tones.length === 1) return respondToTone(device, tones[0]!);
      return linear ? respondToTonesLinearly(device, linear, tones) : respondToSeveralTones(device, tones);
    }
    case 'spectrum':
      return linear ? respondToSpectrum(device, linear, vibration) : respondToSpectrumByStepping(device, vibration);
    case 'recording':
      return linear
        ? respondToRecordingLinearly(device, linear, vibration)
        : respondToRecordByStepping(device, vibration.acceleration, vibration.rate);
  }
}

function respondToTone(device: Device, tone: Tone): DeviceResponse {
  const { circuit } = device;
  if (circuit.kind === 'supercapacitor') {
    const tooLong = whyTooLong(device, circuit.duration, STEPS_PER_PERIOD * tone.frequency);
    if (tooLong) return notComputed(tooLong);
    const answer = respondByStepping(
      device,
      tonesExcitation([tone], circuit.duration),
      openFigures(device, [tone], tone.frequency),
    );
    const note = `The figures are means over the ${circuit.duration} s from a start at rest.`;
    return { ...answer, notes: [note, ...answer.notes] };
  }
  return circuit.kind === 'resistor' && device.stops === null
    ? respondToToneWithResistor(device, tone, circuit.resistance)
    : respondToPeriodByShooting(device, [tone], tone.frequency);
}

/** Most periods of the fastest tone within a common period that shooting goes through at once. */
const MOST_RATIO = 40;

function respondToSeveralTones(device: Device, tones: Tone[]): DeviceResponse {
  const base = commonFrequency(
    tones.map((tone) => tone.frequency),
    MOST_RATIO,
  );
  if (base !== null && device.circuit.kind !== 'supercapacitor') {
    const answer = respondToPeriodByShooting(device, tones, base);
    if (answer.response.converged) return answer;
  }
  return respondToTonesByStepping(device, tones);
}
