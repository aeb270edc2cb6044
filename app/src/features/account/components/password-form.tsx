import { Button, FormGroup, InputGroup } from '@blueprintjs/core';
import { useState, type FormEvent } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { say } from '#lib/toaster.ts';
import { useChangePassword } from '../api/account.ts';

const RULES = 'At least 10 characters. Tokens for scripts stay valid: revoke below those you no longer trust.';

export function PasswordForm() {
  const [current, setCurrent] = useState('');
  const [next, setNext] = useState('');
  const change = useChangePassword();
  const submit = (event: FormEvent) => {
    event.preventDefault();
    change.mutate(
      { current, next },
      {
        onSuccess: () => {
          setCurrent('');
          setNext('');
          void say('Your password is changed.');
        },
      },
    );
  };
  return (
    <form onSubmit={submit} style={{ maxWidth: 360 }}>
      <FormGroup label="Present password" labelFor="password-now">
        <InputGroup
          id="password-now"
          type="password"
          autoComplete="current-password"
          required
          value={current}
          onValueChange={setCurrent}
        />
      </FormGroup>
      <FormGroup label="New password" labelFor="password-next" helperText={RULES}>
        <InputGroup
          id="password-next"
          type="password"
          autoComplete="new-password"
          minLength={10}
          required
          value={next}
          onValueChange={setNext}
        />
      </FormGroup>
      <div className="stack">
        <ProblemCallout error={change.error} />
        <div>
          <Button type="submit" text="Change the password" loading={change.isPending} />
        </div>
      </div>
    </form>
  );
}
