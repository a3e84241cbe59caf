import type { Estimate } from '#contracts/estimates';
import { formatNumber } from '../../lib/format';

export interface Motion {
  /** s from the start of the record. */
  time: number[];
  /** mm from the rest position. */
  displacement: number[];
  /** V. */
  emf: number[];
  /** One period that joins its own start; otherwise a record that begins again. */
  periodic: boolean;
  /** s. */
  duration: number;
}

/** The estimated motion; null where no waveforms were computed. */
export function motionOf(estimate: Pick<Estimate, 'waveforms'> | null | undefined): Motion | null {
  const waveforms = estimate?.waveforms;
  if (!waveforms) return null;
  const count = Math.min(waveforms.time.length, waveforms.displacement.length, waveforms.emf.length);
  if (count < 3) return null;
  const time = waveforms.time.slice(0, count);
  const start = time[0] ?? 0;
  const step = (time[1] ?? 0) - start;
  const displacement = waveforms.displacement.slice(0, count).map((metres) => metres * 1000);
  const emf = waveforms.emf.slice(0, count);
  const last = (time[count - 1] ?? 0) - start;
  const size = Math.max(...displacement.map(Math.abs)) || 1;
  const gap = Math.abs((displacement[count - 1] ?? 0) - (displacement[0] ?? 0)) / size;
  const stride = Math.abs((displacement[1] ?? 0) - (displacement[0] ?? 0)) / size;
  const closed = gap < 1e-6;
  // One period is sampled either with its end (equal to its start) or up to one step before it.
  const periodic = count <= 4096 && (closed || gap <= 2.5 * stride + 0.02);
  return {
    time: time.map((value) => value - start),
    displacement,
    emf,
    periodic,
    duration: periodic && !closed ? last + step : last,
  };
}

/** Value at a time, joined straight; a period runs back into its start. */
export function sampleAt(motion: Motion, values: readonly number[], time: number): number {
  const count = motion.time.length;
  const within = motion.duration > 0 ? ((time % motion.duration) + motion.duration) % motion.duration : 0;
  let low = 0;
  let high = count - 1;
  if (within >= (motion.time[high] ?? 0)) {
    const from = motion.time[high] ?? 0;
    const share = motion.duration > from ? (within - from) / (motion.duration - from) : 0;
    const end = values[high] ?? 0;
    return motion.periodic ? end + share * ((values[0] ?? 0) - end) : end;
  }
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((motion.time[middle] ?? 0) <= within) low = middle;
    else high = middle;
  }
  const [t0 = 0, t1 = 0] = [motion.time[low], motion.time[high]];
  const share = t1 > t0 ? (within - t0) / (t1 - t0) : 0;
  return (values[low] ?? 0) + share * ((values[high] ?? 0) - (values[low] ?? 0));
}

/** Seconds that one cycle takes on the screen, about. */
const cycleOnScreen = 2.4;

/**
 * How many times slower than real the motion is shown: 1, 2 or 5 times a power of ten.
 * @param frequency of the fastest thing to be followed, Hz; the period of the record where unknown.
 */
export function slowdownOf(motion: Motion, frequency: number | null): number {
  const cycle = motion.periodic || !frequency ? motion.duration : 1 / frequency;
  if (!(cycle > 0)) return 1;
  const factor = cycleOnScreen / cycle;
  if (factor <= 1) return 1;
  const power = 10 ** Math.floor(Math.log10(factor));
  const lead = factor / power;
  return power * (lead < 1.5 ? 1 : lead < 3.5 ? 2 : lead < 7.5 ? 5 : 10);
}

export const slowdownWords = (factor: number): string =>
  factor === 1 ? 'as fast as estimated' : `slowed 1 : ${formatNumber(factor, 6).replace(/\.0+$/, '')}`;
