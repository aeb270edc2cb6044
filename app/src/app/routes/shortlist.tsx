import { AnchorButton } from '@blueprintjs/core';
import type { PutShortlistRequest, Shortlist } from '@eremite/shared/contracts/shortlist';
import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, type LoaderFunctionArgs } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { EntryDialog } from '#features/shortlist/components/entry-dialog.tsx';
import { ShortlistTable } from '#features/shortlist/components/shortlist-table.tsx';
import { API_BASE, paths } from '#config/paths.ts';
import { entriesOf, shortlistQuery, useSaveShortlist } from '#lib/queries/shortlist.ts';
import { mayLead } from '#lib/role.ts';
import { say } from '#lib/toaster.ts';
import { useTitle } from '#lib/use-title.ts';

type Entries = PutShortlistRequest['entries'];

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(shortlistQuery(params['surveyId']!));

export function Component() {
  const survey = useSurvey();
  const { data: list } = useSuspenseQuery(shortlistQuery(survey.id));
  const save = useSaveShortlist(survey.id);
  const [editing, setEditing] = useState<Shortlist['entries'][number] | null>(null);
  useTitle('Shortlist', survey.name);
  const runId = list.runId;
  const write = (entries: Entries, version = list.version, after?: (saved: Shortlist) => void) =>
    runId && save.mutate({ runId, entries, version }, { onSuccess: after });
  const move = (at: number, by: -1 | 1) => {
    const entries = entriesOf(list);
    entries.splice(at + by, 0, ...entries.splice(at, 1));
    write(entries);
  };
  const remove = (at: number) => {
    const before = entriesOf(list);
    write(
      before.filter((_, i) => i !== at),
      list.version,
      (saved) => {
        void say(`${list.entries[at]?.verdict?.name ?? 'It'} is off the shortlist.`, () =>
          write(before, saved.version),
        );
      },
    );
  };
  const edit = (fields: { reason: string; nullResult: string }) => {
    const entries = entriesOf(list).map((entry) =>
      entry.detectionId === editing?.detectionId ? { ...entry, ...fields } : entry,
    );
    write(entries, list.version, () => setEditing(null));
  };
  return (
    <div className="page" style={{ maxWidth: 'none' }}>
      <div className="page__head">
        <div>
          <h1>Shortlist</h1>
          <p className="page__lede">
            What the team would point a telescope at, in order
            {list.runNumber ? `; verdicts of run ${list.runNumber}` : ''}.
          </p>
        </div>
        {list.entries.length > 0 &&
          (['csv', 'votable'] as const).map((format) => (
            <AnchorButton
              key={format}
              text={format === 'csv' ? 'Export CSV' : 'Export VOTable'}
              href={`${API_BASE}/surveys/${survey.id}/shortlist/export?format=${format}`}
              download
            />
          ))}
      </div>
      <ProblemCallout error={save.error} />
      {list.entries.length === 0 ? (
        <EmptyState
          title="The shortlist is empty"
          action={
            <Link to={paths.detections(survey.id, '?starlight=dark,nearly dark')}>Dark and nearly dark detections</Link>
          }
        >
          {mayLead(survey.role)
            ? 'Open a detection and press L to put it on the list.'
            : 'The lead puts detections here once they are reviewed.'}
        </EmptyState>
      ) : (
        <ShortlistTable
          entries={list.entries}
          to={(id) => paths.detection(survey.id, id, runId ? `?run=${runId}` : '')}
          actions={mayLead(survey.role) ? { move, remove, edit: setEditing } : undefined}
          isPending={save.isPending}
        />
      )}
      {editing && (
        <EntryDialog
          name={editing.verdict?.name ?? 'Detection'}
          reason={editing.reason}
          nullResult={editing.nullResult}
          isPending={save.isPending}
          onClose={() => setEditing(null)}
          onSave={edit}
        />
      )}
      <Caution />
    </div>
  );
}
