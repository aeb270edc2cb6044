import type { BulkColumn, CopyPiece } from '../database/bulk.ts';
import { CopyEncoder } from '../database/copy-encoder.ts';
import type { Tile } from './tile.ts';

export const TILE_COLUMNS: readonly BulkColumn[] = [
  { name: 'catalogue_id', type: 'uuid' },
  { name: 'cell', type: 'int4' },
  { name: 'part', type: 'int4' },
  { name: 'count', type: 'int4' },
  { name: 'roles', type: 'bytea' },
  { name: 'originals', type: 'bytea' },
];
/** Bytes of a row in a binary COPY besides its blobs: the count of fields, their lengths, the id and three numbers. */
const ROW_BYTES = 2 + 6 * 4 + 16 + 3 * 4;
/** Signature, flags and end. */
const MESSAGE_BYTES = 19 + 2;

export type TilePiece = CopyPiece;

/** Tiles as the database takes them, in memory of their own that can be given to another thread. */
export function tilePiece(catalogueId: string, tiles: readonly Tile[]): TilePiece {
  const bytes = tiles.reduce((sum, { roles, originals }) => sum + ROW_BYTES + roles.length + originals.length, 0);
  const encoder = new CopyEncoder(TILE_COLUMNS, MESSAGE_BYTES + bytes);
  for (const { cell, part, count, roles, originals } of tiles) {
    encoder.add([catalogueId, cell, part, count, roles, originals]);
  }
  return encoder.piece();
}
