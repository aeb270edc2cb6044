import { Button, FormGroup, HTMLSelect, InputGroup } from '@blueprintjs/core';
import { TEAM_ROLES, type TeamRole } from '@eremite/shared/contracts/words';
import { useQuery } from '@tanstack/react-query';
import { useState, type FormEvent } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { moment } from '#lib/format/time.ts';
import { say } from '#lib/toaster.ts';
import { invitationsQuery, useInvite, useRevoke } from '../api/people.ts';

/** Invites a colleague by e-mail and lists the invitations that are open. */
export function Invitations({ teamId }: { teamId: string }) {
  const { data } = useQuery(invitationsQuery(teamId));
  const [email, setEmail] = useState('');
  const [role, setRole] = useState<TeamRole>('reviewer');
  const invite = useInvite(teamId);
  const revoke = useRevoke(teamId);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    invite.mutate(
      { email, role },
      {
        onSuccess: () => {
          void say(`${email} is invited.`);
          setEmail('');
        },
      },
    );
  };
  const open = data?.items.filter(({ acceptedAt }) => acceptedAt === null) ?? [];
  return (
    <div className="stack">
      <form onSubmit={submit} className="row" style={{ alignItems: 'flex-end' }}>
        <FormGroup label="E-mail" labelFor="invite-email" style={{ margin: 0, flex: 1, minWidth: 220 }}>
          <InputGroup id="invite-email" type="email" required value={email} onValueChange={setEmail} />
        </FormGroup>
        <FormGroup label="Role" labelFor="invite-role" style={{ margin: 0 }}>
          <HTMLSelect
            id="invite-role"
            value={role}
            options={[...TEAM_ROLES]}
            onChange={(event) => setRole(event.target.value as TeamRole)}
          />
        </FormGroup>
        <Button type="submit" text="Invite" intent="primary" loading={invite.isPending} />
      </form>
      <ProblemCallout error={invite.error ?? revoke.error} />
      {open.length === 0 ? (
        <p className="muted">No invitation is open.</p>
      ) : (
        <ul className="history">
          {open.map(({ id, email: to, role: as, expiresAt }) => (
            <li key={id} className="row">
              <span className="grow">
                <span className="mono small">{to}</span> as {as}{' '}
                <span className="muted small">until {moment(expiresAt)}</span>
              </span>
              <Button
                size="small"
                variant="minimal"
                text="Revoke"
                aria-label={`Revoke the invitation of ${to}`}
                onClick={() => revoke.mutate(id)}
              />
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}
