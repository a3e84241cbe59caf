import { describe, expect, it } from 'vitest';
import { mutualOfWindings } from '../../server/physics/models/coaxial-inductance';
import type { AxialWinding } from '../../server/physics/models/coaxial-inductance';
import { MAGNETIC_CONSTANT } from '../../server/physics/models/constants';
import type { CoilShape } from '../../server/physics/models/coil';
import { mutualOfFlatCoils } from '../../server/physics/models/flat-inductance';
import { inductanceOfCoils } from '../../server/physics/models/inductance';
import type { CoilDesign } from '../../server/physics/models/inductance';
import { expectedOf, handbookValue, handbookValues, numberOf, numbersOf, referenceCase } from '../support/handbook';

const winding = (innerRadius: number, outerRadius: number, length: number, at = 0, turns = 1): AxialWinding => ({
  innerRadius,
  outerRadius,
  length,
  at,
  turns,
});
const selfOf = (w: AxialWinding): number => mutualOfWindings(w, w);
const relative = (actual: number, expected: number): number => Math.abs(actual / expected - 1);

describe('inductance of thick round coils', () => {
  it.each(handbookValues('inductance', 'thick-self'))(
    'self: handbook/inductance.json#$id ($grade)',
    ({ given, expected }) => {
      const L = selfOf(
        winding(
          numberOf(given, 'innerRadius_m'),
          numberOf(given, 'outerRadius_m'),
          numberOf(given, 'length_m'),
          0,
          numberOf(given, 'turns'),
        ),
      );
      expect(relative(L, numberOf(expected, 'inductance_H'))).toBeLessThan(1e-8);
    },
  );

  it.each(handbookValues('inductance', 'thick-mutual'))(
    'mutual: handbook/inductance.json#$id ($grade)',
    ({ given, expected }) => {
      const [one, two] = [1, 2].map((k) =>
        winding(
          numberOf(given, `innerRadius${k}_m`),
          numberOf(given, `outerRadius${k}_m`),
          numberOf(given, `length${k}_m`),
          k === 2 ? numberOf(given, 'centreDistance_m') : 0,
          numberOf(given, `turns${k}`),
        ),
      ) as [AxialWinding, AxialWinding];
      const M = numberOf(expected, 'mutualInductance_H');
      expect(relative(mutualOfWindings(one, two), M)).toBeLessThan(1e-8);
      expect(relative(mutualOfWindings(two, one), M)).toBeLessThan(1e-8);
    },
  );

  it('Brooks coil: handbook/inductance.json#brooks (P1)', () => {
    const { given, expected } = handbookValue('inductance', 'brooks');
    const a = numberOf(given, 'meanRadius_m');
    const c = numberOf(given, 'section_m');
    const L = selfOf(winding(a - c / 2, a + c / 2, c));
    expect(relative(L, numberOf(expected, 'inductance_H'))).toBeLessThan(1e-9);
    expect(relative(L / a, numberOf(expected, 'coefficient_HperM'))).toBeLessThan(1e-9);
  });

  it('Nagaoka’s table as the limit of a thin winding: handbook/inductance.json#nagaoka-table (P1)', () => {
    const { given, expected } = handbookValue('inductance', 'nagaoka-table');
    const coefficients = numbersOf(expected, 'nagaokaCoefficient');
    numbersOf(given, 'diameterOverLength').forEach((ratio, i) => {
      const a = ratio / 2;
      // thickness t shifts L by about t/a: taken to zero through two thicknesses
      const at = (t: number): number =>
        selfOf(winding(a * (1 - t), a * (1 + t), 1)) / (MAGNETIC_CONSTANT * Math.PI * a * a);
      const extrapolated = 2 * at(1e-5) - at(2e-5);
      expect(relative(extrapolated, coefficients[i]!)).toBeLessThan(1e-6);
    });
  });

  it.each(['F2-01', 'F5-01', 'F5-02', 'F5-04'])('all coils of case %s in series', (id) => {
    const reference = referenceCase(id);
    const L = inductanceOfCoils(reference.design as unknown as CoilDesign);
    expect(relative(L, expectedOf(reference, 'coil.inductance') as number)).toBeLessThan(1e-10);
  });

  it('a coil cut into four is still the same coil', () => {
    const whole = winding(6e-3, 9e-3, 6e-3, 0, 1000);
    const parts = [
      winding(6e-3, 7e-3, 2e-3, -2e-3, 1000 / 9),
      winding(7e-3, 9e-3, 2e-3, -2e-3, 2000 / 9),
      winding(6e-3, 7e-3, 4e-3, 1e-3, 2000 / 9),
      winding(7e-3, 9e-3, 4e-3, 1e-3, 4000 / 9),
    ];
    let sum = 0;
    for (const one of parts) for (const two of parts) sum += mutualOfWindings(one, two);
    expect(relative(sum, selfOf(whole))).toBeLessThan(1e-12);
  });

  it('scales with length and with the square of the turns', () => {
    const L = selfOf(winding(6e-3, 9e-3, 6e-3, 0, 100));
    expect(relative(selfOf(winding(18e-3, 27e-3, 18e-3, 0, 700)), 3 * 49 * L)).toBeLessThan(1e-12);
  });

  it('opposite sense takes the mutual part away', () => {
    const design = referenceCase('F5-04').design as unknown as CoilDesign;
    const [first, second] = design.coils as [CoilDesign['coils'][0], CoilDesign['coils'][0]];
    const alone = inductanceOfCoils({ ...design, coils: [first] }) + inductanceOfCoils({ ...design, coils: [second] });
    const aiding = inductanceOfCoils(design);
    const opposing = inductanceOfCoils({ ...design, coils: [first, { ...second, sense: -1 }] });
    expect(relative(aiding + opposing, 2 * alone)).toBeLessThan(1e-13);
    expect(aiding).toBeGreaterThan(opposing);
  });

  it('refuses a window without area', () => {
    expect(() => selfOf(winding(9e-3, 9e-3, 1e-3))).toThrow(/outer radius above inner radius/);
  });
});

describe('inductance of flat coils', () => {
  const racetrack = (straight: number, inner: number, outer: number, length: number, at = [0, 0, 0]): CoilShape => ({
    shape: 'racetrack',
    straight,
    innerEndRadius: inner,
    outerEndRadius: outer,
    length,
    at,
    turns: 100,
    sense: 1,
  });
  const selfOfFlat = (coil: CoilShape): number => mutualOfFlatCoils(coil, coil);

  it.each([
    ['F5-07', 1e-7],
    ['F5-08', 1e-7],
  ])('all coils of case %s in series', (id, tolerance) => {
    const reference = referenceCase(id);
    const L = inductanceOfCoils(reference.design as unknown as CoilDesign);
    expect(relative(L, expectedOf(reference, 'coil.inductance') as number)).toBeLessThan(tolerance);
  });

  it.each(handbookValues('inductance', 'rectangle-'))(
    'one rectangular turn: handbook/inductance.json#$id ($grade)',
    ({ given, expected }) => {
      // a square section with the mean distance of the round wire: 0.44705 c = 0.77880 r
      const half = ((0.7788 / 0.44705) * numberOf(given, 'wireRadius_m')) / 2;
      const sides = [numberOf(given, 'sideA_m'), numberOf(given, 'sideB_m')];
      const turn: CoilShape = {
        shape: 'rectangular',
        inner: sides.map((side) => side - 2 * half),
        outer: sides.map((side) => side + 2 * half),
        length: 2 * half,
        at: [0, 0, 0],
        turns: 1,
        sense: 1,
      };
      // the formula itself drops terms of the order of r/side
      expect(relative(selfOfFlat(turn), numberOf(expected, 'inductance_H'))).toBeLessThan(2e-3);
    },
  );

  it('a racetrack goes over into the round coil', () => {
    const round = selfOf(winding(3e-3, 8e-3, 2.5e-3, 0, 100));
    const at = (straight: number): number => selfOfFlat(racetrack(straight, 3e-3, 8e-3, 2.5e-3));
    expect(relative(2 * at(1e-6) - at(2e-6), round)).toBeLessThan(1e-7);
  });

  it('a coil cut in two across its thickness is still the same coil', () => {
    const lower = racetrack(10e-3, 2e-3, 6e-3, 1e-3, [0, 0, -1.5e-3]);
    const upper = racetrack(10e-3, 2e-3, 6e-3, 3e-3, [0, 0, 0.5e-3]);
    const whole = racetrack(10e-3, 2e-3, 6e-3, 4e-3);
    const parts = [lower, upper].map((coil, i) => ({ ...coil, turns: [25, 75][i]! }));
    let sum = 0;
    for (const one of parts) for (const two of parts) sum += mutualOfFlatCoils(one, two);
    expect(relative(sum, selfOfFlat(whole))).toBeLessThan(1e-7);
    const frame: CoilShape = {
      shape: 'rectangular',
      inner: [4e-3, 10e-3],
      outer: [12e-3, 22e-3],
      length: 4e-3,
      at: [0, 0, 0],
      turns: 100,
      sense: 1,
    };
    const halves = [-1e-3, 1e-3].map((z): CoilShape => ({ ...frame, length: 2e-3, at: [0, 0, z], turns: 50 }));
    sum = 0;
    for (const one of halves) for (const two of halves) sum += mutualOfFlatCoils(one, two);
    expect(relative(sum, selfOfFlat(frame))).toBeLessThan(1e-7);
  });

  it('the two routes to the mutual inductance agree where both hold', () => {
    const lower = racetrack(10e-3, 2e-3, 6e-3, 2e-3);
    const above = (x: number): CoilShape => racetrack(10e-3, 2e-3, 6e-3, 2e-3, [x, 0, 2.5e-3]);
    // aligned: closed forms; a ten-millionth beside: Neumann's integral
    expect(relative(mutualOfFlatCoils(lower, above(1e-7)), mutualOfFlatCoils(lower, above(0)))).toBeLessThan(1e-5);
    const round: CoilShape = {
      shape: 'round',
      innerDiameter: 6e-3,
      outerDiameter: 14e-3,
      length: 2e-3,
      at: [0, 0, 0],
      turns: 100,
      sense: 1,
    };
    const beside = { ...round, at: [1e-7, 0, 3e-3] };
    expect(
      relative(mutualOfFlatCoils(round, beside), mutualOfFlatCoils(round, { ...round, at: [0, 0, 3e-3] })),
    ).toBeLessThan(1e-5);
  });

  it('far apart two coils are dipoles: −μ0 m m′/(4π d³) side by side', () => {
    const coil = racetrack(4e-3, 1e-3, 3e-3, 1e-3);
    const distance = 0.3;
    // Σ over turns of the area, per ampere
    const area = 100 * (Math.PI * (13 / 3) + 2 * 2 * 4) * 1e-6;
    const dipoles = (-MAGNETIC_CONSTANT * area * area) / (4 * Math.PI * distance ** 3);
    expect(relative(mutualOfFlatCoils(coil, { ...coil, at: [distance, 0, 0] }), dipoles)).toBeLessThan(4e-3);
  });

  it('refuses a coil on an axis', () => {
    const coil = racetrack(4e-3, 1e-3, 3e-3, 1e-3);
    const round: CoilShape = {
      shape: 'round',
      innerDiameter: 1e-3,
      outerDiameter: 2e-3,
      length: 1e-3,
      at: 0,
      turns: 1,
      sense: 1,
    };
    expect(() => mutualOfFlatCoils(coil, round)).toThrow(/must stand at a point/);
  });
});
