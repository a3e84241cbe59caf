import type { BriefDocument } from '#contracts/briefs';
import type { Estimate } from '#contracts/estimates';
import type { LimitLine } from './requirement-margins';

/** Outer sizes of magnets and windings, m: across the travel and along it. Housing and ends come on top. */
export interface DeviceSize {
  across: number | null;
  along: number | null;
}

/**
 * The room and the mass that the brief allows, against what is known of the device: its magnets and windings, and its moving mass
 * with the copper. What is not designed yet, as the housing, is not in it, so the margins are upper bounds.
 */
export function envelopeLimits(
  { envelope, massLimit }: Pick<BriefDocument, 'envelope' | 'massLimit'>,
  { across, along }: DeviceSize,
  estimate: Estimate | null,
): LimitLine[] {
  const sides = envelope.shape === 'box' ? [...envelope.size].sort((a, b) => a - b) : null;
  const width = envelope.shape === 'cylinder' ? envelope.diameter : Math.min(sides?.[0] ?? 0, sides?.[1] ?? 0);
  const length = envelope.shape === 'cylinder' ? envelope.length : (sides?.[2] ?? 0);
  const moving = estimate?.mechanics.movingMass ?? null;
  const copper = estimate?.coil.copperMass ?? null;
  const common = { comparison: 'atMost', dimension: 'length', unit: 'mm' } as const;
  return [
    {
      ...common,
      key: 'envelope across',
      title: envelope.shape === 'cylinder' ? 'Diameter' : 'Width',
      limit: width,
      value: across,
    },
    { ...common, key: 'envelope along', title: 'Length at rest', limit: length, value: along },
    ...(massLimit === null
      ? []
      : [
          {
            key: 'mass',
            title: 'Moving mass and copper',
            comparison: 'atMost' as const,
            limit: massLimit,
            dimension: 'mass' as const,
            unit: 'g',
            value: moving === null || copper === null ? null : moving + copper,
          },
        ]),
  ];
}
