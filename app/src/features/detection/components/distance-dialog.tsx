import { FormGroup, InputGroup } from '@blueprintjs/core';
import { useState } from 'react';
import { NoteDialog } from '#components/dialogs/note-dialog.tsx';
import { say } from '#lib/toaster.ts';
import { useSetDistance } from '../api/decisions.ts';

interface DistanceDialogProps {
  detectionId: string;
  isOpen: boolean;
  onClose: () => void;
}

/** Replaces the distance of one detection; the next run uses it and all that follows from it. */
export function DistanceDialog({ detectionId, isOpen, onClose }: DistanceDialogProps) {
  const [fields, setFields] = useState({ distance: '', error: '', source: '' });
  const set = (key: keyof typeof fields) => (value: string) => setFields((old) => ({ ...old, [key]: value }));
  const save = useSetDistance(detectionId);
  const confirm = (note: string) => {
    const distanceMpc = fields.distance === '' ? null : Number(fields.distance);
    const errorMpc = fields.error === '' ? null : Number(fields.error);
    save.mutate(
      { distanceMpc, errorMpc, source: fields.source, note },
      {
        onSuccess: () => {
          onClose();
          void say(
            distanceMpc === null
              ? 'The next run returns to the distance of the table.'
              : 'Saved: the next run uses it.',
          );
        },
      },
    );
  };
  return (
    <NoteDialog
      isOpen={isOpen}
      title="Replace the distance"
      doIt="Save for the next run"
      isPending={save.isPending}
      error={save.error}
      onClose={onClose}
      onConfirm={confirm}
    >
      <p className="muted">
        Used from the next run on; this run keeps its own. Leave the distance empty to return to the table’s.
      </p>
      <div className="columns" style={{ gridTemplateColumns: '1fr 1fr' }}>
        <FormGroup label="Distance" labelInfo="Mpc" labelFor="new-distance">
          <InputGroup
            id="new-distance"
            type="number"
            min={0}
            step="any"
            value={fields.distance}
            onValueChange={set('distance')}
          />
        </FormGroup>
        <FormGroup label="Error" labelInfo="Mpc, 1 sigma" labelFor="new-distance-error">
          <InputGroup
            id="new-distance-error"
            type="number"
            min={0}
            step="any"
            value={fields.error}
            onValueChange={set('error')}
          />
        </FormGroup>
      </div>
      <FormGroup label="Source" labelFor="new-distance-source" helperText="Paper, method or measurement it comes from.">
        <InputGroup id="new-distance-source" maxLength={500} value={fields.source} onValueChange={set('source')} />
      </FormGroup>
    </NoteDialog>
  );
}
