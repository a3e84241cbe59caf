import { fourierSum } from '../kernels/fft';
import { portableCirclesInto, portableExp, portableLog } from '../kernels/portable';
import { normalRandom, uniformRandom } from '../kernels/random';

type Points = readonly (readonly [frequency: number, density: number])[];

/** ∫ of the density from f1 to f2 within one straight segment of the log–log plot, in portable arithmetic. */
function segmentIntegral(a: readonly [number, number], b: readonly [number, number], f1: number, f2: number): number {
  const ratio = portableLog(b[0] / a[0]);
  const slope = portableLog(b[1] / a[1]) / ratio;
  const from = portableLog(f1 / a[0]);
  const to = portableLog(f2 / a[0]);
  const growth = (slope + 1) * (to - from);
  const start = a[1] * portableExp(slope * from) * f1;
  // ∫ e^{growth s} ds over s in [0, 1]
  const mean =
    Math.abs(growth) < 1e-3
      ? 1 + growth * (1 / 2 + growth * (1 / 6 + growth / 24))
      : (portableExp(growth) - 1) / growth;
  return start * (to - from) * mean;
}

/** ∫ of the density from f1 to f2, (m/s²)². */
function bandIntegral(points: Points, f1: number, f2: number): number {
  let sum = 0;
  for (let n = 1; n < points.length; n++) {
    const a = points[n - 1]!;
    const b = points[n]!;
    const from = Math.max(f1, a[0]);
    const to = Math.min(f2, b[0]);
    if (to > from && a[1] > 0 && b[1] > 0) sum += segmentIntegral(a, b, from, to);
  }
  return sum;
}

/**
 * A Gaussian record of given one-sided density, sampled at a rate: each line of a discrete spectrum has independent
 * normal parts whose variance is the density's integral over its width. Straight lines between samples weaken a
 * component by sinc²(f/rate); the record is made stronger by as much, so that what acts between the samples is right.
 * The same seed gives the same record bit for bit on every machine.
 *
 * @param rate Hz, above twice the highest frequency; @param samples at least 2.
 * @throws RangeError where the rate is too low or there are too few samples.
 */
export function gaussianRecord(points: Points, rate: number, samples: number, seed: number): Float64Array {
  if (samples < 2) throw new RangeError(`samples must be at least 2, got ${samples}`);
  const highest = points.length > 0 ? points[points.length - 1]![0] : 0;
  if (!(rate > 2 * highest)) throw new RangeError(`rate must be above ${2 * highest} Hz, got ${rate} Hz`);
  let length = 2;
  while (length < samples) length *= 2;
  const width = rate / length;
  const re = new Float64Array(length);
  const im = new Float64Array(length);
  const normal = normalRandom(uniformRandom(seed));
  const circle = new Float64Array(2);
  const last = Math.min(length / 2 - 1, Math.ceil(highest / width) + 1);
  for (let k = 1; k <= last; k++) {
    const variance = bandIntegral(points, (k - 0.5) * width, (k + 0.5) * width);
    const [c, s] = [normal(), normal()];
    if (variance === 0) continue;
    portableCirclesInto(k / length / 2, circle);
    const angle = (Math.PI * k) / length;
    const sinc = circle[1]! / angle;
    const size = Math.sqrt(variance) / (sinc * sinc);
    re[k] = size * c;
    im[k] = -size * s;
  }
  fourierSum(re, im, 1);
  return re.slice(0, samples);
}
