import type { Intake } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { useQuery } from '@tanstack/react-query';
import { cataloguesQuery } from '#lib/queries/catalogues.ts';
import type { Change } from '../hooks/use-intake-draft.ts';
import { ChoiceField } from './field.tsx';

/** Which published table this one takes the place of, if any. */
export function VersionField({ intake, draft, change }: { intake: Intake; draft: IntakeSettings; change: Change }) {
  const { data } = useQuery(cataloguesQuery(intake.surveyId));
  const known = data?.items.filter(({ kind, state }) => kind === draft.kind && state === 'published') ?? [];
  if (known.length === 0) return null;
  const choices = Object.fromEntries(known.map(({ id, name }) => [id, name])) as Record<string, string>;
  return (
    <ChoiceField
      label="New version of"
      pointer="/supersedes"
      help="That one is kept for the runs that read it, and used by no further one."
      unsaid="none: a table of its own"
      value={draft.supersedes ?? undefined}
      choices={choices}
      onChange={(supersedes) => change({ supersedes })}
    />
  );
}
