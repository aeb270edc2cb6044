import { describe, expect, it } from 'vitest';
import { memorySource } from '../tables/bytes/byte-source.ts';
import { rowCells } from '../tiles/original-cells.ts';
import { unpackOriginals } from '../tiles/original-pack.ts';
import { PLACES_CELL } from '../tiles/row-places.ts';
import { unpackTight } from '../tiles/tight-pack.ts';
import type { Tile } from '../tiles/tile.ts';
import { publish, type SidelinedCells } from './publish.ts';

/** Original cells of a published text by row number, and of the rows put aside. */
async function published(text: string, chunkRows = 16_384) {
  const tiles: Tile[] = [];
  const aside: SidelinedCells[] = [];
  const settings = { kind: 'optical' as const, columns: { ra: 'ra', dec: 'dec' }, units: { ra: 'deg', dec: 'deg' } };
  const sink = {
    tiles: async (more: Tile[]) => void tiles.push(...more),
    sidelined: async (rows: SidelinedCells[]) => void aside.push(...rows),
  };
  await publish(memorySource(Buffer.from(text)), settings, sink, { limits: { chunkRows } });
  const rows = new Map<number, string[]>();
  for (const { cell, roles, originals } of tiles) {
    if (cell === PLACES_CELL) continue;
    const unpacked = unpackTight(roles);
    const cells = unpackOriginals(originals, unpacked);
    (unpacked.columns['row'] as Uint32Array).forEach((row, i) => rows.set(row, rowCells(cells, i)));
  }
  return { rows, aside };
}

const HEAD = 'name,ra,dec,mag,flux,flag';
const CELLS = [
  ['a1', '10.50000', '-0.500', '97.00000', '2.150E+01', '1'],
  ['a2', '010.25', '+41.2700', 'NaN', '-7.0e-17', '007'],
  ['a3', '200', '-0.0', '---', '1e5', ''],
  ['a4', '359.9999999', '12.', '20.1', '.5', '1.0'],
  ['a5', '33.1', '80', '20.10', '+5', '2'],
];

describe('publishing', () => {
  it.each([16_384, 2, 1])('keeps every cell as it was written, read %i rows at a time', async (chunkRows) => {
    const lines = CELLS.map((cells) => cells.join(','));
    const { rows, aside } = await published(`${[HEAD, ...lines].join('\n')}\n`, chunkRows);
    expect(aside).toEqual([]);
    expect([...rows.keys()].sort()).toEqual([1, 2, 3, 4, 5]);
    CELLS.forEach((cells, i) => expect(rows.get(i + 1), `row ${i + 1}`).toEqual(cells));
  });

  it('keeps the cells of a row put aside as they were written', async () => {
    const { rows, aside } = await published(`${HEAD}\nb1,400.50,+1.10,20.00,1.0E-02,1\nb2,1.0,2.0,3.0,4.0,5\n`);
    expect(rows.get(2)).toEqual(['b2', '1.0', '2.0', '3.0', '4.0', '5']);
    expect(aside.map(({ cells }) => cells)).toEqual([['b1', '400.50', '+1.10', '20.00', '1.0E-02', '1']]);
  });
});
