import { formatNumber } from '../../lib/format';

/** Primitives of the section drawing. Millimetres, x along the travel, y upwards; what moves is placed for x = 0. */

export interface Rect {
  x0: number;
  x1: number;
  y0: number;
  y1: number;
}

/** One half of a magnet, lettered. */
export interface Pole {
  pole: 'N' | 'S';
  rect: Rect;
  magnet: number;
}

/** Direction of magnetisation. */
export interface Arrow {
  from: [number, number];
  to: [number, number];
  /** Of the cut face, across the arrow. */
  thickness: number;
}

export interface MagnetBody {
  poles: Pole[];
  arrows: Arrow[];
  outlines: Rect[];
}

/** Cut face of a winding; `pitch` is the overall wire diameter, or what the turns leave each other. */
export interface CutWinding {
  rect: Rect;
  coil: number;
  pitch: number;
  sense: 1 | -1;
}

/** Zigzag between a fixed end and the assembly. */
export interface Spring {
  fixedAt: number;
  attachedAt: number;
  y: number;
  amplitude: number;
  turns: number;
  /** To scale from the document's dimensions, not a symbol. */
  toScale: boolean;
}

export interface Stop {
  side: 'lower' | 'upper';
  /** Travel at which it touches. */
  at: number;
  rects: Rect[];
}

export interface Dimension {
  from: number;
  to: number;
  /** Height of the feature measured. */
  y: number;
  side: 'above' | 'below';
  text: string;
  shortText: string;
  moves: boolean;
}

/** View along the normal of the coil's face: outlines of what lies under each other. */
export interface PlanView {
  y0: number;
  y1: number;
  coils: {
    inner: [number, number];
    outer: [number, number];
    shape: 'round' | 'racetrack' | 'rectangular';
    at: [number, number];
  }[];
  magnets: { rect: Rect; facing: 'N' | 'S' }[];
}

export interface Drawing {
  moving: MagnetBody & { hull: Rect | null; clash: boolean };
  fixed: MagnetBody;
  windings: CutWinding[];
  bobbins: Rect[];
  tube: Rect[];
  walls: Rect[];
  springs: Spring[];
  stops: Stop[];
  /** Where a magnet and a winding would share space. */
  clashes: Rect[];
  dimensions: Dimension[];
  centreLine: boolean;
  plan: PlanView | null;
  /** All that is drawn, in travel and height. */
  extent: Rect;
}

export const mirrored = (rect: Rect): Rect => ({ ...rect, y0: -rect.y1, y1: -rect.y0 });

export function hullOf(rects: readonly Rect[]): Rect | null {
  if (rects.length === 0) return null;
  return rects.reduce((hull, rect) => ({
    x0: Math.min(hull.x0, rect.x0),
    x1: Math.max(hull.x1, rect.x1),
    y0: Math.min(hull.y0, rect.y0),
    y1: Math.max(hull.y1, rect.y1),
  }));
}

export function overlap(a: Rect, b: Rect): Rect | null {
  const rect = {
    x0: Math.max(a.x0, b.x0),
    x1: Math.min(a.x1, b.x1),
    y0: Math.max(a.y0, b.y0),
    y1: Math.min(a.y1, b.y1),
  };
  return rect.x1 - rect.x0 > 1e-9 && rect.y1 - rect.y0 > 1e-9 ? rect : null;
}

/** Points of a zigzag with straight ends, from the fixed end to the assembly. */
export function zigzag(from: number, to: number, y: number, amplitude: number, turns: number): [number, number][] {
  const lead = (to - from) * 0.06;
  const points: [number, number][] = [[from, y]];
  const steps = Math.max(2, Math.round(turns) * 2);
  const start = from + lead;
  const step = (to - from - 2 * lead) / steps;
  points.push([start, y]);
  for (let index = 0; index < steps; index += 1) {
    points.push([start + (index + 0.5) * step, y + (index % 2 === 0 ? amplitude : -amplitude)]);
  }
  points.push([to - lead, y], [to, y]);
  return points;
}

/** A count of turns: whole numbers as they are, parted in thousands from 10 000 on. */
export const formatTurns = (turns: number): string => {
  if (!Number.isInteger(turns) || turns > 1e7) return formatNumber(turns);
  const whole = String(turns);
  return whole.length > 4 ? whole.replace(/\B(?=(\d{3})+$)/g, '\u2009') : whole;
};
