import type { Candidate, Neighbour } from '@eremite/shared/contracts/verdict';
import type { OutputCell, OutputColumn } from '../../tables/writers/output-column.ts';
import type { TableAnswer } from './send-table.ts';

interface Line<T> {
  /** Name of the detection. */
  detection: string;
  entry: T;
}
type Column<T> = OutputColumn & { cell: (entry: T, detection: string) => OutputCell };
type Common = Omit<Candidate, 'override'> | Neighbour;

const text = <T>(name: string, description: string, cell: Column<T>['cell']): Column<T> => ({
  name,
  datatype: 'text',
  description,
  cell,
});
const number = <T>(
  name: string,
  unit: string | undefined,
  decimals: number,
  description: string,
  cell: Column<T>['cell'],
): Column<T> => ({ name, datatype: 'double', unit, decimals, description, cell });

const PLACE: Column<Common>[] = [
  text('detection', 'Name in the HI list', (_, detection) => detection),
  text('catalogue', 'Table of the row', (entry) => entry.catalogueName),
  text('row', 'Name of the row, or its number in the file', (entry) => entry.name),
  {
    name: 'row_number',
    datatype: 'integer',
    description: 'Number of the row in its file',
    cell: (entry) => entry.rowId,
  },
  number('ra_deg', 'deg', 6, 'Right ascension, ICRS', (entry) => entry.raDeg),
  number('dec_deg', 'deg', 6, 'Declination, ICRS', (entry) => entry.decDeg),
  number('separation_arcsec', 'arcsec', 2, 'From the HI centroid', (entry) => entry.separationArcsec),
  number(
    'position_angle_deg',
    'deg',
    1,
    'Of the row seen from the centroid, north through east',
    (entry) => entry.positionAngleDeg,
  ),
  number('separation_kpc', 'kpc', 2, 'Projected at the distance of the gas', (entry) => entry.separationKpc),
  number('cz_kms', 'km/s', 1, 'Velocity, optical convention, barycentric', (entry) => entry.velocityKms),
  number('dv_kms', 'km/s', 1, 'Difference of cz over 1 + z of the detection', (entry) => entry.velocityDifferenceKms),
  text('band', 'Band of the magnitude', (entry) => entry.band),
  number('magnitude', 'mag', 3, 'As in the catalogue', (entry) => entry.magnitude),
];

export const CANDIDATE_COLUMNS: Column<Omit<Candidate, 'override'>>[] = [
  ...PLACE,
  {
    name: 'p_chance',
    datatype: 'double',
    description: 'Chance that an unrelated object as bright lies this near (Downes et al. 1986)',
    cell: (entry) => entry.chanceProbability,
  },
  {
    name: 'likelihood_ratio',
    datatype: 'double',
    description: 'Sutherland & Saunders (1992)',
    cell: (entry) => entry.likelihoodRatio,
  },
  number(
    'probability',
    undefined,
    4,
    'Exclusive probability of the object the row belongs to',
    (entry) => entry.probability,
  ),
  {
    name: 'object',
    datatype: 'integer',
    description: 'Rows of a detection with the same number are one object',
    cell: (entry) => entry.object,
  },
];

export const NEIGHBOUR_COLUMNS: Column<Neighbour>[] = [
  ...PLACE,
  number('absolute_magnitude', 'mag', 2, 'At the distance of the gas', (entry) => entry.absoluteMagnitude),
  number('log_mhi', 'log(solMass)', 2, 'HI mass where the row is an HI detection', (entry) => entry.logHiMass),
  {
    name: 'qualifies',
    datatype: 'boolean',
    description: 'Bright or gas-rich enough to decide the verdict',
    cell: (entry) => entry.qualifies,
  },
];

/** Candidates or neighbours as a table for people and programs. */
export function evidenceTable<T>(
  columns: readonly Column<T>[],
  lines: AsyncIterable<Line<T>>,
  description: string,
): TableAnswer {
  async function* rows() {
    for await (const { detection, entry } of lines) yield columns.map((column) => column.cell(entry, detection));
  }
  return { columns: columns.map(({ cell: _, ...column }) => column), rows: rows(), description };
}
