import { useQuery } from '@tanstack/react-query';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { moment } from '#lib/format/time.ts';
import { jobsQuery } from '../api/administration.ts';

interface AdminJob {
  id: string;
  kind: string;
  state: string;
  progress: number;
  attempts: number;
  createdAt: string;
  finishedAt: string | null;
}

const COLUMNS: Column<AdminJob>[] = [
  { key: 'kind', header: 'Work', align: 'left', cell: ({ kind }) => <span className="prose">{kind}</span> },
  { key: 'state', header: 'State', align: 'left', cell: ({ state }) => <span className="prose">{state}</span> },
  { key: 'progress', header: 'Done', unit: '%', cell: ({ progress }) => Math.round(progress * 100) },
  { key: 'attempts', header: 'Attempts', cell: ({ attempts }) => attempts },
  { key: 'at', header: 'Begun', align: 'left', cell: ({ createdAt }) => moment(createdAt) },
  { key: 'end', header: 'Ended', align: 'left', cell: ({ finishedAt }) => moment(finishedAt) },
];

/** Work of the installation, without what it is about. */
export function Jobs() {
  const { data } = useQuery(jobsQuery());
  if (data?.items.length === 0) return <p className="muted">No work yet.</p>;
  return <DataTable caption="Jobs" columns={COLUMNS} rows={data?.items ?? []} rowKey={({ id }) => id} />;
}
