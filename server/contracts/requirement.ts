import { z } from 'zod';
import type { Estimate } from './estimates';
import { Line } from './basics';

/**
 * Results a requirement can be put on: words, dimension for typing and showing, and where the figure stands in an
 * estimate. `size` true compares magnitudes.
 */
export const requirementQuantities = {
  loadPower: { label: 'Power into the load', dimension: 'power', path: ['response', 'loadPower'] },
  loadVoltageRms: { label: 'Load voltage, rms', dimension: 'voltage', path: ['response', 'loadVoltageRms'] },
  loadVoltageMean: { label: 'Load voltage, mean', dimension: 'voltage', path: ['response', 'loadVoltageMean'] },
  emfRms: { label: 'EMF under load, rms', dimension: 'voltage', path: ['response', 'emfRms'] },
  openCircuitEmfRms: { label: 'EMF, open circuit, rms', dimension: 'voltage', path: ['response', 'openCircuitEmfRms'] },
  openCircuitEmfPeak: {
    label: 'EMF, open circuit, peak',
    dimension: 'voltage',
    path: ['response', 'openCircuitEmfPeak'],
  },
  displacementPeak: { label: 'Displacement, peak', dimension: 'length', path: ['response', 'displacementPeak'] },
  coilCurrentRms: { label: 'Coil current, rms', dimension: 'current', path: ['response', 'coilCurrentRms'] },
  coilResistance: { label: 'Coil resistance', dimension: 'resistance', path: ['coil', 'resistance'] },
  naturalFrequency: { label: 'Natural frequency', dimension: 'frequency', path: ['mechanics', 'naturalFrequency'] },
  movingMass: { label: 'Moving mass', dimension: 'mass', path: ['mechanics', 'movingMass'] },
  quality: { label: 'Quality factor', dimension: 'number', path: ['mechanics', 'quality'] },
} as const;
export type RequirementQuantity = keyof typeof requirementQuantities;
const quantityNames = Object.keys(requirementQuantities) as [RequirementQuantity, ...RequirementQuantity[]];

export const Comparison = z.enum(['atLeast', 'atMost']);
export type Comparison = z.infer<typeof Comparison>;
export const comparisonSign: Record<Comparison, string> = { atLeast: '≥', atMost: '≤' };

export const ShownBy = z.enum(['estimate', 'bench', 'both']);
export type ShownBy = z.infer<typeof ShownBy>;
export const shownByWords: Record<ShownBy, string> = {
  estimate: 'estimate',
  bench: 'bench',
  both: 'estimate and bench',
};

/** One line of the brief that can be checked. The limit is in SI; `unit` is what the writer thinks in, for showing. */
export const Requirement = z.strictObject({
  id: z.uuid(),
  title: Line,
  quantity: z.enum(quantityNames),
  comparison: Comparison,
  limit: z.number().min(-1e12, 'At least -1e12.').max(1e12, 'At most 1e12.'),
  unit: z.string().max(20),
  shownBy: ShownBy,
});
export type Requirement = z.infer<typeof Requirement>;

export const Verdict = z.enum(['meets', 'marginal', 'fails', 'notComputed']);
export type Verdict = z.infer<typeof Verdict>;
export const verdictWords: Record<Verdict, string> = {
  meets: 'meets',
  marginal: 'marginal',
  fails: 'fails',
  notComputed: 'not computed',
};

export interface Margin {
  requirement: Requirement;
  /** The figure compared, SI; null where it was not computed or not measured. */
  value: number | null;
  /** Positive on the good side, in the requirement's quantity (SI). */
  margin: number | null;
  /** The margin over the size of the limit; null where the limit is zero. */
  relative: number | null;
  verdict: Verdict;
}

/** A margin below this fraction of the limit is marginal: common practice, to be replaced by the stated uncertainty. */
export const marginalBelow = 0.05;

/** How far a figure is from its requirement. */
export function marginOf(requirement: Requirement, value: number | null): Margin {
  if (value === null) return { requirement, value, margin: null, relative: null, verdict: 'notComputed' };
  const margin = requirement.comparison === 'atLeast' ? value - requirement.limit : requirement.limit - value;
  const relative = requirement.limit === 0 ? null : margin / Math.abs(requirement.limit);
  const marginal = relative !== null && relative < marginalBelow;
  return { requirement, value, margin, relative, verdict: margin < 0 ? 'fails' : marginal ? 'marginal' : 'meets' };
}

/** The figure a requirement speaks of, from an estimate. */
export function estimatedValue(quantity: RequirementQuantity, estimate: Estimate): number | null {
  const [part, key] = requirementQuantities[quantity].path;
  const value = (estimate[part] as Record<string, unknown>)[key];
  return typeof value === 'number' ? value : null;
}

/** Margins of all requirements that the estimate is to show. */
export const estimateMargins = (requirements: Requirement[], estimate: Estimate | null): Margin[] =>
  requirements
    .filter(({ shownBy }) => shownBy !== 'bench')
    .map((requirement) =>
      marginOf(requirement, estimate === null ? null : estimatedValue(requirement.quantity, estimate)),
    );
