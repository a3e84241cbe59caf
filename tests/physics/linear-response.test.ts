import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { constantCoupling } from '#physics/models/coupling';
import type { Device } from '#physics/models/device';
import { squaresAt, transferAt } from '#physics/models/linear-response';
import { respond } from '#physics/models/response';
import { springSuspension } from '#physics/models/suspension';
import { commonFrequency, densityAt, meanSquareOf } from '#physics/models/vibration';

interface Row {
  id: string;
  given: Record<string, number>;
  expected: Record<string, number>;
}
const limits = JSON.parse(
  readFileSync(new URL('../reference/handbook/harvester-limits.json', import.meta.url), 'utf8'),
) as { values: Row[] };
const row = (id: string): Row => limits.values.find((value) => value.id === id)!;

function deviceFrom({ given }: Row, resistance: number): Device {
  const mass = given.mass_kg!;
  const stiffness = mass * (2 * Math.PI * given.naturalFrequency_Hz!) ** 2;
  const { suspension, restPosition } = springSuspension({ stiffness, cubic: 0, neutralAt: 0 }, mass, 0);
  return {
    mass,
    damping: Math.sqrt(stiffness * mass) / given.quality!,
    quadraticDrag: 0,
    suspension,
    restPosition,
    stops: null,
    coupling: constantCoupling(given.coupling_VsPerM!),
    coilResistance: given.coilResistance_ohm!,
    coilInductance: given.coilInductance_H ?? 0,
    circuit: { kind: 'resistor', resistance },
  };
}

describe('a linear device under a tone', () => {
  it('gives the best load of handbook/harvester-limits.json#best-resistive-load (P1)', () => {
    const { given, expected } = row('best-resistive-load');
    const tone = { frequency: 50, acceleration: given.accelerationPeak_mPerS2!, phase: 0.4 };
    const { response } = respond(deviceFrom(row('best-resistive-load'), expected.bestLoad_ohm!), {
      kind: 'tone',
      tone,
    });
    for (const key of [
      'loadPower_W',
      'loadVoltageRms_V',
      'coilCurrentRms_A',
      'emfRms_V',
      'displacementPeak_m',
    ] as const) {
      const got = response[key.replace(/_.*/, '') as 'loadPower'];
      expect(Math.abs(got! / expected[key]! - 1), key).toBeLessThan(1e-8);
    }
    expect(Math.abs(response.openCircuitEmfRms! / expected.openCircuitEmfRms_V! - 1)).toBeLessThan(1e-8);
  });

  it.each(['ref-device-49p0', 'ref-device-50p5', 'ref-device-inductance-49', 'ref-device-inductance-51'])(
    'gives handbook/harvester-limits.json#%s (P1)',
    (id) => {
      const { given, expected } = row(id);
      const tone = { frequency: given.driveFrequency_Hz!, acceleration: given.accelerationPeak_mPerS2!, phase: 0 };
      const { response } = respond(deviceFrom(row(id), given.loadResistance_ohm!), { kind: 'tone', tone });
      expect(Math.abs(response.loadPower! / expected.loadPower_W! - 1)).toBeLessThan(1e-8);
      expect(Math.abs(response.displacementPeak! / expected.displacementPeak_m! - 1)).toBeLessThan(1e-8);
    },
  );

  it('turns the phase from π below resonance through π/2 to 0 above, whatever the phase of the tone', () => {
    const device = deviceFrom(row('best-resistive-load'), 800);
    const phases = [1, 50, 3000].map((frequency) => {
      const tone = { frequency, acceleration: 1, phase: 2.5 };
      return respond(device, { kind: 'tone', tone }).response.phase!;
    });
    expect(phases[0]).toBeCloseTo(Math.PI, 3);
    expect(phases[1]).toBeCloseTo(Math.PI / 2, 6);
    expect(phases[2]).toBeCloseTo(0, 3);
  });

  it('balances power at every frequency', () => {
    const device = deviceFrom(row('ref-device-inductance-49'), 300);
    for (const frequency of [5, 48, 50, 52, 400]) {
      const tone = { frequency, acceleration: 2, phase: -1 };
      expect(respond(device, { kind: 'tone', tone }).power.residual).toBeLessThan(1e-11);
    }
  });

  it('answers a static acceleration with −m/k and no EMF', () => {
    const transfer = transferAt(
      { mass: 2, damping: 3, stiffness: 50, coupling: 4, coilResistance: 5, coilInductance: 0.1, resistance: 6 },
      0,
    );
    expect(transfer.uRe).toBe(-2 / 50);
    for (const key of ['uIm', 'eRe', 'eIm', 'iRe', 'iIm'] as const) expect(Math.abs(transfer[key])).toBe(0);
  });
});

describe('a linear device under a spectrum', () => {
  it('takes mG/4 from white noise: handbook/harvester-limits.json#white-noise-2 (P1)', () => {
    const { given, expected } = row('white-noise-2');
    const density = given.density_g2PerHz! * 9.80665 ** 2;
    const points: [number, number][] = [
      [1e-3, density],
      [1e7, density],
    ];
    const device = deviceFrom(row('white-noise-2'), given.loadResistance_ohm!);
    const { response, power } = respond(device, { kind: 'spectrum', points, duration: 60, seed: 1 });
    expect(response.converged).toBe(true);
    // the band leaves out m²-terms below 1 mHz and above 10 MHz: 2e-7 of the input, less of the rest
    expect(Math.abs(power.mechanicalIn! / expected.powerIn_W! - 1)).toBeLessThan(1e-6);
    expect(Math.abs(power.load! / expected.loadPower_W! - 1)).toBeLessThan(1e-6);
    expect(Math.abs(response.displacementRms! / expected.displacementRms_m! - 1)).toBeLessThan(1e-6);
    expect(power.residual).toBeLessThan(1e-9);
  });

  it('joins points straight on log–log paper', () => {
    const points: [number, number][] = [
      [10, 1],
      [100, 0.01],
    ];
    expect(densityAt(points, Math.sqrt(1000))).toBeCloseTo(0.1, 12);
    expect(densityAt(points, 9.99)).toBe(0);
    expect(meanSquareOf(points)).toBeCloseTo(100 * (1 / 10 - 1 / 100), 12);
  });
});

describe('tones', () => {
  it('finds the period that tones share, and says where there is none', () => {
    expect(commonFrequency([50, 75], 100)).toBeCloseTo(25, 9);
    expect(commonFrequency([49.5, 52.4404424085], 400)).toBeNull();
  });

  it('adds up in power, and in amplitude at one frequency', () => {
    const device = deviceFrom(row('best-resistive-load'), 500);
    const one = { frequency: 50, acceleration: 1, phase: 0.3 };
    const two = { frequency: 75, acceleration: 4, phase: 1 };
    const alone = [one, two].map((tone) => respond(device, { kind: 'tone', tone }).power.load!);
    const both = respond(device, { kind: 'tones', tones: [one, two] });
    expect(both.power.load).toBeCloseTo(alone[0]! + alone[1]!, 15);
    const doubled = respond(device, { kind: 'tones', tones: [one, one] });
    expect(doubled.power.load! / alone[0]!).toBeCloseTo(4, 10);
  });

  it('squares what the transfer gives', () => {
    const device = {
      mass: 1,
      damping: 2,
      stiffness: 9,
      coupling: 3,
      coilResistance: 4,
      coilInductance: 0.2,
      resistance: 5,
    };
    const transfer = transferAt(device, 2.5);
    expect(squaresAt(device, 2.5).emf).toBeCloseTo(transfer.eRe ** 2 + transfer.eIm ** 2, 15);
  });
});
