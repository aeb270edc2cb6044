import { FormGroup, TextArea } from '@blueprintjs/core';
import type { Intake } from '@eremite/shared/contracts/intake';
import type { FOOTPRINT_TYPES } from '@eremite/shared/contracts/intake-settings';
import { type IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { useId, useState } from 'react';
import type { Change } from '../hooks/use-intake-draft.ts';
import { ChoiceField, NumberField, TextField } from './field.tsx';
import { parseFootprint } from './parse-footprint.ts';

const FOOTPRINTS: Record<(typeof FOOTPRINT_TYPES)[number], string> = {
  unknown: 'unknown',
  rows: 'where the rows are',
  moc: 'a MOC',
  circles: 'circles',
  cones: 'cones around the detections',
  polygons: 'polygons',
  'all-sky': 'the whole sky',
};
const HELP = {
  moc: 'ASCII or JSON, as in 6/8032-8040 7/',
  circles: 'One a line: RA Dec radius, degrees',
  polygons: 'One corner a line: RA Dec, degrees; an empty line begins the next polygon',
} as const;

/** Footprint, missing marks, rows to keep, redshift depth, reference. */
export function RestFields({ intake, draft, change }: { intake: Intake; draft: IntakeSettings; change: Change }) {
  const type = draft.footprint?.type;
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
        <ChoiceField
          label="Footprint"
          help="What was observed; outside it silence says nothing."
          value={type}
          choices={FOOTPRINTS}
          onChange={(next) => change({ footprint: next ? { type: next } : undefined })}
        />
        <TextField
          label="Marks of missing values"
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
          unsaid="all rows"
          value={keep?.column}
          choices={Object.fromEntries(intake.columns.map(({ name }) => [name, name])) as Record<string, string>}
          onChange={(column) => setKeep({ column: column ?? '' })}
        />
        {keep && (
          <TextField
            label={`is one of (${keep.column})`}
            value={keep.values.join(', ')}
            onChange={(text) => setKeep({ values: text.split(',').map((value) => value.trim()) })}
          />
        )}
        <NumberField
          label="Redshifts complete to"
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
      {(type === 'moc' || type === 'circles' || type === 'polygons') && (
        <FootprintText
          key={type}
          type={type}
          value={draft.footprint?.value}
          onChange={(value) => change({ footprint: { type, value } })}
        />
      )}
    </div>
  );
}

interface FootprintTextProps {
  type: keyof typeof HELP;
  value: unknown;
  onChange: (value: unknown) => void;
}

function FootprintText({ type, value, onChange }: FootprintTextProps) {
  const id = useId();
  const [text, setText] = useState(typeof value === 'string' ? value : '');
  const [fault, setFault] = useState('');
  const read = () => {
    const result = parseFootprint(type, text);
    setFault('fault' in result ? result.fault : '');
    if ('value' in result) onChange(result.value);
  };
  return (
    <FormGroup
      label={FOOTPRINTS[type]}
      labelFor={id}
      helperText={fault || HELP[type]}
      intent={fault ? 'danger' : 'none'}
    >
      <TextArea
        id={id}
        fill
        rows={5}
        className="mono"
        value={text}
        onChange={(event) => setText(event.target.value)}
        onBlur={read}
      />
    </FormGroup>
  );
}
