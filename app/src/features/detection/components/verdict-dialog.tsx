import { FormGroup, HTMLSelect } from '@blueprintjs/core';
import type { ReviewOutcome } from '@eremite/shared/contracts/review';
import {
  STARLIGHT_VERDICTS,
  SURROUNDINGS_VERDICTS,
  type StarlightVerdict,
  type SurroundingsVerdict,
} from '@eremite/shared/contracts/words';
import { useState } from 'react';
import { DecisionDialog, type DecisionDialogProps } from './decision-dialog.tsx';

const OUTCOMES: readonly { value: ReviewOutcome; label: string }[] = [
  { value: 'verdict', label: 'a verdict' },
  { value: 'not real', label: 'not a real line' },
  { value: 'not extragalactic', label: 'not extragalactic' },
  { value: 'needs an HI spectrum', label: 'ask for a confirming HI spectrum' },
];

export interface Words {
  starlight: StarlightVerdict;
  surroundings: SurroundingsVerdict;
  outcome: ReviewOutcome;
}

interface VerdictDialogProps extends Omit<DecisionDialogProps, 'onConfirm' | 'children'> {
  computed: Omit<Words, 'outcome'>;
  outcome: ReviewOutcome;
  /** Whether the computed words may be sent as they are. */
  mayAgree: boolean;
  onConfirm: (words: Words, note: string, attachmentIds: string[], over?: string) => void;
}

/** Another verdict than the computed one, or an answer in place of one, with the reason that must go with it. */
export function VerdictDialog({ computed, outcome: first, mayAgree, onConfirm, ...dialog }: VerdictDialogProps) {
  const [words, setWords] = useState<Words>({ ...computed, outcome: first });
  const isVerdict = words.outcome === 'verdict';
  const agrees = isVerdict && words.starlight === computed.starlight && words.surroundings === computed.surroundings;
  return (
    <DecisionDialog
      {...dialog}
      isBlocked={agrees && !mayAgree}
      onConfirm={(note, attachmentIds, over) => onConfirm(words, note, attachmentIds, over)}
    >
      <div className="columns" style={{ gridTemplateColumns: 'repeat(auto-fit, minmax(150px, 1fr))' }}>
        <Choice
          id="decide-outcome"
          label="Answer"
          value={words.outcome}
          options={OUTCOMES}
          onChange={(outcome) => setWords((old) => ({ ...old, outcome }))}
        />
        {isVerdict && (
          <>
            <Choice
              id="decide-starlight"
              label="Starlight"
              value={words.starlight}
              options={STARLIGHT_VERDICTS.map(asOption)}
              onChange={(starlight) => setWords((old) => ({ ...old, starlight }))}
            />
            <Choice
              id="decide-surroundings"
              label="Surroundings"
              value={words.surroundings}
              options={SURROUNDINGS_VERDICTS.map(asOption)}
              onChange={(surroundings) => setWords((old) => ({ ...old, surroundings }))}
            />
          </>
        )}
      </div>
      {agrees && !mayAgree && (
        <p className="muted" role="status">
          This is the computed verdict: change a word, or close and agree with a note.
        </p>
      )}
    </DecisionDialog>
  );
}

const asOption = <T extends string>(value: T) => ({ value, label: value });

interface ChoiceProps<T extends string> {
  id: string;
  label: string;
  value: T;
  options: readonly { value: T; label: string }[];
  onChange: (value: T) => void;
}
function Choice<T extends string>({ id, label, value, options, onChange }: ChoiceProps<T>) {
  return (
    <FormGroup label={label} labelFor={id}>
      <HTMLSelect
        id={id}
        fill
        value={value}
        onChange={(event) => onChange(event.target.value as T)}
        options={[...options]}
      />
    </FormGroup>
  );
}
