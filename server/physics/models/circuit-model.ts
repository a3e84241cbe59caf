import type { Circuit, Diode } from './device';
import { solveTwoPaths } from './two-paths';
import type { TwoPaths } from './two-paths';

/** Voltage over which a node fades in above its minimum voltage, at least; it keeps the load from chattering. */
const FADE = 1e-3;

/**
 * A circuit behind the coil as the time steppers see it. `solve` finds the current that a source e (V) behind a series
 * resistance r (Ω) drives, with every capacitor voltage on the line V = base + gain · dV/dt (gain 0: V = base; γh: the
 * implicit stage of a Runge–Kutta method), and leaves currents, voltages, powers and rates in its fields.
 */
export interface CircuitModel {
  readonly capacitors: number;
  /** Coil current, A. */
  current: number;
  /** Voltage of the load, V: direct after a rectifier. */
  loadVoltage: number;
  /** Instantaneous powers, W. */
  load: number;
  rectifier: number;
  converter: number;
  /** Capacitor voltages and their rates after `solve`. */
  readonly voltage: Float64Array;
  readonly rate: Float64Array;
  solve(e: number, r: number, base: Float64Array, gain: number): void;
  /** Energy held at given capacitor voltages, J. */
  energy(voltage: Float64Array): number;
}

class Resistor implements CircuitModel {
  readonly capacitors = 0;
  current = 0;
  loadVoltage = 0;
  load = 0;
  readonly rectifier = 0;
  readonly converter = 0;
  readonly voltage = new Float64Array(0);
  readonly rate = new Float64Array(0);
  constructor(private readonly resistance: number) {}
  solve(e: number, r: number): void {
    this.current = Number.isFinite(this.resistance) ? e / (r + this.resistance) : 0;
    this.loadVoltage = Number.isFinite(this.resistance) ? this.resistance * this.current : e;
    this.load = Number.isFinite(this.resistance) ? this.loadVoltage * this.current : 0;
  }
  energy(): number {
    return 0;
  }
}

/** What the direct side of a rectifier has in common: two paths, and the books of the diodes. */
abstract class Rectified implements CircuitModel {
  current = 0;
  loadVoltage = 0;
  load = 0;
  rectifier = 0;
  converter = 0;
  readonly voltage: Float64Array;
  readonly rate: Float64Array;
  protected readonly paths: TwoPaths = { a11: 0, a12: 0, a22: 0, s1: 0, s2: 0 };
  protected readonly currents = new Float64Array(2);
  protected constructor(
    protected readonly diode: Diode,
    private readonly diodesPerPath: number,
    readonly capacitors: number,
  ) {
    this.voltage = new Float64Array(capacitors);
    this.rate = new Float64Array(capacitors);
  }
  abstract solve(e: number, r: number, base: Float64Array, gain: number): void;
  abstract energy(voltage: Float64Array): number;

  /** Solves the paths; returns the direct current p + q. */
  protected conduct(): number {
    solveTwoPaths(this.diode, this.diodesPerPath, this.paths, this.currents);
    const { a11, a12, a22, s1, s2 } = this.paths;
    const p = this.currents[0]!;
    const q = this.currents[1]!;
    this.current = p - q;
    // the diodes take what the rest of each path leaves
    this.rectifier = p * (s1 - a11 * p - a12 * q) + q * (s2 - a12 * p - a22 * q);
    return p + q;
  }

  /** A full bridge into a direct voltage v0 + rho · (p + q). */
  protected bridge(e: number, r: number, v0: number, rho: number): number {
    const { paths } = this;
    paths.a11 = r + rho;
    paths.a22 = r + rho;
    paths.a12 = rho - r;
    paths.s1 = e - v0;
    paths.s2 = -e - v0;
    return this.conduct();
  }
}

class Bridge extends Rectified {
  constructor(
    diode: Diode,
    private readonly resistance: number,
    private readonly capacitance: number,
  ) {
    super(diode, 2, capacitance > 0 ? 1 : 0);
  }
  solve(e: number, r: number, base: Float64Array, gain: number): void {
    const { resistance, capacitance } = this;
    if (capacitance > 0) {
      const share = 1 / (1 + gain / (resistance * capacitance));
      const v0 = base[0]! * share;
      const rho = (gain / capacitance) * share;
      const direct = this.bridge(e, r, v0, rho);
      const v = v0 + rho * direct;
      this.voltage[0] = v;
      this.rate[0] = (direct - v / resistance) / capacitance;
      this.loadVoltage = v;
    } else this.loadVoltage = resistance * this.bridge(e, r, 0, resistance);
    this.load = (this.loadVoltage * this.loadVoltage) / resistance;
  }
  energy(voltage: Float64Array): number {
    return this.capacitance > 0 ? 0.5 * this.capacitance * voltage[0]! * voltage[0]! : 0;
  }
}

/** Each half-wave charges its own capacitor through one diode; the load lies across both. */
class Doubler extends Rectified {
  constructor(
    diode: Diode,
    private readonly resistance: number,
    private readonly capacitance: number,
  ) {
    super(diode, 1, 2);
  }
  solve(e: number, r: number, base: Float64Array, gain: number): void {
    const { resistance, capacitance, paths } = this;
    const g = gain / capacitance;
    // both voltages sag with the load's current, (V1 + V2)/R
    const share = g / resistance / (1 + (2 * g) / resistance);
    const sag = share * (base[0]! + base[1]!);
    const v1 = base[0]! - sag;
    const v2 = base[1]! - sag;
    const own = g * (1 - share);
    const other = -g * share;
    paths.a11 = r + own;
    paths.a22 = r + own;
    paths.a12 = other - r;
    paths.s1 = e - v1;
    paths.s2 = -e - v2;
    this.conduct();
    const p = this.currents[0]!;
    const q = this.currents[1]!;
    this.voltage[0] = v1 + own * p + other * q;
    this.voltage[1] = v2 + other * p + own * q;
    const sum = this.voltage[0] + this.voltage[1];
    this.rate[0] = (p - sum / resistance) / capacitance;
    this.rate[1] = (q - sum / resistance) / capacitance;
    this.loadVoltage = sum;
    this.load = (sum * sum) / resistance;
  }
  energy(voltage: Float64Array): number {
    return 0.5 * this.capacitance * (voltage[0]! * voltage[0]! + voltage[1]! * voltage[1]!);
  }
}

class Store extends Rectified {
  constructor(
    diode: Diode,
    private readonly held: number,
  ) {
    super(diode, 2, 0);
    this.loadVoltage = held;
  }
  solve(e: number, r: number): void {
    this.load = this.held * this.bridge(e, r, this.held, 0);
  }
  energy(): number {
    return 0;
  }
}

/**
 * A converter that draws nothing below its start voltage and input/resistance above; in between, where drawing would
 * pull its input below the start voltage and not drawing would let it rise above, it holds its input there.
 */
class Tracker extends Rectified {
  constructor(
    diode: Diode,
    private readonly inputResistance: number,
    private readonly startVoltage: number,
    private readonly efficiency: number,
  ) {
    super(diode, 2, 0);
  }
  solve(e: number, r: number): void {
    let direct = this.bridge(e, r, 0, this.inputResistance);
    let input = this.inputResistance * direct;
    if (input < this.startVoltage) {
      input = this.idle(e, r);
      direct = 0;
      if (input > this.startVoltage) {
        input = this.startVoltage;
        direct = this.bridge(e, r, input, 0);
      }
    }
    this.loadVoltage = input;
    this.load = this.efficiency * input * direct;
    this.converter = (1 - this.efficiency) * input * direct;
  }
  /** No direct current: the bridge only passes what the blocked diodes leak. Returns the direct voltage. */
  private idle(e: number, r: number): number {
    const { diode } = this;
    if (diode.kind === 'drop') {
      this.current = 0;
      this.rectifier = 0;
      return Math.max(0, Math.abs(e) - 2 * diode.drop);
    }
    // p = −q = Is tanh y, and the two junctions share e: 2 n Vt y + 2 (r + Rs) Is tanh y = e
    const slope = diode.emissionCoefficient * diode.thermalVoltage;
    const ohmic = 2 * (r + 0.5 * diode.seriesResistance) * diode.saturationCurrent;
    let y = e / (2 * slope + ohmic);
    for (let n = 0; n < 40; n++) {
      const t = Math.tanh(y);
      const step = (2 * slope * y + ohmic * t - e) / (2 * slope + ohmic * (1 - t * t));
      // the curve bends only between its two straight parts: half steps keep Newton from leaping over the bend
      y -= Math.abs(step) > 1 ? Math.sign(step) * Math.min(0.5 * Math.abs(step) + 0.5, Math.abs(step)) : step;
      if (Math.abs(step) < 1e-14 * (1 + Math.abs(y))) break;
    }
    this.current = 2 * diode.saturationCurrent * Math.tanh(y);
    this.rectifier = this.current * (e - r * this.current);
    const size = Math.abs(y);
    return 2 * slope * (size + Math.log1p(Math.exp(-2 * size)) - Math.LN2);
  }
  energy(): number {
    return 0;
  }
}

/** A capacitor with series and leakage resistance behind a bridge, and a node that draws a current of its own. */
export class Supercapacitor extends Rectified {
  /** What the node asks for now, A; the stepper sets it at each switching. */
  demand = 0;
  private readonly fade: number;
  constructor(private readonly given: Extract<Circuit, { kind: 'supercapacitor' }>) {
    super(given.diode, 2, 1);
    const largest = Math.max(given.node.activeCurrent, given.node.sleepCurrent);
    this.fade = Math.max(FADE, 2 * given.seriesResistance * largest);
  }
  solve(e: number, r: number, base: Float64Array, gain: number): void {
    const { minimumVoltage } = this.given.node;
    const { demand, fade } = this;
    if (gain === 0) {
      const share = Math.min(1, Math.max(0, (base[0]! - minimumVoltage) / fade));
      this.draw(e, r, base, gain, 0, demand * share);
      return;
    }
    this.draw(e, r, base, gain, 0, demand);
    if (this.voltage[0]! >= minimumVoltage + fade || demand === 0) return;
    this.draw(e, r, base, gain, 0, 0);
    if (this.voltage[0]! <= minimumVoltage) return;
    this.draw(e, r, base, gain, demand / fade, 0);
  }
  /** Node current = fixed + conductance · (V − minimum). */
  private draw(e: number, r: number, base: Float64Array, gain: number, conductance: number, fixed: number): void {
    const { capacitance, seriesResistance, leakageResistance, node } = this.given;
    const g = gain / capacitance;
    const least = node.minimumVoltage;
    const share = 1 / (1 + g * (1 / leakageResistance + conductance));
    const inner0 = (base[0]! - g * (fixed - conductance * least)) * share;
    const innerRho = g * share;
    const v0 = inner0 * (1 - seriesResistance * conductance) - seriesResistance * (fixed - conductance * least);
    const rho = innerRho * (1 - seriesResistance * conductance) + seriesResistance;
    const direct = this.bridge(e, r, v0, rho);
    const inner = inner0 + innerRho * direct;
    const drawn = fixed + conductance * (inner - least);
    const leak = inner / leakageResistance;
    const charging = direct - drawn;
    this.voltage[0] = inner;
    this.rate[0] = (charging - leak) / capacitance;
    this.loadVoltage = inner + seriesResistance * charging;
    this.load = this.loadVoltage * drawn;
    this.converter = leak * inner + seriesResistance * charging * charging;
  }
  energy(voltage: Float64Array): number {
    return 0.5 * this.given.capacitance * voltage[0]! * voltage[0]!;
  }
}

/** The stepping model of a circuit; `null` leaves the coil open. */
export function circuitModel(circuit: Circuit | null): CircuitModel {
  if (circuit === null) return new Resistor(Infinity);
  switch (circuit.kind) {
    case 'resistor':
      return new Resistor(circuit.resistance);
    case 'bridge':
      return new Bridge(circuit.diode, circuit.resistance, circuit.capacitance);
    case 'doubler':
      return new Doubler(circuit.diode, circuit.resistance, circuit.capacitance);
    case 'store':
      return new Store(circuit.diode, circuit.voltage);
    case 'tracker':
      return new Tracker(circuit.diode, circuit.inputResistance, circuit.startVoltage, circuit.efficiency);
    case 'supercapacitor':
      return new Supercapacitor(circuit);
  }
}
