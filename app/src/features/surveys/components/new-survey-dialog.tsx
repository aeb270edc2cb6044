import { Button, Dialog, DialogBody, DialogFooter, FormGroup, HTMLSelect } from '@blueprintjs/core';
import type { Survey } from '@eremite/shared/contracts/survey';
import { useState, type FormEvent } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { useCreateSurvey } from '../api/surveys.ts';
import { EMPTY_DRAFT, requestOf } from '../hooks/survey-draft.ts';
import { SurveyFields } from './survey-fields.tsx';

interface NewSurveyDialogProps {
  isOpen: boolean;
  teams: { id: string; name: string }[];
  onClose: () => void;
  onCreated: (survey: Survey) => void;
}

export function NewSurveyDialog({ isOpen, teams, onClose, onCreated }: NewSurveyDialogProps) {
  const [chosen, setChosen] = useState('');
  const [draft, setDraft] = useState(EMPTY_DRAFT);
  const create = useCreateSurvey();
  const teamId = chosen || (teams[0]?.id ?? '');
  const submit = (event: FormEvent) => {
    event.preventDefault();
    create.mutate({ teamId, ...requestOf(draft) }, { onSuccess: onCreated });
  };
  return (
    <Dialog isOpen={isOpen} onClose={onClose} title="New survey" style={{ width: 'min(560px, 92vw)' }}>
      <form onSubmit={submit}>
        <DialogBody>
          <FormGroup label="Team" labelFor="survey-team">
            <HTMLSelect
              id="survey-team"
              fill
              value={teamId}
              onChange={(event) => setChosen(event.target.value)}
              options={teams.map(({ id, name }) => ({ value: id, label: name }))}
            />
          </FormGroup>
          <SurveyFields draft={draft} onChange={(change) => setDraft((old) => ({ ...old, ...change }))} autoFocus />
          <ProblemCallout error={create.error} />
        </DialogBody>
        <DialogFooter
          actions={
            <>
              <Button text="Cancel" variant="minimal" onClick={onClose} />
              <Button type="submit" text="Create survey" intent="primary" loading={create.isPending} />
            </>
          }
        />
      </form>
    </Dialog>
  );
}
