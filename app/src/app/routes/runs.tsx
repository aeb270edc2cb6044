import { Button } from '@blueprintjs/core';
import type { Run } from '@eremite/shared/contracts/run';
import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate, type LoaderFunctionArgs } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { StartRun } from '#features/runs/components/start-run.tsx';
import { paths } from '#config/paths.ts';
import { count } from '#lib/format/number.ts';
import { duration, moment } from '#lib/format/time.ts';
import { cataloguesQuery } from '#lib/queries/catalogues.ts';
import { criteriaListQuery } from '#lib/queries/criteria.ts';
import { runsQuery } from '#lib/queries/runs.ts';
import { mayLead } from '#lib/role.ts';
import { useTitle } from '#lib/use-title.ts';
import '#features/runs/components/runs.css';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(runsQuery(params['surveyId']!));

const columns = (surveyId: string): Column<Run>[] => [
  {
    key: 'number',
    header: 'Run',
    align: 'left',
    cell: ({ id, number }) => <Link to={paths.run(surveyId, id)}>Run {number}</Link>,
  },
  { key: 'state', header: 'State', align: 'left', cell: ({ state }) => <span className="prose">{state}</span> },
  { key: 'criteria', header: 'Criteria', cell: ({ criteriaNumber }) => criteriaNumber },
  { key: 'tables', header: 'Tables', cell: ({ inputs }) => inputs.length },
  { key: 'detections', header: 'Detections', cell: ({ counts }) => count(counts?.detections) },
  { key: 'dark', header: 'Dark', cell: ({ counts }) => (counts ? count(counts.starlight.dark ?? 0) : '–') },
  {
    key: 'nearly',
    header: 'Nearly dark',
    cell: ({ counts }) => (counts ? count(counts.starlight['nearly dark'] ?? 0) : '–'),
  },
  {
    key: 'cannot',
    header: 'Cannot tell',
    cell: ({ counts }) => (counts ? count(counts.starlight['cannot tell'] ?? 0) : '–'),
  },
  { key: 'took', header: 'Took', cell: ({ seconds }) => (seconds === null ? '–' : duration(seconds)) },
  { key: 'by', header: 'By', align: 'left', cell: ({ createdBy }) => <span className="prose">{createdBy}</span> },
  { key: 'at', header: 'Started', align: 'left', cell: ({ createdAt }) => moment(createdAt) },
];

export function Component() {
  const survey = useSurvey();
  const isLead = mayLead(survey.role);
  const { data: runs } = useSuspenseQuery(runsQuery(survey.id));
  const { data: criteria } = useQuery({ ...criteriaListQuery(survey.id), enabled: isLead });
  const { data: catalogues } = useQuery({ ...cataloguesQuery(survey.id), enabled: isLead });
  const [isOpen, setOpen] = useState(false);
  const navigate = useNavigate();
  useTitle('Runs', survey.name);
  const hasGas = catalogues?.items.some(({ kind, state }) => kind === 'hi' && state === 'published');
  const ready = (criteria?.items.length ?? 0) > 0 && hasGas;
  const start = isLead && (
    <Button intent="primary" text="Start a run" disabled={!ready} onClick={() => setOpen(true)} />
  );
  return (
    <div className="page">
      <div className="page__head">
        <div>
          <h1>Runs</h1>
          <p className="page__lede">
            Criteria applied to a stated set of tables. A run never changes and can be repeated.
          </p>
        </div>
        {start}
      </div>
      {isLead && catalogues && criteria && !ready && (
        <p className="muted" style={{ marginBottom: 12 }}>
          Before a run: {!hasGas && <Link to={paths.intakes(survey.id)}>publish a list of HI detections</Link>}
          {!hasGas && criteria.items.length === 0 && ' and '}
          {criteria.items.length === 0 && <Link to={paths.newCriteria(survey.id)}>save criteria</Link>}.
        </p>
      )}
      {runs.items.length === 0 ? (
        <EmptyState title="No run yet" action={start}>
          A run matches every detection against the catalogues, and gives each its two verdicts with their grounds.
        </EmptyState>
      ) : (
        <DataTable
          caption="Runs of the survey"
          columns={columns(survey.id)}
          rows={runs.items}
          rowKey={({ id }) => id}
        />
      )}
      <Caution />
      <StartRun
        surveyId={survey.id}
        criteria={criteria?.items ?? []}
        catalogues={catalogues?.items ?? []}
        isOpen={isOpen}
        onClose={() => setOpen(false)}
        onStarted={({ runId, jobId }) => void navigate(`${paths.run(survey.id, runId)}?job=${jobId}`)}
      />
    </div>
  );
}
