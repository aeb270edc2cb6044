import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import type { Response } from 'express';
import type { TableAnswer } from '../../edition/columns/table-column.ts';
import { FORMAT_FACTS, type TableFormat, type WriteOptions, writeTable } from '../../tables/writers/write-table.ts';

/** Streams a table as a download; the screening caution goes with it. */
export async function sendTable(
  response: Response,
  format: TableFormat,
  name: string,
  { columns, rows, description }: TableAnswer,
  options: WriteOptions & { authors?: string } = {},
): Promise<void> {
  const { type, ending } = FORMAT_FACTS[format];
  const table = {
    name,
    title: description,
    authors: options.authors ?? 'The survey team',
    description: `${description}. ${SCREENING_CAUTION}`,
    columns,
    rows,
  };
  await sendPieces(response, { type, fileName: `${name}.${ending}` }, writeTable(format, table, options));
}

/** Streams a download at the pace of its reader. */
export async function sendPieces(
  response: Response,
  { type, fileName }: { type: string; fileName: string },
  pieces: AsyncIterable<Uint8Array>,
): Promise<void> {
  response.setHeader('Content-Type', type);
  response.setHeader('Content-Disposition', `attachment; filename="${fileName}"`);
  try {
    await pipeline(Readable.from(pieces, { objectMode: false }), response);
  } catch (error) {
    // Whoever asked went away: nothing is left to be said to them.
    if ((error as NodeJS.ErrnoException).code !== 'ERR_STREAM_PREMATURE_CLOSE') throw error;
  }
}
