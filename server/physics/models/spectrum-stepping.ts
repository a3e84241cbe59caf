import type { Device, DeviceResponse, Vibration } from './device';
import { notComputed } from './not-computed';
import { whyTooLong, respondToRecordByStepping } from './record-response';
import { gaussianRecord } from './spectrum-record';

type Spectrum = Extract<Vibration, { kind: 'spectrum' }>;

/** Rate (Hz) at which a spectrum is turned into a record: eight samples a period of its top, thirty of the device's own. */
export function recordRate(device: Device, spectrum: Spectrum): number {
  const highest = spectrum.points[spectrum.points.length - 1]![0];
  const own = Math.sqrt(Math.abs(device.suspension.forceSlope(0)) / device.mass) / (2 * Math.PI);
  return Math.max(8 * highest, 30 * own);
}

/** Response of a device that is not linear to a spectrum: one seeded Gaussian record of it, stepped through from rest. */
export function respondToSpectrumByStepping(device: Device, spectrum: Spectrum): DeviceResponse {
  const rate = recordRate(device, spectrum);
  const samples = Math.round(spectrum.duration * rate) + 1;
  const tooLong = whyTooLong(device, spectrum.duration, rate);
  if (tooLong) return notComputed(tooLong);
  const record = gaussianRecord(spectrum.points, rate, Math.max(2, samples), spectrum.seed);
  const answer = respondToRecordByStepping(device, record, rate);
  const notes = [
    `The spectrum is turned into one Gaussian record of ${spectrum.duration} s at ${rate.toPrecision(5)} Hz with seed ${spectrum.seed}; another seed gives somewhat other figures.`,
    'The figures are over the whole record, which starts at rest; phase and harmonic distortion are not computed, because the vibration is not a tone.',
  ];
  return { ...answer, notes: [...notes, ...answer.notes] };
}
