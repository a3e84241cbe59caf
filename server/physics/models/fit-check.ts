import type {
  AcrossDesign,
  AxialCoil,
  CylinderMagnet,
  DesignDocument,
  FaceCoil,
  ThroughDesign,
} from '../design-document';
import type { DocumentIssue } from '../document-error';
import { formatQuantity } from '../quantity';
import { mostTurns, windowDepth } from './winding';

const mm = (value: number): string => formatQuantity(value, 'length', 4);

/** Two intervals touch or overlap by more than rounding. */
const overlaps = (a: readonly [number, number], b: readonly [number, number]): boolean =>
  Math.min(a[1], b[1]) - Math.max(a[0], b[0]) > 1e-9;

/** Where the assembly surely goes: its rest, and from stop to stop where both ends have one. */
export function travelOf(document: DesignDocument, rest: number): readonly [number, number] {
  const { stops } = document;
  if (stops === null) return [rest, rest];
  return [Math.min(rest, stops.lower ?? rest), Math.max(rest, stops.upper ?? rest)];
}

/** Turns and wire against the window; named by the number that has to change. */
function windowIssues(coil: AxialCoil | FaceCoil, index: number): DocumentIssue[] {
  const depth = windowDepth(coil);
  const overall = coil.wire.overallDiameter;
  const narrow = Math.min(depth, coil.length);
  if (overall > narrow * (1 + 1e-9)) {
    return [
      {
        path: `coils.${index}.wire.overallDiameter`,
        value: overall,
        message: `the wire of ${mm(overall)} is thicker than the winding window of ${mm(coil.length)} by ${mm(depth)}`,
        limit: narrow,
      },
    ];
  }
  const most = Math.max(1, mostTurns(depth * coil.length, overall));
  if (coil.turns > most) {
    return [
      {
        path: `coils.${index}.turns`,
        value: coil.turns,
        message: `${coil.turns} turns do not fit: the window of ${mm(coil.length)} by ${mm(depth)} takes at most ${most} turns of ${mm(overall)} wire, however they are laid`,
        limit: most,
      },
    ];
  }
  return [];
}

/** Middle of the moving assembly, about which it tilts, m from its origin. */
function assemblyMiddle(magnets: readonly CylinderMagnet[]): number {
  const low = Math.min(...magnets.map((magnet) => magnet.at - magnet.length / 2));
  const high = Math.max(...magnets.map((magnet) => magnet.at + magnet.length / 2));
  return (low + high) / 2;
}

/** Radius that a magnet sweeps, offset and tilt of the assembly included, m. */
export function sweptRadius(document: ThroughDesign, magnet: CylinderMagnet): number {
  const { offset, tilt } = document.misalignment;
  const middle = assemblyMiddle(document.magnets);
  const reach = Math.abs(magnet.at - middle) + magnet.length / 2;
  return (magnet.outerDiameter / 2) * Math.cos(tilt) + Math.abs(offset) + reach * Math.abs(Math.sin(tilt));
}

function boreIssues(document: ThroughDesign, travel: readonly [number, number]): DocumentIssue[] {
  const issues: DocumentIssue[] = [];
  const { offset, tilt } = document.misalignment;
  const straight = offset === 0 && tilt === 0;
  document.magnets.forEach((magnet, m) => {
    const swept = 2 * sweptRadius(document, magnet);
    const path = [travel[0] + magnet.at - magnet.length / 2, travel[1] + magnet.at + magnet.length / 2] as const;
    document.coils.forEach((coil, c) => {
      const along = [coil.at - coil.length / 2, coil.at + coil.length / 2] as const;
      if (swept < coil.innerDiameter || !overlaps(path, along)) return;
      issues.push({
        path: `magnets.${m}.outerDiameter`,
        value: magnet.outerDiameter,
        message: `the magnet of ${mm(magnet.outerDiameter)}${straight ? '' : ', which sweeps ' + mm(swept) + ' with its misalignment,'} does not fit the bore of coils.${c}, ${mm(coil.innerDiameter)}`,
        limit: coil.innerDiameter,
      });
    });
  });
  return issues;
}

/** Half extents of a coil along x and y, of its outside or its opening, m. */
function halfExtents(coil: FaceCoil, which: 'outer' | 'inner'): readonly [number, number] {
  switch (coil.shape) {
    case 'round': {
      const radius = (which === 'outer' ? coil.outerDiameter : coil.innerDiameter) / 2;
      return [radius, radius];
    }
    case 'racetrack': {
      const radius = which === 'outer' ? coil.outerEndRadius : coil.innerEndRadius;
      return [radius, radius + coil.straight / 2];
    }
    case 'rectangular': {
      const sides = which === 'outer' ? coil.outer : coil.inner;
      return [sides[0] / 2, sides[1] / 2];
    }
  }
}

function faceIssues(document: AcrossDesign, travel: readonly [number, number]): DocumentIssue[] {
  const issues: DocumentIssue[] = [];
  document.magnets.forEach((magnet, m) => {
    const [sx, sy, sz] = magnet.size;
    const [mx, my, mz] = magnet.at;
    document.coils.forEach((coil, c) => {
      const [cx, cy, cz] = coil.at;
      const gap = Math.abs(mz - cz) - (sz + coil.length) / 2;
      if (gap >= -1e-9) return;
      const [ox, oy] = halfExtents(coil, 'outer');
      const x = [travel[0] + mx - sx / 2, travel[1] + mx + sx / 2] as const;
      const y = [my - sy / 2, my + sy / 2] as const;
      if (!overlaps(x, [cx - ox, cx + ox]) || !overlaps(y, [cy - oy, cy + oy])) return;
      const [ix, iy] = halfExtents(coil, 'inner');
      const inside = x[0] >= cx - ix && x[1] <= cx + ix && y[0] >= cy - iy && y[1] <= cy + iy;
      if (inside && coil.shape === 'rectangular') return;
      issues.push({
        path: `magnets.${m}.at.2`,
        value: mz,
        message: `the block reaches ${mm(-gap)} into coils.${c}: its face must stay clear of the winding, at a height of at least ${mm((sz + coil.length) / 2)} from the coil’s middle`,
        limit: (sz + coil.length) / 2,
      });
    });
  });
  return issues;
}

/** A rest so far beyond the stops that the assembly never comes near it. */
function restIssues(document: DesignDocument, rest: number): DocumentIssue[] {
  const { stops } = document;
  if (stops === null || stops.lower === null || stops.upper === null) return [];
  const span = stops.upper - stops.lower;
  const beyond = Math.max(rest - stops.upper, stops.lower - rest);
  if (beyond <= span) return [];
  return [
    {
      path: 'stops',
      value: 'an object',
      message: `the assembly would rest at ${mm(rest)}, far beyond the stops from ${mm(stops.lower)} to ${mm(stops.upper)}: between them it has no rest position`,
    },
  ];
}

/**
 * What cannot be built: wire and turns that do not fit their window, magnets that do not fit the bore or the gap where
 * they surely pass; stops that keep the assembly from its rest.
 *
 * @param rest position of the assembly at rest (m)
 * @returns an empty list where the parts fit
 */
export function fitIssues(document: DesignDocument, rest = 0): DocumentIssue[] {
  const windows = document.coils.flatMap((coil, index) => windowIssues(coil, index));
  const travel = travelOf(document, rest);
  const clash = document.layout === 'through' ? boreIssues(document, travel) : faceIssues(document, travel);
  return [...windows, ...clash, ...restIssues(document, rest)];
}
