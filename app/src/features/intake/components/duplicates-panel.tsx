import { Checkbox, Switch } from '@blueprintjs/core';
import type { DuplicatePair } from '@eremite/shared/contracts/duplicate-pair';
import type { Intake } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { type Column, DataTable } from '#components/data-table/data-table.tsx';
import { count, fixed, NO_VALUE } from '#lib/format/number.ts';
import type { Change } from '../hooks/use-intake-draft.ts';

const source = ({ row, name }: DuplicatePair['better']) => (
  <>
    {name ?? ''} <span className="muted">row {row}</span>
  </>
);
const signal = ({ signalToNoise }: DuplicatePair['better']) =>
  signalToNoise === null ? NO_VALUE : fixed(signalToNoise, 1);

interface DuplicatesPanelProps {
  intake: Intake;
  draft: IntakeSettings;
  change: Change;
}

/** Rows that seem one source seen in two tiles or passes: shown, and merged when the lead says so. */
export function DuplicatesPanel({ intake, draft, change }: DuplicatesPanelProps) {
  const { count: total, pairs } = intake.duplicates;
  const apart = new Set(draft.keepApart ?? []);
  const merges = draft.mergeDuplicates === true;
  const setApart = (row: number, isApart: boolean) => {
    const rows = isApart ? [...apart, row] : [...apart].filter((other) => other !== row);
    change({ keepApart: rows.length > 0 ? rows.sort((a, b) => a - b) : undefined });
  };
  const columns: Column<DuplicatePair>[] = [
    { key: 'better', header: 'Better row', align: 'left', cell: ({ better }) => source(better) },
    { key: 'betterSignal', header: 'its S/N', cell: ({ better }) => signal(better) },
    { key: 'other', header: 'Other row', align: 'left', cell: ({ other }) => source(other) },
    { key: 'otherSignal', header: 'its S/N', cell: ({ other }) => signal(other) },
    { key: 'ra', header: 'RA', unit: 'deg', cell: ({ better }) => fixed(better.raDeg, 4) },
    { key: 'dec', header: 'Dec', unit: 'deg', cell: ({ better }) => fixed(better.decDeg, 4) },
    { key: 'cz', header: 'cz', unit: 'km/s', cell: ({ better }) => fixed(better.velocityKms, 0) },
    { key: 'apart', header: 'Apart', unit: 'arcsec', cell: ({ separationArcsec }) => fixed(separationArcsec, 1) },
    { key: 'dv', header: '|Δcz|', unit: 'km/s', cell: ({ differenceKms }) => fixed(differenceKms, 0) },
    {
      key: 'two',
      header: 'Two sources',
      align: 'left',
      cell: ({ other, better }) => (
        <Checkbox
          className="duplicates__apart"
          disabled={!merges}
          checked={apart.has(other.row)}
          aria-label={`Row ${other.row} is a source of its own beside row ${better.row}`}
          onChange={({ currentTarget }) => setApart(other.row, currentTarget.checked)}
        />
      ),
    },
  ];
  return (
    <div className="stack" data-pointer="/mergeDuplicates">
      <p>
        {total === 1 ? 'One pair of rows seems' : `${count(total)} pairs of rows seem`} to be one source each, as where
        tiles or passes overlap: positions within three times their errors, velocities within half a line width.
        {total > pairs.length && ` The first ${count(pairs.length)} are listed.`}
      </p>
      <Switch
        checked={merges}
        label="Keep only the better row of each; put the other aside, with the reason"
        onChange={({ currentTarget }) => change({ mergeDuplicates: currentTarget.checked || undefined })}
      />
      <DataTable
        caption="Rows that seem one source"
        columns={columns}
        rows={pairs}
        rowKey={({ other }) => String(other.row)}
      />
    </div>
  );
}
