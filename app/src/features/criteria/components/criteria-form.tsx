import { Button, FormGroup, Switch, TextArea } from '@blueprintjs/core';
import {
  CRITERIA_SECTIONS,
  criteriaSettings,
  type Criteria,
  type CriteriaSettings,
} from '@eremite/shared/contracts/criteria';
import type { Survey } from '@eremite/shared/contracts/survey';
import { useMemo, useState } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { useSaveCriteria } from '../api/criteria.ts';
import { CRITERIA_FIELDS, isStandard, valueOf } from '#lib/criteria/criteria-fields.ts';
import { CriteriaRow } from './criteria-row.tsx';
import { PreviewPanel } from './preview-panel.tsx';
import { SectionNav } from './section-nav.tsx';
import './criteria.css';

interface CriteriaFormProps {
  survey: Survey;
  start: CriteriaSettings;
  onSaved: (saved: Criteria) => void;
}

/** The published defaults, each with what it does, its unit and its source; what differs is marked. */
export function CriteriaForm({ survey, start, onSaved }: CriteriaFormProps) {
  const [settings, setSettings] = useState(start);
  const [note, setNote] = useState('');
  const [onlyChanged, setOnlyChanged] = useState(false);
  const save = useSaveCriteria(survey.id);
  const read = useMemo(() => criteriaSettings.safeParse(settings), [settings]);
  const faults = new Map(
    read.success ? [] : read.error.issues.map(({ path, message }) => [path.slice(0, 2).join('.'), message]),
  );
  const changed = CRITERIA_FIELDS.filter((field) => !isStandard(field, valueOf(settings, field)));
  const shown = onlyChanged ? changed : CRITERIA_FIELDS;
  const set = (section: keyof CriteriaSettings, key: string, value: unknown) =>
    setSettings((old) => ({ ...old, [section]: { ...old[section], [key]: value } }));
  return (
    <div className="criteria criteria--preview">
      <SectionNav changed={changed}>
        <Switch
          checked={onlyChanged}
          label="only what differs"
          onChange={(event) => setOnlyChanged(event.target.checked)}
        />
      </SectionNav>
      <div className="stack">
        {CRITERIA_SECTIONS.map((section) => {
          const fields = shown.filter((field) => field.section === section);
          if (fields.length === 0) return null;
          return (
            <section key={section} id={`section-${section}`} className="panel" aria-labelledby={`title-${section}`}>
              <div className="panel__head">
                <h2 id={`title-${section}`}>{section}</h2>
              </div>
              {fields.map((field) => (
                <CriteriaRow
                  key={field.key}
                  field={field}
                  value={valueOf(settings, field)}
                  fault={faults.get(`${section}.${field.key}`)}
                  onChange={(value) => set(section, field.key, value)}
                />
              ))}
            </section>
          );
        })}
        {shown.length === 0 && <p className="muted">Nothing differs from the published defaults.</p>}
        <FormGroup
          label="Note"
          labelFor="criteria-note"
          labelInfo="(optional)"
          helperText="Why this number exists; kept with it."
        >
          <TextArea
            id="criteria-note"
            fill
            rows={3}
            maxLength={2000}
            value={note}
            onChange={(event) => setNote(event.target.value)}
          />
        </FormGroup>
        <ProblemCallout error={save.error} />
        <div className="row">
          <Button
            intent="primary"
            text="Save as the next number"
            disabled={!read.success}
            loading={save.isPending}
            onClick={() => read.success && save.mutate({ settings: read.data, note }, { onSuccess: onSaved })}
          />
          {!read.success && (
            <span role="alert">
              {faults.size} {faults.size === 1 ? 'value is' : 'values are'} out of range.
            </span>
          )}
        </div>
      </div>
      <PreviewPanel survey={survey} settings={read.data} />
    </div>
  );
}
