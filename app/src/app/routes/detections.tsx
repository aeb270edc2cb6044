import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { useMemo } from 'react';
import { Link, type LoaderFunctionArgs } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { DataTable } from '#components/data-table/data-table.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { Pager } from '#components/filters/pager.tsx';
import { useSearchFilters } from '#components/filters/use-search-filters.ts';
import { RunPicker } from '#components/run-picker/run-picker.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { ColumnChooser } from '#features/detections/components/column-chooser.tsx';
import {
  DEFAULT_COLUMNS,
  detectionColumns,
  FIXED_COLUMNS,
} from '#features/detections/components/detection-columns.tsx';
import { DetectionFilters } from '#features/detections/components/detection-filters.tsx';
import { ExportMenu } from '#features/detections/components/export-menu.tsx';
import { paths } from '#config/paths.ts';
import { chosenRun, runsQuery } from '#lib/queries/runs.ts';
import { verdictsQuery } from '#lib/queries/verdicts.ts';
import { searchString } from '#lib/search-string.ts';
import { useTitle } from '#lib/use-title.ts';

const PAGE = 100;
const FILTERS = ['starlight', 'surroundings', 'doubtGrade', 'search', 'minPNone', 'reviewed', 'sort'];

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(runsQuery(params['surveyId']!));

export function Component() {
  const survey = useSurvey();
  const { data: runs } = useSuspenseQuery(runsQuery(survey.id));
  const { search, set } = useSearchFilters();
  useTitle('Detections', survey.name);
  const run = chosenRun(runs.items, search.get('run'));
  // The likeliest dark ones first, unless told otherwise.
  const sort = search.get('sort') ?? '-pNone';
  const filters = { ...Object.fromEntries(FILTERS.map((key) => [key, search.get(key)])), sort };
  const query = useQuery({
    ...verdictsQuery(run?.id ?? '', searchString({ ...filters, limit: PAGE, cursor: search.get('cursor') })),
    enabled: run !== undefined,
  });
  const chosen = search.get('columns')?.split(',') ?? DEFAULT_COLUMNS;
  const kept = searchString({ ...filters, run: search.get('run') });
  const all = useMemo(() => detectionColumns((id) => paths.detection(survey.id, id, kept)), [survey.id, kept]);
  const optional = all.filter(({ key }) => !FIXED_COLUMNS.includes(key));
  const shown = all.filter(({ key }) => FIXED_COLUMNS.includes(key) || chosen.includes(key));

  if (!run) {
    return (
      <div className="page">
        <EmptyState title="No verdicts yet" action={<Link to={paths.runs(survey.id)}>To the runs</Link>}>
          Verdicts appear here once a run has finished. Publish the HI list and the catalogues to search, then start a
          run.
        </EmptyState>
      </div>
    );
  }
  return (
    <div className="page" style={{ maxWidth: 'none' }}>
      <div className="page__head">
        <div>
          <h1>Detections</h1>
        </div>
        <RunPicker runs={runs.items} value={run.id} onChange={(id) => set({ run: id })} />
        <ColumnChooser
          columns={optional}
          chosen={chosen}
          onChange={(keys) => set({ columns: keys.join(',') || 'none' }, { keepPlace: true, replace: true })}
          onReset={() => set({ columns: null }, { keepPlace: true, replace: true })}
        />
        <ExportMenu runId={run.id} />
      </div>
      <DetectionFilters run={run} />
      <ProblemCallout error={query.error} />
      {query.isLoading && <Loading what="Reading the verdicts" />}
      {query.data?.items.length === 0 && (
        <EmptyState title="Nothing fits these filters">Take one of the filters off to see more.</EmptyState>
      )}
      {query.data && query.data.items.length > 0 && (
        <>
          <DataTable
            caption="Detections and their verdicts"
            columns={shown}
            rows={query.data.items}
            rowKey={(item) => item.detectionId}
            sort={sort}
            onSort={(sort) => set({ sort })}
            isStale={query.isPlaceholderData}
          />
          <Pager shown={query.data.items.length} total={query.data.total} nextCursor={query.data.nextCursor} />
        </>
      )}
      <Caution />
    </div>
  );
}
