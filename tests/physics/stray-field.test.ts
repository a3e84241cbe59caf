import { describe, expect, it } from 'vitest';
import { integrate } from '../../server/physics/kernels/gauss-legendre';
import type { AxialMagnet } from '../../server/physics/models/axial-magnet';
import { MAGNETIC_CONSTANT } from '../../server/physics/models/constants';
import type { BlockMagnet, CylinderMagnet } from '../../server/physics/models/magnet';
import { fieldOfBlock, fieldOfCylinder } from '../../server/physics/models/magnet-field';
import { AIR_TRANSPORT, distanceToField, IMPLANT_LIMIT, strayField } from '../../server/physics/models/stray-field';
import { coercivityAt, operatingPoints } from '../../server/physics/models/operating-point';
import type { CoerciveMaterial } from '../../server/physics/models/operating-point';
import { handbookValue, handbookValues, numberOf, numbersOf } from '../support/handbook';

const relative = (actual: number, expected: number): number => Math.abs(actual / expected - 1);
const rigid = (remanence: number): CoerciveMaterial => ({
  remanence,
  recoilPermeability: 1,
  remanencePerKelvin: 0,
  intrinsicCoercivity: 955e3,
});
const cylinder = (
  diameter: number,
  length: number,
  at = 0,
  polarity = 1,
  remanence = 1.3,
): CylinderMagnet<CoerciveMaterial> => ({
  shape: 'cylinder',
  outerDiameter: diameter,
  innerDiameter: 0,
  length,
  at,
  polarity,
  material: rigid(remanence),
});
const axial = (diameter: number, length: number, remanence: number, inner = 0): AxialMagnet => ({
  outerRadius: diameter / 2,
  innerRadius: inner / 2,
  length,
  at: 0,
  magnetisation: remanence / MAGNETIC_CONSTANT,
});

describe('field of a magnet', () => {
  it.each([...handbookValues('magnets', 'axis-cyl'), ...handbookValues('magnets', 'axis-disc')])(
    'on the axis: handbook/magnets.json#$id ($grade)',
    ({ given, expected }) => {
      const length = numberOf(given, 'length_m');
      const magnet = axial(numberOf(given, 'diameter_m'), length, numberOf(given, 'remanence_T'));
      const field = fieldOfCylinder(magnet, 0, length / 2 + numberOf(given, 'distanceFromFace_m'));
      expect(relative(field.axial, numberOf(expected, 'axialFluxDensity_T'))).toBeLessThan(1e-9);
      expect(Math.abs(field.radial)).toBeLessThan(1e-12);
    },
  );

  it('on the axis of a ring: handbook/magnets.json#axis-ring-1 (P1)', () => {
    const { given, expected } = handbookValue('magnets', 'axis-ring-1');
    const length = numberOf(given, 'length_m');
    const ring = axial(
      numberOf(given, 'outerDiameter_m'),
      length,
      numberOf(given, 'remanence_T'),
      numberOf(given, 'innerDiameter_m'),
    );
    const field = fieldOfCylinder(ring, 0, length / 2 + numberOf(given, 'distanceFromFace_m'));
    expect(relative(field.axial, numberOf(expected, 'axialFluxDensity_T'))).toBeLessThan(1e-9);
  });

  it.each(handbookValues('magnets', 'offaxis-cyl'))(
    'off the axis: handbook/magnets.json#$id ($grade)',
    ({ given, expected }) => {
      const magnet = axial(numberOf(given, 'diameter_m'), numberOf(given, 'length_m'), numberOf(given, 'remanence_T'));
      const field = fieldOfCylinder(magnet, numberOf(given, 'rho_m'), numberOf(given, 'z_m'));
      expect(Math.abs(field.radial - numberOf(expected, 'radialFluxDensity_T'))).toBeLessThan(1e-8);
      expect(Math.abs(field.axial - numberOf(expected, 'axialFluxDensity_T'))).toBeLessThan(1e-8);
    },
  );

  it.each(handbookValues('magnets', 'axis-block'))(
    'of a block: handbook/magnets.json#$id ($grade)',
    ({ given, expected }) => {
      const thickness = numberOf(given, 'thickness_m');
      const block = {
        size: [numberOf(given, 'sizeX_m'), numberOf(given, 'sizeY_m'), thickness],
        at: [0, 0, 0],
        magnetisation: numberOf(given, 'remanence_T') / MAGNETIC_CONSTANT,
      };
      const field = fieldOfBlock(block, 0, 0, thickness / 2 + numberOf(given, 'distanceFromFace_m'));
      expect(relative(field[2], numberOf(expected, 'axialFluxDensity_T'))).toBeLessThan(1e-9);
      expect(Math.hypot(field[0], field[1])).toBeLessThan(1e-15);
    },
  );

  it('has no sources outside: divergence and curl vanish', () => {
    const block = { size: [10e-3, 14e-3, 4e-3], at: [1e-3, 0, 0], magnetisation: 1e6 };
    const h = 1e-5;
    const slope = (part: number, axis: number): number => {
      const at = (s: number): number => {
        const point = [9e-3, 4e-3, 5e-3];
        point[axis]! += s;
        return fieldOfBlock(block, point[0]!, point[1]!, point[2]!)[part]!;
      };
      return (at(h) - at(-h)) / (2 * h);
    };
    const size = Math.abs(slope(2, 2));
    expect(Math.abs(slope(0, 0) + slope(1, 1) + slope(2, 2)) / size).toBeLessThan(1e-5);
    expect(Math.abs(slope(0, 1) - slope(1, 0)) / size).toBeLessThan(1e-5);
    expect(Math.abs(slope(0, 2) - slope(2, 0)) / size).toBeLessThan(1e-5);
  });

  it('is continuous through the sheet’s radius and refuses an edge', () => {
    const magnet = axial(10e-3, 10e-3, 1.3);
    const inside = fieldOfCylinder(magnet, 5e-3 * (1 - 1e-9), 9e-3);
    const on = fieldOfCylinder(magnet, 5e-3, 9e-3);
    expect(relative(on.axial, inside.axial)).toBeLessThan(1e-6);
    expect(() => fieldOfCylinder(magnet, 5e-3, 5e-3)).toThrow(/edge/);
    expect(() => fieldOfCylinder(magnet, -1, 0)).toThrow(/rho/);
  });
});

describe('stray field', () => {
  it.each(handbookValues('safety', 'half-millitesla'))(
    'distance to 0.5 mT: handbook/safety.json#$id ($grade)',
    ({ given, expected }) => {
      const magnet = cylinder(numberOf(given, 'diameter_m'), numberOf(given, 'length_m'), 3e-3);
      const found = distanceToField([magnet], 20, numberOf(given, 'fluxDensity_mT') * 1e-3);
      expect(relative(found!.fromCentre, numberOf(expected, 'exact_m'))).toBeLessThan(1e-7);
      expect(found!.fromMagnets).toBeCloseTo(found!.fromCentre - numberOf(given, 'length_m') / 2, 9);
    },
  );

  it('far field: handbook/safety.json#dipole-1 (P1)', () => {
    const { given, expected } = handbookValue('safety', 'dipole-1');
    const magnet = cylinder(numberOf(given, 'diameter_m'), numberOf(given, 'length_m'));
    const { moment, fieldStrengthAtFree, airTransport } = strayField([magnet], 20);
    expect(relative(moment[0], numberOf(expected, 'moment_Am2'))).toBeLessThan(1e-6);
    // the dipole's own figure; the exact one is 3e-6 higher
    expect(relative(fieldStrengthAtFree, numberOf(expected, 'axialFieldStrengthAt2p1_APerM'))).toBeLessThan(1e-5);
    expect(airTransport).toBe('free');
    const exact = numbersOf(expected, 'axialExact_uT');
    numbersOf(given, 'distance_m').forEach((distance, i) => {
      const field = fieldOfCylinder(axial(10e-3, 10e-3, 1.3), 0, distance);
      expect(relative(field.axial * 1e6, exact[i]!)).toBeLessThan(1e-4);
    });
  });

  it('discs and rods near by: handbook/safety.json#dipole-2 (P1)', () => {
    const { given, expected } = handbookValue('safety', 'dipole-2');
    const exact = numbersOf(expected, 'exact_mT');
    numbersOf(given, 'diameter_m').forEach((diameter, i) => {
      const magnet = axial(diameter, numbersOf(given, 'length_m')[i]!, numberOf(given, 'remanence_T'));
      const field = fieldOfCylinder(magnet, 0, numbersOf(given, 'distance_m')[i]!);
      expect(relative(field.axial * 1e3, exact[i]!)).toBeLessThan(1e-6);
    });
  });

  it('limits of air transport: handbook/safety.json#iata-not-restricted, #iata-forbidden, #iata-moment-limits (P1)', () => {
    const free = handbookValue('safety', 'iata-not-restricted').expected;
    const forbidden = handbookValue('safety', 'iata-forbidden').expected;
    expect(AIR_TRANSPORT.free).toEqual({
      fieldStrength: numberOf(free, 'fieldStrength_APerM'),
      distance: numberOf(free, 'distance_m'),
    });
    expect(AIR_TRANSPORT.accepted).toEqual({
      fieldStrength: numberOf(forbidden, 'fieldStrength_APerM'),
      distance: numberOf(forbidden, 'distance_m'),
    });
    // magnets whose moment lies just below and above the limits
    const moments = numbersOf(handbookValue('safety', 'iata-moment-limits').expected, 'moment_Am2');
    const classOf = (moment: number): string => {
      const size = Math.cbrt((moment * MAGNETIC_CONSTANT * 4) / (1.3 * Math.PI));
      return strayField([cylinder(size, size)], 20).airTransport;
    };
    expect([0.99, 1.01].map((share) => classOf(share * moments[0]!))).toEqual(['free', 'magnetised material']);
    expect([0.98, 1.02].map((share) => classOf(share * moments[1]!))).toEqual(['magnetised material', 'forbidden']);
  });

  it('opposed magnets cancel far away but not near by', () => {
    const pair = [cylinder(10e-3, 10e-3, -6e-3), cylinder(10e-3, 10e-3, 6e-3, -1)];
    const { moment, implantDistance } = strayField(pair, 20);
    expect(moment[0]).toBeCloseTo(0, 12);
    expect(implantDistance!.fromMagnets).toBeGreaterThan(0.02);
    expect(implantDistance!.fromCentre).toBeLessThan(distanceToField([pair[0]!], 20, IMPLANT_LIMIT)!.fromCentre);
  });

  it('finds a block’s farthest direction, over its pole', () => {
    const block: BlockMagnet = {
      shape: 'block',
      size: [10e-3, 10e-3, 4e-3],
      at: [0.1, 0, 0.02],
      polarity: 1,
      material: rigid(1.3),
    };
    const found = distanceToField([block], 20, IMPLANT_LIMIT)!;
    const flat = { size: block.size, at: [0, 0, 0], magnetisation: 1.3 / MAGNETIC_CONSTANT };
    expect(relative(fieldOfBlock(flat, 0, 0, found.fromCentre)[2], IMPLANT_LIMIT)).toBeLessThan(1e-8);
    expect(found.fromMagnets).toBeCloseTo(found.fromCentre - 2e-3, 9);
  });

  it('says null where the field is below the limit all round', () => {
    expect(distanceToField([cylinder(1e-3, 1e-3, 0, 1, 0.01)], 20, 0.1)).toBeNull();
    expect(() => strayField([], 20)).toThrow(/must not be empty/);
    expect(() => distanceToField([cylinder(1e-3, 1e-3)], 20, 0)).toThrow(/limit must be positive/);
  });
});

describe('operating point', () => {
  it.each(handbookValues('magnets', 'knee-'))(
    'against the knee: handbook/magnets.json#$id ($grade)',
    ({ given, expected }) => {
      const magnet: CylinderMagnet<CoerciveMaterial> = {
        ...cylinder(numberOf(given, 'diameter_m'), numberOf(given, 'length_m')),
        material: {
          remanence: numberOf(given, 'remanence20_T'),
          remanencePerKelvin: numberOf(given, 'remanenceTempCoeff_percentPerK') / 100,
          recoilPermeability: numberOf(given, 'recoilPermeability'),
          intrinsicCoercivity: numberOf(given, 'intrinsicCoercivity20_kAPerM') * 1e3,
          intrinsicCoercivityPerKelvin: numberOf(given, 'coercivityTempCoeff_percentPerK') / 100,
        },
      };
      const [point] = operatingPoints([magnet], numberOf(given, 'temperature_degC'));
      expect(point!.demagnetisingFactor).toBeCloseTo(numberOf(expected, 'demagnetisingFactor'), 6);
      expect(
        relative(point!.demagnetisingField, numberOf(expected, 'demagnetisingFieldMean_kAPerM') * 1e3),
      ).toBeLessThan(1e-6);
      expect(relative(point!.coercivity!, numberOf(expected, 'intrinsicCoercivityAtT_kAPerM') * 1e3)).toBeLessThan(
        1e-6,
      );
      expect(point!.reserve! < 0).toBe(expected['demagnetised']);
    },
  );

  it('hard ferrite is worse in the cold, rare earths in the heat', () => {
    const ferrite = { ...rigid(0.38), intrinsicCoercivity: 180e3, intrinsicCoercivityPerKelvin: 0.003 };
    const neodymium = { ...rigid(1.3), intrinsicCoercivityPerKelvin: -0.0076 };
    expect(coercivityAt(ferrite, -40)!).toBeLessThan(coercivityAt(ferrite, 20)!);
    expect(coercivityAt(neodymium, 80)!).toBeLessThan(coercivityAt(neodymium, 20)!);
    expect(coercivityAt(rigid(1.3), 80)).toBeNull();
    expect(coercivityAt(rigid(1.3), 20)).toBe(955e3);
  });

  it('neighbours count with their mean field over the magnet', () => {
    const one = cylinder(10e-3, 10e-3, 0);
    const other = cylinder(12e-3, 6e-3, 11e-3, -1);
    const [point] = operatingPoints([one, other], 20);
    // the neighbour's B over the volume, by quadrature
    const source = { ...axial(12e-3, 6e-3, -1.3), at: 11e-3 };
    const mean = integrate(
      (x) => integrate((rho) => (2 * rho * fieldOfCylinder(source, rho, x).axial) / 25e-6, 0, 5e-3, 24),
      -5e-3,
      5e-3,
      32,
    );
    expect(relative(point!.neighbourField, -mean / (10e-3 * MAGNETIC_CONSTANT))).toBeLessThan(1e-6);
    expect(point!.neighbourField).toBeGreaterThan(0);
    // as a fixed magnet it acts the same
    expect(operatingPoints([one], 20, true, [other])[0]!.neighbourField).toBe(point!.neighbourField);
  });

  it('and so in blocks', () => {
    const block = (x: number, polarity: number): BlockMagnet<CoerciveMaterial> => ({
      shape: 'block',
      size: [8e-3, 12e-3, 4e-3],
      at: [x, 0, 0],
      polarity,
      material: rigid(1.3),
    });
    const [point] = operatingPoints([block(0, 1), block(9e-3, -1)], 20);
    const source = { size: [8e-3, 12e-3, 4e-3], at: [9e-3, 0, 0], magnetisation: -1.3 / MAGNETIC_CONSTANT };
    const mean = integrate(
      (x) => integrate((y) => integrate((z) => fieldOfBlock(source, x, y, z)[2], -2e-3, 2e-3, 16), -6e-3, 6e-3, 24),
      -4e-3,
      4e-3,
      32,
    );
    expect(relative(point!.neighbourField, -mean / (8e-3 * 12e-3 * 4e-3 * MAGNETIC_CONSTANT))).toBeLessThan(1e-6);
  });
});
