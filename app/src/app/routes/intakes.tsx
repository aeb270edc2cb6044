import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { Link, useNavigate, type LoaderFunctionArgs } from 'react-router-dom';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { intakesQuery, useUpload } from '#features/intake/api/intakes.ts';
import { DropZone } from '#features/intake/components/drop-zone.tsx';
import { paths } from '#config/paths.ts';
import { count } from '#lib/format/number.ts';
import { fileSize, moment } from '#lib/format/time.ts';
import { mayLead } from '#lib/role.ts';
import { useTitle } from '#lib/use-title.ts';
import type { Intake } from '@eremite/shared/contracts/intake';
import '#features/intake/components/intake.css';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(intakesQuery(params['surveyId']!));

const columns = (surveyId: string): Column<Intake>[] => [
  {
    key: 'file',
    header: 'File',
    align: 'left',
    cell: ({ id, fileName, catalogueId }) => (
      <Link to={catalogueId ? paths.catalogue(surveyId, catalogueId) : paths.intake(surveyId, id)}>{fileName}</Link>
    ),
  },
  {
    key: 'state',
    header: 'State',
    align: 'left',
    cell: ({ state }) => <span className="prose">{state === 'staged' ? 'not yet published' : state}</span>,
  },
  { key: 'format', header: 'Format', align: 'left', cell: ({ format }) => <span className="prose">{format}</span> },
  { key: 'rows', header: 'Rows', cell: ({ rows }) => count(rows) },
  { key: 'side', header: 'Sidelined', cell: ({ check }) => count(check.sidelined) },
  { key: 'size', header: 'Size', cell: ({ bytes }) => fileSize(bytes) },
  { key: 'at', header: 'Brought in', align: 'left', cell: ({ createdAt }) => moment(createdAt) },
];

export function Component() {
  const survey = useSurvey();
  const { data: intakes } = useSuspenseQuery(intakesQuery(survey.id));
  const upload = useUpload(survey.id);
  const navigate = useNavigate();
  useTitle('Intake', survey.name);
  const shown = intakes.items.filter(({ state }) => state !== 'discarded');
  const open = (file: File) =>
    upload.mutate(file, { onSuccess: ({ id }) => void navigate(paths.intake(survey.id, id)) });
  return (
    <div className="page stack">
      <div className="page__head" style={{ marginBottom: 0 }}>
        <div>
          <h1>Intake</h1>
          <p className="page__lede">Where tables come in: read, say what the columns are, check, publish.</p>
        </div>
      </div>
      {mayLead(survey.role) && <DropZone isPending={upload.isPending} onFile={open} />}
      <ProblemCallout error={upload.error} />
      {shown.length === 0 ? (
        <EmptyState title="Nothing was brought in yet">
          Begin with the list of HI detections; then the catalogues to search, each with its depth and footprint.
        </EmptyState>
      ) : (
        <DataTable caption="Tables brought in" columns={columns(survey.id)} rows={shown} rowKey={({ id }) => id} />
      )}
    </div>
  );
}
