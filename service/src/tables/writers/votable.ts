import { formatCell, type OutputColumn, type OutputRows, type OutputTable } from './output-column.ts';
import { utf8Pieces } from './utf8-pieces.ts';

const INTEGER_NULL = '-9223372036854775808';

export const VOTABLE_VERSIONS = ['1.5', '1.4'] as const;
export type VotableVersion = (typeof VOTABLE_VERSIONS)[number];

/** Writes a VOTable document with one table in TABLEDATA; both versions have the namespace of 1.3. */
export function writeVotable(
  columns: OutputColumn[],
  rows: OutputRows,
  table: OutputTable,
  version: VotableVersion = '1.5',
): AsyncIterable<Uint8Array> {
  return utf8Pieces(votableTexts(columns, rows, table, version));
}

async function* votableTexts(
  columns: OutputColumn[],
  rows: OutputRows,
  table: OutputTable,
  version: VotableVersion,
): AsyncIterable<string> {
  yield '<?xml version="1.0" encoding="UTF-8"?>\n';
  yield `<VOTABLE version="${version}" xmlns="http://www.ivoa.net/xml/VOTable/v1.3">\n<RESOURCE type="results">\n`;
  if (table.frame !== undefined) yield `<COOSYS ID="frame" system="${escapeXml(table.frame)}"/>\n`;
  yield `<TABLE name="${escapeXml(table.name)}">\n`;
  if (table.description !== undefined) yield `<DESCRIPTION>${escapeXml(table.description)}</DESCRIPTION>\n`;
  for (const column of columns) yield fieldTag(column, table.frame !== undefined);
  yield '<DATA>\n<TABLEDATA>\n';
  for await (const row of rows) {
    const cells = columns.map((column, i) => `<TD>${escapeXml(formatCell(row[i] ?? null, column))}</TD>`);
    yield `<TR>${cells.join('')}</TR>\n`;
  }
  yield '</TABLEDATA>\n</DATA>\n</TABLE>\n</RESOURCE>\n</VOTABLE>\n';
}

function fieldTag(column: OutputColumn, hasFrame: boolean): string {
  const datatypes = {
    double: 'datatype="double"',
    integer: 'datatype="long"',
    text: 'datatype="unicodeChar" arraysize="*"',
    boolean: 'datatype="boolean"',
  };
  const attributes = [`name="${escapeXml(column.name)}"`, datatypes[column.datatype]];
  if (column.unit) attributes.push(`unit="${escapeXml(column.unit)}"`);
  if (column.ucd) attributes.push(`ucd="${escapeXml(column.ucd)}"`);
  if (hasFrame && /^pos\.eq\./.test(column.ucd ?? '')) attributes.push('ref="frame"');
  const children = [
    column.description ? `<DESCRIPTION>${escapeXml(column.description)}</DESCRIPTION>` : '',
    column.datatype === 'integer' ? `<VALUES null="${INTEGER_NULL}"/>` : '',
  ].join('');
  return `<FIELD ${attributes.join(' ')}${children === '' ? '/>' : `>${children}</FIELD>`}\n`;
}

/** Escapes what XML reserves; characters that XML 1.0 cannot hold become U+FFFD. */
export function escapeXml(text: string): string {
  // Nearly every cell is plain already, and a table has millions of them.
  if (/^[\x20\x21\x23-\x25\x27-\x3b\x3d\x3f-\x7e]*$/.test(text)) return text;
  return text
    .replace(
      /[\0-\x08\x0b\x0c\x0e-\x1f\ufffe\uffff]|[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/g,
      '\ufffd',
    )
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replaceAll('\r', '&#13;');
}
