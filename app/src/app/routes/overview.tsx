import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { useMemo } from 'react';
import { Link, useNavigate, type LoaderFunctionArgs } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { SkyChart } from '#components/sky-chart/sky-chart.tsx';
import { VerdictCounts } from '#components/verdict-counts/verdict-counts.tsx';
import { paths } from '#config/paths.ts';
import { count } from '#lib/format/number.ts';
import { cataloguesQuery } from '#lib/queries/catalogues.ts';
import { overviewQuery } from '#lib/queries/survey.ts';
import { mayLead, mayReview } from '#lib/role.ts';
import { useTitle } from '#lib/use-title.ts';
import { useSurvey } from '#components/survey-context/use-survey.ts';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(overviewQuery(params['surveyId']!));

export function Component() {
  const survey = useSurvey();
  const { data } = useSuspenseQuery(overviewQuery(survey.id));
  const catalogues = useQuery(cataloguesQuery(survey.id));
  const footprints = useMemo(
    () =>
      (catalogues.data?.items ?? []).flatMap(({ name, state, coverage }) =>
        state === 'published' && coverage.moc ? [{ name, moc: coverage.moc }] : [],
      ),
    [catalogues.data],
  );
  const navigate = useNavigate();
  useTitle(survey.name);
  const hasRun = data.survey.latestRun?.state === 'done' || Object.keys(data.counts.starlight).length > 0;
  return (
    <div className="page">
      <div className="page__head">
        <div>
          <h1>{survey.name}</h1>
          <p className="page__lede">{survey.description}</p>
        </div>
        <p className="num small muted">
          H₀ {survey.cosmology.h0} km/s/Mpc · Ωₘ {survey.cosmology.omegaM}
        </p>
      </div>
      {data.marks.length === 0 ? (
        <EmptyState
          title="No detections yet"
          action={mayLead(survey.role) && <Link to={paths.intakes(survey.id)}>Bring in the HI list</Link>}
        >
          Begin with the list of HI detections, then the catalogues to search; save criteria and start a run.
        </EmptyState>
      ) : (
        <div className="overview">
          <SkyChart
            marks={data.marks}
            footprints={footprints}
            onOpen={(id) => void navigate(paths.detection(survey.id, id))}
          />
          <div className="stack">
            {mayReview(survey.role) && (
              <section className="panel" aria-labelledby="waiting">
                <div className="panel__head">
                  <h2 id="waiting">Waiting for you</h2>
                  <Link to={`${paths.docket(survey.id)}?assigned=me`}>Docket</Link>
                </div>
                <div className="panel__body">
                  <p>
                    <b className="num overview__figure">{count(data.awaitingMe)}</b> to review
                  </p>
                  <p className="muted">
                    <span className="num">{count(data.reviewed)}</span> of{' '}
                    <span className="num">{count(data.marks.length)}</span> reviewed by someone
                  </p>
                </div>
              </section>
            )}
            <section className="panel" aria-labelledby="verdicts">
              <div className="panel__head">
                <h2 id="verdicts">Verdicts</h2>
                {data.survey.latestRun && (
                  <Link to={paths.run(survey.id, data.survey.latestRun.id)} className="small">
                    run {data.survey.latestRun.number}
                  </Link>
                )}
              </div>
              <div className="panel__body">
                {hasRun ? (
                  <VerdictCounts counts={data.counts} to={(filter) => paths.detections(survey.id, filter)} />
                ) : (
                  <p className="muted">
                    None yet: <Link to={paths.runs(survey.id)}>start a run</Link>.
                  </p>
                )}
              </div>
            </section>
          </div>
        </div>
      )}
      <Caution />
    </div>
  );
}
