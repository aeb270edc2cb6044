import type { Intake } from '@eremite/shared/contracts/intake';
import { type IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { Change } from '../hooks/use-intake-draft.ts';
import { ChoiceField, NumberField, TextField } from './field.tsx';

/** Missing marks, rows to keep, redshift depth, reference. */
export function RestFields({ intake, draft, change }: { intake: Intake; draft: IntakeSettings; change: Change }) {
  const keep = draft.keep?.[0];
  const setKeep = (patch: Partial<{ column: string; values: string[] }>) => {
    const next = { column: keep?.column ?? '', values: keep?.values ?? [], ...patch };
    change({
      keep: next.column && next.values.length > 0 ? [next] : next.column ? [{ ...next, values: [''] }] : undefined,
    });
  };
  return (
    <div className="stack">
      <div className="columns field-grid">
        <TextField
          label="Marks of missing values"
          pointer="/missing"
          help="Separated by commas; an empty cell is always missing."
          value={draft.missing?.filter(Boolean).join(', ')}
          onChange={(text) =>
            change({
              missing: [
                '',
                ...text
                  .split(',')
                  .map((mark) => mark.trim())
                  .filter(Boolean),
              ],
            })
          }
        />
        <ChoiceField
          label="Keep only rows where"
          pointer="/keep"
          unsaid="all rows"
          value={keep?.column}
          choices={Object.fromEntries(intake.columns.map(({ name }) => [name, name])) as Record<string, string>}
          onChange={(column) => setKeep({ column: column ?? '' })}
        />
        {keep && (
          <TextField
            label={`is one of (${keep.column})`}
            pointer="/keep/0/values"
            value={keep.values.join(', ')}
            onChange={(text) => setKeep({ values: text.split(',').map((value) => value.trim()) })}
          />
        )}
        <NumberField
          label="Redshifts complete to"
          pointer="/redshiftDepth"
          unit="mag"
          help="In the first band; measured from the rows where left empty."
          value={draft.redshiftDepth?.magnitude}
          onChange={(magnitude) =>
            change({
              redshiftDepth: magnitude === undefined ? undefined : { band: draft.bands?.[0]?.name ?? 'r', magnitude },
            })
          }
        />
        <TextField
          label="Reference"
          help="Where the table comes from."
          value={draft.reference}
          onChange={(reference) => change({ reference })}
        />
      </div>
    </div>
  );
}
