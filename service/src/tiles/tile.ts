/** One row of the `tiles` table. */
export interface Tile {
  cell: number;
  part: number;
  count: number;
  roles: Uint8Array;
  originals: Uint8Array;
}
