import { describe, expect, test } from 'vitest';
import { parseDesignDocument } from '#physics/design-document';
import { monteCarloOfEstimate, tolerancesOf, uncertaintyOfEstimate } from '#physics/estimate-uncertainty';
import { referenceCase } from '../support/handbook';

const { design } = referenceCase('D1-01');
const tone = { kind: 'tone', frequency: 50, acceleration: 1, as: 'peak' };
const modelled: Record<string, unknown> = { ...design };
delete modelled['asMeasured'];

// Issue 4: within 10 % of 2,000 samples on the reference device
test.each([
  ['constant coupling', design],
  ['modelled coupling and inductance', modelled],
])('the budget agrees with a Monte Carlo run: %s', (_, document) => {
  const budget = uncertaintyOfEstimate(document, tone);
  const run = monteCarloOfEstimate(document, tone, 2000, 1);
  expect(run?.failed).toBe(0);
  expect(Math.abs((budget.standardUncertainty ?? NaN) / (run?.standardDeviation ?? NaN) - 1)).toBeLessThan(0.1);
  // Tuned to its tone, the device can only miss the peak: the mean lies below the nominal figure, as the budget says
  const shift = (run?.mean ?? NaN) - (budget.loadPower ?? NaN);
  expect(shift).toBeLessThan(0);
  expect(Math.abs(shift - (budget.meanShift ?? NaN))).toBeLessThan(0.1 * (run?.standardDeviation ?? NaN));
});

describe('the budget', () => {
  const budget = uncertaintyOfEstimate(design, tone);

  test('names its five largest contributors, the largest first', () => {
    expect(budget.largest).toHaveLength(5);
    expect(budget.largest[0]).toMatchObject({ paths: ['damping.quality'], label: 'damping', halfWidth: 15 });
    const sizes = budget.contributors.map(({ contribution }) => contribution);
    expect(sizes).toEqual([...sizes].sort((a, b) => b - a));
    expect(budget.contributors.reduce((sum, { share }) => sum + share, 0)).toBeLessThanOrEqual(1 + 1e-12);
  });

  test('has the sensitivity of the closed form: ∂P/∂R vanishes at the best load, ∂P/∂Q does not', () => {
    const of = (path: string): number => budget.contributors.find(({ paths }) => paths[0] === path)?.sensitivity ?? NaN;
    // P = (mA)²/(8c) · g/(Rc + g) with g = θ²/c, at R = Rc + g held: dP/dQ by the closed form
    const power = (quality: number): number => {
      const c = (0.025 * 2 * Math.PI * 50) / quality;
      const total = 103.448276 + 804.160706;
      const velocity = 0.025 / (c + 6.05716246 ** 2 / total);
      return (0.5 * (6.05716246 * velocity) ** 2 * 804.160706) / total ** 2;
    };
    const step = 15 / Math.sqrt(3);
    const expected = (power(150 + step) - power(150 - step)) / (2 * step);
    expect(Math.abs(of('damping.quality') / expected - 1)).toBeLessThan(1e-6);
    expect(Math.abs(of('circuit.resistance') * 804)).toBeLessThan(1e-6);
  });

  test('takes the user’s own tolerances, and leaves out what is set to zero', () => {
    const own = uncertaintyOfEstimate(design, tone, { 'damping.quality': 0, 'circuit.resistance': 100 });
    expect(own.contributors.map(({ paths }) => paths[0])).not.toContain('damping.quality');
    expect(own.contributors.find(({ paths }) => paths[0] === 'circuit.resistance')).toMatchObject({
      halfWidth: 100,
      basis: 'stated',
    });
    expect(own.standardUncertainty).toBeLessThan(budget.standardUncertainty ?? 0);
  });

  test('says so where the power bends more than it slopes', () => {
    const loose = uncertaintyOfEstimate(design, tone, { 'suspension.stiffness': 50 });
    expect(loose.trustworthy).toBe(false);
    expect(loose.notes.join(' ')).toMatch(/Monte Carlo/);
  });
});

test('the same seed draws the same devices, another seed others', () => {
  const run = (seed: number): number | undefined => monteCarloOfEstimate(design, tone, 50, seed)?.mean;
  expect(run(3)).toBe(run(3));
  expect(run(3)).not.toBe(run(4));
  expect(() => monteCarloOfEstimate(design, tone, 1, 1)).toThrow(RangeError);
});

test('magnets of one material vary together, and a grade has the width of the catalogue', () => {
  const base = design as { magnets: { outerDiameter: number }[] };
  const first = base.magnets[0] ?? { outerDiameter: 0 };
  const magnets = [
    { ...first, at: -0.006, material: 'NdFeB N42' },
    { ...first, at: 0.006, material: 'NdFeB N42' },
    { ...first, at: 0.03, material: 'NdFeB N45' },
  ];
  const remanences = tolerancesOf(parseDesignDocument({ ...design, magnets })).filter(
    ({ label }) => label === 'remanence',
  );
  expect(remanences.map(({ paths }) => paths.length)).toEqual([2, 1]);
  expect(remanences[0]?.halfWidth).toBeCloseTo(0.02, 12);
  expect(remanences[1]?.halfWidth).toBeCloseTo(0.03, 12);
});
