import type { LedgerEntry } from '@eremite/shared/contracts/ledger';

const text = (value: unknown): string =>
  value === null || value === undefined
    ? 'nothing'
    : typeof value === 'object'
      ? Object.entries(value)
          .map(([key, entry]) => `${key} ${text(entry)}`)
          .join(', ')
      : String(value as string | number | boolean);

/** What stood before and after, where an act tells it; the rest of what was kept behind its hash. */
export function LedgerDetail({ entry: { hash, detail } }: { entry: LedgerEntry }) {
  const { before, after, ...rest } = detail;
  const more = Object.entries(rest);
  return (
    <details className="ledger-detail">
      <summary className="muted">{hash.slice(0, 10)}</summary>
      <dl>
        {before !== undefined && (
          <>
            <dt>before</dt>
            <dd>{text(before)}</dd>
          </>
        )}
        {after !== undefined && (
          <>
            <dt>after</dt>
            <dd>{text(after)}</dd>
          </>
        )}
        {more.map(([key, value]) => (
          <div key={key}>
            <dt>{key}</dt>
            <dd>{text(value)}</dd>
          </div>
        ))}
        <dt>hash</dt>
        <dd>{hash}</dd>
      </dl>
    </details>
  );
}
