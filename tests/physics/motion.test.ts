import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { ERROR_WEIGHTS, EXPLICIT, IMPLICIT, NODES, WEIGHTS } from '#physics/kernels/imex-tableau';
import { circuitModel } from '#physics/models/circuit-model';
import { constantCoupling } from '#physics/models/coupling';
import type { Circuit, Device, Stops } from '#physics/models/device';
import { Motion } from '#physics/models/motion';
import { periodicDrive, shoot } from '#physics/models/periodic-motion';
import { respond } from '#physics/models/response';
import { springSuspension } from '#physics/models/suspension';

interface Row {
  id: string;
  given: Record<string, number>;
  expected: Record<string, number>;
}
const handbook = (
  JSON.parse(readFileSync(new URL('../reference/handbook/suspension.json', import.meta.url), 'utf8')) as {
    values: Row[];
  }
).values;
const row = (id: string): Row => handbook.find((value) => value.id === id)!;

interface Given {
  stiffness?: number;
  cubic?: number;
  damping?: number;
  mass?: number;
  coupling?: number;
  inductance?: number;
  stops?: Stops | null;
  circuit?: Circuit;
}
function deviceWith(given: Given): Device {
  const mass = given.mass ?? 0.025;
  const { suspension, restPosition } = springSuspension(
    { stiffness: given.stiffness ?? 2467.4, cubic: given.cubic ?? 0, neutralAt: 0 },
    mass,
    0,
  );
  return {
    mass,
    damping: given.damping ?? 0.05,
    quadraticDrag: 0,
    suspension,
    restPosition,
    stops: given.stops ?? null,
    coupling: constantCoupling(given.coupling ?? 6),
    coilResistance: 100,
    coilInductance: given.inductance ?? 0,
    circuit: given.circuit ?? { kind: 'resistor', resistance: 800 },
  };
}
const still = (): number => 0;
const moving = (device: Device, tolerance = 1e-10, drive = still): Motion =>
  new Motion(device, circuitModel(device.circuit), drive, { tolerance, period: 0.02, smallest: 1e-3, most: 1e6 });

describe('the pair of Runge–Kutta tableaux', () => {
  const weigh = (of: (stage: number) => number): number => WEIGHTS.reduce((sum, w, s) => sum + w * of(s), 0);
  const through = (tableau: Float64Array, of: (stage: number) => number) => (s: number) => {
    let sum = 0;
    for (let k = 0; k < 6; k++) sum += tableau[6 * s + k]! * of(k);
    return sum;
  };
  const node = (s: number): number => NODES[s]!;

  it('meets every condition of order 4, coupled ones included', () => {
    for (let power = 0; power < 4; power++) expect(weigh((s) => node(s) ** power)).toBeCloseTo(1 / (power + 1), 14);
    for (const one of [EXPLICIT, IMPLICIT]) {
      for (let s = 0; s < 6; s++) expect(through(one, () => 1)(s)).toBeCloseTo(node(s), 14);
      expect(weigh(through(one, node))).toBeCloseTo(1 / 6, 14);
      expect(weigh((s) => node(s) * through(one, node)(s))).toBeCloseTo(1 / 8, 14);
      expect(weigh(through(one, (s) => node(s) ** 2))).toBeCloseTo(1 / 12, 14);
      for (const other of [EXPLICIT, IMPLICIT])
        expect(weigh(through(one, through(other, node)))).toBeCloseTo(1 / 24, 14);
    }
  });

  it('has an embedded result of order 3 and no more', () => {
    const gap = (power: number): number => ERROR_WEIGHTS.reduce((sum, w, s) => sum + w * node(s) ** power, 0);
    for (let power = 0; power < 3; power++) expect(gap(power)).toBeCloseTo(0, 14);
    expect(Math.abs(gap(3))).toBeGreaterThan(1e-3);
  });
});

describe('motion', () => {
  it('is of fourth order in its step, with and without coil inductance', () => {
    for (const inductance of [0, 0.5]) {
      const device = deviceWith({ cubic: 4e8, inductance });
      const end = (steps: number): number => {
        const motion = moving(device);
        motion.place(0, 1e-3, 0, 0, []);
        motion.replay(Array.from({ length: steps }, () => 0.02 / steps));
        return motion.u;
      };
      const exact = end(3200);
      const order = Math.log2(Math.abs(end(100) - exact) / Math.abs(end(200) - exact));
      expect(order).toBeGreaterThan(3.7);
      expect(order).toBeLessThan(4.6);
    }
  });

  it('decays as the closed form says, and its books balance', () => {
    const device = deviceWith({ damping: 0.1, coupling: 0 });
    const motion = moving(device);
    motion.place(0, 1e-3, 0, 0, []);
    const before = motion.energy();
    motion.advance(0.2, 0.01);
    const half = device.damping / (2 * device.mass);
    const omega = Math.sqrt(2467.4 / device.mass - half * half);
    const wanted = 1e-3 * Math.exp(-half * 0.2) * (Math.cos(omega * 0.2) + (half / omega) * Math.sin(omega * 0.2));
    expect(motion.u).toBeCloseTo(wanted, 11);
    expect(motion.energy() + motion.sums[1]!).toBeCloseTo(before, 11);
  });

  it('swings at the exact frequency of handbook/suspension.json#duffing-backbone (P1)', () => {
    const { given, expected } = row('duffing-backbone');
    const device = {
      ...deviceWith({ stiffness: given.stiffness_NPerM!, cubic: given.cubic_NPerM3!, coupling: 0 }),
      damping: 0,
    };
    const motion = moving(device, 1e-11);
    const quarter = 0.25 / expected.exact_Hz!;
    motion.place(0, given.amplitude_m!, 0, 0, []);
    motion.advance(quarter, quarter);
    // a quarter of a period from the turning point it passes through the middle
    expect(Math.abs(motion.u)).toBeLessThan(1e-8 * given.amplitude_m!);
  });

  it.each(['stop-1', 'stop-2'])('rebounds from a stop as handbook/suspension.json#%s (P1), never pulled', (id) => {
    const { given, expected } = row(id);
    const stops = {
      lower: null,
      upper: 1e-3,
      stiffness: given.stopStiffness_NPerM!,
      damping: given.stopDamping_NsPerM!,
    };
    const device = { ...deviceWith({ mass: given.mass_kg!, stops, coupling: 0, stiffness: 1e-9 }), damping: 0 };
    const motion = moving(device, 1e-11);
    motion.place(0, 0, 1, 0, []);
    motion.advance(0.003, 0.001);
    expect(Math.abs(-motion.v / expected.restitutionNeverPulling! - 1)).toBeLessThan(1e-8);
    if (expected.maxCompressionAt1mPerS_m !== undefined)
      expect(Math.abs((motion.peak - 1e-3) / expected.maxCompressionAt1mPerS_m - 1)).toBeLessThan(1e-6);
    // what the stop absorbs is what the mass has lost
    expect(motion.sums[2]).toBeCloseTo(0.5 * device.mass * (1 - motion.v * motion.v), 10);
  });

  it('gives up where the motion runs away', () => {
    const device = deviceWith({ cubic: -1e9 });
    const motion = moving(device);
    motion.place(0, 5e-3, 0, 0, []);
    expect(motion.advance(10, 0.01)).toBe(false);
  });
});

describe('shooting', () => {
  const tone = { frequency: 52, acceleration: 3, phase: 0.3 };

  it('finds the orbit that harmonic balance finds', () => {
    const device = deviceWith({ cubic: 2e8, damping: 0.2, inductance: 0.05 });
    const { response, power } = respond(device, { kind: 'tone', tone });
    const start = { u: 0, v: 0, current: 0, voltage: [] };
    const drive = periodicDrive([tone], tone.frequency);
    const motion = shoot(device, circuitModel(device.circuit), drive, start, 1e-9);
    expect(motion.converged).toBe(true);
    expect(Math.abs(motion.displacementPeak / response.displacementPeak! - 1)).toBeLessThan(1e-8);
    expect(Math.abs(motion.mean.load / power.load! - 1)).toBeLessThan(1e-7);
    expect(motion.stable).toBe(response.branches[0]!.stable);
  });

  it('solves for a capacitor that would take hours to charge', () => {
    const diode = { kind: 'drop', drop: 0.1 } as const;
    const answers = [1e-4, 10].map((capacitance) =>
      respond(deviceWith({ damping: 0.3, circuit: { kind: 'bridge', resistance: 5000, capacitance, diode } }), {
        kind: 'tone',
        tone,
      }),
    );
    for (const { response, power } of answers) {
      expect(response.converged).toBe(true);
      expect(power.residual).toBeLessThan(1e-6);
    }
    // the smaller one ripples by a per cent or so; the mean is nearly the same
    expect(answers[1]!.response.loadVoltageMean! / answers[0]!.response.loadVoltageMean!).toBeCloseTo(1, 2);
  });

  it('scales: lengths, times and powers of a similar device go as they must', () => {
    const diode = { kind: 'drop', drop: 0.2 } as const;
    const circuit = { kind: 'bridge', resistance: 4000, capacitance: 3e-6, diode } as const;
    const one = respond(deviceWith({ cubic: 1e8, circuit }), { kind: 'tone', tone });
    // voltages × 2, currents × 2: the same device with everything twice as far and twice the coupling's reach
    const two = respond(deviceWith({ cubic: 1e8 / 4, circuit: { ...circuit, diode: { kind: 'drop', drop: 0.4 } } }), {
      kind: 'tone',
      tone: { ...tone, acceleration: 6 },
    });
    expect(two.response.displacementPeak! / one.response.displacementPeak!).toBeCloseTo(2, 6);
    expect(two.power.load! / one.power.load!).toBeCloseTo(4, 5);
  });
});
