import {
  addDependencies,
  create,
  createUnitDependencies,
  divideDependencies,
  evaluateDependencies,
  multiplyDependencies,
  piDependencies,
  powDependencies,
  sqrtDependencies,
  subtractDependencies,
  unaryMinusDependencies,
  unaryPlusDependencies,
  unitDependencies,
} from 'mathjs';
import type { FactoryFunctionMap } from 'mathjs';
import { dimensions } from '#contracts/quantity';
import type { Dimension } from '#contracts/quantity';

type Calculation =
  { kind: 'number'; value: number } | { kind: 'quantity'; value: number } | { kind: 'refused'; message: string };

/** Loaded only when somebody types a sum into a field. */
const parts = [
  addDependencies,
  createUnitDependencies,
  divideDependencies,
  evaluateDependencies,
  multiplyDependencies,
  piDependencies,
  powDependencies,
  sqrtDependencies,
  subtractDependencies,
  unaryMinusDependencies,
  unaryPlusDependencies,
  unitDependencies,
];
const math = create(Object.assign({}, ...parts) as FactoryFunctionMap);

// mathjs reads g as gram; in an acceleration it is standard gravity.
math.createUnit({ standardgravity: { definition: '9.80665 m/s^2', prefixes: 'short' } });
math.createUnit('thou', '25.4 um');

const spelling = (text: string, dimension: Dimension): string => {
  const plain = text
    .replace(/−/g, '-')
    .replace(/[×·]/g, '*')
    .replace(/[µμ]/g, 'u')
    .replace(/[Ωω]/g, 'ohm')
    .replace(/²/g, '^2')
    .replace(/³/g, '^3')
    .replace(/(\d)\s*"/g, '$1 in');
  const gravity = dimension === 'acceleration' || dimension === 'accelerationDensity';
  return gravity ? plain.replace(/(?<![A-Za-z])(m?)g(?![A-Za-z])/g, ' $1standardgravity') : plain;
};

/** mathjs counts [mass, length, time, current, temperature, luminous, amount, angle, bit]; ours is [m, kg, s, A, K, rad]. */
const exponentsOf = (found: number[]): number[] => [1, 0, 2, 3, 4, 7].map((at) => found[at] ?? 0);

/**
 * Works out a sum of quantities.
 * @returns an SI value, a bare number, or the reason in words; never throws.
 */
export function calculate(text: string, dimension: Dimension): Calculation {
  let result: unknown;
  try {
    result = math.evaluate(spelling(text, dimension), {});
  } catch {
    return { kind: 'refused', message: `“${text.trim()}” could not be worked out.` };
  }
  if (typeof result === 'number' && Number.isFinite(result)) return { kind: 'number', value: result };
  const unit = result as { value?: unknown; dimensions?: number[] } | null;
  if (unit === null || typeof unit !== 'object' || typeof unit.value !== 'number' || !unit.dimensions)
    return { kind: 'refused', message: `“${text.trim()}” does not work out to one quantity.` };
  const wanted = dimensions[dimension].exponents;
  const found = exponentsOf(unit.dimensions);
  if (!wanted.every((exponent, index) => Math.abs(exponent - (found[index] ?? 0)) < 1e-12))
    return { kind: 'refused', message: `“${text.trim()}” works out, but not to ${dimensions[dimension].phrase}.` };
  return { kind: 'quantity', value: unit.value };
}
