import { Cell, Column, ColumnHeaderCell, RenderMode, RowHeaderCell, SelectionModes, Table } from '@blueprintjs/table';
import { useEffect, useRef } from 'react';
import '@blueprintjs/table/lib/css/table.css';
import './wide-table.css';

interface WideTableProps {
  label: string;
  columns: readonly { name: string; note?: string | null }[];
  rows: readonly (readonly string[])[];
  /** Number of the first row, counted as the file counts them. */
  firstRow?: number;
  rowNumbers?: readonly number[];
}

/** Many columns for reading: only the cells in sight are drawn. Nothing is decided here, so it needs no roles. */
export function WideTable({ label, columns, rows, firstRow = 1, rowNumbers }: WideTableProps) {
  const host = useRef<HTMLDivElement>(null);
  useEffect(() => {
    for (const part of host.current?.querySelectorAll<HTMLElement>('.bp6-table-quadrant') ?? []) {
      // Its copies of the headers scroll with the main part and are not for assistive technology.
      if (!part.classList.contains('bp6-table-quadrant-main')) part.setAttribute('aria-hidden', 'true');
      else part.querySelector<HTMLElement>('.bp6-table-quadrant-scroll-container')!.tabIndex = 0;
    }
  });
  return (
    <div ref={host} className="wide-table" role="region" aria-label={label}>
      <Table
        numRows={rows.length}
        renderMode={RenderMode.NONE}
        selectionModes={SelectionModes.NONE}
        defaultColumnWidth={128}
        defaultRowHeight={24}
        enableRowResizing={false}
        enableGhostCells={false}
        cellRendererDependencies={[rows, columns]}
        rowHeaderCellRenderer={(row) => <RowHeaderCell name={String(rowNumbers?.[row] ?? firstRow + row)} />}
      >
        {columns.map(({ name, note }, at) => (
          <Column
            key={name + String(at)}
            name={name}
            columnHeaderCellRenderer={() => <ColumnHeaderCell name={note ? `${name} [${note}]` : name} />}
            cellRenderer={(row) => <Cell>{rows[row]?.[at] ?? ''}</Cell>}
          />
        ))}
      </Table>
    </div>
  );
}
