import { useQuery } from '@tanstack/react-query';
import { chosenRun, runsQuery } from '#lib/queries/runs.ts';
import { overviewQuery } from '#lib/queries/survey.ts';
import { verdictsQuery } from '#lib/queries/verdicts.ts';
import { searchString } from '#lib/search-string.ts';

/** Few enough to be scored while one types. */
const FEW = 6;

/** The detections a preview speaks of: the first few of the latest run in an order, or of the list before any run. */
export function usePreviewed(surveyId: string, sort: string, search: string) {
  const runs = useQuery(runsQuery(surveyId));
  const run = runs.data && chosenRun(runs.data.items, null);
  const verdicts = useQuery({
    ...verdictsQuery(run?.id ?? '', searchString({ sort, search, limit: FEW })),
    enabled: run !== undefined,
  });
  const listed = useQuery({ ...overviewQuery(surveyId), enabled: runs.isSuccess && run === undefined });
  const named = listed.data?.marks.filter(({ name }) => name.toLowerCase().includes(search.toLowerCase()));
  const items = run ? verdicts.data?.items : named?.slice(0, FEW);
  return { ids: items?.map(({ detectionId }) => detectionId), hasRun: run !== undefined };
}
