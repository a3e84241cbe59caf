import { describe, expect, it } from 'vitest';
import { completeE, completeK, completePi, generalComplete } from '../../server/physics/kernels/elliptic';
import { integrate } from '../../server/physics/kernels/gauss-legendre';

const kcOf = (m: number): number => Math.sqrt(1 - m);
const overQuarter = (f: (s: number) => number): number =>
  integrate((psi) => f(Math.sin(psi) ** 2), 0, Math.PI / 2, 100);

describe('complete elliptic integrals', () => {
  // DLMF 19.6.1 and Abramowitz & Stegun table 17.1 (parameter m = k²)
  it.each([
    [0, 1.5707963267948966, 1.5707963267948966],
    [0.5, 1.8540746773013719, 1.3506438810476755],
    [0.99, 3.6956373629898747, 1.015993545025224],
  ])('K and E of the table at m = %d', (m, K, E) => {
    expect(completeK(kcOf(m))).toBeCloseTo(K, 13);
    expect(completeE(kcOf(m))).toBeCloseTo(E, 13);
  });

  it.each([0.01, 0.3, 0.7, 0.95])('satisfy Legendre’s relation at m = %d', (m) => {
    const k = Math.sqrt(m);
    const kc = kcOf(m);
    const left = completeE(kc) * completeK(k) + completeE(k) * completeK(kc) - completeK(kc) * completeK(k);
    expect(left).toBeCloseTo(Math.PI / 2, 13);
  });

  it('keep the logarithm of K where the modulus is nearly one', () => {
    for (const kc of [1e-4, 1e-8, 1e-40]) expect(completeK(kc) / Math.log(4 / kc) - 1).toBeLessThan(2e-8);
  });

  it.each([
    [-3, 0.4],
    [0.2, 0.9],
    [0.75, 0.3],
  ])('Π(n = %d, m = %d) is its integral', (n, m) => {
    const direct = overQuarter((s) => 1 / ((1 - n * s) * Math.sqrt(1 - m * s)));
    expect(completePi(n, kcOf(m)) / direct).toBeCloseTo(1, 12);
  });

  it('Π has its elementary limits', () => {
    expect(completePi(0, kcOf(0.6))).toBeCloseTo(completeK(kcOf(0.6)), 13);
    // Π(n, 0) = π / (2 √(1 − n)), DLMF 19.6.2, hard up to n = 1
    for (const n of [-100, 0.5, 1 - 1e-10]) expect(completePi(n, 1) * Math.sqrt(1 - n)).toBeCloseTo(Math.PI / 2, 12);
  });

  it('Bulirsch’s cel contains K, E and Π', () => {
    for (const m of [0.05, 0.5, 0.9]) {
      const kc = kcOf(m);
      expect(generalComplete(kc, 1, 1, 1)).toBeCloseTo(completeK(kc), 12);
      expect(generalComplete(kc, 1, 1, kc * kc)).toBeCloseTo(completeE(kc), 12);
      expect(generalComplete(kc, 0.3, 1, 1)).toBeCloseTo(completePi(0.7, kc), 12);
    }
  });

  it('refuse arguments outside their range by name', () => {
    expect(() => completeK(0)).toThrow(/kc must be positive/);
    expect(() => completeE(-1)).toThrow(/kc/);
    expect(() => completePi(1, 0.5)).toThrow(/n must be below 1/);
    expect(() => generalComplete(0, 1, 1, 1)).toThrow(/kc/);
    expect(() => generalComplete(0.5, 0, 1, 1)).toThrow(/p must be positive/);
  });
});
