import { Button, ButtonGroup } from '@blueprintjs/core';
import type { Shortlist } from '@eremite/shared/contracts/shortlist';
import { Link } from 'react-router-dom';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { DoubtFlags } from '#components/doubt-mark/doubt-mark.tsx';
import { StarlightWord, SurroundingsWord } from '#components/verdict-mark/verdict-word.tsx';
import { NO_VALUE, probabilityCell } from '#lib/format/number.ts';
import './shortlist.css';

type Entry = Shortlist['entries'][number];

interface ShortlistTableProps {
  entries: readonly Entry[];
  to: (detectionId: string) => string;
  /** Absent for those who may only read. */
  actions?:
    { move: (at: number, by: -1 | 1) => void; remove: (at: number) => void; edit: (entry: Entry) => void } | undefined;
  isPending: boolean;
}

/** The shortlist in its order. Buttons move an entry, so that no mouse is needed. */
export function ShortlistTable({ entries, to, actions, isPending }: ShortlistTableProps) {
  const nameOf = (entry: Entry) => entry.verdict?.name ?? 'a detection without verdict';
  const columns: Column<Entry>[] = [
    { key: 'rank', header: 'Rank', cell: ({ rank }) => rank },
    {
      key: 'name',
      header: 'Detection',
      align: 'left',
      cell: (entry) => <Link to={to(entry.detectionId)}>{nameOf(entry)}</Link>,
    },
    {
      key: 'starlight',
      header: 'Starlight',
      align: 'left',
      cell: ({ verdict }) =>
        verdict ? (
          <span className="prose">
            <StarlightWord verdict={verdict.settled?.starlight ?? verdict.starlight} />
          </span>
        ) : (
          NO_VALUE
        ),
    },
    {
      key: 'surroundings',
      header: 'Surroundings',
      align: 'left',
      cell: ({ verdict }) =>
        verdict ? (
          <span className="prose">
            <SurroundingsWord verdict={verdict.settled?.surroundings ?? verdict.surroundings} />
          </span>
        ) : (
          NO_VALUE
        ),
    },
    { key: 'pNone', header: 'P(none)', cell: ({ verdict }) => probabilityCell(verdict?.pNone) },
    { key: 'pAlone', header: 'P(alone)', cell: ({ verdict }) => probabilityCell(verdict?.pAlone) },
    {
      key: 'stability',
      header: 'Stability',
      hint: 'The smaller share of draws in which one of the two verdicts stands',
      cell: ({ priority }) => probabilityCell(priority?.stability),
    },
    {
      key: 'priority',
      header: 'Priority',
      hint: 'P(none) × P(no neighbour) × stability; what is not known counts as zero',
      cell: ({ priority }) => probabilityCell(priority?.value),
    },
    {
      key: 'doubts',
      header: 'Doubts',
      align: 'left',
      cell: ({ verdict }) => <DoubtFlags doubts={verdict?.doubts ?? []} />,
    },
    {
      key: 'reason',
      header: 'Reason',
      align: 'left',
      cell: ({ reason, nullResult, notReady }) => (
        <span className="prose shortlist__reason">
          {notReady && <span className="shortlist__not-ready">Cannot be frozen: {notReady}. </span>}
          {reason || <span className="muted">none given</span>}
          {nullResult && <span className="muted"> If nothing is found: {nullResult}</span>}
        </span>
      ),
    },
  ];
  if (actions) {
    columns.push({
      key: 'do',
      header: <span className="visually-hidden">Change</span>,
      cell: (entry) => {
        const at = entries.indexOf(entry);
        return (
          <ButtonGroup>
            <Button
              size="small"
              text="↑"
              aria-label={`Move ${nameOf(entry)} up`}
              disabled={isPending || at === 0}
              onClick={() => actions.move(at, -1)}
            />
            <Button
              size="small"
              text="↓"
              aria-label={`Move ${nameOf(entry)} down`}
              disabled={isPending || at === entries.length - 1}
              onClick={() => actions.move(at, 1)}
            />
            <Button size="small" text="Edit" aria-label={`Edit ${nameOf(entry)}`} onClick={() => actions.edit(entry)} />
            <Button
              size="small"
              text="Remove"
              aria-label={`Remove ${nameOf(entry)}`}
              disabled={isPending}
              onClick={() => actions.remove(at)}
            />
          </ButtonGroup>
        );
      },
    });
  }
  return <DataTable caption="Shortlist" columns={columns} rows={entries} rowKey={({ detectionId }) => detectionId} />;
}
