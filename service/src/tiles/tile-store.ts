import { Inject, Injectable } from '@nestjs/common';
import { BulkStore, type CopyPiece } from '../database/bulk.ts';
import { buildConeIndex } from '../matching/cone-index.ts';
import { coneSearch, nearestRows } from '../matching/cone-search.ts';
import { cellsOfCone } from './cells.ts';
import { textAt } from './column-pack.ts';
import { rowCells } from './original-cells.ts';
import { unpackOriginals } from './original-pack.ts';
import { joinRoles } from './join-roles.ts';
import type { RoleTable } from './role-table.ts';
import { openPack, unpackTight } from './tight-pack.ts';
import { blockOf, PLACES_CELL, placesOf, type RowPlace } from './row-places.ts';
import { TILE_COLUMNS } from './tile-piece.ts';

/** A row as it stands in the catalogue's file, with its place. */
export interface StoredRow {
  row: number;
  raDeg: number;
  decDeg: number;
  separationArcsec: number | null;
  /** Original cells as text, in column order. */
  cells: string[];
}

/** Cones in which the nearest rows are looked for, arcsec; at last the whole catalogue. */
const WIDENING_ARCSEC = [600, 3600, 36_000, Infinity];
/** Bytes of roles asked of the database at a time. */
const READ_BYTES = 48 * 1024 ** 2;

/** The rows of catalogues, kept as packed columns by sky cell; see DEVELOPERS.md on tiles. */
@Injectable()
export class TileStore {
  constructor(@Inject(BulkStore) private readonly bulk: BulkStore) {}

  /**
   * Appends tiles as they come, in pieces of {@link tilePiece}. They are visible at once: the catalogue's state is what
   * hides them.
   */
  write(pieces: AsyncIterable<CopyPiece>): Promise<number> {
    return this.bulk.copyPieces('tiles', TILE_COLUMNS, pieces);
  }

  /**
   * Role columns of a whole catalogue.
   *
   * @param order `file`: ascending row numbers; `sky`: cell by cell as stored, which is faster to read and to index
   */
  async readRoles(catalogueId: string, order: 'file' | 'sky' = 'file'): Promise<RoleTable> {
    return joinRoles(await this.readPackedRoles(catalogueId), order);
  }

  /**
   * The same still packed, one blob a tile, for {@link joinRoles} in another thread: joining a large catalogue takes longer
   * than a request may be kept waiting.
   */
  async readPackedRoles(catalogueId: string): Promise<Uint8Array[]> {
    const blobs: Uint8Array[] = [];
    for await (const piece of this.packedPieces(catalogueId)) blobs.push(...piece);
    return blobs;
  }

  /** The same piece by piece, so that a table larger than the memory can be gone through. */
  async *packedPieces(catalogueId: string): AsyncIterable<Uint8Array[]> {
    for (const group of await this.cellGroups(catalogueId)) yield await this.roleTiles(catalogueId, [group]);
  }

  /** Packed roles of some cells, given as ranges [first, last] that do not overlap. */
  readPackedCells(catalogueId: string, ranges: readonly [number, number][]): Promise<Uint8Array[]> {
    return this.roleTiles(catalogueId, ranges);
  }

  /** Role columns of the rows in cells that a cone touches: a superset of the cone. */
  async readRolesNear(catalogueId: string, raDeg: number, decDeg: number, radiusArcsec: number): Promise<RoleTable> {
    return joinRoles(await this.roleTiles(catalogueId, cellsOfCone(raDeg, decDeg, radiusArcsec)), 'file');
  }

  /** One row by its number in the file; undefined if the catalogue has no such usable row. */
  async readRow(catalogueId: string, row: number): Promise<StoredRow | undefined> {
    const [found] = await this.readRowsFrom(catalogueId, row, 1);
    return found?.row === row ? found : undefined;
  }

  /** Name of a row: '' where the catalogue gives none, undefined where there is no such usable row. */
  async readName(catalogueId: string, row: number): Promise<string | undefined> {
    if (!Number.isInteger(row) || row < 1) return undefined;
    const [place] = await this.placesFrom(catalogueId, row, 1);
    if (place?.row !== row) return undefined;
    const select = 'select roles from tiles where catalogue_id = $1 and cell = $2 and part = $3';
    for await (const batch of this.bulk.read(select, [catalogueId, place.cell, place.part], ['bytea'])) {
      for (const [blob] of batch) {
        const names = openPack(blob as Uint8Array).column('name');
        return names && 'kind' in names ? textAt(names, place.at) : '';
      }
    }
    return undefined;
  }

  /** Rows in file order from a row number on. */
  async readRowsFrom(catalogueId: string, firstRow: number, limit: number): Promise<StoredRow[]> {
    return this.fetch(catalogueId, await this.placesFrom(catalogueId, firstRow, limit));
  }

  /** Rows within a radius of a place, nearest first. */
  async readCone(catalogueId: string, raDeg: number, decDeg: number, radiusArcsec: number): Promise<StoredRow[]> {
    const found: StoredRow[] = [];
    for (const [first, last] of cellsOfCone(raDeg, decDeg, radiusArcsec)) {
      const select =
        'select cell, part, roles, originals from tiles where catalogue_id = $1 and cell between $2 and $3 order by cell, part';
      for await (const batch of this.bulk.read(
        select,
        [catalogueId, first, last],
        ['int4', 'int4', 'bytea', 'bytea'],
      )) {
        for (const [, , roles, originals] of batch)
          found.push(...within(roles as Uint8Array, originals as Uint8Array, raDeg, decDeg, radiusArcsec));
      }
    }
    return found.sort((a, b) => a.separationArcsec! - b.separationArcsec! || a.row - b.row);
  }

  /**
   * The k rows nearest to a place however far, nearest first: in cones that widen until they hold them.
   *
   * @param k at least 1
   */
  async readNearest(catalogueId: string, raDeg: number, decDeg: number, k: number): Promise<StoredRow[]> {
    for (const radiusArcsec of WIDENING_ARCSEC) {
      const whole = radiusArcsec === Infinity;
      const { columns, rows } = whole
        ? await this.readRoles(catalogueId)
        : await this.readRolesNear(catalogueId, raDeg, decDeg, radiusArcsec);
      if (rows < k && !whole) continue;
      const near = nearestRows(buildConeIndex(columns.raDeg, columns.decDeg), raDeg, decDeg, k);
      // Beyond the cone there may be nearer rows in cells that it did not touch.
      if (!whole && near.separationArcsec.at(-1)! > radiusArcsec) continue;
      const found: StoredRow[] = [];
      for (let i = 0; i < near.row.length; i++) {
        const stored = await this.readRow(catalogueId, columns.row[near.row[i]!]!);
        if (stored) found.push({ ...stored, separationArcsec: near.separationArcsec[i]! });
      }
      return found;
    }
    return [];
  }

  /** Ranges of cells whose roles together are about `READ_BYTES`. */
  private async cellGroups(catalogueId: string): Promise<[number, number][]> {
    const select =
      'select cell, sum(octet_length(roles))::int8 from tiles where catalogue_id = $1 and cell >= 0 group by cell order by cell';
    const groups: [number, number][] = [];
    let bytes = Infinity;
    for await (const batch of this.bulk.read(select, [catalogueId], ['int4', 'int8'])) {
      for (const [cell, size] of batch as [number, number][]) {
        if (bytes + size > READ_BYTES) {
          groups.push([cell, cell]);
          bytes = 0;
        }
        groups.at(-1)![1] = cell;
        bytes += size;
      }
    }
    return groups;
  }

  private async roleTiles(catalogueId: string, ranges: readonly [number, number][]): Promise<Uint8Array[]> {
    const select = 'select roles from tiles where catalogue_id = $1 and cell between $2 and $3 order by cell, part';
    const blobs: Uint8Array[] = [];
    for (const [first, last] of ranges) {
      for await (const batch of this.bulk.read(select, [catalogueId, first, last], ['bytea'])) {
        for (const [blob] of batch) blobs.push(blob as Uint8Array);
      }
    }
    return blobs;
  }

  private async placesFrom(catalogueId: string, firstRow: number, limit: number): Promise<RowPlace[]> {
    const places: RowPlace[] = [];
    for await (const block of this.placeBlocks(catalogueId, blockOf(Math.max(1, firstRow)))) {
      for (const place of block) if (place.row >= firstRow && places.length < limit) places.push(place);
      if (places.length >= limit) break;
    }
    return places;
  }

  private async *placeBlocks(catalogueId: string, from: number): AsyncIterable<RowPlace[]> {
    const select =
      'select part, roles from tiles where catalogue_id = $1 and cell = $2 and part >= $3 order by part limit 1';
    for (let next = from; ;) {
      let seen = -1;
      for await (const batch of this.bulk.read(select, [catalogueId, PLACES_CELL, next], ['int4', 'bytea'])) {
        for (const [part, blob] of batch) {
          seen = part as number;
          yield placesOf(blob as Uint8Array);
        }
      }
      if (seen < 0) return;
      next = seen + 1;
    }
  }

  private async fetch(catalogueId: string, places: readonly RowPlace[]): Promise<StoredRow[]> {
    const rows = new Map<number, StoredRow>();
    const byTile = new Map<string, RowPlace[]>();
    for (const place of places) {
      const key = `${place.cell}:${place.part}`;
      byTile.set(key, [...(byTile.get(key) ?? []), place]);
    }
    const select = 'select roles, originals from tiles where catalogue_id = $1 and cell = $2 and part = $3';
    for (const wanted of byTile.values()) {
      const { cell, part } = wanted[0]!;
      for await (const batch of this.bulk.read(select, [catalogueId, cell, part], ['bytea', 'bytea'])) {
        for (const [roleBlob, originalBlob] of batch as [Uint8Array, Uint8Array][]) {
          const roles = unpackTight(roleBlob);
          const { columns } = roles;
          const originals = unpackOriginals(originalBlob, roles);
          for (const { row, at } of wanted) {
            const [raDeg, decDeg] = [(columns['raDeg'] as Float64Array)[at]!, (columns['decDeg'] as Float64Array)[at]!];
            rows.set(row, { row, raDeg, decDeg, separationArcsec: null, cells: rowCells(originals, at) });
          }
        }
      }
    }
    return places.flatMap(({ row }) => rows.get(row) ?? []);
  }
}

function within(
  roleBlob: Uint8Array,
  originalBlob: Uint8Array,
  raDeg: number,
  decDeg: number,
  radiusArcsec: number,
): StoredRow[] {
  const roles = unpackTight(roleBlob);
  const { columns } = roles;
  const [ra, dec, row] = [
    columns['raDeg'] as Float64Array,
    columns['decDeg'] as Float64Array,
    columns['row'] as Uint32Array,
  ];
  const found: StoredRow[] = [];
  const near = coneSearch(buildConeIndex(ra, dec), raDeg, decDeg, radiusArcsec);
  if (near.row.length === 0) return found;
  const originals = unpackOriginals(originalBlob, roles);
  near.row.forEach((i, n) =>
    found.push({
      row: row[i]!,
      raDeg: ra[i]!,
      decDeg: dec[i]!,
      separationArcsec: near.separationArcsec[n]!,
      cells: rowCells(originals, i),
    }),
  );
  return found;
}
