import { Button } from '@blueprintjs/core';
import { attachment, ATTACHMENTS_OF_A_NOTE, type Attachment } from '@eremite/shared/contracts/attachment';
import { useMutation } from '@tanstack/react-query';
import { useRef } from 'react';
import { call } from '#lib/api-client.ts';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { fileSize } from './file-size.ts';

interface AttachmentPickerProps {
  detectionId: string;
  attachments: readonly Attachment[];
  onChange: (attachments: readonly Attachment[]) => void;
}

/** Files that go with a note: uploaded at once, so that sending the note is quick and its refusal loses none. */
export function AttachmentPicker({ detectionId, attachments, onChange }: AttachmentPickerProps) {
  const input = useRef<HTMLInputElement>(null);
  const upload = useMutation({
    mutationFn: (file: File) => {
      const form = new FormData();
      form.append('file', file);
      return call(attachment, `/detections/${detectionId}/attachments`, { method: 'POST', form });
    },
    onSuccess: (added) => onChange([...attachments, added]),
  });
  return (
    <div className="note-field__files">
      {attachments.map(({ id, fileName, bytes }) => (
        <span key={id} className="note-field__file">
          {fileName} <span className="muted num">{fileSize(bytes)}</span>
          <Button
            size="small"
            variant="minimal"
            text="Remove"
            aria-label={`Remove ${fileName}`}
            onClick={() => onChange(attachments.filter((file) => file.id !== id))}
          />
        </span>
      ))}
      <input
        ref={input}
        type="file"
        hidden
        aria-label="File to attach"
        accept=".png,.jpg,.jpeg,.pdf,.fits,.fit,.txt,.csv"
        onChange={(event) => {
          const file = event.target.files?.[0];
          if (file) upload.mutate(file);
          event.target.value = '';
        }}
      />
      <Button
        size="small"
        text="Attach a file"
        loading={upload.isPending}
        disabled={attachments.length >= ATTACHMENTS_OF_A_NOTE}
        onClick={() => input.current?.click()}
      />
      <span className="muted small">picture, PDF, FITS or text, up to 5 MB</span>
      <ProblemCallout error={upload.error} />
    </div>
  );
}
