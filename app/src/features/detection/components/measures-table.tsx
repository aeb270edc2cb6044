import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import type { SurroundingsMeasures } from '@eremite/shared/contracts/surroundings-measures';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { fixed, NO_VALUE, signed } from '#lib/format/number.ts';

interface Measure {
  name: string;
  value: string;
  unit: string;
  meaning: string;
}

const COLUMNS: Column<Measure>[] = [
  { key: 'name', header: 'Measure', align: 'left', cell: ({ name }) => name },
  { key: 'value', header: 'Value', cell: ({ value }) => value },
  { key: 'unit', header: 'Unit', align: 'left', cell: ({ unit }) => <span className="muted">{unit}</span> },
  {
    key: 'meaning',
    header: 'Means',
    align: 'left',
    cell: ({ meaning }) => <span className="prose muted">{meaning}</span>,
  },
];

/** Surroundings in the measures of the literature, each galaxy once, at the distance of the gas. */
export function MeasuresTable({ detail }: { detail: VerdictDetail }) {
  const { measures } = detail;
  if (!measures) return <p className="muted">Without a usable distance the surroundings cannot be measured.</p>;
  return (
    <DataTable
      caption="Measures of the surroundings at the distance of the gas"
      columns={COLUMNS}
      rows={rowsOf(measures)}
      rowKey={({ name }) => name}
    />
  );
}

function rowsOf(m: SurroundingsMeasures): Measure[] {
  const row = (name: string, value: string, unit: string, meaning: string): Measure => ({ name, value, unit, meaning });
  const limit = m.fifthDensityIsLimit ? '< ' : '';
  const { nearest, group, unseen } = m;
  return [
    row(
      'Nearest galaxy',
      nearest ? `${nearest.isLimit ? '> ' : ''}${fixed(nearest.separationKpc, 0)}` : NO_VALUE,
      'kpc',
      nearest
        ? `${nearest.name}, ${signed(nearest.velocityDifferenceKms, 0)} km/s${nearest.isLimit ? '; the edge of the redshifts is nearer' : ''}`
        : `none known within ${m.radiusMpc} Mpc and 500 km/s`,
    ),
    ...m.counts.map(({ radiusMpc, count }) =>
      row(`Within ${radiusMpc} Mpc`, fixed(count, 0), 'galaxies', 'within 500 km/s, each once'),
    ),
    row('Gas neighbours', fixed(m.gasNeighbours, 0), 'HI detections', 'within 1 Mpc and 500 km/s'),
    row(
      'Σ₅',
      `${limit}${fixed(m.fifthDensity, 2)}`,
      'Mpc⁻²',
      `galaxies brighter than M_r ${fixed(m.brighterThanMag, 1)} within 1000 km/s`,
    ),
    row('η₅', `${limit}${fixed(m.localDensity, 2)}`, 'log Mpc⁻³', 'isolated below 2.4'),
    row(
      'Θ₁',
      fixed(m.tidalIndex, 2),
      'dex',
      m.disturber
        ? `main disturber ${m.disturber}; isolated below 0, an upper bound in projection`
        : 'no disturber known',
    ),
    row('Θ₅', fixed(m.tidalIndexOfFive, 2), 'dex', 'of the five strongest together'),
    row('Q', fixed(m.tidalStrength, 2), 'dex', 'tides over the binding of gas and stars; isolated below −2'),
    row(
      'Galaxies of like size',
      fixed(m.spoilers, 0),
      '',
      'nearer than twenty of their own diameters, with or without a redshift',
    ),
    row(
      'Group',
      group ? fixed(group.separationKpc, 0) : NO_VALUE,
      'kpc',
      group
        ? `${group.name}, ${signed(group.velocityDifferenceKms, 0)} km/s; R200 ${fixed(group.r200Kpc, 0)} kpc`
        : 'member of none that a table lists',
    ),
    row(
      'Unseen neighbours',
      unseen ? fixed(unseen.meanField, 2) : NO_VALUE,
      'expected',
      unseen
        ? `${fixed(unseen.clustered, 2)} with clustering; redshifts reach M_r ${fixed(m.reachesMag, 1)} here`
        : 'how deep redshifts reach is not known here',
    ),
    row(
      'Without a redshift',
      fixed(m.unverified, 0),
      'galaxies',
      'within two beams, bright enough to count if they were there: fibres miss close pairs',
    ),
    row(
      'Edge of the redshifts',
      m.edgeKpc === null ? NO_VALUE : fixed(m.edgeKpc, 0),
      'kpc',
      m.edgeKpc === null
        ? 'outside the neighbour circle, or not known'
        : `${fixed(100 * (m.covered ?? 0), 0)} per cent of the circle is covered`,
    ),
  ];
}
