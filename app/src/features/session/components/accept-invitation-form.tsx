import { Button, FormGroup, InputGroup } from '@blueprintjs/core';
import { useState, type FormEvent } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { useAcceptInvitation } from '../api/accept-invitation.ts';

interface AcceptInvitationFormProps {
  token: string;
  /** The e-mail has an account already: its own password joins. */
  hasAccount: boolean;
  onAccepted: () => void;
}

export function AcceptInvitationForm({ token, hasAccount, onAccepted }: AcceptInvitationFormProps) {
  const [name, setName] = useState('');
  const [password, setPassword] = useState('');
  const accept = useAcceptInvitation();
  const submit = (event: FormEvent) => {
    event.preventDefault();
    accept.mutate({ token, name, password }, { onSuccess: onAccepted });
  };
  return (
    <form onSubmit={submit}>
      <FormGroup label="Your name" labelFor="name" helperText="As it should stand beside your decisions.">
        <InputGroup id="name" autoComplete="name" autoFocus required value={name} onValueChange={setName} />
      </FormGroup>
      <FormGroup
        label="Password"
        labelFor="new-password"
        helperText={hasAccount ? 'The one of your account here.' : 'At least 10 characters.'}
      >
        <InputGroup
          id="new-password"
          type="password"
          autoComplete={hasAccount ? 'current-password' : 'new-password'}
          minLength={10}
          required
          value={password}
          onValueChange={setPassword}
        />
      </FormGroup>
      <div className="stack">
        <ProblemCallout error={accept.error} />
        <Button type="submit" intent="primary" text="Join the team" fill loading={accept.isPending} />
      </div>
    </form>
  );
}
