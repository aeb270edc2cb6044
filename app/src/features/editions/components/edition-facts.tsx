import type { EditionDetail } from '@eremite/shared/contracts/edition';
import { count } from '#lib/format/number.ts';
import { fileSize, moment } from '#lib/format/time.ts';

/** What the edition stands on: enough to repeat it, and to notice if anything were changed. */
export function EditionFacts({ edition }: { edition: EditionDetail }) {
  const { cosmology, archive, inputs, ledgerHead } = edition;
  return (
    <dl className="facts">
      <dt>Frozen</dt>
      <dd>
        {moment(edition.createdAt)} by {edition.createdBy}
      </dd>
      <dt>Run, criteria</dt>
      <dd>
        run <span className="num">{edition.run.number}</span>, criteria{' '}
        <span className="num">{edition.criteria.number}</span>
      </dd>
      <dt>Cosmology</dt>
      <dd>
        H0 <span className="num">{cosmology.h0}</span> km/s/Mpc, Ω_m <span className="num">{cosmology.omegaM}</span>,
        flat
      </dd>
      <dt>Tables</dt>
      <dd>
        <ul className="plain-list">
          {inputs.map(({ catalogueId, name, kind, rows, fileName, sha256 }) => (
            <li key={catalogueId}>
              {name}{' '}
              <span className="muted small">
                {kind}, <span className="num">{count(rows)}</span> rows, {fileName},{' '}
                <span className="mono" title={`sha256 ${sha256}`}>
                  {sha256.slice(0, 10)}
                </span>
              </span>
            </li>
          ))}
        </ul>
      </dd>
      <dt>Input hash</dt>
      <dd className="mono">{edition.inputHash}</dd>
      <dt>Ledger</dt>
      <dd>
        line <span className="num">{ledgerHead.number}</span> <span className="mono">{ledgerHead.hash}</span>
      </dd>
      <dt>Archive</dt>
      <dd>
        {archive ? (
          <>
            {fileSize(archive.bytes)}, sha256 <span className="mono">{archive.sha256}</span>
          </>
        ) : (
          'being packed'
        )}
      </dd>
      <dt>Software</dt>
      <dd>
        Eremite <span className="num">{edition.softwareVersion}</span>, {edition.scoringVersion}
      </dd>
    </dl>
  );
}
