import { describe, expect, it } from 'vitest';
import { uniformTable } from '#physics/kernels/uniform-table';
import type { Circuit, Device } from '#physics/models/device';
import { quickCircuit } from '#physics/models/quick-tables';
import { runQuickly } from '#physics/models/quick-run';
import { recordedExcitation, runRecord } from '#physics/models/record-run';
import { gaussianRecord } from '#physics/models/spectrum-record';
import { deviceOf, readCase } from './device-of-case';

const base = deviceOf(readCase('D5-04'));
const { diode } = base.circuit as Extract<Circuit, { kind: 'bridge' }>;
const schottky = { ...diode, saturationCurrent: 3e-6 } as typeof diode;
const rate = 2000;
const record = gaussianRecord(
  [
    [10, 3],
    [150, 3],
  ],
  rate,
  4000,
  8,
);

const variants: [string, Partial<Device>][] = [
  ['a silicon bridge', {}],
  ['a Schottky bridge', { circuit: { kind: 'bridge', resistance: 2000, capacitance: 1e-5, diode: schottky } }],
  ['a store, with drag', { circuit: { kind: 'store', voltage: 0.4, diode }, quadraticDrag: 0.1 }],
  ['a resistor', { circuit: { kind: 'resistor', resistance: 400 } }],
];

describe('the quick way through a recording', () => {
  it.each(variants)('agrees with controlled steps: %s', (_, change) => {
    const device = { ...base, ...change };
    const quick = runQuickly(device, false, record, rate)!;
    const careful = runRecord(device, device.circuit, recordedExcitation(record, rate), 1e-9);
    const { mean } = careful;
    for (const key of ['mechanicalIn', 'mechanicalLoss', 'load', 'current2', 'emf2'] as const)
      // coil loss comes in short pulses through the diodes: they are the coarsest seen
      expect(Math.abs(quick.mean[key] / mean[key] - 1), key).toBeLessThan(2e-4);
    expect(Math.abs(quick.displacementPeak / careful.displacementPeak - 1)).toBeLessThan(1e-5);
    expect(Math.abs(quick.stored - careful.stored)).toBeLessThan(1e-4 * mean.mechanicalIn);
  });

  it('agrees with the coil open', () => {
    const quick = runQuickly(base, true, record, rate)!;
    const careful = runRecord(base, null, recordedExcitation(record, rate), 1e-9);
    expect(Math.abs(quick.mean.emf2 / careful.mean.emf2 - 1)).toBeLessThan(1e-5);
    expect(quick.mean.load).toBe(0);
  });

  it('is barred where inductance, stops, a fixed drop or a leaky diode need more care', () => {
    const bridge = base.circuit as Extract<Circuit, { kind: 'bridge' }>;
    const barred: Partial<Device>[] = [
      { coilInductance: 0.01 },
      { stops: { lower: null, upper: 1e-3, stiffness: 1e4, damping: 1 } },
      { circuit: { ...bridge, diode: { kind: 'drop', drop: 0.3 } } },
      { circuit: { ...bridge, diode: { ...diode, saturationCurrent: 1e-3 } as typeof diode } },
      { circuit: { ...bridge, capacitance: 0 } },
    ];
    for (const change of barred) expect(quickCircuit({ ...base, ...change })).toBeNull();
    expect(quickCircuit(base)).not.toBeNull();
  });

  it('gives up where a step would turn too far', () => {
    expect(runQuickly(base, false, new Float64Array([0, 1, 0, -1, 0]), 10)).toBeNull();
  });
});

describe('a uniform table', () => {
  it('is exact for cubics at its points and refuses empty ranges', () => {
    const { rows, perUnit } = uniformTable(
      (x) => x ** 3,
      (x) => 3 * x * x,
      -1,
      1,
      8,
    );
    expect(perUnit).toBe(4);
    expect(rows[2]).toBeCloseTo(-(0.75 ** 3), 14);
    expect(rows[3]).toBeCloseTo(0.25 * 3 * 0.75 ** 2, 14);
    expect(() => uniformTable(Math.sin, Math.cos, 1, 1, 8)).toThrow(RangeError);
    expect(() => uniformTable(Math.sin, Math.cos, 0, 1, 0.5)).toThrow(RangeError);
  });
});
