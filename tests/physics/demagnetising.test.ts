import { describe, expect, it } from 'vitest';
import { integrate } from '../../server/physics/kernels/gauss-legendre';
import { demagnetisingFactorOfBlock, demagnetisingFactorOfRing } from '../../server/physics/models/demagnetising';
import { magnetisationOf } from '../../server/physics/models/magnetisation';
import { MAGNETIC_CONSTANT } from '../../server/physics/models/constants';
import { handbookValue, numberOf, numbersOf } from '../support/handbook';

describe('magnetometric demagnetising factor', () => {
  it('of cylinders: handbook/magnets.json#demag-cylinder (P1)', () => {
    const { given, expected } = handbookValue('magnets', 'demag-cylinder');
    const factors = numbersOf(expected, 'magnetometric');
    numbersOf(given, 'lengthOverDiameter').forEach((ratio, i) => {
      expect(Math.abs(demagnetisingFactorOfRing(0.5, 0, ratio) - factors[i]!)).toBeLessThan(1e-6);
    });
  });

  it('of cylinders through Nagaoka’s coefficient: handbook/inductance.json#nagaoka-table (P1)', () => {
    const { given, expected } = handbookValue('inductance', 'nagaoka-table');
    const coefficients = numbersOf(expected, 'nagaokaCoefficient');
    numbersOf(given, 'diameterOverLength').forEach((ratio, i) => {
      expect(Math.abs(1 - demagnetisingFactorOfRing(ratio / 2, 0, 1) - coefficients[i]!)).toBeLessThan(1e-9);
    });
  });

  it('of a ring runs from the cylinder’s to the thin shell’s', () => {
    const solid = demagnetisingFactorOfRing(5e-3, 0, 10e-3);
    expect(demagnetisingFactorOfRing(5e-3, 1e-6, 10e-3)).toBeCloseTo(solid, 6);
    // a thin shell of thickness t and length l is a long plate magnetised in its plane: N → (t/(π l)) (ln(l/t) + 3/2)
    const t = 1e-5;
    const l = 1e-2;
    const plate = (t / (Math.PI * l)) * (Math.log(l / t) + 1.5);
    expect(demagnetisingFactorOfRing(1, 1 - t, l) / plate).toBeCloseTo(1, 2);
  });

  it('of a cube is a third, of any block the three add to one', () => {
    expect(demagnetisingFactorOfBlock(2, 2, 2)).toBeCloseTo(1 / 3, 13);
    for (const [x, y, z] of [
      [10, 15, 4],
      [1, 30, 2],
      [8, 8, 0.5],
    ] as const) {
      const sum =
        demagnetisingFactorOfBlock(x, y, z) + demagnetisingFactorOfBlock(y, z, x) + demagnetisingFactorOfBlock(z, x, y);
      expect(sum).toBeCloseTo(1, 11);
    }
  });

  it.each([
    [10, 15, 4],
    [1, 1, 10],
    [20, 8, 1],
  ])('of a block %d × %d × %d is the energy of its charged faces', (a, b, c) => {
    // faces as charge against charge: N = (I(0) − I(c)) / (2π V), I(h) = 4 ∫∫ (a − u)(b − v) / √(u² + v² + h²) du dv,
    // in triangles with their tip at u = v = 0 (Duffy), where 1/r is cancelled by the area
    const face = (h: number): number =>
      4 *
      integrate(
        (p) =>
          integrate(
            (q) => {
              const kernel = (u: number, v: number): number => ((a - u) * (b - v) * a * b * p) / Math.hypot(u, v, h);
              return kernel(a * p, b * p * q) + kernel(a * p * q, b * p);
            },
            0,
            1,
            80,
          ),
        0,
        1,
        80,
      );
    expect(demagnetisingFactorOfBlock(a, b, c)).toBeCloseTo((face(0) - face(c)) / (2 * Math.PI * a * b * c), 7);
  });

  it('of an endless square bar across it is a half', () => {
    expect(demagnetisingFactorOfBlock(1, 2000, 1)).toBeCloseTo(0.5, 3);
  });

  it('refuses bodies that are none', () => {
    expect(() => demagnetisingFactorOfRing(1, 1, 1)).toThrow(/outer radius above inner radius/);
    expect(() => demagnetisingFactorOfBlock(1, 0, 1)).toThrow(/sides must be positive/);
  });
});

describe('magnetisation', () => {
  const magnet = {
    shape: 'cylinder' as const,
    outerDiameter: 10e-3,
    innerDiameter: 0,
    length: 10e-3,
    at: 0,
    polarity: -1,
    material: { remanence: 1.3, recoilPermeability: 1.05, remanencePerKelvin: -0.0012 },
  };

  it('takes temperature, recoil and polarity in', () => {
    const N = demagnetisingFactorOfRing(5e-3, 0, 10e-3);
    const expected = -(1.3 * (1 - 0.0012 * 60)) / MAGNETIC_CONSTANT / (1 + 0.05 * N);
    expect(magnetisationOf(magnet, 80)).toBeCloseTo(expected, 6);
    expect(magnetisationOf(magnet, 80, false)).toBeCloseTo(expected * (1 + 0.05 * N), 6);
  });

  it('agrees with handbook/magnets.json#magnet-moment (P1)', () => {
    const { given, expected } = handbookValue('magnets', 'magnet-moment');
    const rigid = {
      ...magnet,
      polarity: 1,
      material: { ...magnet.material, remanence: numberOf(given, 'remanence_T') },
    };
    const volume = (Math.PI / 4) * numberOf(given, 'diameter_m') ** 2 * numberOf(given, 'length_m');
    expect(magnetisationOf(rigid, 20, false) * volume).toBeCloseTo(numberOf(expected, 'moment_Am2'), 9);
  });
});
