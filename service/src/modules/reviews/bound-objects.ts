import { Injectable } from '@nestjs/common';
import { TileStore } from '../../tiles/tile-store.ts';
import { nameRole } from '../../tiles/role-table.ts';
import { textAt } from '../../tiles/column-pack.ts';
import { separationArcsec } from '../../matching/separation-arcsec.ts';
import { bindSource, type Bound, type NumberedSource } from './bind-source.ts';

/** How far an object may move between two versions of a catalogue, arcsec: a new astrometric solution moves less. */
const TOLERANCE_ARCSEC = 1.5;
/** How far around it rows are offered to choose from. */
const OFFERED_ARCSEC = 15;

interface Overridden {
  readonly catalogueId: string;
  readonly row: number;
  readonly objectName: string;
  readonly raDeg: number | null;
  readonly decDeg: number | null;
}

/** Finds catalogue rows of one version of a table in the next. */
@Injectable()
export class BoundObjects {
  constructor(private readonly tiles: TileStore) {}

  async find({ catalogueId, row, objectName, raDeg, decDeg }: Overridden, newId: string): Promise<Bound> {
    const place = raDeg !== null && decDeg !== null ? { raDeg, decDeg } : await this.tiles.readRow(catalogueId, row);
    if (!place) return { row: null, candidates: [] };
    const isNumber = objectName === String(row);
    // A name that is only the row's number says nothing of the object.
    const source = { name: isNumber ? '' : objectName, raDeg: place.raDeg, decDeg: place.decDeg, velocityKms: null };
    const before = await this.#around(catalogueId, place);
    const others = new Set(before.filter((entry) => entry.row !== row).map((entry) => entry.name));
    const isOthers = (name: string) => name !== '' && others.has(name);
    return bindSource(source, await this.#around(newId, place), TOLERANCE_ARCSEC, isOthers);
  }

  async #around(catalogueId: string, { raDeg, decDeg }: { raDeg: number; decDeg: number }): Promise<NumberedSource[]> {
    const { columns, rows, ...table } = await this.tiles.readRolesNear(catalogueId, raDeg, decDeg, OFFERED_ARCSEC);
    const names = nameRole({ columns, rows, ...table });
    const found: NumberedSource[] = [];
    for (let i = 0; i < rows; i++) {
      const at = { raDeg: columns.raDeg[i]!, decDeg: columns.decDeg[i]! };
      if (separationArcsec(raDeg, decDeg, at.raDeg, at.decDeg) > OFFERED_ARCSEC) continue;
      found.push({ row: columns.row[i]!, name: names ? textAt(names, i).trim() : '', ...at, velocityKms: null });
    }
    return found;
  }
}
