import { Readable } from 'node:stream';
import { StreamableFile } from '@nestjs/common';
import { writeCsv } from '../../tables/writers/csv.ts';
import type { OutputColumn, OutputRows } from '../../tables/writers/output-column.ts';

const ADDED = ['row_in_file', 'line_in_file', 'column_at_fault', 'reason'];

/** Rows put aside as a CSV download: their original cells, then where they stood and why they could not be used. */
export function sidelinedFile({
  catalogue,
  names,
  rows,
}: {
  catalogue: { name: string };
  names: string[];
  rows: OutputRows;
}): StreamableFile {
  const columns = [...names, ...ADDED].map((name): OutputColumn => ({ name, datatype: 'text' }));
  const fileName = catalogue.name.replace(/[^\w.-]+/g, '-').slice(0, 80) || 'table';
  return new StreamableFile(Readable.from(writeCsv(columns, rows)), {
    type: 'text/csv; charset=utf-8; header=present',
    disposition: `attachment; filename="${fileName}-sidelined.csv"`,
  });
}
