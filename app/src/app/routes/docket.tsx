import { Button } from '@blueprintjs/core';
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
import { AgreementPanel } from '#features/docket/components/agreement-panel.tsx';
import { BindingQuestions } from '#features/docket/components/binding-questions.tsx';
import { DocketFilters } from '#features/docket/components/docket-filters.tsx';
import { PhrasesEditor } from '#features/docket/components/phrases-editor.tsx';
import { ReviewerProgress } from '#features/docket/components/reviewer-progress.tsx';
import { docketColumns } from '#features/docket/components/docket-columns.tsx';
import { paths } from '#config/paths.ts';
import { docketQuery } from '#lib/queries/docket.ts';
import { mayLead, mayReview } from '#lib/role.ts';
import { searchString } from '#lib/search-string.ts';
import { useTitle } from '#lib/use-title.ts';
import '#features/docket/components/docket.css';

/** Parameters of the address that narrow or order the docket. */
const NARROWING = ['sort', 'starlight', 'doubtGrade', 'search', 'returned', 'disagreement', 'settled', 'outcome'];

export function Component() {
  const survey = useSurvey();
  const filtering = useSearchFilters();
  const { search } = filtering;
  const navigate = useNavigate();
  useTitle('Docket', survey.name);
  const assigned = search.get('assigned') ?? 'all';
  const state = search.get('state') ?? (mayReview(survey.role) ? 'open' : 'all');
  const narrowing = NARROWING.flatMap((key) => (search.get(key) ? [[key, search.get(key)!] as const] : []));
  const filter = { assigned, state, ...Object.fromEntries(narrowing) };
  const filters = searchString(filter);
  const query = useQuery(docketQuery(survey.id, searchString({ ...filter, limit: 100, cursor: search.get('cursor') })));
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
          <p className="page__lede">
            Detections to look at. What was decided before stays decided while its evidence stands; what moved comes
            back.
          </p>
        </div>
        {first && mayReview(survey.role) && (
          <Button
            intent="primary"
            text="Begin with the first"
            onClick={() => void navigate(paths.docketDetection(survey.id, first.detectionId, filters))}
          />
        )}
      </div>
      <DocketFilters
        teamId={survey.teamId}
        mayReview={mayReview(survey.role)}
        filters={filtering}
        state={state}
        assigned={assigned}
      />
      {mayLead(survey.role) && (
        <div className="filters">
          <ReviewerProgress surveyId={survey.id} />
          <span className="grow" />
          {items.length > 0 && (
            <AssignBar
              surveyId={survey.id}
              teamId={survey.teamId}
              detectionIds={items.map(({ detectionId }) => detectionId)}
              filter={filter}
              total={query.data!.total}
            />
          )}
        </div>
      )}
      <BindingQuestions surveyId={survey.id} mayAnswer={mayReview(survey.role)} />
      <AgreementPanel surveyId={survey.id} />
      {mayReview(survey.role) && <PhrasesEditor surveyId={survey.id} />}
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
            columns={
              items.some(({ moved }) => moved.length > 0) ? columns : columns.filter(({ key }) => key !== 'moved')
            }
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
