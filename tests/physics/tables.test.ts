import { describe, expect, it } from 'vitest';
import { hermiteTable } from '../../server/physics/kernels/hermite-table';
import { monotoneCubic, monotoneCubicAt, monotoneCubicSlopeAt } from '../../server/physics/kernels/pchip';

const sine = (x: number, out: Float64Array): void => {
  out[0] = -Math.cos(x);
  out[1] = Math.sin(x);
  out[2] = Math.cos(x);
  out[3] = -Math.sin(x);
};

describe('Hermite table', () => {
  it('meets the function, its slope and its integral to the tolerance', () => {
    const table = hermiteTable(sine, -2, 5, { tolerance: 1e-10 });
    for (let x = -2; x <= 5; x += 0.0137) {
      expect(table.valueAt(x)).toBeCloseTo(Math.sin(x), 9);
      expect(table.slopeAt(x)).toBeCloseTo(Math.cos(x), 7);
      expect(table.integralAt(x)).toBeCloseTo(-Math.cos(x), 9);
    }
    expect(table.valueAt(5)).toBeCloseTo(Math.sin(5), 12);
  });

  it('has sixth order', () => {
    const error = (panels: number): number => {
      const table = hermiteTable(sine, 0, 1, { tolerance: Infinity, firstPanels: panels });
      let most = 0;
      for (let x = 0; x <= 1; x += 0.001) most = Math.max(most, Math.abs(table.valueAt(x) - Math.sin(x)));
      return most;
    };
    const order = Math.log2(error(2) / error(4));
    expect(order).toBeGreaterThan(5.8);
    expect(order).toBeLessThan(6.3);
  });

  it('is not blind to a function that is odd about the middle of its panels', () => {
    const steep = (x: number, out: Float64Array): void => {
      const w = 1e-2;
      const t = Math.tanh(x / w);
      out[0] = w * Math.log(Math.cosh(x / w));
      out[1] = t;
      out[2] = (1 - t * t) / w;
      out[3] = (-2 * t * (1 - t * t)) / (w * w);
    };
    const table = hermiteTable(steep, -1, 1, { tolerance: 1e-9, firstPanels: 1 });
    for (let x = -1; x <= 1; x += 0.00137) expect(Math.abs(table.valueAt(x) - Math.tanh(x / 1e-2))).toBeLessThan(3e-9);
  });

  it('begins panels at the given breaks', () => {
    const corner = (x: number, out: Float64Array): void => {
      out[0] = (x * Math.abs(x)) / 2;
      out[1] = Math.abs(x);
      out[2] = x < 0.1 ? -1 : 1;
      out[3] = 0;
    };
    const table = hermiteTable((x, out) => corner(x - 0.1, out), 0, 1, { tolerance: 1e-9, breaks: [0.1] });
    expect(table.valueAt(0.35)).toBeCloseTo(0.25, 12);
  });

  it('refuses empty ranges and functions that are not finite', () => {
    expect(() => hermiteTable(sine, 1, 1, { tolerance: 1e-6 })).toThrow(/range must be finite and rising/);
    expect(() => hermiteTable((_x, out) => out.fill(NaN), 0, 1, { tolerance: 1e-6 })).toThrow(
      /function must be finite/,
    );
  });
});

describe('monotone cubic (PCHIP)', () => {
  // values of scipy.interpolate.PchipInterpolator 1.17 (own run)
  const x = [0, 1, 2.5, 3, 4.5];
  const y = [1, 3, 3.5, 1, 0.5];

  it('gives the values and slopes of scipy’s interpolator', () => {
    const curve = monotoneCubic(x, y);
    const at = [0, 0.3, 1.7, 2.5, 2.9, 3.6, 4.5];
    const expected = [1.0, 1.7862, 3.3445037037037038, 3.5, 1.3068292682926836, 0.665951219512195, 0.5];
    const slopes = [
      2.666666666666667, 2.5086666666666666, 0.36977777777777776, 0.0, -5.034146341463419, -0.39219512195121947,
      -1.1102230246251565e-16,
    ];
    at.forEach((p, i) => {
      expect(monotoneCubicAt(curve, p)).toBeCloseTo(expected[i]!, 12);
      expect(monotoneCubicSlopeAt(curve, p)).toBeCloseTo(slopes[i]!, 12);
    });
  });

  it('keeps the data’s monotone pieces monotone and holds the ends outside', () => {
    const curve = monotoneCubic([0, 1, 2, 3, 4], [0, 0.1, 0.1, 5, 5]);
    let before = -Infinity;
    for (let p = 0; p <= 4; p += 0.01) {
      const value = monotoneCubicAt(curve, p);
      expect(value).toBeGreaterThanOrEqual(before - 1e-14);
      before = value;
    }
    expect(monotoneCubicAt(curve, -1)).toBe(0);
    expect(monotoneCubicAt(curve, 9)).toBe(5);
    expect(monotoneCubicSlopeAt(curve, 9)).toBe(0);
  });

  it('limits the end slope where the data turn behind it, and sets it to zero where it would point the wrong way', () => {
    // three-point slope 2.7, limited to three times the first secant of 0.1
    expect(monotoneCubicSlopeAt(monotoneCubic([0, 1, 2, 3], [0, 0.1, -5, -6]), 0)).toBeCloseTo(0.3, 14);
    expect(monotoneCubicSlopeAt(monotoneCubic([0, 1, 2, 3], [0, 0.1, 5, 6]), 0)).toBe(0);
  });

  it('is a straight line through two points', () => {
    const line = monotoneCubic([1, 3], [2, -2]);
    expect(monotoneCubicAt(line, 1.5)).toBeCloseTo(1, 14);
    expect(monotoneCubicSlopeAt(line, 1.5)).toBeCloseTo(-2, 14);
  });

  it('refuses data that are no curve', () => {
    expect(() => monotoneCubic([0], [0])).toThrow(/at least 2 points/);
    expect(() => monotoneCubic([0, 0], [0, 1])).toThrow(/rise strictly/);
    expect(() => monotoneCubic([0, 1], [0])).toThrow(/value must have 2 points/);
    expect(() => monotoneCubic([0, NaN], [0, 1])).toThrow(/finite/);
  });
});
