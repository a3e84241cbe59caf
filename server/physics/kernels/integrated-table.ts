import { gaussLegendre } from './gauss-legendre';
import { integratedSeries, legendreSeries, legendreSeriesAt } from './legendre-series';

/** A function known by its third derivative, tabulated outwards from zero where it is asked for. */
export interface IntegratedTable {
  /** Writes the function and its first three derivatives at x ≥ 0 into out[0..3]. */
  allAt(x: number, out: Float64Array): void;
}

interface Panel {
  readonly from: number;
  readonly length: number;
  /** Function, first, second, third derivative. */
  readonly series: readonly [Float64Array, Float64Array, Float64Array, Float64Array];
}

const POINTS = 16;
const MOST_PANELS = 20000;

/**
 * Builds a function from its third derivative, for where that is cheap and the function itself is dear.
 *
 * The third derivative is interpolated at the Gauss points of each panel and integrated three times exactly; what is
 * carried from panel to panel therefore has the order of Gauss quadrature (twice that of the interpolation). A panel
 * depends only on the ones nearer to zero, so the answer does not depend on what was asked before.
 *
 * @param third third derivative at x
 * @param start function, first and second derivative at zero
 * @param panelLength length of a panel that begins at x, positive: about the distance to the nearest singular point
 * @throws RangeError where x is negative or not finite, or too far for 20,000 panels
 */
export function integratedTable(
  third: (x: number) => number,
  start: readonly [number, number, number],
  panelLength: (x: number) => number,
): IntegratedTable {
  const panels: Panel[] = [];
  let end = 0;
  let atEnd: readonly [number, number, number] = start;
  const { nodes } = gaussLegendre(POINTS);
  const values = new Float64Array(POINTS);

  const extend = (): void => {
    const length = panelLength(end);
    const half = 0.5 * length;
    for (let i = 0; i < POINTS; i++) values[i] = third(end + half * (1 + nodes[i]!));
    const s3 = legendreSeries(values);
    const s2 = integratedSeries(s3, half, atEnd[2]);
    const s1 = integratedSeries(s2, half, atEnd[1]);
    const s0 = integratedSeries(s1, half, atEnd[0]);
    panels.push({ from: end, length, series: [s0, s1, s2, s3] });
    atEnd = [legendreSeriesAt(s0, 1), legendreSeriesAt(s1, 1), legendreSeriesAt(s2, 1)];
    end += length;
  };
  const panelAt = (x: number): Panel => {
    let low = 0;
    let high = panels.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (panels[middle]!.from <= x) low = middle;
      else high = middle - 1;
    }
    return panels[low]!;
  };
  return {
    allAt: (x, out) => {
      if (!(x >= 0) || !Number.isFinite(x)) throw new RangeError(`x must be zero or positive and finite, got ${x}`);
      while (end <= x) {
        if (panels.length >= MOST_PANELS) throw new RangeError(`x must be within ${end}, got ${x}`);
        extend();
      }
      const { from, length, series } = panelAt(x);
      const t = (2 * (x - from)) / length - 1;
      for (let k = 0; k < 4; k++) out[k] = legendreSeriesAt(series[k as 0 | 1 | 2 | 3], t);
    },
  };
}
