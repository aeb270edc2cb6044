import { Button, SegmentedControl } from '@blueprintjs/core';
import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { DataTable } from '#components/data-table/data-table.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { Pager } from '#components/filters/pager.tsx';
import { useSearchFilters } from '#components/filters/use-search-filters.ts';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { AssignBar } from '#features/docket/components/assign-bar.tsx';
import { ReviewerProgress } from '#features/docket/components/reviewer-progress.tsx';
import { docketColumns } from '#features/docket/components/docket-columns.tsx';
import { paths } from '#config/paths.ts';
import { docketQuery } from '#lib/queries/docket.ts';
import { mayLead, mayReview } from '#lib/role.ts';
import { searchString } from '#lib/search-string.ts';
import { useTitle } from '#lib/use-title.ts';

export function Component() {
  const survey = useSurvey();
  const { search, set } = useSearchFilters();
  const navigate = useNavigate();
  useTitle('Docket', survey.name);
  const assigned = search.get('assigned') ?? 'all';
  const state = search.get('state') ?? (mayReview(survey.role) ? 'open' : 'all');
  const filters = searchString({ assigned, state });
  const query = useQuery(
    docketQuery(survey.id, searchString({ assigned, state, limit: 100, cursor: search.get('cursor') })),
  );
  const columns = useMemo(
    () => docketColumns((id) => paths.docketDetection(survey.id, id, filters)),
    [survey.id, filters],
  );
  const items = query.data?.items ?? [];
  const first = items[0];
  return (
    <div className="page">
      <div className="page__head">
        <div>
          <h1>Docket</h1>
          <p className="page__lede">Detections to look at: worst doubt and best candidate first.</p>
        </div>
        {first && mayReview(survey.role) && (
          <Button
            intent="primary"
            text="Begin with the first"
            onClick={() => void navigate(paths.docketDetection(survey.id, first.detectionId, filters))}
          />
        )}
      </div>
      <div className="filters">
        {mayReview(survey.role) && (
          <>
            <SegmentedControl
              aria-label="State"
              options={[
                { label: 'To review', value: 'open' },
                { label: 'Reviewed by me', value: 'done' },
                { label: 'All', value: 'all' },
              ]}
              value={state}
              onValueChange={(value) => set({ state: value })}
            />
            <SegmentedControl
              aria-label="Assigned"
              options={[
                { label: 'Everyone’s', value: 'all' },
                { label: 'Assigned to me', value: 'me' },
              ]}
              value={assigned}
              onValueChange={(value) => set({ assigned: value })}
            />
          </>
        )}
        <span className="grow" />
        {mayLead(survey.role) && items.length > 0 && (
          <AssignBar
            surveyId={survey.id}
            teamId={survey.teamId}
            detectionIds={items.map(({ detectionId }) => detectionId)}
            filter={{ assigned, state }}
            total={query.data!.total}
          />
        )}
      </div>
      {mayLead(survey.role) && <ReviewerProgress surveyId={survey.id} />}
      <ProblemCallout error={query.error} />
      {query.isLoading && <Loading what="Reading the docket" />}
      {query.data && items.length === 0 && (
        <EmptyState title="The docket is empty" action={<Link to={paths.detections(survey.id)}>All detections</Link>}>
          {survey.latestRun ? 'Nothing waits here under this choice.' : 'It fills once a run has finished.'}
        </EmptyState>
      )}
      {items.length > 0 && (
        <>
          <DataTable
            caption="Docket"
            columns={columns}
            rows={items}
            rowKey={(item) => item.detectionId}
            isStale={query.isPlaceholderData}
          />
          <Pager shown={items.length} total={query.data!.total} nextCursor={query.data!.nextCursor} />
        </>
      )}
      <Caution />
    </div>
  );
}
