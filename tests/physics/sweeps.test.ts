import { describe, expect, test } from 'vitest';
import {
  bandwidthOf,
  detuningPenalty,
  loadSweep,
  logarithmic,
  responseSweep,
  startUpTime,
} from '#physics/estimate-sweeps';
import { DocumentError, estimate } from '#physics/estimate';
import { handbookValue, numberOf, referenceCase } from '../support/handbook';

const { design } = referenceCase('D1-01');
const tone = { kind: 'tone', frequency: 50, acceleration: 1, as: 'peak' };
const relative = (value: number | null, expected: number): number => Math.abs((value ?? NaN) / expected - 1);

// handbook/harvester-limits.json#ref-device-… (P1)
test.each(['ref-device-49p0', 'ref-device-49p5', 'ref-device-50p5', 'ref-device-51p0'])(
  '%s on the frequency sweep',
  (id) => {
    const { given, expected } = handbookValue('harvester-limits', id);
    const [point] = responseSweep(design, tone, [numberOf(given, 'driveFrequency_Hz')]);
    // The design's load is given to nine digits
    expect(relative(point?.loadPower ?? null, numberOf(expected, 'loadPower_W'))).toBeLessThan(1e-7);
    expect(relative(point?.displacementPeak ?? null, numberOf(expected, 'displacementPeak_m'))).toBeLessThan(1e-7);
  },
);

test('a point of a sweep is the estimate there', () => {
  const modelled = referenceCase('D2-01').design;
  const [point] = responseSweep(modelled, tone, [50.3]);
  const alone = estimate(modelled, { ...tone, frequency: 50.3 }).response;
  expect(relative(point?.loadPower ?? null, alone.loadPower ?? NaN)).toBeLessThan(1e-8);
});

describe('load sweep', () => {
  test('peaks at the best resistive load', () => {
    const values = logarithmic(100, 10_000, 201);
    const sweep = loadSweep(design, tone, values);
    expect(sweep?.quantity).toBe('resistance');
    const best = sweep?.points.reduce((a, b) => ((b.loadPower ?? 0) > (a.loadPower ?? 0) ? b : a));
    expect(Math.abs(Math.log((best?.at ?? 0) / 804.16))).toBeLessThan(Math.log(100) / 200);
    expect(relative(best?.loadPower ?? null, 0.001300134795)).toBeLessThan(1e-3);
  });

  test('moves the voltage of a store', () => {
    const store = referenceCase('D4-05').design;
    const sweep = loadSweep(store, { ...tone, acceleration: 1.5 }, [1.5]);
    expect(sweep?.quantity).toBe('voltage');
    expect(sweep?.points[0]?.loadPower).toBeGreaterThan(0);
  });
});

describe('half-power bandwidth', () => {
  test('of a linear device is that of its loaded damping, c_total/(2π m) to first order', () => {
    const bandwidth = bandwidthOf(design, tone);
    const total = (0.025 * 2 * Math.PI * 50) / 150 + 6.05716246 ** 2 / (103.448276 + 804.160706);
    // Load power goes with velocity: |ẋ|² is at half exactly where |m ω − k/ω| = c, a band of c/(2π m)
    expect(relative(bandwidth?.width ?? null, total / (2 * Math.PI * 0.025))).toBeLessThan(1e-6);
    expect(relative(bandwidth?.peakPower ?? null, 0.001300134795)).toBeLessThan(1e-9);
    expect(bandwidth?.peakFrequency).toBeCloseTo(50, 4);
  });

  test('is wider than f0/Q says where coil and load add damping', () => {
    expect(bandwidthOf(design, tone)?.width).toBeGreaterThan(1.5 * (50 / 150));
  });
});

test('one hertz of detuning costs the reference device a factor of 12.7 below', () => {
  // Cases D1-01 and D1-02
  const penalty = detuningPenalty(design, tone);
  expect(relative(penalty.below, 0.000102375694 / 0.001300134795)).toBeLessThan(1e-7);
  expect(relative(penalty.above, 0.0001062133183 / 0.001300134795)).toBeLessThan(1e-7);
});

test('start-up time of a supercapacitor is where its voltage passes the target', () => {
  const { design: start } = referenceCase('D6-01');
  const answer = estimate(start, { ...tone, acceleration: 1.5 });
  const time = startUpTime(answer, 1.5);
  expect(time).toBeGreaterThan(0);
  expect(time).toBeLessThan(20);
  // It ends at 2.10226 V (case D6-01): 3 V is not reached, and its initial 0.5 V is there from the start
  expect(startUpTime(answer, 3)).toBeNull();
  expect(startUpTime(answer, 0.1)).toBe(0);
});

test('a sweep needs a tone and sane points', () => {
  expect(() =>
    responseSweep(
      design,
      {
        kind: 'spectrum',
        points: [
          [5, 1],
          [50, 1],
        ],
        unit: 'g^2/Hz',
      },
      [50],
    ),
  ).toThrow(DocumentError);
  expect(() => responseSweep(design, tone, [])).toThrow(RangeError);
  expect(() => loadSweep(design, tone, [0])).toThrow(RangeError);
});
