import type { Content } from '../bytes/content.ts';
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

/** Opens CSV, TSV, semicolon-, bar- or blank-separated text (UTF-8). */
export async function openDelimited(content: Content, limits: ReaderLimits): Promise<OpenTable> {
  const layout = await sniffLayout(content, limits);
  if (content.encoding !== undefined) layout.notes.push(`The text is read as ${content.encoding.toUpperCase()}.`);
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
