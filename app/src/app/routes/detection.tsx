import { useQuery, useQueryClient, useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { useCallback, useEffect } from 'react';
import { useLocation, useNavigate, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router-dom';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { criteriaQuery, verdictDetailQuery } from '#features/detection/api/verdict-detail.ts';
import { DetectionView } from '#features/detection/components/detection-view.tsx';
import { Queue } from '#features/detection/components/queue.tsx';
import { paths } from '#config/paths.ts';
import { cataloguesQuery } from '#lib/queries/catalogues.ts';
import { docketQuery } from '#lib/queries/docket.ts';
import { chosenRun, runsQuery } from '#lib/queries/runs.ts';
import { verdictsQuery } from '#lib/queries/verdicts.ts';
import { useTitle } from '#lib/use-title.ts';
import '#features/detection/components/detection.css';

const QUEUE = 300;

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(runsQuery(params['surveyId']!));

/** The list the page was reached from: the docket or the filtered table, with the filters of the address. */
function useQueue(surveyId: string, runId: string | undefined, search: URLSearchParams) {
  const fromDocket = useLocation().pathname.includes('/docket/');
  const filters = new URLSearchParams(search);
  ['run', 'tab', 'cursor', 'from', 'columns'].forEach((key) => filters.delete(key));
  const shown = filters.toString();
  filters.set('limit', String(QUEUE));
  const docket = useQuery({ ...docketQuery(surveyId, `?${filters}`), enabled: fromDocket });
  const verdicts = useQuery({
    ...verdictsQuery(runId ?? '', `?${filters}`),
    enabled: !fromDocket && runId !== undefined,
  });
  const query = shown ? `?${shown}` : '';
  return {
    title: fromDocket ? 'Docket' : 'Detections',
    back: (fromDocket ? paths.docket(surveyId) : paths.detections(surveyId)) + query,
    items: (fromDocket ? docket.data : verdicts.data)?.items ?? [],
    total: (fromDocket ? docket.data : verdicts.data)?.total ?? 0,
    to: (id: string) => {
      const keep = search.toString();
      return (fromDocket ? paths.docketDetection : paths.detection)(surveyId, id, keep ? `?${keep}` : '');
    },
  };
}

export function Component() {
  const survey = useSurvey();
  const detectionId = useParams()['detectionId']!;
  const [search, setSearch] = useSearchParams();
  const navigate = useNavigate();
  const client = useQueryClient();
  const { data: runs } = useSuspenseQuery(runsQuery(survey.id));
  const run = chosenRun(runs.items, search.get('run'));
  const detail = useQuery({ ...verdictDetailQuery(run?.id ?? '', detectionId), enabled: run !== undefined });
  const criteria = useQuery({ ...criteriaQuery(run?.criteriaId ?? ''), enabled: run !== undefined });
  const catalogues = useQuery(cataloguesQuery(survey.id));
  const queue = useQueue(survey.id, run?.id, search);
  useTitle(detail.data?.verdict.name, survey.name);

  const place = queue.items.findIndex((item) => item.detectionId === detectionId);
  const next = queue.items[place + 1]?.detectionId;
  const previous = place > 0 ? queue.items[place - 1]?.detectionId : undefined;
  const { to, back } = queue;
  const go = useCallback((id: string | undefined) => id && void navigate(to(id)), [navigate, to]);
  const runId = run?.id;
  useEffect(() => {
    if (next && runId) void client.prefetchQuery(verdictDetailQuery(runId, next));
  }, [client, next, runId]);

  if (!run) {
    return (
      <div className="page">
        <EmptyState title="No verdict yet">This detection has a verdict once a run has finished.</EmptyState>
      </div>
    );
  }
  return (
    <div className="det-page">
      <Queue {...queue} current={detectionId} />
      {detail.isPending && <Loading what="Reading the evidence" />}
      {detail.error && (
        <div className="page">
          <ProblemCallout error={detail.error} />
        </div>
      )}
      {detail.data && (
        <DetectionView
          key={detectionId}
          detail={detail.data}
          surveyId={survey.id}
          role={survey.role}
          settings={criteria.data?.settings}
          catalogues={catalogues.data?.items}
          tab={search.get('tab') ?? 'candidates'}
          onTab={(tab) =>
            setSearch(
              (old) => {
                old.set('tab', tab);
                return old;
              },
              { replace: true },
            )
          }
          onNext={() => go(next)}
          onPrevious={() => go(previous)}
          onBack={() => void navigate(back)}
        />
      )}
    </div>
  );
}
