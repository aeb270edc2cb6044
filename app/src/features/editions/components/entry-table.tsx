import type { EditionEntry } from '@eremite/shared/contracts/edition';
import type { ReactNode } from 'react';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { DoubtFlags } from '#components/doubt-mark/doubt-mark.tsx';
import { StarlightWord, SurroundingsWord } from '#components/verdict-mark/verdict-word.tsx';
import { fixed, probabilityCell, withError } from '#lib/format/number.ts';
import { declination, rightAscension } from '#lib/format/position.ts';

interface EntryTableProps {
  entries: readonly EditionEntry[];
  /** How a source is named: the team links to its page. */
  name: (entry: EditionEntry) => ReactNode;
}

/** The frozen list. */
export function EntryTable({ entries, name }: EntryTableProps) {
  const columns: Column<EditionEntry>[] = [
    { key: 'rank', header: 'Rank', cell: ({ rank }) => rank },
    { key: 'name', header: 'Source', align: 'left', cell: name },
    { key: 'ra', header: 'RA', unit: 'ICRS', cell: ({ verdict }) => rightAscension(verdict.raDeg) },
    { key: 'dec', header: 'Dec', unit: 'ICRS', cell: ({ verdict }) => declination(verdict.decDeg) },
    { key: 'cz', header: 'cz', unit: 'km/s', cell: ({ verdict }) => fixed(verdict.velocityKms, 0) },
    {
      key: 'distance',
      header: 'Distance',
      unit: 'Mpc',
      cell: ({ verdict }) => withError(verdict.distanceMpc, verdict.distanceErrorMpc, 1),
    },
    { key: 'mass', header: 'log M_HI', unit: 'solar', cell: ({ verdict }) => fixed(verdict.logHiMass, 2) },
    {
      key: 'starlight',
      header: 'Starlight',
      align: 'left',
      cell: ({ verdict }) => (
        <span className="prose">
          <StarlightWord verdict={verdict.settled?.starlight ?? verdict.starlight} />
        </span>
      ),
    },
    {
      key: 'surroundings',
      header: 'Surroundings',
      align: 'left',
      cell: ({ verdict }) => (
        <span className="prose">
          <SurroundingsWord verdict={verdict.settled?.surroundings ?? verdict.surroundings} />
        </span>
      ),
    },
    { key: 'pNone', header: 'P(none)', cell: ({ verdict }) => probabilityCell(verdict.pNone) },
    { key: 'pAlone', header: 'P(alone)', cell: ({ verdict }) => probabilityCell(verdict.pAlone) },
    {
      key: 'priority',
      header: 'Priority',
      hint: 'P(none) × P(no neighbour) × the smaller stability of the two verdicts',
      cell: ({ priority }) => probabilityCell(priority),
    },
    { key: 'doubts', header: 'Doubts', align: 'left', cell: ({ verdict }) => <DoubtFlags doubts={verdict.doubts} /> },
    {
      key: 'words',
      header: 'What was said',
      align: 'left',
      cell: ({ reason, nullResult, said }) => (
        <span className="prose edition__words">
          {reason}
          {nullResult && <span className="muted"> If nothing is found: {nullResult}</span>}
          {said.map(({ as, by, note, at }) => (
            <span key={by + at} className="muted">
              {' '}
              {as === 'settled' ? 'Settled' : 'Reviewed'} by {by}
              {note ? `: ${note}` : '.'}
            </span>
          ))}
        </span>
      ),
    },
  ];
  return (
    <DataTable
      caption="Sources of the edition"
      columns={columns}
      rows={entries}
      rowKey={({ detectionId }) => detectionId}
    />
  );
}
