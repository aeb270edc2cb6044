import type { DistanceUsed, VerdictDetail } from '@eremite/shared/contracts/verdict';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { fixed, withError } from '#lib/format/number.ts';

type Branch = DistanceUsed['branches'][number];

const COLUMNS: Column<Branch>[] = [
  {
    key: 'name',
    header: 'By',
    align: 'left',
    cell: ({ name, used }) => (used ? <b>{name}, used</b> : name),
  },
  { key: 'velocity', header: 'Velocity', unit: 'km/s', cell: ({ velocityKms }) => fixed(velocityKms, 0) },
  { key: 'distance', header: 'D', unit: 'Mpc', cell: ({ luminosityMpc }) => fixed(luminosityMpc, 1) },
  {
    key: 'mass',
    header: (
      <>
        log M<sub>HI</sub>
      </>
    ),
    unit: 'M☉',
    cell: ({ logHiMass }) => fixed(logHiMass, 2),
  },
  { key: 'note', header: 'Infall', align: 'left', cell: ({ note }) => <span className="prose muted">{note}</span> },
];

/** What else the velocity may mean: every branch from a velocity to a distance, beside the one in use. */
export function DistanceBranches({ detail }: { detail: VerdictDetail }) {
  const { kind, luminosityMpc, errorMpc, note } = detail.distance;
  const branches = detail.distance.branches ?? [];
  return (
    <div className="stack">
      <p>
        {luminosityMpc === null
          ? `No distance is used: ${note}.`
          : `In use: ${withError(luminosityMpc, errorMpc, 1)} Mpc${kind === 'measured' ? ', measured' : ''}.${note ? ` Cautions: ${note}.` : ''}`}
      </p>
      {branches.length > 0 && (
        <DataTable
          caption="Distances that the velocity may stand for"
          columns={COLUMNS}
          rows={branches}
          rowKey={({ name }) => name}
        />
      )}
    </div>
  );
}
