import { Button, Callout, Dialog, DialogBody, DialogFooter } from '@blueprintjs/core';
import type { Attachment } from '@eremite/shared/contracts/attachment';
import { NOTE_LENGTH } from '@eremite/shared/contracts/note';
import { useQuery } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { NoteField } from '#components/note-field/note-field.tsx';
import { useDraft } from '#lib/drafts.ts';
import { notePhrasesQuery } from '../api/decisions.ts';
import type { Collision, Decisions } from '../hooks/use-decisions.ts';

export interface DecisionDialogProps {
  surveyId: string;
  detectionId: string;
  decisions: Decisions;
  /** Where what is typed is kept until it is sent. */
  draft: string;
  title: string;
  children?: ReactNode;
  /** Words of the button that does it. */
  doIt: string;
  label?: string;
  isRequired?: boolean;
  /** Nothing may be sent for another reason than the note. */
  isBlocked?: boolean;
  isDanger?: boolean;
  /** @param over id of someone else's word that was shown and is to be replaced */
  onConfirm: (note: string, attachmentIds: string[], over?: string) => void;
}

/** A question with the note that goes with its answer. What is typed stays until it is sent, whatever happens meanwhile. */
export function DecisionDialog(props: DecisionDialogProps) {
  const { surveyId, detectionId, decisions, draft, title, children, doIt, isRequired = true } = props;
  const [note, setNote] = useDraft(draft);
  const [attachments, setAttachments] = useState<readonly Attachment[]>([]);
  const { data } = useQuery(notePhrasesQuery(surveyId));
  const { collision, isPending } = decisions;
  const length = note.trim().length;
  const ready = !props.isBlocked && length <= NOTE_LENGTH && (!isRequired || length > 0);
  const confirm = () => {
    if (!ready || isPending) return;
    const ids = attachments.map(({ id }) => id);
    props.onConfirm(note.trim(), ids, collision?.id);
  };
  return (
    <Dialog isOpen title={title} onClose={decisions.close} style={{ width: 'min(600px, 94vw)' }}>
      <DialogBody>
        <div className="stack">
          {children}
          <NoteField
            label={props.label ?? 'Note'}
            value={note}
            onChange={setNote}
            isRequired={isRequired}
            onSubmit={confirm}
            phrases={data?.phrases ?? []}
            detectionId={detectionId}
            attachments={attachments}
            onAttachments={setAttachments}
          />
          {collision ? <CollisionCallout collision={collision} /> : <ProblemCallout error={decisions.error} />}
        </div>
      </DialogBody>
      <DialogFooter
        actions={
          <>
            <Button text="Cancel" variant="minimal" onClick={decisions.close} />
            <Button
              text={collision ? `${doIt} all the same` : doIt}
              intent={props.isDanger ? 'danger' : 'primary'}
              disabled={!ready}
              loading={isPending}
              onClick={confirm}
            />
          </>
        }
      />
    </Dialog>
  );
}

/** Someone was faster: their word is shown, and stays unless one says again that it should not. */
const CollisionCallout = ({ collision: { by, words, note } }: { collision: Collision }) => (
  <Callout intent="warning" role="alert" title={`${by} decided meanwhile: ${words}`}>
    {note && <p>“{note}”</p>}
    <p>Nothing was overwritten. Your note is kept; close to let theirs stand, or decide all the same.</p>
  </Callout>
);
