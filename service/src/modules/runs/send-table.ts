import { once } from 'node:events';
import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import type { Response } from 'express';
import { writeCsv } from '../../tables/writers/csv.ts';
import type { OutputColumn, OutputRows } from '../../tables/writers/output-column.ts';
import { writeVotable } from '../../tables/writers/votable.ts';

/** A table on its way out, in whatever format is asked for. */
export interface TableAnswer {
  columns: OutputColumn[];
  rows: OutputRows;
  description: string;
}

const FORMATS = {
  csv: { type: 'text/csv; charset=utf-8; header=present', ending: 'csv' },
  votable: { type: 'application/x-votable+xml; charset=utf-8', ending: 'vot' },
} as const;

/** Streams a table as a download; the screening caution goes with it. */
export async function sendTable(
  response: Response,
  format: keyof typeof FORMATS,
  name: string,
  table: TableAnswer,
): Promise<void> {
  const { type, ending } = FORMATS[format];
  response.setHeader('Content-Type', type);
  response.setHeader('Content-Disposition', `attachment; filename="${name}.${ending}"`);
  const description = `${table.description}. ${SCREENING_CAUTION}`;
  const pieces =
    format === 'csv'
      ? writeCsv(table.columns, table.rows, { comments: [description] })
      : writeVotable(table.columns, table.rows, { name: name.replaceAll('-', '_'), description, frame: 'ICRS' });
  for await (const piece of pieces) {
    if (response.destroyed) return;
    if (!response.write(piece)) await Promise.race([once(response, 'drain'), once(response, 'close')]);
  }
  response.end();
}
