import type { CircuitModel } from './circuit-model';
import type { Device, Tone } from './device';
import { transferAt } from './linear-response';
import type { PeriodStart } from './periodic-motion';

const POINTS = 32;

/** Direct voltage at which the capacitors neither gain nor lose charge over a period of the given EMF, V. */
export function balancedVoltage(device: Device, circuit: CircuitModel, emf: Float64Array): number {
  if (circuit.capacitors === 0) return 0;
  const base = new Float64Array(circuit.capacitors);
  const gainAt = (voltage: number): number => {
    base.fill(voltage);
    let sum = 0;
    for (let k = 0; k < emf.length; k++) {
      circuit.solve(emf[k]!, device.coilResistance, base, 0);
      sum += circuit.rate[0]!;
    }
    return sum;
  };
  let low = 0;
  let high = emf.reduce((most, e) => Math.max(most, Math.abs(e)), 0);
  for (let n = 0; n < 16; n++) {
    const middle = 0.5 * (low + high);
    if (gainAt(middle) > 0) low = middle;
    else high = middle;
  }
  return 0.5 * (low + high);
}

/** Mean power the circuit and coil take from an EMF with the capacitors balanced, W, and their voltage. */
function absorbed(device: Device, circuit: CircuitModel, emf: Float64Array): { power: number; voltage: number } {
  const voltage = balancedVoltage(device, circuit, emf);
  const base = new Float64Array(circuit.capacitors).fill(voltage);
  let sum = 0;
  for (let k = 0; k < emf.length; k++) {
    circuit.solve(emf[k]!, device.coilResistance, base, 0);
    sum += emf[k]! * circuit.current;
  }
  return { power: sum / emf.length, voltage };
}

/**
 * A start for shooting where the mechanics are linear: a sinusoidal motion whose electrical damping is what the circuit
 * takes from it, found by bisection (more damping, less motion, less taken).
 */
export function sinusoidalStart(device: Device, circuit: CircuitModel, tone: Tone): PeriodStart {
  const omega = 2 * Math.PI * tone.frequency;
  const linear = {
    mass: device.mass,
    stiffness: -device.suspension.forceSlope(0),
    coupling: 0,
    coilResistance: device.coilResistance,
    coilInductance: 0,
    resistance: Infinity,
  };
  const emf = new Float64Array(POINTS);
  const at = (electrical: number) => {
    const { uRe, uIm } = transferAt({ ...linear, damping: device.damping + electrical }, omega);
    // a = Im(A e^{j(ωt + φ)})
    const amplitude = tone.acceleration * Math.hypot(uRe, uIm);
    const angle = Math.atan2(uIm, uRe) + tone.phase;
    for (let k = 0; k < POINTS; k++) {
      const x = (2 * Math.PI * k) / POINTS + angle;
      emf[k] = device.coupling.at(device.restPosition + amplitude * Math.sin(x)) * omega * amplitude * Math.cos(x);
    }
    const { power, voltage } = absorbed(device, circuit, emf);
    const square = 0.5 * (omega * amplitude) ** 2;
    return { amplitude, angle, voltage, taken: square > 0 ? power / square : 0 };
  };
  let low = -14;
  let high = 4;
  const unit = device.damping + omega * device.mass;
  for (let n = 0; n < 16; n++) {
    const middle = 0.5 * (low + high);
    if (at(unit * 10 ** middle).taken > unit * 10 ** middle) low = middle;
    else high = middle;
  }
  const { amplitude, angle, voltage } = at(unit * 10 ** (0.5 * (low + high)));
  return {
    u: amplitude * Math.sin(angle),
    v: omega * amplitude * Math.cos(angle),
    current: 0,
    voltage: Array.from({ length: circuit.capacitors }, () => voltage),
  };
}
