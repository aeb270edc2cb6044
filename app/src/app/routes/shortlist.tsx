import { AnchorButton, Button } from '@blueprintjs/core';
import type { PutShortlistRequest, Shortlist } from '@eremite/shared/contracts/shortlist';
import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate, type LoaderFunctionArgs } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { NoteDialog } from '#components/dialogs/note-dialog.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { ObservabilityPanel } from '#components/observability/observability-panel.tsx';
import { Panel } from '#components/panel/panel.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { useFreeze } from '#features/editions/api/editions.ts';
import { EntryDialog } from '#features/shortlist/components/entry-dialog.tsx';
import { RulePanel } from '#features/shortlist/components/rule-panel.tsx';
import { ShortlistTable } from '#features/shortlist/components/shortlist-table.tsx';
import { API_BASE, paths } from '#config/paths.ts';
import { entriesOf, shortlistQuery, useSaveShortlist } from '#lib/queries/shortlist.ts';
import { chosenRun, runsQuery } from '#lib/queries/runs.ts';
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
  const isLead = mayLead(survey.role);
  const { data: runs } = useQuery(runsQuery(survey.id));
  const runId = list.runId ?? chosenRun(runs?.items ?? [], null)?.id ?? null;
  const freeze = useFreeze(survey.id);
  const navigate = useNavigate();
  const [isFreezing, setFreezing] = useState(false);
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
  const take = (proposed: Entries, how: 'replace' | 'add') => {
    const before = entriesOf(list);
    const kept = new Map(before.map((entry) => [entry.detectionId, entry]));
    const fresh = proposed.filter(({ detectionId }) => !kept.has(detectionId));
    // What somebody wrote of an entry stays with it.
    const next = how === 'add' ? [...before, ...fresh] : proposed.map((entry) => kept.get(entry.detectionId) ?? entry);
    write(next, list.version, (saved) => {
      void say('The shortlist is changed.', () => write(before, saved.version));
    });
  };
  const edit = (fields: { reason: string; nullResult: string }) => {
    const entries = entriesOf(list).map((entry) =>
      entry.detectionId === editing?.detectionId ? { ...entry, ...fields } : entry,
    );
    write(entries, list.version, () => setEditing(null));
  };
  return (
    <div className="page stack" style={{ maxWidth: 'none' }}>
      <div className="page__head" style={{ marginBottom: 0 }}>
        <div>
          <h1>Shortlist</h1>
          <p className="page__lede">
            What the team would point a telescope at, in order
            {list.runNumber ? `; verdicts of run ${list.runNumber}` : ''}.
          </p>
        </div>
        {list.entries.length > 0 && isLead && (
          <Button text="Freeze an edition" intent="primary" onClick={() => setFreezing(true)} />
        )}
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
          {isLead
            ? 'Settle detections, then pick them by a rule below, or open one and press L.'
            : 'The lead puts detections here once they are reviewed.'}
        </EmptyState>
      ) : (
        <ShortlistTable
          entries={list.entries}
          to={(id) => paths.detection(survey.id, id, runId ? `?run=${runId}` : '')}
          actions={isLead ? { move, remove, edit: setEditing } : undefined}
          isPending={save.isPending}
        />
      )}
      {isLead && runId && (
        <Panel title="Pick by a rule">
          <RulePanel
            surveyId={survey.id}
            runId={runId}
            to={(id) => paths.detection(survey.id, id, `?run=${runId}`)}
            isPending={save.isPending}
            onTake={take}
          />
        </Panel>
      )}
      {list.entries.length > 0 && (
        <Panel title="Observability">
          <ObservabilityPanel base={`/surveys/${survey.id}/shortlist`} />
        </Panel>
      )}
      <NoteDialog
        isOpen={isFreezing}
        title="Freeze an edition"
        doIt="Freeze"
        isPending={freeze.isPending}
        error={freeze.error}
        onClose={() => setFreezing(false)}
        onConfirm={(note) =>
          freeze.mutate(
            { note, version: list.version },
            { onSuccess: ({ id }) => void navigate(paths.edition(survey.id, id)) },
          )
        }
      >
        <p>
          The list, its inputs, criteria, run and everything said of it are kept under the next number and never change.
          Say what the edition is for.
        </p>
      </NoteDialog>
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
