import { useQuery } from '@tanstack/react-query';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { invitationPreviewQuery } from '#features/session/api/accept-invitation.ts';
import { AcceptInvitationForm } from '#features/session/components/accept-invitation-form.tsx';
import { Door } from '#features/session/components/door.tsx';
import { paths } from '#config/paths.ts';
import { useTitle } from '#lib/use-title.ts';

export function Component() {
  const token = useSearchParams()[0].get('token') ?? '';
  const { data, error } = useQuery(invitationPreviewQuery(token));
  const navigate = useNavigate();
  useTitle('Accept invitation');
  const lede = data ? `${data.teamName} invites ${data.email} as ${data.role}.` : 'Reading the invitation…';
  return (
    <Door title="Join your team" lede={error ? 'This invitation cannot be used.' : lede}>
      <ProblemCallout error={error} />
      {data && (
        <AcceptInvitationForm
          token={token}
          hasAccount={data.hasAccount}
          onAccepted={() => void navigate(paths.surveys(), { replace: true })}
        />
      )}
    </Door>
  );
}
