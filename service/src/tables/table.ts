/** Table formats the readers know; recognised by content, never by file name. */
export type TableFormat = 'csv' | 'tsv' | 'semicolon' | 'whitespace' | 'ecsv' | 'votable' | 'fits' | 'mrt' | 'ipac';

export type ColumnType = 'number' | 'integer' | 'text' | 'boolean';

/** What a file says about one column. Array and boolean columns arrive as text ("1 2 3", "true"). */
export interface ColumnFacts {
  /** Unique within the table; a repeated or empty name has been changed and said so in `TableFacts.notes`. */
  name: string;
  /** For text formats guessed from sampled rows: a later cell may still differ, see `ColumnData.odd`. */
  type: ColumnType;
  unit?: string;
  ucd?: string;
  description?: string;
  /** The value declared as null by the file (TNULL, VALUES null, `?=`), as written there; already applied to cells. */
  nullMark?: string;
  /** Shape of array cells as "3", "2x3" or "*" (first index varies fastest). */
  arraySize?: string;
}

export interface TableFacts {
  index: number;
  name: string;
  description?: string;
  columns: ColumnFacts[];
  /** As declared by the file, null if it does not say. */
  declaredRows: number | null;
  /** Frame stated by the file (COOSYS, RADESYS), if any, as written there. */
  frame?: string;
  /** What the reader had to change or assume, one sentence each. */
  notes: string[];
}

/**
 * One column of one chunk. In `number`, missing is NaN and infinities never occur; `odd` keeps, by row index within
 * the chunk, the literal text of cells that are not plain numbers (their value is NaN) or whose digits a double
 * cannot hold (value rounded). `forms` tells how the others were written (see columns/written-form.ts), and `spelled`
 * keeps the text of those that no form gives back; a reader of binary numbers has neither. In `text`, cell i is UTF-8 `bytes[offsets[i] .. offsets[i + 1]]`; empty is missing.
 */
export type ColumnData =
  | {
      kind: 'number';
      values: Float64Array;
      odd?: Map<number, string>;
      forms?: Uint8Array;
      spelled?: Map<number, string>;
    }
  | { kind: 'text'; offsets: Uint32Array; bytes: Uint8Array };

/** A row that could not be split into cells. It takes a row number but no place in the columns. */
export interface BrokenRow {
  /** 1-based data row number. */
  row: number;
  /** 1-based line in the file; 0 for binary formats. */
  line: number;
  reason: string;
  /** The row as it stands in the file, cut after 1,000 characters. */
  text: string;
}

export interface RowChunk {
  /** 1-based data row number of the first row of this chunk, broken rows counted. */
  firstRow: number;
  /** Rows held by the columns (broken rows are not). */
  rows: number;
  columns: ColumnData[];
  /** 1-based data row number of each row; absent when they run on from `firstRow` without a gap. */
  rowNumbers?: Uint32Array;
  /** 1-based line in the file on which each row starts (text formats). */
  lines?: Uint32Array;
  broken?: BrokenRow[];
}

/** Bounds that keep a hostile or damaged file from filling memory; each is named in the error it causes. */
export interface ReaderLimits {
  /** Bytes of the file, and bytes after decompression. */
  maxBytes: number;
  maxColumns: number;
  /** Bytes of one cell. */
  maxCellLength: number;
  /** Bytes of one line, or of one row of a binary table. */
  maxLineLength: number;
  /** Decompressed bytes for each compressed byte. */
  maxExpansion: number;
  /** Bytes of everything that comes before the rows. */
  maxHeadBytes: number;
  /** Rows in one chunk; fewer when the table is wide. */
  chunkRows: number;
}

export const DEFAULT_LIMITS: Readonly<ReaderLimits> = {
  maxBytes: 20 * 1024 ** 3,
  maxColumns: 5_000,
  maxCellLength: 1024 ** 2,
  maxLineLength: 4 * 1024 ** 2,
  maxExpansion: 200,
  maxHeadBytes: 16 * 1024 ** 2,
  chunkRows: 16_384,
};

export type TableErrorCode =
  | 'empty'
  | 'not-a-table'
  | 'unsupported'
  | 'truncated'
  | 'too-large'
  | 'too-many-columns'
  | 'line-too-long'
  | 'cell-too-long'
  | 'expansion'
  | 'nul-byte'
  | 'encoding'
  | 'entities'
  | 'external-stream'
  | 'bad-header'
  | 'bad-data'
  | 'row-count'
  | 'unreadable';

/** Where in the file a reader stopped, all 1-based except `byte`, which counts from 0. */
export interface ErrorPlace {
  line?: number;
  column?: string | number;
  byte?: number;
  /** Data rows delivered before the failure. */
  rowsRead?: number;
}

/** The only error a reader lets out: what is wrong, where, and what the person can do about it. */
export class TableError extends Error {
  override readonly name = 'TableError';
  readonly line?: number;
  readonly column?: string | number;
  readonly byte?: number;
  readonly rowsRead?: number;

  constructor(
    readonly code: TableErrorCode,
    message: string,
    readonly mend: string,
    place: ErrorPlace = {},
  ) {
    super(message);
    if (place.line !== undefined) this.line = place.line;
    if (place.column !== undefined) this.column = place.column;
    if (place.byte !== undefined) this.byte = place.byte;
    if (place.rowsRead !== undefined) this.rowsRead = place.rowsRead;
  }
}

/**
 * An opened file: its tables, and their rows as a stream. `rows` may be called any number of times; each call reads
 * the file anew. When a file breaks off, the rows before the break are yielded first and a TableError is thrown then.
 */
export interface OpenTable {
  format: TableFormat;
  tables: TableFacts[];
  rows(table: number): AsyncIterable<RowChunk>;
}

/** Bytes that can be read from any place, any number of times: see bytes/byte-source.ts for files and memory. */
export interface ByteSource {
  /** File name where known; used only to find the right description in a ReadMe. */
  readonly name?: string;
  /** Bytes in all. */
  readonly size: number;
  /** Yields the bytes from `start` to the end. */
  stream(start?: number): AsyncIterable<Uint8Array>;
}
