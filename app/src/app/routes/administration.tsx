import { useSuspenseQuery } from '@tanstack/react-query';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { Panel } from '#components/panel/panel.tsx';
import { Accounts } from '#features/administration/components/accounts.tsx';
import { Jobs } from '#features/administration/components/jobs.tsx';
import { StorageFacts } from '#features/administration/components/storage-facts.tsx';
import { Teams } from '#features/administration/components/teams.tsx';
import { meQuery } from '#lib/queries/me.ts';
import { useTitle } from '#lib/use-title.ts';

export function Component() {
  const { data: me } = useSuspenseQuery(meQuery());
  useTitle('Administration');
  if (!me.isAdministrator) {
    return (
      <main id="content" className="page">
        <EmptyState title="For administrators">Ask the administrator of this installation.</EmptyState>
      </main>
    );
  }
  return (
    <main id="content" className="page stack">
      <div>
        <h1>Administration</h1>
        <p className="page__lede">Accounts, teams, work and storage. A team’s data stay the team’s.</p>
      </div>
      <Panel title="Accounts">
        <Accounts me={me.id} />
      </Panel>
      <div className="columns">
        <Panel title="Teams">
          <Teams />
        </Panel>
        <Panel title="Storage">
          <StorageFacts />
        </Panel>
      </div>
      <Panel title="Work">
        <Jobs />
      </Panel>
    </main>
  );
}
