import { formatNumber } from '../../lib/format';
import { formatTurns } from './drawing';
import type { CylinderMagnet, ThroughCoil, ThroughDevice } from './device';
import { hullOf, mirrored, overlap } from './drawing';
import type { Arrow, CutWinding, Dimension, Drawing, MagnetBody, Pole, Rect, Spring, Stop } from './drawing';

/** Halves of a cylinder or ring, its magnetisation arrow and outline. A ring is cut twice: above and below its bore. */
export function cylinderBody(magnets: readonly CylinderMagnet[]): MagnetBody {
  const poles: Pole[] = [];
  const arrows: Arrow[] = [];
  const outlines: Rect[] = [];
  magnets.forEach((magnet, index) => {
    const { innerRadius: inner, outerRadius: outer, length, at, polarity } = magnet;
    const whole: Rect = { x0: at - length / 2, x1: at + length / 2, y0: inner, y1: outer };
    const cuts = inner > 0 && inner < outer ? [whole, mirrored(whole)] : [{ ...whole, y0: -outer, y1: outer }];
    for (const cut of cuts) {
      const middle = (cut.y0 + cut.y1) / 2;
      const height = cut.y1 - cut.y0;
      poles.push(
        { magnet: index, pole: polarity > 0 ? 'S' : 'N', rect: { ...cut, x1: at } },
        { magnet: index, pole: polarity > 0 ? 'N' : 'S', rect: { ...cut, x0: at } },
      );
      const y = middle - 0.18 * height;
      arrows.push({
        from: [at - polarity * 0.32 * length, y],
        to: [at + polarity * 0.32 * length, y],
        thickness: height,
      });
      outlines.push(cut);
    }
  });
  return { poles, arrows, outlines };
}

/** Distance between neighbouring conductors: of the wire where it is stated, else as the turns fill the window. */
function pitchOf(coil: ThroughCoil): number {
  if (coil.wire !== null && coil.wire > 0) return coil.wire;
  const area = coil.length * Math.max(0, coil.outerRadius - coil.innerRadius);
  return coil.turns !== null && coil.turns > 0 ? Math.sqrt(area / coil.turns) : Math.sqrt(area) / 8;
}

function cutWinding(coil: ThroughCoil, index: number): CutWinding[] {
  const rect: Rect = {
    x0: coil.at - coil.length / 2,
    x1: coil.at + coil.length / 2,
    y0: Math.min(coil.innerRadius, coil.outerRadius),
    y1: Math.max(coil.innerRadius, coil.outerRadius),
  };
  return [rect, mirrored(rect)].map((face) => ({ rect: face, coil: index, pitch: pitchOf(coil), sense: coil.sense }));
}

function bobbinOf(coil: ThroughCoil): Rect[] {
  const build = Math.abs(coil.outerRadius - coil.innerRadius);
  const width = Math.min(0.14 * build, 0.12 * coil.length);
  const cheeks: Rect[] = [coil.at - coil.length / 2 - width, coil.at + coil.length / 2].map((x0) => ({
    x0,
    x1: x0 + width,
    y0: Math.min(coil.innerRadius, coil.outerRadius),
    y1: Math.max(coil.innerRadius, coil.outerRadius) + 0.07 * build,
  }));
  return [...cheeks, ...cheeks.map(mirrored)];
}

interface Frame {
  x0: number;
  x1: number;
  /** Inner radius of the tube's hold on the ends. */
  radius: number;
}

function stopsOf(device: ThroughDevice, hull: Rect, frame: Frame): Stop[] {
  const outer = Math.min(frame.radius, hull.y1) * 0.72;
  const { lower = null, upper = null } = device.stops ?? {};
  // Rings, so that the spring is seen through them.
  const ring = (x0: number, x1: number): Rect[] => {
    const rect: Rect = { x0, x1, y0: outer * 0.45, y1: outer };
    return [rect, mirrored(rect)];
  };
  const stops: Stop[] = [];
  if (lower !== null) stops.push({ side: 'lower', at: lower, rects: ring(frame.x0, hull.x0 + lower) });
  if (upper !== null) stops.push({ side: 'upper', at: upper, rects: ring(hull.x1 + upper, frame.x1) });
  return stops;
}

function springsOf(device: ThroughDevice, hull: Rect, frame: Frame): Spring[] {
  if (device.suspension === 'levitated') return [];
  const bore = Math.min(...device.magnets.map((magnet) => magnet.innerRadius));
  const outer = hull.y1;
  const { helix } = device;
  const amplitude = helix ? helix.meanDiameter / 2 : 0.14 * outer;
  // A spring that would run down a bore sits on the ring's face instead, seen twice in the section.
  const onRing = !helix && bore > 0.3 * outer;
  const heights = onRing ? [(bore + outer) / 2, -(bore + outer) / 2] : [0];
  const ends: [number, number][] = [[frame.x0, hull.x0]];
  if (!helix) ends.push([frame.x1, hull.x1]);
  return heights.flatMap((y) =>
    ends.map(([fixedAt, attachedAt]) => ({
      fixedAt,
      attachedAt,
      y,
      amplitude: onRing ? Math.min(amplitude, 0.35 * (outer - bore)) : amplitude,
      turns: helix ? Math.min(60, helix.turns) : 8,
      toScale: helix !== null,
    })),
  );
}

function clashesOf(device: ThroughDevice): Rect[] {
  const clashes: Rect[] = [];
  for (const coil of device.coils) {
    const window = cutWinding(coil, 0)[0]?.rect;
    if (!window) continue;
    for (const magnet of device.magnets) {
      // Anywhere along its way: the magnet may be elsewhere at rest and still not pass.
      const passing: Rect = { x0: window.x0, x1: window.x1, y0: magnet.innerRadius, y1: magnet.outerRadius };
      const shared = overlap(passing, window);
      if (shared) clashes.push(shared, mirrored(shared));
    }
  }
  return clashes;
}

function dimensionsOf(device: ThroughDevice): Dimension[] {
  const coils = device.coils.map((coil): Dimension => {
    const length = formatNumber(coil.length);
    return {
      from: coil.at - coil.length / 2,
      to: coil.at + coil.length / 2,
      y: Math.max(coil.outerRadius, coil.innerRadius),
      side: 'above',
      text: coil.turns === null ? length : `${length} · ${formatTurns(coil.turns)} turns`,
      shortText: length,
      moves: false,
    };
  });
  const magnets = device.magnets.map((magnet): Dimension => {
    const length = formatNumber(magnet.length);
    const bore = magnet.innerRadius > 0 ? `/${formatNumber(2 * magnet.innerRadius)}` : '';
    return {
      from: magnet.at - magnet.length / 2,
      to: magnet.at + magnet.length / 2,
      y: -magnet.outerRadius,
      side: 'below',
      text: `${length} · Ø${formatNumber(2 * magnet.outerRadius)}${bore}`,
      shortText: length,
      moves: true,
    };
  });
  return [...coils, ...magnets];
}

/**
 * Section through the axis of a `through` device.
 * @param travel estimated excursion either way, mm; the frame leaves room for it within reason.
 */
export function throughSection(device: ThroughDevice, travel = 0): Drawing {
  const body = cylinderBody(device.magnets);
  const fixed = cylinderBody(device.fixed);
  const hull = hullOf(body.outlines.flatMap((rect) => [rect, mirrored(rect)]));
  const windings = device.coils.flatMap(cutWinding);
  const bobbins = device.coils.flatMap(bobbinOf);
  const clashes = clashesOf(device);
  const seat = hull ?? { x0: -5, x1: 5, y0: -5, y1: 5 };
  const length = seat.x1 - seat.x0;
  const diameter = 2 * seat.y1;
  const gap = Math.max(
    0.7 * Math.min(length, diameter),
    0.2 * Math.max(length, diameter),
    Math.min(1.15 * travel, 3 * Math.max(length, diameter)),
  );
  const bores = device.coils.map((coil) => Math.min(coil.innerRadius, coil.outerRadius));
  const bore = bores.length > 0 ? Math.min(...bores) : 1.2 * seat.y1;
  const runsInside = bore > seat.y1;
  const radius = runsInside ? bore : 1.1 * seat.y1;
  const seatDepth = 0.08 * diameter;
  const { lower, upper } = device.stops ?? { lower: null, upper: null };
  const frame: Frame = {
    x0: Math.min(
      seat.x0 - gap,
      lower === null ? Infinity : seat.x0 + lower - seatDepth,
      ...(runsInside ? bobbins.map((rect) => rect.x0 - seatDepth) : []),
      ...fixed.outlines.map((rect) => rect.x0),
    ),
    x1: Math.max(
      seat.x1 + gap,
      upper === null ? -Infinity : seat.x1 + upper + seatDepth,
      ...(runsInside ? bobbins.map((rect) => rect.x1 + seatDepth) : []),
      ...fixed.outlines.map((rect) => rect.x1),
    ),
    radius,
  };
  const wallThickness = 0.025 * diameter;
  const tubeThickness = runsInside ? Math.min(0.4 * (bore - seat.y1), 0.06 * bore) : 0;
  const tubeRect: Rect = {
    x0: frame.x0 - wallThickness,
    x1: frame.x1 + wallThickness,
    y0: bore - tubeThickness,
    y1: bore,
  };
  const tube = tubeThickness > 0 ? [tubeRect, mirrored(tubeRect)] : [];
  const walls: Rect[] = hull
    ? [frame.x0 - wallThickness, frame.x1].map((x0) => ({
        x0,
        x1: x0 + wallThickness,
        y0: -radius + tubeThickness,
        y1: radius - tubeThickness,
      }))
    : [];
  const all = [...body.outlines, ...fixed.outlines, ...windings.map(({ rect }) => rect), ...bobbins, ...tube, ...walls];
  const extent = hullOf(all.flatMap((rect) => [rect, mirrored(rect)])) ?? seat;
  return {
    moving: { ...body, hull, clash: clashes.length > 0 },
    fixed,
    windings,
    bobbins,
    tube,
    walls,
    springs: hull ? springsOf(device, hull, frame) : [],
    stops: hull ? stopsOf(device, hull, frame) : [],
    clashes,
    dimensions: dimensionsOf(device),
    centreLine: true,
    plan: null,
    extent,
  };
}
