import { Button, FormGroup, InputGroup } from '@blueprintjs/core';
import { useQuery } from '@tanstack/react-query';
import { useState, type FormEvent } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { say } from '#lib/toaster.ts';
import { allTeamsQuery, useCreateTeam } from '../api/administration.ts';

export function Teams() {
  const { data } = useQuery(allTeamsQuery());
  const [name, setName] = useState('');
  const create = useCreateTeam();
  const submit = (event: FormEvent) => {
    event.preventDefault();
    create.mutate(name, {
      onSuccess: () => {
        void say(`${name} is made.`);
        setName('');
      },
    });
  };
  return (
    <div className="stack">
      <ul className="history">
        {data?.items.map((team) => (
          <li key={team.id}>
            {team.name}{' '}
            <span className="muted small">
              <span className="num">{team.members}</span> {team.members === 1 ? 'member' : 'members'}
              {team.role && `, you are ${team.role}`}
            </span>
          </li>
        ))}
      </ul>
      <form onSubmit={submit} className="row" style={{ alignItems: 'flex-end' }}>
        <FormGroup label="New team" labelFor="team-name" style={{ margin: 0, width: 280 }}>
          <InputGroup id="team-name" required maxLength={100} value={name} onValueChange={setName} />
        </FormGroup>
        <Button type="submit" text="Make the team" loading={create.isPending} />
      </form>
      <ProblemCallout error={create.error} />
    </div>
  );
}
