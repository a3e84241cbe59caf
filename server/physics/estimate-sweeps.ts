import { parseDesignDocument } from './design-document';
import type { DesignDocument } from './design-document';
import { DocumentError } from './document-error';
import { prepareDevice } from './estimate-device';
import type { Estimate, Figure } from './estimate-shape';
import { vibrationOf } from './estimate-vibration';
import type { Device, Tone } from './models/device';
import { respond } from './models/response';
import { windingsOf } from './models/winding';
import { parseVibrationDocument } from './vibration-document';

/** Most points of a sweep. */
export const mostSweepPoints = 2001;

/** One point of a sweep: the figures of the headline response, and of every steady response that coexists with it. */
export interface SweepPoint {
  /** What was swept: Hz, Ω or V. */
  readonly at: number;
  readonly loadPower: Figure;
  readonly loadVoltageRms: Figure;
  readonly displacementPeak: Figure;
  readonly branches: readonly {
    readonly loadPower: number;
    readonly displacementPeak: number;
    readonly stable: boolean;
  }[];
}

interface Driven {
  readonly document: DesignDocument;
  readonly device: Device;
  readonly tone: Tone;
}

const coilResistanceOf = (document: DesignDocument): number =>
  document.asMeasured.coilResistance ??
  windingsOf(document.coils, document.conductivity, document.temperature).resistance;

/** Device and tone of documents whose vibration is one tone; the coupling reaches as far as the lowest frequency needs. */
function driven(design: unknown, vibration: unknown, lowestFrequency?: number): Driven {
  const document = parseDesignDocument(design);
  const drive = vibrationOf(parseVibrationDocument(vibration));
  if (drive.kind !== 'tone') {
    throw new DocumentError([
      { path: 'kind', value: drive.kind, message: 'a sweep needs a vibration of kind tone', document: 'vibration' },
    ]);
  }
  const lowest = { ...drive.tone, frequency: Math.min(drive.tone.frequency, lowestFrequency ?? Infinity) };
  const { device } = prepareDevice(document, { kind: 'tone', tone: lowest }, coilResistanceOf(document));
  return { document, device, tone: drive.tone };
}

function pointOf(at: number, device: Device, tone: Tone): SweepPoint {
  const { response } = respond(device, { kind: 'tone', tone });
  const { loadPower, loadVoltageRms, displacementPeak, branches } = response;
  return { at, loadPower, loadVoltageRms, displacementPeak, branches };
}

function checkSweep(values: readonly number[]): void {
  if (values.length === 0 || values.length > mostSweepPoints) {
    throw new RangeError(`a sweep takes 1 to ${mostSweepPoints} points, got ${values.length}`);
  }
  const wrong = values.find((value) => !(value > 0) || !Number.isFinite(value));
  if (wrong !== undefined) throw new RangeError(`every point of a sweep must be positive and finite, got ${wrong}`);
}

/**
 * Response over the frequency of the tone, everything else held.
 *
 * @param frequencies Hz, positive
 * @throws DocumentError for bad documents or a vibration that is no tone; RangeError for wrong frequencies
 */
export function responseSweep(design: unknown, vibration: unknown, frequencies: readonly number[]): SweepPoint[] {
  checkSweep(frequencies);
  const { device, tone } = driven(design, vibration, Math.min(...frequencies));
  return frequencies.map((frequency) => pointOf(frequency, device, { ...tone, frequency }));
}

/** What a load sweep moves: the load's resistance, a converter's input resistance, or the voltage of a store. */
export type LoadQuantity = 'resistance' | 'inputResistance' | 'voltage';

/**
 * Response over the load: resistance, or the voltage of a store.
 *
 * @param values Ω or V, positive
 * @returns null where the circuit has no such load (a supercapacitor)
 * @throws DocumentError and RangeError as `responseSweep`
 */
export function loadSweep(
  design: unknown,
  vibration: unknown,
  values: readonly number[],
): { quantity: LoadQuantity; points: SweepPoint[] } | null {
  checkSweep(values);
  const { device, tone } = driven(design, vibration);
  const { circuit } = device;
  switch (circuit.kind) {
    case 'resistor':
    case 'bridge':
    case 'doubler':
      return {
        quantity: 'resistance',
        points: values.map((resistance) =>
          pointOf(resistance, { ...device, circuit: { ...circuit, resistance } }, tone),
        ),
      };
    case 'tracker':
      return {
        quantity: 'inputResistance',
        points: values.map((inputResistance) =>
          pointOf(inputResistance, { ...device, circuit: { ...circuit, inputResistance } }, tone),
        ),
      };
    case 'store':
      return {
        quantity: 'voltage',
        points: values.map((voltage) => pointOf(voltage, { ...device, circuit: { ...circuit, voltage } }, tone)),
      };
    case 'supercapacitor':
      return null;
  }
}

/** Values spread evenly on a logarithmic scale, both ends included. */
export function logarithmic(from: number, to: number, count: number): number[] {
  return Array.from({ length: count }, (_, index) => from * (to / from) ** (count > 1 ? index / (count - 1) : 0));
}

/** The load power's peak over frequency, and where it has fallen to half. */
export interface Bandwidth {
  readonly peakFrequency: number;
  readonly peakPower: number;
  /** Hz; half the peak power is left here. */
  readonly lower: number;
  readonly upper: number;
  readonly width: number;
}

const goldenSection = (Math.sqrt(5) - 1) / 2;

/** Largest value of a function with one peak between two places. */
function peakBetween(of: (x: number) => number, low: number, high: number, tolerance: number): number {
  let [a, b] = [low, high];
  let c = b - goldenSection * (b - a);
  let d = a + goldenSection * (b - a);
  let [atC, atD] = [of(c), of(d)];
  while (b - a > tolerance) {
    if (atC > atD) {
      [b, d, atD] = [d, c, atC];
      c = b - goldenSection * (b - a);
      atC = of(c);
    } else {
      [a, c, atC] = [c, d, atD];
      d = a + goldenSection * (b - a);
      atD = of(d);
    }
  }
  return (a + b) / 2;
}

/**
 * Half-power bandwidth, measured on the computed response of the loaded device rather than taken as f0/Q.
 *
 * @returns null where no load power is computed, or it does not fall to half within a fifth to five times the peak's
 *   frequency
 */
export function bandwidthOf(design: unknown, vibration: unknown): Bandwidth | null {
  const document = parseDesignDocument(design);
  const { device, tone } = driven(document, vibration, undefined);
  const stiffness = -device.suspension.forceSlope(0);
  const natural = Math.sqrt(stiffness / device.mass) / (2 * Math.PI);
  const { circuit } = device;
  const total = device.coilResistance + (circuit.kind === 'resistor' ? circuit.resistance : device.coilResistance);
  const damping = device.damping + device.coupling.at(device.restPosition) ** 2 / total;
  const half = damping / (4 * Math.PI * device.mass);
  const power = (frequency: number): number =>
    respond(device, { kind: 'tone', tone: { ...tone, frequency } }).response.loadPower ?? 0;
  // A scan at the resolution of the resonance finds the peak's neighbourhood, wherever a spring bends it to
  const reach = Math.max(0.1 * natural, 12 * half);
  const from = Math.max(0.2 * natural, natural - reach);
  const steps = Math.min(120, Math.ceil(((natural + reach - from) / half) * 1.5));
  const step = (natural + reach - from) / steps;
  let best = from;
  let largest = 0;
  for (let index = 0; index <= steps; index += 1) {
    const value = power(from + index * step);
    if (value > largest) [largest, best] = [value, from + index * step];
  }
  if (!(largest > 0)) return null;
  const peakFrequency = peakBetween(power, Math.max(0.2 * natural, best - step), best + step, 1e-7 * natural);
  const peakPower = power(peakFrequency);
  const crossing = (direction: 1 | -1): number | null => {
    let inside = peakFrequency;
    for (let width = half; ; width *= 1.6) {
      const outside = peakFrequency + direction * width;
      if (outside < 0.2 * natural || outside > 5 * natural) return null;
      if (power(outside) < peakPower / 2) {
        let [near, far] = [inside, outside];
        while (Math.abs(far - near) > 1e-9 * natural) {
          const middle = (near + far) / 2;
          if (power(middle) > peakPower / 2) near = middle;
          else far = middle;
        }
        return (near + far) / 2;
      }
      inside = outside;
    }
  };
  const lower = crossing(-1);
  const upper = crossing(1);
  return lower === null || upper === null ? null : { peakFrequency, peakPower, lower, upper, width: upper - lower };
}

/** What is left of the load power where the tone moves by one hertz either way. */
export interface DetuningPenalty {
  readonly below: Figure;
  readonly above: Figure;
}

/** Load power one hertz below and above the tone, over that at the tone. */
export function detuningPenalty(design: unknown, vibration: unknown): DetuningPenalty {
  const { device, tone } = driven(design, vibration);
  const at = (frequency: number): Figure =>
    frequency > 0 ? pointOf(frequency, device, { ...tone, frequency }).loadPower : null;
  const here = at(tone.frequency);
  const share = (there: Figure): Figure => (here !== null && here > 0 && there !== null ? there / here : null);
  return { below: share(at(tone.frequency - 1)), above: share(at(tone.frequency + 1)) };
}

/**
 * Time until a store first reaches a voltage, from the waveforms of an estimate.
 *
 * @param voltage V
 * @returns s, straight between the points of the waveform; null where it is not reached within the run
 */
export function startUpTime(estimate: Pick<Estimate, 'waveforms'>, voltage: number): Figure {
  const { waveforms } = estimate;
  if (waveforms === null) return null;
  const { time, loadVoltage } = waveforms;
  for (const [index, value] of loadVoltage.entries()) {
    if (value < voltage) continue;
    const [t0, v0] = [time[index - 1], loadVoltage[index - 1]];
    const t1 = time[index] ?? 0;
    return t0 === undefined || v0 === undefined || value === v0 ? t1 : t0 + ((t1 - t0) * (voltage - v0)) / (value - v0);
  }
  return null;
}
