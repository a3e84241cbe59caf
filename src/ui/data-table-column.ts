import type { ReactNode } from 'react';
import { formatNumber } from '../lib/format';

export type CellValue = string | number | boolean | null | undefined;

export interface TableColumn<Row> {
  id: string;
  title: string;
  /** What sorting, filtering and the export go by. Numbers in `unit`, where there is one. */
  value: (row: Row) => CellValue;
  /** What is drawn; the value as text unless given. */
  cell?: (row: Row) => ReactNode;
  /** Stands after the title, lighter, and in the export's head. */
  unit?: string;
  /** Figures stand at the end; numbers do so by themselves. */
  align?: 'start' | 'end';
  /** Not shown until chosen. */
  hidden?: boolean;
  /** Leaves the column out of sorting, as for a drawing. */
  unsortable?: boolean;
  /** Leaves it out of the export, as for a button. */
  unexported?: boolean;
}

/** A value as the filter sees it. */
export const textOf = (value: CellValue): string =>
  value === null || value === undefined ? '' : typeof value === 'boolean' ? (value ? 'yes' : 'no') : String(value);

/** A value as it is drawn where the column does not say otherwise. */
export const defaultCell = (value: CellValue): ReactNode =>
  typeof value === 'number'
    ? formatNumber(value, Number.isInteger(value) ? String(Math.abs(value)).length : 3)
    : textOf(value) || '–';
