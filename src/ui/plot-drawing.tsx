import Plotly from 'plotly.js-dist-min';
import createPlot from 'react-plotly.js/factory';
import type { PlotFigure } from './plot-figure';
import type { PlotColours } from './plot-theme';

/** Everything of Plotly, in a chunk of its own that only pages with plots load. */
const PlotlyPlot = createPlot(Plotly);

const config = { displayModeBar: false, responsive: true, doubleClick: 'reset', showTips: false };

interface PlotDrawingProps {
  figure: PlotFigure;
  height: number;
  onReady: (element: HTMLElement) => void;
}

export default function PlotDrawing({ figure, height, onReady }: PlotDrawingProps) {
  return (
    <PlotlyPlot
      data={figure.data}
      layout={{ ...figure.layout, height, autosize: true }}
      config={config}
      useResizeHandler
      style={{ width: '100%', height }}
      onInitialized={(_figure, element) => onReady(element)}
    />
  );
}

/** Saves the picture on the page's own ground, large enough for a report. */
export async function saveImage(
  element: HTMLElement | null,
  format: 'png' | 'svg',
  filename: string,
  colours: PlotColours,
): Promise<void> {
  if (!element) return;
  const width = element.clientWidth || 800;
  const height = element.clientHeight || 400;
  const { data, layout } = element as unknown as PlotFigure;
  await Plotly.downloadImage(
    { data, layout: { ...layout, paper_bgcolor: colours.sheet, plot_bgcolor: colours.sheet } },
    { format, filename, width, height, scale: format === 'png' ? 3 : 1 },
  );
}
