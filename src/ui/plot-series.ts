/** Predicted: line in ink; measured: marks in copper with bars; limit: dashed cinnabar; the rest tells more lines apart. */
export type SeriesRole = 'predicted' | 'second' | 'third' | 'measured' | 'limit';

export interface PlotSeries {
  name: string;
  x: ArrayLike<number>;
  /** NaN and null leave a gap: a figure that was not computed is not drawn. */
  y: ArrayLike<number | null>;
  role?: SeriesRole;
  /** Half-width of the uncertainty bar of each point (measured). */
  uncertainty?: ArrayLike<number>;
}

export interface PlotAxis {
  quantity: string;
  /** '' for pure numbers. */
  unit: string;
  logarithmic?: boolean;
  range?: readonly [number, number];
}

export interface PlotProps {
  /** What is plotted; names the picture and its files. */
  title: string;
  /** The picture in a sentence, for those who do not see it: what it shows and where it peaks. */
  summary: string;
  x: PlotAxis;
  y: PlotAxis;
  /** At most four; more belong in another plot. */
  series: readonly PlotSeries[];
  height?: number;
  /** A band over x with words, such as the estimated travel. */
  band?: { from: number; to: number; label: string };
  /** Computed from an earlier state of what is on the page. */
  stale?: boolean;
  className?: string;
}

/** The look of a series that does not say what it is. */
export const defaultRole = (index: number): SeriesRole =>
  (['predicted', 'second', 'third', 'measured'] as const)[index] ?? 'third';
