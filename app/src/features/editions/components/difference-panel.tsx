import type { Edition } from '@eremite/shared/contracts/edition';
import { useQuery } from '@tanstack/react-query';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { differenceQuery } from '../api/editions.ts';

/** What this edition has that the one it supersedes has not. */
export function DifferencePanel({ editionId, from }: { editionId: string; from: NonNullable<Edition['supersedes']> }) {
  const { data, error } = useQuery(differenceQuery(editionId, from.id));
  if (error) return <ProblemCallout error={error} />;
  if (!data) return <Loading />;
  const lines = [
    ...(data.runChanged ? [`Run ${data.runChanged.from} → ${data.runChanged.to}.`] : []),
    ...data.criteriaChanged.map(({ key, from: a, to: b }) => `${key}: ${JSON.stringify(a)} → ${JSON.stringify(b)}.`),
    ...data.inputsChanged.map((change) => `Table, ${change}.`),
    ...data.added.map(({ name, rank }) => `Added: ${name} at ${rank}.`),
    ...data.removed.map(({ name, rank }) => `Taken off: ${name}, it was at ${rank}.`),
    ...data.changed.map(({ name, what }) => `${name}: ${what.join('; ')}.`),
  ];
  return (
    <div className="stack">
      {lines.length === 0 && <p className="muted">Nothing differs from edition {from.number}.</p>}
      <ul className="plain-list">
        {lines.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
      <p className="muted small">
        {data.unchanged} {data.unchanged === 1 ? 'source stands' : 'sources stand'} as in edition {from.number}.
      </p>
    </div>
  );
}
