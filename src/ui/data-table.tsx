import {
  columnVisibilityFeature,
  createColumnHelper,
  createSortedRowModel,
  rowSortingFeature,
  tableFeatures,
  useTable,
} from '@tanstack/react-table';
import { useMemo, useRef, useState } from 'react';
import type { KeyboardEvent, ReactNode } from 'react';
import { csvOf } from '../lib/csv';
import { downloadCsv } from '../lib/download';
import { Button } from './button';
import { textOf } from './data-table-column';
import type { CellValue, TableColumn } from './data-table-column';
import { HeaderCell, TableRow } from './data-table-parts';
import { TableToolbar } from './data-table-toolbar';
import { EmptyState } from './empty-state';

export type { TableColumn } from './data-table-column';

export interface DataTableProps<Row> {
  /** What the rows are: “Briefs”. Names the table for screen readers, its file, and its remembered columns. */
  label: string;
  rows: readonly Row[];
  columns: readonly TableColumn<Row>[];
  rowKey: (row: Row) => string;
  /** Where a row leads; the first column becomes the link. */
  rowLink?: ((row: Row) => string) | undefined;
  /** Words of the filter: “Find a brief”. Left out, there is no filter. */
  filterLabel?: string;
  initialSort?: { column: string; descending?: boolean };
  /** Drawn in place of the table when there are no rows at all. */
  empty?: ReactNode;
  /** Further controls beside the filter. */
  toolbar?: ReactNode;
  /** Leaves out filter, columns and export, for a short table inside a page. */
  plain?: boolean;
}

/** Rows drawn at first: more only on demand, so that a long audit trail opens at once. */
const firstRows = 200;

const features = tableFeatures({
  rowSortingFeature,
  columnVisibilityFeature,
  sortedRowModel: createSortedRowModel(),
});

const collator = new Intl.Collator('en-GB', { numeric: true, sensitivity: 'base' });

/** Ascending order of cell values; what is not there goes last (see sortUndefined). */
function compare(a: CellValue, b: CellValue): number {
  if (typeof a === 'number' && typeof b === 'number') return a - b;
  return collator.compare(String(a ?? ''), String(b ?? ''));
}

function useRemembered(label: string): [Record<string, boolean>, (next: Record<string, boolean>) => void] {
  const key = `tremolode.columns.${label.toLowerCase().replaceAll(' ', '-')}`;
  const [columns, setColumns] = useState<Record<string, boolean>>(() => {
    try {
      const stored: unknown = JSON.parse(window.localStorage.getItem(key) ?? '{}');
      return typeof stored === 'object' && stored !== null ? (stored as Record<string, boolean>) : {};
    } catch {
      return {};
    }
  });
  const remember = (next: Record<string, boolean>) => {
    setColumns(next);
    try {
      window.localStorage.setItem(key, JSON.stringify(next));
    } catch {
      // Not remembered where storage is forbidden.
    }
  };
  return [columns, remember];
}

/** The one table: sorts, filters, lets choose columns, moves by arrow keys, exports, stacks on small screens. */
export function DataTable<Row extends object>(props: DataTableProps<Row>) {
  const { label, rows, columns, rowKey, rowLink, filterLabel, initialSort, empty, toolbar, plain } = props;
  const [filter, setFilter] = useState('');
  const [limit, setLimit] = useState(firstRows);
  const [chosen, setChosen] = useRemembered(label);
  const [active, setActive] = useState(0);
  const body = useRef<HTMLTableSectionElement>(null);

  const definitions = useMemo(() => {
    const helper = createColumnHelper<typeof features, Row>();
    return helper.columns(
      columns.map((column) =>
        helper.accessor((row) => column.value(row) ?? undefined, {
          id: column.id,
          header: column.title,
          enableSorting: !column.unsortable,
          sortUndefined: 'last',
          sortDescFirst: false,
          sortFn: (a, b) => compare(column.value(a.original), column.value(b.original)),
        }),
      ),
    );
  }, [columns]);

  const found = useMemo(() => {
    const words = filter.toLowerCase().split(/\s+/).filter(Boolean);
    if (words.length === 0) return rows;
    return rows.filter((row) => {
      const text = columns
        .map((column) => textOf(column.value(row)))
        .join(' ')
        .toLowerCase();
      return words.every((word) => text.includes(word));
    });
  }, [rows, columns, filter]);

  const visibility = useMemo(
    () => Object.fromEntries(columns.map((column) => [column.id, chosen[column.id] ?? !column.hidden])),
    [columns, chosen],
  );
  const [sorting, setSorting] = useState(() =>
    initialSort ? [{ id: initialSort.column, desc: initialSort.descending ?? false }] : [],
  );
  const table = useTable({
    features,
    columns: definitions,
    data: found as Row[],
    getRowId: rowKey,
    state: { sorting, columnVisibility: visibility },
    onSortingChange: setSorting,
    enableMultiSort: true,
  });

  if (rows.length === 0 && empty !== undefined) return <>{empty}</>;

  const byId = new Map(columns.map((column) => [column.id, column]));
  const shown = table.getVisibleLeafColumns().flatMap(({ id }) => byId.get(id) ?? []);
  const sorted = table.getRowModel().rows;
  const drawn = sorted.slice(0, limit);
  const current = Math.min(active, Math.max(0, drawn.length - 1));
  const numeric = new Set(
    columns
      .filter(
        (column) =>
          column.align === 'end' ||
          (column.align === undefined && rows.some((row) => typeof column.value(row) === 'number')),
      )
      .map(({ id }) => id),
  );

  const moveTo = (index: number) => {
    const next = Math.max(0, Math.min(drawn.length - 1, index));
    setActive(next);
    body.current?.querySelector<HTMLElement>(`[data-row-focus="${next}"]`)?.focus();
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (!(event.target as HTMLElement).hasAttribute('data-row-focus') || event.altKey || event.ctrlKey || event.metaKey)
      return;
    const steps: Record<string, number> = {
      ArrowDown: 1,
      ArrowUp: -1,
      PageDown: 10,
      PageUp: -10,
      Home: -Infinity,
      End: Infinity,
    };
    const step = steps[event.key];
    if (step === undefined) return;
    event.preventDefault();
    moveTo(current + step);
  };

  const exportCsv = () => {
    const kept = shown.filter((column) => !column.unexported);
    downloadCsv(
      label.toLowerCase().replaceAll(' ', '-'),
      csvOf(
        kept.map(({ title, unit }) => (unit ? `${title} / ${unit}` : title)),
        sorted.map((row) => kept.map((column) => column.value(row.original))),
      ),
    );
  };

  return (
    <div className="@container flex flex-col gap-3">
      {plain ? null : (
        <TableToolbar
          label={label}
          columns={columns}
          visible={visibility}
          onVisible={setChosen}
          filterLabel={filterLabel}
          filter={filter}
          onFilter={(next) => {
            setFilter(next);
            setActive(0);
          }}
          sorting={sorting[0]}
          onSort={(next) => setSorting(next ? [next] : [])}
          counts={{ found: found.length, all: rows.length }}
          onExport={exportCsv}
        >
          {toolbar}
        </TableToolbar>
      )}
      <div className="sheet overflow-auto @2xl:max-h-[max(24rem,calc(100dvh-15rem))]">
        <table role="table" aria-label={label} aria-rowcount={sorted.length + 1} className="block w-full @2xl:table">
          <thead role="rowgroup" className="sr-only @2xl:not-sr-only @2xl:table-header-group">
            {table.getHeaderGroups().map((group) => (
              <tr role="row" key={group.id} className="block @2xl:table-row">
                {group.headers.map((header) => {
                  const column = byId.get(header.column.id);
                  return column ? (
                    <HeaderCell
                      key={header.id}
                      title={column.title}
                      unit={column.unit}
                      end={numeric.has(column.id)}
                      sorted={header.column.getIsSorted()}
                      onSort={
                        header.column.getCanSort()
                          ? (several) => header.column.toggleSorting(header.column.getIsSorted() === 'asc', several)
                          : undefined
                      }
                    />
                  ) : null;
                })}
              </tr>
            ))}
          </thead>
          <tbody role="rowgroup" ref={body} onKeyDown={onKeyDown} className="block @2xl:table-row-group">
            {drawn.map((row, index) => (
              <TableRow
                key={row.id}
                index={index}
                isCurrent={index === current}
                onCurrent={setActive}
                row={row.original}
                columns={shown}
                numeric={numeric}
                link={rowLink?.(row.original)}
              />
            ))}
          </tbody>
        </table>
        {drawn.length === 0 ? (
          <div className="p-4">
            {rows.length === 0 ? (
              <EmptyState title="Nothing here yet." />
            ) : (
              <p className="flex flex-wrap items-center gap-3 text-graphite">
                Nothing matches “{filter}”.
                <Button size="small" onPress={() => setFilter('')}>
                  Clear the filter
                </Button>
              </p>
            )}
          </div>
        ) : null}
      </div>
      {sorted.length > limit ? (
        <p className="flex flex-wrap items-center gap-3 text-graphite">
          {limit} of {sorted.length} rows are drawn; filter and export go by all.
          <Button size="small" onPress={() => setLimit(limit + 5 * firstRows)}>
            Draw more
          </Button>
        </p>
      ) : null}
    </div>
  );
}
