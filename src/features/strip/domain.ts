import type { StripDevice } from './device';
import type { Drawing } from './drawing';

/** Stretch of the position axis that the strip shows, mm. Drawing and curves share it. */
export interface Domain {
  from: number;
  to: number;
}

/** 1, 2 or 5 times a power of ten, at or above `size`. */
export function niceStep(size: number): number {
  if (!(size > 0) || !Number.isFinite(size)) return 1;
  const power = 10 ** Math.floor(Math.log10(size));
  const lead = size / power;
  return power * (lead <= 1 ? 1 : lead <= 2 ? 2 : lead <= 5 ? 5 : 10);
}

/** Round values inside a stretch, about `count` of them. */
export function ticksOf(from: number, to: number, count: number): number[] {
  if (!(to > from) || !Number.isFinite(from) || !Number.isFinite(to)) return [];
  const step = niceStep(((to - from) / Math.max(1, count)) * 0.8);
  const first = Math.ceil(from / step - 1e-9);
  const last = Math.floor(to / step + 1e-9);
  return Array.from({ length: Math.min(200, last - first + 1) }, (_, index) =>
    Number(((first + index) * step).toPrecision(12)),
  );
}

/** Travel over which each magnet meets each coil: there the curves have their shape. */
function meetings(device: StripDevice): [number, number][] {
  if (device.layout === 'through') {
    return device.coils.flatMap((coil) =>
      device.magnets.map((magnet): [number, number] => {
        const centre = coil.at - magnet.at;
        const reach = (coil.length + magnet.length) / 2 + 0.9 * Math.max(coil.outerRadius, magnet.outerRadius);
        return [centre - reach, centre + reach];
      }),
    );
  }
  return device.coils.flatMap((coil) =>
    device.magnets.map((magnet): [number, number] => {
      const centre = coil.at[0] - magnet.at[0];
      const reach = coil.outer[0] + magnet.size[0] / 2 + 0.5 * Math.abs(magnet.at[2] - coil.at[2]);
      return [centre - reach, centre + reach];
    }),
  );
}

/** Least width of the shown stretch over the drawn height: keeps the drawing from growing taller than a page. */
const leastAspect = 2.2;

/**
 * The stretch that shows the whole drawing and the whole shape of the curves, rounded outwards so that it does not creep while
 * a dimension is typed.
 */
export function domainOf(device: StripDevice, drawing: Drawing): Domain {
  const { extent } = drawing;
  const height = extent.y1 - extent.y0 + (drawing.plan ? drawing.plan.y1 - drawing.plan.y0 : 0);
  const meets = meetings(device);
  let from = Math.min(extent.x0, ...meets.map(([start]) => start));
  let to = Math.max(extent.x1, ...meets.map(([, end]) => end));
  // The device stays near the middle of the picture, even where the curves reach further to one side.
  const middle = (extent.x0 + extent.x1) / 2;
  const reach = 0.75 * Math.max(middle - from, to - middle);
  from = Math.min(from, middle - reach);
  to = Math.max(to, middle + reach);
  const pad = 0.03 * (to - from);
  from -= pad;
  to += pad;
  const short = leastAspect * height - (to - from);
  if (short > 0) {
    from -= short / 2;
    to += short / 2;
  }
  const step = niceStep((to - from) / 40);
  return { from: Math.floor(from / step + 1e-9) * step, to: Math.ceil(to / step - 1e-9) * step };
}

/** The stretch without what neither the drawing nor a curve that was computed over less of it would fill. */
export function tightened({ from, to }: Domain, { extent }: Drawing, position: readonly number[]): Domain {
  const [first = from, last = to] = [position[0], position[position.length - 1]];
  const pad = 0.02 * (to - from);
  return { from: Math.max(from, Math.min(first, extent.x0 - pad)), to: Math.min(to, Math.max(last, extent.x1 + pad)) };
}

/** Positions at which the estimate is asked for its curve, in metres and rising. */
export function positionsOf({ from, to }: Domain, count = 201): number[] {
  return Array.from({ length: count }, (_, index) =>
    Number(((from + ((to - from) * index) / (count - 1)) / 1000).toPrecision(10)),
  );
}
