import type { Device, DeviceResponse, Tone } from './device';
import { squaresAt, transferAt } from './linear-response';
import type { LinearDevice } from './linear-response';
import { commonFrequency, mergedTones } from './vibration';

/** Most periods of the fastest tone within a common period that is still looked through point by point. */
const MOST_PERIODS = 400;
const POINTS_PER_PERIOD = 32;
const SHOWN = 1024;

interface Sums {
  displacement: number;
  velocity: number;
  emf: number;
  current: number;
  mechanicalIn: number;
}

function sumsOf(device: LinearDevice, tones: readonly Tone[]): Sums {
  const sums = { displacement: 0, velocity: 0, emf: 0, current: 0, mechanicalIn: 0 };
  for (const tone of tones) {
    const squares = squaresAt(device, 2 * Math.PI * tone.frequency);
    const meanSquare = 0.5 * tone.acceleration * tone.acceleration;
    sums.displacement += meanSquare * squares.displacement;
    sums.velocity += meanSquare * squares.velocity;
    sums.emf += meanSquare * squares.emf;
    sums.current += meanSquare * squares.current;
    sums.mechanicalIn += meanSquare * squares.mechanicalIn;
  }
  return sums;
}

/** Displacement, EMF and current of each tone as amplitude and phase, added up at given times. */
function signalsOf(
  device: LinearDevice,
  tones: readonly Tone[],
  time: Float64Array,
): Record<'u' | 'e' | 'i', Float64Array> {
  const out = { u: new Float64Array(time.length), e: new Float64Array(time.length), i: new Float64Array(time.length) };
  for (const { frequency, acceleration, phase } of tones) {
    const omega = 2 * Math.PI * frequency;
    const t = transferAt(device, omega);
    for (let n = 0; n < time.length; n++) {
      // a = Im(A e^{j(ωt + φ)})
      const c = acceleration * Math.cos(omega * time[n]! + phase);
      const s = acceleration * Math.sin(omega * time[n]! + phase);
      out.u[n]! += t.uRe * s + t.uIm * c;
      out.e[n]! += t.eRe * s + t.eIm * c;
      out.i[n]! += t.iRe * s + t.iIm * c;
    }
  }
  return out;
}

const largest = (values: Float64Array): number => values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);

/**
 * Steady response of a linear device to several tones: phasors, added in power where the frequencies differ. With a
 * common period the peaks are those over it; without one they are the sum of the amplitudes, which the motion comes
 * arbitrarily close to.
 */
export function respondToTonesLinearly(
  device: Device,
  linear: { loaded: LinearDevice; open: LinearDevice; resistance: number },
  stated: readonly Tone[],
): DeviceResponse {
  const tones = mergedTones(stated).filter((tone) => tone.acceleration > 0 || stated.length === 1);
  const frequencies = tones.map((tone) => tone.frequency);
  const base = commonFrequency(frequencies, MOST_PERIODS);
  const sums = sumsOf(linear.loaded, tones);
  const open = sumsOf(linear.open, tones);
  const amplitudes = (of: LinearDevice, kind: 'displacement' | 'emf'): number =>
    tones.reduce(
      (sum, tone) => sum + tone.acceleration * Math.sqrt(squaresAt(of, 2 * Math.PI * tone.frequency)[kind]),
      0,
    );
  const notes: string[] = [];
  let displacementPeak = amplitudes(linear.loaded, 'displacement');
  let emfPeak = amplitudes(linear.open, 'emf');
  const fastest = Math.max(...frequencies);
  if (base !== null && tones.length > 1) {
    const count = Math.round(fastest / base) * POINTS_PER_PERIOD * 4;
    const time = Float64Array.from({ length: count }, (_, n) => n / (base * count));
    displacementPeak = largest(signalsOf(linear.loaded, tones, time).u);
    emfPeak = largest(signalsOf(linear.open, tones, time).e);
  } else if (tones.length > 1)
    notes.push(
      'The tones have no common period: peaks are sums of amplitudes, which the motion comes arbitrarily close to.',
    );
  const span = base !== null ? 1 / base : 20 / Math.min(...frequencies);
  const points = Math.min(8 * SHOWN, Math.max(256, Math.ceil(span * fastest * POINTS_PER_PERIOD)));
  const time = Float64Array.from({ length: points }, (_, n) => (span * n) / points);
  const signals = signalsOf(linear.loaded, tones, time);
  const load = linear.resistance * sums.current;
  const coil = device.coilResistance * sums.current;
  const mechanicalLoss = device.damping * sums.velocity;
  const balance = sums.mechanicalIn - load - coil - mechanicalLoss;
  notes.push('Phase and harmonic distortion are not computed, because the vibration is not a single tone.');
  return {
    response: {
      method: 'phasors',
      converged: true,
      openCircuitEmfRms: Math.sqrt(open.emf),
      openCircuitEmfPeak: emfPeak,
      emfRms: Math.sqrt(sums.emf),
      loadVoltageRms: linear.resistance * Math.sqrt(sums.current),
      loadVoltageMean: 0,
      coilCurrentRms: Math.sqrt(sums.current),
      loadPower: load,
      displacementPeak,
      displacementRms: Math.sqrt(sums.displacement),
      phase: null,
      harmonicDistortion: null,
      stopContact: device.stops && false,
      branches: [{ displacementPeak, loadPower: load, stable: true }],
    },
    power: {
      mechanicalIn: sums.mechanicalIn,
      load,
      coil,
      rectifier: 0,
      converter: 0,
      mechanicalLoss,
      stops: 0,
      stored: 0,
      residual: sums.mechanicalIn > 0 ? Math.abs(balance) / sums.mechanicalIn : 0,
    },
    waveforms: {
      time,
      displacement: signals.u,
      emf: signals.e,
      loadVoltage: signals.i.map((current) => linear.resistance * current),
      coilCurrent: signals.i,
    },
    solution: { harmonics: null, steps: null, residual: null },
    notes,
  };
}
