import { Button, FormGroup, InputGroup } from '@blueprintjs/core';
import { useState, type FormEvent } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { useSignIn } from '../api/sign-in.ts';

export function SignInForm({ onSignedIn }: { onSignedIn: () => void }) {
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const signIn = useSignIn();
  const submit = (event: FormEvent) => {
    event.preventDefault();
    signIn.mutate({ email: email.trim().toLowerCase(), password }, { onSuccess: onSignedIn });
  };
  return (
    <form onSubmit={submit}>
      <FormGroup label="E-mail" labelFor="email">
        <InputGroup
          id="email"
          type="email"
          autoComplete="username"
          autoFocus
          required
          value={email}
          onValueChange={setEmail}
        />
      </FormGroup>
      <FormGroup label="Password" labelFor="password">
        <InputGroup
          id="password"
          type="password"
          autoComplete="current-password"
          required
          value={password}
          onValueChange={setPassword}
        />
      </FormGroup>
      <div className="stack">
        <ProblemCallout error={signIn.error} />
        <Button type="submit" intent="primary" text="Sign in" fill loading={signIn.isPending} />
      </div>
    </form>
  );
}
