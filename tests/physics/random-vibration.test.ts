import { describe, expect, it } from 'vitest';
import { integrateAdaptively } from '#physics/kernels/adaptive-quadrature';
import { spectralRadius } from '#physics/kernels/eigenvalues';
import { fourierSum } from '#physics/kernels/fft';
import { innerPeak, innerTurn } from '#physics/kernels/hermite-extremum';
import { exponentialStep } from '#physics/kernels/matrix-exponential';
import { portableCirclesInto, portableExp, portableLog } from '#physics/kernels/portable';
import { normalRandom, uniformRandom } from '#physics/kernels/random';
import { respond } from '#physics/models/response';
import { runLinearRecord } from '#physics/models/recording-linear';
import { recordedExcitation, runRecord } from '#physics/models/record-run';
import { gaussianRecord } from '#physics/models/spectrum-record';
import { meanSquareOf } from '#physics/models/vibration';
import { deviceOf, readCase } from './device-of-case';

describe('portable arithmetic', () => {
  it('agrees with the engine’s functions to a few units in the last place', () => {
    const circle = new Float64Array(2);
    for (let n = 0; n < 5000; n++) {
      const x = (n / 5000 - 0.5) * 1400;
      expect(Math.abs(portableExp(x) / Math.exp(x) - 1)).toBeLessThan(1e-15);
      expect(Math.abs(portableLog(Math.exp(x)) - x)).toBeLessThan(1e-15 * Math.max(1, Math.abs(x)));
      portableCirclesInto(x / 100, circle);
      expect(circle[0]).toBeCloseTo(Math.cos((2 * Math.PI * x) / 100), 13);
      expect(circle[1]).toBeCloseTo(Math.sin((2 * Math.PI * x) / 100), 13);
    }
    expect(() => portableLog(0)).toThrow(RangeError);
    expect(() => portableExp(710)).toThrow(RangeError);
  });

  it('makes the same numbers from the same seed, and others from another', () => {
    const draw = (seed: number): number[] => {
      const random = uniformRandom(seed);
      return [random(), random(), random()];
    };
    expect(draw(1)).toEqual(draw(1));
    expect(draw(2)).not.toEqual(draw(1));
    expect(() => uniformRandom(-1)).toThrow(RangeError);
  });

  it('draws normal numbers with the moments of normal numbers', () => {
    const normal = normalRandom(uniformRandom(11));
    const count = 200_000;
    const moments = [0, 0, 0, 0];
    for (let n = 0; n < count; n++) {
      const x = normal();
      moments.forEach((_, k) => (moments[k]! += x ** (k + 1) / count));
    }
    // four standard deviations of each mean
    expect(Math.abs(moments[0]!)).toBeLessThan(4 / Math.sqrt(count));
    expect(Math.abs(moments[1]! - 1)).toBeLessThan(4 * Math.sqrt(2 / count));
    expect(Math.abs(moments[3]! - 3)).toBeLessThan(4 * Math.sqrt(96 / count));
  });
});

describe('the Fourier sum', () => {
  it('is the sum it says, and its own inverse', () => {
    const n = 32;
    const re = Float64Array.from({ length: n }, (_, k) => Math.sin(k * k));
    const im = Float64Array.from({ length: n }, (_, k) => Math.cos(3 * k));
    const [a, b] = [Float64Array.from(re), Float64Array.from(im)];
    fourierSum(a, b, 1);
    let sum = 0;
    for (let k = 0; k < n; k++) {
      const angle = (2 * Math.PI * 5 * k) / n;
      sum += re[k]! * Math.cos(angle) - im[k]! * Math.sin(angle);
    }
    expect(a[5]).toBeCloseTo(sum, 12);
    fourierSum(a, b, -1);
    a.forEach((value, k) => expect(value / n).toBeCloseTo(re[k]!, 13));
    expect(() => fourierSum(new Float64Array(12), new Float64Array(12), 1)).toThrow(RangeError);
  });
});

describe('a Gaussian record', () => {
  const points: [number, number][] = [
    [20, 0.5],
    [60, 2],
    [200, 0.1],
  ];

  it('is bit for bit what it was when this was written', () => {
    const record = gaussianRecord(points, 1600, 4096, 1);
    const bytes = new DataView(record.buffer);
    let hash = 0x811c9dc5;
    for (let n = 0; n < record.byteLength; n++) hash = Math.imul(hash ^ bytes.getUint8(n), 0x01000193) >>> 0;
    expect(hash.toString(16)).toBe('f61f1f79');
  });

  it('has the power of its spectrum', () => {
    const record = gaussianRecord(points, 8000, 8000 * 120, 3);
    const square = record.reduce((sum, a) => sum + a * a, 0) / record.length;
    // 120 s of some 100 Hz: about 1 % of scatter, and the strengthening against straight lines adds a little
    expect(square / meanSquareOf(points)).toBeGreaterThan(0.97);
    expect(square / meanSquareOf(points)).toBeLessThan(1.03);
  });

  it('refuses a rate that cannot carry its spectrum', () => {
    expect(() => gaussianRecord(points, 400, 100, 1)).toThrow(RangeError);
  });
});

describe('time and frequency domain', () => {
  const device = deviceOf(readCase('D5-05'));
  const spectrum = {
    kind: 'spectrum',
    points: [
      [10, 0.02],
      [200, 0.02],
    ] as [number, number][],
    duration: 400,
    seed: 5,
  } as const;

  it('agree on a linear device within the scatter of the record', () => {
    const exact = respond(device, { ...spectrum, points: [...spectrum.points] });
    const rate = 1600;
    const record = gaussianRecord(spectrum.points, rate, spectrum.duration * rate + 1, spectrum.seed);
    const stepped = respond(device, { kind: 'recording', rate, acceleration: record });
    // the device's band is about 3 Hz wide: 400 s scatter by some 2 % in power
    expect(Math.abs(stepped.power.load! / exact.power.load! - 1)).toBeLessThan(0.08);
    expect(Math.abs(stepped.response.displacementPeak! / exact.response.displacementPeak! - 1)).toBeLessThan(0.25);
    expect(stepped.power.residual).toBeLessThan(1e-9);
  });

  it('exact steps and error-controlled steps agree, inductance included', () => {
    const record = gaussianRecord(spectrum.points, 1600, 3200, 9);
    const linear = { ...device, coilInductance: 0.02 };
    const exact = respond(linear, { kind: 'recording', rate: 1600, acceleration: record });
    const run = runRecord(linear, linear.circuit, recordedExcitation(record, 1600), 1e-9);
    expect(Math.abs(run.mean.load / exact.power.load! - 1)).toBeLessThan(1e-6);
    expect(Math.abs(run.displacementPeak / exact.response.displacementPeak! - 1)).toBeLessThan(1e-6);
    expect(Math.abs(run.stored / exact.power.stored! - 1)).toBeLessThan(1e-6);
  });

  it('a record sampled twice as densely on its own straight lines changes nothing', () => {
    const record = gaussianRecord(spectrum.points, 1600, 800, 9);
    const dense = Float64Array.from({ length: 2 * record.length - 1 }, (_, n) =>
      n % 2 === 0 ? record[n / 2]! : 0.5 * (record[(n - 1) / 2]! + record[(n + 1) / 2]!),
    );
    const linear = {
      mass: 0.02,
      damping: 0.1,
      stiffness: 900,
      coupling: 5,
      coilResistance: 80,
      coilInductance: 0.01,
      resistance: 400,
    };
    const [one, two] = [runLinearRecord(linear, record, 1600), runLinearRecord(linear, dense, 3200)];
    for (const key of ['mechanicalIn', 'mechanicalLoss', 'current2', 'displacement2', 'stored'] as const)
      expect(Math.abs(two[key] / one[key] - 1), key).toBeLessThan(1e-11);
    expect(() => runLinearRecord(linear, new Float64Array(1), 10)).toThrow(RangeError);
  });
});

describe('kernels of the exact step', () => {
  it('turn and decay as they must, however stiff', () => {
    const turn = exponentialStep(Float64Array.of(0, 7, -7, 0), 2, 3).step;
    expect(turn[0]).toBeCloseTo(Math.cos(21), 12);
    expect(turn[1]).toBeCloseTo(Math.sin(21), 12);
    const form = Float64Array.of(1, 0, 0, 0);
    const { step, integrals } = exponentialStep(Float64Array.of(-1e6, 0, 0, -2), 2, 0.5, [form]);
    expect(step[0]).toBe(0);
    // 21 squarings multiply the rounding by two million
    expect(step[3]).toBeCloseTo(Math.exp(-1), 9);
    expect(integrals[0]![0]! * 2e6).toBeCloseTo(1, 12);
  });

  it('find the top of a sine between two points', () => {
    const h = 0.4;
    const t = Math.PI / 2 - 0.15;
    const top = innerTurn(
      h,
      Math.sin(t),
      Math.cos(t),
      -Math.sin(t),
      Math.sin(t + h),
      Math.cos(t + h),
      -Math.sin(t + h),
    );
    expect(top).toBeCloseTo(1, 6);
    expect(innerPeak(h, Math.sin(t), Math.cos(t), Math.sin(t + h), Math.cos(t + h))).toBeCloseTo(1, 3);
  });

  it('know the largest eigenvalue', () => {
    expect(spectralRadius(Float64Array.of(0.5, 9, 0, -0.8), 2)).toBeCloseTo(0.8, 12);
    expect(spectralRadius(Float64Array.of(0, -0.81, 1, 0), 2)).toBeCloseTo(0.9, 12);
    expect(spectralRadius(Float64Array.of(0, 1, 0, 0, 0, 1, 0.125, 0, 0), 3)).toBeCloseTo(0.5, 12);
  });
});

describe('adaptive quadrature', () => {
  it('meets closed forms of a sharp peak and of several functions at once', () => {
    const { integrals, converged } = integrateAdaptively(
      (x, out) => {
        out[0] = 1 / (1e-8 + (x - 0.3) ** 2);
        out[1] = x ** 9;
      },
      2,
      [0, 0.3, 1],
      1e-11,
    );
    expect(converged).toBe(true);
    const exact = (Math.atan(0.7e4) + Math.atan(0.3e4)) * 1e4;
    expect(Math.abs(integrals[0]! / exact - 1)).toBeLessThan(1e-10);
    expect(integrals[1]).toBeCloseTo(0.1, 13);
  });

  it('refuses nonsense', () => {
    expect(() => integrateAdaptively(() => undefined, 1, [0], 1e-9)).toThrow(RangeError);
    expect(() => integrateAdaptively(() => undefined, 1, [0, Infinity], 1e-9)).toThrow(RangeError);
    expect(() => integrateAdaptively(() => undefined, 1, [0, 1], 0)).toThrow(RangeError);
  });
});

describe('what cannot be computed', () => {
  const device = deviceOf(readCase('D4-09'));

  it('is refused at once with the reason', () => {
    const start = performance.now();
    const long = respond(device, { kind: 'recording', rate: 1000, acceleration: new Float64Array(10_000_001) });
    expect(long.response.method).toBe('none');
    expect(long.response.loadPower).toBeNull();
    expect(long.notes[0]).toMatch(/^Not computed, because .* steps/);
    const wide = {
      kind: 'spectrum',
      points: [
        [10, 1],
        [1e5, 1],
      ] as [number, number][],
      duration: 3600,
      seed: 1,
    } as const;
    expect(respond(device, { ...wide, points: [...wide.points] }).response.method).toBe('none');
    expect(performance.now() - start).toBeLessThan(1000);
  });

  it('gives nothing but numbers for a record of silence', () => {
    const answer = respond(device, { kind: 'recording', rate: 1000, acceleration: new Float64Array(200) });
    expect(Math.abs(answer.response.loadPower!)).toBeLessThan(1e-30);
    for (const value of Object.values({ ...answer.response, ...answer.power }))
      if (typeof value === 'number') expect(Number.isFinite(value)).toBe(true);
  });
});
