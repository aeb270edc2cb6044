import { Callout } from '@blueprintjs/core';
import { ApiError } from '#lib/api-error.ts';

/** A refusal in place: what went wrong, which fields, and the number to quote. */
export function ProblemCallout({ error, title }: { error: unknown; title?: string }) {
  if (!error) return null;
  const problem = error instanceof ApiError ? error.problem : undefined;
  const message = error instanceof Error ? error.message : 'Something went wrong.';
  return (
    <Callout intent="danger" icon={null} role="alert" title={title ?? problem?.title ?? 'That did not work'}>
      {message !== problem?.title && <p>{message}</p>}
      {problem?.errors && (
        <ul>
          {problem.errors.map(({ pointer, detail }) => (
            <li key={pointer + detail}>
              <code className="mono small">{pointer}</code> {detail}
            </li>
          ))}
        </ul>
      )}
      {problem?.requestId && <p className="muted small mono">request {problem.requestId}</p>}
    </Callout>
  );
}
