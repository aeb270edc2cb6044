import { Link } from 'react-router-dom';
import type { Column } from '#components/data-table/data-table.tsx';
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
];

function reviewWords(item: DocketItem): string {
  if (item.settled) return 'settled';
  const others = item.reviews - (item.reviewedByMe ? 1 : 0);
  return (
    [item.reviewedByMe && 'yours', others > 0 && `${others} other${others > 1 ? 's' : ''}`]
      .filter(Boolean)
      .join(' and ') || 'none'
  );
}
