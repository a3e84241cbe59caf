import type { Device, DeviceResponse, Tone, Vibration } from './device';
import { linearised } from './linear-device';
import { notComputed } from './not-computed';
import { isTooLong, respondByStepping, respondToRecordByStepping, tonesExcitation } from './record-response';
import { respondToRecordingLinearly } from './recording-response';
import { openFigures, respondToToneByShooting } from './shooting-response';
import { respondToSpectrum } from './spectrum-response';

import { respondToToneWithResistor } from './tone-response';
import { respondToTonesLinearly } from './tones-response';
import { mergedTones } from './vibration';

/** The response of a device to a vibration, by the method that is exact for the pair. */
export function respond(device: Device, vibration: Vibration): DeviceResponse {
  const linear = linearised(device);
  const { circuit } = device;
  switch (vibration.kind) {
    case 'tone':
      return respondToTone(device, vibration.tone);
    case 'tones': {
      const tones = mergedTones(vibration.tones);
      if (tones.length === 1) return respondToTone(device, tones[0]!);
      if (linear) return respondToTonesLinearly(device, linear, tones);
      break;
    }
    case 'spectrum':
      if (linear) return respondToSpectrum(device, linear, vibration);
      break;
    case 'recording': {
      const tooLong = isTooLong(vibration.acceleration.length);
      if (linear) return respondToRecordingLinearly(device, linear, vibration);
      return tooLong ? notComputed(tooLong) : respondToRecordByStepping(device, vibration.acceleration, vibration.rate);
    }
  }
  return notComputed(`Not computed, because there is no method yet for ${vibration.kind} into ${circuit.kind}.`);
}

function respondToTone(device: Device, tone: Tone): DeviceResponse {
  const { circuit } = device;
  if (circuit.kind === 'supercapacitor') {
    const answer = respondByStepping(device, tonesExcitation([tone], circuit.duration), openFigures(device, tone));
    const note = `The figures are means over the ${circuit.duration} s from a start at rest.`;
    return { ...answer, notes: [note, ...answer.notes] };
  }
  return circuit.kind === 'resistor' && device.stops === null
    ? respondToToneWithResistor(device, tone, circuit.resistance)
    : respondToToneByShooting(device, tone);
}
