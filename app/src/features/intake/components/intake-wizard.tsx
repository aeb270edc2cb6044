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
import { DuplicatesPanel } from './duplicates-panel.tsx';
import { FootprintFields } from './footprint-fields.tsx';
import { MeaningFields } from './meaning-fields.tsx';
import { PartsFields } from './parts-fields.tsx';
import { PublishPanel } from './publish-panel.tsx';
import { RestFields } from './rest-fields.tsx';
import { KIND_HELP, KIND_WORDS } from './role-words.ts';
import { VersionField } from './version-field.tsx';
import './intake.css';

interface IntakeWizardProps {
  intake: Intake;
  /** Catalogue whose next version is being brought in. */
  supersedes?: string | undefined;
  onPublished: (job: Job) => void;
  onDiscarded: () => void;
}

/** Everything the table needs said of it, in the order one would say it, with the outcome always in sight. */
export function IntakeWizard({ intake, supersedes, onPublished, onDiscarded }: IntakeWizardProps) {
  const { draft, change, isChecking, error } = useIntakeDraft(intake, supersedes);
  const isSettled = !isChecking && error === null;
  const several = intake.tables.length > 1;
  const hasDepth = draft.kind !== 'hi' && draft.kind !== 'groups';
  // Lists of stars and groups say where things are, never where nothing is.
  const hasFootprint = hasDepth && draft.kind !== 'stars';
  const twice = draft.kind === 'hi' && intake.duplicates.count > 0;
  const lastStep = hasFootprint ? 6 : hasDepth || twice ? 5 : 4;
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
              pointer="/kind"
              {...(draft.kind && KIND_HELP[draft.kind] ? { help: KIND_HELP[draft.kind] } : {})}
              choices={KIND_WORDS}
              onChange={(kind) => change({ kind })}
            />
            <TextField
              label="Name"
              help="As it is called from now on."
              value={draft.name}
              onChange={(name) => change({ name })}
            />
            <VersionField intake={intake} draft={draft} change={change} />
          </div>
          {intake.readMe && (
            <p className="small">
              Described by <span className="mono">{intake.readMe}</span>, which came with it.
            </p>
          )}
          <PartsFields intake={intake} draft={draft} change={change} isSettled={isSettled} />
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
        {hasDepth && (
          <Step number={4} title="How deep it reaches">
            <BandFields intake={intake} draft={draft} change={change} />
          </Step>
        )}
        {twice && (
          <Step number={4} title="Sources that are in it twice">
            <DuplicatesPanel intake={intake} draft={draft} change={change} />
          </Step>
        )}
        {hasFootprint && (
          <Step number={5} title="Where it looked">
            <FootprintFields intake={intake} draft={draft} change={change} isChecking={isChecking} />
          </Step>
        )}
        <Step number={lastStep} title="What to leave out, and where it comes from">
          <RestFields intake={intake} draft={draft} change={change} />
        </Step>
      </div>
      <aside className="intake__side stack" aria-label="Outcome">
        <CheckPanel intake={intake} draft={draft} change={change} isChecking={isChecking} />
        <ProblemCallout error={error} title="These settings do not fit" />
        <PublishPanel intake={intake} isUnsettled={!isSettled} onPublished={onPublished} onDiscarded={onDiscarded} />
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
