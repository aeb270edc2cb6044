import { Button } from '@blueprintjs/core';
import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { WideTable } from '#components/wide-table/wide-table.tsx';
import { count } from '#lib/format/number.ts';
import { rowsQuery } from '../api/catalogue-data.ts';

/** Every original cell, in file order, a page at a time. */
export function CatalogueRows({ catalogue }: { catalogue: Catalogue }) {
  const [cursors, setCursors] = useState<(string | null)[]>([null]);
  const { data, error, isPending } = useQuery(rowsQuery(catalogue.id, cursors.at(-1)!));
  if (isPending) return <Loading what="Reading rows" />;
  if (!data) return <ProblemCallout error={error} />;
  const rows = data.items;
  return (
    <>
      <WideTable
        label="Rows of the catalogue"
        columns={catalogue.columns.map(({ name, unit }) => ({ name, note: unit }))}
        rows={rows.map(({ cells }) => cells)}
        rowNumbers={rows.map(({ row }) => row)}
      />
      <div className="row pager">
        <span className="num small" role="status">
          {rows.length > 0 && `rows ${count(rows[0]!.row)} to ${count(rows.at(-1)!.row)} of ${count(data.total)}`}
        </span>
        <span className="grow" />
        <Button
          size="small"
          text="Previous"
          disabled={cursors.length === 1}
          onClick={() => setCursors(cursors.slice(0, -1))}
        />
        <Button
          size="small"
          text="Next"
          disabled={!data.nextCursor}
          onClick={() => setCursors([...cursors, data.nextCursor])}
        />
      </div>
    </>
  );
}
