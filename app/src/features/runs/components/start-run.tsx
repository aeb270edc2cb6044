import { Button, Checkbox, Dialog, DialogBody, DialogFooter, FormGroup, HTMLSelect } from '@blueprintjs/core';
import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import type { Criteria } from '@eremite/shared/contracts/criteria';
import { useState } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { count } from '#lib/format/number.ts';
import { useStartRun } from '../api/runs.ts';

interface StartRunProps {
  surveyId: string;
  criteria: readonly Criteria[];
  catalogues: readonly Catalogue[];
  isOpen: boolean;
  onClose: () => void;
  onStarted: (started: { runId: string; jobId: string }) => void;
}

/** Criteria and the tables they are applied to; all published ones unless some are left out. */
export function StartRun({ surveyId, criteria, catalogues, isOpen, onClose, onStarted }: StartRunProps) {
  const published = catalogues.filter(({ state }) => state === 'published');
  const [criteriaId, setCriteriaId] = useState('');
  const [left, setLeft] = useState<readonly string[]>([]);
  const start = useStartRun(surveyId);
  const chosen = criteriaId || criteria[0]?.id;
  const submit = () => {
    if (!chosen) return;
    const catalogueIds = published.filter(({ id }) => !left.includes(id)).map(({ id }) => id);
    start.mutate({ criteriaId: chosen, ...(left.length > 0 ? { catalogueIds } : {}) }, { onSuccess: onStarted });
  };
  return (
    <Dialog isOpen={isOpen} onClose={onClose} title="Start a run" style={{ width: 'min(560px, 92vw)' }}>
      <DialogBody>
        <FormGroup label="Criteria" labelFor="run-criteria">
          <HTMLSelect
            id="run-criteria"
            fill
            value={chosen ?? ''}
            onChange={(event) => setCriteriaId(event.target.value)}
            options={criteria.map(({ id, number, note }) => ({
              value: id,
              label: `Criteria ${number}${note ? `: ${note}` : ''}`,
            }))}
          />
        </FormGroup>
        <fieldset className="start-run">
          <legend>Tables</legend>
          {published.map(({ id, name, kind, rows }) => (
            <Checkbox
              key={id}
              checked={!left.includes(id)}
              onChange={() => setLeft(left.includes(id) ? left.filter((other) => other !== id) : [...left, id])}
            >
              {name}{' '}
              <span className="muted small">
                {kind}, <span className="num">{count(rows)}</span> rows
              </span>
            </Checkbox>
          ))}
        </fieldset>
        <ProblemCallout error={start.error} />
      </DialogBody>
      <DialogFooter
        actions={
          <>
            <Button text="Cancel" variant="minimal" onClick={onClose} />
            <Button text="Start" intent="primary" disabled={!chosen} loading={start.isPending} onClick={submit} />
          </>
        }
      />
    </Dialog>
  );
}
