import { describe, expect, it } from 'vitest';
import { gaussLegendre } from '../../server/physics/kernels/gauss-legendre';
import { integratedTable } from '../../server/physics/kernels/integrated-table';
import { integratedSeries, legendreSeries, legendreSeriesAt } from '../../server/physics/kernels/legendre-series';

describe('Legendre series', () => {
  const seriesOf = (f: (t: number) => number, n: number): Float64Array => legendreSeries(gaussLegendre(n).nodes.map(f));

  it('reproduces polynomials below the number of nodes', () => {
    const f = (t: number): number => 3 - 2 * t + 5 * t ** 3 - t ** 5;
    const series = seriesOf(f, 6);
    for (const t of [-1, -0.3, 0.7, 1]) expect(legendreSeriesAt(series, t)).toBeCloseTo(f(t), 13);
  });

  it('converges geometrically and integrates term by term', () => {
    const series = seriesOf(Math.exp, 14);
    const integral = integratedSeries(series, 0.5, 7);
    for (const t of [-1, 0.2, 1]) {
      expect(legendreSeriesAt(series, t)).toBeCloseTo(Math.exp(t), 12);
      expect(legendreSeriesAt(integral, t)).toBeCloseTo(7 + 0.5 * (Math.exp(t) - Math.exp(-1)), 13);
    }
  });
});

describe('table from the third derivative', () => {
  // f = 1/(1 + x²): singular at ±i
  const third = (x: number): number => (24 * x * (1 - x * x)) / (1 + x * x) ** 4;
  const build = (length: number) => integratedTable(third, [1, 0, -2], () => length);

  it('gives the function and its derivatives, far out too, whatever was asked first', () => {
    const table = build(1);
    const far = new Float64Array(4);
    build(1).allAt(30, far);
    const out = new Float64Array(4);
    for (const x of [0, 0.4, 3, 30]) {
      table.allAt(x, out);
      const q = 1 + x * x;
      expect(out[0]).toBeCloseTo(1 / q, 9);
      expect(out[1]).toBeCloseTo((-2 * x) / (q * q), 8);
      expect(out[2]).toBeCloseTo((6 * x * x - 2) / q ** 3, 8);
      // interpolated, not integrated: 2.4^−16 at a panel as long as the distance to the pole
      expect(out[3]).toBeCloseTo(third(x), 5);
    }
    expect([...out]).toEqual([...far]);
  });

  it('carries from panel to panel with the order of Gauss quadrature', () => {
    const error = (length: number): number => {
      const out = new Float64Array(4);
      build(length).allAt(12, out);
      return Math.abs(out[2]! - (6 * 144 - 2) / 145 ** 3);
    };
    expect(error(3)).toBeLessThan(1e-4 * error(6));
  });

  it('refuses places it does not serve', () => {
    expect(() => build(1).allAt(-1, new Float64Array(4))).toThrow(/x must be zero or positive/);
    expect(() => build(1e-9).allAt(1, new Float64Array(4))).toThrow(/x must be within/);
  });
});
