import { describe, expect, it } from 'vitest';
import { readStripDevice } from '../../../src/features/strip/device';

const typed = {
  layout: 'through',
  axisAngle: '90 deg',
  magnets: [{ shape: 'cylinder', outerDiameter: '10 mm', length: '0.4 in', at: 0, polarity: -1 }],
  coils: [
    {
      shape: 'round',
      innerDiameter: 0.012,
      outerDiameter: '18 mm',
      length: '6 mm',
      at: '-5.567 mm',
      turns: '1000',
      wire: 'AWG 38 single',
    },
  ],
  suspension: { kind: 'spring', stiffness: '2.467 kN/m' },
  stops: { lower: '-4 mm', upper: null, stiffness: '100 kN/m' },
};

describe('readStripDevice', () => {
  it('reads typed quantities and SI numbers alike, in millimetres', () => {
    const device = readStripDevice(typed);
    expect(device.layout).toBe('through');
    expect(device.magnets).toEqual([
      { shape: 'cylinder', innerRadius: 0, outerRadius: 5, length: 10.16, at: 0, polarity: -1 },
    ]);
    expect(device.coils[0]).toMatchObject({
      innerRadius: 6,
      outerRadius: 9,
      length: 6,
      turns: 1000,
      wire: null,
      sense: 1,
    });
    expect(device.coils[0]?.at).toBeCloseTo(-5.567, 9);
    expect(device.stops).toEqual({ lower: -4, upper: null });
    expect(device.axisAngle).toBeCloseTo(Math.PI / 2, 12);
    expect(device.missing).toEqual([]);
  });

  it('draws on with the value read before while a number is half typed', () => {
    const halfTyped = { ...typed, magnets: [{ ...typed.magnets[0], length: '12 m m' }] };
    expect(readStripDevice(halfTyped, typed).magnets[0]).toMatchObject({ length: 10.16 });
  });

  it('leaves a part out that was never readable, and says where', () => {
    const device = readStripDevice({ ...typed, coils: [{ ...typed.coils[0], outerDiameter: 'wide' }] });
    expect(device.coils).toEqual([]);
    expect(device.missing).toEqual(['coils.0.outerDiameter']);
  });

  it('takes anything at all without failing', () => {
    for (const nonsense of [null, undefined, 7, 'text', [], { magnets: 'no list' }, { magnets: [null, 3] }]) {
      expect(readStripDevice(nonsense).magnets).toEqual([]);
    }
  });

  it('reads blocks over flat coils', () => {
    const device = readStripDevice({
      layout: 'across',
      magnets: [{ shape: 'block', size: ['10 mm', '15 mm', '4 mm'], at: ['-5.5 mm', 0, '3.75 mm'], polarity: 1 }],
      coils: [
        {
          shape: 'racetrack',
          straight: '8 mm',
          innerEndRadius: '2 mm',
          outerEndRadius: '5 mm',
          length: '2.5 mm',
          at: [0, 0, 0],
          turns: 300,
        },
      ],
    });
    expect(device).toMatchObject({
      layout: 'across',
      magnets: [{ size: [10, 15, 4], at: [-5.5, 0, 3.75] }],
      coils: [{ shape: 'racetrack', inner: [2, 6], outer: [5, 9] }],
    });
  });
});
