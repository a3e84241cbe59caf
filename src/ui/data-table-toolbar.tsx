import { ArrowDown, ArrowUp, Columns3, Download } from 'lucide-react';
import type { ReactNode } from 'react';
import { formatCount } from '../lib/format';
import { IconButton } from './button';
import { classNames } from './class-names';
import type { TableColumn } from './data-table-column';
import { Menu } from './menu';
import { Select } from './select';
import { SearchField } from './text-field';

interface Sort {
  id: string;
  desc: boolean;
}

interface TableToolbarProps<Row> {
  label: string;
  columns: readonly TableColumn<Row>[];
  visible: Record<string, boolean>;
  onVisible: (next: Record<string, boolean>) => void;
  filterLabel: string | undefined;
  filter: string;
  onFilter: (next: string) => void;
  sorting: Sort | undefined;
  onSort: (next: Sort | undefined) => void;
  counts: { found: number; all: number };
  onExport: () => void;
  children: ReactNode;
}

/** Filter, further controls, count, columns, export; and sorting, where the head is out of sight on small screens. */
export function TableToolbar<Row>(props: TableToolbarProps<Row>) {
  const { label, columns, visible, onVisible, filterLabel, filter, onFilter, sorting, onSort, counts, onExport } =
    props;
  const sortable = columns.filter((column) => !column.unsortable);
  return (
    <div className="flex flex-wrap items-center gap-2.5">
      {filterLabel === undefined ? null : (
        <SearchField
          label={filterLabel}
          value={filter}
          onChange={onFilter}
          className="flex-1 basis-full @2xl:max-w-80 @2xl:basis-48"
        />
      )}
      {props.children}
      <div className="flex flex-1 basis-40 items-center gap-1 @2xl:hidden">
        <Select
          label="Sort by"
          labelHidden
          className="flex-1"
          placeholder="Sort by"
          value={sorting?.id ?? ''}
          choices={sortable.map(({ id, title }) => ({ value: id, label: `Sort by ${title.toLowerCase()}` }))}
          onChange={(id) => onSort(id === '' ? undefined : { id, desc: sorting?.desc ?? false })}
        />
        {sorting ? (
          <IconButton
            icon={sorting.desc ? ArrowDown : ArrowUp}
            label={sorting.desc ? 'Sort ascending' : 'Sort descending'}
            onPress={() => onSort({ ...sorting, desc: !sorting.desc })}
          />
        ) : null}
      </div>
      <span className="ml-auto flex items-center gap-1 text-graphite">
        <span
          role="status"
          className={classNames('mr-1 text-sm', counts.found === counts.all && 'sr-only @2xl:not-sr-only')}
        >
          {counts.found === counts.all
            ? formatCount(counts.all, 'row')
            : `${counts.found} of ${formatCount(counts.all, 'row')}`}
        </span>
        <Menu
          label={`Columns of ${label.toLowerCase()}`}
          trigger={<IconButton icon={Columns3} label="Choose columns" />}
          groups={[
            {
              id: 'columns',
              title: 'Columns',
              multiple: true,
              items: columns.map(({ id, title }) => ({ id, label: title })),
              chosen: columns.filter(({ id }) => visible[id]).map(({ id }) => id),
              onChoose: (ids) => onVisible(Object.fromEntries(columns.map(({ id }) => [id, ids.includes(id)]))),
            },
          ]}
        />
        <IconButton icon={Download} label="Export as CSV" onPress={onExport} />
      </span>
    </div>
  );
}
