import { z } from 'zod';
import { designFields as fields } from './design-fields';
import { cylinderMagnet } from './design-schema-magnetics';
import { firstNotRising, quantity, quantityList, quantityOr, quantityOrNull, refuse } from './document-schema';
import type { Context } from './document-schema';

/** Exactly one of two keys; both or neither is named. */
function exactlyOne(value: Record<string, unknown>, keys: readonly [string, string], context: Context): boolean {
  const given = keys.filter((key) => value[key] !== undefined && value[key] !== null);
  if (given.length === 1) return true;
  refuse(context, given.length === 0 ? `needs ${keys[0]} or ${keys[1]}` : `takes ${keys[0]} or ${keys[1]}, not both`);
  return false;
}

export const movingMass = z
  .strictObject({
    total: quantityOrNull(fields['movingMass.total']),
    added: quantityOrNull(fields['movingMass.added']),
  })
  .transform((value, context): { total: number } | { added: number } => {
    if (!exactlyOne(value, ['total', 'added'], context)) return z.NEVER;
    return value.total === null ? { added: value.added ?? 0 } : { total: value.total };
  });

const spring = z.strictObject({
  kind: z.literal('spring'),
  stiffness: quantity(fields['suspension{spring}.stiffness']),
  cubic: quantityOr(fields['suspension{spring}.cubic']),
  neutralAt: quantityOr(fields['suspension.neutralAt']),
});

const helical = z
  .strictObject({
    kind: z.literal('helical'),
    wireDiameter: quantity(fields['suspension{helical}.wireDiameter']),
    meanDiameter: quantity(fields['suspension{helical}.meanDiameter']),
    activeTurns: quantity(fields['suspension{helical}.activeTurns']),
    shearModulus: quantityOr(fields['suspension{helical}.shearModulus']),
    density: quantityOr(fields['suspension{helical}.density']),
    springs: quantityOr(fields['suspension{helical}.springs']),
    neutralAt: quantityOr(fields['suspension.neutralAt']),
  })
  .superRefine((value, context) => {
    if (value.wireDiameter >= value.meanDiameter) {
      refuse(context, 'the wire must be thinner than the mean coil diameter', ['wireDiameter'], value.meanDiameter);
    }
  });

const table = z
  .strictObject({
    kind: z.literal('table'),
    displacement: quantityList(fields['suspension{table}.displacement'], 2, 2000),
    force: quantityList(fields['suspension{table}.force'], 2, 2000),
  })
  .superRefine((value, context) => {
    if (value.force.length !== value.displacement.length) {
      refuse(
        context,
        `must be as long as displacement: ${value.displacement.length} entries`,
        ['force'],
        value.displacement.length,
      );
    }
    const stuck = firstNotRising(value.displacement);
    if (stuck >= 0) refuse(context, 'displacement must rise from entry to entry', ['displacement', stuck]);
  });

export const levitated = z.strictObject({
  kind: z.literal('levitated'),
  fixed: z.array(cylinderMagnet).min(1).max(10),
});

/** Suspensions of the through layout. */
export const throughSuspension = z.discriminatedUnion('kind', [spring, helical, levitated, table]);

/** Suspensions of the across layout: the force between blocks is not modelled. */
export const acrossSuspension = z.discriminatedUnion('kind', [spring, helical, table]);

export const damping = z
  .strictObject({
    quality: quantityOrNull(fields['damping.quality']),
    coefficient: quantityOrNull(fields['damping.coefficient']),
    quadratic: quantityOr(fields['damping.quadratic']),
  })
  .transform((value, context): { quality: number; quadratic: number } | { coefficient: number; quadratic: number } => {
    if (!exactlyOne(value, ['quality', 'coefficient'], context)) return z.NEVER;
    return value.quality === null
      ? { coefficient: value.coefficient ?? 0, quadratic: value.quadratic }
      : { quality: value.quality, quadratic: value.quadratic };
  });

export const stops = z
  .strictObject({
    lower: quantityOrNull(fields['stops.lower']),
    upper: quantityOrNull(fields['stops.upper']),
    stiffness: quantity(fields['stops.stiffness']),
    damping: quantityOr(fields['stops.damping']),
  })
  .superRefine((value, context) => {
    if (value.lower === null && value.upper === null) refuse(context, 'needs lower, upper or both');
    if (value.lower !== null && value.upper !== null && value.lower >= value.upper) {
      refuse(context, 'the lower stop must lie below the upper one', ['lower'], value.upper);
    }
  })
  .nullable()
  .default(null);
