import { Button } from '@blueprintjs/core';
import type { Criteria } from '@eremite/shared/contracts/criteria';
import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { Link, useNavigate, type LoaderFunctionArgs } from 'react-router-dom';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { CRITERIA_FIELDS, isStandard, valueOf, valueText } from '#lib/criteria/criteria-fields.ts';
import { paths } from '#config/paths.ts';
import { moment } from '#lib/format/time.ts';
import { criteriaListQuery } from '#lib/queries/criteria.ts';
import { mayLead } from '#lib/role.ts';
import { useTitle } from '#lib/use-title.ts';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(criteriaListQuery(params['surveyId']!));

/** In words: what sets these criteria apart from the published defaults. */
function differences({ settings }: Criteria): string {
  const changed = CRITERIA_FIELDS.filter((field) => !isStandard(field, valueOf(settings, field)));
  if (changed.length === 0) return 'the published defaults';
  const first = changed
    .slice(0, 3)
    .map((field) => `${field.title.toLowerCase()} ${valueText(field, valueOf(settings, field))} ${field.unit}`.trim());
  return first.join(', ') + (changed.length > 3 ? ` and ${changed.length - 3} more` : '');
}

const columns = (surveyId: string): Column<Criteria>[] => [
  {
    key: 'number',
    header: 'Number',
    align: 'left',
    cell: ({ id, number }) => <Link to={paths.criteriaNumber(surveyId, id)}>Criteria {number}</Link>,
  },
  {
    key: 'what',
    header: 'What differs',
    align: 'left',
    cell: (item) => <span className="prose">{differences(item)}</span>,
  },
  { key: 'note', header: 'Note', align: 'left', cell: ({ note }) => <span className="prose">{note}</span> },
  { key: 'runs', header: 'Runs', cell: ({ usedByRuns }) => usedByRuns },
  { key: 'by', header: 'By', align: 'left', cell: ({ createdBy }) => <span className="prose">{createdBy}</span> },
  { key: 'at', header: 'Saved', align: 'left', cell: ({ createdAt }) => moment(createdAt) },
];

export function Component() {
  const survey = useSurvey();
  const { data: list } = useSuspenseQuery(criteriaListQuery(survey.id));
  const navigate = useNavigate();
  useTitle('Criteria', survey.name);
  const make = mayLead(survey.role) && (
    <Button
      intent="primary"
      text="New criteria"
      onClick={() => void navigate(paths.newCriteria(survey.id, list.items[0]?.id))}
    />
  );
  return (
    <div className="page">
      <div className="page__head">
        <div>
          <h1>Criteria</h1>
          <p className="page__lede">
            Radii, windows, thresholds and rules. Each number is kept for good; editing makes the next one.
          </p>
        </div>
        {make}
      </div>
      {list.items.length === 0 ? (
        <EmptyState title="No criteria yet" action={make}>
          Begin with the published defaults; change what your survey needs.
        </EmptyState>
      ) : (
        <DataTable
          caption="Criteria of the survey"
          columns={columns(survey.id)}
          rows={list.items}
          rowKey={({ id }) => id}
        />
      )}
    </div>
  );
}
