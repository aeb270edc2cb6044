import { useSuspenseQuery } from '@tanstack/react-query';
import { Panel } from '#components/panel/panel.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { Invitations } from '#features/people/components/invitations.tsx';
import { Members } from '#features/people/components/members.tsx';
import { Outbox } from '#features/people/components/outbox.tsx';
import { meQuery } from '#lib/queries/me.ts';
import { mayLead } from '#lib/role.ts';
import { useTitle } from '#lib/use-title.ts';

export function Component() {
  const survey = useSurvey();
  const { data: me } = useSuspenseQuery(meQuery());
  const isLead = mayLead(survey.role);
  useTitle('People', survey.name);
  return (
    <div className="page page--narrow stack">
      <div>
        <h1>People</h1>
        <p className="page__lede">
          {survey.teamName}. Leads do everything, reviewers decide on detections, observers read.
        </p>
      </div>
      <Panel title="Members">
        <Members teamId={survey.teamId} mayChange={isLead} me={me.id} />
      </Panel>
      {isLead && (
        <>
          <Panel title="Invite a colleague">
            <Invitations teamId={survey.teamId} />
          </Panel>
          <Panel title="Outbox">
            <Outbox />
          </Panel>
        </>
      )}
    </div>
  );
}
