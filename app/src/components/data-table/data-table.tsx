import type { ReactNode } from 'react';
import { SortHeader } from './sort-header.tsx';
import './data-table.css';

export interface Column<Row> {
  key: string;
  header: ReactNode;
  /** Unit, shown under the header in its own voice. */
  unit?: string;
  /** What the number is and where it comes from. */
  hint?: string;
  /** Value of the `sort` parameter; without one the column cannot be sorted by. */
  sort?: string;
  /** Numbers stand right, words left. */
  align?: 'left' | 'right';
  cell: (row: Row) => ReactNode;
}

interface DataTableProps<Row> {
  caption: string;
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  sort?: string | undefined;
  onSort?: (sort: string) => void;
  selected?: string | null;
  hovered?: string | null;
  onHover?: (key: string | null) => void;
  onSelect?: (key: string) => void;
  rowClass?: (row: Row) => string | undefined;
  isStale?: boolean;
}

/** A real table: header cells with scope, sort told to assistive technology, rows that can be lit from elsewhere. */
export function DataTable<Row>(props: DataTableProps<Row>) {
  const { caption, columns, rows, rowKey, sort, onSort, selected, hovered, onHover, onSelect, rowClass } = props;
  return (
    <div
      className={`data-table__scroll${props.isStale ? ' data-table__scroll--stale' : ''}`}
      tabIndex={0}
      role="region"
      aria-label={caption}
    >
      <table className="data-table">
        <caption className="visually-hidden">{caption}</caption>
        <thead>
          <tr>
            {columns.map((column) => (
              <SortHeader key={column.key} column={column} sort={sort} onSort={onSort} />
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => {
            const key = rowKey(row);
            const classes = [rowClass?.(row), selected === key && 'is-selected', hovered === key && 'is-hovered'];
            return (
              <tr
                key={key}
                data-key={key}
                className={classes.filter(Boolean).join(' ') || undefined}
                aria-selected={onSelect ? selected === key : undefined}
                onMouseEnter={onHover && (() => onHover(key))}
                onMouseLeave={onHover && (() => onHover(null))}
                onFocus={onHover && (() => onHover(key))}
                onBlur={onHover && (() => onHover(null))}
                onClick={onSelect && (() => onSelect(key))}
              >
                {columns.map((column) => (
                  <td key={column.key} className={column.align === 'left' ? 'is-left' : undefined}>
                    {column.cell(row)}
                  </td>
                ))}
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
