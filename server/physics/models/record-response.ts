import type { Device, DeviceResponse, Tone } from './device';
import { runLinearRecord } from './recording-linear';
import { MOST_STEPS, recordedExcitation, runRecord } from './record-run';
import type { Excitation, RecordRun } from './record-run';
import { hasConstantCoupling, isMechanicallyLinear } from './oscillator';
import { notComputed } from './not-computed';
import { modelNote } from './shooting-response';
import { rangeNotes } from './tone-response';

/** Error of a step relative to the motion. */
const TOLERANCE = 1e-7;
/** Steps that a period of the device's own, or of a tone, is likely to take. */
export const STEPS_PER_PERIOD = 60;

/** Steps a device through a recording from rest. */
export function respondToRecordByStepping(device: Device, acceleration: Float64Array, rate: number): DeviceResponse {
  const tooLong = whyTooLong(device, (acceleration.length - 1) / rate, rate);
  if (tooLong) return notComputed(tooLong);
  const excitation = recordedExcitation(acceleration, rate);
  const constant = hasConstantCoupling(device);
  if (isMechanicallyLinear(device) && constant) {
    const open = runLinearRecord(
      {
        mass: device.mass,
        damping: device.damping,
        stiffness: -device.suspension.forceSlope(0),
        coupling: device.coupling.at(device.restPosition),
        coilResistance: device.coilResistance,
        coilInductance: 0,
        resistance: Infinity,
      },
      acceleration,
      rate,
    );
    return respondByStepping(device, excitation, { rms: Math.sqrt(open.emf2), peak: open.emfPeak });
  }
  const run = runRecord({ ...device, coilInductance: 0 }, null, excitation, TOLERANCE);
  return respondByStepping(device, excitation, { rms: Math.sqrt(run.mean.emf2), peak: run.emfPeak });
}

/**
 * Why a time is too long to be stepped through, or null where it is not.
 *
 * @param duration s; @param fastest of what excites, Hz: the rate of a record, the frequency of a tone.
 */
export function whyTooLong(device: Device, duration: number, fastest: number): string | null {
  const own = Math.sqrt(Math.abs(device.suspension.forceSlope(0)) / device.mass) / (2 * Math.PI);
  const steps = duration * Math.max(fastest, STEPS_PER_PERIOD * own);
  return steps > MOST_STEPS
    ? `Not computed, because stepping through ${duration.toPrecision(4)} s would take some ${steps.toExponential(1)} steps; at most ${MOST_STEPS} are taken.`
    : null;
}

/** Steps a device from rest through an excitation; the open-circuit EMF is given. */
export function respondByStepping(
  device: Device,
  excitation: Excitation,
  open: { rms: number | null; peak: number | null },
): DeviceResponse {
  const run = runRecord(device, device.circuit, excitation, TOLERANCE);
  const coil = device.coilResistance * run.mean.current2;
  const notes = [...modelNote(device.circuit), ...rangeNotes(device, run)];
  if (!run.completed) notes.push('The motion could not be followed to the end of the record.');
  if (device.circuit.kind === 'supercapacitor') notes.push(...nodeNotes(run));
  const { mean } = run;
  const out = mean.load + coil + mean.rectifier + mean.converter + mean.mechanicalLoss + mean.stops + run.stored;
  return {
    response: {
      method: 'time stepping (implicit–explicit Runge–Kutta of order 4, step control)',
      converged: run.completed,
      openCircuitEmfRms: open.rms,
      openCircuitEmfPeak: open.peak,
      emfRms: Math.sqrt(mean.emf2),
      loadVoltageRms: Math.sqrt(mean.loadVoltage2),
      loadVoltageMean: mean.loadVoltage,
      coilCurrentRms: Math.sqrt(mean.current2),
      loadPower: mean.load,
      displacementPeak: run.displacementPeak,
      displacementRms: Math.sqrt(mean.displacement2),
      phase: null,
      harmonicDistortion: null,
      stopContact: device.stops && run.touched,
      branches: [],
    },
    power: {
      mechanicalIn: mean.mechanicalIn,
      load: mean.load,
      coil,
      rectifier: mean.rectifier,
      converter: mean.converter,
      mechanicalLoss: mean.mechanicalLoss,
      stops: mean.stops,
      stored: run.stored,
      residual: balance(mean.mechanicalIn, out),
    },
    waveforms: {
      time: run.time,
      displacement: run.displacement,
      emf: run.emf,
      loadVoltage: run.loadVoltage,
      coilCurrent: run.current,
    },
    solution: { harmonics: null, steps: run.steps, residual: null },
    notes,
  };
}

function balance(into: number, out: number): number {
  const scale = Math.max(Math.abs(into), 1e-3 * Math.abs(out));
  return scale > 0 ? Math.abs(into - out) / scale : 0;
}

function nodeNotes(run: RecordRun): string[] {
  return [
    `The terminal voltage at the end is ${run.finalVoltage.toPrecision(6)} V.`,
    'A constant leakage resistance is a crude model: the leakage of a new cell falls for days.',
  ];
}

/** Tones as an excitation over a time. */
export function tonesExcitation(tones: readonly Tone[], duration: number): Excitation {
  const parts = tones.map(({ frequency, acceleration, phase }) => ({
    omega: 2 * Math.PI * frequency,
    acceleration,
    phase,
  }));
  return {
    duration,
    corners: Infinity,
    size: tones.reduce((sum, tone) => sum + tone.acceleration, 0),
    accelerationAt: (t) => {
      let sum = 0;
      for (const { omega, acceleration, phase } of parts) sum += acceleration * Math.sin(omega * t + phase);
      return sum;
    },
  };
}
