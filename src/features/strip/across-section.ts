import { formatNumber } from '../../lib/format';
import { formatTurns } from './drawing';
import type { AcrossDevice, BlockMagnet, FlatCoil } from './device';
import { hullOf, overlap } from './drawing';
import type { CutWinding, Dimension, Drawing, MagnetBody, PlanView, Rect, Spring, Stop } from './drawing';

const sideOf = ({ size, at }: BlockMagnet): Rect => ({
  x0: at[0] - size[0] / 2,
  x1: at[0] + size[0] / 2,
  y0: at[2] - size[2] / 2,
  y1: at[2] + size[2] / 2,
});

/** Blocks seen from the side: magnetised along the normal of the coil's face, so the halves lie on each other. */
function blockBody(magnets: readonly BlockMagnet[]): MagnetBody {
  const body: MagnetBody = { poles: [], arrows: [], outlines: [] };
  magnets.forEach((magnet, index) => {
    const side = sideOf(magnet);
    const middle = magnet.at[2];
    body.poles.push(
      { magnet: index, pole: magnet.polarity > 0 ? 'S' : 'N', rect: { ...side, y1: middle } },
      { magnet: index, pole: magnet.polarity > 0 ? 'N' : 'S', rect: { ...side, y0: middle } },
    );
    const reach = 0.32 * magnet.size[2] * magnet.polarity;
    const x = magnet.at[0] + 0.28 * magnet.size[0];
    body.arrows.push({ from: [x, middle - reach], to: [x, middle + reach], thickness: magnet.size[0] });
    body.outlines.push(side);
  });
  return body;
}

/** The two sides of each coil as the plane y = 0 cuts them. */
function cutWindings(coil: FlatCoil, index: number): CutWinding[] {
  const [inner, outer] = [coil.inner[0], coil.outer[0]];
  const area = Math.max(0, outer - inner) * coil.length;
  const pitch = coil.wire !== null && coil.wire > 0 ? coil.wire : Math.sqrt(area / Math.max(1, coil.turns ?? 64));
  const height = { y0: coil.at[2] - coil.length / 2, y1: coil.at[2] + coil.length / 2 };
  return [
    { x0: coil.at[0] - outer, x1: coil.at[0] - inner, ...height },
    { x0: coil.at[0] + inner, x1: coil.at[0] + outer, ...height },
  ].map((rect) => ({ rect, coil: index, pitch, sense: coil.sense }));
}

function planOf(device: AcrossDevice): PlanView {
  const magnets = device.magnets.map(({ size, at, polarity }) => {
    const above = at[2] >= (device.coils[0]?.at[2] ?? 0);
    return {
      rect: { x0: at[0] - size[0] / 2, x1: at[0] + size[0] / 2, y0: at[1] - size[1] / 2, y1: at[1] + size[1] / 2 },
      // The pole that looks at the coil: the lower one of a magnet above it.
      facing: polarity > 0 === above ? ('S' as const) : ('N' as const),
    };
  });
  const coils = device.coils.map(({ inner, outer, shape, at }) => ({
    inner,
    outer,
    shape,
    at: [at[0], at[1]] as [number, number],
  }));
  const heights = [
    ...magnets.flatMap(({ rect }) => [rect.y0, rect.y1]),
    ...coils.flatMap(({ outer, at }) => [at[1] - outer[1], at[1] + outer[1]]),
  ];
  return { y0: Math.min(0, ...heights), y1: Math.max(0, ...heights), coils, magnets };
}

function dimensionsOf(device: AcrossDevice, extent: Rect): Dimension[] {
  const coils = device.coils.map((coil): Dimension => {
    const width = formatNumber(2 * coil.outer[0]);
    const turns = coil.turns === null ? '' : ` · ${formatTurns(coil.turns)} turns`;
    return {
      from: coil.at[0] - coil.outer[0],
      to: coil.at[0] + coil.outer[0],
      y: extent.y0,
      side: 'below',
      text: `${width}${turns}`,
      shortText: width,
      moves: false,
    };
  });
  const magnets = device.magnets.map(({ size, at }): Dimension => ({
    from: at[0] - size[0] / 2,
    to: at[0] + size[0] / 2,
    y: extent.y1,
    side: 'above',
    text: size.map((side) => formatNumber(side)).join(' × '),
    shortText: formatNumber(size[0]),
    moves: true,
  }));
  return [...magnets, ...coils];
}

/** Side view and plan of an `across` device: blocks passing over the face of flat coils. */
export function acrossSection(device: AcrossDevice, travel = 0): Drawing {
  const body = blockBody(device.magnets);
  const hull = hullOf(body.outlines);
  const windings = device.coils.flatMap(cutWindings);
  const faces = device.coils.map((coil): Rect => ({
    x0: coil.at[0] - coil.outer[0],
    x1: coil.at[0] + coil.outer[0],
    y0: coil.at[2] - coil.length / 2,
    y1: coil.at[2] + coil.length / 2,
  }));
  const solid = hullOf([...body.outlines, ...faces]) ?? { x0: -5, x1: 5, y0: -3, y1: 3 };
  const seat = hull ?? solid;
  const length = seat.x1 - seat.x0;
  const gap = Math.max(0.35 * length, 0.5 * (solid.y1 - solid.y0), Math.min(1.15 * travel, 3 * length));
  const { lower = null, upper = null } = device.stops ?? {};
  const depth = 0.05 * length;
  const frame = {
    x0: Math.min(seat.x0 - gap, solid.x0 - depth, lower === null ? Infinity : seat.x0 + lower - depth),
    x1: Math.max(seat.x1 + gap, solid.x1 + depth, upper === null ? -Infinity : seat.x1 + upper + depth),
  };
  const middle = (seat.y0 + seat.y1) / 2;
  const reach = (seat.y1 - seat.y0) / 2;
  const wall = 0.02 * length;
  const walls: Rect[] = hull
    ? [frame.x0 - wall, frame.x1].map((x0) => ({
        x0,
        x1: x0 + wall,
        y0: middle - 1.3 * reach,
        y1: middle + 1.3 * reach,
      }))
    : [];
  const springs: Spring[] =
    hull && device.suspension !== 'levitated'
      ? (
          [
            [frame.x0, hull.x0],
            [frame.x1, hull.x1],
          ] as const
        ).map(([fixedAt, attachedAt]) => ({
          fixedAt,
          attachedAt,
          y: middle,
          amplitude: 0.3 * reach,
          turns: 8,
          toScale: false,
        }))
      : [];
  const stops: Stop[] = [];
  const stopHeight = { y0: middle - 0.6 * reach, y1: middle + 0.6 * reach };
  const stopRect = (x0: number, x1: number): Rect[] => [{ x0, x1, ...stopHeight }];
  if (hull && lower !== null) stops.push({ side: 'lower', at: lower, rects: stopRect(frame.x0, hull.x0 + lower) });
  if (hull && upper !== null) stops.push({ side: 'upper', at: upper, rects: stopRect(hull.x1 + upper, frame.x1) });
  const clashes = body.outlines.flatMap((magnet) =>
    windings.flatMap(({ rect }) => overlap({ ...magnet, x0: rect.x0, x1: rect.x1 }, rect) ?? []),
  );
  const extent = hullOf([solid, ...walls]) ?? solid;
  return {
    moving: { ...body, hull, clash: clashes.length > 0 },
    fixed: { poles: [], arrows: [], outlines: [] },
    windings,
    bobbins: [],
    tube: [],
    walls,
    springs,
    stops,
    clashes,
    dimensions: dimensionsOf(device, extent),
    centreLine: false,
    plan: planOf(device),
    extent,
  };
}
