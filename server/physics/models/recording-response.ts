import type { Device, DeviceResponse, Vibration } from './device';
import type { LinearDevice } from './linear-response';
import { runLinearRecord } from './recording-linear';

type Recording = Extract<Vibration, { kind: 'recording' }>;

/** Notes that hold for every record. */
export const RECORD_NOTES = [
  'The record is taken as straight lines between its samples and the device starts at rest; figures are over the whole record.',
  'Phase and harmonic distortion are not computed, because the vibration is not a tone.',
];

/** Response of a linear device to a recording, exact for straight lines between the samples. */
export function respondToRecordingLinearly(
  device: Device,
  linear: { loaded: LinearDevice; open: LinearDevice; resistance: number },
  recording: Recording,
): DeviceResponse {
  const { acceleration, rate } = recording;
  const run = runLinearRecord(linear.loaded, acceleration, rate);
  const open = runLinearRecord(linear.open, acceleration, rate);
  const load = linear.resistance * run.current2;
  const coil = device.coilResistance * run.current2;
  const balance = run.mechanicalIn - load - coil - run.mechanicalLoss - run.stored;
  const shown = run.displacement.length;
  const every = Math.max(1, Math.ceil(acceleration.length / shown));
  return {
    response: {
      method: 'exact steps (matrix exponential)',
      converged: true,
      openCircuitEmfRms: Math.sqrt(open.emf2),
      openCircuitEmfPeak: open.emfPeak,
      emfRms: Math.sqrt(run.emf2),
      loadVoltageRms: linear.resistance * Math.sqrt(run.current2),
      loadVoltageMean: 0,
      coilCurrentRms: Math.sqrt(run.current2),
      loadPower: load,
      displacementPeak: run.displacementPeak,
      displacementRms: Math.sqrt(run.displacement2),
      phase: null,
      harmonicDistortion: null,
      stopContact: device.stops && false,
      branches: [],
    },
    power: {
      mechanicalIn: run.mechanicalIn,
      load,
      coil,
      rectifier: 0,
      converter: 0,
      mechanicalLoss: run.mechanicalLoss,
      stops: 0,
      stored: run.stored,
      residual: run.mechanicalIn !== 0 ? Math.abs(balance / run.mechanicalIn) : Math.abs(balance) > 0 ? 1 : 0,
    },
    waveforms: {
      time: Float64Array.from({ length: shown }, (_, n) => (n * every) / rate),
      displacement: run.displacement,
      emf: run.velocity.map((velocity) => linear.loaded.coupling * velocity),
      loadVoltage: run.current.map((current) => linear.resistance * current),
      coilCurrent: run.current,
    },
    solution: { harmonics: null, steps: acceleration.length - 1, residual: null },
    notes: RECORD_NOTES,
  };
}
