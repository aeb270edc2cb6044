import { Button } from '@blueprintjs/core';
import type { Observation } from '@eremite/shared/contracts/observation';
import { fileSize } from '#components/note-field/file-size.ts';
import { API_BASE } from '#config/paths.ts';
import { moment } from '#lib/format/time.ts';
import { useRemoveObservation } from '../api/observations.ts';

/** Where a file comes from, and the means to fetch or remove it. */
export function ObservationFacts({ item }: { item: Observation }) {
  const remove = useRemoveObservation(item.detectionId);
  return (
    <p className="small row observation-facts">
      <a href={`${API_BASE}/observations/${item.id}/file`} download={item.fileName} className="mono">
        {item.fileName}
      </a>
      <span className="muted num">{fileSize(item.bytes)}</span>
      <span className="muted">
        {item.uploadedBy}, {moment(item.createdAt)}
      </span>
      {item.mayDelete && (
        <Button
          size="small"
          variant="minimal"
          text="Remove"
          aria-label={`Remove ${item.fileName}`}
          loading={remove.isPending}
          onClick={() => remove.mutate(item.id)}
        />
      )}
    </p>
  );
}
