import type { FieldTable } from '@eremite/shared/contracts/field';
import { velocityDifference } from '@eremite/shared/science/velocity/window';
import { separationArcsec } from '../../matching/separation-arcsec.ts';
import { isStar } from '../../scoring/prepared-catalogue.ts';
import { textAt } from '../../tiles/column-pack.ts';
import { limitRole, nameRole, numberRole, type RoleTable } from '../../tiles/role-table.ts';

/** The middle of a field. */
export interface FieldCentre {
  raDeg: number;
  decDeg: number;
  czKms: number | null;
  /** The detection's own row: it is not one of its surroundings. */
  own: { catalogueId: string; row: number };
}

/** A table of the run, as a field shows it. */
export interface FieldSource extends Pick<FieldTable, 'catalogueId' | 'name' | 'kind' | 'beamArcsec'> {
  /** Names of the bands in the table's order: the first with a magnitude is shown. */
  bands: readonly string[];
}

/** Rows of a table inside a radius, nearest first. */
export function fieldTable(
  source: FieldSource,
  roles: RoleTable,
  centre: FieldCentre,
  radiusArcsec: number,
): FieldTable {
  const { raDeg, decDeg, row } = roles.columns;
  const names = nameRole(roles);
  const czKms = numberRole(roles, 'czKms');
  const motion = {
    starProbability: numberRole(roles, 'starProbability'),
    pmRa: numberRole(roles, 'pmRaMasYr'),
    pmDec: numberRole(roles, 'pmDecMasYr'),
  };
  const bands = source.bands.flatMap((band) => {
    const magnitude = numberRole(roles, `mag:${band}`);
    return magnitude ? [{ band, magnitude, isLimit: limitRole(roles, `magLimit:${band}`) }] : [];
  });
  const isOwn = (i: number) => source.catalogueId === centre.own.catalogueId && row[i] === centre.own.row;
  const found: { i: number; separation: number }[] = [];
  for (let i = 0; i < roles.rows; i++) {
    const separation = separationArcsec(centre.raDeg, centre.decDeg, raDeg[i]!, decDeg[i]!);
    if (separation <= radiusArcsec && !isOwn(i)) found.push({ i, separation });
  }
  found.sort((a, b) => a.separation - b.separation || row[a.i]! - row[b.i]!);
  const shown = found.map(({ i }) => bands.find(({ magnitude, isLimit }) => magnitude[i]! > -90 && !isLimit?.[i]));
  const differenceKms = (i: number): number | null => {
    const cz = czKms?.[i] ?? NaN;
    return centre.czKms !== null && Number.isFinite(cz) ? velocityDifference(cz, centre.czKms) : null;
  };
  const { bands: _, ...about } = source;
  return {
    ...about,
    inside: found.length,
    rowId: found.map(({ i }) => row[i]!),
    objectName: found.map(({ i }) => (names && textAt(names, i)) || String(row[i]!)),
    raDeg: found.map(({ i }) => raDeg[i]!),
    decDeg: found.map(({ i }) => decDeg[i]!),
    separationArcsec: found.map(({ separation }) => separation),
    magnitude: found.map(({ i }, k) => shown[k]?.magnitude[i] ?? null),
    band: shown.map((one) => one?.band ?? null),
    velocityDifferenceKms: found.map(({ i }) => differenceKms(i)),
    isStar: found.map(({ i }) => isStar(motion, i)),
  };
}

/**
 * Leaves out the faintest rows without a velocity until at most so many objects remain; HI detections always stay.
 * @returns the tables, and whether anything was left out
 */
export function cutField(tables: FieldTable[], most: number): { tables: FieldTable[]; isCut: boolean } {
  const total = tables.reduce((n, { rowId }) => n + rowId.length, 0);
  if (total <= most) return { tables, isCut: false };
  const rank = ({ kind, magnitude, velocityDifferenceKms }: FieldTable, k: number): number =>
    kind === 'hi' || velocityDifferenceKms[k] !== null ? -Infinity : (magnitude[k] ?? Infinity);
  const ranks = tables.flatMap((table) => table.rowId.map((_, k) => rank(table, k))).sort((a, b) => a - b);
  const limit = ranks[most - 1]!;
  let free = most - ranks.filter((value) => value < limit).length;
  const cut = tables.map((table) => {
    const kept = table.rowId.flatMap((_, k) => {
      const value = rank(table, k);
      return value < limit || (value === limit && free-- > 0) ? [k] : [];
    });
    const pick = <T>(values: T[]): T[] => kept.map((k) => values[k]!);
    return {
      ...table,
      rowId: pick(table.rowId),
      objectName: pick(table.objectName),
      raDeg: pick(table.raDeg),
      decDeg: pick(table.decDeg),
      separationArcsec: pick(table.separationArcsec),
      magnitude: pick(table.magnitude),
      band: pick(table.band),
      velocityDifferenceKms: pick(table.velocityDifferenceKms),
      isStar: pick(table.isStar),
    };
  });
  return { tables: cut, isCut: true };
}
