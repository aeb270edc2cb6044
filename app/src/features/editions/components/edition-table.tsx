import type { Edition } from '@eremite/shared/contracts/edition';
import { Link } from 'react-router-dom';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { paths } from '#config/paths.ts';
import { count } from '#lib/format/number.ts';
import { fileSize, moment } from '#lib/format/time.ts';

const STATES = { packing: 'being packed', frozen: 'frozen', failed: 'failed' } as const;

/** The editions of a survey, newest first. */
export function EditionTable({ surveyId, editions }: { surveyId: string; editions: readonly Edition[] }) {
  const columns: Column<Edition>[] = [
    {
      key: 'number',
      header: 'Edition',
      align: 'left',
      cell: ({ id, number }) => <Link to={paths.edition(surveyId, id)}>Edition {number}</Link>,
    },
    {
      key: 'state',
      header: 'State',
      align: 'left',
      cell: ({ state, supersededBy }) => (
        <span className="prose">
          {STATES[state]}
          {supersededBy && <span className="muted">, superseded by {supersededBy.number}</span>}
        </span>
      ),
    },
    { key: 'entries', header: 'Sources', cell: ({ entries }) => count(entries) },
    { key: 'run', header: 'Run', cell: ({ run }) => run.number },
    { key: 'criteria', header: 'Criteria', cell: ({ criteria }) => criteria.number },
    { key: 'size', header: 'Archive', cell: ({ archive }) => (archive ? fileSize(archive.bytes) : '–') },
    {
      key: 'made',
      header: 'Frozen',
      align: 'left',
      cell: ({ createdAt, createdBy }) => (
        <span className="prose">
          {moment(createdAt)} by {createdBy}
        </span>
      ),
    },
    { key: 'note', header: 'For', align: 'left', cell: ({ note }) => <span className="prose">{note}</span> },
  ];
  return <DataTable caption="Editions" columns={columns} rows={editions} rowKey={({ id }) => id} />;
}
