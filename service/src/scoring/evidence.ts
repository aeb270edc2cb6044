import type { Candidate, Neighbour } from '@eremite/shared/contracts/verdict';
import { DEGREE } from '@eremite/shared/science/constants';
import { hiMass } from '@eremite/shared/science/hydrogen/hi-mass';
import { positionAngle } from '@eremite/shared/science/sky/position-angle';
import { projectedKpc } from '@eremite/shared/science/surroundings/projected-separation';
import { packColumns, textAt, textColumn, type Column, type TextColumn, unpackColumns } from '../tiles/column-pack.ts';
import type { CandidateRow } from './candidate-row.ts';
import type { Detection } from './detection-table.ts';
import { type PreparedCatalogue, rowName } from './prepared-catalogue.ts';
import type { NeighbourRow } from './surroundings.ts';

/** A table of the run, in the order in which the engine had them. */
export interface EvidenceCatalogue {
  catalogueId: string;
  name: string;
  kind: string;
}

interface Placed {
  catalogue: PreparedCatalogue;
  index: number;
  separationArcsec: number;
}

function numbers<T>(rows: readonly T[], of: (row: T) => number): Float64Array {
  const column = new Float64Array(rows.length);
  for (let i = 0; i < column.length; i++) column[i] = of(rows[i]!);
  return column;
}

function common(rows: readonly Placed[]): Record<string, Column> {
  return {
    catalogue: Uint32Array.from(rows, ({ catalogue }) => catalogue.index),
    row: Uint32Array.from(rows, ({ catalogue, index }) => catalogue.input.roles.columns.row[index]!),
    name: textColumn(rows.map(({ catalogue, index }) => rowName(catalogue, index))),
    raDeg: numbers(rows, ({ catalogue, index }) => catalogue.raDeg[index]!),
    decDeg: numbers(rows, ({ catalogue, index }) => catalogue.decDeg[index]!),
    separationArcsec: numbers(rows, ({ separationArcsec }) => separationArcsec),
    czKms: numbers(rows, ({ catalogue, index }) => catalogue.czKms?.[index] ?? NaN),
  };
}

/** Packs the candidates of one detection, in the order given. */
export function packCandidates(rows: readonly CandidateRow[], { angularMpc }: Detection): Uint8Array {
  return packColumns({
    rows: rows.length,
    columns: {
      ...common(rows),
      positionAngleDeg: numbers(rows, ({ positionAngleRad }) => positionAngleRad / DEGREE),
      separationKpc: numbers(rows, ({ separationArcsec }) => projectedKpc(separationArcsec, angularMpc)),
      differenceKms: numbers(rows, ({ velocityDifferenceKms }) => velocityDifferenceKms),
      band: textColumn(rows.map(({ catalogue, band }) => (band < 0 ? '' : catalogue.bands[band]!.name))),
      magnitude: numbers(rows, ({ magnitude }) => magnitude),
      chance: numbers(rows, ({ chanceProbability }) => chanceProbability),
      likelihoodRatio: numbers(rows, ({ likelihoodRatio }) => likelihoodRatio),
      probability: numbers(rows, ({ probability }) => probability),
      object: Int32Array.from(rows, ({ object }) => object),
      isStar: Uint8Array.from(rows, ({ isStar }) => (isStar ? 1 : 0)),
    },
  });
}

/** Position angles and masses of neighbours are made when they are packed: nobody asks for those of a plan. */
export function packNeighbours(
  rows: readonly NeighbourRow[],
  { angularMpc, luminosityMpc, raDeg, decDeg }: Detection,
): Uint8Array {
  const modulus = 5 * Math.log10(luminosityMpc) + 25;
  return packColumns({
    rows: rows.length,
    columns: {
      ...common(rows),
      positionAngleDeg: numbers(
        rows,
        ({ catalogue, index }) =>
          positionAngle(
            raDeg * DEGREE,
            decDeg * DEGREE,
            catalogue.raDeg[index]! * DEGREE,
            catalogue.decDeg[index]! * DEGREE,
          ) / DEGREE,
      ),
      separationKpc: numbers(rows, ({ separationArcsec }) => projectedKpc(separationArcsec, angularMpc)),
      differenceKms: numbers(rows, ({ velocityDifferenceKms }) => velocityDifferenceKms),
      band: textColumn(rows.map(({ band }) => band ?? '')),
      magnitude: numbers(rows, ({ magnitude }) => magnitude),
      absoluteMagnitude: numbers(rows, ({ magnitudeR }) => magnitudeR - modulus),
      logHiMass: numbers(rows, ({ fluxJyKms }) =>
        fluxJyKms > 0 && luminosityMpc > 0 ? Math.log10(hiMass(fluxJyKms, luminosityMpc)) : NaN,
      ),
      qualifies: Uint8Array.from(rows, (row) =>
        angularMpc <= row.insideBelowMpc && angularMpc >= row.countsAboveMpc ? 1 : 0,
      ),
    },
  });
}

/** One detection's evidence read back; a column it was not written with is a fault of the store and throws. */
class Evidence {
  readonly rows: number;
  private readonly columns: Record<string, Column>;
  constructor(
    packed: Uint8Array,
    private readonly tables: readonly EvidenceCatalogue[],
  ) {
    const { rows, columns } = unpackColumns(packed);
    this.rows = rows;
    this.columns = columns;
  }

  number = (name: string, i: number): number => (this.columns[name] as Float64Array)[i]!;
  orNull = (name: string, i: number): number | null => {
    const value = this.number(name, i);
    return Number.isFinite(value) ? value : null;
  };
  text = (name: string, i: number): string => textAt(this.columns[name] as TextColumn, i);

  common(i: number) {
    const table = this.tables[this.number('catalogue', i)];
    return {
      catalogueId: table?.catalogueId ?? '',
      catalogueName: table?.name ?? '',
      kind: table?.kind ?? '',
      rowId: this.number('row', i),
      name: this.text('name', i),
      raDeg: this.number('raDeg', i),
      decDeg: this.number('decDeg', i),
      separationArcsec: this.number('separationArcsec', i),
      positionAngleDeg: this.number('positionAngleDeg', i),
      velocityKms: this.orNull('czKms', i),
      band: this.text('band', i) || null,
      magnitude: this.orNull('magnitude', i),
    };
  }
}

/** Candidates as stored; overrides are not part of a run and are joined by who reads them. */
export function readCandidates(
  packed: Uint8Array,
  tables: readonly EvidenceCatalogue[],
): Omit<Candidate, 'override'>[] {
  const evidence = new Evidence(packed, tables);
  return Array.from({ length: evidence.rows }, (_, i) => ({
    ...evidence.common(i),
    separationKpc: evidence.orNull('separationKpc', i),
    velocityDifferenceKms: evidence.orNull('differenceKms', i),
    chanceProbability: evidence.orNull('chance', i),
    likelihoodRatio: evidence.orNull('likelihoodRatio', i),
    probability: evidence.number('probability', i),
    object: evidence.number('object', i),
    isStar: evidence.number('isStar', i) === 1,
  }));
}

export function readNeighbours(packed: Uint8Array, tables: readonly EvidenceCatalogue[]): Neighbour[] {
  const evidence = new Evidence(packed, tables);
  return Array.from({ length: evidence.rows }, (_, i) => ({
    ...evidence.common(i),
    separationKpc: evidence.number('separationKpc', i),
    velocityDifferenceKms: evidence.number('differenceKms', i),
    absoluteMagnitude: evidence.orNull('absoluteMagnitude', i),
    logHiMass: evidence.orNull('logHiMass', i),
    qualifies: evidence.number('qualifies', i) === 1,
  }));
}
