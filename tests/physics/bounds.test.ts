import { describe, expect, test } from 'vitest';
import { estimate } from '#physics/estimate';
import {
  bestResistiveLoad,
  broadbandBound,
  normalisedPowerDensity,
  resonantBound,
  travelLimitedBound,
} from '#physics/models/bounds';
import { handbookValue, numberOf, referenceCase } from '../support/handbook';

const relative = (value: number | null, expected: number): number => Math.abs((value ?? NaN) / expected - 1);

// handbook/harvester-limits.json (P1)
describe('published bounds', () => {
  test('resonant: (mA)²/(8c), A the peak', () => {
    const { given, expected } = handbookValue('harvester-limits', 'bound-resonant');
    const bound = resonantBound(
      numberOf(given, 'mass_kg'),
      numberOf(given, 'accelerationPeak_mPerS2'),
      numberOf(expected, 'dampingCoefficient_NsPerM'),
    );
    expect(relative(bound, numberOf(expected, 'bound_W'))).toBeLessThan(1e-9);
    expect(resonantBound(1, 1, 0)).toBeNull();
  });

  test('best resistive load and the power there', () => {
    const { given, expected } = handbookValue('harvester-limits', 'best-resistive-load');
    const damping = numberOf(handbookValue('harvester-limits', 'bound-resonant').expected, 'dampingCoefficient_NsPerM');
    const best = bestResistiveLoad(
      numberOf(given, 'mass_kg'),
      numberOf(given, 'accelerationPeak_mPerS2'),
      damping,
      numberOf(given, 'coupling_VsPerM'),
      numberOf(given, 'coilResistance_ohm'),
    );
    expect(relative(best?.resistance ?? null, numberOf(expected, 'bestLoad_ohm'))).toBeLessThan(1e-8);
    expect(relative(best?.power ?? null, numberOf(expected, 'loadPower_W'))).toBeLessThan(1e-8);
    expect(bestResistiveLoad(1, 1, 1, 0, 100)).toBeNull();
  });

  test.each(['travel-limited-1', 'travel-limited-2'])('%s: ½ m ω A Z', (id) => {
    const { given, expected } = handbookValue('harvester-limits', id);
    const bound = travelLimitedBound(
      numberOf(given, 'mass_kg'),
      numberOf(given, 'frequency_Hz'),
      numberOf(given, 'accelerationPeak_mPerS2'),
      numberOf(given, 'travelAmplitude_m'),
    );
    expect(relative(bound, numberOf(expected, 'bound_W'))).toBeLessThan(1e-9);
  });

  test('white noise: mG/4', () => {
    const { given, expected } = handbookValue('harvester-limits', 'white-noise-1');
    const bound = broadbandBound(numberOf(given, 'mass_kg'), numberOf(expected, 'density_m2PerS4PerHz'));
    expect(relative(bound, numberOf(expected, 'power_W'))).toBeLessThan(1e-9);
  });

  // P2: the definition
  test('normalised power density by the rms acceleration', () => {
    const { given, expected } = handbookValue('harvester-limits', 'npd-1');
    const density = normalisedPowerDensity(
      numberOf(given, 'power_W'),
      numberOf(given, 'volume_m3'),
      numberOf(given, 'accelerationRms_mPerS2'),
    );
    expect(relative(density, numberOf(expected, 'npd_kgSPerM3'))).toBeLessThan(1e-9);
  });
});

describe('bounds of an estimate', () => {
  const { design } = referenceCase('D1-01');
  const tone = { kind: 'tone', frequency: 50, acceleration: 1, as: 'peak' };

  test('the reference device', () => {
    const { bounds } = estimate(design, tone);
    const { expected } = handbookValue('harvester-limits', 'best-resistive-load');
    expect(relative(bounds.effectiveness, numberOf(expected, 'ratioToBound'))).toBeLessThan(1e-6);
    expect(bounds.travelLimited).toBeNull();
    expect(bounds.broadband).toBeNull();
  });

  test('an rms acceleration is worth √2 of a peak one', () => {
    const peak = estimate(design, tone);
    const rms = estimate(design, { ...tone, acceleration: Math.SQRT1_2, as: 'rms' });
    expect(relative(rms.bounds.resonant, peak.bounds.resonant ?? NaN)).toBeLessThan(1e-12);
    expect(relative(rms.response.loadPower, peak.response.loadPower ?? NaN)).toBeLessThan(1e-12);
  });

  test('with stops the tighter of the two bounds applies', () => {
    const stops = { lower: '-0.2 mm', upper: '0.2 mm', stiffness: '1 MN/m' };
    const { bounds } = estimate({ ...design, stops }, tone);
    expect(relative(bounds.travelLimited, 0.5 * 0.025 * 2 * Math.PI * 50 * 0.0002)).toBeLessThan(1e-12);
    expect(bounds.travelLimited).toBeLessThan(bounds.resonant ?? 0);
  });

  test('each bound that is not computed says why', () => {
    const { bounds, notes } = estimate(design, {
      kind: 'spectrum',
      points: [
        [5, 0.0002],
        [500, 0.0002],
      ],
      unit: 'g^2/Hz',
    });
    expect(bounds.resonant).toBeNull();
    expect(bounds.bestLoadPower).toBeNull();
    expect(notes.filter((note) => note.includes('because')).length).toBeGreaterThanOrEqual(2);
    expect(bounds.broadband).toBeGreaterThan(0);
  });

  test('no loaded device beats its bound', () => {
    for (const resistance of [50, 200, 800, 3000, 20000]) {
      const { response, bounds } = estimate({ ...design, circuit: { kind: 'resistor', resistance } }, tone);
      expect(response.loadPower).toBeLessThanOrEqual(bounds.bestLoadPower ?? 0);
    }
  });
});
