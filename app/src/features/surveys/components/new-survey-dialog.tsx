import {
  Button,
  Dialog,
  DialogBody,
  DialogFooter,
  FormGroup,
  HTMLSelect,
  InputGroup,
  TextArea,
} from '@blueprintjs/core';
import type { Survey } from '@eremite/shared/contracts/survey';
import { useState, type FormEvent } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { useCreateSurvey } from '../api/surveys.ts';

interface NewSurveyDialogProps {
  isOpen: boolean;
  teams: { id: string; name: string }[];
  onClose: () => void;
  onCreated: (survey: Survey) => void;
}

export function NewSurveyDialog({ isOpen, teams, onClose, onCreated }: NewSurveyDialogProps) {
  const [fields, setFields] = useState({ teamId: '', name: '', description: '', h0: '70', omegaM: '0.3' });
  const create = useCreateSurvey();
  const set = (key: keyof typeof fields) => (value: string) => setFields((old) => ({ ...old, [key]: value }));
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const { teamId, name, description, h0, omegaM } = fields;
    const cosmology = { h0: Number(h0), omegaM: Number(omegaM) };
    create.mutate({ teamId: teamId || teams[0]!.id, name, description, cosmology }, { onSuccess: onCreated });
  };
  return (
    <Dialog isOpen={isOpen} onClose={onClose} title="New survey" style={{ width: 'min(560px, 92vw)' }}>
      <form onSubmit={submit}>
        <DialogBody>
          <FormGroup label="Team" labelFor="survey-team">
            <HTMLSelect
              id="survey-team"
              fill
              value={fields.teamId || teams[0]?.id}
              onChange={(event) => set('teamId')(event.target.value)}
              options={teams.map(({ id, name }) => ({ value: id, label: name }))}
            />
          </FormGroup>
          <FormGroup label="Name" labelFor="survey-name">
            <InputGroup
              id="survey-name"
              required
              maxLength={120}
              value={fields.name}
              onValueChange={set('name')}
              autoFocus
            />
          </FormGroup>
          <FormGroup label="Description" labelFor="survey-text" labelInfo="(optional)">
            <TextArea
              id="survey-text"
              fill
              rows={3}
              maxLength={4000}
              value={fields.description}
              onChange={(event) => set('description')(event.target.value)}
            />
          </FormGroup>
          <div className="columns" style={{ gridTemplateColumns: '1fr 1fr' }}>
            <FormGroup label="Hubble constant" labelInfo="km/s/Mpc" labelFor="survey-h0">
              <InputGroup
                id="survey-h0"
                type="number"
                min={20}
                max={200}
                step="any"
                required
                value={fields.h0}
                onValueChange={set('h0')}
              />
            </FormGroup>
            <FormGroup label="Matter density" labelInfo="flat universe" labelFor="survey-om">
              <InputGroup
                id="survey-om"
                type="number"
                min={0}
                max={1}
                step="any"
                required
                value={fields.omegaM}
                onValueChange={set('omegaM')}
              />
            </FormGroup>
          </div>
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
