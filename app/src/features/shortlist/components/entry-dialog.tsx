import { Button, Dialog, DialogBody, DialogFooter, FormGroup, TextArea } from '@blueprintjs/core';
import { useState } from 'react';

interface EntryDialogProps {
  name: string;
  reason: string;
  nullResult: string;
  isPending: boolean;
  onClose: () => void;
  onSave: (fields: { reason: string; nullResult: string }) => void;
}

/** Why a detection is on the list, and what it would prove if follow-up finds nothing. */
export function EntryDialog({ name, isPending, onClose, onSave, ...start }: EntryDialogProps) {
  const [reason, setReason] = useState(start.reason);
  const [nullResult, setNullResult] = useState(start.nullResult);
  return (
    <Dialog isOpen title={`${name} on the shortlist`} onClose={onClose} style={{ width: 'min(560px, 92vw)' }}>
      <DialogBody>
        <FormGroup label="Reason" labelFor="entry-reason" helperText="Why this one, in a sentence an observer can use.">
          <TextArea
            id="entry-reason"
            fill
            autoFocus
            rows={3}
            maxLength={2000}
            value={reason}
            onChange={(event) => setReason(event.target.value)}
          />
        </FormGroup>
        <FormGroup
          label="If nothing is found"
          labelFor="entry-null"
          helperText="What the follow-up would prove by finding no stars."
        >
          <TextArea
            id="entry-null"
            fill
            rows={3}
            maxLength={2000}
            value={nullResult}
            onChange={(event) => setNullResult(event.target.value)}
          />
        </FormGroup>
      </DialogBody>
      <DialogFooter
        actions={
          <>
            <Button text="Cancel" variant="minimal" onClick={onClose} />
            <Button text="Save" intent="primary" loading={isPending} onClick={() => onSave({ reason, nullResult })} />
          </>
        }
      />
    </Dialog>
  );
}
