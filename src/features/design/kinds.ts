import type { Draft } from './document-path';
import { readAt, writeAt } from './document-path';

/** Starting points of parts that are added or chosen; as a person would type them. */

export const newMagnet = {
  through: {
    shape: 'cylinder',
    outerDiameter: '10 mm',
    innerDiameter: '0 mm',
    length: '10 mm',
    at: '0 mm',
    polarity: 1,
    material: 'NdFeB N42',
  },
  across: {
    shape: 'block',
    size: ['10 mm', '10 mm', '4 mm'],
    at: ['0 mm', '0 mm', '4 mm'],
    polarity: 1,
    material: 'NdFeB N42',
  },
} as const;

export const newCoil = {
  through: {
    shape: 'round',
    innerDiameter: '12 mm',
    outerDiameter: '18 mm',
    length: '6 mm',
    at: '-5.5 mm',
    turns: '1000',
    sense: 1,
    wire: 'IEC 0.100 grade 1',
  },
  across: {
    shape: 'round',
    innerDiameter: '6 mm',
    outerDiameter: '18 mm',
    length: '2.5 mm',
    at: ['0 mm', '0 mm', '0 mm'],
    turns: '500',
    sense: 1,
    wire: 'IEC 0.100 grade 1',
  },
} as const;

export const coilShapes = {
  round: { innerDiameter: '6 mm', outerDiameter: '18 mm' },
  racetrack: { straight: '8 mm', innerEndRadius: '3 mm', outerEndRadius: '8 mm' },
  rectangular: { inner: ['6 mm', '8 mm'], outer: ['16 mm', '18 mm'] },
} as const;
export type CoilShape = keyof typeof coilShapes;

export const suspensions = {
  spring: { kind: 'spring', stiffness: '2.467 kN/m', cubic: '0 N/m³', neutralAt: '0 mm' },
  helical: {
    kind: 'helical',
    wireDiameter: '0.6 mm',
    meanDiameter: '8 mm',
    activeTurns: '6',
    springs: '2',
    neutralAt: '0 mm',
  },
  levitated: {
    kind: 'levitated',
    fixed: [
      { ...newMagnet.through, length: '3 mm', at: '-25 mm', polarity: -1 },
      { ...newMagnet.through, length: '3 mm', at: '25 mm', polarity: -1 },
    ],
  },
  table: { kind: 'table', displacement: ['-5 mm', '0 mm', '5 mm'], force: ['12 N', '0 N', '-12 N'] },
} as const;
export type SuspensionKind = keyof typeof suspensions;

const diode = '1N4148';
export const circuits = {
  resistor: { kind: 'resistor', resistance: '800 Ω' },
  bridge: { kind: 'bridge', resistance: '10 kΩ', capacitance: '47 µF', diode },
  doubler: { kind: 'doubler', resistance: '10 kΩ', capacitance: '47 µF', diode },
  store: { kind: 'store', voltage: '3 V', diode },
  tracker: { kind: 'tracker', inputResistance: '1 kΩ', startVoltage: '0.3 V', efficiency: '0.8', diode },
  supercapacitor: {
    kind: 'supercapacitor',
    capacitance: '100 mF',
    seriesResistance: '0.5 Ω',
    leakageResistance: '500 kΩ',
    initialVoltage: '0 V',
    diode,
    node: {
      sleepCurrent: '2 µA',
      activeCurrent: '10 mA',
      activeTime: '20 ms',
      period: '60 s',
      minimumVoltage: '1.8 V',
    },
    duration: '600 s',
  },
} as const;
export type CircuitKind = keyof typeof circuits;

export const diodeForms = {
  shockley: { saturationCurrent: '2.5 nA', emissionCoefficient: '1.75', seriesResistance: '0.6 Ω' },
  drop: { drop: '0.3 V' },
} as const;

export type Layout = 'through' | 'across';
export const layoutOf = (document: unknown): Layout => (readAt(document, 'layout') === 'across' ? 'across' : 'through');

/** Puts a part aside under its kind and takes the other kind from the shelf, or from its starting point. */
export function changeKind(
  document: Draft,
  shelf: Map<string, unknown>,
  path: string,
  from: string,
  to: string,
  start: unknown,
): Draft {
  if (from === to) return document;
  const before = readAt(document, path);
  if (before !== undefined) shelf.set(`${path} ${from}`, before);
  return writeAt(document, path, shelf.get(`${path} ${to}`) ?? start);
}

/** The other layout needs other magnets and coils; those of this one wait on the shelf. */
export function changeLayout(document: Draft, shelf: Map<string, unknown>, to: Layout): Draft {
  const from = layoutOf(document);
  if (from === to) return document;
  let next = writeAt(document, 'layout', to);
  next = changeKind(next, shelf, 'magnets', from, to, [newMagnet[to]]);
  next = changeKind(next, shelf, 'coils', from, to, [newCoil[to]]);
  const levitated = readAt(next, 'suspension.kind') === 'levitated';
  if (to === 'across') {
    shelf.set('misalignment through', readAt(next, 'misalignment'));
    next = writeAt(next, 'misalignment', undefined);
    // The force between blocks is not modelled.
    if (levitated) next = changeKind(next, shelf, 'suspension', 'levitated', 'spring', suspensions.spring);
  } else {
    next = writeAt(next, 'misalignment', shelf.get('misalignment through'));
  }
  return next;
}

/** Another one of a list: like the last, moved on along the travel so that they do not lie in each other. */
export function nextOf(list: readonly unknown[], start: unknown): unknown {
  const last = list[list.length - 1];
  return last === undefined ? start : structuredClone(last);
}
