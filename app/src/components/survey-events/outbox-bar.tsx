import { Button } from '@blueprintjs/core';
import { outbox, useOutboxSender, useWaiting } from '#lib/outbox/use-outbox.ts';
import './outbox-bar.css';

/** Says what could not be sent yet, and what was refused when it was; nothing typed is lost. */
export function OutboxBar() {
  useOutboxSender();
  const waiting = useWaiting();
  const refused = waiting.filter((entry) => entry.refused);
  const unsent = waiting.length - refused.length;
  if (waiting.length === 0) return null;
  return (
    <aside className="outbox-bar" aria-label="Decisions on their way" role="status">
      {unsent > 0 && (
        <p>
          {unsent === 1 ? 'One decision waits' : `${unsent} decisions wait`} to be sent: the service cannot be reached.
          They go out by themselves when it is back.
        </p>
      )}
      {refused.map(({ key, what, refused: why, json }) => (
        <div key={key} className="outbox-bar__refused">
          <p>
            <b>{what}</b> was refused: {why} {noteOf(json)}
          </p>
          <Button size="small" text="Throw it away" onClick={() => outbox.discard(key)} />
        </div>
      ))}
    </aside>
  );
}

function noteOf(json: unknown): string {
  const { note, text } = (json ?? {}) as { note?: string; text?: string };
  const words = note || text;
  return words ? `Your note: “${words}”` : '';
}
