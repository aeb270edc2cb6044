import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import { count, fixed, significant } from '#lib/format/number.ts';
import { moment } from '#lib/format/time.ts';

/** What is known of a published table, and what was assumed of it. */
export function CatalogueFacts({ catalogue: c }: { catalogue: Catalogue }) {
  return (
    <dl className="facts">
      <dt>Kind</dt>
      <dd>{c.kind === 'hi' ? 'HI detections' : c.kind}</dd>
      <dt>Rows</dt>
      <dd className="num">
        {count(c.rows)} <span className="muted">and {count(c.sidelined)} sidelined</span>
      </dd>
      <dt>With a velocity</dt>
      <dd className="num">{count(c.withVelocity)}</dd>
      {c.bands.map((band) => (
        <div key={band.name} style={{ display: 'contents' }}>
          <dt>Band {band.name}</dt>
          <dd className="num">
            {band.system ?? 'system not stated'},{' '}
            {band.depth5Sigma == null ? (
              <span className="facts__open">no depth stated: its silence proves nothing</span>
            ) : (
              `5σ depth ${fixed(band.depth5Sigma, 1)}`
            )}
          </dd>
        </div>
      ))}
      <dt>Coverage</dt>
      <dd>
        {c.coverage.type}
        {c.coverage.areaSqDeg !== null && (
          <span className="num">, {significant(c.coverage.areaSqDeg, 3)} square degrees</span>
        )}
        {c.coverage.note && <span className="muted"> {c.coverage.note}</span>}
      </dd>
      <dt>Assumed</dt>
      <dd>
        {c.assumed.length === 0 ? (
          'nothing'
        ) : (
          <ul className="plain-list">
            {c.assumed.map((sentence) => (
              <li key={sentence}>{sentence}</li>
            ))}
          </ul>
        )}
      </dd>
      {c.reference && (
        <>
          <dt>Reference</dt>
          <dd>{c.reference}</dd>
        </>
      )}
      <dt>File</dt>
      <dd>
        {c.parts.length > 0 ? (
          <ul className="plain-list">
            {c.parts.map(({ fileName, sha256, firstRow, rows }) => (
              <li key={firstRow + fileName}>
                {fileName}{' '}
                <span className="num small muted">
                  rows {count(firstRow)} to {count(firstRow + rows - 1)}, sha256 {sha256.slice(0, 16)}
                </span>
              </li>
            ))}
          </ul>
        ) : (
          <>
            {c.fileName}{' '}
            <span className="mono small muted" title={c.sha256}>
              sha256 {c.sha256.slice(0, 16)}
            </span>
          </>
        )}
      </dd>
      <dt>Published</dt>
      <dd>{moment(c.publishedAt)}</dd>
      <dt>Used by</dt>
      <dd>
        <span className="num">{c.usedByRuns}</span> {c.usedByRuns === 1 ? 'run' : 'runs'}
        {c.usedByRuns > 0 && (
          <span className="muted"> and kept for them: it cannot be removed, but a new version can take its place</span>
        )}
      </dd>
    </dl>
  );
}
