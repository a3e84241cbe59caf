import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { MemoryRouter, Route, Routes } from 'react-router-dom';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { DataTable } from '../../../src/ui/data-table';
import type { TableColumn } from '../../../src/ui/data-table';
import { EmptyState } from '../../../src/ui/empty-state';

interface Row {
  id: string;
  title: string;
  power: number | null;
  who: string;
}
const rows: Row[] = [
  { id: 'FN-002', title: 'Fan bearing', power: 1.5, who: 'Ilse Varga' },
  { id: 'FN-010', title: 'Pump side', power: null, who: 'Tomas Brandt' },
  { id: 'FN-001', title: '=Bogie, axle box', power: 0.2, who: 'Ane Solheim' },
];
const columns: TableColumn<Row>[] = [
  { id: 'number', title: 'Number', value: (row) => row.id },
  { id: 'title', title: 'Title', value: (row) => row.title },
  { id: 'power', title: 'Power', unit: 'mW', value: (row) => row.power },
  { id: 'who', title: 'Designer', value: (row) => row.who, hidden: true },
];

const draw = (shown: Row[] = rows) =>
  render(
    <MemoryRouter>
      <Routes>
        <Route
          path="/"
          element={
            <DataTable
              label="Designs"
              rows={shown}
              columns={columns}
              rowKey={(row) => row.id}
              rowLink={(row) => `/designs/${row.id}`}
              filterLabel="Find a design"
              empty={<EmptyState title="No designs yet." />}
            />
          }
        />
        <Route path="/designs/:id" element={<h1>A design</h1>} />
      </Routes>
    </MemoryRouter>,
  );

const numbers = () => screen.getAllByRole('link').map((link) => link.textContent);
const sortBy = (name: RegExp) => userEvent.click(within(screen.getByRole('table')).getByRole('button', { name }));

describe('DataTable', () => {
  it('sorts up and down, and keeps what is not there at the end', async () => {
    draw();
    await sortBy(/Power/);
    expect(numbers()).toEqual(['FN-001', 'FN-002', 'FN-010']);
    expect(screen.getByRole('columnheader', { name: /Power/ }).getAttribute('aria-sort')).toBe('ascending');
    await sortBy(/Power/);
    expect(numbers()).toEqual(['FN-002', 'FN-001', 'FN-010']);
    await sortBy(/Number/);
    expect(numbers()).toEqual(['FN-001', 'FN-002', 'FN-010']);
  });

  it('finds rows that hold all words, in any column, hidden ones too', async () => {
    draw();
    await userEvent.type(screen.getByRole('searchbox', { name: 'Find a design' }), 'brandt pump');
    expect(numbers()).toEqual(['FN-010']);
    expect(screen.getByText('1 of 3 rows')).toBeTruthy();
    await userEvent.keyboard('{Escape}');
    expect(numbers()).toHaveLength(3);
  });

  it('says that nothing matches and offers the way back', async () => {
    draw();
    await userEvent.type(screen.getByRole('searchbox'), 'zzz');
    expect(screen.getByText(/Nothing matches “zzz”/)).toBeTruthy();
    await userEvent.click(screen.getByRole('button', { name: 'Clear the filter' }));
    expect(numbers()).toHaveLength(3);
  });

  it('is one stop for Tab; arrow keys move between rows, Enter opens one', async () => {
    draw();
    const links = screen.getAllByRole('link');
    links[0]?.focus();
    await userEvent.keyboard('{ArrowDown}{ArrowDown}');
    expect(document.activeElement?.textContent).toBe('FN-001');
    await userEvent.keyboard('{Home}');
    expect(document.activeElement?.textContent).toBe('FN-002');
    expect(screen.getAllByRole('link').map((link) => link.tabIndex)).toEqual([0, -1, -1]);
    await userEvent.keyboard('{Enter}');
    expect(screen.getByRole('heading', { name: 'A design' })).toBeTruthy();
  });

  it('shows and hides columns and remembers the choice', async () => {
    const { unmount } = draw();
    expect(screen.queryByRole('columnheader', { name: 'Designer' })).toBeNull();
    await userEvent.click(screen.getByRole('button', { name: 'Choose columns' }));
    await userEvent.click(await screen.findByRole('menuitemcheckbox', { name: 'Designer' }));
    await userEvent.keyboard('{Escape}');
    unmount();
    draw();
    expect(screen.getByRole('columnheader', { name: /Designer/ })).toBeTruthy();
  });

  it('says what belongs here when there is nothing', () => {
    draw([]);
    expect(screen.getByText('No designs yet.')).toBeTruthy();
    expect(screen.queryByRole('table')).toBeNull();
  });

  describe('export', () => {
    let saved: Blob | undefined;
    beforeEach(() => {
      saved = undefined;
      vi.stubGlobal(
        'URL',
        Object.assign(URL, {
          createObjectURL: (blob: Blob) => {
            saved = blob;
            return '#saved';
          },
          revokeObjectURL: () => undefined,
        }),
      );
    });

    it('writes the visible columns of the rows as sorted, with units in the head', async () => {
      draw();
      await sortBy(/Number/);
      await userEvent.click(screen.getByRole('button', { name: 'Export as CSV' }));
      expect([...new Uint8Array((await saved?.arrayBuffer()) ?? [])].slice(0, 3)).toEqual([0xef, 0xbb, 0xbf]);
      expect(await saved?.text()).toBe(
        'Number,Title,Power / mW\r\nFN-001,"\'=Bogie, axle box",0.2\r\nFN-002,Fan bearing,1.5\r\nFN-010,Pump side,\r\n',
      );
    });
  });
});
