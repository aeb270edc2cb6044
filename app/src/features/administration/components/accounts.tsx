import { Button } from '@blueprintjs/core';
import type { Account } from '@eremite/shared/contracts/admin';
import { useQuery } from '@tanstack/react-query';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { day } from '#lib/format/time.ts';
import { complain, say } from '#lib/toaster.ts';
import { accountsQuery, useSetDisabled } from '../api/administration.ts';

export function Accounts({ me }: { me: string }) {
  const { data } = useQuery(accountsQuery());
  const set = useSetDisabled();
  const toggle = ({ id, name, disabled }: Account) =>
    set.mutate(
      { id, disabled: !disabled },
      {
        onSuccess: () =>
          void say(`${name} is ${disabled ? 'enabled' : 'disabled'}.`, () => set.mutate({ id, disabled })),
        onError: (error) => void complain(error),
      },
    );
  const columns: Column<Account>[] = [
    { key: 'name', header: 'Name', align: 'left', cell: ({ name }) => <span className="prose">{name}</span> },
    { key: 'email', header: 'E-mail', align: 'left', cell: ({ email }) => email },
    {
      key: 'admin',
      header: 'Administrator',
      align: 'left',
      cell: ({ isAdministrator }) => <span className="prose">{isAdministrator ? 'yes' : ''}</span>,
    },
    { key: 'teams', header: 'Teams', cell: ({ teams }) => teams },
    { key: 'since', header: 'Since', align: 'left', cell: ({ createdAt }) => day(createdAt) },
    {
      key: 'do',
      header: <span className="visually-hidden">Change</span>,
      cell: (account) =>
        account.id !== me && (
          <Button
            size="small"
            text={account.disabled ? 'Enable' : 'Disable'}
            aria-label={`${account.disabled ? 'Enable' : 'Disable'} ${account.name}`}
            onClick={() => toggle(account)}
          />
        ),
    },
  ];
  return (
    <DataTable
      caption="Accounts"
      columns={columns}
      rows={data?.items ?? []}
      rowKey={({ id }) => id}
      rowClass={({ disabled }) => (disabled ? 'is-quiet' : undefined)}
    />
  );
}
