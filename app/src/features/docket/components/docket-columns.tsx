import { Link } from 'react-router-dom';
import type { Column } from '#components/data-table/data-table.tsx';
import { signed } from '#components/moved-list/signed.ts';
import { DoubtFlags } from '#components/doubt-mark/doubt-mark.tsx';
import { StarlightWord, SurroundingsWord } from '#components/verdict-mark/verdict-word.tsx';
import { probabilityCell } from '#lib/format/number.ts';
import type { DocketItem } from '#lib/queries/docket.ts';

export const docketColumns = (to: (detectionId: string) => string): Column<DocketItem>[] => [
  {
    key: 'name',
    header: 'Detection',
    align: 'left',
    cell: (item) => <Link to={to(item.detectionId)}>{item.name}</Link>,
  },
  {
    key: 'starlight',
    header: 'Starlight',
    align: 'left',
    cell: (item) => (
      <span className="prose">
        <StarlightWord verdict={item.starlight} />
      </span>
    ),
  },
  {
    key: 'surroundings',
    header: 'Surroundings',
    align: 'left',
    cell: (item) => (
      <span className="prose">
        <SurroundingsWord verdict={item.surroundings} />
      </span>
    ),
  },
  { key: 'pNone', header: 'P(none)', cell: (item) => probabilityCell(item.pNone) },
  { key: 'power', header: 'Power', cell: (item) => probabilityCell(item.power) },
  { key: 'pAlone', header: 'P(alone)', cell: (item) => probabilityCell(item.pAlone) },
  { key: 'doubts', header: 'Doubts', align: 'left', cell: (item) => <DoubtFlags doubts={item.doubts} /> },
  {
    key: 'assigned',
    header: 'Assigned to',
    align: 'left',
    cell: (item) => (
      <span className="prose">{item.assignedTo.join(', ') || <span className="muted">nobody</span>}</span>
    ),
  },
  {
    key: 'reviews',
    header: 'Reviews',
    align: 'left',
    cell: (item) => <span className="prose">{reviewWords(item)}</span>,
  },
  {
    key: 'moved',
    header: 'What moved',
    hint: 'What moved since your word, or since it was settled',
    align: 'left',
    cell: (item) => <span className="prose">{movedWords(item)}</span>,
  },
];

function reviewWords(item: DocketItem): string {
  if (item.settled) return item.settled.outcome === 'verdict' ? 'settled' : `settled: ${item.settled.outcome}`;
  const others = item.reviews - (item.reviewedByMe ? 1 : 0);
  const differ = item.disagreement ? ', which differ' : '';
  return (
    ([item.reviewedByMe && 'yours', others > 0 && `${others} other${others > 1 ? 's' : ''}`]
      .filter(Boolean)
      .join(' and ') || 'none') + differ
  );
}

/** The first two things that moved, by how much; the detection page has all. */
function movedWords({ moved }: DocketItem): string {
  const words = moved
    .slice(0, 2)
    .map(({ what, from, to, by, unit }) => `${what} ${by === null ? `${from} → ${to}` : signed(by)} ${unit}`.trim());
  return words.join('; ') + (moved.length > 2 ? ` and ${moved.length - 2} more` : '');
}
