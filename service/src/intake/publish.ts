import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { IntakeCheck, SidelinedRow } from '@eremite/shared/contracts/intake';
import type { ByteSource, RowChunk } from '../tables/table.ts';
import type { PackedColumns } from '../tiles/column-pack.ts';
import { formsName } from '../tiles/original-cells.ts';
import { selectRows } from '../tiles/column-rows.ts';
import type { Tile } from '../tiles/tile.ts';
import { TileCollector } from '../tiles/tile-collector.ts';
import type { CatalogueFacts } from './catalogue-facts.ts';
import { coverageOf } from './coverage.ts';
import { openCatalogue, type ReadOptions } from './open-catalogue.ts';
import type { ResolvedSettings } from './resolved.ts';
import type { PartRows } from './join-parts.ts';
import { cellAt } from './sample.ts';
import { streamCatalogue } from './stream-catalogue.ts';
import { originalCells, originalForms } from './text-cells.ts';

/** A row put aside with its original cells, or with the text of a row that could not be split into cells. */
export interface SidelinedCells extends SidelinedRow {
  cells: string[];
}

export interface PublishSink {
  tiles(tiles: Tile[]): Promise<void>;
  sidelined(rows: SidelinedCells[]): Promise<void>;
}

export interface Published {
  resolved: ResolvedSettings;
  check: IntakeCheck;
  /** What each file gave, where there are several. */
  parts: PartRows[];
  facts: CatalogueFacts;
  assumed: string[];
  coverage: { type: string; order: number | null; moc: string | null; areaSqDeg: number | null; note: string };
}

/**
 * Reads a table whole and hands it over as tiles, with the rows put aside; memory stays bounded whatever the size,
 * but for 16 bytes a row where the area is to be found from the rows.
 *
 * @throws {TableError} or {SettingsError} as reading does
 */
export async function publish(
  source: ByteSource | string,
  settings: IntakeSettings,
  sink: PublishSink,
  options: ReadOptions = {},
): Promise<Published> {
  const catalogue = await openCatalogue(source, settings, options);
  const { resolved } = catalogue.resolution;
  const collector = new TileCollector();
  const positions = new Positions();
  const { check, facts, questions } = await streamCatalogue(catalogue, settings, async (extracted, chunk) => {
    const originals = originalTable(chunk);
    const kept = extracted.kept.length === chunk.rows ? originals : selectRows(originals, extracted.kept);
    if (resolved.footprint.type === 'rows') positions.add(extracted.roles);
    await handOut(collector.add(extracted.roles, kept), sink);
    const aside = extracted.sidelined.map(({ row, index, text }) => ({
      ...row,
      cells: index === null ? [text ?? ''] : chunk.columns.map((data) => cellAt(data, index)),
    }));
    if (aside.length) await sink.sidelined(aside);
  });
  await handOut(collector.finish(), sink);
  const { type, moc, areaSqDeg, note } = coverageOf(resolved, ...positions.all());
  if (settings.footprint === undefined && resolved.kind !== 'hi') {
    questions.push({ level: 'assumed', pointer: '/footprint', text: `The area covered is not stated: ${note}` });
  }
  return {
    resolved,
    check,
    parts: [...catalogue.parts],
    facts,
    assumed: questions.filter(({ level }) => level === 'assumed').map(({ text }) => text),
    coverage: { type, order: moc?.order ?? null, moc: moc?.toAscii() ?? null, areaSqDeg, note },
  };
}

/** Bytes of tiles handed over at a time. */
const BATCH_BYTES = 8 * 1024 ** 2;

async function handOut(tiles: Iterable<Tile>, sink: PublishSink): Promise<void> {
  let batch: Tile[] = [];
  let bytes = 0;
  for (const tile of tiles) {
    batch.push(tile);
    bytes += tile.roles.length + tile.originals.length;
    if (bytes < BATCH_BYTES) continue;
    await sink.tiles(batch);
    [batch, bytes] = [[], 0];
  }
  if (batch.length > 0) await sink.tiles(batch);
}

/** Columns by their number, since names may be anything, and beside them how their numbers were written. */
function originalTable(chunk: RowChunk): PackedColumns {
  const columns: PackedColumns['columns'] = {};
  for (let i = 0; i < chunk.columns.length; i++) {
    columns[`c${i}`] = originalCells(chunk, i);
    const forms = originalForms(chunk, i);
    if (forms) columns[formsName(`c${i}`)] = forms;
  }
  return { rows: chunk.rows, columns };
}

/** Positions of all rows, as two arrays that grow. */
class Positions {
  private ra = new Float64Array(1024);
  private dec = new Float64Array(1024);
  private count = 0;

  add({ rows, columns }: PackedColumns): void {
    if (this.count + rows > this.ra.length) {
      const room = Math.max(this.count + rows, this.ra.length * 2);
      const [ra, dec] = [new Float64Array(room), new Float64Array(room)];
      ra.set(this.ra);
      dec.set(this.dec);
      [this.ra, this.dec] = [ra, dec];
    }
    this.ra.set(columns['raDeg'] as Float64Array, this.count);
    this.dec.set(columns['decDeg'] as Float64Array, this.count);
    this.count += rows;
  }

  all(): [Float64Array, Float64Array] {
    return [this.ra.subarray(0, this.count), this.dec.subarray(0, this.count)];
  }
}
