import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { DomainError } from '@eremite/shared/science/domain-error';
import { cellOf } from '@eremite/shared/science/sky/healpix';
import type { SearchPositions } from './search-positions.ts';
import { checkSameLength } from './same-length.ts';
import { checkPosition, checkRadius } from './sky-position.ts';
import { tileCover } from './tile-cover.ts';

/**
 * A unit of a run: detections close together on the sky and every tile that can hold a row within their radii. One unit
 * needs nothing from another, so units can be done in any order, side by side, and done again after a crash.
 */
export interface SkyPartition {
  /** indices of its detections, ascending; every detection is in exactly one partition */
  detections: Uint32Array;
  /** nested HEALPix cells of the tiles to read, ascending; tiles without rows are not listed */
  cells: Uint32Array;
  /** rows in those tiles: the memory and most of the work of the unit */
  rows: number;
}

export interface PartitionOptions {
  /** HEALPix order of the tiles, 0 to 12 */
  order: number;
  /** rows in the tile of a cell, 0 if there is none */
  rowsInCell: (cell: number) => number;
  /** most rows a partition may read; one detection that needs more gets a partition of its own */
  maxRows: number;
  /** most detections in a partition, so that progress and cancelling have a grain; no limit unless given */
  maxDetections?: number;
}

/** A partition as it grows. */
class Growing {
  readonly detections: number[] = [];
  readonly cells = new Set<number>();
  rows = 0;

  rowsWith(cells: readonly number[], rowsInCell: (cell: number) => number): number {
    return cells.reduce((rows, cell) => rows + (this.cells.has(cell) ? 0 : rowsInCell(cell)), this.rows);
  }

  finish(): SkyPartition {
    const ascending = (values: Iterable<number>): Uint32Array => Uint32Array.from(values).sort();
    return { detections: ascending(this.detections), cells: ascending(this.cells), rows: this.rows };
  }
}

/** Indices of the positions by HEALPix cell, then by index: neighbours in this order are mostly neighbours on the sky. */
function byCell(raDeg: SearchPositions['raDeg'], decDeg: SearchPositions['decDeg'], order: number): Uint32Array {
  const keys = Float64Array.from(raDeg, (ra, i) => {
    checkPosition('detection', i, ra, decDeg[i]!);
    return cellOf(order, ra * DEGREE, decDeg[i]! * DEGREE) * raDeg.length + i;
  });
  return Uint32Array.from(keys.sort(), (key) => key % raDeg.length);
}

/**
 * Cuts a run into partitions: detections in the order of their cells are gathered until the tiles they need would
 * exceed `maxRows`. Same input, same partitions.
 *
 * @param detections positions and, for each, the largest radius at which anything is searched
 * @throws {DomainError} if a position, radius or setting makes no sense
 */
export function planPartitions(detections: SearchPositions, options: PartitionOptions): SkyPartition[] {
  const { raDeg, decDeg, radiusArcsec } = detections;
  const { order, rowsInCell, maxRows, maxDetections = Infinity } = options;
  checkSameLength({ raDeg, decDeg, radiusArcsec });
  if (!(maxRows > 0) || !(maxDetections >= 1)) {
    throw new DomainError(`partitions of at most ${maxRows} rows and ${maxDetections} detections cannot be made`);
  }
  const cover = tileCover(order);
  const partitions: SkyPartition[] = [];
  let growing = new Growing();
  for (const d of byCell(raDeg, decDeg, order)) {
    checkRadius('detection', d, radiusArcsec[d]! / 3600);
    const needed = cover(raDeg[d]! * DEGREE, decDeg[d]! * DEGREE, radiusArcsec[d]! * ARCSECOND);
    const cells = needed.filter((cell) => rowsInCell(cell) > 0);
    const full = growing.rowsWith(cells, rowsInCell) > maxRows || growing.detections.length >= maxDetections;
    if (full && growing.detections.length > 0) {
      partitions.push(growing.finish());
      growing = new Growing();
    }
    growing.rows = growing.rowsWith(cells, rowsInCell);
    growing.detections.push(d);
    for (const cell of cells) growing.cells.add(cell);
  }
  if (growing.detections.length > 0) partitions.push(growing.finish());
  return partitions;
}
