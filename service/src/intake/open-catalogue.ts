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
import { type Resolution, resolveSettings } from './resolve-settings.ts';
import { type SettingsFault } from './resolved.ts';
import { type ColumnSample, sampleColumns } from './sample.ts';

export interface ReadOptions {
  limits?: Partial<ReaderLimits>;
  /** Share of the file read, 0 to 1, and data rows so far. Called at most once a chunk. */
  onProgress?: (fraction: number, rows: number) => void;
  /** Stops between chunks; the reason of the signal is thrown. */
  signal?: AbortSignal;
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
  { limits = {}, onProgress, signal }: ReadOptions = {},
): Promise<OpenCatalogue> {
  const bytes = counted(typeof source === 'string' ? await fileSource(source) : source);
  const open = await openTable(bytes.source, limits);
  const wanted = settings.table ?? 0;
  const table = open.tables[wanted] ?? open.tables[0]!;
  const faults: SettingsFault[] = [];
  if (table.index !== wanted) {
    const known = open.tables.map(({ index, name }) => `${index} (${name})`).join(', ');
    faults.push({ pointer: '/table', detail: `The file has no table ${wanted}; it has ${known}.` });
  }
  const stated = await withReadMoc(settings, faults);
  const firstChunk = await first(open, table.index);
  const samples = sampleColumns(firstChunk, table.columns.length);
  const resolution = resolveSettings(stated, table, samples);
  resolution.faults.unshift(...faults);
  for (const note of table.notes) resolution.questions.push({ level: 'warning', pointer: '/table', text: note });
  let broken: TableError | undefined;
  async function* chunks(): AsyncIterable<RowChunk> {
    let rows = 0;
    bytes.reset();
    try {
      for await (const chunk of open.rows(table.index)) {
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
  return { open, table, samples, firstChunk, resolution, chunks, broken: () => broken };
}

async function first(open: OpenTable, table: number): Promise<RowChunk | undefined> {
  for await (const chunk of open.rows(table)) return chunk;
  return undefined;
}

/** Counts the bytes a reader takes, so that progress is true for any format, compressed or not. */
function counted(source: ByteSource): { source: ByteSource; reset(): void; fraction(): number } {
  let taken = 0;
  async function* stream(start = 0): AsyncIterable<Uint8Array> {
    taken = Math.max(taken, start);
    for await (const piece of source.stream(start)) {
      taken += piece.length;
      yield piece;
    }
  }
  return {
    source: { ...(source.name === undefined ? {} : { name: source.name }), size: source.size, stream },
    reset: () => (taken = 0),
    fraction: () => (source.size === 0 ? 1 : Math.min(1, taken / source.size)),
  };
}
