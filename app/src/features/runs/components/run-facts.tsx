import type { Run } from '@eremite/shared/contracts/run';
import { Link } from 'react-router-dom';
import { paths } from '#config/paths.ts';
import { count, fixed, significant } from '#lib/format/number.ts';
import { duration, moment } from '#lib/format/time.ts';

const percent = (share: number) => `${significant(share * 100, 2)} %`;

/** What was run on what: inputs with their hashes, so that it can be repeated. */
export function RunFacts({ surveyId, run }: { surveyId: string; run: Run }) {
  return (
    <dl className="facts">
      <dt>Criteria</dt>
      <dd>
        <Link to={paths.criteriaNumber(surveyId, run.criteriaId)}>Criteria {run.criteriaNumber}</Link>
      </dd>
      <dt>Started</dt>
      <dd>
        {moment(run.createdAt)} by {run.createdBy}
      </dd>
      {run.seconds !== null && (
        <>
          <dt>Took</dt>
          <dd className="num">{duration(run.seconds)}</dd>
        </>
      )}
      {run.counts && (
        <>
          <dt>Detections</dt>
          <dd className="num">{count(run.counts.detections)}</dd>
          <dt>Candidates, neighbours</dt>
          <dd className="num">
            {count(run.counts.candidates)}, {count(run.counts.neighbours)}
          </dd>
        </>
      )}
      <dt>Tables</dt>
      <dd>
        <ul className="plain-list">
          {run.inputs.map(({ catalogueId, name, kind, rows, sha256 }) => (
            <li key={catalogueId}>
              <Link to={paths.catalogue(surveyId, catalogueId)}>{name}</Link>{' '}
              <span className="muted small">
                {kind}, <span className="num">{count(rows)}</span> rows,{' '}
                <span className="mono" title={sha256}>
                  {sha256.slice(0, 10)}
                </span>
              </span>
            </li>
          ))}
        </ul>
      </dd>
      <dt>Hash of all inputs</dt>
      <dd className="mono small">{run.inputHash}</dd>
    </dl>
  );
}

/** The chance-match rate from shifted positions, and what it does to the count of dark ones. */
export function ControlFacts({ control }: { control: NonNullable<Run['control']> }) {
  return (
    <dl className="facts">
      <dt>Shifted places</dt>
      <dd className="num">
        {count(control.positionsKept)} kept, {count(control.offsetsPerSource)} a detection
      </dd>
      <dt>Matched by chance</dt>
      <dd className="num">
        {count(control.chanceMatches)}, {percent(control.chanceFraction)}{' '}
        <span className="muted">
          ({percent(control.chanceInterval[0])} to {percent(control.chanceInterval[1])}, 68 %)
        </span>
      </dd>
      <dt>With a counterpart</dt>
      <dd className="num">
        {percent(control.observedFraction)} observed, {percent(control.trueFraction)} true
      </dd>
      <dt>Without an accepted object, corrected for chance</dt>
      <dd className="num">{fixed(control.correctedUnmatched, 1)}</dd>
    </dl>
  );
}
