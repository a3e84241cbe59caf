import type { Domain } from './domain';
import type { Dimension, Drawing, Rect } from './drawing';

/** Where everything of a strip stands, px. One scale for both directions. */
export interface StripLayout {
  width: number;
  height: number;
  left: number;
  right: number;
  /** px per mm. */
  scale: number;
  /** px of a position. */
  x: (mm: number) => number;
  /** mm under a px. */
  positionAt: (px: number) => number;
  /** px of a height in the section. */
  y: (mm: number) => number;
  /** px of a height in the plan; absent without one. */
  planY: ((mm: number) => number) | null;
  top: number;
  sectionTop: number;
  sectionBottom: number;
  lanes: { top: number; bottom: number }[];
  axis: number;
}

interface LayoutRequest {
  width: number;
  domain: Domain;
  drawing: Drawing;
  /** Count of curves under the drawing. */
  lanes: number;
  /** Tallest the section may become, px; grows with the page unless given. */
  tallest?: number;
}

const roomForDimensions = 30;

/** Fits drawing and curves into a width; the drawing decides, so that it is never taller than `tallest`. */
export function stripLayout({ width, domain, drawing, lanes, ...rest }: LayoutRequest): StripLayout {
  const tallest = rest.tallest ?? Math.max(340, Math.min(520, 0.34 * width));
  const compact = width < 520;
  const gutter = compact ? 34 : 42;
  const margin = compact ? 8 : 14;
  const span = domain.to - domain.from;
  const { extent, plan } = drawing;
  const planHeight = plan ? plan.y1 - plan.y0 : 0;
  const tall = extent.y1 - extent.y0 + planHeight;
  const room = Math.max(60, width - gutter - margin);
  const plotWidth = Math.min(room, (tallest / Math.max(tall, 1e-9)) * span);
  const scale = plotWidth / span;
  const left = gutter + (room - plotWidth) / 2;
  const x = (mm: number) => left + (mm - domain.from) * scale;
  const above = drawing.dimensions.some(({ side }) => side === 'above') ? roomForDimensions : 10;
  const below = drawing.dimensions.some(({ side }) => side === 'below') ? roomForDimensions : 10;
  const sectionTop = above;
  const sectionBottom = sectionTop + (extent.y1 - extent.y0) * scale;
  const y = (mm: number) => sectionTop + (extent.y1 - mm) * scale;
  const planTop = sectionBottom + below + (plan ? 18 : 0);
  const planBottom = planTop + planHeight * scale;
  const planY = plan ? (mm: number) => planTop + (plan.y1 - mm) * scale : null;
  const laneHeight = Math.round(Math.max(72, Math.min(124, plotWidth * 0.138)));
  const gap = compact ? 20 : 22;
  const lanesTop = (plan ? planBottom + 10 : sectionBottom + below) + 14;
  const laneRects = Array.from({ length: lanes }, (_, index) => {
    const top = lanesTop + index * (laneHeight + gap);
    return { top, bottom: top + laneHeight };
  });
  const axis = (laneRects[lanes - 1]?.bottom ?? lanesTop) + 8;
  return {
    width,
    height: Math.ceil(axis + 44),
    left,
    right: left + plotWidth,
    scale,
    x,
    positionAt: (px) => domain.from + (px - left) / scale,
    y,
    planY,
    top: 4,
    sectionTop,
    sectionBottom,
    lanes: laneRects,
    axis,
  };
}

/** A rectangle of the section in px, never thinner than a hairline so that nothing drawn disappears. */
export function pxRect(rect: Rect, x: (mm: number) => number, y: (mm: number) => number) {
  return {
    x: x(rect.x0),
    y: y(rect.y1),
    width: Math.max(0.6, x(rect.x1) - x(rect.x0)),
    height: Math.max(0.6, y(rect.y0) - y(rect.y1)),
  };
}

export interface PlacedDimension {
  dimension: Dimension;
  /** Text that fits beside its neighbours; empty where none does. */
  label: string;
}

const characterWidth = 6.4;

/** Chooses for each dimension the longest wording that does not run into the one before it. */
export function placeDimensions(dimensions: readonly Dimension[], x: (mm: number) => number): PlacedDimension[] {
  const taken: Record<string, number> = {};
  return [...dimensions]
    .sort((a, b) => a.from + a.to - (b.from + b.to))
    .map((dimension) => {
      const key = `${dimension.side} ${String(dimension.moves)}`;
      const centre = (x(dimension.from) + x(dimension.to)) / 2;
      const fits = (text: string) => centre - (text.length * characterWidth) / 2 > (taken[key] ?? -Infinity) + 6;
      const label = [dimension.text, dimension.shortText].find(fits) ?? '';
      if (label !== '') taken[key] = centre + (label.length * characterWidth) / 2;
      return { dimension, label };
    });
}
