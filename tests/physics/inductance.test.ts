import { describe, expect, it } from 'vitest';
import { mutualOfWindings } from '../../server/physics/models/coaxial-inductance';
import type { AxialWinding } from '../../server/physics/models/coaxial-inductance';
import { MAGNETIC_CONSTANT } from '../../server/physics/models/constants';
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
