import { analyseInto, differentiateInto, fourierTable, synthesiseInto } from './fourier-table';
import type { FourierTable } from './fourier-table';

/**
 * One degree of freedom whose velocity drives a linear port through a position-dependent transducer:
 * m ü + c v + q|v|v + r(u) + θ(u) i + p(t) = 0, L di/dt + R i = θ(u) v.
 */
export interface PortOscillator {
  mass: number;
  damping: number;
  drag: number;
  /** R, Ω; Infinity leaves the port open. */
  resistance: number;
  inductance: number;
  /** r(u): positive where it pushes towards −u. */
  restoring(u: number): number;
  restoringSlope(u: number): number;
  coupling(u: number): number;
  couplingSlope(u: number): number;
}

/**
 * The equations of harmonic balance with H harmonics for such an oscillator: unknowns are the coefficients
 * (mean, cos 1, sin 1, …, sin H) of u, the port current is eliminated harmonic by harmonic, products are formed at
 * N > 4H samples so that nothing folds back, and the Jacobian is exact for the sampled equations.
 * Source: Krack & Gross, Harmonic Balance for Nonlinear Vibration Problems (2019), ch. 2 (alternating frequency–time).
 */
export class HarmonicBalance {
  readonly size: number;
  readonly table: FourierTable;
  /** Samples of the last evaluation. */
  readonly u: Float64Array;
  readonly v: Float64Array;
  readonly theta: Float64Array;
  readonly emf: Float64Array;
  readonly current: Float64Array;
  /** Coefficients of u at the last evaluation. */
  readonly lastPoint: Float64Array;
  /** Coefficients of EMF and current of the last evaluation. */
  readonly emfCoefficients: Float64Array;
  readonly currentCoefficients: Float64Array;
  private readonly velocity: Float64Array;
  private readonly force: Float64Array;
  private readonly stiffness: Float64Array;
  private readonly resistive: Float64Array;
  private readonly wideTable: FourierTable;
  private readonly wideStiffness: Float64Array;
  private readonly wideResistive: Float64Array;
  private readonly wideTheta: Float64Array;
  private readonly product: Float64Array;
  private readonly left: Float64Array;

  /** @throws RangeError where harmonics is not a whole number from 1 to 512. */
  constructor(
    readonly oscillator: PortOscillator,
    readonly harmonics: number,
  ) {
    if (!Number.isInteger(harmonics) || harmonics < 1 || harmonics > 512)
      throw new RangeError(`harmonics must be a whole number from 1 to 512, got ${harmonics}`);
    const samples = 4 * harmonics + 4;
    this.size = 2 * harmonics + 1;
    this.table = fourierTable(harmonics, samples);
    this.wideTable = fourierTable(2 * harmonics, samples);
    const wide = 4 * harmonics + 1;
    const array = (length: number): Float64Array => new Float64Array(length);
    [this.u, this.v, this.theta] = [array(samples), array(samples), array(samples)];
    [this.emf, this.current, this.force] = [array(samples), array(samples), array(samples)];
    [this.stiffness, this.resistive] = [array(samples), array(samples)];
    [this.velocity, this.emfCoefficients, this.currentCoefficients] = [
      array(this.size),
      array(this.size),
      array(this.size),
    ];
    [this.wideStiffness, this.wideResistive, this.wideTheta] = [array(wide), array(wide), array(wide)];
    this.lastPoint = array(this.size);
    this.product = array(this.size * this.size);
    this.left = array(this.size * this.size);
  }

  /** Residual of the balance at coefficients x, fundamental ω and drive coefficients p(t) (N), into `out`. */
  residualInto(x: Float64Array, omega: number, drive: Float64Array, out: Float64Array): void {
    this.evaluate(x, omega);
    const { mass } = this.oscillator;
    analyseInto(this.table, this.force, out);
    for (let k = 0; k < this.size; k++) {
      const rate = Math.ceil(k / 2) * omega;
      out[k]! += -mass * rate * rate * x[k]! + (drive[k] ?? 0);
    }
  }

  /** Jacobian dR/dx (row-major) at the point of the last residual. */
  jacobianInto(omega: number, out: Float64Array): void {
    const { oscillator, size, harmonics } = this;
    const samples = this.table.samples;
    const inductive = oscillator.inductance > 0 && Number.isFinite(oscillator.resistance);
    const conductance = Number.isFinite(oscillator.resistance) && !inductive ? 1 / oscillator.resistance : 0;
    const { damping, drag } = oscillator;
    for (let n = 0; n < samples; n++) {
      const u = this.u[n]!;
      const v = this.v[n]!;
      const theta = this.theta[n]!;
      const slope = oscillator.couplingSlope(u);
      // L = 0: θ i = θ² v / R, of which both the u- and the v-derivative are pointwise
      this.stiffness[n] = oscillator.restoringSlope(u) + slope * this.current[n]! + conductance * theta * slope * v;
      this.resistive[n] = damping + 2 * drag * Math.abs(v) + conductance * theta * theta;
    }
    analyseInto(this.wideTable, this.stiffness, this.wideStiffness);
    analyseInto(this.wideTable, this.resistive, this.wideResistive);
    multiplicationInto(this.wideStiffness, harmonics, out);
    multiplicationInto(this.wideResistive, harmonics, this.product);
    for (let row = 0; row < size; row++)
      for (let h = 1; h <= harmonics; h++) {
        const at = row * size + 2 * h - 1;
        out[at]! -= h * omega * this.product[at + 1]!;
        out[at + 1]! += h * omega * this.product[at]!;
      }
    for (let k = 1; k < size; k++) {
      const rate = Math.ceil(k / 2) * omega;
      out[k * size + k]! -= oscillator.mass * rate * rate;
    }
    if (inductive) this.addPort(omega, out);
  }

  /** Adds M[θ] Y d/dt M[θ]: how a change of u changes the flux, that the current, and that the force. */
  private addPort(omega: number, out: Float64Array): void {
    const { size, harmonics, left, product } = this;
    const { resistance, inductance } = this.oscillator;
    analyseInto(this.wideTable, this.theta, this.wideTheta);
    multiplicationInto(this.wideTheta, harmonics, left);
    product.fill(0);
    for (let h = 1; h <= harmonics; h++) {
      const rate = h * omega;
      const reactance = rate * inductance;
      const scale = 1 / (resistance * resistance + reactance * reactance);
      const real = resistance * scale * rate;
      const imaginary = -reactance * scale * rate;
      const cosine = (2 * h - 1) * size;
      for (let k = 0; k < size; k++) {
        const c = left[cosine + k]!;
        const s = left[cosine + size + k]!;
        // derivative (c, s) → (s, −c), then the admittance
        product[cosine + k] = real * s - imaginary * c;
        product[cosine + size + k] = -imaginary * s - real * c;
      }
    }
    for (let row = 0; row < size; row++)
      for (let k = 1; k < size; k++) {
        const factor = left[row * size + k]!;
        if (factor === 0) continue;
        for (let column = 0; column < size; column++) out[row * size + column]! += factor * product[k * size + column]!;
      }
  }

  /** Fills the samples for x: motion, coupling, EMF, current, and every force but inertia and drive. */
  private evaluate(x: Float64Array, omega: number): void {
    const { oscillator, table, u, v, theta, emf, current, force } = this;
    const { damping, drag, resistance, inductance } = oscillator;
    this.lastPoint.set(x);
    differentiateInto(x, omega, this.velocity);
    synthesiseInto(table, x, u);
    synthesiseInto(table, this.velocity, v);
    const samples = table.samples;
    for (let n = 0; n < samples; n++) {
      theta[n] = oscillator.coupling(u[n]!);
      emf[n] = theta[n]! * v[n]!;
    }
    if (!Number.isFinite(resistance)) current.fill(0);
    else if (inductance > 0) {
      analyseInto(table, emf, this.emfCoefficients);
      admitInto(this.emfCoefficients, omega, resistance, inductance, this.currentCoefficients);
      synthesiseInto(table, this.currentCoefficients, current);
    } else for (let n = 0; n < samples; n++) current[n] = emf[n]! / resistance;
    for (let n = 0; n < samples; n++) {
      const speed = v[n]!;
      force[n] =
        damping * speed + drag * Math.abs(speed) * speed + oscillator.restoring(u[n]!) + theta[n]! * current[n]!;
    }
  }
}

/** Current coefficients that an EMF drives through R + jhωL. */
export function admitInto(
  emf: Float64Array,
  omega: number,
  resistance: number,
  inductance: number,
  out: Float64Array,
): void {
  out[0] = emf[0]! / resistance;
  for (let k = 1; k + 1 < emf.length; k += 2) {
    const reactance = ((k + 1) / 2) * omega * inductance;
    const scale = 1 / (resistance * resistance + reactance * reactance);
    const [c, s] = [emf[k]!, emf[k + 1]!];
    out[k] = scale * (resistance * c - reactance * s);
    out[k + 1] = scale * (reactance * c + resistance * s);
  }
}

/** Matrix that multiplies a coefficient vector of H harmonics by a function given to 2H harmonics, truncated to H. */
function multiplicationInto(wide: Float64Array, harmonics: number, out: Float64Array): void {
  const size = 2 * harmonics + 1;
  out[0] = wide[0]!;
  for (let k = 1; k < size; k++) {
    out[k] = 0.5 * wide[k]!;
    out[k * size] = wide[k]!;
  }
  for (let h = 1; h <= harmonics; h++) {
    const cosine = (2 * h - 1) * size;
    const sine = cosine + size;
    for (let k = 1; k <= harmonics; k++) {
      const gap = Math.abs(h - k);
      const cGap = gap === 0 ? 2 * wide[0]! : wide[2 * gap - 1]!;
      const sGap = gap === 0 ? 0 : h > k ? wide[2 * gap]! : -wide[2 * gap]!;
      const cSum = wide[2 * (h + k) - 1]!;
      const sSum = wide[2 * (h + k)]!;
      out[cosine + 2 * k - 1] = 0.5 * (cGap + cSum);
      out[cosine + 2 * k] = 0.5 * (sSum - sGap);
      out[sine + 2 * k - 1] = 0.5 * (sSum + sGap);
      out[sine + 2 * k] = 0.5 * (cGap - cSum);
    }
  }
}
