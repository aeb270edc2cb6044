import type { Content } from '../bytes/content.ts';
import { asUtf8 } from '../bytes/encoding.ts';
import type { OpenTable, ReaderLimits, TableFormat } from '../table.ts';
import { delimitedRows } from './delimited-rows.ts';
import type { Delimiter } from './record-scanner.ts';
import { sniffLayout } from './text-layout.ts';

const FORMATS: Record<Delimiter, TableFormat> = {
  ',': 'csv',
  ';': 'semicolon',
  '\t': 'tsv',
  '|': 'csv',
  blank: 'whitespace',
};

/** Opens CSV, TSV, semicolon-, bar- or blank-separated text. */
export async function openDelimited(raw: Content, limits: ReaderLimits): Promise<OpenTable> {
  const content = asUtf8(raw);
  const layout = await sniffLayout(content, limits);
  const description = layout.comments.join('\n').slice(0, 4000).trim();
  return {
    format: FORMATS[layout.delimiter],
    tables: [
      {
        index: 0,
        name: tableName(content.name),
        ...(description === '' ? {} : { description }),
        columns: layout.columns,
        declaredRows: null,
        notes: layout.notes,
      },
    ],
    rows: () => delimitedRows(content, layout, limits),
  };
}

/** The file name without its endings, or "table". */
export function tableName(fileName: string | undefined): string {
  return fileName?.replace(/(\.[a-z0-9]{1,5}){1,2}$/i, '') || 'table';
}
