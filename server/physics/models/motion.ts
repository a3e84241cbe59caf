import { ERROR_WEIGHTS, EXPLICIT, GAMMA, IMPLICIT, NODES, STAGES, WEIGHTS } from '../kernels/imex-tableau';
import type { CircuitModel } from './circuit-model';
import type { Device } from './device';
import { innerTurn } from '../kernels/hermite-extremum';

/** Places in `sums`: time integrals since the start. */
export const SUM = {
  mechanicalIn: 0,
  mechanicalLoss: 1,
  stops: 2,
  current2: 3,
  load: 4,
  rectifier: 5,
  converter: 6,
  emf2: 7,
  loadVoltage: 8,
  loadVoltage2: 9,
  displacement2: 10,
} as const;
const SUMS = 11;
/** A displacement this many times the smallest that matters is a run-away. */
const ESCAPED = 1e5;

export interface MotionOptions {
  /** Error of a step allowed relative to the largest values met so far. */
  tolerance: number;
  /** A time of the device's own, s; scales the first step and the smallest. */
  period: number;
  /** Steps after which the run is given up. */
  most: number;
  /** Displacement that counts as small before anything has moved, m; velocity is this over period/2π. */
  smallest: number;
}

/**
 * The device in motion: displacement and velocity by the explicit tableau, coil current and capacitor voltages by the
 * implicit one (their equations are solved in closed form within each stage, so that neither a blocked diode behind an
 * inductance nor a small capacitor limits the step), with error control and the contact of stops located in time.
 * Integrals of powers and squares run along with the weights of the method. Fourth order.
 */
export class Motion {
  t = 0;
  u = 0;
  v = 0;
  current = 0;
  readonly voltage: Float64Array;
  readonly sums = new Float64Array(SUMS);
  /** Largest |u| so far, found between the steps too. */
  peak = 0;
  emfPeak = 0;
  touched = false;
  steps = 0;
  rejected = 0;
  /** Step lengths are noted here when it is an array. */
  plan: number[] | null = null;
  private readonly inductive: boolean;
  private readonly capacitors: number;
  // carried over from the last stage: rates and powers at the present state
  private currentRate = 0;
  private readonly voltageRate: Float64Array;
  private readonly carried = new Float64Array(4);
  // contact with the stops
  private lower = false;
  private upper = false;
  // the trial step
  private readonly vs = new Float64Array(STAGES);
  private readonly as = new Float64Array(STAGES);
  private readonly iRates = new Float64Array(STAGES);
  private readonly vRates: Float64Array;
  private readonly base: Float64Array;
  private readonly trialSums = new Float64Array(SUMS);
  private readonly trialVoltage: Float64Array;
  private trialU = 0;
  private trialV = 0;
  private trialCurrent = 0;
  private lastStep: number;
  // sizes for the error
  private uScale: number;
  private vScale: number;
  private iScale = 1e-8;
  private readonly voltageScale = new Float64Array(2).fill(1e-3);

  constructor(
    private readonly device: Device,
    private readonly circuit: CircuitModel,
    private readonly accelerationAt: (t: number) => number,
    private readonly options: MotionOptions,
  ) {
    this.capacitors = circuit.capacitors;
    this.inductive = device.coilInductance > 0;
    this.voltage = new Float64Array(this.capacitors);
    this.voltageRate = new Float64Array(this.capacitors);
    this.trialVoltage = new Float64Array(this.capacitors);
    this.base = new Float64Array(this.capacitors);
    this.vRates = new Float64Array(STAGES * this.capacitors);
    this.uScale = options.smallest;
    this.vScale = (options.smallest * 2 * Math.PI) / options.period;
    this.lastStep = options.period / 200;
  }

  /** Sets the state at time t with sums, peaks and contacts cleared. */
  place(t: number, u: number, v: number, current: number, voltage: ArrayLike<number>): void {
    this.t = t;
    this.steps = 0;
    this.rejected = 0;
    this.u = u;
    this.v = v;
    this.voltage.set(voltage);
    this.sums.fill(0);
    this.peak = Math.abs(u);
    this.emfPeak = 0;
    this.touched = false;
    this.lower = this.contact(u, v, -1) > 0;
    this.upper = this.contact(u, v, 1) > 0;
    const { coupling, restPosition, coilResistance, coilInductance } = this.device;
    const e = coupling.at(restPosition + u) * v;
    if (this.inductive) {
      // a short implicit step tells the current's rate; a current that cannot flow has died within it
      const short = (1e-6 * this.options.period) / (2 * Math.PI);
      const lag = coilInductance / short;
      this.circuit.solve(e + lag * current, coilResistance + lag, this.voltage, short);
      const after = this.circuit.current;
      const dies = Math.abs(after - current) > 1e-3 * Math.abs(current) + 1e-12;
      this.current = dies ? after : current;
      if (dies) this.circuit.solve(e + lag * after, coilResistance + lag, this.voltage, short);
      this.currentRate = (this.circuit.current - this.current) / short;
    } else {
      this.circuit.solve(e, coilResistance, this.voltage, 0);
      this.current = this.circuit.current;
    }
    this.carry();
  }

  /** Clears sums and peaks; the motion goes on. */
  openBooks(): void {
    this.sums.fill(0);
    this.peak = Math.abs(this.u);
    this.emfPeak = Math.abs(this.emf);
    this.touched = this.upper || this.lower;
    this.steps = 0;
  }

  /** Energy in mass, suspension, coil and capacitors, J. */
  energy(): number {
    const { mass, suspension, coilInductance } = this.device;
    return (
      0.5 * mass * this.v * this.v +
      suspension.energy(this.u) +
      0.5 * coilInductance * this.current * this.current +
      this.circuit.energy(this.voltage)
    );
  }

  /** Load voltage at the present state, V. */
  get loadVoltage(): number {
    return this.carried[0]!;
  }

  /** EMF at the present state, V. */
  get emf(): number {
    return this.device.coupling.at(this.device.restPosition + this.u) * this.v;
  }

  /** A jump of the direct current drawn (A) at the present instant. */
  demandChanged(): void {
    if (this.inductive) {
      const { coilResistance, coilInductance } = this.device;
      const short = (1e-5 * this.options.period) / (2 * Math.PI);
      const lag = coilInductance / short;
      this.circuit.solve(this.emf + lag * this.current, coilResistance + lag, this.voltage, short);
    } else this.circuit.solve(this.emf, this.device.coilResistance, this.voltage, 0);
    this.carry();
  }

  /** Goes on to a time with error control; returns false where the motion runs away or takes too long. */
  advance(to: number, longest: number): boolean {
    const least = 1e-11 * this.options.period;
    while (to - this.t > least) {
      const rest = to - this.t;
      let h = Math.min(this.lastStep, longest, rest);
      if (rest - h < 0.05 * h) h = rest;
      const error = this.attempt(h);
      if (!(error <= 1) && h > 4 * least) {
        this.rejected++;
        this.lastStep = h * (Number.isFinite(error) ? Math.max(0.2, 0.9 / Math.sqrt(Math.sqrt(error))) : 0.1);
        continue;
      }
      if (this.steps + this.rejected > this.options.most) return false;
      if (!Number.isFinite(error) || Math.abs(this.trialU) > ESCAPED * this.options.smallest) return false;
      const growth = error > 0 ? Math.min(3, 0.9 / Math.sqrt(Math.sqrt(error))) : 3;
      // a step cut short by the end of the stretch says nothing against a longer one
      this.lastStep = h < this.lastStep ? Math.max(this.lastStep, h * growth) : h * growth;
      if (this.device.stops && !this.settleContact(h)) continue;
      this.accept(h);
    }
    this.t = to;
    return true;
  }

  /** Repeats noted step lengths without error control: the map from start to end is then smooth. */
  replay(plan: readonly number[]): void {
    for (const h of plan) {
      this.attempt(h);
      this.accept(h);
    }
  }

  /** How firmly a stop presses (N): positive in contact, negative free. */
  private contact(u: number, v: number, side: 1 | -1): number {
    const { stops, restPosition } = this.device;
    const at = stops && (side > 0 ? stops.upper : stops.lower);
    if (!stops || at === null) return -1;
    const depth = side * (restPosition + u - at);
    return Math.min(stops.stiffness * depth, stops.stiffness * depth + stops.damping * side * v);
  }

  /** After an attempt over h: shortens it to the first change of contact and notes that; false to try again. */
  private settleContact(h: number): boolean {
    const changed = (): 1 | -1 | 0 => {
      if (this.contact(this.trialU, this.trialV, 1) > 0 !== this.upper) return 1;
      if (this.contact(this.trialU, this.trialV, -1) > 0 !== this.lower) return -1;
      return 0;
    };
    let side = changed();
    if (side === 0) {
      // a touch between the ends: the motion turns round beyond a stop
      if (this.v * this.trialV >= 0 || this.upper || this.lower) return true;
      const turn = innerTurn(h, this.u, this.v, this.as[0]!, this.trialU, this.trialV, this.as[STAGES - 1]!);
      if (this.contact(turn, 0, 1) <= 0 && this.contact(turn, 0, -1) <= 0) return true;
      if (h < 1e-9 * this.options.period) return true;
      this.lastStep = 0.5 * h;
      return false;
    }
    let [low, high] = [0, h];
    let lowValue = this.contact(this.u, this.v, side);
    let highValue = this.contact(this.trialU, this.trialV, side);
    for (let n = 0; n < 60 && high - low > 1e-13 * this.options.period; n++) {
      let middle = low + (high - low) * (lowValue / (lowValue - highValue));
      if (n % 3 === 2 || !(middle > low && middle < high)) middle = 0.5 * (low + high);
      this.attempt(middle);
      const now = changed();
      if (now === 0) {
        low = middle;
        lowValue = this.contact(this.trialU, this.trialV, side);
      } else {
        side = now;
        high = middle;
        highValue = this.contact(this.trialU, this.trialV, side);
      }
    }
    this.attempt(high);
    this.accept(high);
    if (side > 0) this.upper = !this.upper;
    else this.lower = !this.lower;
    this.touched ||= this.upper || this.lower;
    return false;
  }

  private stopForce(u: number, v: number): number {
    const stops = this.device.stops!;
    let force = 0;
    if (this.upper) force -= stops.stiffness * (this.device.restPosition + u - stops.upper!) + stops.damping * v;
    if (this.lower) force += stops.stiffness * (stops.lower! - this.device.restPosition - u) - stops.damping * v;
    return force;
  }

  /** One step of length h from the present state into the trial; returns its error over the tolerance. */
  private attempt(h: number): number {
    const { device, circuit, vs, as, iRates, vRates, base, trialSums, capacitors, inductive } = this;
    const { mass, damping, quadraticDrag, restPosition, coilResistance, coilInductance, suspension, coupling } = device;
    const gain = GAMMA * h;
    const lag = coilInductance / gain;
    trialSums.set(this.sums);
    let pulse = 0;
    let pulseError = 0;
    for (let s = 0; s < STAGES; s++) {
      let u = this.u;
      let v = this.v;
      for (let k = 0; k < s; k++) {
        const weight = h * EXPLICIT[s * STAGES + k]!;
        u += weight * vs[k]!;
        v += weight * as[k]!;
      }
      const theta = coupling.at(restPosition + u);
      const e = theta * v;
      let i: number;
      let loadVoltage: number;
      let load: number;
      let rectifier: number;
      let converter: number;
      if (s === 0) {
        i = this.current;
        iRates[0] = this.currentRate;
        for (let c = 0; c < capacitors; c++) vRates[c] = this.voltageRate[c]!;
        loadVoltage = this.carried[0]!;
        load = this.carried[1]!;
        rectifier = this.carried[2]!;
        converter = this.carried[3]!;
      } else {
        for (let c = 0; c < capacitors; c++) {
          let known = this.voltage[c]!;
          for (let k = 0; k < s; k++) known += h * IMPLICIT[s * STAGES + k]! * vRates[k * capacitors + c]!;
          base[c] = known;
        }
        if (inductive) {
          let known = this.current;
          for (let k = 0; k < s; k++) known += h * IMPLICIT[s * STAGES + k]! * iRates[k]!;
          circuit.solve(e + lag * known, coilResistance + lag, base, gain);
          i = circuit.current;
          iRates[s] = (i - known) / gain;
        } else {
          circuit.solve(e, coilResistance, base, gain);
          i = circuit.current;
        }
        for (let c = 0; c < capacitors; c++) vRates[s * capacitors + c] = circuit.rate[c]!;
        loadVoltage = circuit.loadVoltage;
        load = circuit.load;
        rectifier = circuit.rectifier;
        converter = circuit.converter;
      }
      const stop = this.upper || this.lower ? this.stopForce(u, v) : 0;
      const drag = damping + quadraticDrag * Math.abs(v);
      const a = this.accelerationAt(this.t + NODES[s]! * h);
      vs[s] = v;
      as[s] = (suspension.force(u) - drag * v - theta * i + stop) / mass - a;
      const weight = h * WEIGHTS[s]!;
      if (weight !== 0) {
        trialSums[0]! -= weight * mass * a * v;
        trialSums[1]! += weight * drag * v * v;
        trialSums[2]! -= weight * stop * v;
        trialSums[3]! += weight * i * i;
        trialSums[4]! += weight * load;
        trialSums[5]! += weight * rectifier;
        trialSums[6]! += weight * converter;
        trialSums[7]! += weight * e * e;
        trialSums[8]! += weight * loadVoltage;
        trialSums[9]! += weight * loadVoltage * loadVoltage;
        trialSums[10]! += weight * u * u;
      }
      pulse = i;
      pulseError += h * ERROR_WEIGHTS[s]! * i * Math.abs(i);
    }
    let u = this.u;
    let v = this.v;
    let uError = 0;
    let vError = 0;
    let iError = 0;
    for (let s = 0; s < STAGES; s++) {
      u += h * WEIGHTS[s]! * vs[s]!;
      v += h * WEIGHTS[s]! * as[s]!;
      uError += h * ERROR_WEIGHTS[s]! * vs[s]!;
      vError += h * ERROR_WEIGHTS[s]! * as[s]!;
      if (inductive) iError += h * ERROR_WEIGHTS[s]! * iRates[s]!;
    }
    this.trialU = u;
    this.trialV = v;
    this.trialCurrent = pulse;
    const { tolerance, period } = this.options;
    let error = Math.max(Math.abs(uError) / this.uScale, Math.abs(vError) / this.vScale);
    if (inductive) error = Math.max(error, (Math.abs(iError) * lag) / (coilResistance + lag) / (30 * this.iScale));
    error = Math.max(error, Math.abs(pulseError) / (0.1 * period * this.iScale * this.iScale));
    for (let c = 0; c < capacitors; c++) {
      let sum = 0;
      for (let s = 0; s < STAGES; s++) sum += h * ERROR_WEIGHTS[s]! * vRates[s * capacitors + c]!;
      this.trialVoltage[c] = circuit.voltage[c]!;
      error = Math.max(error, Math.abs(sum) / this.voltageScale[c]!);
    }
    return error / tolerance;
  }

  /** Takes the trial over. */
  private accept(h: number): void {
    if (this.v * this.trialV < 0) {
      const turn = innerTurn(h, this.u, this.v, this.as[0]!, this.trialU, this.trialV, this.as[STAGES - 1]!);
      this.peak = Math.max(this.peak, Math.abs(turn));
    }
    this.t += h;
    this.u = this.trialU;
    this.v = this.trialV;
    this.voltage.set(this.trialVoltage);
    this.sums.set(this.trialSums);
    this.currentRate = this.iRates[STAGES - 1]!;
    this.current = this.trialCurrent;
    this.carry();
    if (!this.inductive) {
      // the current follows the EMF of the state at once
      const { coilResistance } = this.device;
      this.circuit.solve(this.emf, coilResistance, this.voltage, 0);
      this.current = this.circuit.current;
      this.carried[0] = this.circuit.loadVoltage;
      this.carried[1] = this.circuit.load;
      this.carried[2] = this.circuit.rectifier;
      this.carried[3] = this.circuit.converter;
    }
    this.peak = Math.max(this.peak, Math.abs(this.u));
    this.emfPeak = Math.max(this.emfPeak, Math.abs(this.emf));
    this.uScale = Math.max(this.uScale, Math.abs(this.u));
    this.vScale = Math.max(this.vScale, Math.abs(this.v));
    this.iScale = Math.max(this.iScale, Math.abs(this.current));
    for (let c = 0; c < this.capacitors; c++)
      this.voltageScale[c] = Math.max(this.voltageScale[c]!, Math.abs(this.voltage[c]!));
    this.steps++;
    this.plan?.push(h);
  }

  private carry(): void {
    for (let c = 0; c < this.capacitors; c++) this.voltageRate[c] = this.circuit.rate[c]!;
    this.carried[0] = this.circuit.loadVoltage;
    this.carried[1] = this.circuit.load;
    this.carried[2] = this.circuit.rectifier;
    this.carried[3] = this.circuit.converter;
  }
}
