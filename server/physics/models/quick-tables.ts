import { uniformTable } from '../kernels/uniform-table';
import type { UniformTable } from '../kernels/uniform-table';
import type { Circuit, Device, Diode } from './device';
import { seriesCurrent } from './diode';

export type QuickCircuit = Extract<Circuit, { kind: 'resistor' | 'bridge' | 'store' }>;

/** Spacing of the rectifier's table in units of the junction's own voltage n Vt of both diodes. */
const JUNCTION_SHARE = 1 / 24;
/** Drive up to which the rectifier is tabulated, V; beyond it its equation is solved. */
const LARGEST_DRIVE = 8;

/** Whether the quick way is open to a device at all. */
export function quickCircuit(device: Device): QuickCircuit | null {
  const { circuit } = device;
  if (device.stops !== null || device.coilInductance > 0 || !(device.coilResistance > 0)) return null;
  if (circuit.kind === 'resistor') return circuit;
  if (circuit.kind !== 'store' && !(circuit.kind === 'bridge' && circuit.capacitance > 0)) return null;
  const { diode } = circuit;
  if (diode.kind !== 'shockley') return null;
  // the paths are swept against each other: the blocked one must hardly matter
  const blocked = (2 * diode.emissionCoefficient * diode.thermalVoltage) / diode.saturationCurrent;
  return device.coilResistance / (device.coilResistance + blocked) < 0.01 ? circuit : null;
}

/** Current of one rectifying path of two diodes against what drives it beyond the direct voltage, up to `largest` V. */
export function pathTable(diode: Diode, resistance: number, largest: number): UniformTable | null {
  if (diode.kind !== 'shockley') return null;
  const slope = 2 * diode.emissionCoefficient * diode.thermalVoltage;
  const series = resistance + 2 * diode.seriesResistance;
  const current = (s: number): number => seriesCurrent(diode, 2, resistance, s);
  const from = -40 * slope;
  const panels = Math.ceil((Math.min(largest, LARGEST_DRIVE) - from) / (slope * JUNCTION_SHARE));
  if (panels > 200_000) return null;
  return uniformTable(
    current,
    (s) => 1 / (series + slope / Math.max(current(s) + diode.saturationCurrent, 1e-300)),
    from,
    from + panels * slope * JUNCTION_SHARE,
    panels,
  );
}
