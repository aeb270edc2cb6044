import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import { useQuery, useQueryClient, useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { useCallback, useEffect } from 'react';
import { useLocation, useNavigate, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router-dom';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import {
  doubtWordsQuery,
  overridesQuery,
  remarksQuery,
  reviewsQuery,
  settlementQuery,
} from '#features/detection/api/decisions.ts';
import { criteriaQuery, verdictDetailQuery } from '#features/detection/api/verdict-detail.ts';
import { DetectionView } from '#features/detection/components/detection-view.tsx';
import { useWorkingList } from '#features/detection/hooks/use-working-list.ts';
import { Queue } from '#features/detection/components/queue.tsx';
import { paths } from '#config/paths.ts';
import { cataloguesQuery } from '#lib/queries/catalogues.ts';
import { docketQuery } from '#lib/queries/docket.ts';
import { chosenRun, runsQuery } from '#lib/queries/runs.ts';
import { verdictsQuery } from '#lib/queries/verdicts.ts';
import { say } from '#lib/toaster.ts';
import { useTitle } from '#lib/use-title.ts';
import '#features/detection/components/detection.css';

const QUEUE = 300;

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(runsQuery(params['surveyId']!));

/** Detections read ahead of the one on the page, and behind it: moving on is then only drawing. */
const AHEAD = 3;

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
  const data = fromDocket ? docket.data : verdicts.data;
  const items = useWorkingList<VerdictItem>(`${fromDocket} ${runId} ${shown}`, data?.items);
  const keep = search.toString();
  const to = useCallback(
    (id: string) => (fromDocket ? paths.docketDetection : paths.detection)(surveyId, id, keep ? `?${keep}` : ''),
    [fromDocket, surveyId, keep],
  );
  return {
    title: fromDocket ? 'Docket' : 'Detections',
    back: (fromDocket ? paths.docket(surveyId) : paths.detections(surveyId)) + query,
    items,
    total: data?.total ?? 0,
    to,
  };
}

/** Reads what the detections around the present one will show. */
function usePrefetch(runId: string | undefined, around: readonly string[]) {
  const client = useQueryClient();
  const ids = around.join(' ');
  useEffect(() => {
    if (!runId || ids === '') return;
    for (const id of ids.split(' ')) {
      void client.prefetchQuery(verdictDetailQuery(runId, id));
      void client.prefetchQuery(reviewsQuery(id));
      void client.prefetchQuery(overridesQuery(id));
      void client.prefetchQuery(doubtWordsQuery(id));
      void client.prefetchQuery(remarksQuery(id));
      void client.prefetchQuery(settlementQuery(id));
    }
  }, [client, ids, runId]);
}

export function Component() {
  const survey = useSurvey();
  const detectionId = useParams()['detectionId']!;
  const [search, setSearch] = useSearchParams();
  const navigate = useNavigate();
  const { data: runs } = useSuspenseQuery(runsQuery(survey.id));
  const run = chosenRun(runs.items, search.get('run'));
  const latest = chosenRun(runs.items, null);
  const detail = useQuery({ ...verdictDetailQuery(run?.id ?? '', detectionId), enabled: run !== undefined });
  const criteria = useQuery({ ...criteriaQuery(run?.criteriaId ?? ''), enabled: run !== undefined });
  const catalogues = useQuery(cataloguesQuery(survey.id));
  const queue = useQueue(survey.id, run?.id, search);
  useTitle(detail.data?.verdict.name, survey.name);

  const place = queue.items.findIndex((item) => item.detectionId === detectionId);
  const around = queue.items.slice(Math.max(0, place - 1), place + 1 + AHEAD).map((item) => item.detectionId);
  const next = queue.items[place + 1]?.detectionId;
  const previous = place > 0 ? queue.items[place - 1]?.detectionId : undefined;
  const { to, back } = queue;
  const go = useCallback((id: string | undefined) => id && void navigate(to(id)), [navigate, to]);
  const onNext = useCallback(() => {
    if (next) void go(next);
    else void say('This was the last of the list.');
  }, [go, next]);
  const onPrevious = useCallback(() => void go(previous), [go, previous]);
  const onBack = useCallback(() => void navigate(back), [navigate, back]);
  const onTab = useCallback(
    (tab: string) =>
      setSearch(
        (old) => {
          old.set('tab', tab);
          return old;
        },
        { replace: true },
      ),
    [setSearch],
  );
  // Only once the detection on the page is there: it goes first.
  usePrefetch(
    detail.data ? run?.id : undefined,
    around.filter((id) => id !== detectionId),
  );

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
          teamId={survey.teamId}
          role={survey.role}
          settings={criteria.data?.settings}
          catalogues={catalogues.data?.items}
          tab={search.get('tab') ?? 'candidates'}
          onTab={onTab}
          onNext={onNext}
          onPrevious={onPrevious}
          onBack={onBack}
          onReturn={go}
          newerRun={
            latest && latest.number > run.number
              ? { number: latest.number, to: paths.detection(survey.id, detectionId, `?run=${latest.id}`) }
              : undefined
          }
        />
      )}
    </div>
  );
}
