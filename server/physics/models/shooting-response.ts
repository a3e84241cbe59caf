import { uniformRandom } from '../kernels/random';
import { circuitModel } from './circuit-model';
import type { CircuitModel } from './circuit-model';
import type { Circuit, Device, DeviceResponse, Tone, Waveforms } from './device';
import { Motion } from './motion';
import { refinedPeak } from './orbit-figures';
import { isMechanicallyLinear } from './oscillator';
import { periodicDrive, shoot } from './periodic-motion';
import type { PeriodicDrive, PeriodicMotion, PeriodStart } from './periodic-motion';
import { balancedVoltage, sinusoidalStart } from './rectified-start';
import { phaseOf, rangeNotes, steadyOrbits } from './tone-response';

/** Error of a step relative to the motion; the cases come out to about this. */
const TOLERANCE = 1e-8;
const RANDOM_STARTS = 6;
/** Periods that a start is left to itself before Newton takes over. */
const SETTLING = 12;

/** Starts of shooting from the steady orbits of a device with a resistance in place of its circuit. */
function startsFromOrbits(device: Device, circuit: CircuitModel, tone: Tone, resistance: number): PeriodStart[] {
  const free = { ...device, stops: null };
  return steadyOrbits(free, tone, resistance).all.map((orbit) => {
    const at = (n: number, points: number): { u: number; v: number } => {
      let u = orbit.displacement[0]!;
      let v = 0;
      for (let k = 1; k + 1 < orbit.displacement.length; k += 2) {
        const rate = (k + 1) / 2;
        const [c, s] = [orbit.displacement[k]!, orbit.displacement[k + 1]!];
        const [cosine, sine] = [
          Math.cos((2 * Math.PI * rate * n) / points),
          Math.sin((2 * Math.PI * rate * n) / points),
        ];
        u += c * cosine + s * sine;
        v += orbit.omega * rate * (s * cosine - c * sine);
      }
      return { u, v };
    };
    const emf = Float64Array.from({ length: 64 }, (_, n) => {
      const { u, v } = at(n, 64);
      return device.coupling.at(device.restPosition + u) * v;
    });
    const voltage = balancedVoltage(device, circuit, emf);
    return { ...at(0, 1), current: 0, voltage: Array.from({ length: circuit.capacitors }, () => voltage) };
  });
}

/** Lets a start run for some periods. */
function settled(
  device: Device,
  circuit: CircuitModel,
  drive: PeriodicDrive,
  start: PeriodStart,
  periods: number,
): PeriodStart {
  const { omega, period, accelerationAt } = drive;
  const size = Math.max(Math.hypot(start.u, start.v / omega), drive.size / (omega * omega));
  const motion = new Motion(device, circuit, accelerationAt, {
    tolerance: 1e-6,
    period: (2 * Math.PI) / omega,
    most: 2000 * periods,
    smallest: 0.1 * size,
  });
  motion.place(0, start.u, start.v, start.current, start.voltage);
  if (!motion.advance(periods * period, (0.04 * Math.PI) / omega)) return start;
  return { u: motion.u, v: motion.v, current: motion.current, voltage: [...motion.voltage] };
}

/** Every place to start shooting from. */
function startsFor(
  device: Device,
  circuit: CircuitModel,
  tone: Tone,
  drive: PeriodicDrive,
  thorough: boolean,
): PeriodStart[] {
  const { stops, restPosition } = device;
  const linear = isMechanicallyLinear({ ...device, stops: null });
  const starts: PeriodStart[] = [];
  if (linear) starts.push(sinusoidalStart({ ...device, stops: null }, circuit, tone));
  else {
    starts.push(...startsFromOrbits(device, circuit, tone, Infinity));
    // once more with what the circuit takes, as a resistance; a tenth of the coil's pull is a fair middle
    starts.push(...startsFromOrbits(device, circuit, tone, matchedResistance(device)));
  }
  if (!stops) return starts;
  const omega = 2 * Math.PI * tone.frequency;
  const gap = Math.min(
    stops.upper === null ? Infinity : Math.abs(stops.upper - restPosition),
    stops.lower === null ? Infinity : Math.abs(restPosition - stops.lower),
  );
  const reach = Math.max(...starts.map((start) => Math.hypot(start.u, start.v / omega)), gap);
  const bounded = starts.map((start): PeriodStart => {
    const size = Math.hypot(start.u, start.v / omega);
    const share = size > gap ? gap / size : 1;
    return { ...start, u: start.u * share, v: start.v * share };
  });
  const zero = { u: 0, v: 0, current: 0, voltage: starts[0]?.voltage ?? [] };
  const random = uniformRandom(2);
  const thrown = Array.from({ length: RANDOM_STARTS }, (): PeriodStart => {
    const u = gap * (2 * random() - 1);
    const v = omega * Math.min(reach, 4 * gap) * (2 * random() - 1);
    return { u, v, current: 0, voltage: zero.voltage };
  });
  const plain = [...bounded, settled(device, circuit, drive, zero, 4 * SETTLING)];
  if (!thorough) return plain;
  return [
    ...plain,
    ...bounded.map((start) => settled(device, circuit, drive, start, SETTLING)),
    ...thrown.map((start) => settled(device, circuit, drive, start, SETTLING)),
  ];
}

/** Load that would draw most at resonance, Rc + θ²/c, as a stand-in for a circuit. */
function matchedResistance(device: Device): number {
  const theta = device.coupling.at(device.restPosition);
  return device.coilResistance + (theta * theta) / device.damping;
}

/** All motions of the common period that shooting reaches, by size. */
function periodicMotions(
  device: Device,
  circuit: CircuitModel,
  tones: readonly Tone[],
  frequency: number,
  thorough: boolean,
): PeriodicMotion[] {
  const drive = periodicDrive(tones, frequency);
  const { omega } = drive;
  const found: PeriodicMotion[] = [];
  const strongest = tones.reduce((best, tone) => (tone.acceleration > best.acceleration ? tone : best));
  const starts = startsFor(device, circuit, strongest, drive, thorough);
  // what several tones do together is only known after a while of it
  const several = tones.length > 1;
  for (const first of starts) {
    const start = several ? settled(device, circuit, drive, first, decayPeriods(device, drive.period)) : first;
    const motion = shoot(device, circuit, drive, start, TOLERANCE);
    if (!motion.converged) continue;
    const size = motion.displacementPeak;
    const known = found.some(
      (other) =>
        Math.hypot(motion.start.u - other.start.u, (motion.start.v - other.start.v) / omega) <
        1e-5 * Math.max(size, other.displacementPeak),
    );
    if (!known) found.push(motion);
  }
  return found.sort((a, b) => a.displacementPeak - b.displacementPeak);
}

/** Periods in which a free motion all but dies, at most 100. */
function decayPeriods(device: Device, period: number): number {
  return Math.ceil(Math.min(100, (6 * device.mass) / (device.damping * period)));
}

/** Fundamental (cos, sin) and rms of the harmonics above it. */
function harmonicsOf(values: Float64Array): { cosine: number; sine: number; above: number; rms: number } {
  const n = values.length;
  let [mean, cosine, sine, square] = [0, 0, 0, 0];
  for (let k = 0; k < n; k++) {
    mean += values[k]! / n;
    cosine += (2 * values[k]! * Math.cos((2 * Math.PI * k) / n)) / n;
    sine += (2 * values[k]! * Math.sin((2 * Math.PI * k) / n)) / n;
    square += (values[k]! * values[k]!) / n;
  }
  const above = square - mean * mean - 0.5 * (cosine * cosine + sine * sine);
  return { cosine, sine, above: Math.sqrt(Math.max(0, above)), rms: Math.sqrt(square) };
}

const waveformsOf = (motion: PeriodicMotion): Waveforms => ({
  time: motion.time,
  displacement: motion.displacement,
  emf: motion.emf,
  loadVoltage: motion.loadVoltage,
  coilCurrent: motion.current,
});

/** The circuit named for people. */
export function modelNote(circuit: Circuit): string[] {
  if (circuit.kind === 'resistor') return [];
  const diode =
    circuit.diode.kind === 'drop'
      ? `a fixed drop of ${circuit.diode.drop} V`
      : 'the Shockley equation with series resistance';
  const notes = [
    `The diodes follow ${diode}; four make the bridge${circuit.kind === 'doubler' ? ', two the doubler' : ''}.`,
  ];
  if (circuit.kind === 'doubler') notes[0] = `The two diodes of the doubler follow ${diode}.`;
  if (circuit.kind === 'tracker')
    notes.push(
      'The load voltage shown is that at the input of the converter, which holds it at the start voltage where drawing more would pull it below.',
    );
  return notes;
}

/**
 * Steady response to a tone, or to tones with a common frequency (Hz) of which all are whole multiples, where stops or a rectifying circuit make the equations switch: shooting from several starts.
 * A motion that never repeats is not averaged into figures: the answer says so.
 */
export function respondToPeriodByShooting(device: Device, tones: readonly Tone[], frequency: number): DeviceResponse {
  const circuit = circuitModel(device.circuit);
  const motions = periodicMotions(device, circuit, tones, frequency, true);
  const open = openFigures(device, tones, frequency);
  const tone = tones.length === 1 ? tones[0]! : null;
  const stable = motions.find((motion) => motion.stable);
  const headline = stable ?? motions[0] ?? null;
  const notes = [...modelNote(device.circuit), ...open.notes];
  if (!headline)
    notes.push('Steady figures are not computed, because no motion that repeats every period of the tone was found.');
  else if (!stable)
    notes.push('No steady response of period one is stable: the device moves otherwise; the smallest is shown.');
  if (motions.length > 1)
    notes.push(
      `${motions.length} steady responses coexist; the figures are of the smallest stable one, which a start from rest may well settle on.`,
    );
  if (headline && (device.stops !== null || !isMechanicallyLinear({ ...device, stops: null })))
    notes.push(
      'Responses were sought from several starts; more may exist, and only those that repeat every period of the tone are listed.',
    );
  if (!tone) notes.push('Phase and harmonic distortion are not computed, because the vibration is not a single tone.');
  notes.push(...rangeNotes(device, headline));
  const coil = headline && device.coilResistance * headline.mean.current2;
  const emf = headline && harmonicsOf(headline.emf);
  const first = emf && Math.hypot(emf.cosine, emf.sine) / Math.SQRT2;
  const distorted = emf !== null && first !== null && first > 1e-6 * emf.rms;
  const displaced = headline && harmonicsOf(headline.displacement);
  return {
    response: {
      method: 'shooting',
      converged: headline?.converged ?? false,
      openCircuitEmfRms: open.rms,
      openCircuitEmfPeak: open.peak,
      emfRms: headline && Math.sqrt(headline.mean.emf2),
      loadVoltageRms: headline && Math.sqrt(headline.mean.loadVoltage2),
      loadVoltageMean: headline?.mean.loadVoltage ?? null,
      coilCurrentRms: headline && Math.sqrt(headline.mean.current2),
      loadPower: headline?.mean.load ?? null,
      displacementPeak: headline?.displacementPeak ?? null,
      displacementRms: headline && Math.sqrt(headline.mean.displacement2),
      phase: tone && displaced && phaseOf({ displacement: Float64Array.of(0, displaced.cosine, displaced.sine) }, tone),
      harmonicDistortion: tone && distorted ? emf.above / first : null,
      stopContact: device.stops && headline ? headline.touched : null,
      branches: motions.map((motion) => ({
        displacementPeak: motion.displacementPeak,
        loadPower: motion.mean.load,
        stable: motion.stable,
      })),
    },
    power: {
      mechanicalIn: headline?.mean.mechanicalIn ?? null,
      load: headline?.mean.load ?? null,
      coil,
      rectifier: headline?.mean.rectifier ?? null,
      converter: headline?.mean.converter ?? null,
      mechanicalLoss: headline?.mean.mechanicalLoss ?? null,
      stops: headline?.mean.stops ?? null,
      stored: headline?.stored ?? null,
      residual: headline && coil !== null ? balance(headline, coil) : null,
    },
    waveforms: headline && waveformsOf(headline),
    solution: { harmonics: null, steps: headline?.steps ?? null, residual: headline?.residual ?? null },
    notes,
  };
}

function balance(motion: PeriodicMotion, coil: number): number {
  const { mechanicalIn, load, rectifier, converter, mechanicalLoss, stops } = motion.mean;
  const rest = mechanicalIn - load - coil - rectifier - converter - mechanicalLoss - stops - motion.stored;
  return mechanicalIn !== 0 ? Math.abs(rest / mechanicalIn) : Math.abs(rest) > 0 ? 1 : 0;
}

/** EMF with the circuit open. */
export function openFigures(
  device: Device,
  tones: readonly Tone[],
  frequency: number,
): { rms: number | null; peak: number | null; notes: string[] } {
  if (device.stops === null && tones.length === 1) {
    const { headline } = steadyOrbits(device, tones[0]!, Infinity);
    if (!headline) return { rms: null, peak: null, notes: ['No steady response with the circuit open was found.'] };
    const samples = openEmf(device, headline);
    const square = samples.reduce((sum, e) => sum + e * e, 0) / samples.length;
    return { rms: Math.sqrt(square), peak: refinedPeak(samples), notes: [] };
  }
  const motions = periodicMotions({ ...device, coilInductance: 0 }, circuitModel(null), tones, frequency, false);
  const headline = motions.find((motion) => motion.stable) ?? null;
  if (!headline)
    return { rms: null, peak: null, notes: ['Open-circuit EMF is not computed, because no steady motion was found.'] };
  return { rms: Math.sqrt(headline.mean.emf2), peak: refinedPeak(headline.emf), notes: [] };
}

function openEmf(device: Device, orbit: { displacement: Float64Array; omega: number }): Float64Array {
  const points = 1024;
  const out = new Float64Array(points);
  for (let n = 0; n < points; n++) {
    let u = orbit.displacement[0]!;
    let v = 0;
    for (let k = 1; k + 1 < orbit.displacement.length; k += 2) {
      const rate = (k + 1) / 2;
      const angle = (2 * Math.PI * rate * n) / points;
      const [c, s] = [orbit.displacement[k]!, orbit.displacement[k + 1]!];
      u += c * Math.cos(angle) + s * Math.sin(angle);
      v += orbit.omega * rate * (s * Math.cos(angle) - c * Math.sin(angle));
    }
    out[n] = device.coupling.at(device.restPosition + u) * v;
  }
  return out;
}
