import { parseDesignDocument } from './design-document';
import type { DesignDocument } from './design-document';
import { DocumentError } from './document-error';
import { prepareDevice } from './estimate-device';
import { shifted, tolerancesOf } from './estimate-tolerances';
import type { Tolerance } from './estimate-tolerances';
import { vibrationOf } from './estimate-vibration';
import { uniformRandom } from './kernels/random';
import type { Vibration } from './models/device';
import { respond } from './models/response';
import { windingsOf } from './models/winding';
import { parseVibrationDocument } from './vibration-document';

export { tolerancesOf } from './estimate-tolerances';

/** What one input adds to the uncertainty of load power. SI. */
export interface Contributor {
  readonly paths: readonly string[];
  readonly label: string;
  readonly value: number;
  /** ±, as taken. */
  readonly halfWidth: number;
  readonly basis: string;
  /** ∂P/∂input, W per unit. */
  readonly sensitivity: number;
  /** Standard uncertainty of load power from this input alone, W. */
  readonly contribution: number;
  /** Share of the variance, 0 to 1. */
  readonly share: number;
}

/** Uncertainty budget of load power. */
export interface UncertaintyBudget {
  /** At the nominal values, W; null where it was not computed. */
  readonly loadPower: number | null;
  /** One standard deviation, W. */
  readonly standardUncertainty: number | null;
  /** Twice that, W: about 95 % where many inputs matter. */
  readonly expandedUncertainty: number | null;
  /** By how much the mean of many devices differs from the nominal figure, W: a peak can only be missed. */
  readonly meanShift: number | null;
  /** All inputs, the largest first. */
  readonly contributors: readonly Contributor[];
  /** The five largest. */
  readonly largest: readonly Contributor[];
  /** False where the second-order terms outweigh the rest: then only a Monte Carlo run tells. */
  readonly trustworthy: boolean;
  readonly notes: readonly string[];
}

/** Load power by the solver of the estimate; null where it has none. */
function loadPowerOf(design: DesignDocument, vibration: Vibration): number | null {
  const resistance =
    design.asMeasured.coilResistance ?? windingsOf(design.coils, design.conductivity, design.temperature).resistance;
  try {
    return respond(prepareDevice(design, vibration, resistance).device, vibration).response.loadPower;
  } catch (error) {
    // A device at the edge of what fits has neighbours that do not
    if (error instanceof DocumentError) return null;
    throw error;
  }
}

/** Standard deviation of a rectangular distribution, as a share of its half-width. */
const RECTANGULAR = 1 / Math.sqrt(3);
/** μ4/u⁴ − 1 of a rectangular distribution: weight of (½ f″ u²)² in the variance. */
const RECTANGULAR_EXCESS = 0.8;

interface Slope {
  readonly tolerance: Tolerance;
  readonly step: number;
  /** f(+u) − f(−u) over 2: first-order contribution, W. */
  readonly first: number;
  /** f(+u) − 2 f + f(−u): f″ u², W. */
  readonly second: number;
}

function slopeOf(tolerance: Tolerance, nominal: number, power: (shift: number) => number | null): Slope | null {
  const step = tolerance.halfWidth * RECTANGULAR;
  const up = power(step);
  const down = power(-step);
  if (up === null && down === null) return null;
  if (up === null || down === null) {
    const first = up === null ? nominal - (down ?? nominal) : up - nominal;
    return { tolerance, step, first, second: 0 };
  }
  return { tolerance, step, first: (up - down) / 2, second: up - 2 * nominal + down };
}

/**
 * Uncertainty budget of load power: each input's tolerance times its sensitivity, by the solver of the estimate, with
 * the second-order terms that matter where a device is tuned to its tone and the first order vanishes.
 *
 * Inputs are independent and rectangular within ± their tolerance; magnets of one material vary together. Variance
 * Σ(f′u)² + Σ ¼·0.8 (f″u²)² + Σ_{i<j}(f_ij u_i u_j)².
 *
 * @param own half-widths by path that replace the defaults, SI
 * @throws DocumentError for bad documents
 * Source: JCGM 100:2008 (GUM), 5.1.2 with its note on higher-order terms; 4.3.7 for rectangular distributions.
 */
export function uncertaintyOfEstimate(
  design: unknown,
  vibration: unknown,
  own: Readonly<Record<string, number>> = {},
): UncertaintyBudget {
  const document = parseDesignDocument(design);
  const drive = vibrationOf(parseVibrationDocument(vibration));
  const nominal = loadPowerOf(document, drive);
  if (nominal === null) {
    return {
      loadPower: null,
      standardUncertainty: null,
      expandedUncertainty: null,
      meanShift: null,
      contributors: [],
      largest: [],
      trustworthy: false,
      notes: ['The uncertainty is not computed, because load power is not.'],
    };
  }
  const notes: string[] = [];
  const slopes: Slope[] = [];
  for (const tolerance of tolerancesOf(document, own)) {
    const slope = slopeOf(tolerance, nominal, (shift) => loadPowerOf(shifted(document, [{ tolerance, shift }]), drive));
    if (slope) slopes.push(slope);
    else
      notes.push(
        `${tolerance.label} (${tolerance.paths[0] ?? ''}) is left out, because no device within its tolerance can be computed.`,
      );
  }
  const firstOrder = slopes.reduce((sum, { first }) => sum + first ** 2, 0);
  const secondOrder = slopes.reduce((sum, { second }) => sum + (RECTANGULAR_EXCESS / 4) * second ** 2, 0);
  const crossed = crossTerms(document, drive, slopes, firstOrder + secondOrder);
  const variance = firstOrder + secondOrder + crossed;
  const contributors = slopes
    .map(({ tolerance, step, first, second }): Contributor => {
      const own2 = first ** 2 + (RECTANGULAR_EXCESS / 4) * second ** 2;
      return {
        paths: tolerance.paths,
        label: tolerance.label,
        value: tolerance.value,
        halfWidth: tolerance.halfWidth,
        basis: tolerance.basis,
        sensitivity: first / step,
        contribution: Math.sqrt(own2),
        share: variance > 0 ? own2 / variance : 0,
      };
    })
    .sort((a, b) => b.contribution - a.contribution);
  const trustworthy = secondOrder + crossed <= firstOrder;
  if (!trustworthy) {
    notes.push(
      'The power bends more than it slopes within the tolerances: take a Monte Carlo run instead of this budget.',
    );
  }
  const uncertainty = Math.sqrt(variance);
  return {
    loadPower: nominal,
    standardUncertainty: uncertainty,
    expandedUncertainty: 2 * uncertainty,
    meanShift: slopes.reduce((sum, { second }) => sum + second / 2, 0),
    contributors,
    largest: contributors.slice(0, 5),
    trustworthy,
    notes,
  };
}

/** Σ (f_ij u_i u_j)² over pairs of inputs that bend the power; the others cannot matter in pairs either. */
function crossTerms(document: DesignDocument, drive: Vibration, slopes: readonly Slope[], variance: number): number {
  const bent = slopes
    .filter(({ second }) => second ** 2 > 1e-4 * variance)
    .sort((a, b) => Math.abs(b.second) - Math.abs(a.second))
    .slice(0, 6);
  let sum = 0;
  for (const [i, a] of bent.entries()) {
    for (const b of bent.slice(i + 1)) {
      const at = (signA: number, signB: number): number | null =>
        loadPowerOf(
          shifted(document, [
            { tolerance: a.tolerance, shift: signA * a.step },
            { tolerance: b.tolerance, shift: signB * b.step },
          ]),
          drive,
        );
      const corners = [at(1, 1), at(1, -1), at(-1, 1), at(-1, -1)];
      const [pp, pm, mp, mm] = corners;
      if (typeof pp !== 'number' || typeof pm !== 'number' || typeof mp !== 'number' || typeof mm !== 'number')
        continue;
      sum += ((pp - pm - mp + mm) / 4) ** 2;
    }
  }
  return sum;
}

/** Figures of many devices drawn within their tolerances. */
export interface MonteCarlo {
  readonly samples: number;
  /** Devices that could not be computed. */
  readonly failed: number;
  readonly mean: number;
  readonly standardDeviation: number;
  /** Load power that 5, 50 and 95 % of the devices stay below, W. */
  readonly quantiles: { readonly low: number; readonly median: number; readonly high: number };
}

/**
 * Load power of devices drawn at random within their tolerances, by the solver of the estimate.
 *
 * @param samples devices drawn, 10 to 100 000
 * @param seed the same seed draws the same devices
 * @returns null where no device could be computed
 * @throws DocumentError for bad documents; RangeError for a wrong number of samples
 */
export function monteCarloOfEstimate(
  design: unknown,
  vibration: unknown,
  samples: number,
  seed: number,
  own: Readonly<Record<string, number>> = {},
): MonteCarlo | null {
  if (!Number.isInteger(samples) || samples < 10 || samples > 100_000) {
    throw new RangeError(`samples must be a whole number from 10 to 100000, got ${samples}`);
  }
  const document = parseDesignDocument(design);
  const drive = vibrationOf(parseVibrationDocument(vibration));
  const tolerances = tolerancesOf(document, own);
  const random = uniformRandom(seed);
  const powers: number[] = [];
  for (let index = 0; index < samples; index += 1) {
    const shifts = tolerances.map((tolerance) => ({ tolerance, shift: tolerance.halfWidth * (2 * random() - 1) }));
    const power = loadPowerOf(shifted(document, shifts), drive);
    if (power !== null) powers.push(power);
  }
  if (powers.length < 2) return null;
  const mean = powers.reduce((sum, power) => sum + power, 0) / powers.length;
  const variance = powers.reduce((sum, power) => sum + (power - mean) ** 2, 0) / (powers.length - 1);
  powers.sort((a, b) => a - b);
  const quantile = (part: number): number => powers[Math.round(part * (powers.length - 1))] ?? mean;
  return {
    samples,
    failed: samples - powers.length,
    mean,
    standardDeviation: Math.sqrt(variance),
    quantiles: { low: quantile(0.05), median: quantile(0.5), high: quantile(0.95) },
  };
}
