import type { Candidate, Neighbour } from '@eremite/shared/contracts/verdict';
import { packColumns, unpackColumns, type PackedColumns } from '../tiles/column-pack.ts';
import { textAt, type TextColumn } from '../tiles/column-pack.ts';

/** The tables of a run in the order that `catalogue` indexes. */
export interface EvidenceCatalogue {
  catalogueId: string;
  name: string;
  kind: string;
}

/**
 * Candidates of one detection as packed columns, in order of separation. Float64 unless said; NaN is "none".
 * `catalogue` (Uint32, index into the run's tables), `row` (Uint32), `name` (text), `raDeg`, `decDeg`,
 * `separationArcsec`, `positionAngleDeg`, `separationKpc`, `velocityKms`, `velocityDifferenceKms`, `band` (text),
 * `magnitude`, `chanceProbability`, `likelihoodRatio`, `probability`, `object` (Uint32), `isStar` (Uint8).
 */
export type CandidateColumns = PackedColumns;

/**
 * Neighbours of one detection as packed columns, in order of projected separation. As for candidates:
 * `catalogue`, `row`, `name`, `raDeg`, `decDeg`, `separationArcsec`, `positionAngleDeg`, `separationKpc`, `velocityKms`,
 * `velocityDifferenceKms`, `band`, `magnitude`, `absoluteMagnitude`, `logHiMass`, `qualifies` (Uint8).
 */
export type NeighbourColumns = PackedColumns;

export const packEvidence = packColumns;

/** Reads a column at a row: NaN and empty text become null. */
function cellReader({ columns }: PackedColumns) {
  return {
    number: (name: string, i: number): number => (columns[name] as Float64Array)[i]!,
    optional: (name: string, i: number): number | null => {
      const value = (columns[name] as Float64Array | undefined)?.[i] ?? NaN;
      return Number.isFinite(value) ? value : null;
    },
    text: (name: string, i: number): string => textAt(columns[name] as TextColumn, i),
  };
}

export function readCandidates(
  packed: Uint8Array | PackedColumns,
  catalogues: readonly EvidenceCatalogue[],
): Omit<Candidate, 'override'>[] {
  const table = packed instanceof Uint8Array ? unpackColumns(packed) : packed;
  const cell = cellReader(table);
  return Array.from({ length: table.rows }, (_, i) => {
    const catalogue = catalogues[cell.number('catalogue', i)]!;
    return {
      catalogueId: catalogue.catalogueId,
      catalogueName: catalogue.name,
      kind: catalogue.kind,
      rowId: cell.number('row', i),
      name: cell.text('name', i),
      raDeg: cell.number('raDeg', i),
      decDeg: cell.number('decDeg', i),
      separationArcsec: cell.number('separationArcsec', i),
      positionAngleDeg: cell.number('positionAngleDeg', i),
      separationKpc: cell.optional('separationKpc', i),
      velocityKms: cell.optional('velocityKms', i),
      velocityDifferenceKms: cell.optional('velocityDifferenceKms', i),
      band: cell.text('band', i) || null,
      magnitude: cell.optional('magnitude', i),
      chanceProbability: cell.optional('chanceProbability', i),
      likelihoodRatio: cell.optional('likelihoodRatio', i),
      probability: cell.number('probability', i),
      object: cell.number('object', i),
      isStar: cell.number('isStar', i) === 1,
    };
  });
}

export function readNeighbours(
  packed: Uint8Array | PackedColumns,
  catalogues: readonly EvidenceCatalogue[],
): Neighbour[] {
  const table = packed instanceof Uint8Array ? unpackColumns(packed) : packed;
  const cell = cellReader(table);
  return Array.from({ length: table.rows }, (_, i) => {
    const catalogue = catalogues[cell.number('catalogue', i)]!;
    return {
      catalogueId: catalogue.catalogueId,
      catalogueName: catalogue.name,
      kind: catalogue.kind,
      rowId: cell.number('row', i),
      name: cell.text('name', i),
      raDeg: cell.number('raDeg', i),
      decDeg: cell.number('decDeg', i),
      separationArcsec: cell.number('separationArcsec', i),
      positionAngleDeg: cell.number('positionAngleDeg', i),
      separationKpc: cell.number('separationKpc', i),
      velocityKms: cell.optional('velocityKms', i),
      velocityDifferenceKms: cell.number('velocityDifferenceKms', i),
      band: cell.text('band', i) || null,
      magnitude: cell.optional('magnitude', i),
      absoluteMagnitude: cell.optional('absoluteMagnitude', i),
      logHiMass: cell.optional('logHiMass', i),
      qualifies: cell.number('qualifies', i) === 1,
    };
  });
}
