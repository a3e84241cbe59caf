import { describe, expect, it } from 'vitest';
import { gaussLegendre } from '../../server/physics/kernels/gauss-legendre';
import { addCoaxialCircles, mutualOfCircles } from '../../server/physics/models/coaxial-circles';
import { MAGNETIC_CONSTANT } from '../../server/physics/models/constants';
import { couplingOfDevice, couplingTable, linkageOfDesign } from '../../server/physics/models/coupling';
import type { MagneticDesign } from '../../server/physics/models/coupling';
import { edgeProfile } from '../../server/physics/models/edge-profile';
import { axialLinkage } from '../../server/physics/models/through-coupling';
import type { AxialMagnet } from '../../server/physics/models/axial-magnet';
import type { AxialCoil } from '../../server/physics/models/through-coupling';
import {
  errorToPeak,
  expectedOf,
  handbookValue,
  handbookValues,
  numberOf,
  numbersOf,
  referenceCase,
} from '../support/handbook';

const aligned = ['F1-01', 'F1-03', 'F2-01', 'F2-02', 'F2-03', 'F2-05', 'F2-06', 'F2-08', 'F2-10', 'F2-12', 'F2-13'];

const magnet: AxialMagnet = { outerRadius: 5e-3, innerRadius: 0, length: 10e-3, at: 0, magnetisation: 1e6 };
const coil: AxialCoil = { innerRadius: 6e-3, outerRadius: 9e-3, length: 6e-3, at: 0, signedTurns: 1000 };

const linkageAt = (magnets: AxialMagnet[], coils: AxialCoil[], x: number): Float64Array => {
  const out = new Float64Array(4);
  axialLinkage(magnets, coils).at(x, out);
  return out;
};

/** λ and θ by brute force: Maxwell’s formula alone on panels that close in on the logarithms, no closed form at all. */
function byBruteForce(m: AxialMagnet, c: AxialCoil, x: number): { flux: number; coupling: number } {
  const gap = Math.max(0.2e-3, Math.abs(c.innerRadius - m.outerRadius));
  const steps = [0, 1, 4, 16, 64].map((k) => k * Math.min(gap, Math.abs(c.innerRadius - m.outerRadius) + 1e-9));
  const { nodes, weights } = gaussLegendre(10);
  const over = (from: number, to: number, centres: number[], f: (v: number) => number): number => {
    const breaks = centres.flatMap((centre) => steps.flatMap((d) => [centre - d, centre + d]));
    const edges = [from, ...breaks.filter((v) => v > from && v < to).sort((p, q) => p - q), to];
    let sum = 0;
    for (let k = 1; k < edges.length; k++) {
      const half = (edges[k]! - edges[k - 1]!) / 2;
      for (let i = 0; i < 10; i++) sum += half * weights[i]! * f(edges[k - 1]! + half * (1 + nodes[i]!));
    }
    return sum;
  };
  const density = (c.signedTurns * m.magnetisation) / (c.length * (c.outerRadius - c.innerRadius));
  const upper = x + m.at + m.length / 2;
  const lower = x + m.at - m.length / 2;
  const overWindow = (f: (r: number, z: number) => number): number =>
    over(c.innerRadius, c.outerRadius, [c.innerRadius, m.outerRadius], (r) =>
      over(c.at - c.length / 2, c.at + c.length / 2, [lower, upper], (z) => f(r, z)),
    );
  const turn = (r: number, z: number): number => mutualOfCircles(m.outerRadius, r, z);
  return {
    flux: density * overWindow((r, z) => over(lower, upper, [z], (s) => turn(r, z - s))),
    coupling: density * overWindow((r, z) => turn(r, upper - z) - turn(r, lower - z)),
  };
}

describe('coaxial circles', () => {
  it.each(handbookValues('inductance', 'loops-').filter((row) => 'distance_m' in row.given))(
    'Maxwell’s mutual inductance: handbook/inductance.json#$id ($grade)',
    ({ given, expected }) => {
      const M = mutualOfCircles(
        numberOf(given, 'radiusA_m'),
        numberOf(given, 'radiusB_m'),
        numberOf(given, 'distance_m'),
      );
      const relative = M / numberOf(expected, 'mutualInductance_H') - 1;
      expect(Math.abs(relative)).toBeLessThan(1e-9);
    },
  );

  it.each([
    [5e-3, 6e-3, 4e-3],
    [5e-3, 5.05e-3, 2e-5],
    [5e-3, 5e-3, 1e-3],
    [1e-3, 20e-3, -30e-3],
  ])('each function is the derivative of the one before it (a = %d, r = %d, z = %d)', (a, r, z) => {
    const at = (s: number): Float64Array => {
      const out = new Float64Array(5);
      addCoaxialCircles(out, 1, a, r, s);
      return out;
    };
    const scale = Math.hypot(a - r, z);
    const h = 1e-3 * scale;
    const here = at(z);
    for (let k = 0; k < 4; k++) {
      const slope = (8 * (at(z + h)[k]! - at(z - h)[k]!) - (at(z + 2 * h)[k]! - at(z - 2 * h)[k]!)) / (12 * h);
      const size = Math.abs(here[k + 1]!) + (Math.abs(here[k]!) * 1e-9) / h;
      expect(Math.abs(slope - here[k + 1]!)).toBeLessThan(1e-7 * size + 1e-14 * Math.abs(here[k]! / h) * 1e2);
    }
  });

  it('a distant, tiny circle sees a dipole', () => {
    // M → μ0 π a² r² / (2 (r² + z²)^{3/2}) for a ≪ r
    const [a, r, z] = [1e-6, 1e-2, 2e-2];
    const dipole = (MAGNETIC_CONSTANT * Math.PI * a * a * r * r) / (2 * (r * r + z * z) ** 1.5);
    expect(mutualOfCircles(a, r, z) / dipole).toBeCloseTo(1, 7);
  });

  it('refuses circles that coincide', () => {
    expect(() => mutualOfCircles(1, 1, 0)).toThrow(/coincide/);
    expect(() => mutualOfCircles(-1, 1, 0)).toThrow(/radii must be positive/);
  });
});

describe('through layout', () => {
  it.each(aligned)('flux linkage and coupling of reference case %s', (id) => {
    const reference = referenceCase(id);
    const curve = couplingOfDevice(
      reference.design as unknown as MagneticDesign,
      Float64Array.from(reference.positions!),
    );
    // F1-03: the two reference methods themselves differ by 7e-9 in flux
    const flux = id === 'F1-03' ? 1e-8 : 1e-12;
    expect(errorToPeak(expectedOf(reference, 'curve.fluxLinkage') as number[], curve.fluxLinkage)).toBeLessThan(flux);
    expect(errorToPeak(expectedOf(reference, 'curve.coupling') as number[], curve.coupling)).toBeLessThan(1e-10);
  });

  it('coupling curve of the reference pair: handbook/drop-test.json#coupling-curve (P1)', () => {
    const { given, expected } = handbookValue('drop-test', 'coupling-curve');
    const m = { ...magnet, magnetisation: numberOf(given, 'remanence_T') / MAGNETIC_CONSTANT };
    const rows = numbersOf(given, 'x_m').map((x) => linkageAt([m], [coil], x));
    const flux = rows.map((row) => row[0]!);
    const coupling = rows.map((row) => row[1]!);
    expect(errorToPeak(numbersOf(expected, 'fluxLinkage_Vs'), flux)).toBeLessThan(1e-8);
    expect(errorToPeak(numbersOf(expected, 'coupling_VsPerM'), coupling)).toBeLessThan(1e-8);
  });

  it('largest coupling and its place: handbook/drop-test.json#coupling-peak (P1)', () => {
    const { given, expected } = handbookValue('drop-test', 'coupling-peak');
    const m = { ...magnet, magnetisation: numberOf(given, 'remanence_T') / MAGNETIC_CONSTANT };
    const linkage = axialLinkage([m], [coil]);
    const out = new Float64Array(4);
    let x = 5e-3;
    for (let i = 0; i < 20; i++) {
      linkage.at(x, out);
      x -= out[2]! / out[3]!;
    }
    linkage.at(x, out);
    expect(Math.abs(x - numberOf(expected, 'at_m'))).toBeLessThan(1e-7);
    expect(Math.abs(out[1]! / numberOf(expected, 'couplingPeakAbs_VsPerM') + 1)).toBeLessThan(1e-8);
  });

  it.each([
    ['ordinary', 5e-3, 10e-3, 6e-3, 9e-3, 6e-3],
    ['winding 0.05 mm from the magnet', 5e-3, 10e-3, 5.05e-3, 9e-3, 6e-3],
    ['pancake', 5e-3, 4e-3, 5.3e-3, 20e-3, 1e-3],
    ['long coil', 2e-3, 3e-3, 2.3e-3, 3e-3, 30e-3],
    ['large', 20e-3, 12e-3, 21e-3, 27e-3, 15e-3],
  ])('agrees with brute force: %s', (_name, a, length, innerRadius, outerRadius, height) => {
    const m = { ...magnet, outerRadius: a, length };
    const c = { ...coil, innerRadius, outerRadius, length: height };
    const peak =
      Math.abs(linkageAt([m], [c], (length + height) / 2)[1]!) + Math.abs(linkageAt([m], [c], length / 2)[1]!);
    const largest = linkageAt([m], [c], 0)[0]!;
    for (const x of [0.3e-3, 0.5 * (length + height), -0.5 * (length + height) - 0.7e-3]) {
      const [flux, coupling] = linkageAt([m], [c], x) as unknown as [number, number];
      const brute = byBruteForce(m, c, x);
      expect(Math.abs(flux - brute.flux) / largest).toBeLessThan(1e-9);
      expect(Math.abs(coupling - brute.coupling) / peak).toBeLessThan(1e-8);
    }
  });

  it('coupling, slope and curvature are the derivatives of the flux linkage, also at a passage', () => {
    const close = { ...coil, innerRadius: 5.05e-3 };
    for (const x of [0, 1.3e-3, 2e-3, 7.9999e-3, 8e-3, 30e-3]) {
      const h = 2e-6;
      const [, theta, slope, curvature] = linkageAt([magnet], [close], x) as unknown as [
        number,
        number,
        number,
        number,
      ];
      const up = linkageAt([magnet], [close], x + h);
      const down = linkageAt([magnet], [close], x - h);
      expect(Math.abs((up[0]! - down[0]!) / (2 * h) - theta)).toBeLessThan(1e-5);
      expect(Math.abs((up[1]! - down[1]!) / (2 * h) - slope) / 1000).toBeLessThan(2e-5);
      expect(Math.abs((up[2]! - down[2]!) / (2 * h) - curvature) / 1e7).toBeLessThan(2e-4);
    }
  });

  it('a coil that overlaps the magnet’s diameter before its face is served too', () => {
    const pancake = { ...coil, innerRadius: 1e-3, outerRadius: 9e-3, length: 1e-3, at: 12e-3 };
    const brute = byBruteForce(magnet, pancake, 0);
    const [flux, coupling] = linkageAt([magnet], [pancake], 0) as unknown as [number, number];
    expect(Math.abs(flux / brute.flux - 1)).toBeLessThan(1e-8);
    expect(Math.abs(coupling / brute.coupling - 1)).toBeLessThan(1e-8);
  });

  it('scales: with all lengths × s, λ goes with s² and θ with s', () => {
    const s = 3.7;
    const scaled = (value: number): number => value * s;
    const m = { ...magnet, outerRadius: scaled(5e-3), length: scaled(10e-3) };
    const c = { ...coil, innerRadius: scaled(6e-3), outerRadius: scaled(9e-3), length: scaled(6e-3) };
    const small = linkageAt([magnet], [coil], 4e-3);
    const large = linkageAt([m], [c], scaled(4e-3));
    [s * s, s, 1, 1 / s].forEach((factor, k) => expect(large[k]! / (factor * small[k]!)).toBeCloseTo(1, 12));
  });

  it('only relative motion counts: moving the coil back is moving the magnet forth', () => {
    const x = 3.1e-3;
    const a = linkageAt([magnet], [coil], x);
    const b = linkageAt([magnet], [{ ...coil, at: -x }], 0);
    expect([...b]).toEqual([...a].map((value) => expect.closeTo(value, 9)));
  });

  it('magnets and coils superpose; halves make a whole', () => {
    const halves = [
      { ...magnet, length: 4e-3, at: -3e-3 },
      { ...magnet, length: 6e-3, at: 2e-3 },
    ];
    const coils = [
      { ...coil, length: 2e-3, at: -2e-3, signedTurns: coil.signedTurns / 3 },
      { ...coil, length: 4e-3, at: 1e-3, signedTurns: (coil.signedTurns * 2) / 3 },
    ];
    const whole = linkageAt([magnet], [coil], 2.2e-3);
    const parts = linkageAt(halves, coils, 2.2e-3);
    parts.forEach((value, k) => expect(value / whole[k]!).toBeCloseTo(1, 10));
  });

  it('a ring is the cylinder less the bore', () => {
    const bore = { ...magnet, outerRadius: 2e-3 };
    const ring = linkageAt([{ ...magnet, innerRadius: 2e-3 }], [coil], 4e-3);
    const difference = linkageAt([magnet, { ...bore, magnetisation: -bore.magnetisation }], [coil], 4e-3);
    ring.forEach((value, k) => expect(value).toBeCloseTo(difference[k]!, 12));
  });
});

describe('tabulated linkage', () => {
  it.each(aligned)('is the exact one of case %s to 1e-9 of the peak, far out too', (id) => {
    const design = referenceCase(id).design as unknown as MagneticDesign;
    const exact = linkageOfDesign(design);
    const quick = exact.tabulated();
    const rows: [number[], number[]][] = [0, 1, 2, 3].map(() => [[], []]);
    const out = new Float64Array(4);
    for (let x = -0.06; x < 0.08; x += 0.137e-3) {
      exact.at(x, out);
      out.forEach((value, k) => rows[k]![0].push(value));
      expect(exact.couplingAt(x)).toBeCloseTo(out[1]!, 10);
      quick.at(x, out);
      out.forEach((value, k) => rows[k]![1].push(value));
      expect(quick.couplingAt(x)).toBeCloseTo(out[1]!, 12);
    }
    [2e-9, 2e-9, 1e-7, 1e-5].forEach((tolerance, k) => {
      expect(errorToPeak(rows[k]![0], rows[k]![1])).toBeLessThan(tolerance);
    });
  });

  it('does not depend on what was asked before, and evaluates exactly where no table can be', () => {
    const one = axialLinkage([magnet], [coil]).tabulated();
    const other = axialLinkage([magnet], [coil]).tabulated();
    one.couplingAt(1);
    one.couplingAt(-3e-3);
    expect(one.couplingAt(2.7e-3)).toBe(other.couplingAt(2.7e-3));
    const pancake = { ...coil, innerRadius: 1e-3, at: 12e-3 };
    const mixed = axialLinkage([magnet], [pancake, coil]);
    expect(mixed.tabulated().couplingAt(1e-3) / mixed.couplingAt(1e-3)).toBeCloseTo(1, 8);
    expect(() => edgeProfile(5e-3, Float64Array.of(6e-3), Float64Array.of(1), 0, 1)).toThrow(/gap must be positive/);
  });
});

describe('coupling table', () => {
  it.each([...aligned])('holds case %s to 2e-9 of the peak over the whole travel', (id) => {
    const reference = referenceCase(id);
    const design = reference.design as unknown as MagneticDesign;
    const [from, to] = [Math.min(...reference.positions!), Math.max(...reference.positions!)];
    const table = couplingTable(design, from, to);
    const positions = Float64Array.from({ length: 501 }, (_, i) => from + ((to - from) * i) / 500);
    const exact = couplingOfDevice(design, positions);
    expect(
      errorToPeak(
        exact.coupling,
        positions.map((x) => table.at(x)),
      ),
    ).toBeLessThan(2e-9);
    expect(
      errorToPeak(
        exact.fluxLinkage,
        positions.map((x) => table.fluxAt(x)),
      ),
    ).toBeLessThan(1e-9);
    // outside: exact
    const beyond = couplingOfDevice(design, Float64Array.of(to + 1e-3));
    expect(table.at(to + 1e-3)).toBe(beyond.coupling[0]);
  });

  it('resolves a winding 0.05 mm from the magnet', () => {
    const reference = referenceCase('F2-02').design as unknown as MagneticDesign;
    const round = reference.coils[0]!;
    if (round.shape !== 'round') throw new Error('case F2-02 has a round coil');
    const design = { ...reference, coils: [{ ...round, innerDiameter: 0.0101 }] };
    const table = couplingTable(design, -0.02, 0.02);
    const positions = Float64Array.from({ length: 3001 }, (_, i) => -0.02 + (0.04 * i) / 3000);
    const exact = couplingOfDevice(design, positions);
    expect(
      errorToPeak(
        exact.coupling,
        positions.map((x) => table.at(x)),
      ),
    ).toBeLessThan(2e-9);
  });
});
