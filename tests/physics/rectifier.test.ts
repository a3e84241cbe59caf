import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { wrightOmega } from '#physics/kernels/wright-omega';
import type { Supercapacitor } from '#physics/models/circuit-model';
import { circuitModel } from '#physics/models/circuit-model';
import type { Circuit, Diode } from '#physics/models/device';
import { diodeVoltage, seriesCurrent, thermalVoltage } from '#physics/models/diode';
import { solveTwoPaths } from '#physics/models/two-paths';

interface Row {
  id: string;
  given: Record<string, number>;
  expected: Record<string, number>;
}
const read = (file: string): Row[] =>
  (
    JSON.parse(readFileSync(new URL(`../reference/handbook/${file}.json`, import.meta.url), 'utf8')) as {
      values: Row[];
    }
  ).values;
const electronics = read('electronics');
const limits = read('harvester-limits');
const row = (rows: Row[], id: string): Row => rows.find((value) => value.id === id)!;
const listOf = (of: Record<string, unknown>, key: string): number[] => of[key] as number[];

function diodeOf(given: Record<string, number>): Extract<Diode, { kind: 'shockley' }> {
  return {
    kind: 'shockley',
    saturationCurrent: given.saturationCurrent_A!,
    emissionCoefficient: given.emissionCoefficient!,
    seriesResistance: given.seriesResistance_ohm!,
    thermalVoltage: thermalVoltage(given.temperature_degC!),
  };
}
const silicon = diodeOf(row(electronics, 'diode-1N4148').given);
const schottky = diodeOf(row(electronics, 'diode-1N5817').given);
const near = (got: number, wanted: number, relative: number): void => {
  expect(Math.abs(got / wanted - 1), `${got} for ${wanted}`).toBeLessThan(relative);
};

describe('the diode law', () => {
  it('has the thermal voltages of handbook/electronics.json#thermal-voltage (P1)', () => {
    const { given, expected } = row(electronics, 'thermal-voltage');
    listOf(given, 'temperature_degC').forEach((temperature, n) =>
      near(thermalVoltage(temperature), listOf(expected, 'thermalVoltage_V')[n]!, 1e-9),
    );
  });

  it.each(['diode-1N4148', 'diode-1N5817', 'diode-1N4001', 'diode-BAT54'])(
    'follows handbook/electronics.json#%s (P1, BAT54 P2), both ways',
    (id) => {
      const { given, expected } = row(electronics, id);
      const diode = diodeOf(given);
      listOf(given, 'current_A').forEach((current, n) => {
        const voltage = listOf(expected, 'voltage_V')[n]!;
        near(diodeVoltage(diode, current), voltage, 1e-9);
        near(seriesCurrent(diode, 1, 0, voltage), current, 1e-8);
      });
    },
  );

  it.each(['operating-point-1N4148-1V-1k', 'operating-point-1N5817-0p5V-100'])(
    'finds handbook/electronics.json#%s (P1)',
    (id) => {
      const { given, expected } = row(electronics, id);
      const current = seriesCurrent(diodeOf(given), 1, given.resistance_ohm!, given.source_V!);
      near(current, expected.current_A!, 1e-9);
      near(diodeVoltage(diodeOf(given), current), expected.diodeVoltage_V!, 1e-9);
    },
  );

  it('puts a bridge where handbook/electronics.json#operating-point-bridge (P1) has it', () => {
    const { given, expected } = row(electronics, 'operating-point-bridge');
    const model = circuitModel({ kind: 'bridge', resistance: given.load_ohm!, capacitance: 0, diode: silicon });
    model.solve(given.source_V!, 0, new Float64Array(0), 0);
    // four diodes: the two that block leak 2.5 nA past the load
    near(model.loadVoltage, expected.loadVoltage_V!, 1e-5);
  });

  it('leaves no remainder in Wright’s omega', () => {
    for (let z = -39; z < 2000; z += 0.37) {
      const w = wrightOmega(z);
      expect(Math.abs(w + Math.log(w) - z)).toBeLessThan(1e-14 * Math.max(10, Math.abs(z)));
    }
    expect(wrightOmega(1)).toBe(1);
    expect(wrightOmega(-800)).toBe(0);
  });
});

describe('two rectifying paths', () => {
  it.each([
    ['silicon', silicon],
    ['Schottky', schottky],
  ] as const)('are solved to rounding with %s diodes, whether one conducts, both or none', (_, diode) => {
    const out = new Float64Array(2);
    for (const voltage of [0, 0.01, 0.3, 2])
      for (const r of [100, 1e4, 1e6])
        for (let e = -3; e <= 3; e += 0.0371) {
          const paths = { a11: r + 20, a22: r + 20, a12: 20 - r, s1: e - voltage, s2: -e - voltage };
          solveTwoPaths(diode, 2, paths, out);
          const [p, q] = [out[0]!, out[1]!];
          const rest = [paths.a11 * p + paths.a12 * q - paths.s1, paths.a12 * p + paths.a22 * q - paths.s2];
          [p, q].forEach((current, k) => {
            // as a current: what the remaining voltage would drive through path and junction
            const lift = current + diode.saturationCurrent;
            const junction = (2 * diode.emissionCoefficient * diode.thermalVoltage) / Math.max(lift, 1e-300);
            const error = (rest[k]! + 2 * diodeVoltage(diode, current)) / (r + 20 + junction);
            if (lift > 1e-12 * diode.saturationCurrent)
              expect(Math.abs(error)).toBeLessThan(1e-12 * (Math.abs(p) + Math.abs(q) + diode.saturationCurrent));
          });
        }
  });
});

/** Means over one period of a sinusoidal EMF behind a resistance, the capacitors held. */
function meansOf(circuit: Circuit, peak: number, resistance: number): { load: number; coil: number; direct: number } {
  const model = circuitModel(circuit);
  const points = 200_000;
  let [load, coil, direct] = [0, 0, 0];
  for (let n = 0; n < points; n++) {
    model.solve(peak * Math.sin((2 * Math.PI * (n + 0.5)) / points), resistance, new Float64Array(2), 0);
    load += model.load / points;
    coil += (resistance * model.current * model.current) / points;
    direct += Math.abs(model.current) / points;
  }
  return { load, coil, direct };
}
const store = (voltage: number, drop: number): Circuit => ({ kind: 'store', voltage, diode: { kind: 'drop', drop } });

describe('an ideal bridge from a sinusoidal EMF', () => {
  it('gives the curve of handbook/harvester-limits.json#bridge-curve (P1)', () => {
    const { given, expected } = row(limits, 'bridge-curve');
    listOf(given, 'voltageOverPeakEmf').forEach((x, n) => {
      const { load } = meansOf(store(2 * x, 0), 2, 100);
      expect(load / (4 / 800)).toBeCloseTo(listOf(expected, 'powerOverMatched')[n]!, 8);
    });
  });

  it('gives handbook/harvester-limits.json#bridge-with-drop (P1)', () => {
    const { given, expected } = row(limits, 'bridge-with-drop');
    const drop = given.dropPerDiode_V!;
    const means = meansOf(store(0.5, drop), given.emfPeak_V!, given.sourceResistance_ohm!);
    near(means.load, expected.powerAt0p5V_W!, 1e-6);
    near(means.direct, expected.meanCurrentAt0p5V_A!, 1e-6);
    const best = meansOf(store(expected.bestVoltage_V!, drop), given.emfPeak_V!, given.sourceResistance_ohm!);
    near(best.load, expected.bestPower_W!, 1e-6);
  });

  it('loses in the coil what handbook/harvester-limits.json#bridge-phase (P1) says', () => {
    const { given, expected } = row(limits, 'bridge-phase');
    const means = meansOf(store(given.storeVoltage_V!, 0), given.emfPeak_V!, given.sourceResistance_ohm!);
    near(means.coil, expected.coilLoss_W!, 1e-8);
    near(means.load, expected.power_W!, 1e-8);
  });
});

describe('every circuit', () => {
  const circuits: Circuit[] = [
    { kind: 'bridge', resistance: 2000, capacitance: 1e-5, diode: silicon },
    { kind: 'bridge', resistance: 2000, capacitance: 0, diode: schottky },
    { kind: 'doubler', resistance: 9000, capacitance: 1e-6, diode: schottky },
    { kind: 'store', voltage: 1.1, diode: silicon },
    { kind: 'tracker', inputResistance: 700, startVoltage: 0.8, efficiency: 0.8, diode: silicon },
    { kind: 'tracker', inputResistance: 700, startVoltage: 0.8, efficiency: 0.8, diode: { kind: 'drop', drop: 0.2 } },
  ];
  it.each(circuits)('sends what enters it somewhere: %o', (circuit) => {
    const model = circuitModel(circuit);
    for (const gain of [0, 1e-4])
      for (let e = -3; e <= 3; e += 0.113) {
        const base = Float64Array.of(0.7, 0.9);
        model.solve(e, 150, base, gain);
        let stored = 0;
        for (let c = 0; c < model.capacitors; c++) {
          const capacitance = (circuit as { capacitance: number }).capacitance;
          stored += capacitance * model.voltage[c]! * model.rate[c]!;
          expect(model.voltage[c]).toBeCloseTo(base[c]! + gain * model.rate[c]!, 10);
        }
        const entering = (e - 150 * model.current) * model.current;
        expect(entering).toBeCloseTo(model.load + model.rectifier + model.converter + stored, 12);
        expect(model.rectifier).toBeGreaterThanOrEqual(-1e-15);
      }
  });

  it('mirrors: the opposite EMF drives the opposite current into the same load', () => {
    for (const circuit of circuits.slice(0, 2)) {
      const model = circuitModel(circuit);
      model.solve(1.7, 90, Float64Array.of(0.4), 0);
      const [current, load] = [model.current, model.load];
      model.solve(-1.7, 90, Float64Array.of(0.4), 0);
      expect(model.current).toBeCloseTo(-current, 14);
      expect(model.load).toBeCloseTo(load, 14);
    }
  });

  it('lets a node draw nothing below its minimum voltage and all it asks for above', () => {
    const node = { sleepCurrent: 0, activeCurrent: 0.01, activeTime: 1, period: 2, minimumVoltage: 1.8 };
    const model = circuitModel({
      kind: 'supercapacitor',
      capacitance: 0.1,
      seriesResistance: 0,
      leakageResistance: 1e9,
      initialVoltage: 2,
      diode: silicon,
      node,
      duration: 1,
    }) as Supercapacitor;
    model.demand = 0.01;
    const drawn = (voltage: number): number => {
      model.solve(0, 100, Float64Array.of(voltage), 1e-4);
      return model.load / model.loadVoltage;
    };
    expect(drawn(1.7)).toBe(0);
    expect(drawn(1.9)).toBeCloseTo(0.01, 12);
    expect(drawn(1.8004)).toBeGreaterThan(0.001);
    expect(drawn(1.8004)).toBeLessThan(0.009);
  });

  it('starts a tracker at its start voltage and holds it there while drawing all would pull it below', () => {
    const model = circuitModel({
      kind: 'tracker',
      inputResistance: 1000,
      startVoltage: 1,
      efficiency: 0.9,
      diode: { kind: 'drop', drop: 0 },
    });
    const at = (e: number): [current: number, input: number] => {
      model.solve(e, 500, new Float64Array(0), 0);
      return [model.current, model.loadVoltage];
    };
    expect(at(0.9)).toEqual([0, 0.9]);
    expect(at(1.2)[1]).toBe(1);
    expect(at(1.2)[0]).toBeCloseTo(0.2 / 500, 12);
    expect(at(3)[0]).toBeCloseTo(3 / 1500, 12);
  });
});
