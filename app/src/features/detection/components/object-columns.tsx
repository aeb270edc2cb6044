import type { Candidate, Neighbour } from '@eremite/shared/contracts/verdict';
import type { Column } from '#components/data-table/data-table.tsx';
import { rowKey } from '@eremite/shared/drawing/sky-mark';
import { fixed, NO_VALUE, probabilityCell, signed, significant } from '#lib/format/number.ts';

type Pick = (key: string) => void;

const name = (onPick: Pick) => (row: Candidate | Neighbour) => (
  <button type="button" className="data-table__pick" onClick={() => onPick(rowKey(row))} title={row.catalogueName}>
    {row.name}
  </button>
);
const magnitude = (row: Candidate | Neighbour) =>
  row.magnitude === null ? NO_VALUE : `${row.band ?? ''} ${fixed(row.magnitude, 2)}`.trim();

export const candidateColumns = (onPick: Pick): Column<Candidate>[] => [
  { key: 'name', header: 'Object', align: 'left', cell: name(onPick) },
  {
    key: 'what',
    header: '',
    align: 'left',
    cell: (c) => (
      <span className="prose muted">
        {[c.kind, c.isStar && 'star', c.override && `${c.override}ed`].filter(Boolean).join(', ')}
      </span>
    ),
  },
  { key: 'sep', header: 'Sep', unit: '″', cell: (c) => fixed(c.separationArcsec, 1) },
  {
    key: 'kpc',
    header: 'Proj',
    unit: 'kpc',
    hint: 'At the distance of the gas.',
    cell: (c) => fixed(c.separationKpc, 1),
  },
  {
    key: 'dv',
    header: 'Δv',
    unit: 'km/s',
    hint: 'Difference of cz over (1 + z) of the detection.',
    cell: (c) => signed(c.velocityDifferenceKms, 0),
  },
  { key: 'mag', header: 'Mag', cell: magnitude },
  {
    key: 'chance',
    header: 'By chance',
    hint: 'Probability that an unrelated object as bright lies this near.',
    cell: (c) => probabilityCell(c.chanceProbability),
  },
  {
    key: 'lr',
    header: 'LR',
    hint: 'Likelihood ratio, for those who want it; the verdict uses P.',
    cell: (c) => significant(c.likelihoodRatio, 2),
  },
  {
    key: 'p',
    header: 'P',
    hint: 'Exclusive probability of the physical object this row belongs to.',
    cell: (c) => <b>{probabilityCell(c.probability)}</b>,
  },
];

export const neighbourColumns = (onPick: Pick): Column<Neighbour>[] => [
  { key: 'name', header: 'Galaxy', align: 'left', cell: name(onPick) },
  {
    key: 'counts',
    header: '',
    align: 'left',
    hint: 'Bright or gas-rich enough to decide the verdict.',
    cell: (n) => <span className="prose muted">{n.qualifies ? 'decides' : 'too faint'}</span>,
  },
  { key: 'kpc', header: 'Proj', unit: 'kpc', cell: (n) => fixed(n.separationKpc, 0) },
  { key: 'sep', header: 'Sep', unit: '′', cell: (n) => fixed(n.separationArcsec / 60, 1) },
  { key: 'dv', header: 'Δv', unit: 'km/s', cell: (n) => signed(n.velocityDifferenceKms, 0) },
  { key: 'mag', header: 'Mag', cell: magnitude },
  { key: 'abs', header: 'M', unit: 'mag', cell: (n) => fixed(n.absoluteMagnitude, 1) },
  {
    key: 'gas',
    header: (
      <>
        log M<sub>HI</sub>
      </>
    ),
    unit: 'M☉',
    cell: (n) => fixed(n.logHiMass, 1),
  },
];
