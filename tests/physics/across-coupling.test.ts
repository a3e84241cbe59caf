import { describe, expect, it } from 'vitest';
import { integrate } from '../../server/physics/kernels/gauss-legendre';
import { acrossLinkage } from '../../server/physics/models/across-coupling';
import type { FlatMagnet } from '../../server/physics/models/across-coupling';
import {
  addEdgeOverElement,
  addEdgeOverSide,
  thirdOverElements,
  thirdOverSides,
} from '../../server/physics/models/block-edge';
import type { CoilShape } from '../../server/physics/models/coil';
import { MAGNETIC_CONSTANT } from '../../server/physics/models/constants';
import { couplingOfDevice, couplingTable } from '../../server/physics/models/coupling';
import type { MagneticDesign } from '../../server/physics/models/coupling';
import { flatTurns } from '../../server/physics/models/flat-turns';
import { errorToPeak, expectedOf, handbookValues, numberOf, referenceCase } from '../support/handbook';

const cases = ['F3-01', 'F3-03', 'F3-04', 'F3-06', 'F3-08'];
const block: FlatMagnet = { size: [10e-3, 12e-3, 4e-3], at: [0, 1e-3, 4e-3], magnetisation: 1e6 };
const round: CoilShape = {
  shape: 'round',
  innerDiameter: 6e-3,
  outerDiameter: 16e-3,
  length: 2e-3,
  at: [0, 0, 0],
  turns: 500,
  sense: 1,
};
const racetrack: CoilShape = {
  shape: 'racetrack',
  straight: 10e-3,
  innerEndRadius: 2e-3,
  outerEndRadius: 7e-3,
  length: 2e-3,
  at: [0, 0, 0],
  turns: 500,
  sense: 1,
};
const rectangular: CoilShape = {
  shape: 'rectangular',
  inner: [4e-3, 10e-3],
  outer: [14e-3, 24e-3],
  length: 2e-3,
  at: [0, 0, 0],
  turns: 500,
  sense: 1,
};

const linkageAt = (magnets: FlatMagnet[], coils: CoilShape[], x: number): Float64Array => {
  const out = new Float64Array(4);
  acrossLinkage(magnets, coils).at(x, out);
  return out;
};

/** B_z of a block: every corner of its two charged faces as an arctangent (Furlani 2001; Yang et al. 1990). */
function fieldOfBlock({ size, at, magnetisation }: FlatMagnet, x: number, y: number, z: number): number {
  let sum = 0;
  for (const i of [-1, 1]) {
    for (const j of [-1, 1]) {
      for (const k of [-1, 1]) {
        const [u, v, w] = [
          x - at[0]! - (i * size[0]!) / 2,
          y - at[1]! - (j * size[1]!) / 2,
          z - at[2]! - (k * size[2]!) / 2,
        ];
        sum += i * j * k * Math.atan2(u * v, w * Math.hypot(u, v, w));
      }
    }
  }
  return (MAGNETIC_CONSTANT * magnetisation * sum) / (4 * Math.PI);
}

/** λ by brute force: the field over area, turn count as weight, thickness averaged; nothing shared with the model. */
function fluxByArea(magnet: FlatMagnet, coil: CoilShape, x: number): number {
  const moved = { ...magnet, at: [magnet.at[0]! + x, magnet.at[1]!, magnet.at[2]!] };
  const turnsAround = (px: number, py: number): number => {
    const share = (inner: number, outer: number, reach: number): number =>
      Math.min(1, Math.max(0, (outer - reach) / (outer - inner)));
    switch (coil.shape) {
      case 'round':
        return coil.turns * share(coil.innerDiameter / 2, coil.outerDiameter / 2, Math.hypot(px, py));
      case 'racetrack': {
        const beyond = Math.max(0, Math.abs(py) - coil.straight / 2);
        return coil.turns * share(coil.innerEndRadius, coil.outerEndRadius, Math.hypot(px, beyond));
      }
      case 'rectangular':
        return (
          coil.turns *
          Math.min(
            share(coil.inner[0]! / 2, coil.outer[0]! / 2, Math.abs(px)),
            share(coil.inner[1]! / 2, coil.outer[1]! / 2, Math.abs(py)),
          )
        );
    }
  };
  const cells = 400;
  const half = 12.5e-3;
  const step = (2 * half) / cells;
  let sum = 0;
  for (let i = 0; i < cells; i++) {
    for (let j = 0; j < cells; j++) {
      const px = -half + (i + 0.5) * step;
      const py = -half + (j + 0.5) * step;
      const turns = turnsAround(px, py);
      if (turns > 0) sum += turns * integrate((s) => fieldOfBlock(moved, px, py, (coil.length / 2) * s), -1, 1, 4);
    }
  }
  return 0.5 * step * step * sum;
}

describe('edge of a block', () => {
  it('each entry is the derivative of the one before, −∂/∂u', () => {
    const h = 1e-4;
    for (const term of [addEdgeOverElement, addEdgeOverSide]) {
      for (const [u, v, w] of [
        [1, 2, 0.5],
        [-1, 0.3, 0.2],
        [0.4, -2, 1.3],
      ] as const) {
        const at = (du: number): Float64Array => {
          const out = new Float64Array(4);
          term(out, 1, u + du, v, w);
          return out;
        };
        for (let k = 0; k < 3; k++) expect((at(-h)[k]! - at(h)[k]!) / (2 * h)).toBeCloseTo(at(0)[k + 1]!, 7);
      }
    }
  });

  it('comes from 1/r: the mixed derivative of H', () => {
    const H = (u: number, v: number): number => {
      const out = new Float64Array(4);
      addEdgeOverElement(out, -1, u, v, 0.7);
      return out[1]!;
    };
    const h = 1e-3;
    const mixed = (H(1 + h, 2 + h) - H(1 + h, 2 - h) - H(1 - h, 2 + h) + H(1 - h, 2 - h)) / (4 * h * h);
    expect(mixed).toBeCloseTo(1 / Math.hypot(1, 2, 0.7), 6);
  });

  it('is finite on the corner’s own lines', () => {
    for (const [u, v, w] of [
      [0, 0, 0],
      [0, 1, 0],
      [1, 0, 0],
      [0, 0, 1],
    ] as const) {
      const out = new Float64Array(4);
      addEdgeOverElement(out, 1, u, v, w);
      addEdgeOverSide(out, 1, u, v, w);
      expect(Number.isFinite(out[0]!) && Number.isFinite(out[1]!)).toBe(true);
    }
  });

  it('the short sums are the last entry of the long ones', () => {
    const turns = flatTurns(racetrack, 1e-3, 1e-6);
    const out = new Float64Array(4);
    for (let i = 0; i < turns.x.length; i++)
      addEdgeOverElement(out, turns.extent[i]!, turns.x[i]! - 1e-3, turns.y[i]! - 2e-3, 1e-3);
    expect(thirdOverElements(turns, 1e-3, 2e-3, 1e-3) / out[3]!).toBeCloseTo(1, 11);
    out.fill(0);
    for (let i = 0; i < turns.endX.length; i++)
      addEdgeOverSide(out, turns.endTurns[i]!, turns.endX[i]! - 1e-3, turns.endY[i]! - 2e-3, 1e-3);
    expect(thirdOverSides(turns, 1e-3, 2e-3, 1e-3) / out[3]!).toBeCloseTo(1, 11);
  });
});

describe('flat turns', () => {
  it('∮ x dy is the area, summed over the turns', () => {
    const area = (coil: CoilShape): number => {
      const { x, extent, endX, endY, endTurns } = flatTurns(coil, 2e-3, 1e-12);
      let sum = 0;
      for (let i = 0; i < x.length; i++) sum += x[i]! * extent[i]!;
      for (let i = 0; i < endX.length; i++) sum += endX[i]! * endY[i]! * endTurns[i]!;
      return sum;
    };
    const meanSquare = (a: number, b: number): number => (a * a + a * b + b * b) / 3;
    expect(area(round)).toBeCloseTo(500 * Math.PI * meanSquare(3e-3, 8e-3), 12);
    expect(area(racetrack)).toBeCloseTo(500 * (Math.PI * meanSquare(2e-3, 7e-3) + 2 * 4.5e-3 * 10e-3), 12);
    // sides 4…14 and 10…24 mm together: ∫ (4 + 10 s)(10 + 14 s) ds
    expect(area(rectangular)).toBeCloseTo(500 * (40 + 156 / 2 + 140 / 3) * 1e-6, 12);
  });
});

describe('across layout', () => {
  it.each(cases)('flux linkage and coupling of reference case %s', (id) => {
    const reference = referenceCase(id);
    const curve = couplingOfDevice(
      reference.design as unknown as MagneticDesign,
      Float64Array.from(reference.positions!),
    );
    expect(errorToPeak(expectedOf(reference, 'curve.fluxLinkage') as number[], curve.fluxLinkage)).toBeLessThan(1e-8);
    expect(errorToPeak(expectedOf(reference, 'curve.coupling') as number[], curve.coupling)).toBeLessThan(1e-8);
  });

  it.each(handbookValues('magnets', 'across-rect'))(
    'flux of a block through one rectangular turn: handbook/magnets.json#$id ($grade)',
    ({ given, expected }) => {
      const thickness = numberOf(given, 'blockThickness_m');
      const half = 1e-7;
      const sides = [numberOf(given, 'turnX_m'), numberOf(given, 'turnY_m')];
      const turn: CoilShape = {
        shape: 'rectangular',
        inner: sides.map((side) => side - half),
        outer: sides.map((side) => side + half),
        length: 2 * half,
        at: [0, 0, 0],
        turns: 1,
        sense: 1,
      };
      const magnet: FlatMagnet = {
        size: [numberOf(given, 'blockX_m'), numberOf(given, 'blockY_m'), thickness],
        at: [0, 0, numberOf(given, 'gapFaceToTurn_m') + thickness / 2],
        magnetisation: numberOf(given, 'remanence_T') / MAGNETIC_CONSTANT,
      };
      const [flux, slope] = linkageAt([magnet], [turn], numberOf(given, 'shiftX_m')) as unknown as [number, number];
      expect(Math.abs(flux / numberOf(expected, 'flux_Wb') - 1)).toBeLessThan(1e-7);
      expect(Math.abs(slope - numberOf(expected, 'dFluxdX_WbPerM'))).toBeLessThan(1e-7 * 4e-3);
    },
  );

  it.each([
    ['round', round],
    ['racetrack', racetrack],
    ['rectangular', rectangular],
  ])('agrees with the field summed over the area of every turn: %s', (_name, coil) => {
    const [flux] = linkageAt([block], [coil], 3e-3);
    // cells of 1/16 mm in the brute sum
    expect(Math.abs(flux! / fluxByArea(block, coil, 3e-3) - 1)).toBeLessThan(1e-4);
  });

  it('coupling, slope and curvature are the derivatives of the flux linkage', () => {
    const h = 1e-6;
    for (const coil of [round, racetrack, rectangular]) {
      for (const x of [-9e-3, 0.3e-3, 7e-3, 16e-3]) {
        const here = linkageAt([block], [coil], x);
        const up = linkageAt([block], [coil], x + h);
        const down = linkageAt([block], [coil], x - h);
        [1, 300, 3e5].forEach((size, k) => {
          expect(Math.abs((up[k]! - down[k]!) / (2 * h) - here[k + 1]!) / size).toBeLessThan(1e-5);
        });
      }
    }
  });

  it('a racetrack without straight sides is round, one with long ones rectangular turns with round ends', () => {
    const short = linkageAt(
      [block],
      [{ ...racetrack, straight: 1e-9, innerEndRadius: 3e-3, outerEndRadius: 8e-3 }],
      2e-3,
    );
    const ring = linkageAt([block], [round], 2e-3);
    short.forEach((value, k) => expect(value / ring[k]!).toBeCloseTo(1, 6));
  });

  it('scales: with all lengths × s, λ goes with s² and θ with s', () => {
    const s = 2.5;
    const magnet = { ...block, size: block.size.map((v) => v * s), at: block.at.map((v) => v * s) };
    const coil: CoilShape = { ...round, innerDiameter: 6e-3 * s, outerDiameter: 16e-3 * s, length: 2e-3 * s };
    const small = linkageAt([block], [round], 3e-3);
    const large = linkageAt([magnet], [coil], 3e-3 * s);
    [s * s, s, 1].forEach((factor, k) => expect(large[k]! / (factor * small[k]!)).toBeCloseTo(1, 9));
  });

  it('only relative motion counts, and a block below acts as its mirror image above', () => {
    const x = 2.4e-3;
    const a = linkageAt([block], [racetrack], x);
    const b = linkageAt([block], [{ ...racetrack, at: [-x, 0, 0] }], 0);
    const below = linkageAt([{ ...block, at: [0, 1e-3, -4e-3] }], [racetrack], x);
    a.forEach((value, k) => {
      expect(b[k]! / value).toBeCloseTo(1, 9);
      expect(below[k]! / value).toBeCloseTo(1, 9);
    });
  });

  it('blocks and coils superpose; a block cut in two is the block', () => {
    const whole = linkageAt([block], [round], 1e-3);
    const halves = linkageAt(
      [
        { ...block, size: [4e-3, 12e-3, 4e-3], at: [-3e-3, 1e-3, 4e-3] },
        { ...block, size: [6e-3, 12e-3, 4e-3], at: [2e-3, 1e-3, 4e-3] },
      ],
      [round],
      1e-3,
    );
    halves.forEach((value, k) => expect(value / whole[k]!).toBeCloseTo(1, 8));
    const upper = { ...block, size: [10e-3, 12e-3, 1e-3], at: [0, 1e-3, 5.5e-3] };
    const lower = { ...block, size: [10e-3, 12e-3, 3e-3], at: [0, 1e-3, 3.5e-3] };
    const stacked = linkageAt([upper, lower], [round], 1e-3);
    stacked.forEach((value, k) => expect(value / whole[k]!).toBeCloseTo(1, 7));
    const two = linkageAt([block], [round, { ...round, sense: -1, at: [9e-3, 0, 0] }], 1e-3);
    const other = linkageAt([block], [round], -8e-3);
    expect(two[1]).toBeCloseTo(whole[1]! - other[1]!, 9);
  });

  it('far away it is a dipole', () => {
    const far: FlatMagnet = { ...block, at: [0, 0, 0.5] };
    const [flux] = linkageAt([far], [round], 0);
    const moment = far.magnetisation * 10e-3 * 12e-3 * 4e-3;
    const area = 500 * Math.PI * ((9 + 24 + 64) / 3) * 1e-6;
    expect(flux! / (((MAGNETIC_CONSTANT * moment) / (2 * Math.PI * 0.5 ** 3)) * area)).toBeCloseTo(1, 3);
  });

  it('the table holds the coupling to 3e-9 of its peak', () => {
    const reference = referenceCase('F3-04').design as unknown as MagneticDesign;
    const table = couplingTable(reference, -0.015, 0.02);
    const positions = Float64Array.from({ length: 301 }, (_, i) => -0.015 + (0.035 * i) / 300);
    const exact = couplingOfDevice(reference, positions);
    expect(
      errorToPeak(
        exact.coupling,
        positions.map((x) => table.at(x)),
      ),
    ).toBeLessThan(3e-9);
  });

  it('refuses shapes of the other layout', () => {
    expect(() => acrossLinkage([block], [{ ...round, at: 0 }])).toThrow(/must be a point/);
    expect(() => acrossLinkage([block], [{ ...round, innerDiameter: 20e-3 }])).toThrow(/outer outline/);
  });
});
