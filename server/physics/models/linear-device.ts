import type { Device } from './device';
import type { LinearDevice } from './linear-response';
import { hasConstantCoupling, isMechanicallyLinear } from './oscillator';

/** The device as a linear one, on its resistor or open, or null where something in it is not linear. */
export function linearised(device: Device): { loaded: LinearDevice; open: LinearDevice; resistance: number } | null {
  const { circuit } = device;
  if (circuit.kind !== 'resistor' || !isMechanicallyLinear(device) || !hasConstantCoupling(device)) return null;
  const loaded = {
    mass: device.mass,
    damping: device.damping,
    stiffness: -device.suspension.forceSlope(0),
    coupling: device.coupling.at(device.restPosition),
    coilResistance: device.coilResistance,
    coilInductance: device.coilInductance,
    resistance: circuit.resistance,
  };
  return { loaded, open: { ...loaded, resistance: Infinity }, resistance: circuit.resistance };
}
