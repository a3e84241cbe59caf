/** What a table is made from, at one abscissa: integral (up to a constant), value, slope and curvature, in that order. */
export type HermiteSample = (x: number, out: Float64Array) => void;

/** A function on [from, to] as a piecewise quintic that is twice continuously differentiable. */
export interface HermiteTable {
  readonly from: number;
  readonly to: number;
  /** Largest magnitude of the value met while building. */
  readonly peak: number;
  /** Number of panels. */
  readonly panels: number;
  valueAt(x: number): number;
  slopeAt(x: number): number;
  integralAt(x: number): number;
  /** Writes integral, value, slope and curvature at x into out[0..3]. */
  allAt(x: number, out: Float64Array): void;
}

export interface HermiteTableOptions {
  /** Error allowed, relative to the largest value. */
  readonly tolerance: number;
  /** Magnitude that stands for the largest value, where the caller knows a better one than this range shows. */
  readonly scale?: number;
  /** Places inside the range where the function turns sharply; panels begin there. */
  readonly breaks?: readonly number[];
  /** Panels to begin with, before any is halved. */
  readonly firstPanels?: number;
}

const MOST_PANELS = 8192;
const DEEPEST = 40;

interface Node {
  readonly x: number;
  readonly sample: Float64Array;
}

/**
 * Tabulates a function by quintic Hermite panels, halved until the quintic meets the function in the middle of the
 * panel to the tolerance.
 *
 * @param sampleAt writes integral, value, slope and curvature at x
 * @param from, to range, from < to; outside it the end panels are extended, which callers should not rely on
 * @returns the table; its `integralAt` is the exact integral of `valueAt` within each panel and passes through the
 *   sampled integral at each panel's start
 * @throws RangeError where the range is empty or not finite, or a sample is not finite
 * Order: the error falls with the sixth power of the panel (value), the fifth (slope).
 */
export function hermiteTable(
  sampleAt: HermiteSample,
  from: number,
  to: number,
  options: HermiteTableOptions,
): HermiteTable {
  if (!(to > from) || !Number.isFinite(from) || !Number.isFinite(to)) {
    throw new RangeError(`range must be finite and rising, got ${from} to ${to}`);
  }
  const take = (x: number): Node => {
    const sample = new Float64Array(4);
    sampleAt(x, sample);
    if (!sample.every(Number.isFinite)) throw new RangeError(`function must be finite in the range, is not at ${x}`);
    return { x, sample };
  };
  const edges = firstEdges(from, to, options);
  const first = edges.map(take);
  const middles = first.slice(1).map((node, i) => take(0.5 * (first[i]!.x + node.x)));
  let peak = 0;
  for (const node of [...first, ...middles]) peak = Math.max(peak, Math.abs(node.sample[1]!));
  const allowed = options.tolerance * (options.scale ?? peak);

  const nodes: Node[] = [first[0]!];
  const refine = (left: Node, middle: Node, right: Node, depth: number): void => {
    peak = Math.max(peak, Math.abs(middle.sample[1]!));
    if (missAtMiddle(left, middle, right) > allowed && depth < DEEPEST && nodes.length < MOST_PANELS) {
      refine(left, take(0.5 * (left.x + middle.x)), middle, depth + 1);
      refine(middle, take(0.5 * (middle.x + right.x)), right, depth + 1);
    } else nodes.push(right);
  };
  for (let i = 1; i < first.length; i++) refine(first[i - 1]!, middles[i - 1]!, first[i]!, 0);
  return fromNodes(nodes, peak);
}

function firstEdges(from: number, to: number, options: HermiteTableOptions): number[] {
  const count = options.firstPanels ?? 8;
  const closest = (1e-9 * (to - from)) / count;
  const all = [...(options.breaks ?? []).filter((x) => x > from + closest && x < to - closest), from, to];
  for (let i = 1; i < count; i++) all.push(from + ((to - from) * i) / count);
  all.sort((p, q) => p - q);
  return all.filter((x, i) => i === 0 || x - all[i - 1]! > closest);
}

/**
 * How far the quintic over [left, right] is off, judged in its middle. The value alone would be blind where the function
 * is odd about the middle: the slope's miss is added, turned into the largest miss of a value that goes with it
 * (error e t³(1 − t)³(t − ½): 0.12 h per unit of slope).
 */
function missAtMiddle(left: Node, middle: Node, right: Node): number {
  const h = right.x - left.x;
  const y0 = left.sample[1]!;
  const y1 = right.sample[1]!;
  const s0 = left.sample[2]!;
  const s1 = right.sample[2]!;
  const k0 = left.sample[3]!;
  const k1 = right.sample[3]!;
  const value = 0.5 * (y0 + y1) + (5 / 32) * h * (s0 - s1) + (h * h * (k0 + k1)) / 64;
  const slope = (1.875 * (y1 - y0)) / h - 0.4375 * (s0 + s1) + (h * (k1 - k0)) / 32;
  return Math.abs(value - middle.sample[1]!) + 0.12 * h * Math.abs(slope - middle.sample[2]!);
}

/** Coefficients of the quintic in t = (x − x0)/h. */
function fromNodes(nodes: readonly Node[], peak: number): HermiteTable {
  const panels = nodes.length - 1;
  const edge = Float64Array.from(nodes, (node) => node.x);
  const inverse = new Float64Array(panels);
  const start = new Float64Array(panels);
  const c = new Float64Array(6 * panels);
  for (let i = 0; i < panels; i++) {
    const left = nodes[i]!;
    const right = nodes[i + 1]!;
    const h = right.x - left.x;
    const y0 = left.sample[1]!;
    const d0 = h * left.sample[2]!;
    const e0 = 0.5 * h * h * left.sample[3]!;
    const rise = right.sample[1]! - y0;
    const d1 = h * right.sample[2]!;
    const e1 = 0.5 * h * h * right.sample[3]!;
    inverse[i] = 1 / h;
    start[i] = left.sample[0]!;
    c[6 * i] = y0;
    c[6 * i + 1] = d0;
    c[6 * i + 2] = e0;
    c[6 * i + 3] = 10 * rise - 6 * d0 - 4 * d1 - 3 * e0 + e1;
    c[6 * i + 4] = -15 * rise + 8 * d0 + 7 * d1 + 3 * e0 - 2 * e1;
    c[6 * i + 5] = 6 * rise - 3 * (d0 + d1) - e0 + e1;
  }
  const from = edge[0]!;
  const to = edge[panels]!;
  const { bucket, perLength } = bucketsOf(edge);
  const lastBucket = bucket.length - 1;
  const panelAt = (x: number): number => {
    const k = (x - from) * perLength;
    let i = bucket[k > 0 ? (k < lastBucket ? k | 0 : lastBucket) : 0]!;
    while (i < panels - 1 && x >= edge[i + 1]!) i++;
    return i;
  };
  const integralAt = (x: number): number => {
    const i = panelAt(x);
    const h = 1 / inverse[i]!;
    const t = (x - edge[i]!) * inverse[i]!;
    const j = 6 * i;
    const mean =
      c[j]! +
      t * (c[j + 1]! / 2 + t * (c[j + 2]! / 3 + t * (c[j + 3]! / 4 + t * (c[j + 4]! / 5 + (t * c[j + 5]!) / 6))));
    return start[i]! + h * t * mean;
  };
  return {
    from,
    to,
    peak,
    panels,
    integralAt,
    allAt: (x, out) => {
      const i = panelAt(x);
      const k = inverse[i]!;
      const t = (x - edge[i]!) * k;
      const j = 6 * i;
      out[0] = integralAt(x);
      out[1] = c[j]! + t * (c[j + 1]! + t * (c[j + 2]! + t * (c[j + 3]! + t * (c[j + 4]! + t * c[j + 5]!))));
      out[2] = k * (c[j + 1]! + t * (2 * c[j + 2]! + t * (3 * c[j + 3]! + t * (4 * c[j + 4]! + t * 5 * c[j + 5]!))));
      out[3] = k * k * (2 * c[j + 2]! + t * (6 * c[j + 3]! + t * (12 * c[j + 4]! + t * 20 * c[j + 5]!)));
    },
    valueAt: (x) => {
      const i = panelAt(x);
      const t = (x - edge[i]!) * inverse[i]!;
      const j = 6 * i;
      return c[j]! + t * (c[j + 1]! + t * (c[j + 2]! + t * (c[j + 3]! + t * (c[j + 4]! + t * c[j + 5]!))));
    },
    slopeAt: (x) => {
      const i = panelAt(x);
      const t = (x - edge[i]!) * inverse[i]!;
      const j = 6 * i;
      return (
        inverse[i]! * (c[j + 1]! + t * (2 * c[j + 2]! + t * (3 * c[j + 3]! + t * (4 * c[j + 4]! + t * 5 * c[j + 5]!))))
      );
    },
  };
}

/** First panel of each of a power of two equal parts of the range, so that a look-up rarely steps more than once. */
function bucketsOf(edge: Float64Array): { bucket: Int32Array; perLength: number } {
  const panels = edge.length - 1;
  const from = edge[0]!;
  const range = edge[panels]! - from;
  let count = 16;
  while (count < 4 * panels) count *= 2;
  const bucket = new Int32Array(count);
  let i = 0;
  for (let k = 0; k < count; k++) {
    const x = from + (range * k) / count;
    while (i < panels - 1 && edge[i + 1]! <= x) i++;
    bucket[k] = i;
  }
  return { bucket, perLength: count / range };
}
