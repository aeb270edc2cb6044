import { AnchorButton, Button } from '@blueprintjs/core';
import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import type { SidelinedRow } from '@eremite/shared/contracts/intake';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { API_BASE } from '#config/paths.ts';
import { count, NO_VALUE } from '#lib/format/number.ts';
import { PAGE_OF_SIDELINED, sidelinedQuery } from '../api/catalogue-data.ts';

const columnsOf = (parts: Catalogue['parts']): Column<SidelinedRow>[] => [
  ...(parts.length > 0
    ? [
        {
          key: 'file',
          header: 'File',
          align: 'left' as const,
          cell: ({ row }: SidelinedRow) => parts.findLast(({ firstRow }) => firstRow <= row)?.fileName ?? NO_VALUE,
        },
      ]
    : []),
  { key: 'line', header: 'Line', cell: ({ line }) => line ?? NO_VALUE },
  { key: 'row', header: 'Row', cell: ({ row }) => row },
  { key: 'column', header: 'Column', align: 'left', cell: ({ column }) => column ?? NO_VALUE },
  { key: 'value', header: 'Value', align: 'left', cell: ({ value }) => value || NO_VALUE },
  { key: 'reason', header: 'Reason', align: 'left', cell: ({ reason }) => <span className="prose">{reason}</span> },
];

/** Rows that could not be used, each with its place and the reason; kept, and given back on request. */
export function SidelinedRows({ catalogue }: { catalogue: Catalogue }) {
  const [cursors, setCursors] = useState<(string | null)[]>([null]);
  const { data } = useQuery(sidelinedQuery(catalogue.id, cursors.at(-1)!));
  if (!data) return null;
  if (data.total === 0) return <p className="muted">Every row could be used.</p>;
  const first = (cursors.length - 1) * PAGE_OF_SIDELINED + 1;
  const isPaged = data.total > PAGE_OF_SIDELINED;
  return (
    <div className="stack">
      <div className="row">
        <span className="grow num small" role="status">
          {isPaged
            ? `${count(first)} to ${count(first + data.items.length - 1)} of ${count(data.total)}`
            : data.total === 1
              ? 'one row'
              : `${count(data.total)} rows`}
        </span>
        {isPaged && (
          <>
            <Button
              size="small"
              text="Previous"
              aria-label="Previous sidelined rows"
              disabled={cursors.length === 1}
              onClick={() => setCursors(cursors.slice(0, -1))}
            />
            <Button
              size="small"
              text="Next"
              aria-label="Next sidelined rows"
              disabled={!data.nextCursor}
              onClick={() => setCursors([...cursors, data.nextCursor])}
            />
          </>
        )}
        <AnchorButton
          size="small"
          text="Download with reasons, CSV"
          href={`${API_BASE}/catalogues/${catalogue.id}/sidelined?format=csv`}
          download
        />
      </div>
      <DataTable
        caption="Sidelined rows"
        columns={columnsOf(catalogue.parts)}
        rows={data.items}
        rowKey={({ row, column }) => `${row}:${column}`}
      />
    </div>
  );
}
