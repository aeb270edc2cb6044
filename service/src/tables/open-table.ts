import { type ByteSource, type OpenTable, type ReaderLimits, TableError } from './table.ts';

export interface OpenOptions {
  /** The ReadMe that describes a journal's data file, when it comes apart from it. */
  readMe?: ByteSource;
}

/**
 * Recognises the format of a file by its content and reads its head.
 * @throws TableError when it is no table a reader knows, with the place and the mend.
 */
export async function openTable(
  source: ByteSource,
  _limits: Partial<ReaderLimits> = {},
  _options: OpenOptions = {},
): Promise<OpenTable> {
  if (source.size === 0) throw new TableError('empty', 'The file is empty.', 'Upload the file again.', { byte: 0 });
  throw new TableError('not-a-table', 'The file is not a table in a known format.', 'Save it as CSV.', { byte: 0 });
}
