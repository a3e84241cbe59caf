import { render, screen, within } from '@testing-library/react';
import { describe, expect, it, vi } from 'vitest';
import { Plot } from '../../../src/ui/plot';
import { figureOf } from '../../../src/ui/plot-figure';
import { readPlotColours } from '../../../src/ui/plot-theme';

vi.mock('../../../src/ui/plot-drawing', () => ({ default: () => <span>drawn</span> }));

const plot = {
  title: 'Response',
  summary: 'Power peaks at 1.30 mW at 50 Hz.',
  x: { quantity: 'frequency', unit: 'Hz' },
  y: { quantity: 'power', unit: 'mW' },
  series: [
    { name: 'estimate', x: [49, 50, 51], y: [0.1, 1.3, null] },
    { name: 'measured', x: [50], y: [1.25], role: 'measured' as const, uncertainty: [0.06] },
  ],
};

describe('Plot', () => {
  it('says in words and figures what it shows, and what was not computed', async () => {
    render(<Plot {...plot} series={plot.series.slice(0, 1)} />);
    await screen.findByText('drawn');
    expect(screen.getByRole('figure').textContent).toContain('Power peaks at 1.30 mW at 50 Hz.');
    const table = screen.getByRole('table', { hidden: true });
    expect(
      within(table)
        .getAllByRole('columnheader', { hidden: true })
        .map((head) => head.textContent),
    ).toEqual(['frequency / Hz', 'estimate / mW']);
    expect(
      within(table)
        .getAllByRole('cell', { hidden: true })
        .map((cell) => cell.textContent),
    ).toEqual(['49.00', '0.1000', '50.00', '1.300', '51.00', 'not computed']);
  });

  it('draws predicted as a line, measured as marks with bars, and titles axes as quantity / unit', () => {
    const { data, layout } = figureOf(plot, readPlotColours(), 'frequency / Hz', 'power / mW');
    expect(data[0]).toMatchObject({ mode: 'lines', y: [0.1, 1.3, null], connectgaps: false });
    expect(data[1]).toMatchObject({ mode: 'markers', error_y: { array: [0.06] } });
    expect(layout).toMatchObject({
      xaxis: { title: { text: 'frequency / Hz' } },
      yaxis: { title: { text: 'power / mW' } },
    });
  });
});
