import type { Content } from '../bytes/content.ts';
import { ChunkBuilder } from '../columns/chunk-builder.ts';
import { streamChunks } from '../columns/stream-chunks.ts';
import { type OpenTable, type ReaderLimits, type RowChunk, TableError, type TableFacts } from '../table.ts';
import { AsciiTableFiller } from './fits-ascii.ts';
import { BinTableFiller } from './fits-bintable.ts';
import { type FitsColumn, readFitsColumns } from './fits-columns.ts';
import { type FitsHdu, listHdus } from './fits-hdus.ts';
import { settleLongColumns } from './settle-long-columns.ts';

interface FitsTable {
  hdu: FitsHdu;
  facts: TableFacts;
  columns: FitsColumn[];
}

/** Whether a file begins as FITS. */
export function isFits(head: Buffer): boolean {
  return /^(SIMPLE {2}=|XTENSION=)/.test(head.toString('latin1', 0, 9));
}

/** Opens the binary and ASCII tables of a FITS file; its images are passed over. */
export async function openFits(content: Content, limits: ReaderLimits): Promise<OpenTable> {
  const { hdus, notes } = await listHdus(content, limits);
  const tables: FitsTable[] = [];
  let unreadable: TableError | undefined;
  for (const hdu of hdus.filter(isTable)) {
    try {
      tables.push(readTable(hdu, tables.length, notes, limits));
    } catch (error) {
      if (!(error instanceof TableError)) throw error;
      unreadable ??= error;
    }
  }
  if (tables.length === 0) {
    if (unreadable) throw unreadable;
    const message = `The FITS file has ${hdus.length} HDU${hdus.length === 1 ? '' : 's'}, none of them a table.`;
    throw new TableError('not-a-table', message, 'Upload the FITS file that holds the catalogue.', { byte: 0 });
  }
  if (unreadable) for (const { facts } of tables) facts.notes.push(`${unreadable.message} That table is left out.`);
  const rows = (index: number): AsyncIterable<RowChunk> => {
    const table = tables[index]!;
    // Null marks stand for stored values here, so the filler applies them before scaling.
    const columns = table.facts.columns.map(({ nullMark: _, ...column }) => column);
    return streamChunks(new ChunkBuilder(columns, limits, { lenient: true }), fillerFor(content, table, limits));
  };
  for (const { facts, columns, hdu } of tables) {
    const isAscii = hdu.header.text('XTENSION') === 'TABLE';
    const longs = columns.flatMap((column, i) => {
      const isLong = isAscii ? column.code === 'I' && column.repeat > 15 : column.code === 'K' && column.repeat === 1;
      return isLong && facts.columns[i]!.type === 'integer' ? [i] : [];
    });
    await settleLongColumns(facts, longs, () => rows(facts.index));
  }
  return { format: 'fits', tables: tables.map((table) => table.facts), rows };
}

/** Compressed images are stored as binary tables, but hold no catalogue. */
function isTable({ header }: FitsHdu): boolean {
  const kind = header.text('XTENSION');
  return (kind === 'BINTABLE' || kind === 'A3DTABLE' || kind === 'TABLE') && header.values.get('ZIMAGE') !== true;
}

function readTable(hdu: FitsHdu, index: number, fileNotes: string[], limits: ReaderLimits): FitsTable {
  const { header, number } = hdu;
  const rowBytes = header.count('NAXIS1', number);
  if (rowBytes > limits.maxLineLength * 8) {
    const message = `A row of HDU ${number} has ${rowBytes} bytes, more than the limit of ${limits.maxLineLength * 8}.`;
    throw new TableError('line-too-long', message, 'Leave out its largest columns.');
  }
  const notes = [...fileNotes];
  const { columns, facts } = readFitsColumns(hdu, limits, notes);
  const frame = header.text('RADESYS') ?? header.text('RADECSYS');
  return {
    hdu,
    columns,
    facts: {
      index,
      name: header.text('EXTNAME') || `HDU ${number}`,
      columns: facts,
      declaredRows: header.count('NAXIS2', number),
      ...(frame ? { frame } : {}),
      notes,
    },
  };
}

function fillerFor(content: Content, { hdu, columns, facts }: FitsTable, limits: ReaderLimits) {
  if (hdu.header.values.get('ZTABLE') === true) {
    const message = `The table in HDU ${hdu.number} is tile-compressed (ZTABLE).`;
    throw new TableError('unsupported', message, 'Save it uncompressed, or packed with gzip.', { byte: hdu.dataStart });
  }
  if (hdu.header.text('XTENSION') === 'TABLE') return new AsciiTableFiller(content, hdu, columns, limits);
  return new BinTableFiller(content, hdu, columns, facts, limits);
}
