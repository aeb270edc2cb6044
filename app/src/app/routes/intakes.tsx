import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { Link, useNavigate, useSearchParams, type LoaderFunctionArgs } from 'react-router-dom';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { intakesQuery, type Upload, useUpload } from '#features/intake/api/intakes.ts';
import { ArchivePositions } from '#features/intake/components/archive-positions.tsx';
import { DropZone } from '#features/intake/components/drop-zone.tsx';
import { paths } from '#config/paths.ts';
import { count } from '#lib/format/number.ts';
import { fileSize, moment } from '#lib/format/time.ts';
import { cataloguesQuery } from '#lib/queries/catalogues.ts';
import { mayLead } from '#lib/role.ts';
import { searchString } from '#lib/search-string.ts';
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
  const supersedes = useSearchParams()[0].get('supersedes') ?? undefined;
  const { data: catalogues } = useQuery({ ...cataloguesQuery(survey.id), enabled: supersedes !== undefined });
  const before = catalogues?.items.find(({ id }) => id === supersedes);
  const navigate = useNavigate();
  useTitle('Intake', survey.name);
  const shown = intakes.items.filter(({ state }) => state !== 'discarded');
  const bringIn = async (uploads: Upload[]) => {
    const [first, ...others] = uploads;
    if (!first) return;
    try {
      const { id } = await upload.mutateAsync(first);
      for (const one of others) await upload.mutateAsync(one);
      // Of several tables each for itself the list below shows what came in.
      if (others.length === 0) void navigate(paths.intake(survey.id, id, searchString({ supersedes })));
    } catch {
      // Shown below, where the upload says what went wrong.
    }
  };
  return (
    <div className="page stack">
      <div className="page__head" style={{ marginBottom: 0 }}>
        <div>
          <h1>Intake</h1>
          <p className="page__lede">
            {before
              ? `Bring in the new version of “${before.name}”: once it is published, further runs use it in place of the old one.`
              : 'Where tables come in: read, say what the columns are, check, publish.'}
          </p>
        </div>
      </div>
      {mayLead(survey.role) && <DropZone isPending={upload.isPending} onUploads={(uploads) => void bringIn(uploads)} />}
      <ProblemCallout error={upload.error} />
      {shown.length === 0 ? (
        <EmptyState title="Nothing was brought in yet">
          Begin with the list of HI detections; then the catalogues to search, each with its depth and footprint.
        </EmptyState>
      ) : (
        <DataTable caption="Tables brought in" columns={columns(survey.id)} rows={shown} rowKey={({ id }) => id} />
      )}
      {survey.detections > 0 && <ArchivePositions surveyId={survey.id} detections={survey.detections} />}
    </div>
  );
}
