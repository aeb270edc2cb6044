import { AnchorButton } from '@blueprintjs/core';
import type { SidelinedRow } from '@eremite/shared/contracts/intake';
import { useQuery } from '@tanstack/react-query';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { API_BASE } from '#config/paths.ts';
import { count, NO_VALUE } from '#lib/format/number.ts';
import { sidelinedQuery } from '../api/catalogue-data.ts';

const COLUMNS: Column<SidelinedRow>[] = [
  { key: 'line', header: 'Line', cell: ({ line }) => line ?? NO_VALUE },
  { key: 'row', header: 'Row', cell: ({ row }) => row },
  { key: 'column', header: 'Column', align: 'left', cell: ({ column }) => column ?? NO_VALUE },
  { key: 'value', header: 'Value', align: 'left', cell: ({ value }) => value ?? NO_VALUE },
  { key: 'reason', header: 'Reason', align: 'left', cell: ({ reason }) => <span className="prose">{reason}</span> },
];

/** Rows that could not be used, each with its place and the reason; kept, and given back on request. */
export function SidelinedRows({ catalogueId }: { catalogueId: string }) {
  const { data } = useQuery(sidelinedQuery(catalogueId));
  if (!data) return null;
  if (data.total === 0) return <p className="muted">Every row could be used.</p>;
  return (
    <div className="stack">
      <div className="row">
        <span className="grow muted">
          {data.total > data.items.length
            ? `The first ${count(data.items.length)} of ${count(data.total)}.`
            : `${count(data.total)} rows.`}
        </span>
        <AnchorButton
          size="small"
          text="Download with reasons, CSV"
          href={`${API_BASE}/catalogues/${catalogueId}/sidelined?format=csv`}
          download
        />
      </div>
      <DataTable
        caption="Sidelined rows"
        columns={COLUMNS}
        rows={data.items}
        rowKey={({ row, column }) => `${row}:${column}`}
      />
    </div>
  );
}
