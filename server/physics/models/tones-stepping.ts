import type { Device, DeviceResponse, Tone } from './device';
import { notComputed } from './not-computed';
import { respondByStepping, STEPS_PER_PERIOD, tonesExcitation, whyTooLong } from './record-response';
import { runRecord } from './record-run';

/** Shortest and longest time over which tones are averaged, in periods of the slowest. */
const LEAST_PERIODS = 100;
const MOST_PERIODS = 3000;
/** Decay times left for the start to die away. */
const DECAYS = 12;

/**
 * Response to several tones where something is not linear: the motion is stepped until its start has died away and then
 * averaged over many periods. Two tones close together are averaged over at least ten of their beats.
 */
export function respondToTonesByStepping(device: Device, tones: readonly Tone[]): DeviceResponse {
  const slowest = Math.min(...tones.map((tone) => tone.frequency));
  const { circuit } = device;
  let beat = slowest;
  for (const one of tones)
    for (const other of tones)
      if (other.frequency > one.frequency) beat = Math.min(beat, other.frequency - one.frequency);
  const decay = (2 * device.mass) / device.damping;
  const electrical = 'capacitance' in circuit && 'resistance' in circuit ? circuit.resistance * circuit.capacitance : 0;
  const longest = MOST_PERIODS / slowest;
  const settling = Math.min(longest, DECAYS * Math.max(decay, electrical));
  const supercapacitor = circuit.kind === 'supercapacitor';
  const duration = supercapacitor ? circuit.duration : Math.min(longest, Math.max(LEAST_PERIODS / slowest, 10 / beat));
  const fastest = Math.max(...tones.map((tone) => tone.frequency));
  const tooLong = whyTooLong(device, duration + settling, STEPS_PER_PERIOD * fastest);
  if (tooLong) return notComputed(tooLong);
  const excitation = { ...tonesExcitation(tones, duration), settling: supercapacitor ? 0 : settling };
  const open = runRecord({ ...device, coilInductance: 0 }, null, excitation, 1e-7);
  const answer = respondByStepping(device, excitation, { rms: Math.sqrt(open.mean.emf2), peak: open.emfPeak });
  const notes = [
    supercapacitor
      ? `The figures are means over the ${duration} s from a start at rest.`
      : `The figures are means over ${duration.toPrecision(4)} s after ${settling.toPrecision(4)} s of settling from rest; peaks are those met in that time.`,
    'Phase and harmonic distortion are not computed, because the vibration is not a single tone.',
  ];
  if (!supercapacitor && settling < 5 * Math.max(decay, electrical))
    notes.push('The start had not died away when the averages began: the figures depend on it.');
  return { ...answer, notes: [...notes, ...answer.notes] };
}
