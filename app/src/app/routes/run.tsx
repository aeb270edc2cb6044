import { Callout, HTMLSelect } from '@blueprintjs/core';
import { useQuery, useQueryClient, useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { Link, useNavigate, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { JobProgress } from '#components/job-progress/job-progress.tsx';
import { Prose } from '#components/prose/prose.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { VerdictCounts } from '#components/verdict-counts/verdict-counts.tsx';
import { ControlFacts, RunFacts } from '#features/runs/components/run-facts.tsx';
import { paths } from '#config/paths.ts';
import { runQuery, runsQuery } from '#lib/queries/runs.ts';
import { mayLead } from '#lib/role.ts';
import { useTitle } from '#lib/use-title.ts';
import '#features/runs/components/runs.css';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(runQuery(params['runId']!));

export function Component() {
  const survey = useSurvey();
  const runId = useParams()['runId']!;
  const { data: run } = useSuspenseQuery(runQuery(runId));
  const { data: runs } = useQuery(runsQuery(survey.id));
  const [search] = useSearchParams();
  const client = useQueryClient();
  const navigate = useNavigate();
  useTitle(`Run ${run.number}`, survey.name);
  const isOpen = run.state === 'queued' || run.state === 'running';
  const jobId = run.jobId ?? search.get('job');
  const others = runs?.items.filter(({ id, state }) => id !== runId && state === 'done') ?? [];
  const renew = () =>
    void client.invalidateQueries({ predicate: ({ queryKey }) => queryKey[0] === 'run' || queryKey[0] === 'survey' });
  return (
    <div className="page stack">
      <div className="page__head" style={{ marginBottom: 0 }}>
        <div>
          <h1>Run {run.number}</h1>
        </div>
        {run.state === 'done' && <Link to={paths.detections(survey.id, `?run=${run.id}`)}>Its detections</Link>}
        {run.state === 'done' && others.length > 0 && (
          <HTMLSelect
            aria-label="Compare with another run"
            value=""
            onChange={(event) => void navigate(paths.runDifference(survey.id, runId, event.target.value))}
          >
            <option value="" disabled>
              Compare with…
            </option>
            {others.map(({ id, number }) => (
              <option key={id} value={id}>
                Run {number}
              </option>
            ))}
          </HTMLSelect>
        )}
      </div>
      {isOpen && jobId && (
        <JobProgress jobId={jobId} title={`Run ${run.number}`} mayCancel={mayLead(survey.role)} onEnd={renew} />
      )}
      {run.state === 'failed' && (
        <Callout intent="danger" icon={null} role="alert" title="The run failed">
          {run.error}
        </Callout>
      )}
      {run.state === 'cancelled' && <Callout icon={null}>The run was cancelled; nothing of it was kept.</Callout>}
      <div className="columns">
        {run.counts && (
          <section className="panel" aria-labelledby="counts">
            <div className="panel__head">
              <h2 id="counts">Verdicts</h2>
            </div>
            <div className="panel__body">
              <VerdictCounts
                counts={run.counts}
                to={(filter) => paths.detections(survey.id, `${filter}&run=${run.id}`)}
              />
            </div>
          </section>
        )}
        {run.control && (
          <section className="panel" aria-labelledby="control">
            <div className="panel__head">
              <h2 id="control">Control</h2>
            </div>
            <div className="panel__body">
              <ControlFacts control={run.control} />
            </div>
          </section>
        )}
      </div>
      <section className="panel" aria-labelledby="inputs">
        <div className="panel__head">
          <h2 id="inputs">What was run</h2>
        </div>
        <div className="panel__body stack">
          <RunFacts surveyId={survey.id} run={run} />
          {run.notes.length > 0 && (
            <ul>
              {run.notes.map((note) => (
                <li key={note}>
                  <Prose text={note} />
                </li>
              ))}
            </ul>
          )}
        </div>
      </section>
      <Caution />
    </div>
  );
}
