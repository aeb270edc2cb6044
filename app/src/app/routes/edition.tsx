import { Callout } from '@blueprintjs/core';
import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { Link, useParams, type LoaderFunctionArgs } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { JobProgress } from '#components/job-progress/job-progress.tsx';
import { ObservabilityPanel } from '#components/observability/observability-panel.tsx';
import { Panel } from '#components/panel/panel.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { DifferencePanel } from '#features/editions/components/difference-panel.tsx';
import { Downloads } from '#features/editions/components/downloads.tsx';
import { EditionFacts } from '#features/editions/components/edition-facts.tsx';
import { EntryTable } from '#features/editions/components/entry-table.tsx';
import { GuestLinks } from '#features/editions/components/guest-links.tsx';
import { MethodsText } from '#features/editions/components/methods-text.tsx';
import { ReplayPanel } from '#features/editions/components/replay-panel.tsx';
import '#features/editions/components/editions.css';
import { paths } from '#config/paths.ts';
import { editionQuery } from '#lib/queries/editions.ts';
import { mayLead } from '#lib/role.ts';
import { useTitle } from '#lib/use-title.ts';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(editionQuery(params['editionId']!));

export function Component() {
  const survey = useSurvey();
  const editionId = useParams()['editionId']!;
  const { data: edition } = useSuspenseQuery(editionQuery(editionId));
  useTitle(`Edition ${edition.number}`, survey.name);
  const isLead = mayLead(survey.role);
  const { supersedes, supersededBy } = edition;
  return (
    <div className="page stack">
      <div className="page__head" style={{ marginBottom: 0 }}>
        <div>
          <h1>Edition {edition.number}</h1>
          <p className="page__lede">{edition.note}</p>
        </div>
        {supersedes && <Link to={paths.edition(survey.id, supersedes.id)}>supersedes edition {supersedes.number}</Link>}
      </div>
      {supersededBy && (
        <Callout icon={null}>
          Superseded by <Link to={paths.edition(survey.id, supersededBy.id)}>edition {supersededBy.number}</Link>.
        </Callout>
      )}
      {edition.state === 'packing' && edition.jobId && (
        <JobProgress jobId={edition.jobId} title="Packing the archive" mayCancel={isLead} />
      )}
      {edition.state === 'failed' && (
        <Callout intent="danger" icon={null} role="alert" title="The archive could not be packed">
          {edition.error} Freeze the shortlist again.
        </Callout>
      )}
      <EntryTable
        entries={edition.list}
        name={({ detectionId, verdict }) => (
          <Link to={paths.detection(survey.id, detectionId, `?run=${edition.run.id}`)}>{verdict.name}</Link>
        )}
      />
      <Panel title="Take away">
        <Downloads base={`/editions/${edition.id}`} hasArchive={edition.archive !== null} />
      </Panel>
      <div className="columns">
        <Panel title="Repeat it">
          <ReplayPanel editionId={edition.id} isReady={edition.state === 'frozen'} mayCancel={isLead} />
        </Panel>
        {isLead && (
          <Panel title="Guest links">
            <GuestLinks editionId={edition.id} />
          </Panel>
        )}
      </div>
      {supersedes && (
        <Panel title={`What changed since edition ${supersedes.number}`}>
          <DifferencePanel editionId={edition.id} from={supersedes} />
        </Panel>
      )}
      <Panel title="Observability">
        <ObservabilityPanel base={`/editions/${edition.id}`} />
      </Panel>
      <Panel title="Methods paragraph">
        <MethodsText text={edition.methods} />
      </Panel>
      <Panel title="What it stands on">
        <EditionFacts edition={edition} />
      </Panel>
      <Caution />
    </div>
  );
}
