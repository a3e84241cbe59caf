import { wrightOmega } from '../kernels/wright-omega';
import type { Diode } from './device';

const BOLTZMANN = 1.380649e-23;
const ELEMENTARY_CHARGE = 1.602176634e-19;

/** kT/q at a temperature in °C, V (exact SI constants). */
export function thermalVoltage(temperature: number): number {
  return (BOLTZMANN * (temperature + 273.15)) / ELEMENTARY_CHARGE;
}

/** Voltage over a diode that carries a current, V: n Vt ln(1 + i/Is) + i Rs, or the fixed drop while it conducts. */
export function diodeVoltage(diode: Diode, current: number): number {
  if (diode.kind === 'drop') return diode.drop;
  const { saturationCurrent, emissionCoefficient, thermalVoltage: vt, seriesResistance } = diode;
  return emissionCoefficient * vt * Math.log1p(current / saturationCurrent) + current * seriesResistance;
}

/**
 * Current through a resistance and `count` equal diodes in series from a source, A: the root of
 * a i + count · v(i) = s. A Shockley diode's is closed by Wright's omega, and never below −Is.
 */
export function seriesCurrent(diode: Diode, count: number, resistance: number, source: number): number {
  if (diode.kind === 'drop') return Math.max(0, (source - count * diode.drop) / resistance);
  const { saturationCurrent, seriesResistance } = diode;
  const slope = count * diode.emissionCoefficient * diode.thermalVoltage;
  const total = resistance + count * seriesResistance;
  if (total === 0) return saturationCurrent * Math.expm1(Math.min(source / slope, 700));
  // with y = 1 + i/Is: (total Is/slope) y + ln y = (s + total Is)/slope
  const ratio = (total * saturationCurrent) / slope;
  const z = (source + total * saturationCurrent) / slope + Math.log(ratio);
  return (wrightOmega(z) * slope) / total - saturationCurrent;
}
