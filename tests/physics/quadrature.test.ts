import { describe, expect, it } from 'vitest';
import { gaussLegendre, integrate } from '../../server/physics/kernels/gauss-legendre';
import { gradedRule, nearLineRule } from '../../server/physics/kernels/graded-rule';

describe('Gauss–Legendre rule', () => {
  it('is exact to degree 2n − 1 and not beyond', () => {
    for (const n of [1, 2, 5, 12, 40]) {
      const { nodes, weights } = gaussLegendre(n);
      const moment = (degree: number): number => nodes.reduce((sum, x, i) => sum + weights[i]! * x ** degree, 0);
      expect(moment(0)).toBeCloseTo(2, 13);
      expect(moment(2 * n - 2)).toBeCloseTo(2 / (2 * n - 1), 13);
      if (n < 10) expect(Math.abs(moment(2 * n) - 2 / (2 * n + 1))).toBeGreaterThan(1e-7);
    }
  });

  it('has the three-point nodes of the textbooks', () => {
    const { nodes, weights } = gaussLegendre(3);
    expect([...nodes]).toEqual([-Math.sqrt(0.6), 0, Math.sqrt(0.6)].map((x) => expect.closeTo(x, 15)));
    expect([...weights]).toEqual([5 / 9, 8 / 9, 5 / 9].map((w) => expect.closeTo(w, 15)));
  });

  it('converges geometrically on an analytic function', () => {
    const error = (n: number): number => Math.abs(integrate((x) => 1 / (1 + x * x), -1, 1, n) - Math.PI / 2);
    // poles at ±i: the error falls by (1 + √2)² per point
    expect(error(8) / error(4)).toBeLessThan(2 * (1 + Math.SQRT2) ** -8);
    expect(error(24)).toBeLessThan(1e-14);
  });

  it('refuses orders it does not have', () => {
    for (const n of [0, 2.5, 1000]) expect(() => gaussLegendre(n)).toThrow(/n must be an integer/);
  });
});

describe('graded rule', () => {
  const sum = (from: number, to: number, at: number, f: (x: number) => number, tolerance = 1e-12): number => {
    const { nodes, weights } = gradedRule(from, to, at, tolerance);
    return nodes.reduce((total, x, i) => total + weights[i]! * f(x), 0);
  };

  it.each([1, 1e-2, 1e-5])(
    'integrates ln((x − s)² + δ²) for every δ with the singularity %d before the range',
    (gap) => {
      for (const delta of [0, gap / 3, gap, 0.5, 3]) {
        const f = (x: number): number => Math.log(x * x + delta * delta);
        const primitive = (x: number): number => x * f(x) - 2 * x + 2 * delta * Math.atan2(x, delta);
        const exact = primitive(gap + 2) - primitive(gap);
        expect(sum(gap, gap + 2, 0, f) / exact).toBeCloseTo(1, 11);
        // mirrored: singularity behind the range
        expect(sum(-gap - 2, -gap, 0, f) / exact).toBeCloseTo(1, 11);
      }
    },
  );

  it('integrates a logarithm inside the range', () => {
    const exact = 0.3 * (Math.log(0.3) - 1) + 0.7 * (Math.log(0.7) - 1);
    expect(sum(0, 1, 0.3, (x) => Math.log(Math.abs(x - 0.3)))).toBeCloseTo(exact, 11);
    expect(sum(0, 1, 0, (x) => Math.log(x))).toBeCloseTo(-1, 11);
  });

  it('takes few points where the singularity is far', () => {
    expect(gradedRule(5, 6, 0, 1e-12).nodes.length).toBeLessThan(8);
    expect(() => gradedRule(1, 1, 0, 1e-9)).toThrow(/to must be above from/);
  });
});

describe('rule near a line', () => {
  it.each([10, 0.3, 1e-3, 1e-8])('integrates 1/√(x² + δ²) and ln(x² + δ²) for δ = %d', (delta) => {
    const { nodes, weights } = nearLineRule(2, delta, 1e-12);
    const sum = (f: (x: number) => number): number => nodes.reduce((total, x, i) => total + weights[i]! * f(x), 0);
    expect(sum((x) => 1 / Math.hypot(x, delta)) / Math.asinh(2 / delta)).toBeCloseTo(1, 11);
    const primitive = 2 * Math.log(4 + delta * delta) - 4 + 2 * delta * Math.atan(2 / delta);
    expect(sum((x) => Math.log(x * x + delta * delta)) / primitive).toBeCloseTo(1, 10);
  });

  it('refuses empty ranges', () => {
    expect(() => nearLineRule(1, 0, 1e-9)).toThrow(/must be positive/);
  });
});
