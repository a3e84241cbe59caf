import { Download } from 'lucide-react';
import { lazy, Suspense, useId, useMemo, useRef } from 'react';
import { csvOf } from '../lib/csv';
import { downloadCsv } from '../lib/download';
import { useTheme } from '../lib/theme';
import { formatNumber } from '../lib/format';
import { IconButton } from './button';
import { classNames } from './class-names';
import { ErrorBoundary } from './error-boundary';
import { Menu } from './menu';
import { Pending } from './pending';
import { figureOf } from './plot-figure';
import { defaultRole } from './plot-series';
import type { PlotAxis, PlotProps, PlotSeries, SeriesRole } from './plot-series';
import { readPlotColours } from './plot-theme';

export type { PlotAxis, PlotProps, PlotSeries } from './plot-series';

const PlotDrawing = lazy(() => import('./plot-drawing'));

const axisTitle = ({ quantity, unit }: PlotAxis) => (unit === '' ? quantity : `${quantity} / ${unit}`);
const fileName = (title: string) =>
  title
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-|-$/g, '');

/** Rows of the text alternative: enough to read a curve by, all of a short series. */
const tableRows = 25;

/** The one plot: theme, units, hover, export, and the same in words and figures. */
export function Plot(props: PlotProps) {
  const { title, summary, x, y, series, height = 260, stale, className } = props;
  const { theme } = useTheme();
  const graph = useRef<HTMLElement | null>(null);
  const captionId = useId();
  const drawn = useMemo(() => series.slice(0, 4), [series]);
  const figure = useMemo(() => {
    // The colours are read from the page and change with the theme.
    void theme;
    return figureOf({ ...props, series: drawn }, readPlotColours(), axisTitle(x), axisTitle(y));
    // eslint-disable-next-line react-hooks/exhaustive-deps -- the figure depends on these parts of props only
  }, [
    theme,
    drawn,
    x.quantity,
    x.unit,
    x.logarithmic,
    x.range,
    y.quantity,
    y.unit,
    y.logarithmic,
    y.range,
    props.band,
    height,
  ]);

  const saveImage = (format: 'png' | 'svg') => {
    if (graph.current)
      void import('./plot-drawing').then(({ saveImage: save }) =>
        save(graph.current, format, fileName(title), readPlotColours()),
      );
  };
  const saveCsv = () => downloadCsv(fileName(title), csvOf(...tableOf(x, y, drawn, Infinity)));

  return (
    <figure aria-labelledby={captionId} className={classNames('flex flex-col', className)}>
      <figcaption id={captionId} className="sr-only">
        {title}. {summary}
      </figcaption>
      <div aria-hidden className={classNames('relative', stale && 'grayscale')} style={{ height }} data-plot={title}>
        <ErrorBoundary fallback={<p className="text-graphite">The plot could not be drawn; its figures are below.</p>}>
          <Suspense fallback={<Pending label="Drawing the plot" lines={5} className="p-4" />}>
            <PlotDrawing figure={figure} height={height} onReady={(element) => (graph.current = element)} />
          </Suspense>
        </ErrorBoundary>
      </div>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-1 pt-1 text-sm">
        {drawn.map((each, index) => (
          <span key={each.name} className="inline-flex items-center gap-1.5">
            <LegendMark role={each.role ?? defaultRole(index)} />
            {each.name}
          </span>
        ))}
        {stale ? <span className="text-amber">of the previous input</span> : null}
        <span className="ml-auto">
          <Menu
            label={`Save “${title}”`}
            trigger={<IconButton icon={Download} size="small" label="Save this plot" />}
            groups={[
              {
                id: 'save',
                items: [
                  { id: 'png', label: 'Picture (PNG)', onAction: () => saveImage('png') },
                  { id: 'svg', label: 'Drawing (SVG)', onAction: () => saveImage('svg') },
                  { id: 'csv', label: 'Figures (CSV)', onAction: saveCsv },
                ],
              },
            ]}
          />
        </span>
      </div>
      <PlotInWords {...{ title, summary, x, y }} series={drawn} />
    </figure>
  );
}

function LegendMark({ role }: { role: SeriesRole }) {
  const dash = role === 'limit' ? '5 3' : role === 'third' ? '2 2.5' : undefined;
  const colour = {
    predicted: 'text-ink',
    second: 'text-copper',
    third: 'text-verdigris',
    measured: 'text-copper',
    limit: 'text-cinnabar',
  }[role];
  return (
    <svg viewBox="0 0 18 10" className={classNames('h-2.5 w-4.5 stroke-current', colour)} aria-hidden>
      {role === 'measured' ? (
        <path d="M9 1 V9 M6.5 1 H11.5 M6.5 9 H11.5 M6 5 H12" strokeWidth={1.6} fill="none" />
      ) : (
        <path d="M1 5 H17" strokeWidth={2} strokeDasharray={dash} fill="none" />
      )}
    </svg>
  );
}

/** Heads and rows of all series: one column of x where they share it, else one per series. */
function tableOf(
  x: PlotAxis,
  y: PlotAxis,
  series: readonly PlotSeries[],
  most: number,
): [string[], (number | null)[][]] {
  const [first] = series;
  if (!first) return [[axisTitle(x)], []];
  const shared = series.every(
    (each) =>
      each.x === first.x ||
      (each.x.length === first.x.length && Array.from(each.x).every((value, at) => value === first.x[at])),
  );
  const length = Math.max(...series.map((each) => each.x.length));
  const step = Math.max(1, Math.ceil(length / most));
  const rows = Array.from({ length: Math.ceil(length / step) }, (_, row) => row * step);
  const finite = (value: number | null | undefined) =>
    value === null || value === undefined || !Number.isFinite(value) ? null : value;
  const yHead = (each: PlotSeries) => `${each.name}${y.unit === '' ? '' : ` / ${y.unit}`}`;
  if (shared)
    return [
      [axisTitle(x), ...series.map(yHead)],
      rows.map((at) => [finite(first.x[at]), ...series.map((each) => finite(each.y[at]))]),
    ];
  return [
    series.flatMap((each) => [`${axisTitle(x)} (${each.name})`, yHead(each)]),
    rows.map((at) => series.flatMap((each) => [finite(each.x[at]), finite(each.y[at])])),
  ];
}

function PlotInWords({ title, summary, x, y, series }: Pick<PlotProps, 'title' | 'summary' | 'x' | 'y' | 'series'>) {
  const [heads, rows] = tableOf(x, y, series, tableRows);
  return (
    <details className="text-sm" data-no-print>
      <summary className="text-graphite hover:text-ink">In words and figures</summary>
      <p className="max-w-prose py-2">{summary}</p>
      <div className="max-h-64 overflow-auto" tabIndex={0} role="region" aria-label={`Figures of ${title}`}>
        <table className="font-mono">
          <thead>
            <tr>
              {heads.map((head) => (
                <th
                  key={head}
                  scope="col"
                  className="sticky top-0 bg-sheet px-2 py-1 text-right font-sans font-semibold"
                >
                  {head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((row, at) => (
              <tr key={at} className="border-t border-rule">
                {row.map((value, column) => (
                  <td key={column} className="px-2 py-0.5 text-right">
                    {value === null ? 'not computed' : formatNumber(value, 4)}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}
