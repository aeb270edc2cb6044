import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { Moc } from '@eremite/shared/science/sky/moc';
import { Injectable } from '@nestjs/common';
import type { Detection } from '../../scoring/detection-table.ts';
import { Detections } from '../../scoring/detections.ts';
import { engineCatalogue } from '../../scoring/engine-catalogue.ts';
import type { EngineInput } from '../../scoring/engine-input.ts';
import { neighbourAngleDeg } from '../../scoring/surroundings.ts';
import { cellsOfCone, TILE_ORDER } from '../../tiles/cells.ts';
import { selectRows } from '../../tiles/column-rows.ts';
import { asRoleTable } from '../../tiles/role-table.ts';
import { TileStore } from '../../tiles/tile-store.ts';
import { type PackedTable, packTable } from './packed-input.ts';
import { aboutTable, type CatalogueRow } from './run-inputs.ts';

/** A detection by its place in the survey's tables and on the sky. */
export interface DetectionPlace {
  id: string;
  catalogueId: string;
  row: number;
  raDeg: number;
  decDeg: number;
}

/** Tables up to this long are read whole: that costs little, and then densities are those of a run. */
const WHOLE_ROWS = 200_000;
/** HI lists cost more a row, since each detection is prepared for scoring. */
const WHOLE_DETECTIONS = 2000;
/** Neighbours are looked for at most this far in what is not read whole, degrees. */
const WIDEST_DEG = 10;
/** Beyond the search circle, for the masks of bright stars, arcsec. */
const MASK_ARCSEC = 3600;

/** Reads what a preview needs of the tables: small ones whole, of large ones the tiles near its detections. */
@Injectable()
export class PreviewTables {
  constructor(private readonly tiles: TileStore) {}

  /** @returns the tables in order, and sentences on those of which a part was read */
  async read(
    tables: readonly CatalogueRow[],
    places: readonly DetectionPlace[],
    about: Omit<EngineInput, 'catalogues'>,
  ): Promise<{ tables: PackedTable[]; notes: string[] }> {
    let detections: Detection[] | undefined;
    const packed: PackedTable[] = [];
    const notes: string[] = [];
    for (const table of tables) {
      const known = aboutTable(table);
      if (table.kind === 'groups' || table.rows <= (table.kind === 'hi' ? WHOLE_DETECTIONS : WHOLE_ROWS)) {
        packed.push(packTable(known, await this.tiles.readPackedRoles(table.id)));
        continue;
      }
      detections ??= await this.#detections(tables, places, about);
      const reach = reachOf(table, about.criteria);
      const cells = unite(detections.flatMap((one) => cellsOfCone(one.raDeg, one.decDeg, reach(one))));
      const blobs = await this.tiles.readPackedCells(table.id, cells);
      packed.push(packTable({ ...known, coverage: cut(known.coverage, cells) }, blobs));
      notes.push(
        `Of ${table.name} only the parts of the sky near these detections were read: densities of unrelated objects are those there, and nothing further off is seen.`,
      );
    }
    return { tables: packed, notes };
  }

  /** The detections with their distance and search radius under the criteria. */
  async #detections(
    tables: readonly CatalogueRow[],
    places: readonly DetectionPlace[],
    about: Omit<EngineInput, 'catalogues'>,
  ): Promise<Detection[]> {
    const catalogues: EngineInput['catalogues'] = [];
    for (const { catalogueId, row, raDeg, decDeg } of places) {
      const { identity, settings, coverage } = aboutTable(tables.find(({ id }) => id === catalogueId)!);
      const near = await this.tiles.readRolesNear(catalogueId, raDeg, decDeg, 1);
      const own = asRoleTable(selectRows(near, Uint32Array.of(near.columns.row.indexOf(row))));
      catalogues.push(engineCatalogue(identity, settings, own, coverage));
    }
    return new Detections({ ...about, catalogues }).range(0, catalogues.length);
  }
}

/** How far from a detection rows of a table matter, arcsec. */
function reachOf(table: CatalogueRow, criteria: CriteriaSettings): (detection: Detection) => number {
  return (detection) => {
    const { searchArcsec } = detection;
    if (table.kind === 'stars') return searchArcsec + MASK_ARCSEC;
    if (table.withVelocity === 0) return searchArcsec;
    const angle = neighbourAngleDeg(detection, criteria);
    return Math.max(searchArcsec, 3600 * (angle < WIDEST_DEG ? angle : WIDEST_DEG));
  };
}

/** Ranges [first, last] without overlaps. */
function unite(ranges: readonly [number, number][]): [number, number][] {
  const united: [number, number][] = [];
  for (const [first, last] of [...ranges].sort((a, b) => a[0] - b[0])) {
    const before = united.at(-1);
    if (before && first <= before[1] + 1) before[1] = Math.max(before[1], last);
    else united.push([first, last]);
  }
  return united;
}

/** Coverage within the cells that were read, so that densities are rows over the area they were read from. */
function cut({ region, note }: PackedTable['coverage'], cells: readonly [number, number][]): PackedTable['coverage'] {
  if (!region) return { region, note };
  const flat = cells.flatMap(([first, last]) => [first, last + 1]);
  const { order, ranges } = Moc.fromRanges(region.order, region.ranges).intersection(Moc.fromRanges(TILE_ORDER, flat));
  return { region: { order, ranges }, note };
}
