import type { Estimate } from '#contracts/estimates';
import { formatQuantity, parseQuantity, quantityParts } from '../../lib/quantities';
import type { Dimension } from '../../lib/quantities';

const at = (document: unknown, key: string): unknown =>
  typeof document === 'object' && document !== null ? (document as Record<string, unknown>)[key] : undefined;

function quantityOf(value: unknown, dimension: Dimension): number | null {
  if (typeof value === 'number') return value;
  if (typeof value !== 'string') return null;
  const reading = parseQuantity(value, dimension);
  return reading.ok ? reading.value : null;
}

/** What the power goes into, in words: “into 804 Ω”, “into a store held at 3.00 V”. */
export function loadWords(document: unknown): string {
  const circuit = at(document, 'circuit');
  const figure = (key: string, dimension: Dimension) => {
    const value = quantityOf(at(circuit, key), dimension);
    return value === null ? null : formatQuantity(value, dimension);
  };
  switch (at(circuit, 'kind')) {
    case 'bridge':
      return `into ${figure('resistance', 'resistance') ?? 'the load'} behind a bridge`;
    case 'doubler':
      return `into ${figure('resistance', 'resistance') ?? 'the load'} behind a doubler`;
    case 'store':
      return `into a store held at ${figure('voltage', 'voltage') ?? 'its voltage'}`;
    case 'tracker':
      return 'out of the tracking converter';
    case 'supercapacitor':
      return 'into the node';
    default:
      return `into ${figure('resistance', 'resistance') ?? 'the load'}`;
  }
}

/** The headline in two parts, number and unit. */
export const headlineOf = (estimate: Estimate | null): { number: string; unit: string } =>
  quantityParts(estimate?.response.loadPower ?? null, 'power');

/** Balance residual above which an estimate is not to be trusted. */
const mostResidual = 0.005;

/** Why the figures should not be relied on; null where nothing speaks against them. */
export function doubtAbout(estimate: Estimate): string | null {
  if (!estimate.response.converged) return 'The computation did not converge: these figures are not to be trusted.';
  const { residual } = estimate.power;
  if (residual !== null && Math.abs(residual) > mostResidual)
    return `The energy balance is open by ${(Math.abs(residual) * 100).toPrecision(2)} %: these figures are not to be trusted.`;
  return null;
}
