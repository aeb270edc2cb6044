import { Button, HTMLSelect } from '@blueprintjs/core';
import { TEAM_ROLES, type TeamRole } from '@eremite/shared/contracts/words';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { NoteDialog } from '#components/dialogs/note-dialog.tsx';
import { membersQuery } from '#lib/queries/members.ts';
import { complain, say } from '#lib/toaster.ts';
import { useRemoveMember, useSetRole } from '../api/people.ts';

interface Member {
  userId: string;
  name: string;
  email: string;
  role: TeamRole;
}

export function Members({ teamId, mayChange, me }: { teamId: string; mayChange: boolean; me: string }) {
  const { data } = useQuery(membersQuery(teamId));
  const setRole = useSetRole(teamId);
  const remove = useRemoveMember(teamId);
  const [leaving, setLeaving] = useState<Member | null>(null);
  const columns: Column<Member>[] = [
    { key: 'name', header: 'Name', align: 'left', cell: ({ name }) => <span className="prose">{name}</span> },
    { key: 'email', header: 'E-mail', align: 'left', cell: ({ email }) => email },
    {
      key: 'role',
      header: 'Role',
      align: 'left',
      cell: ({ userId, name, role }) =>
        mayChange && userId !== me ? (
          <HTMLSelect
            aria-label={`Role of ${name}`}
            value={role}
            options={[...TEAM_ROLES]}
            onChange={(event) =>
              setRole.mutate(
                { userId, role: event.target.value as TeamRole },
                { onSuccess: (m) => void say(`${name} is now ${m.role}.`), onError: (error) => void complain(error) },
              )
            }
          />
        ) : (
          <span className="prose">{role}</span>
        ),
    },
  ];
  if (mayChange) {
    columns.push({
      key: 'remove',
      header: <span className="visually-hidden">Remove</span>,
      cell: (member) =>
        member.userId !== me && (
          <Button
            size="small"
            variant="minimal"
            text="Remove"
            aria-label={`Remove ${member.name}`}
            onClick={() => setLeaving(member)}
          />
        ),
    });
  }
  return (
    <>
      <DataTable
        caption="Members of the team"
        columns={columns}
        rows={data?.items ?? []}
        rowKey={({ userId }) => userId}
      />
      <NoteDialog
        isOpen={leaving !== null}
        title={`Remove ${leaving?.name ?? ''} from the team?`}
        doIt="Remove"
        danger
        withoutNote
        isPending={remove.isPending}
        error={remove.error}
        onClose={() => setLeaving(null)}
        onConfirm={() => leaving && remove.mutate(leaving.userId, { onSuccess: () => setLeaving(null) })}
      >
        <p>Reviews and notes stay, with the name. The account itself is not touched.</p>
      </NoteDialog>
    </>
  );
}
