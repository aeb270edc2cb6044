import { Button, FormGroup, TextArea } from '@blueprintjs/core';
import type { Attachment } from '@eremite/shared/contracts/attachment';
import { NOTE_LENGTH } from '@eremite/shared/contracts/note';
import { useId } from 'react';
import { count } from '#lib/format/number.ts';
import { AttachmentPicker } from './attachment-picker.tsx';
import './note-field.css';

interface NoteFieldProps {
  label?: string;
  value: string;
  onChange: (value: string) => void;
  isRequired: boolean;
  /** Sends what is asked; Control and Enter do it. */
  onSubmit: () => void;
  phrases: readonly string[];
  /** Where files of this note go; absent where none may. */
  detectionId?: string | undefined;
  attachments: readonly Attachment[];
  onAttachments: (attachments: readonly Attachment[]) => void;
}

/** A note with the team's phrases at hand and files that go with it. Nothing that is too long is cut in silence. */
export function NoteField(props: NoteFieldProps) {
  const { label = 'Note', value, onChange, isRequired, onSubmit, phrases, detectionId } = props;
  const field = useId();
  const over = value.trim().length - NOTE_LENGTH;
  const add = (phrase: string) => onChange(value.trim() === '' ? phrase : `${value.trimEnd()} ${phrase}`);
  return (
    <div className="note-field">
      <FormGroup
        label={label}
        labelFor={field}
        labelInfo={isRequired ? '(required)' : '(optional)'}
        intent={over > 0 ? 'danger' : 'none'}
        helperText={
          over > 0
            ? `${count(over)} characters too many; put what is longer into an attachment.`
            : 'Kept in the ledger with your name. Control and Enter together send it.'
        }
      >
        <TextArea
          id={field}
          fill
          autoFocus
          rows={4}
          value={value}
          required={isRequired}
          intent={over > 0 ? 'danger' : 'none'}
          aria-invalid={over > 0}
          onChange={(event) => onChange(event.target.value)}
          onKeyDown={(event) => {
            if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) onSubmit();
          }}
        />
      </FormGroup>
      {phrases.length > 0 && (
        <div className="note-field__phrases" role="group" aria-label="Phrases of the team">
          {phrases.map((phrase) => (
            <Button key={phrase} size="small" variant="minimal" text={phrase} onClick={() => add(phrase)} />
          ))}
        </div>
      )}
      {detectionId && (
        <AttachmentPicker detectionId={detectionId} attachments={props.attachments} onChange={props.onAttachments} />
      )}
    </div>
  );
}
