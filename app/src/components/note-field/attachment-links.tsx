import type { Attachment } from '@eremite/shared/contracts/attachment';
import { API_BASE } from '#config/paths.ts';
import { fileSize } from './file-size.ts';

/** Files of a note, to be saved. */
export function AttachmentLinks({ attachments }: { attachments: readonly Attachment[] }) {
  if (attachments.length === 0) return null;
  return (
    <ul className="attachment-links" aria-label="Attachments">
      {attachments.map(({ id, fileName, bytes, sha256 }) => (
        <li key={id}>
          <a href={`${API_BASE}/attachments/${id}`} download={fileName} title={`sha256 ${sha256}`}>
            {fileName}
          </a>{' '}
          <span className="muted num small">{fileSize(bytes)}</span>
        </li>
      ))}
    </ul>
  );
}
