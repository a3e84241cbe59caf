import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { followCurve } from '#physics/kernels/continuation';
import { describedStarts } from '#physics/kernels/describing-function';
import { largestMultiplier } from '#physics/kernels/floquet';
import { analyseInto, fourierTable, synthesiseInto } from '#physics/kernels/fourier-table';
import { HarmonicBalance } from '#physics/kernels/harmonic-balance';
import type { PortOscillator } from '#physics/kernels/harmonic-balance';
import { solveInPlace } from '#physics/kernels/linear-solve';
import { solveByNewton } from '#physics/kernels/newton';
import { findOrbit } from '#physics/kernels/periodic-orbit';
import { realRootsOfCubic } from '#physics/kernels/polynomial-roots';
import { uniformRandom } from '#physics/kernels/random';
import { driveOf, everyOrbit } from '#physics/models/branches';

function oscillatorWith(given: Partial<PortOscillator> & { k?: number; k3?: number } = {}): PortOscillator {
  const { k = 2467.4, k3 = 2e8, ...rest } = given;
  return {
    mass: 0.025,
    damping: 0.08,
    drag: 0,
    resistance: 900,
    inductance: 0,
    restoring: (u) => (k + k3 * u * u) * u,
    restoringSlope: (u) => k + 3 * k3 * u * u,
    coupling: (u) => 6 * Math.exp(-((u / 2e-3) ** 2)) + 900 * u,
    couplingSlope: (u) => (-12 * u * Math.exp(-((u / 2e-3) ** 2))) / 4e-6 + 900,
    ...rest,
  };
}
const omega = 2 * Math.PI * 51;

describe('harmonic balance', () => {
  it.each([
    ['no inductance', {}],
    ['inductance', { inductance: 0.8 }],
    ['open', { resistance: Infinity }],
    ['drag', { drag: 0.4, inductance: 0.2 }],
  ])('has the Jacobian of its residual: %s', (_, given) => {
    const balance = new HarmonicBalance(oscillatorWith(given), 5);
    const random = uniformRandom(4);
    const x = Float64Array.from({ length: balance.size }, (_n, k) => (1e-3 * (random() - 0.5)) / (1 + k));
    const drive = driveOf(0.025, 3, 0.4);
    const at = (point: Float64Array): Float64Array => {
      const out = new Float64Array(balance.size);
      balance.residualInto(point, omega, drive, out);
      return out;
    };
    at(x);
    const jacobian = new Float64Array(balance.size ** 2);
    balance.jacobianInto(omega, jacobian);
    const size = Math.max(...jacobian.map(Math.abs));
    for (let k = 0; k < balance.size; k++) {
      const step = 1e-8;
      const [above, below] = [Float64Array.from(x), Float64Array.from(x)];
      above[k]! += step;
      below[k]! -= step;
      const [high, low] = [at(above), at(below)];
      for (let r = 0; r < balance.size; r++) {
        const slope = (high[r]! - low[r]!) / (2 * step);
        expect(Math.abs(slope - jacobian[r * balance.size + k]!)).toBeLessThan(1e-6 * size);
      }
    }
  });

  it('meets the single-harmonic amplitude of the Duffing equation, and adds less the more harmonics it has', () => {
    const oscillator = oscillatorWith({ coupling: () => 0, couplingSlope: () => 0, k3: 4e7 });
    // well below resonance, where one orbit exists and its harmonics are plain to see
    const rate = 2 * Math.PI * 30;
    const drive = driveOf(0.025, 40, 0);
    const amplitude = (harmonics: number): number => {
      const balance = new HarmonicBalance(oscillator, harmonics);
      const { x, converged } = solveByNewton(
        {
          size: balance.size,
          residualInto: (point, out) => balance.residualInto(point, rate, drive, out),
          jacobianInto: (out) => balance.jacobianInto(rate, out),
        },
        new Float64Array(balance.size),
        1,
      );
      expect(converged).toBe(true);
      return Math.hypot(x[1]!, x[2]!);
    };
    const a = amplitude(1);
    const spring = 2467.4 + 0.75 * 4e7 * a * a - 0.025 * rate ** 2;
    expect(Math.hypot(spring, 0.08 * rate) * a).toBeCloseTo(1, 11);
    const changes = [3, 5, 7].map((h) => Math.abs(amplitude(h) / amplitude(h - 2) - 1));
    expect(changes[1]).toBeLessThan(0.1 * changes[0]!);
    expect(changes[2]).toBeLessThan(0.1 * changes[1]!);
  });

  it('is on the backbone of handbook/suspension.json#duffing-backbone (P1) at resonance', () => {
    const rows = (
      JSON.parse(readFileSync(new URL('../reference/handbook/suspension.json', import.meta.url), 'utf8')) as {
        values: { id: string; given: Record<string, number>; expected: Record<string, number> }[];
      }
    ).values;
    const { given, expected } = rows.find((row) => row.id === 'duffing-backbone')!;
    const balance = new HarmonicBalance(
      oscillatorWith({
        mass: given.mass_kg!,
        k: given.stiffness_NPerM!,
        k3: given.cubic_NPerM3!,
        damping: 0,
        resistance: Infinity,
      }),
      1,
    );
    const residual = new Float64Array(3);
    const x = Float64Array.of(0, given.amplitude_m!, 0);
    balance.residualInto(x, 2 * Math.PI * expected.harmonicBalance_Hz!, new Float64Array(3), residual);
    // forces here are newtons; the frequency is given to ten digits
    expect(Math.abs(residual[1]!)).toBeLessThan(1e-8);
  });

  it('raises its harmonics until nothing is left out', () => {
    const orbit = findOrbit(oscillatorWith(), omega, driveOf(0.025, 1, 0), new Float64Array(3));
    expect(orbit.converged).toBe(true);
    expect(orbit.tail).toBeLessThan(3e-9);
    expect(orbit.residual).toBeLessThan(1e-11);
  });

  it('refuses numbers of harmonics that it has no table for', () => {
    expect(() => new HarmonicBalance(oscillatorWith(), 0)).toThrow(RangeError);
    expect(() => new HarmonicBalance(oscillatorWith(), 2.5)).toThrow(RangeError);
    expect(() => fourierTable(4, 8)).toThrow(RangeError);
  });
});

describe('stability', () => {
  it('of a linear oscillator is e^(−πc/(m ω))', () => {
    const linear = oscillatorWith({ k3: 0, resistance: Infinity });
    const multiplier = largestMultiplier(linear, new Float64Array(3), omega);
    // trapezoidal: (2π/256)²/12 of the decrement is missing
    expect(multiplier).toBeCloseTo(Math.exp((-0.08 * Math.PI) / (0.025 * omega)), 5);
  });

  it('with a port matches damping in closed form where the coupling is constant', () => {
    const port = oscillatorWith({ k3: 0, coupling: () => 6, couplingSlope: () => 0, inductance: 1e-4 });
    const multiplier = largestMultiplier(port, new Float64Array(3), omega);
    expect(multiplier).toBeCloseTo(Math.exp((-(0.08 + 36 / 900) * Math.PI) / (0.025 * omega)), 4);
  });
});

describe('every steady orbit', () => {
  const duffing = oscillatorWith({
    k3: 4e8,
    coupling: () => 6,
    couplingSlope: () => 0,
    resistance: 2100,
    damping: 0.0524,
  });
  const at = (hertz: number) => everyOrbit(duffing, 2 * Math.PI * hertz, driveOf(0.025, 1.5, 0), [0]);

  it('is one, three, one along the frequency of a hardening device, the middle one unstable', () => {
    expect(at(50).map((orbit) => orbit.stable)).toEqual([true]);
    expect(at(54).map((orbit) => orbit.stable)).toEqual([true, false, true]);
    expect(at(62).map((orbit) => orbit.stable)).toEqual([true]);
  });

  it('of a double well has the orbits within each well, on the hilltop, and across both', () => {
    const [k, k3] = [-1233.7, 5e8];
    const well = Math.sqrt(-k / k3);
    const across: PortOscillator = {
      ...duffing,
      damping: 0.0565,
      restoring: (u) => (k + k3 * (u + well) ** 2) * (u + well),
      restoringSlope: (u) => k + 3 * k3 * (u + well) ** 2,
    };
    const drive = driveOf(0.025, 5.67, 0);
    const orbits = everyOrbit(across, 2 * Math.PI * 55.4, drive, [-2 * well, -well, 0]);
    expect(orbits).toHaveLength(5);
    expect(orbits.filter((orbit) => orbit.stable)).toHaveLength(3);
    // the two inside the wells are mirror images half a period apart
    const inside = orbits.filter((orbit) => Math.hypot(orbit.displacement[1]!, orbit.displacement[2]!) < 0.5 * well);
    const [one, other] = [inside[0]!, inside.at(-1)!];
    expect(one.displacement[0]! + other.displacement[0]!).toBeCloseTo(-2 * well, 9);
  });

  it('begins among the sinusoids that balance the drive', () => {
    const starts = describedStarts(duffing, 2 * Math.PI * 54, driveOf(0.025, 1.5, 0), [-3e-3, 3e-3]);
    expect(starts.length).toBeGreaterThanOrEqual(3);
  });
});

describe('continuation', () => {
  it('goes round a circle through both its folds', () => {
    let [at, parameter] = [0, 0];
    const circle = {
      size: 1,
      residualInto: (x: Float64Array, lambda: number, out: Float64Array): void => {
        [at, parameter] = [x[0]!, lambda];
        out[0] = at * at + lambda * lambda - 1;
      },
      jacobianInto: (out: Float64Array): void => void (out[0] = 2 * at),
      parameterSlopeInto: (out: Float64Array): void => void (out[0] = 2 * parameter),
    };
    const options = { scale: 1, parameterScale: 1, residualScale: 1, firstStep: 0.05, largestStep: 0.2, most: 200 };
    const seen: [number, number][] = [];
    const { ended } = followCurve(circle, Float64Array.of(1), 0, { ...options, direction: 1 }, (x, lambda) => {
      seen.push([x[0]!, lambda]);
      return seen.length < 5 || !(x[0]! > 0.9 && lambda < 0.1);
    });
    expect(ended).toBe('stopped');
    for (const [x, lambda] of seen) expect(Math.hypot(x, lambda)).toBeCloseTo(1, 8);
    expect(Math.min(...seen.map(([x]) => x))).toBeLessThan(-0.98);
    expect(Math.min(...seen.map(([, lambda]) => lambda))).toBeLessThan(-0.98);
  });
});

describe('small linear algebra and series', () => {
  it('solves, and knows the sign of the determinant', () => {
    const b = Float64Array.of(5, 10);
    expect(solveInPlace(Float64Array.of(0, 1, 2, 3), b, 2)).toBe(-1);
    expect([...b]).toEqual([-2.5, 5]);
    expect(solveInPlace(Float64Array.of(1, 2, 2, 4), Float64Array.of(1, 1), 2)).toBe(0);
  });

  it('takes a series apart and puts it together again', () => {
    const table = fourierTable(6, 28);
    const coefficients = Float64Array.from({ length: 13 }, (_, k) => Math.sin(1.7 * k + 1));
    const values = new Float64Array(28);
    const back = new Float64Array(13);
    synthesiseInto(table, coefficients, values);
    analyseInto(table, values, back);
    back.forEach((value, k) => expect(value).toBeCloseTo(coefficients[k]!, 13));
  });

  it.each([
    [1, -6, 11, -6, [1, 2, 3]],
    [1, 0, 0, -8, [2]],
    [0, 1, 0, -4, [-2, 2]],
    [0, 0, 2, -1, [0.5]],
    [1, 0, -1, 0, [-1, 0, 1]],
  ])('finds the real roots of %d x³ + %d x² + %d x + %d', (a, b, c, d, wanted) => {
    const roots = realRootsOfCubic(a, b, c, d);
    expect(roots).toHaveLength(wanted.length);
    roots.forEach((root, n) => expect(root).toBeCloseTo(wanted[n]!, 12));
  });
});
