import { describe, expect, test } from 'vitest';
import { parseDesignDocument } from '#physics/design-document';
import type { AxialCoil, FaceCoil } from '#physics/design-document';
import { mostTurns, windingFit, windingOf, windingsOf } from '#physics/models/winding';
import { handbookValue, numberOf, referenceCase } from '../support/handbook';

const reference = parseDesignDocument(referenceCase('D1-01').design);
const coil = reference.coils[0] as AxialCoil;
const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);

// handbook/wire.json#winding-ref (P1)
test('resistance, wire length and fill factor of the reference winding', () => {
  const { expected } = handbookValue('wire', 'winding-ref');
  const at20 = windingOf(coil, 58e6, 20);
  expect(relative(at20.wireLength, numberOf(expected, 'wireLength_m'))).toBeLessThan(1e-8);
  expect(relative(at20.resistance, numberOf(expected, 'resistance58At20_ohm'))).toBeLessThan(1e-8);
  expect(relative(windingOf(coil, 58.5e6, 20).resistance, numberOf(expected, 'resistance58p5At20_ohm'))).toBeLessThan(
    1e-8,
  );
  expect(relative(windingOf(coil, 58e6, 80).resistance, numberOf(expected, 'resistance58At80_ohm'))).toBeLessThan(1e-8);
  expect(relative(at20.fillFactor, numberOf(expected, 'copperFillFactor'))).toBeLessThan(1e-8);
  // The row takes 8890 kg/m³; physics.md and the cases 8960
  expect(relative(at20.copperMass, (numberOf(expected, 'copperMass8890_kg') * 8960) / 8890)).toBeLessThan(1e-8);
});

// handbook/wire.json#winding-fit (P1)
test('turns that fit, square and orthocyclic', () => {
  const { given, expected } = handbookValue('wire', 'winding-fit');
  expect(
    windingFit(
      numberOf(given, 'windowLength_m'),
      numberOf(given, 'windowDepth_m'),
      numberOf(given, 'overallDiameter_m'),
    ),
  ).toEqual({
    turnsPerLayer: expected['turnsPerLayer'],
    layersSquare: expected['layersSquare'],
    turnsSquare: expected['turnsSquare'],
    layersOrthocyclic: expected['layersOrthocyclic'],
    turnsOrthocyclic: expected['turnsOrthocyclic'],
  });
});

// handbook/wire.json#iec-0.100 (P1): one metre of wire
test('resistance per metre of wire', () => {
  const { expected } = handbookValue('wire', 'iec-0.100');
  const winding = windingOf(coil, 58e6, 20);
  expect(relative(winding.resistance / winding.wireLength, numberOf(expected, 'resistance58_ohmPerM'))).toBeLessThan(
    1e-6,
  );
});

describe('fit', () => {
  test('divisions that come out even lose no layer to rounding', () => {
    expect(windingFit(0.005, 0.003, 0.0001)).toMatchObject({ turnsPerLayer: 50, layersSquare: 30 });
    expect(windingFit(0.0003, 0.0001, 0.0001)).toMatchObject({
      turnsPerLayer: 3,
      layersSquare: 1,
      layersOrthocyclic: 1,
    });
  });

  test('half a wire of length left over keeps the second layer full', () => {
    expect(windingFit(3.5e-4, 2e-4, 1e-4)).toMatchObject({
      turnsPerLayer: 3,
      layersOrthocyclic: 2,
      turnsOrthocyclic: 6,
    });
    expect(windingFit(3.4e-4, 2e-4, 1e-4).turnsOrthocyclic).toBe(5);
  });

  test('nothing fits where the wire is thicker than the window', () => {
    expect(windingFit(1e-3, 1e-4, 2e-4)).toMatchObject({ turnsSquare: 0, turnsOrthocyclic: 0 });
    expect(() => windingFit(1e-3, 1e-3, 0)).toThrow(RangeError);
  });

  test('no lay beats the densest packing of the plane', () => {
    for (const depth of [1e-3, 1.7e-3, 3e-3]) {
      for (const wire of [4e-5, 1.17e-4, 2.3e-4]) {
        const fit = windingFit(6e-3, depth, wire);
        expect(Math.max(fit.turnsSquare, fit.turnsOrthocyclic)).toBeLessThanOrEqual(mostTurns(6e-3 * depth, wire));
      }
    }
  });

  test('windable as long as the turns fit one of the lays', () => {
    const lay = (turns: number): [boolean, boolean] => {
      const { windable, needsOrthocyclic } = windingOf({ ...coil, turns }, 58e6, 20);
      return [windable, needsOrthocyclic];
    };
    expect(lay(1275)).toEqual([true, false]);
    expect(lay(1276)).toEqual([true, true]);
    expect(lay(1465)).toEqual([true, true]);
    expect(lay(1466)).toEqual([false, false]);
  });
});

describe('scaling', () => {
  test('lengths times s: wire length × s, resistance ÷ s, mass × s³, the same fill', () => {
    const s = 2.5;
    const larger: AxialCoil = {
      ...coil,
      innerDiameter: s * coil.innerDiameter,
      outerDiameter: s * coil.outerDiameter,
      length: s * coil.length,
      wire: { ...coil.wire, diameter: s * coil.wire.diameter, overallDiameter: s * coil.wire.overallDiameter },
    };
    const small = windingOf(coil, 58e6, 20);
    const large = windingOf(larger, 58e6, 20);
    expect(relative(large.wireLength, s * small.wireLength)).toBeLessThan(1e-12);
    expect(relative(large.resistance, small.resistance / s)).toBeLessThan(1e-12);
    expect(relative(large.copperMass, s ** 3 * small.copperMass)).toBeLessThan(1e-12);
    expect(relative(large.fillFactor, small.fillFactor)).toBeLessThan(1e-12);
  });

  test('two coils in series add', () => {
    const one = windingOf(coil, 58e6, 20);
    const two = windingsOf([coil, { ...coil, sense: -1 }], 58e6, 20);
    expect(two.resistance).toBeCloseTo(2 * one.resistance, 10);
    expect(two.wireLength).toBeCloseTo(2 * one.wireLength, 10);
    expect(two.fillFactor).toBeCloseTo(one.fillFactor, 12);
  });
});

test('a racetrack without straights is a round coil; a square coil is 4/π of one round in it', () => {
  const face = {
    length: 2e-3,
    at: [0, 0, 0] as [number, number, number],
    turns: 200,
    sense: 1 as const,
    wire: coil.wire,
  };
  const round: FaceCoil = { shape: 'round', innerDiameter: 4e-3, outerDiameter: 10e-3, ...face };
  const racetrack: FaceCoil = {
    shape: 'racetrack',
    straight: 1e-12,
    innerEndRadius: 2e-3,
    outerEndRadius: 5e-3,
    ...face,
  };
  const square: FaceCoil = { shape: 'rectangular', inner: [4e-3, 4e-3], outer: [10e-3, 10e-3], ...face };
  const length = (shape: FaceCoil): number => windingOf(shape, 58e6, 20).wireLength;
  expect(relative(length(racetrack), length(round))).toBeLessThan(1e-9);
  expect(relative(length(square), (4 / Math.PI) * length(round))).toBeLessThan(1e-12);
});
