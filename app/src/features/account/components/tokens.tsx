import { Button, Callout, FormGroup, HTMLSelect, InputGroup } from '@blueprintjs/core';
import { useQuery } from '@tanstack/react-query';
import { useState, type FormEvent } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { day } from '#lib/format/time.ts';
import { complain, say } from '#lib/toaster.ts';
import { tokensQuery, useCreateToken, useRevokeToken } from '../api/account.ts';

/** Tokens for scripts: shown once, kept as a hash, with a scope and an end. */
export function Tokens() {
  const { data } = useQuery(tokensQuery());
  const [name, setName] = useState('');
  const [scope, setScope] = useState<'read' | 'write'>('read');
  const [days, setDays] = useState('90');
  const create = useCreateToken();
  const revoke = useRevokeToken();
  const submit = (event: FormEvent) => {
    event.preventDefault();
    create.mutate({ name, scope, expiresInDays: Number(days) }, { onSuccess: () => setName('') });
  };
  return (
    <div className="stack">
      <form onSubmit={submit} className="row" style={{ alignItems: 'flex-end' }}>
        <FormGroup label="For" labelFor="token-name" style={{ margin: 0, flex: 1, minWidth: 180 }}>
          <InputGroup
            id="token-name"
            required
            maxLength={100}
            placeholder="what will use it"
            value={name}
            onValueChange={setName}
          />
        </FormGroup>
        <FormGroup label="May" labelFor="token-scope" style={{ margin: 0 }}>
          <HTMLSelect
            id="token-scope"
            value={scope}
            onChange={(event) => setScope(event.target.value as 'read' | 'write')}
            options={['read', 'write']}
          />
        </FormGroup>
        <FormGroup label="Days" labelFor="token-days" style={{ margin: 0, width: 90 }}>
          <InputGroup id="token-days" type="number" min={1} max={366} required value={days} onValueChange={setDays} />
        </FormGroup>
        <Button type="submit" text="Make a token" loading={create.isPending} />
      </form>
      <ProblemCallout error={create.error} />
      {create.data && (
        <Callout intent="primary" icon={null} title="Copy it now: it is not shown again">
          <code className="mono" style={{ overflowWrap: 'anywhere', userSelect: 'all' }}>
            {create.data.token}
          </code>
        </Callout>
      )}
      {data?.items.length === 0 && <p className="muted">You have no token.</p>}
      <ul className="history">
        {data?.items.map((token) => (
          <li key={token.id} className="row">
            <span className="grow">
              {token.name}{' '}
              <span className="muted small">
                {token.scope}, until {day(token.expiresAt)},{' '}
                {token.lastUsedAt ? `last used ${day(token.lastUsedAt)}` : 'never used'}
              </span>
            </span>
            <Button
              size="small"
              variant="minimal"
              text="Revoke"
              aria-label={`Revoke ${token.name}`}
              onClick={() =>
                revoke.mutate(token.id, {
                  onSuccess: () => void say('The token is revoked.'),
                  onError: (error) => void complain(error),
                })
              }
            />
          </li>
        ))}
      </ul>
    </div>
  );
}
