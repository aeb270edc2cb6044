import { FormGroup, InputGroup, TextArea } from '@blueprintjs/core';
import type { SurveyDraft } from '../hooks/survey-draft.ts';

interface SurveyFieldsProps {
  draft: SurveyDraft;
  onChange: (change: Partial<SurveyDraft>) => void;
  autoFocus?: boolean;
}

/** Name, description and cosmology of a survey. */
export function SurveyFields({ draft, onChange, autoFocus }: SurveyFieldsProps) {
  return (
    <>
      <FormGroup label="Name" labelFor="survey-name">
        <InputGroup
          id="survey-name"
          required
          maxLength={120}
          value={draft.name}
          onValueChange={(name) => onChange({ name })}
          autoFocus={autoFocus ?? false}
        />
      </FormGroup>
      <FormGroup label="Description" labelFor="survey-text" labelInfo="(optional)">
        <TextArea
          id="survey-text"
          fill
          rows={3}
          maxLength={4000}
          value={draft.description}
          onChange={(event) => onChange({ description: event.target.value })}
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
            value={draft.h0}
            onValueChange={(h0) => onChange({ h0 })}
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
            value={draft.omegaM}
            onValueChange={(omegaM) => onChange({ omegaM })}
          />
        </FormGroup>
      </div>
    </>
  );
}
