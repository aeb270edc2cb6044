import { once } from 'node:events';
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
  for await (const piece of pieces) {
    if (response.destroyed) return;
    if (!response.write(piece)) await Promise.race([once(response, 'drain'), once(response, 'close')]);
  }
  response.end();
}
