import { parseQuantity } from '#contracts/quantity';
import type { Dimension } from '#contracts/quantity';

/**
 * What the strip draws of a design document: lengths in millimetres, angles in radians. Read leniently, because a draft is drawn
 * while it is typed: what cannot be read is taken from the document drawn before, and left out where that has nothing.
 */

export type Sign = 1 | -1;
export type Triple = [number, number, number];

export interface CylinderMagnet {
  shape: 'cylinder';
  innerRadius: number;
  outerRadius: number;
  length: number;
  at: number;
  polarity: Sign;
}

export interface BlockMagnet {
  shape: 'block';
  /** Along travel, across, normal to the coil's face. */
  size: Triple;
  at: Triple;
  polarity: Sign;
}

export interface Winding {
  turns: number | null;
  sense: Sign;
  /** Overall wire diameter where the document states it. */
  wire: number | null;
}

export interface ThroughCoil extends Winding {
  innerRadius: number;
  outerRadius: number;
  length: number;
  at: number;
}

/** Flat coils by their half sizes in the plane of the face; `round` and `racetrack` have rounded ends. */
export interface FlatCoil extends Winding {
  shape: 'round' | 'racetrack' | 'rectangular';
  inner: [number, number];
  outer: [number, number];
  length: number;
  at: Triple;
}

export interface Helix {
  wireDiameter: number;
  meanDiameter: number;
  turns: number;
}

interface DeviceBase {
  suspension: 'spring' | 'helical' | 'levitated' | 'table';
  helix: Helix | null;
  stops: { lower: number | null; upper: number | null } | null;
  axisAngle: number;
  /** Paths that could be read neither from this document nor from the one before. */
  missing: string[];
}

export interface ThroughDevice extends DeviceBase {
  layout: 'through';
  magnets: CylinderMagnet[];
  fixed: CylinderMagnet[];
  coils: ThroughCoil[];
  offset: number;
  tilt: number;
}

export interface AcrossDevice extends DeviceBase {
  layout: 'across';
  magnets: BlockMagnet[];
  coils: FlatCoil[];
}

export type StripDevice = ThroughDevice | AcrossDevice;

type Key = string | number;

function valueAt(document: unknown, path: readonly Key[]): unknown {
  let value = document;
  for (const key of path) {
    if (typeof value !== 'object' || value === null) return undefined;
    value = (value as Record<Key, unknown>)[key];
  }
  return value;
}

function numberFrom(raw: unknown, dimension: Dimension): number | null {
  if (typeof raw === 'number') return Number.isFinite(raw) ? raw : null;
  if (typeof raw !== 'string') return null;
  const reading = parseQuantity(raw, dimension);
  return reading.ok ? reading.value : null;
}

class Reader {
  readonly missing: string[] = [];
  constructor(
    private readonly document: unknown,
    private readonly earlier: unknown,
  ) {}

  raw(...path: Key[]): unknown {
    return valueAt(this.document, path);
  }

  /** A number, `fallback` where the document leaves it out, null where nothing can be read. */
  optional(path: Key[], dimension: Dimension, fallback: number | null = null): number | null {
    const raw = this.raw(...path);
    if (raw === undefined || raw === null) return fallback;
    return numberFrom(raw, dimension) ?? numberFrom(valueAt(this.earlier, path), dimension) ?? fallback;
  }

  needed(path: Key[], dimension: Dimension): number | null {
    const value = this.optional(path, dimension);
    if (value === null) this.missing.push(path.join('.'));
    return value;
  }

  mm(path: Key[]): number | null {
    const value = this.needed(path, 'length');
    return value === null ? null : value * 1000;
  }

  /** A size: what is not above zero is drawn as it was before, like a text that cannot be read. */
  size(path: Key[]): number | null {
    const now = this.mm(path);
    if (now === null || now > 0) return now;
    const before = numberFrom(valueAt(this.earlier, path), 'length');
    return before !== null && before > 0 ? before * 1000 : now;
  }

  mmOr(path: Key[], fallback: number): number {
    const value = this.optional(path, 'length');
    return value === null ? fallback : value * 1000;
  }

  sign(...path: Key[]): Sign {
    return Number(this.raw(...path)) < 0 ? -1 : 1;
  }

  count(...path: Key[]): number {
    const list = this.raw(...path);
    return Array.isArray(list) ? list.length : 0;
  }

  triple(path: Key[]): Triple | null {
    const [x = null, y = null, z = null] = [0, 1, 2].map((axis) => this.mm([...path, axis]));
    return x === null || y === null || z === null ? null : [x, y, z];
  }

  pair(path: Key[]): [number, number] | null {
    const [x = null, y = null] = [0, 1].map((axis) => this.mm([...path, axis]));
    return x === null || y === null ? null : [x, y];
  }
}

const drawable = (...sizes: (number | null)[]): boolean => sizes.every((size) => size !== null && size > 0);

function cylinder(reader: Reader, path: Key[]): CylinderMagnet | null {
  const outer = reader.size([...path, 'outerDiameter']);
  const inner = reader.mmOr([...path, 'innerDiameter'], 0);
  const length = reader.size([...path, 'length']);
  const at = reader.mmOr([...path, 'at'], 0);
  if (outer === null || length === null || !drawable(outer, length)) return null;
  return {
    shape: 'cylinder',
    innerRadius: Math.max(0, inner / 2),
    outerRadius: outer / 2,
    length,
    at,
    polarity: reader.sign(...path, 'polarity'),
  };
}

function block(reader: Reader, path: Key[]): BlockMagnet | null {
  const size = reader.triple([...path, 'size']);
  const at = reader.triple([...path, 'at']);
  if (!size || !at || !drawable(...size)) return null;
  return { shape: 'block', size, at, polarity: reader.sign(...path, 'polarity') };
}

function winding(reader: Reader, path: Key[]): Winding {
  const wire = reader.optional([...path, 'wire', 'overallDiameter'], 'length');
  return {
    turns: reader.optional([...path, 'turns'], 'number'),
    sense: reader.sign(...path, 'sense'),
    wire: wire === null ? null : wire * 1000,
  };
}

function throughCoil(reader: Reader, path: Key[]): ThroughCoil | null {
  const inner = reader.size([...path, 'innerDiameter']);
  const outer = reader.size([...path, 'outerDiameter']);
  const length = reader.size([...path, 'length']);
  const at = reader.mm([...path, 'at']);
  if (inner === null || outer === null || length === null || at === null || !drawable(outer, length)) return null;
  return { ...winding(reader, path), innerRadius: inner / 2, outerRadius: outer / 2, length, at };
}

function flatCoil(reader: Reader, path: Key[]): FlatCoil | null {
  const shape = reader.raw(...path, 'shape');
  const length = reader.size([...path, 'length']);
  const at = reader.triple([...path, 'at']);
  let inner: [number, number] | null = null;
  let outer: [number, number] | null = null;
  if (shape === 'rectangular') {
    inner = reader.pair([...path, 'inner']);
    outer = reader.pair([...path, 'outer']);
    inner = inner && [inner[0] / 2, inner[1] / 2];
    outer = outer && [outer[0] / 2, outer[1] / 2];
  } else if (shape === 'racetrack') {
    const straight = reader.mm([...path, 'straight']);
    const small = reader.size([...path, 'innerEndRadius']);
    const large = reader.size([...path, 'outerEndRadius']);
    if (straight !== null && small !== null && large !== null) {
      inner = [small, small + straight / 2];
      outer = [large, large + straight / 2];
    }
  } else {
    const small = reader.size([...path, 'innerDiameter']);
    const large = reader.size([...path, 'outerDiameter']);
    if (small !== null && large !== null) {
      inner = [small / 2, small / 2];
      outer = [large / 2, large / 2];
    }
  }
  if (!inner || !outer || length === null || !at || !drawable(length, ...outer)) return null;
  const known = shape === 'rectangular' || shape === 'racetrack' ? shape : 'round';
  return { ...winding(reader, path), shape: known, inner, outer, length, at };
}

function each<T>(reader: Reader, path: Key[], read: (path: Key[]) => T | null): T[] {
  return Array.from({ length: reader.count(...path) }, (_, index) => read([...path, index])).filter(
    (item): item is Awaited<T> & NonNullable<T> => item !== null,
  ) as T[];
}

function stopsOf(reader: Reader): DeviceBase['stops'] {
  if (typeof reader.raw('stops') !== 'object' || reader.raw('stops') === null) return null;
  const scaled = (path: Key[]) => {
    const value = reader.optional(path, 'length');
    return value === null ? null : value * 1000;
  };
  return { lower: scaled(['stops', 'lower']), upper: scaled(['stops', 'upper']) };
}

function helixOf(reader: Reader): Helix | null {
  const wireDiameter = reader.mm(['suspension', 'wireDiameter']);
  const meanDiameter = reader.mm(['suspension', 'meanDiameter']);
  const turns = reader.optional(['suspension', 'activeTurns'], 'number');
  if (wireDiameter === null || meanDiameter === null || turns === null) return null;
  return drawable(wireDiameter, meanDiameter, turns) ? { wireDiameter, meanDiameter, turns } : null;
}

/**
 * Reads what can be drawn from a design document, typed or canonical.
 * @param earlier a document drawn before; lends the values that cannot be read now, so that a half-typed number does not make the
 *   drawing jump.
 */
export function readStripDevice(document: unknown, earlier?: unknown): StripDevice {
  const reader = new Reader(document, earlier);
  const kind = reader.raw('suspension', 'kind');
  const suspension = kind === 'helical' || kind === 'levitated' || kind === 'table' ? kind : 'spring';
  const base: DeviceBase = {
    suspension,
    helix: suspension === 'helical' ? helixOf(reader) : null,
    stops: stopsOf(reader),
    axisAngle: reader.optional(['axisAngle'], 'angle', 0) ?? 0,
    missing: reader.missing,
  };
  if (reader.raw('layout') === 'across') {
    return {
      ...base,
      layout: 'across',
      magnets: each(reader, ['magnets'], (path) => block(reader, path)),
      coils: each(reader, ['coils'], (path) => flatCoil(reader, path)),
    };
  }
  return {
    ...base,
    layout: 'through',
    magnets: each(reader, ['magnets'], (path) => cylinder(reader, path)),
    fixed: suspension === 'levitated' ? each(reader, ['suspension', 'fixed'], (path) => cylinder(reader, path)) : [],
    coils: each(reader, ['coils'], (path) => throughCoil(reader, path)),
    offset: reader.mmOr(['misalignment', 'offset'], 0),
    tilt: reader.optional(['misalignment', 'tilt'], 'angle', 0) ?? 0,
  };
}

/** Outer sizes of magnets and windings at rest, m; null where nothing can be drawn. */
export function sizeOf(device: StripDevice): { across: number | null; along: number | null } {
  const parts: { from: number; to: number; across: number }[] =
    device.layout === 'through'
      ? [...device.magnets, ...device.fixed, ...device.coils].map(({ at, length, outerRadius }) => ({
          from: at - length / 2,
          to: at + length / 2,
          across: 2 * outerRadius,
        }))
      : [
          ...device.magnets.map(({ at, size }) => ({
            from: at[0] - size[0] / 2,
            to: at[0] + size[0] / 2,
            across: Math.max(size[1], size[2]),
          })),
          ...device.coils.map(({ at, outer }) => ({
            from: at[0] - outer[0],
            to: at[0] + outer[0],
            across: 2 * outer[1],
          })),
        ];
  if (parts.length === 0) return { across: null, along: null };
  const along = Math.max(...parts.map(({ to }) => to)) - Math.min(...parts.map(({ from }) => from));
  return { across: Math.max(...parts.map(({ across }) => across)) / 1000, along: along / 1000 };
}
