import { useQuery } from '@tanstack/react-query';
import { Link, redirect, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { differenceQuery, hasOtherWords } from '#features/runs/api/runs.ts';
import { ChangedCriterion } from '#features/runs/components/changed-criterion.tsx';
import { DifferenceTable } from '#features/runs/components/difference-table.tsx';
import { paths } from '#config/paths.ts';
import { count } from '#lib/format/number.ts';
import { useTitle } from '#lib/use-title.ts';

/** Without another run to compare with, the run's own page offers the choice. */
export const loader =
  () =>
  ({ params, request }: LoaderFunctionArgs) =>
    new URL(request.url).searchParams.has('from') ? null : redirect(paths.run(params['surveyId']!, params['runId']!));

export function Component() {
  const survey = useSurvey();
  const runId = useParams()['runId']!;
  const from = useSearchParams()[0].get('from') ?? '';
  const { data, error, isPending } = useQuery(differenceQuery(runId, from));
  useTitle('Difference of two runs', survey.name);
  if (isPending) return <Loading what="Comparing the runs" />;
  if (!data) {
    return (
      <div className="page">
        <ProblemCallout error={error} />
      </div>
    );
  }
  const otherWords = data.changed.filter(hasOtherWords).length;
  return (
    <div className="page stack">
      <div className="page__head" style={{ marginBottom: 0 }}>
        <div>
          <h1>
            Run {data.from.number} to run {data.to.number}
          </h1>
          <p className="page__lede">
            <span className="num">{count(otherWords)}</span> {otherWords === 1 ? 'verdict' : 'verdicts'} changed,{' '}
            <span className="num">{count(data.changed.length - otherWords)}</span> more moved in their numbers,{' '}
            <span className="num">{count(data.unchanged)}</span> stand.
          </p>
        </div>
        <Link to={paths.run(survey.id, runId)}>Run {data.to.number}</Link>
      </div>
      {(data.criteriaChanged.length > 0 || data.inputsChanged.length > 0 || data.decisionsChanged.length > 0) && (
        <section className="panel">
          <div className="panel__head">
            <h2>What was changed</h2>
          </div>
          <div className="panel__body">
            <dl className="facts">
              {data.criteriaChanged.map(({ key, from: before, to }) => (
                <ChangedCriterion key={key} name={key} from={before} to={to} />
              ))}
              {data.inputsChanged.map((change) => (
                <div key={change} style={{ display: 'contents' }}>
                  <dt>tables</dt>
                  <dd>{change}</dd>
                </div>
              ))}
              {data.decisionsChanged.map(({ detectionId, name, change }) => (
                <div key={`${detectionId} ${change}`} style={{ display: 'contents' }}>
                  <dt>{name ? 'decision' : 'survey'}</dt>
                  <dd>
                    {detectionId ? (
                      <Link to={paths.detection(survey.id, detectionId, `?run=${runId}`)}>{name}</Link>
                    ) : (
                      name
                    )}{' '}
                    {change.replace('->', '→')}
                  </dd>
                </div>
              ))}
            </dl>
          </div>
        </section>
      )}
      {data.changed.length === 0 ? (
        <EmptyState title="No verdict moved">Both runs say the same of every detection.</EmptyState>
      ) : (
        <DifferenceTable surveyId={survey.id} difference={data} />
      )}
      <Caution />
    </div>
  );
}
