import { Callout } from '@blueprintjs/core';
import type { Intake } from '@eremite/shared/contracts/intake';
import type { Job } from '@eremite/shared/contracts/job';
import { type ReactNode } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { WideTable } from '#components/wide-table/wide-table.tsx';
import { useIntakeDraft } from '../hooks/use-intake-draft.ts';
import { BandFields } from './band-fields.tsx';
import { CheckPanel } from './check-panel.tsx';
import { ColumnRoles } from './column-roles.tsx';
import { ChoiceField, TextField } from './field.tsx';
import { MeaningFields } from './meaning-fields.tsx';
import { PublishPanel } from './publish-panel.tsx';
import { RestFields } from './rest-fields.tsx';
import { KIND_WORDS } from './role-words.ts';
import './intake.css';

interface IntakeWizardProps {
  intake: Intake;
  onPublished: (job: Job) => void;
  onDiscarded: () => void;
}

/** Everything the table needs said of it, in the order one would say it, with the outcome always in sight. */
export function IntakeWizard({ intake, onPublished, onDiscarded }: IntakeWizardProps) {
  const { draft, change, isChecking, error } = useIntakeDraft(intake);
  const several = intake.tables.length > 1;
  const tables = Object.fromEntries(
    intake.tables.map(({ index, name, rows, columns }) => [
      String(index),
      `${name} (${rows ?? '?'} rows, ${columns} columns)`,
    ]),
  ) as Record<string, string>;
  return (
    <div className="intake">
      <div className="stack">
        {intake.warnings.map((warning) => (
          <Callout key={warning} intent="warning" icon={null}>
            {warning}
          </Callout>
        ))}
        <Step number={1} title="The table">
          <div className="columns field-grid">
            {several && (
              <ChoiceField
                label="Which table of the file"
                value={String(draft.table ?? 0)}
                choices={tables}
                onChange={(table) => change({ table: Number(table ?? 0), columns: undefined })}
              />
            )}
            <ChoiceField
              label="What it lists"
              value={draft.kind}
              choices={KIND_WORDS}
              onChange={(kind) => change({ kind })}
            />
            <TextField
              label="Name"
              help="As it is called from now on."
              value={draft.name}
              onChange={(name) => change({ name })}
            />
          </div>
          <WideTable
            label="First rows of the table"
            columns={intake.columns.map(({ name, unit }) => ({ name, note: unit }))}
            rows={intake.preview}
          />
        </Step>
        <Step number={2} title="What each column is">
          <ColumnRoles intake={intake} draft={draft} change={change} />
        </Step>
        <Step number={3} title="What the numbers mean">
          <MeaningFields draft={draft} change={change} />
        </Step>
        {draft.kind !== 'hi' && draft.kind !== 'groups' && (
          <Step number={4} title="How deep it reaches">
            <BandFields intake={intake} draft={draft} change={change} />
          </Step>
        )}
        <Step
          number={draft.kind !== 'hi' && draft.kind !== 'groups' ? 5 : 4}
          title="Where it looked, and what to leave out"
        >
          <RestFields intake={intake} draft={draft} change={change} />
        </Step>
      </div>
      <aside className="intake__side stack" aria-label="Outcome">
        <CheckPanel check={intake.check} isChecking={isChecking} />
        <ProblemCallout error={error} title="These settings do not fit" />
        <PublishPanel
          intake={intake}
          isUnsettled={isChecking || error !== null}
          onPublished={onPublished}
          onDiscarded={onDiscarded}
        />
      </aside>
    </div>
  );
}

const Step = ({ number, title, children }: { number: number; title: string; children: ReactNode }) => (
  <section className="panel" aria-labelledby={`step-${number}`}>
    <div className="panel__head">
      <span className="intake__step num" aria-hidden="true">
        {number}
      </span>
      <h2 id={`step-${number}`}>{title}</h2>
    </div>
    <div className="panel__body stack">{children}</div>
  </section>
);
