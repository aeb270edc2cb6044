import { useQuery } from '@tanstack/react-query';
import { moment } from '#lib/format/time.ts';
import { outboxQuery } from '../api/people.ts';

const STATES = {
  queued: 'waiting to be sent',
  sent: 'sent',
  kept: 'kept here: no mail server is configured',
  failed: 'could not be sent',
} as const;

/** Mail of this team. Without a mail server it is kept here, to be handed on by other means. */
export function Outbox() {
  const { data } = useQuery(outboxQuery());
  if (!data) return null;
  if (data.items.length === 0) return <p className="muted">No mail yet.</p>;
  return (
    <ul className="history">
      {data.items.map(({ id, to, subject, text, state, error, createdAt }) => (
        <li key={id}>
          <details>
            <summary>
              {subject} <span className="mono small">{to}</span>{' '}
              <span className="muted small">
                {STATES[state]}
                {error && `: ${error}`}, {moment(createdAt)}
              </span>
            </summary>
            <pre className="mono small" style={{ whiteSpace: 'pre-wrap', margin: '8px 0 0' }}>
              {text}
            </pre>
          </details>
        </li>
      ))}
    </ul>
  );
}
