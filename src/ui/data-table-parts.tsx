import { ArrowDown, ArrowUp, ArrowUpDown } from 'lucide-react';
import type { MouseEvent } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { classNames } from './class-names';
import { defaultCell } from './data-table-column';
import type { TableColumn } from './data-table-column';

interface HeaderCellProps {
  title: string;
  unit: string | undefined;
  end: boolean;
  sorted: false | 'asc' | 'desc';
  onSort: ((several: boolean) => void) | undefined;
}

export function HeaderCell({ title, unit, end, sorted, onSort }: HeaderCellProps) {
  const words = (
    <>
      {title}
      {unit ? <span className="font-normal text-graphite"> / {unit}</span> : null}
    </>
  );
  const Icon = sorted === 'asc' ? ArrowUp : sorted === 'desc' ? ArrowDown : ArrowUpDown;
  return (
    <th
      role="columnheader"
      scope="col"
      aria-sort={sorted === 'asc' ? 'ascending' : sorted === 'desc' ? 'descending' : undefined}
      className={classNames(
        'sticky top-0 z-10 bg-sheet p-0 text-sm font-semibold whitespace-nowrap shadow-[inset_0_-1px_0_var(--edge)]',
        end ? 'text-right' : 'text-left',
      )}
    >
      {onSort ? (
        <button
          type="button"
          onClick={(event) => onSort(event.shiftKey)}
          className={classNames(
            'group flex w-full items-center gap-1.5 px-3.5 py-2 font-semibold hover:bg-wash focus-visible:outline-offset-[-2px]',
            end && 'flex-row-reverse',
          )}
        >
          <span>{words}</span>
          <Icon
            aria-hidden
            className={classNames(
              'size-3.5 shrink-0',
              sorted
                ? 'text-copper'
                : 'text-graphite opacity-0 group-hover:opacity-100 group-focus-visible:opacity-100',
            )}
          />
        </button>
      ) : (
        <span className="block px-3.5 py-2">{words}</span>
      )}
    </th>
  );
}

interface TableRowProps<Row> {
  row: Row;
  index: number;
  /** The row that Tab reaches; arrow keys move it. */
  isCurrent: boolean;
  onCurrent: (index: number) => void;
  columns: readonly TableColumn<Row>[];
  numeric: ReadonlySet<string>;
  link: string | undefined;
}

const interactive = 'a, button, input, select, textarea, summary, label, [role="button"]';

export function TableRow<Row>({ row, index, isCurrent, onCurrent, columns, numeric, link }: TableRowProps<Row>) {
  const navigate = useNavigate();
  const focus = { 'data-row-focus': index, tabIndex: isCurrent ? 0 : -1, onFocus: () => onCurrent(index) };
  const follow = (event: MouseEvent) => {
    if (link === undefined || (event.target as HTMLElement).closest(interactive)) return;
    if (window.getSelection()?.isCollapsed === false) return;
    if (event.metaKey || event.ctrlKey) window.open(link, '_blank', 'noopener');
    else void navigate(link);
  };
  return (
    <tr
      role="row"
      {...(link === undefined ? focus : {})}
      onClick={link === undefined ? undefined : follow}
      className={classNames(
        'block border-b border-rule px-3.5 py-2.5 last:border-b-0 focus-within:bg-wash focus-visible:outline-offset-[-2px]',
        '@2xl:table-row @2xl:p-0',
        link !== undefined && 'cursor-pointer hover:bg-wash',
      )}
    >
      {columns.map((column, at) => {
        const value = column.value(row);
        const drawn = column.cell ? column.cell(row) : defaultCell(value);
        const end = numeric.has(column.id);
        const lead = at === 0;
        return (
          <td
            role="cell"
            key={column.id}
            className={classNames(
              'grid grid-cols-[7rem_minmax(0,1fr)] gap-x-3 py-0.5 align-middle @2xl:table-cell @2xl:px-3.5 @2xl:py-2',
              end && '@2xl:text-right',
              typeof value === 'number' && !column.cell && 'font-mono',
              lead && 'font-semibold',
            )}
          >
            <span aria-hidden className="font-sans text-sm font-normal text-graphite @2xl:hidden">
              {column.title}
              {column.unit ? ` / ${column.unit}` : ''}
            </span>
            <span className="min-w-0 wrap-anywhere @2xl:wrap-normal">
              {lead && link !== undefined ? (
                <Link
                  to={link}
                  {...focus}
                  className="underline decoration-transparent underline-offset-2 hover:decoration-current"
                >
                  {drawn}
                </Link>
              ) : (
                drawn
              )}
            </span>
          </td>
        );
      })}
    </tr>
  );
}
