import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { openTable } from '../tables/open-table.ts';
import { fileSource } from '../tables/bytes/byte-source.ts';
import {
  type ByteSource,
  type OpenTable,
  type ReaderLimits,
  type RowChunk,
  TableError,
  type TableFacts,
} from '../tables/table.ts';
import { withReadMoc } from './fits-moc.ts';
import { joinParts, type PartRows } from './join-parts.ts';
import { type Resolution, resolveSettings } from './resolve-settings.ts';
import { type SettingsFault } from './resolved.ts';
import { type ColumnSample, sampleColumns } from './sample.ts';

export interface ReadOptions {
  limits?: Partial<ReaderLimits>;
  /** Share of the file read, 0 to 1, and data rows so far. Called at most once a chunk. */
  onProgress?: (fraction: number, rows: number) => void;
  /** Stops between chunks; the reason of the signal is thrown. */
  signal?: AbortSignal;
  /** The ReadMe that describes a journal's data file. */
  readMe?: ByteSource;
  /** Further files of the same catalogue (cones, tiles, strips), with the same columns. */
  parts?: readonly ByteSource[];
}

/** An opened file with its chosen table looked at and the settings settled. */
export interface OpenCatalogue {
  open: OpenTable;
  table: TableFacts;
  samples: ColumnSample[];
  /** First rows, for a preview; undefined for a table without rows. */
  firstChunk: RowChunk | undefined;
  resolution: Resolution;
  /**
   * All rows, from the first. Where the file breaks off after some rows, those are kept and `broken` says so;
   * a file that gives no row at all throws its TableError.
   */
  chunks(): AsyncIterable<RowChunk>;
  /** What each file gave once `chunks` is read, where there are several; empty for a single file. */
  parts: readonly PartRows[];
  /** Whether there are several files. */
  isJoined: boolean;
  /** What the reader met at the end of `chunks`, if the file breaks off. */
  broken(): TableError | undefined;
}

/**
 * Opens a table file and settles its settings, reading only the first rows.
 *
 * @param source a file, by path or as bytes
 * @throws {TableError} for a file that is no readable table
 */
export async function openCatalogue(
  source: ByteSource | string,
  settings: IntakeSettings,
  { limits = {}, onProgress, signal, readMe, parts = [] }: ReadOptions = {},
): Promise<OpenCatalogue> {
  const main = typeof source === 'string' ? await fileSource(source) : source;
  const bytes = counted([main, ...parts]);
  const [first, ...others] = bytes.sources as [ByteSource, ...ByteSource[]];
  const open = await openTable(first, limits, readMe ? { readMe } : {});
  const wanted = settings.table ?? 0;
  const table = open.tables[wanted] ?? open.tables[0]!;
  const faults: SettingsFault[] = [];
  if (table.index !== wanted) {
    const known = open.tables.map(({ index, name }) => `${index} (${name})`).join(', ');
    faults.push({ pointer: '/table', detail: `The file has no table ${wanted}; it has ${known}.` });
  }
  const joined =
    others.length > 0 ? await joinParts(open, table, main.name ?? 'the first file', others, limits) : undefined;
  const stated = await withReadMoc(settings, faults);
  const firstChunk = await firstOf(open, table.index);
  const samples = sampleColumns(firstChunk, table.columns.length);
  const resolution = resolveSettings(stated, table, samples);
  resolution.faults.unshift(...faults);
  for (const note of table.notes) resolution.questions.push({ level: 'warning', pointer: '/table', text: note });
  let broken: TableError | undefined;
  async function* chunks(): AsyncIterable<RowChunk> {
    let rows = 0;
    bytes.reset();
    try {
      for await (const chunk of joined ? joined.rows() : open.rows(table.index)) {
        signal?.throwIfAborted();
        rows += chunk.rows + (chunk.broken?.length ?? 0);
        yield chunk;
        onProgress?.(bytes.fraction(), rows);
      }
    } catch (error) {
      if (!(error instanceof TableError) || rows === 0) throw error;
      broken = error;
    }
  }
  const given = joined?.given ?? [];
  return {
    open,
    table,
    samples,
    firstChunk,
    resolution,
    chunks,
    parts: given,
    isJoined: joined !== undefined,
    broken: () => broken,
  };
}

async function firstOf(open: OpenTable, table: number): Promise<RowChunk | undefined> {
  for await (const chunk of open.rows(table)) return chunk;
  return undefined;
}

/** Counts the bytes readers take, so that progress is true for any format, compressed or not. */
function counted(sources: readonly ByteSource[]) {
  const taken = sources.map(() => 0);
  const size = sources.reduce((sum, source) => sum + source.size, 0);
  const counting = sources.map((source, i): ByteSource => {
    async function* stream(start = 0): AsyncIterable<Uint8Array> {
      taken[i] = Math.max(taken[i]!, start);
      for await (const piece of source.stream(start)) {
        taken[i]! += piece.length;
        yield piece;
      }
    }
    return { ...(source.name === undefined ? {} : { name: source.name }), size: source.size, stream };
  });
  return {
    sources: counting,
    reset: (): void => void taken.fill(0),
    fraction: (): number => (size === 0 ? 1 : Math.min(1, taken.reduce((sum, bytes) => sum + bytes, 0) / size)),
  };
}
