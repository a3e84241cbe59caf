import { describe, expect, it } from 'vitest';
import { curveAt, curveOf, laneOf, laneText } from '../../../src/features/strip/curve';
import { motionOf, sampleAt, slowdownOf, slowdownWords } from '../../../src/features/strip/motion';
import reference from '../../reference/cases/F2-01.json';

const valueOf = (path: string) => reference.expect.find((each) => each.path === path)?.value as number[];
const estimated = {
  curve: {
    position: reference.positions,
    fluxLinkage: valueOf('curve.fluxLinkage'),
    coupling: valueOf('curve.coupling'),
    couplingAtRest: null,
    couplingPeak: null,
    couplingPeakAt: null,
  },
};

describe('the curve under the cursor', () => {
  const curve = curveOf(estimated);

  it('goes through the computed points', () => {
    reference.positions.forEach((metres, index) => {
      const at = curve && curveAt(curve, metres * 1000);
      expect(at?.fluxLinkage).toBeCloseTo(estimated.curve.fluxLinkage[index] ?? NaN, 10);
      expect(at?.coupling).toBeCloseTo(estimated.curve.coupling[index] ?? NaN, 10);
    });
  });

  it('between points 4 mm apart stays within 1 % of the peak, because coupling is the slope of the flux linkage', () => {
    const every = (values: number[]) => values.filter((_, index) => index % 2 === 0);
    const coarse = curveOf({
      curve: {
        ...estimated.curve,
        position: every(estimated.curve.position),
        fluxLinkage: every(estimated.curve.fluxLinkage),
        coupling: every(estimated.curve.coupling),
      },
    });
    const peak = Math.max(...estimated.curve.fluxLinkage);
    estimated.curve.position.slice(0, -1).forEach((metres, index) => {
      const at = coarse && curveAt(coarse, metres * 1000);
      expect(Math.abs((at?.fluxLinkage ?? NaN) - (estimated.curve.fluxLinkage[index] ?? 0))).toBeLessThan(0.01 * peak);
    });
  });

  it('has no value beyond its ends, and none without arrays', () => {
    expect(curve && curveAt(curve, 40)).toBeNull();
    expect(curveOf({ curve: { couplingAtRest: 1, couplingPeak: 1, couplingPeakAt: 0 } })).toBeNull();
    expect(curveOf(null)).toBeNull();
  });

  it('is shown in mV·s with zero in the range and figures as fine as the peak deserves', () => {
    const lane = laneOf(estimated.curve.fluxLinkage, 'V·s', 'milli');
    expect(lane.unit).toBe('mV·s');
    expect(lane.from).toBeLessThanOrEqual(0);
    expect(lane.ticks).toContain(0);
    expect(laneText(lane, 0.0379)).toBe('37.9');
    expect(laneText(lane, -3.7e-16)).toBe('0.0');
    expect(laneOf([0, 0], 'V·s/m').to).toBeGreaterThan(0);
  });
});

describe('the motion', () => {
  const count = 64;
  const time = Array.from({ length: count }, (_, index) => index / count / 50);
  const wave = (amplitude: number) => time.map((t) => amplitude * Math.sin(2 * Math.PI * 50 * t));
  const waveforms = {
    time,
    displacement: wave(0.86e-3),
    emf: wave(1.6),
    loadVoltage: wave(1.4),
    coilCurrent: wave(1e-3),
  };

  it('takes one period and runs into its own start', () => {
    const motion = motionOf({ waveforms });
    expect(motion?.periodic).toBe(true);
    expect(motion?.duration).toBeCloseTo(0.02, 9);
    expect(motion && sampleAt(motion, motion.displacement, 0.005)).toBeCloseTo(0.86, 3);
    expect(motion && sampleAt(motion, motion.displacement, 0.02 * 3 + 0.005)).toBeCloseTo(0.86, 3);
    expect(motion && sampleAt(motion, motion.displacement, 0.0199999)).toBeCloseTo(0, 2);
  });

  it('says at what rate it is shown', () => {
    const motion = motionOf({ waveforms });
    expect(motion && slowdownOf(motion, 50)).toBe(100);
    expect(slowdownWords(200)).toBe('slowed 1 : 200');
    expect(slowdownWords(1)).toBe('as fast as estimated');
  });

  it('is absent where nothing was computed', () => {
    expect(motionOf({ waveforms: null })).toBeNull();
    expect(motionOf(null)).toBeNull();
  });
});
