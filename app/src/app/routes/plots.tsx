import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { useCallback, useMemo } from 'react';
import { Link, useSearchParams, type LoaderFunctionArgs } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { RunPicker } from '#components/run-picker/run-picker.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { paths } from '#config/paths.ts';
import { criteriaQuery } from '#features/detection/api/verdict-detail.ts';
import { plotsQuery, plotsTable } from '#features/plots/api/plots.ts';
import { CHARTS } from '#features/plots/charts/charts.ts';
import { BrushedTable } from '#features/plots/components/brushed-table.tsx';
import { SurveyPlot } from '#features/plots/components/survey-plot.tsx';
import { VerdictLegend } from '#features/plots/components/verdict-legend.tsx';
import { brushed, brushFromText, brushToText, type Brush } from '#features/plots/hooks/brush.ts';
import { count } from '#lib/format/number.ts';
import { chosenRun, runsQuery } from '#lib/queries/runs.ts';
import { useTitle } from '#lib/use-title.ts';
import '#features/plots/components/plots.css';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(runsQuery(params['surveyId']!));

/** The survey in numbers: what is brushed on one plot is lit on all of them and listed below. */
export function Component() {
  const survey = useSurvey();
  const { data: runs } = useSuspenseQuery(runsQuery(survey.id));
  const [search, setSearch] = useSearchParams();
  useTitle('Plots', survey.name);
  const run = chosenRun(runs.items, search.get('run'));
  const plots = useQuery({ ...plotsQuery(run?.id ?? ''), enabled: run !== undefined });
  const criteria = useQuery({ ...criteriaQuery(run?.criteriaId ?? ''), enabled: run !== undefined });
  const brushText = search.get('brush');
  const brush = useMemo(() => brushFromText(brushText, CHARTS), [brushText]);
  const points = plots.data?.points;
  const inside = useMemo(() => {
    if (!points || !brush) return points ?? [];
    return brushed(
      points,
      brush,
      CHARTS.find(({ id }) => id === brush.chart)!,
    );
  }, [points, brush]);
  const lit = useMemo(() => (brush ? new Set(inside.map(({ detectionId }) => detectionId)) : null), [brush, inside]);
  const settings = criteria.data?.settings;
  const massToLightR = plots.data?.massToLightR;
  const context = useMemo(
    () =>
      settings && massToLightR !== undefined
        ? {
            massToLightR,
            darkFrom: settings.absence.noneOrMissedProbability,
            aloneFrom: settings.surroundings.aloneProbability,
          }
        : undefined,
    [settings, massToLightR],
  );
  const set = useCallback(
    (key: string, value: string | null) =>
      setSearch(
        (old) => {
          if (value === null) old.delete(key);
          else old.set(key, value);
          return old;
        },
        { replace: true },
      ),
    [setSearch],
  );
  const onBrush = useCallback((next: Brush | null) => set('brush', next && brushToText(next)), [set]);
  const to = useCallback((id: string) => paths.detection(survey.id, id, run ? `?run=${run.id}` : ''), [survey.id, run]);
  if (!run) {
    return (
      <div className="page">
        <EmptyState title="Nothing to plot yet" action={<Link to={paths.runs(survey.id)}>To the runs</Link>}>
          The plots are drawn from the verdicts of a run.
        </EmptyState>
      </div>
    );
  }
  return (
    <div className="page" style={{ maxWidth: 'none' }}>
      <div className="page__head">
        <div>
          <h1>Plots</h1>
          <p className="page__lede">
            Drag over a plot to light those detections on all of them and to list them below.
          </p>
        </div>
        <RunPicker runs={runs.items} value={run.id} onChange={(id) => set('run', id)} />
        <a href={plotsTable(run.id, 'csv')} download>
          The numbers as CSV
        </a>
        <a href={plotsTable(run.id, 'votable')} download>
          as VOTable
        </a>
      </div>
      <ProblemCallout error={plots.error ?? criteria.error} />
      {plots.isPending && <Loading what="Reading the numbers" />}
      {points && context && (
        <>
          <VerdictLegend points={points} />
          <div className="plots">
            {CHARTS.map((chart) => (
              <SurveyPlot
                key={chart.id}
                chart={chart}
                context={context}
                points={points}
                lit={lit}
                brush={brush}
                onBrush={onBrush}
                fileName={`${survey.name}-run-${run.number}`}
              />
            ))}
          </div>
          <p role="status" className="muted">
            <span className="num">{count(inside.length)}</span> of <span className="num">{count(points.length)}</span>{' '}
            detections {brush ? 'inside the brush' : '(nothing is brushed)'}
          </p>
          <BrushedTable points={inside} to={to} />
        </>
      )}
      <Caution />
    </div>
  );
}
