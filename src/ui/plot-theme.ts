/** Colours and faces of the page, as Plotly wants them: it knows no CSS variables. */
export interface PlotColours {
  paper: string;
  sheet: string;
  ink: string;
  graphite: string;
  rule: string;
  copper: string;
  verdigris: string;
  amber: string;
  cinnabar: string;
}

export function readPlotColours(): PlotColours {
  const style = getComputedStyle(document.documentElement);
  const read = (name: string) => style.getPropertyValue(`--${name}`).trim() || '#000000';
  return {
    paper: read('paper'),
    sheet: read('sheet'),
    ink: read('ink'),
    graphite: read('graphite'),
    rule: read('rule'),
    copper: read('copper'),
    verdigris: read('verdigris'),
    amber: read('amber'),
    cinnabar: read('cinnabar'),
  };
}

const textFace = '"Atkinson Hyperlegible Next Variable", system-ui, sans-serif';
export const monoFace = '"Atkinson Hyperlegible Mono Variable", ui-monospace, monospace';

/** Layout that every plot starts from. */
export function baseLayout(colours: PlotColours): Record<string, unknown> {
  const axis = {
    gridcolor: colours.rule,
    gridwidth: 1,
    zerolinecolor: colours.graphite,
    zerolinewidth: 1,
    linecolor: colours.graphite,
    tickcolor: colours.graphite,
    tickfont: { family: monoFace, size: 12, color: colours.graphite },
    automargin: true,
    exponentformat: 'power',
    separatethousands: false,
  };
  return {
    paper_bgcolor: 'rgba(0,0,0,0)',
    plot_bgcolor: 'rgba(0,0,0,0)',
    font: { family: textFace, size: 13, color: colours.ink },
    margin: { l: 52, r: 14, t: 10, b: 42 },
    hovermode: 'x unified',
    hoverlabel: {
      bgcolor: colours.sheet,
      bordercolor: colours.graphite,
      font: { family: monoFace, size: 12.5, color: colours.ink },
    },
    dragmode: 'zoom',
    showlegend: false,
    xaxis: { ...axis, showgrid: false, ticks: 'outside', ticklen: 4, showline: true },
    yaxis: { ...axis, ticks: '' },
  };
}
