import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { suspensionOnCurve, tabulatedForce } from '#physics/models/force-curve';
import {
  activeWireMass,
  bucklingDeflection,
  curvatureFactor,
  goodmanSafety,
  movingSpringMass,
  shearStress,
  solidLength,
  springRate,
  surgeFrequency,
} from '#physics/models/helical-spring';
import { NoRestError, springSuspension } from '#physics/models/suspension';

interface Row {
  id: string;
  given: Record<string, number>;
  expected: Record<string, number>;
}
const handbook = JSON.parse(
  readFileSync(new URL('../reference/handbook/suspension.json', import.meta.url), 'utf8'),
) as { values: Row[] };
const row = (id: string): Row => handbook.values.find((value) => value.id === id)!;
const springOf = ({ given }: Row) => ({
  wireDiameter: given.wireDiameter_m!,
  meanDiameter: given.meanDiameter_m!,
  activeTurns: given.activeTurns!,
  shearModulus: given.shearModulus_Pa!,
  density: given.density_kgPerM3 ?? 7850,
});
const near = (got: number, wanted: number, relative: number): void => {
  expect(Math.abs(got / wanted - 1)).toBeLessThan(relative);
};

describe('a helical spring', () => {
  it('has rate, stress, mass and surge of handbook/suspension.json#helical-1 (P1)', () => {
    const { given, expected } = row('helical-1');
    const spring = springOf(row('helical-1'));
    const force = springRate(spring) * given.deflection_m!;
    near(springRate(spring), expected.rate_NPerM!, 1e-6);
    near(force, expected.force_N!, 1e-6);
    near(shearStress(spring, force), expected.shearUncorrected_Pa!, 1e-6);
    near(curvatureFactor(spring) * shearStress(spring, force), expected.shearEN13906_Pa!, 1e-6);
    near(activeWireMass(spring), expected.activeWireMass_kg!, 1e-6);
    near(movingSpringMass(spring, 1), expected.thirdOfMass_kg!, 1e-6);
    near(surgeFrequency(spring), expected.surgeFixedFixed_Hz!, 1e-6);
  });

  it('has rate and factor of handbook/suspension.json#helical-2 (P1)', () => {
    const { expected } = row('helical-2');
    near(springRate(springOf(row('helical-2'))), expected.rate_NPerM!, 1e-6);
    near(curvatureFactor(springOf(row('helical-2'))), expected.factorEN13906!, 1e-6);
  });

  it('has the curvature factors of handbook/suspension.json#curvature-factors (P1)', () => {
    const { given, expected } = row('curvature-factors') as unknown as Record<string, Record<string, number[]>>;
    given!.index!.forEach((index, n) => {
      near(curvatureFactor({ wireDiameter: 1, meanDiameter: index }), expected!.EN13906![n]!, 1e-6);
    });
  });

  it('changes its rate as handbook/suspension.json#rate-sensitivity (P1) says', () => {
    const spring = springOf(row('helical-1'));
    const { expected } = row('rate-sensitivity');
    const power = (change: Partial<typeof spring>): number =>
      Math.log(springRate({ ...spring, ...change }) / springRate(spring)) / Math.log(1.01);
    expect(power({ wireDiameter: spring.wireDiameter * 1.01 })).toBeCloseTo(expected.perWireDiameter!, 9);
    expect(power({ meanDiameter: spring.meanDiameter * 1.01 })).toBeCloseTo(expected.perMeanDiameter!, 9);
    expect(power({ activeTurns: spring.activeTurns * 1.01 })).toBeCloseTo(expected.perActiveTurns!, 9);
    expect(power({ shearModulus: spring.shearModulus * 1.01 })).toBeCloseTo(expected.perShearModulus!, 9);
  });

  it('has the margin of handbook/suspension.json#goodman-1 (P1)', () => {
    const { given, expected } = row('goodman-1');
    const safety = goodmanSafety(
      { mean: given.stressMean_Pa!, amplitude: given.stressAmplitude_Pa! },
      { enduranceAmplitude: given.enduranceAmplitudeAssumed_Pa!, shear: given.shearStrengthAssumed_Pa! },
    );
    near(safety, expected.safety!, 1e-6);
  });

  it('buckles only where it is slender', () => {
    expect(bucklingDeflection({ meanDiameter: 0.01 }, 0.02, 0.5)).toBeNull();
    const slender = bucklingDeflection({ meanDiameter: 0.01 }, 0.2, 1)!;
    expect(slender).toBeGreaterThan(0);
    expect(slender).toBeLessThan(0.2);
    expect(solidLength(springOf(row('helical-1')))).toBeCloseTo(8 * 0.0008, 12);
  });
});

describe('a rest position', () => {
  it('sags as handbook/suspension.json#sag-1 (P1)', () => {
    const { given, expected } = row('sag-1');
    const spring = { stiffness: given.stiffness_NPerM!, cubic: 0, neutralAt: 0 };
    near(-springSuspension(spring, given.mass_kg!, Math.PI / 2).restPosition, expected.sag_m!, 1e-7);
  });

  it('takes the + one of two equal wells, and the deeper one of unequal ones', () => {
    const spring = { stiffness: -1000, cubic: 2.5e8, neutralAt: 0.001 };
    const level = springSuspension(spring, 0.02, 0);
    expect(level.restPosition).toBeCloseTo(0.003, 12);
    expect(level.stiffness).toBeCloseTo(2000, 6);
    expect(level.suspension.equilibria).toEqual([expect.closeTo(-0.004, 12), expect.closeTo(-0.002, 12), 0]);
    expect(springSuspension(spring, 0.02, 0.2).restPosition).toBeLessThan(0.001);
  });

  it('is refused where there is none', () => {
    expect(() => springSuspension({ stiffness: -5, cubic: 0, neutralAt: 0 }, 0.02, 0)).toThrow(NoRestError);
    expect(() => springSuspension({ stiffness: 10, cubic: -1e9, neutralAt: 0 }, 0.02, 1)).toThrow(NoRestError);
    expect(() => suspensionOnCurve(tabulatedForce([-1, 0, 1], [-1, 0, 1]), 0.02, 0)).toThrow(NoRestError);
  });

  it('stores the work of the force', () => {
    const { suspension } = springSuspension({ stiffness: 900, cubic: 3e7, neutralAt: 0 }, 0.03, 1);
    for (const u of [-0.004, 0.001, 0.003]) {
      const slope = (suspension.energy(u + 1e-7) - suspension.energy(u - 1e-7)) / 2e-7;
      expect(-slope).toBeCloseTo(suspension.force(u), 6);
      const bend = (suspension.force(u + 1e-7) - suspension.force(u - 1e-7)) / 2e-7;
      expect(bend).toBeCloseTo(suspension.forceSlope(u), 4);
    }
  });
});

describe('a tabulated force', () => {
  const displacement = [-0.004, -0.002, -0.0005, 0.001, 0.002, 0.005];
  const force = displacement.map((x) => -600 * x - 2e7 * x ** 3);
  const curve = tabulatedForce(displacement, force);

  it('passes through its points and goes straight on beyond them', () => {
    displacement.forEach((x, n) => expect(curve.forceAt(x)).toBeCloseTo(force[n]!, 12));
    expect(curve.forceAt(0.007) - curve.forceAt(0.006)).toBeCloseTo(0.001 * curve.slopeAt(0.005), 9);
  });

  it('rests where weight and force meet, with slope and energy to match', () => {
    const { restPosition, stiffness, suspension } = suspensionOnCurve(curve, 0.05, Math.PI / 2);
    expect(curve.forceAt(restPosition)).toBeCloseTo(0.05 * 9.80665, 9);
    expect(stiffness).toBeCloseTo(-curve.slopeAt(restPosition), 9);
    for (const u of [-0.006, -0.001, 0.0017, 0.006]) {
      const slope = (suspension.energy(u + 1e-7) - suspension.energy(u - 1e-7)) / 2e-7;
      expect(-slope).toBeCloseTo(suspension.force(u), 6);
    }
  });

  it('has the third derivative of the cubic it is made of', () => {
    const x = -0.001;
    const h = 2e-4;
    const third =
      (curve.forceAt(x + 1.5 * h) -
        3 * curve.forceAt(x + h / 2) +
        3 * curve.forceAt(x - h / 2) -
        curve.forceAt(x - 1.5 * h)) /
      h ** 3;
    expect(curve.cubicAt(x) / (-third / 6)).toBeCloseTo(1, 5);
  });
});
