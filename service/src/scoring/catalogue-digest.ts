import { DEGREE } from '@eremite/shared/science/constants';
import {
  addHistograms,
  type MagnitudeHistogram,
  magnitudeHistogram,
} from '@eremite/shared/science/counterpart/magnitude-histogram';
import { REDSHIFT_BIN_MAG } from '@eremite/shared/science/surroundings/redshift-depth';
import { cellOf } from '@eremite/shared/science/sky/healpix';
import { sharedMemory } from '../matching/memory.ts';
import { bandsOf, limitRole, numberRole, type RoleTable } from '../tiles/role-table.ts';
import { isStar } from './is-star.ts';

/** Bins of the number counts, mag. */
export const COUNT_BIN_MAG = 0.25;
/** Order of the cells by which the occupied area is told. */
export const AREA_ORDER = 12;
/** Rows whose cells are kept for the occupied area: those of every so-many-th row number, a power of two. */
const MOST_SAMPLED = 100_000;
/** One row a cell of 1.7 arcmin says all that the dust map has to say, and bounds the work in deep tables. */
const REDDENING_ORDER = 11;

/** What a run has to know of all rows of a catalogue, those that no detection can meet included. Plain data. */
export interface CatalogueDigest {
  rows: number;
  /** Rows that are not stars. */
  galaxies: number;
  /** Magnitudes of galaxies, limits left out, by band. */
  counts: Record<string, MagnitudeHistogram>;
  /** Rows with a magnitude, and those of them with a velocity, by band; empty for a table without velocities. */
  redshifts: Record<string, { all: MagnitudeHistogram; moving: MagnitudeHistogram }>;
  /** Row numbers divisible by `stride`, and their nested cells of {@link AREA_ORDER}. */
  sampled: { stride: number; row: Float64Array; cell: Float64Array };
  /** E(B-V) of the first row in each cell that has one: row number, cell and value. */
  reddening: { row: Uint32Array; raDeg: Float64Array; decDeg: Float64Array; ebvMag: Float64Array };
}

const cellAt = (order: number, raDeg: number, decDeg: number): number =>
  cellOf(order, (((raDeg % 360) + 360) % 360) * DEGREE, decDeg * DEGREE);

/** Takes the digest of a table, or of a part of one. */
export function digestOf(roles: RoleTable): CatalogueDigest {
  const starProbability = numberRole(roles, 'starProbability');
  const stars = { starProbability, pmRa: numberRole(roles, 'pmRaMasYr'), pmDec: numberRole(roles, 'pmDecMasYr') };
  const mayBeStars = starProbability !== undefined || (stars.pmRa !== undefined && stars.pmDec !== undefined);
  let galaxies = roles.rows;
  // Proper motions alone tell stars from galaxies in the counts, but not in the density: few rows of a table have them.
  if (starProbability) for (let i = 0; i < roles.rows; i++) if (isStar(stars, i)) galaxies--;
  const czKms = numberRole(roles, 'czKms');
  const counts: CatalogueDigest['counts'] = {};
  const redshifts: CatalogueDigest['redshifts'] = {};
  for (const band of bandsOf(roles)) {
    const magnitude = numberRole(roles, `mag:${band}`)!;
    const isLimit = limitRole(roles, `magLimit:${band}`);
    const all = !isLimit && !mayBeStars;
    counts[band] = magnitudeHistogram(
      magnitude,
      COUNT_BIN_MAG,
      all ? undefined : (i) => !isLimit?.[i] && !isStar(stars, i),
    );
    if (czKms) {
      redshifts[band] = {
        all: magnitudeHistogram(magnitude, REDSHIFT_BIN_MAG),
        moving: magnitudeHistogram(magnitude, REDSHIFT_BIN_MAG, (i) => Number.isFinite(czKms[i]!)),
      };
    }
  }
  return { rows: roles.rows, galaxies, counts, redshifts, sampled: sampleOf(roles), reddening: reddeningOf(roles) };
}

function sampleOf({ rows, columns: { row, raDeg, decDeg } }: RoleTable): CatalogueDigest['sampled'] {
  let stride = 1;
  while (rows / stride > 2 * MOST_SAMPLED) stride *= 2;
  const kept = row.reduce((count, number) => count + (number % stride === 0 ? 1 : 0), 0);
  const sample = { stride, row: new Float64Array(kept), cell: new Float64Array(kept) };
  let at = 0;
  for (let i = 0; i < rows; i++) {
    if (row[i]! % stride !== 0) continue;
    sample.row[at] = row[i]!;
    sample.cell[at++] = cellAt(AREA_ORDER, raDeg[i]!, decDeg[i]!);
  }
  return thinned(sample);
}

function thinned({ stride, row, cell }: CatalogueDigest['sampled']): CatalogueDigest['sampled'] {
  if (row.length <= MOST_SAMPLED) return { stride, row, cell };
  const kept = (_: number, i: number) => row[i]! % (2 * stride) === 0;
  return thinned({ stride: 2 * stride, row: row.filter(kept), cell: cell.filter(kept) });
}

function reddeningOf(roles: RoleTable): CatalogueDigest['reddening'] {
  const ebv = numberRole(roles, 'ebvMag');
  const { row, raDeg, decDeg } = roles.columns;
  const first = new Map<number, number>();
  for (let i = 0; ebv && i < roles.rows; i++) {
    if (!(ebv[i]! >= 0)) continue;
    const cell = cellAt(REDDENING_ORDER, raDeg[i]!, decDeg[i]!);
    const known = first.get(cell);
    if (known === undefined || row[i]! < row[known]!) first.set(cell, i);
  }
  const kept = [...first.values()].sort((a, b) => row[a]! - row[b]!);
  const pick = (values: Float64Array) => Float64Array.from(kept, (i) => values[i]!);
  return {
    row: Uint32Array.from(kept, (i) => row[i]!),
    raDeg: pick(raDeg),
    decDeg: pick(decDeg),
    ebvMag: ebv ? pick(ebv) : new Float64Array(0),
  };
}

/** Digest of a table from those of its parts, in any order: the same as of the whole. What is long in it can be shared. */
export function mergeDigests(parts: readonly CatalogueDigest[]): CatalogueDigest {
  const sum = (of: (part: CatalogueDigest) => number) => parts.reduce((total, part) => total + of(part), 0);
  const bands = [...new Set(parts.flatMap(({ counts }) => Object.keys(counts)))];
  const moving = [...new Set(parts.flatMap(({ redshifts }) => Object.keys(redshifts)))];
  const some = <T>(of: (part: CatalogueDigest) => T | undefined): T[] =>
    parts.flatMap((part) => {
      const value = of(part);
      return value === undefined ? [] : [value];
    });
  return {
    rows: sum(({ rows }) => rows),
    galaxies: sum(({ galaxies }) => galaxies),
    counts: Object.fromEntries(
      bands.map((band) => [
        band,
        addHistograms(
          some(({ counts }) => counts[band]),
          COUNT_BIN_MAG,
        ),
      ]),
    ),
    redshifts: Object.fromEntries(
      moving.map((band) => [
        band,
        {
          all: addHistograms(
            some(({ redshifts }) => redshifts[band]?.all),
            REDSHIFT_BIN_MAG,
          ),
          moving: addHistograms(
            some(({ redshifts }) => redshifts[band]?.moving),
            REDSHIFT_BIN_MAG,
          ),
        },
      ]),
    ),
    sampled: inSharedMemory(mergeSamples(parts.map(({ sampled }) => sampled))),
    reddening: inSharedMemory(mergeReddening(parts.map(({ reddening }) => reddening))),
  };
}

/** Every step of a run is handed its input: what is long in it must not be copied each time. */
function inSharedMemory<T extends object>(columns: T): T {
  const share = <A>(value: A): A => {
    if (!(value instanceof Float64Array || value instanceof Uint32Array)) return value;
    const shared = new (value.constructor as Float64ArrayConstructor)(
      sharedMemory(value.byteLength) as SharedArrayBuffer,
    );
    shared.set(value);
    return shared as A;
  };
  return Object.fromEntries(Object.entries(columns).map(([name, value]) => [name, share(value)])) as T;
}

function mergeSamples(parts: readonly CatalogueDigest['sampled'][]): CatalogueDigest['sampled'] {
  const stride = Math.max(1, ...parts.map((part) => part.stride));
  const all = parts.flatMap((part) => Array.from(part.row, (row, i) => ({ row, cell: part.cell[i]! })));
  const kept = all.filter(({ row }) => row % stride === 0).sort((a, b) => a.row - b.row);
  return thinned({
    stride,
    row: Float64Array.from(kept, ({ row }) => row),
    cell: Float64Array.from(kept, ({ cell }) => cell),
  });
}

function mergeReddening(parts: readonly CatalogueDigest['reddening'][]): CatalogueDigest['reddening'] {
  const total = parts.reduce((sum, { row }) => sum + row.length, 0);
  const all = { row: new Uint32Array(total), raDeg: new Float64Array(total), decDeg: new Float64Array(total), ebvMag: new Float64Array(total) }; // prettier-ignore
  let at = 0;
  for (const part of parts) {
    for (const name of ['row', 'raDeg', 'decDeg', 'ebvMag'] as const) all[name].set(part[name], at);
    at += part.row.length;
  }
  return reddeningOf({ rows: total, columns: all });
}
