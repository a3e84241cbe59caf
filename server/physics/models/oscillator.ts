import type { PortOscillator } from '../kernels/harmonic-balance';
import type { Device } from './device';

/** The device as a port oscillator about its rest, with a resistance (Ω; Infinity for open) at the terminals. */
export function oscillatorWith(device: Device, resistance: number): PortOscillator {
  const { suspension, coupling, restPosition } = device;
  return {
    mass: device.mass,
    damping: device.damping,
    drag: device.quadraticDrag,
    resistance: device.coilResistance + resistance,
    inductance: device.coilInductance,
    restoring: (u) => -suspension.force(u),
    restoringSlope: (u) => -suspension.forceSlope(u),
    coupling: (u) => coupling.at(restPosition + u),
    couplingSlope: (u) => coupling.slopeAt(restPosition + u),
  };
}

/** Whether the suspension is a straight line and nothing but linear damping acts: without a coil it is linear. */
export function isMechanicallyLinear(device: Device): boolean {
  const polynomial = device.suspension.polynomial;
  return (
    polynomial !== null &&
    polynomial.k2 === 0 &&
    polynomial.k3 === 0 &&
    device.quadraticDrag === 0 &&
    device.stops === null
  );
}

/** Whether the coupling is one number over all of the travel. */
export function hasConstantCoupling(device: Device): boolean {
  const { coupling, restPosition } = device;
  const value = coupling.at(restPosition);
  const from = Number.isFinite(coupling.from) ? coupling.from : restPosition - 1;
  const to = Number.isFinite(coupling.to) ? coupling.to : restPosition + 1;
  for (let n = 0; n <= 40; n++) {
    const x = from + ((to - from) * n) / 40;
    if (coupling.at(x) !== value || coupling.slopeAt(x) !== 0) return false;
  }
  return true;
}
