import type { Content } from '../bytes/content.ts';
import { ChunkBuilder } from '../columns/chunk-builder.ts';
import { type RowFiller, streamChunks } from '../columns/stream-chunks.ts';
import { type OpenTable, type ReaderLimits, type RowChunk, TableError } from '../table.ts';
import { settleLongColumns } from './settle-long-columns.ts';
import { BinaryFiller } from './votable-binary.ts';
import { readVotableHead, type VotableTable } from './votable-head.ts';
import { outlineVotable, type VotableData } from './votable-outline.ts';
import { TableDataFiller } from './votable-tabledata.ts';

/** Whether the head of a file (UTF-8) is that of a VOTable. */
export function isVotable(head: Buffer): boolean {
  const start = head.toString('latin1', 0, 4096);
  return /^\s*</.test(start) && /<([\w.-]+:)?VOTABLE[\s>/]/.test(start);
}

/** Opens a VOTable (UTF-8) of any version with TABLEDATA, BINARY or BINARY2. */
export async function openVotable(content: Content, limits: ReaderLimits): Promise<OpenTable> {
  const outline = await outlineVotable(content, limits);
  const tables = readVotableHead(outline.skeleton, limits);
  const rows = (index: number): AsyncIterable<RowChunk> => {
    const table = tables[index]!;
    const builder = new ChunkBuilder(table.facts.columns, limits, { lenient: true });
    return streamChunks(builder, fillerFor(content, outline.data[index]!, table, limits));
  };
  for (const table of tables) {
    const longs = table.fields.flatMap((field, i) => (field.datatype === 'long' && !field.isArray ? [i] : []));
    await settleLongColumns(table.facts, longs, () => rows(table.facts.index));
  }
  return { format: 'votable', tables: tables.map((table) => table.facts), rows };
}

function fillerFor(content: Content, data: VotableData, table: VotableTable, limits: ReaderLimits): RowFiller {
  switch (data.serialisation) {
    case 'TABLEDATA':
      return new TableDataFiller(content, data.start, table, limits);
    case 'BINARY':
    case 'BINARY2':
      return new BinaryFiller(content, data, table, limits);
    case 'FITS':
      throw new TableError(
        'unsupported',
        'The rows are kept as a FITS file inside the VOTable.',
        'Save them as a FITS file of their own.',
        { byte: data.start },
      );
    case 'NONE':
      return { fill: () => Promise.resolve(false), close: () => Promise.resolve() };
  }
}
