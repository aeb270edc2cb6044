import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { Link, type LoaderFunctionArgs } from 'react-router-dom';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { paths } from '#config/paths.ts';
import { count, fixed, NO_VALUE, significant } from '#lib/format/number.ts';
import { day } from '#lib/format/time.ts';
import { cataloguesQuery } from '#lib/queries/catalogues.ts';
import { mayLead } from '#lib/role.ts';
import { useTitle } from '#lib/use-title.ts';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(cataloguesQuery(params['surveyId']!));

const bandText = ({ bands }: Catalogue) =>
  bands
    .map(({ name, depth5Sigma }) => (depth5Sigma == null ? name : `${name} to ${fixed(depth5Sigma, 1)}`))
    .join(', ') || NO_VALUE;

const columns = (surveyId: string): Column<Catalogue>[] => [
  {
    key: 'name',
    header: 'Table',
    align: 'left',
    cell: ({ id, name }) => (
      <Link to={paths.catalogue(surveyId, id)}>
        <span className="prose">{name}</span>
      </Link>
    ),
  },
  {
    key: 'kind',
    header: 'Kind',
    align: 'left',
    cell: ({ kind, state }) => (
      <span className="prose">
        {kind === 'hi' ? 'HI detections' : kind}
        {state === 'published' ? '' : `, ${state}`}
      </span>
    ),
  },
  { key: 'bands', header: 'Bands and depth', unit: 'mag, 5 sigma', align: 'left', cell: bandText },
  { key: 'rows', header: 'Rows', cell: ({ rows }) => count(rows) },
  { key: 'velocity', header: 'With velocity', cell: ({ withVelocity }) => count(withVelocity) },
  { key: 'sidelined', header: 'Sidelined', cell: ({ sidelined }) => count(sidelined) },
  {
    key: 'area',
    header: 'Covered',
    unit: 'deg²',
    cell: ({ coverage }) => (coverage.areaSqDeg === null ? NO_VALUE : significant(coverage.areaSqDeg, 3)),
  },
  { key: 'runs', header: 'Runs', cell: ({ usedByRuns }) => usedByRuns },
  { key: 'at', header: 'Published', align: 'left', cell: ({ publishedAt }) => day(publishedAt) },
];

export function Component() {
  const survey = useSurvey();
  const { data: list } = useSuspenseQuery(cataloguesQuery(survey.id));
  useTitle('Catalogues', survey.name);
  const shown = list.items.filter(({ state }) => state !== 'removed');
  return (
    <div className="page">
      <div className="page__head">
        <div>
          <h1>Catalogues</h1>
          <p className="page__lede">
            The published tables: the HI list, and what is searched for its stars and neighbours.
          </p>
        </div>
        {mayLead(survey.role) && <Link to={paths.intakes(survey.id)}>Bring in a table</Link>}
      </div>
      {shown.length === 0 ? (
        <EmptyState
          title="No table is published"
          action={mayLead(survey.role) && <Link to={paths.intakes(survey.id)}>To the intake</Link>}
        >
          {mayLead(survey.role) ? 'Bring in the HI list first, then the catalogues.' : 'The lead brings tables in.'}
        </EmptyState>
      ) : (
        <DataTable caption="Published tables" columns={columns(survey.id)} rows={shown} rowKey={({ id }) => id} />
      )}
    </div>
  );
}
