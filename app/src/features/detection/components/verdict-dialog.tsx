import { FormGroup, HTMLSelect } from '@blueprintjs/core';
import {
  STARLIGHT_VERDICTS,
  SURROUNDINGS_VERDICTS,
  type StarlightVerdict,
  type SurroundingsVerdict,
} from '@eremite/shared/contracts/words';
import { useState } from 'react';
import { NoteDialog } from '#components/dialogs/note-dialog.tsx';

interface VerdictDialogProps {
  title: string;
  doIt: string;
  starlight: StarlightVerdict;
  surroundings: SurroundingsVerdict;
  isOpen: boolean;
  isPending: boolean;
  error: unknown;
  onClose: () => void;
  onConfirm: (decision: { starlight: StarlightVerdict; surroundings: SurroundingsVerdict; note: string }) => void;
}

/** Another verdict than the computed one, with the reason that must go with it. */
export function VerdictDialog(props: VerdictDialogProps) {
  const [starlight, setStarlight] = useState(props.starlight);
  const [surroundings, setSurroundings] = useState(props.surroundings);
  return (
    <NoteDialog
      isOpen={props.isOpen}
      title={props.title}
      doIt={props.doIt}
      isPending={props.isPending}
      error={props.error}
      onClose={props.onClose}
      onConfirm={(note) => props.onConfirm({ starlight, surroundings, note })}
    >
      <div className="columns" style={{ gridTemplateColumns: '1fr 1fr' }}>
        <FormGroup label="Starlight" labelFor="decide-starlight">
          <HTMLSelect
            id="decide-starlight"
            fill
            value={starlight}
            onChange={(event) => setStarlight(event.target.value as StarlightVerdict)}
            options={[...STARLIGHT_VERDICTS]}
          />
        </FormGroup>
        <FormGroup label="Surroundings" labelFor="decide-surroundings">
          <HTMLSelect
            id="decide-surroundings"
            fill
            value={surroundings}
            onChange={(event) => setSurroundings(event.target.value as SurroundingsVerdict)}
            options={[...SURROUNDINGS_VERDICTS]}
          />
        </FormGroup>
      </div>
    </NoteDialog>
  );
}
