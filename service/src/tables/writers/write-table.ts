import { writeCsv } from './csv.ts';
import { writeFits } from './fits.ts';
import { writeJson } from './json.ts';
import { writeMrt } from './mrt.ts';
import type { OutputColumn, OutputRows } from './output-column.ts';
import { type VotableVersion, writeVotable } from './votable.ts';

export const TABLE_FORMATS = ['csv', 'votable', 'fits', 'mrt', 'json'] as const;
export type TableFormat = (typeof TABLE_FORMATS)[number];

/** Media type and file ending of each format. */
export const FORMAT_FACTS: Record<TableFormat, { type: string; ending: string }> = {
  csv: { type: 'text/csv; charset=utf-8; header=present', ending: 'csv' },
  votable: { type: 'application/x-votable+xml; charset=utf-8', ending: 'vot' },
  fits: { type: 'application/fits', ending: 'fits' },
  mrt: { type: 'text/plain; charset=us-ascii', ending: 'txt' },
  json: { type: 'application/json; charset=utf-8', ending: 'json' },
};

export interface WrittenTable {
  /** Name of the file without ending. */
  name: string;
  title: string;
  authors: string;
  /** What it is, with every caution that must go with it. */
  description: string;
  columns: OutputColumn[];
  rows: OutputRows;
}

export interface WriteOptions {
  /** CSV: the units as a second row. */
  unitsRow?: boolean | undefined;
  /** VOTable: 1.5 unless said otherwise. */
  version?: VotableVersion | undefined;
}

/** One table in any format: the same columns, the same numbers. Positions are ICRS throughout the service. */
export function writeTable(
  format: TableFormat,
  { name, title, authors, description, columns, rows }: WrittenTable,
  { unitsRow = false, version }: WriteOptions = {},
): AsyncIterable<Uint8Array> {
  const table = { name: name.replaceAll('-', '_'), description, frame: 'ICRS' };
  switch (format) {
    case 'csv':
      return writeCsv(columns, rows, { comments: [description], unitsRow });
    case 'votable':
      return writeVotable(columns, rows, table, version);
    case 'fits':
      return writeFits(columns, rows, table);
    case 'mrt':
      return writeMrt(columns, rows, { ...table, title, authors });
    case 'json':
      return writeJson(columns, rows, table);
  }
}
