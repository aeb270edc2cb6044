import { FormGroup, HTMLSelect, Radio, RadioGroup } from '@blueprintjs/core';
import type { DoubtWord } from '@eremite/shared/contracts/review';
import type { Doubt } from '@eremite/shared/contracts/verdict';
import { useState } from 'react';
import { Prose } from '#components/prose/prose.tsx';
import { DecisionDialog, type DecisionDialogProps } from './decision-dialog.tsx';

type DoubtDialogProps = Pick<DecisionDialogProps, 'surveyId' | 'detectionId' | 'decisions' | 'draft'> & {
  runId: string;
  name: string;
  doubts: readonly Doubt[];
  first: Doubt;
  words: readonly DoubtWord[];
};

/** A person's word on a doubt: what they know that the catalogues cannot. */
export function DoubtDialog({ runId, name, doubts, first, words, ...common }: DoubtDialogProps) {
  const [doubt, setDoubt] = useState(first.name);
  const [word, setWord] = useState<'cleared' | 'confirmed'>('cleared');
  const judged = doubts.find((entry) => entry.name === doubt) ?? first;
  const inForce = words.find((entry) => entry.doubt === doubt && entry.withdrawnAt === null);
  return (
    <DecisionDialog
      {...common}
      title={`A doubt on ${name}`}
      doIt={word === 'cleared' ? 'Clear it' : 'Confirm it'}
      onConfirm={(note, attachmentIds, over) =>
        common.decisions.decide(
          {
            path: 'doubt-words',
            json: { runId, doubt, word, note, attachmentIds },
            what: `${doubt} ${word} for ${name}`,
            done: `The doubt “${doubt}” is ${word}.`,
            draft: common.draft,
          },
          over ?? inForce?.id,
        )
      }
    >
      <FormGroup label="Doubt" labelFor="doubt-name">
        <HTMLSelect
          id="doubt-name"
          fill
          value={doubt}
          onChange={(event) => setDoubt(event.target.value)}
          options={doubts.map((entry) => ({ value: entry.name, label: `${entry.name}: ${entry.grade}` }))}
        />
      </FormGroup>
      <p>
        <Prose text={judged.sentence} />
      </p>
      <RadioGroup
        label="It is"
        inline
        selectedValue={word}
        onChange={(event) => setWord(event.currentTarget.value as typeof word)}
      >
        <Radio label="cleared by what I know" value="cleared" />
        <Radio label="confirmed" value="confirmed" />
      </RadioGroup>
      {inForce && (
        <p>
          {inForce.by} {inForce.word} it: “{inForce.note}”
        </p>
      )}
      <p className="muted">The computed grade stays beside your word.</p>
    </DecisionDialog>
  );
}
