import { describe, expect, it } from 'vitest';
import { bracketedRoot } from '../../server/physics/kernels/bracketed-root';
import { MAGNETIC_CONSTANT, STANDARD_GRAVITY } from '../../server/physics/models/constants';
import { levitation, reachOf } from '../../server/physics/models/levitation';
import { axialForce, forceBetween } from '../../server/physics/models/magnet-force';
import type { AxialMagnet } from '../../server/physics/models/axial-magnet';
import { expectedOf, handbookValue, handbookValues, numberOf, referenceCase } from '../support/handbook';

const cylinder = (diameter: number, length: number, at: number, remanence = 1.3, polarity = 1): AxialMagnet => ({
  outerRadius: diameter / 2,
  innerRadius: 0,
  length,
  at,
  magnetisation: (polarity * remanence) / MAGNETIC_CONSTANT,
});
const relative = (actual: number, expected: number): number => Math.abs(actual / expected - 1);

describe('force between coaxial magnets', () => {
  it.each(handbookValues('magnets', 'force-equal'))('handbook/magnets.json#$id ($grade)', ({ given, expected }) => {
    const [d, l, Br] = ['diameter_m', 'length_m', 'remanence_T'].map((key) => numberOf(given, key)) as [
      number,
      number,
      number,
    ];
    const lower = cylinder(d, l, 0, Br);
    const upper = cylinder(d, l, l + numberOf(given, 'gap_m'), Br);
    expect(relative(-forceBetween(upper, lower), numberOf(expected, 'force_N'))).toBeLessThan(1e-7);
    expect(
      relative(forceBetween(upper, { ...lower, magnetisation: -lower.magnetisation }), numberOf(expected, 'force_N')),
    ).toBeLessThan(1e-7);
  });

  it.each(handbookValues('magnets', 'force-unequal'))('handbook/magnets.json#$id ($grade)', ({ given, expected }) => {
    const Br = numberOf(given, 'remanence_T');
    const lower = cylinder(numberOf(given, 'diameter1_m'), numberOf(given, 'length1_m'), 0, Br);
    const length = numberOf(given, 'length2_m');
    const at = lower.length / 2 + numberOf(given, 'gap_m') + length / 2;
    const upper = cylinder(numberOf(given, 'diameter2_m'), length, at, Br);
    expect(relative(-forceBetween(upper, lower), numberOf(expected, 'force_N'))).toBeLessThan(1e-7);
  });

  it('action is reaction, and a ring is the cylinder less the bore', () => {
    const ring = { ...cylinder(12e-3, 5e-3, 0), innerRadius: 3e-3 };
    const other = cylinder(8e-3, 4e-3, 9e-3);
    expect(forceBetween(ring, other)).toBeCloseTo(-forceBetween(other, ring), 12);
    const bore = cylinder(6e-3, 5e-3, 0);
    const solid = cylinder(12e-3, 5e-3, 0);
    expect(forceBetween(other, ring)).toBeCloseTo(forceBetween(other, solid) - forceBetween(other, bore), 10);
  });

  it('far apart it is the force of two dipoles, 3 μ0 m² / (2π d⁴)', () => {
    const a = cylinder(2e-3, Math.sqrt(3) * 1e-3, 0);
    const d = 0.1;
    const moment = a.magnetisation * Math.PI * a.outerRadius ** 2 * a.length;
    const dipoles = (3 * MAGNETIC_CONSTANT * moment ** 2) / (2 * Math.PI * d ** 4);
    expect(relative(-forceBetween({ ...a, at: d }, a), dipoles)).toBeLessThan(1e-5);
  });

  it('scales with the square of size and remanence', () => {
    const near = forceBetween(cylinder(10e-3, 10e-3, 13e-3), cylinder(10e-3, 5e-3, 0));
    const far = forceBetween(cylinder(30e-3, 30e-3, 39e-3, 2.6), cylinder(30e-3, 15e-3, 0, 2.6));
    expect(relative(far, 36 * near)).toBeLessThan(1e-12);
  });

  it('each entry is the derivative of the one before', () => {
    const force = axialForce([cylinder(10e-3, 10e-3, 0)], [cylinder(12e-3, 5e-3, 20e-3)]);
    const at = (x: number): Float64Array => {
      const out = new Float64Array(5);
      force.at(x, out);
      return out;
    };
    const h = 1e-5;
    const here = at(2e-3);
    for (let k = 0; k < 4; k++) {
      const slope =
        (8 * (at(2e-3 + h)[k]! - at(2e-3 - h)[k]!) - at(2e-3 + 2 * h)[k]! + at(2e-3 - 2 * h)[k]!) / (12 * h);
      expect(relative(slope, here[k + 1]!)).toBeLessThan(1e-6);
    }
  });
});

describe('levitation', () => {
  it('gap and stiffness above one magnet: handbook/magnets.json#levitation-1 (P1)', () => {
    const { given, expected } = handbookValue('magnets', 'levitation-1');
    const [d, l, Br] = ['diameter_m', 'length_m', 'remanence_T'].map((key) => numberOf(given, key)) as [
      number,
      number,
      number,
    ];
    const mass = numberOf(given, 'carriedMass_kg');
    const found = levitation(
      [cylinder(d, l, 2 * l, Br)],
      [cylinder(d, l, 0, Br, -1)],
      -mass * numberOf(given, 'gravity_mPerS2'),
    );
    if (!found.found) throw new Error(found.reason);
    expect(relative(l + found.rest.position, numberOf(expected, 'gap_m'))).toBeLessThan(1e-6);
    expect(relative(found.rest.stiffness, numberOf(expected, 'stiffness_NPerM'))).toBeLessThan(1e-6);
    const frequency = Math.sqrt(found.rest.stiffness / mass) / (2 * Math.PI);
    expect(relative(frequency, numberOf(expected, 'naturalFrequency_Hz'))).toBeLessThan(1e-6);
  });

  it('between two magnets: handbook/magnets.json#levitation-2 (P1)', () => {
    const { given, expected } = handbookValue('magnets', 'levitation-2');
    const [d, l, Br, gap] = ['diameter_m', 'length_m', 'remanence_T', 'gapEachSide_m'].map((key) =>
      numberOf(given, key),
    ) as [number, number, number, number];
    const found = levitation(
      [cylinder(d, l, 0, Br)],
      [-1, 1].map((side) => cylinder(d, l, side * (l + gap), Br, -1)),
      0,
    );
    if (!found.found) throw new Error(found.reason);
    const u = numberOf(given, 'displacement_m');
    expect(Math.abs(found.rest.position)).toBeLessThan(1e-12);
    expect(relative(found.rest.stiffness, numberOf(expected, 'smallSignalStiffness_NPerM'))).toBeLessThan(1e-5);
    const restoring = numberOf(expected, 'restoringForceAtDisplacement_N');
    expect(relative(-found.suspension.force(u), restoring)).toBeLessThan(1e-5);
    expect(
      relative((restoring - found.rest.stiffness * u) / u ** 3, numberOf(expected, 'secantCubic_NPerM3')),
    ).toBeLessThan(1e-5);
  });

  it.each(['F6-01', 'F6-03'])('rest position, stiffness and cubic of case %s', (id) => {
    const reference = referenceCase(id);
    type Row = {
      outerDiameter: number;
      length: number;
      at: number;
      polarity: number;
      material: { remanence: number; density: number };
    };
    const design = reference.design as unknown as {
      axisAngle: number | string;
      magnets: Row[];
      suspension: { fixed: Row[] };
    };
    const toMagnet = (row: Row): AxialMagnet =>
      cylinder(row.outerDiameter, row.length, row.at, row.material.remanence, row.polarity);
    const mass = expectedOf(reference, 'mechanics.movingMass') as number;
    const upright = design.axisAngle === '90 deg' ? 1 : 0;
    const found = levitation(
      design.magnets.map(toMagnet),
      design.suspension.fixed.map(toMagnet),
      -mass * STANDARD_GRAVITY * upright,
    );
    if (!found.found) throw new Error(found.reason);
    expect(Math.abs(found.rest.position - (expectedOf(reference, 'mechanics.restPosition') as number))).toBeLessThan(
      1e-11,
    );
    expect(relative(found.rest.stiffness, expectedOf(reference, 'mechanics.stiffness') as number)).toBeLessThan(1e-9);
    expect(relative(found.rest.cubic, expectedOf(reference, 'mechanics.cubic') as number)).toBeLessThan(1e-7);
  });

  it('the tabulated force has the Taylor series of the rest, and the energy is its integral', () => {
    const found = levitation([cylinder(10e-3, 10e-3, 0)], [cylinder(12e-3, 6e-3, -40e-3, 1.3, -1)], -0.08);
    if (!found.found) throw new Error(found.reason);
    const { suspension, rest } = found;
    for (const u of [-2e-5, 4e-5]) {
      const series = -u * (rest.stiffness + u * (rest.quadratic + u * rest.cubic));
      expect(suspension.force(u)).toBeCloseTo(series, 9);
      expect(suspension.forceSlope(u)).toBeCloseTo(-rest.stiffness - u * (2 * rest.quadratic + 3 * u * rest.cubic), 6);
    }
    const h = 1e-5;
    for (const u of [-20e-3, 3e-3, 0.2]) {
      expect((suspension.energy(u + h) - suspension.energy(u - h)) / (2 * h)).toBeCloseTo(-suspension.force(u), 6);
    }
    expect(suspension.energy(0)).toBe(0);
  });

  it('is unstable sideways by half the axial stiffness, as Earnshaw says', () => {
    // transverse stiffness of two dipoles in line, from their energy: the axial one times −1/2
    const found = levitation(
      [cylinder(2e-3, 2e-3, 0)],
      [-1, 1].map((side) => cylinder(2e-3, 2e-3, side * 50e-3, 1.3, -1)),
      0,
    );
    if (!found.found) throw new Error(found.reason);
    expect(found.rest.sidewaysStiffness).toBe(-found.rest.stiffness / 2);
  });

  it('of two equal wells takes the one on the + side, of unequal ones the deeper', () => {
    // rings that the assembly can pass: in the bore the field is against the magnetisation, so an unlike ring holds it
    const passed = (at: number, polarity: number): AxialMagnet => ({
      ...cylinder(30e-3, 5e-3, at, 1.3, polarity),
      innerRadius: 8e-3,
    });
    const two = (load: number) =>
      levitation([cylinder(10e-3, 6e-3, 0)], [passed(-15e-3, -1), passed(0, 1), passed(15e-3, -1)], load);
    const even = two(0);
    if (!even.found) throw new Error(even.reason);
    expect(even.rest.position).toBeGreaterThan(1e-3);
    expect(even.rest.equilibria.length).toBeGreaterThanOrEqual(3);
    const pulled = two(-0.3);
    if (!pulled.found) throw new Error(pulled.reason);
    expect(pulled.rest.position).toBeLessThan(-1e-3);
  });

  it('says so where nothing holds the assembly', () => {
    const attracting = levitation(
      [cylinder(10e-3, 10e-3, 0)],
      [-1, 1].map((side) => cylinder(10e-3, 5e-3, side * 30e-3)),
      0,
    );
    expect(attracting).toMatchObject({ found: false, reason: expect.stringContaining('no stable rest') as string });
    const tooHeavy = levitation([cylinder(4e-3, 4e-3, 0)], [cylinder(4e-3, 4e-3, -12e-3, 0.3, -1)], -50);
    expect(tooHeavy.found).toBe(false);
  });

  it('knows how far the assembly may move, and refuses magnets that overlap', () => {
    expect(reachOf([cylinder(10e-3, 10e-3, 0)], [cylinder(10e-3, 4e-3, -30e-3)])).toEqual({
      from: -23e-3,
      to: Infinity,
    });
    const ring = { ...cylinder(30e-3, 4e-3, 0), innerRadius: 6e-3 };
    expect(reachOf([cylinder(10e-3, 10e-3, 0)], [ring])).toEqual({ from: -Infinity, to: Infinity });
    expect(() => reachOf([cylinder(10e-3, 10e-3, 0)], [cylinder(10e-3, 4e-3, 5e-3)])).toThrow(/must not overlap/);
  });
});

describe('bracketed root', () => {
  it('finds roots of easy and awkward functions', () => {
    expect(bracketedRoot((x) => x * x - 2, 0, 2, 1e-14)).toBeCloseTo(Math.SQRT2, 13);
    expect(bracketedRoot((x) => Math.atan(1e6 * (x - 0.3)), -5, 9, 1e-12)).toBeCloseTo(0.3, 11);
    expect(bracketedRoot((x) => x ** 9, -1, 1.3, 1e-9)).toBeCloseTo(0, 8);
    // one end of the bracket would stay for ever without its value being halved
    for (const turn of [1, -1]) {
      let calls = 0;
      const bent = (x: number): number => {
        calls += 1;
        return turn * (1 - 1 / (turn * x));
      };
      bracketedRoot(bent, turn * 0.01, turn * 100, 1e-12);
      expect(calls).toBeLessThan(36);
    }
    expect(() => bracketedRoot((x) => x * x + 1, -1, 1, 1e-9)).toThrow(/change sign/);
  });
});
