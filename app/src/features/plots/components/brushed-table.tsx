import type { PlotPoint } from '@eremite/shared/contracts/plot';
import { useMemo } from 'react';
import { Link } from 'react-router-dom';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { StarlightWord, SurroundingsWord } from '#components/verdict-mark/verdict-word.tsx';
import { fixed, NO_VALUE, probabilityCell } from '#lib/format/number.ts';

interface BrushedTableProps {
  points: readonly PlotPoint[];
  /** Address of a detection. */
  to: (detectionId: string) => string;
}

/** Rows shown at a time: the brush is the way to fewer. */
const MOST_ROWS = 100;

const bound = (isLimit: boolean, sign: string, value: number | null) =>
  value === null ? NO_VALUE : `${isLimit ? sign : ''}${fixed(value, 2)}`;

const columns = (to: BrushedTableProps['to']): Column<PlotPoint>[] => [
  {
    key: 'name',
    header: 'Detection',
    align: 'left',
    cell: (p) => (
      <Link className="mono" to={to(p.detectionId)}>
        {p.name}
      </Link>
    ),
  },
  { key: 'starlight', header: 'Starlight', align: 'left', cell: (p) => <StarlightWord verdict={p.starlight} /> },
  {
    key: 'surroundings',
    header: 'Surroundings',
    align: 'left',
    cell: (p) => <SurroundingsWord verdict={p.surroundings} />,
  },
  { key: 'dark', header: 'P(no starlight)', cell: (p) => probabilityCell(p.pNoStarlight) },
  { key: 'alone', header: 'P(no neighbour)', cell: (p) => probabilityCell(p.pAlone) },
  {
    key: 'gas',
    header: 'log M(HI)',
    unit: 'M☉',
    cell: (p) => `${fixed(p.logHiMass, 2)} ± ${fixed(p.logHiMassError, 2)}`,
  },
  { key: 'light', header: 'log L(r)', unit: 'L☉', cell: (p) => bound(p.lightIsLimit, '<', p.logLight) },
  { key: 'ratio', header: 'log M(HI)/L', unit: 'solar', cell: (p) => bound(p.lightIsLimit, '>', p.logGasToLight) },
  { key: 'baryons', header: 'log M(bar)', unit: 'M☉', cell: (p) => bound(p.lightIsLimit, '>', p.logBaryonicMass) },
  { key: 'speed', header: 'log V(rot)', unit: 'km/s', cell: (p) => fixed(p.logSpeed, 2) },
];

/** The detections inside the brush, those most likely without starlight first. */
export function BrushedTable({ points, to }: BrushedTableProps) {
  const shown = useMemo(
    () => [...points].sort((a, b) => b.pNoStarlight - a.pNoStarlight).slice(0, MOST_ROWS),
    [points],
  );
  const cells = useMemo(() => columns(to), [to]);
  return (
    <>
      <DataTable caption="Detections inside the brush" columns={cells} rows={shown} rowKey={(p) => p.detectionId} />
      {points.length > MOST_ROWS && (
        <p className="muted small">The first {MOST_ROWS} are shown; brush a smaller part for the others.</p>
      )}
    </>
  );
}
