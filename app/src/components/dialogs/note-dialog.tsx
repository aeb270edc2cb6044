import { Button, Dialog, DialogBody, DialogFooter, FormGroup, TextArea } from '@blueprintjs/core';
import { useId, useState, type ReactNode } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';

interface NoteDialogProps {
  isOpen: boolean;
  title: string;
  children?: ReactNode;
  /** Words of the button that does it. */
  doIt: string;
  danger?: boolean;
  noteRequired?: boolean;
  /** Without a note at all: a plain question. */
  withoutNote?: boolean;
  isPending?: boolean;
  error?: unknown;
  onClose: () => void;
  onConfirm: (note: string) => void;
}

/** Asks before something that cannot be undone, or for the note that must go with a decision. */
export function NoteDialog(props: NoteDialogProps) {
  const { isOpen, title, children, doIt, danger, noteRequired = true, withoutNote, isPending, error } = props;
  const [note, setNote] = useState('');
  const field = useId();
  const ready = withoutNote || !noteRequired || note.trim() !== '';
  const confirm = () => {
    if (ready) props.onConfirm(note.trim());
  };
  return (
    <Dialog
      isOpen={isOpen}
      title={title}
      onClose={props.onClose}
      onOpening={() => setNote('')}
      style={{ width: 'min(540px, 92vw)' }}
    >
      <DialogBody>
        <div className="stack">
          {children}
          {!withoutNote && (
            <FormGroup
              label="Note"
              labelFor={field}
              labelInfo={noteRequired ? '(required)' : '(optional)'}
              helperText="Kept in the ledger with your name. Control and Enter together send it."
            >
              <TextArea
                id={field}
                fill
                autoFocus
                rows={4}
                maxLength={4000}
                value={note}
                required={noteRequired}
                onChange={(event) => setNote(event.target.value)}
                onKeyDown={(event) => {
                  if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) confirm();
                }}
              />
            </FormGroup>
          )}
          <ProblemCallout error={error} />
        </div>
      </DialogBody>
      <DialogFooter
        actions={
          <>
            <Button text="Cancel" variant="minimal" onClick={props.onClose} />
            <Button
              text={doIt}
              intent={danger ? 'danger' : 'primary'}
              disabled={!ready}
              loading={isPending ?? false}
              onClick={confirm}
            />
          </>
        }
      />
    </Dialog>
  );
}
