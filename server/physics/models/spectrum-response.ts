import { integrateAdaptively } from '../kernels/adaptive-quadrature';
import type { Device, DeviceResponse, Vibration } from './device';
import type { LinearDevice } from './linear-response';
import { squaresAt } from './linear-response';
import { densityAt } from './vibration';

type Spectrum = Extract<Vibration, { kind: 'spectrum' }>;

const TOLERANCE = 1e-10;

interface MeanSquares {
  displacement: number;
  velocity: number;
  emf: number;
  /** Of dEMF/dt, for the rate of crossings. */
  emfRate: number;
  current: number;
  mechanicalIn: number;
  converged: boolean;
}

/** Points where to cut the frequency axis: those of the spectrum, and a ladder about the resonance. */
function breaksOf(device: LinearDevice, spectrum: Spectrum): number[] {
  const own = Math.sqrt(device.stiffness / device.mass) / (2 * Math.PI);
  const electrical = Number.isFinite(device.resistance)
    ? device.coupling ** 2 / (device.coilResistance + device.resistance)
    : 0;
  const width = (device.damping + electrical) / (2 * Math.PI * device.mass);
  const from = spectrum.points[0]![0];
  const to = spectrum.points[spectrum.points.length - 1]![0];
  const breaks = spectrum.points.map(([f]) => f);
  for (let step = 1; step < 1e6; step *= 4) breaks.push(own - step * width, own + step * width);
  breaks.push(own);
  return [...new Set(breaks.filter((f) => f >= from && f <= to))].sort((a, b) => a - b);
}

function meanSquaresOf(device: LinearDevice, spectrum: Spectrum): MeanSquares {
  const breaks = breaksOf(device, spectrum);
  if (breaks.length < 2)
    return { displacement: 0, velocity: 0, emf: 0, emfRate: 0, current: 0, mechanicalIn: 0, converged: true };
  const { integrals, converged } = integrateAdaptively(
    (frequency, out) => {
      const density = densityAt(spectrum.points, frequency);
      const omega = 2 * Math.PI * frequency;
      const squares = squaresAt(device, omega);
      out[0] = density * squares.displacement;
      out[1] = density * squares.velocity;
      out[2] = density * squares.emf;
      out[3] = density * omega * omega * squares.emf;
      out[4] = density * squares.current;
      out[5] = density * squares.mechanicalIn;
    },
    6,
    breaks,
    TOLERANCE,
  );
  const [displacement = 0, velocity = 0, emf = 0, emfRate = 0, current = 0, mechanicalIn = 0] = integrals;
  return { displacement, velocity, emf, emfRate, current, mechanicalIn, converged };
}

/** Expected largest |value| of a stationary Gaussian signal over a time (Rice; Davenport 1964). */
export function expectedPeak(meanSquare: number, rateMeanSquare: number, duration: number): number {
  if (!(meanSquare > 0)) return 0;
  const crossings = (Math.sqrt(rateMeanSquare / meanSquare) / Math.PI) * duration;
  const reduced = Math.sqrt(2 * Math.log(Math.max(crossings, Math.E)));
  return Math.sqrt(meanSquare) * (reduced + 0.5772156649015329 / reduced);
}

/**
 * Stationary response of a linear device to Gaussian vibration of a given density, exact in the frequency domain:
 * mean squares are integrals of the density times the squared transfer functions, to 1e-10.
 */
export function respondToSpectrum(
  device: Device,
  linear: { loaded: LinearDevice; open: LinearDevice; resistance: number },
  spectrum: Spectrum,
): DeviceResponse {
  const squares = meanSquaresOf(linear.loaded, spectrum);
  const open = meanSquaresOf(linear.open, spectrum);
  const load = linear.resistance * squares.current;
  const coil = device.coilResistance * squares.current;
  const mechanicalLoss = device.damping * squares.velocity;
  const balance = squares.mechanicalIn - load - coil - mechanicalLoss;
  return {
    response: {
      method: 'frequency domain',
      converged: squares.converged && open.converged,
      openCircuitEmfRms: Math.sqrt(open.emf),
      openCircuitEmfPeak: expectedPeak(open.emf, open.emfRate, spectrum.duration),
      emfRms: Math.sqrt(squares.emf),
      loadVoltageRms: linear.resistance * Math.sqrt(squares.current),
      loadVoltageMean: 0,
      coilCurrentRms: Math.sqrt(squares.current),
      loadPower: load,
      displacementPeak: expectedPeak(squares.displacement, squares.velocity, spectrum.duration),
      displacementRms: Math.sqrt(squares.displacement),
      phase: null,
      harmonicDistortion: null,
      stopContact: device.stops && false,
      branches: [],
    },
    power: {
      mechanicalIn: squares.mechanicalIn,
      load,
      coil,
      rectifier: 0,
      converter: 0,
      mechanicalLoss,
      stops: 0,
      stored: 0,
      residual: squares.mechanicalIn > 0 ? Math.abs(balance) / squares.mechanicalIn : 0,
    },
    waveforms: null,
    solution: { harmonics: null, steps: null, residual: null },
    notes: [
      'Peaks of a random motion are the values expected as the largest within the stated duration (Rice), for Gaussian vibration.',
      'Phase and harmonic distortion are not computed, because the vibration is not a tone.',
      'The figures are those of the stationary response; waveforms are not computed, because the method works in the frequency domain.',
    ],
  };
}
