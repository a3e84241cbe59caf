import { defaultRole } from './plot-series';
import type { PlotProps, PlotSeries, SeriesRole } from './plot-series';
import { baseLayout, monoFace } from './plot-theme';
import type { PlotColours } from './plot-theme';

/** Data and layout as Plotly takes them. */
export interface PlotFigure {
  data: Record<string, unknown>[];
  layout: Record<string, unknown>;
}

const list = (values: ArrayLike<number | null>): (number | null)[] =>
  Array.from(values, (value) => (value === null || !Number.isFinite(value) ? null : value));

function lookOf(
  role: SeriesRole,
  colours: PlotColours,
  uncertainty: PlotSeries['uncertainty'],
): Record<string, unknown> {
  switch (role) {
    case 'predicted':
      return { mode: 'lines', line: { color: colours.ink, width: 1.8 } };
    case 'second':
      return { mode: 'lines', line: { color: colours.copper, width: 1.8 } };
    case 'third':
      return { mode: 'lines', line: { color: colours.verdigris, width: 1.8, dash: 'dot' } };
    case 'limit':
      return { mode: 'lines', line: { color: colours.cinnabar, width: 1.6, dash: 'dash' } };
    case 'measured':
      return {
        mode: 'markers',
        marker: { color: colours.copper, size: 8, symbol: 'diamond', line: { color: colours.sheet, width: 1 } },
        ...(uncertainty
          ? {
              error_y: {
                type: 'data',
                array: Array.from(uncertainty),
                color: colours.copper,
                thickness: 1.4,
                width: 5,
              },
            }
          : {}),
      };
  }
}

/** Turns a plot of this kit into Plotly's words. */
export function figureOf(plot: PlotProps, colours: PlotColours, xTitle: string, yTitle: string): PlotFigure {
  const base = baseLayout(colours);
  const hover = (unit: string) => `%{y:.4g}${unit === '' ? '' : ` ${unit}`}`;
  const titled = (key: 'xaxis' | 'yaxis', title: string, axis: PlotProps['x']) => ({
    ...(base[key] as object),
    title: { text: title, standoff: 8, font: { size: 13, color: colours.graphite } },
    ...(axis.logarithmic ? { type: 'log', dtick: 1 } : {}),
    ...(axis.range ? { range: axis.logarithmic ? axis.range.map(Math.log10) : [...axis.range] } : {}),
  });
  return {
    data: plot.series.map((series, index) => ({
      type: 'scatter',
      name: series.name,
      x: list(series.x),
      y: list(series.y),
      connectgaps: false,
      hovertemplate: hover(plot.y.unit),
      ...lookOf(series.role ?? defaultRole(index), colours, series.uncertainty),
    })),
    layout: {
      ...base,
      xaxis: {
        ...titled('xaxis', xTitle, plot.x),
        hoverformat: '.4g',
        unifiedhovertitle: { text: `%{x}${plot.x.unit === '' ? '' : ` ${plot.x.unit}`}` },
      },
      yaxis: titled('yaxis', yTitle, plot.y),
      ...(plot.band
        ? {
            shapes: [
              {
                type: 'rect',
                yref: 'paper',
                y0: 0,
                y1: 1,
                x0: plot.band.from,
                x1: plot.band.to,
                fillcolor: colours.copper,
                opacity: 0.1,
                line: { width: 0 },
                layer: 'below',
              },
            ],
            annotations: [
              {
                x: plot.band.to,
                y: 1,
                yref: 'paper',
                text: plot.band.label,
                showarrow: false,
                xanchor: 'left',
                yanchor: 'top',
                font: { family: monoFace, size: 11.5, color: colours.graphite },
              },
            ],
          }
        : {}),
    },
  };
}
