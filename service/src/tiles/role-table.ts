import { ColumnPackError, type NumberColumn, type PackedColumns, type TextColumn } from './column-pack.ts';

/** Roles held as Float64 once a table; NaN where the file has no value. The unit is in the name. */
export const NUMBER_ROLES = [
  'raDeg', // ICRS
  'decDeg', // ICRS
  'positionErrorArcsec', // 1-D sigma
  'czKms', // optical convention, barycentric
  'effectiveRadiusArcsec',
  'starProbability',
  'width50Kms',
  'width20Kms',
  'fluxJyKms',
  'fluxErrorJyKms',
  'signalToNoise',
  'reliability',
  'distanceMpc',
  'distanceErrorMpc',
  'redshiftQuality',
  'ebvMag',
  'pmRaMasYr', // includes cos(dec)
  'pmDecMasYr',
  'continuumMjy',
] as const;
export type NumberRole = (typeof NUMBER_ROLES)[number];
/** Magnitude of a band, and its error. */
export type BandRole = `mag:${string}` | `magError:${string}`;
/** 1 where the magnitude of the band is only a limit (the object is fainter), else 0. */
export type LimitRole = `magLimit:${string}`;

/**
 * The columns of a catalogue that have a role, in memory: a `PackedColumns` whose columns bear these names.
 * `row` (Uint32, the 1-based data row in the catalogue's file), `raDeg` and `decDeg` are always there.
 */
export interface RoleTable extends PackedColumns {
  columns: Record<string, NumberColumn | TextColumn> & { row: Uint32Array; raDeg: Float64Array; decDeg: Float64Array };
}

const expected = (name: string): 'Uint32Array' | 'Float64Array' | 'Uint8Array' | 'TextColumn' | undefined => {
  if (name === 'row') return 'Uint32Array';
  if (name === 'name') return 'TextColumn';
  if (name.startsWith('magLimit:')) return 'Uint8Array';
  if (/^(mag|magError):/.test(name) || (NUMBER_ROLES as readonly string[]).includes(name)) return 'Float64Array';
  return undefined;
};
const typeOf = (column: NumberColumn | TextColumn): string =>
  'kind' in column ? 'TextColumn' : column.constructor.name;

/**
 * Checks that columns are those of a role table and gives them that type, without copying. Columns that are no role
 * are let through untouched.
 *
 * @throws {ColumnPackError} if `row`, `raDeg` or `decDeg` is missing, or a role has another array type than its own
 */
export function asRoleTable(table: PackedColumns): RoleTable {
  for (const name of ['row', 'raDeg', 'decDeg']) {
    if (!table.columns[name]) throw new ColumnPackError(`a role table needs a column "${name}"`);
  }
  for (const [name, column] of Object.entries(table.columns)) {
    const type = expected(name);
    if (type !== undefined && typeOf(column) !== type) {
      throw new ColumnPackError(`column "${name}" of a role table must be a ${type}, it is a ${typeOf(column)}`);
    }
  }
  return table as RoleTable;
}

/** @returns the values of a role, NaN where missing; undefined if the catalogue has no such column */
export function numberRole({ columns }: RoleTable, role: NumberRole | BandRole): Float64Array | undefined {
  return columns[role] as Float64Array | undefined;
}

/** @returns 1 where the magnitude of the band is a limit; undefined if the catalogue has no such column */
export function limitRole({ columns }: RoleTable, role: LimitRole): Uint8Array | undefined {
  return columns[role] as Uint8Array | undefined;
}

/** @returns the names of the rows; undefined if the catalogue gives none */
export function nameRole({ columns }: RoleTable): TextColumn | undefined {
  return columns['name'] as TextColumn | undefined;
}

/** @returns the bands that have a magnitude, in column order */
export function bandsOf({ columns }: RoleTable): string[] {
  return Object.keys(columns).flatMap((name) => (name.startsWith('mag:') ? [name.slice('mag:'.length)] : []));
}
