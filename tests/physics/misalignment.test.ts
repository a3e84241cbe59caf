import { describe, expect, it } from 'vitest';
import type { AxialMagnet } from '../../server/physics/models/axial-magnet';
import { addCoaxialCircles } from '../../server/physics/models/coaxial-circles';
import { addComplexCircles } from '../../server/physics/models/complex-circles';
import { MAGNETIC_CONSTANT } from '../../server/physics/models/constants';
import { couplingOfDevice } from '../../server/physics/models/coupling';
import type { MagneticDesign } from '../../server/physics/models/coupling';
import { misalignedLinkage } from '../../server/physics/models/misalignment';
import type { Misalignment } from '../../server/physics/models/misalignment';
import { axialLinkage } from '../../server/physics/models/through-coupling';
import type { AxialCoil } from '../../server/physics/models/through-coupling';
import { errorToPeak, expectedOf, handbookValues, numberOf, referenceCase } from '../support/handbook';

const magnet: AxialMagnet = { outerRadius: 5e-3, innerRadius: 0, length: 10e-3, at: 0, magnetisation: 1e6 };
const coil: AxialCoil = { innerRadius: 6e-3, outerRadius: 9e-3, length: 6e-3, at: 0, signedTurns: 1000 };
const degrees = Math.PI / 180;

const linkageAt = (misalignment: Misalignment, x: number, magnets = [magnet], coils = [coil]): Float64Array => {
  const out = new Float64Array(4);
  misalignedLinkage(magnets, coils, misalignment).at(x, out);
  return out;
};

describe('circles of complex radius', () => {
  it.each([
    [5e-3, 6e-3, 4e-3],
    [5e-3, 5.05e-3, 2e-5],
    [5e-3, 5e-3, 1e-3],
    [7e-3, 5e-3, -1e-3],
  ])('are the real ones for real arguments (a = %d, r = %d, z = %d)', (a, r, z) => {
    const complex = new Float64Array(4);
    const real = new Float64Array(5);
    addComplexCircles(complex, 1, 0, a, 0, r, z, 0);
    addCoaxialCircles(real, 1, a, r, z);
    complex.forEach((value, k) => expect(value / real[k]!).toBeCloseTo(1, 13));
  });

  it('are analytic: the real part of a step along i is the second difference along x with its sign turned', () => {
    const at = (z: number, zi: number): number => {
      const out = new Float64Array(4);
      addComplexCircles(out, 1, 0, 5e-3, 4e-4, 6e-3, z, zi);
      return out[0]!;
    };
    const h = 1e-5;
    const laplace = at(h, 3e-4) + at(-h, 3e-4) + at(0, 3e-4 + h) + at(0, 3e-4 - h) - 4 * at(0, 3e-4);
    const along = at(h, 3e-4) + at(-h, 3e-4) - 2 * at(0, 3e-4);
    expect(Math.abs(laplace / along)).toBeLessThan(1e-4);
  });

  it.each(handbookValues('inductance', 'loops-misaligned'))(
    'mutual inductance of tilted and offset loops: handbook/inductance.json#$id ($grade)',
    ({ given, expected }) => {
      const tilt = numberOf(given, 'tilt_deg') * degrees;
      const angles = 400;
      const out = new Float64Array(4);
      for (let k = 0; k < angles; k++) {
        const cosine = Math.cos((2 * Math.PI * (k + 0.5)) / angles);
        const [s, si] = [Math.cos(tilt), Math.sin(tilt) * cosine];
        const square = (s * s + si * si) * angles;
        const b = numberOf(given, 'radiusB_m');
        addComplexCircles(
          out,
          s / square,
          -si / square,
          b * s,
          b * si,
          numberOf(given, 'radiusA_m'),
          numberOf(given, 'axialDistance_m'),
          numberOf(given, 'offset_m') * cosine,
        );
      }
      expect(Math.abs(out[2]! / numberOf(expected, 'mutualInductance_H') - 1)).toBeLessThan(1e-9);
    },
  );
});

describe('misaligned assembly', () => {
  it.each(['F4-01', 'F4-03', 'F4-05'])('flux linkage and coupling of case %s', (id) => {
    const reference = referenceCase(id);
    const design = reference.design as unknown as MagneticDesign;
    const { offset, tilt } = reference.design['misalignment'] as { offset: number; tilt: number | string };
    const misalignment = { offset, tilt: typeof tilt === 'string' ? Number.parseFloat(tilt) * degrees : tilt };
    const curve = couplingOfDevice({ ...design, misalignment }, Float64Array.from(reference.positions!));
    expect(errorToPeak(expectedOf(reference, 'curve.fluxLinkage') as number[], curve.fluxLinkage)).toBeLessThan(1e-7);
    expect(errorToPeak(expectedOf(reference, 'curve.coupling') as number[], curve.coupling)).toBeLessThan(1e-9);
  });

  it.each(handbookValues('drop-test', 'misaligned-'))(
    'flux through one turn: handbook/drop-test.json#$id ($grade)',
    ({ given, expected }) => {
      const radius = numberOf(given, 'turnDiameter_m') / 2;
      const half = 2.5e-7;
      const turn = { innerRadius: radius - half, outerRadius: radius + half, length: 2 * half, at: 0, signedTurns: 1 };
      const one: AxialMagnet = {
        outerRadius: numberOf(given, 'magnetDiameter_m') / 2,
        innerRadius: 0,
        length: numberOf(given, 'magnetLength_m'),
        at: 0,
        magnetisation: numberOf(given, 'remanence_T') / MAGNETIC_CONSTANT,
      };
      const misalignment = { offset: numberOf(given, 'offset_m'), tilt: numberOf(given, 'tilt_deg') * degrees };
      const [flux] = linkageAt(misalignment, numberOf(given, 'axialDistance_m'), [one], [turn]);
      expect(Math.abs(flux! / numberOf(expected, 'flux_Wb') - 1)).toBeLessThan(1e-8);
    },
  );

  it('goes over into the aligned one', () => {
    const aligned = new Float64Array(4);
    axialLinkage([magnet], [coil]).at(3e-3, aligned);
    linkageAt({ offset: 1e-9, tilt: 1e-9 }, 3e-3).forEach((value, k) => expect(value / aligned[k]!).toBeCloseTo(1, 9));
  });

  it('knows which way is which: turning both signs changes nothing, turning one mirrors the travel', () => {
    const both = { offset: 4e-4, tilt: 2 * degrees };
    const [flux, coupling] = linkageAt(both, 4e-3);
    const turned = linkageAt({ offset: -4e-4, tilt: -2 * degrees }, 4e-3);
    const mirrored = linkageAt({ offset: 4e-4, tilt: -2 * degrees }, -4e-3);
    expect(turned[0]).toBeCloseTo(flux!, 14);
    expect(mirrored[0]).toBeCloseTo(flux!, 14);
    expect(mirrored[1]).toBeCloseTo(-coupling!, 11);
    expect(Math.abs(linkageAt({ offset: 4e-4, tilt: -2 * degrees }, 4e-3)[0]! / flux! - 1)).toBeGreaterThan(1e-4);
  });

  it('tilts about the middle of the assembly: two halves are the whole, also in a ring', () => {
    const misalignment = { offset: 2e-4, tilt: 3 * degrees };
    const ring = { ...magnet, innerRadius: 2e-3 };
    const whole = linkageAt(misalignment, 2e-3, [ring]);
    const halves = linkageAt(misalignment, 2e-3, [
      { ...ring, length: 4e-3, at: -3e-3 },
      { ...ring, length: 6e-3, at: 2e-3 },
    ]);
    halves.forEach((value, k) => expect(value / whole[k]!).toBeCloseTo(1, 8));
  });

  it('tilts about the assembly’s own middle, wherever that stands for x = 0', () => {
    const misalignment = { offset: 2e-4, tilt: 3 * degrees };
    const magnets = [
      { ...magnet, length: 4e-3, at: -3e-3 },
      { ...magnet, length: 5e-3, at: 3e-3, magnetisation: -1e6 },
    ];
    const here = linkageAt(misalignment, 2e-3, magnets);
    const there = linkageAt(
      misalignment,
      -5e-3,
      magnets.map((one) => ({ ...one, at: one.at + 7e-3 })),
    );
    there.forEach((value, k) => expect(value / here[k]!).toBeCloseTo(1, 9));
  });

  it('coupling, slope and curvature are the derivatives of the flux linkage', () => {
    const misalignment = { offset: 4e-4, tilt: 2 * degrees };
    const h = 1e-6;
    for (const x of [-9e-3, 1e-3, 8e-3]) {
      const here = linkageAt(misalignment, x);
      const up = linkageAt(misalignment, x + h);
      const down = linkageAt(misalignment, x - h);
      [1, 1e3, 1e6].forEach((size, k) => {
        expect(Math.abs((up[k]! - down[k]!) / (2 * h) - here[k + 1]!) / size).toBeLessThan(1e-4);
      });
    }
  });

  it('refuses what it cannot compute', () => {
    expect(() => linkageAt({ offset: NaN, tilt: 0 }, 0)).toThrow(/offset must be finite/);
    expect(() => linkageAt({ offset: 0, tilt: 1 }, 0)).toThrow(/tilt must be at most 45°/);
  });
});
