import { useNavigate, useParams } from 'react-router-dom';
import { AcceptInvitationForm } from '#features/session/components/accept-invitation-form.tsx';
import { Door } from '#features/session/components/door.tsx';
import { paths } from '#config/paths.ts';
import { say } from '#lib/toaster.ts';
import { useTitle } from '#lib/use-title.ts';

export function Component() {
  const token = useParams()['token']!;
  const navigate = useNavigate();
  useTitle('Accept invitation');
  const onAccepted = () => {
    void say('You have joined the team. Sign in with your e-mail and the password you chose.');
    void navigate(paths.signIn());
  };
  return (
    <Door title="Join your team" lede="Choose a password; your e-mail is the one the invitation was sent to.">
      <AcceptInvitationForm token={token} onAccepted={onAccepted} />
    </Door>
  );
}
