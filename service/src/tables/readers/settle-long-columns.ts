import type { RowChunk, TableFacts } from '../table.ts';

/** Identifiers are recognised by what they are called, even when the first ones happen to be small. */
const IDENTIFIER = /(^|_)(id|objid|source_id|specobjid|designation)$|objid|source_?id/i;

/**
 * Decides which of the 64-bit columns must be text because a double cannot hold their values: identifiers by UCD or
 * name, and those with a large value among the first rows. Later large values are kept in `odd`.
 */
export async function settleLongColumns(
  facts: TableFacts,
  longColumns: number[],
  rows: () => AsyncIterable<RowChunk>,
): Promise<void> {
  const undecided = longColumns.filter((index) => {
    const column = facts.columns[index]!;
    const isIdentifier = /meta\.id|^ID_/i.test(column.ucd ?? '') || IDENTIFIER.test(column.name);
    if (isIdentifier) column.type = 'text';
    return !isIdentifier;
  });
  if (undecided.length === 0) return;
  try {
    for await (const chunk of rows()) {
      for (const index of undecided) {
        const data = chunk.columns[index]!;
        if (data.kind === 'number' && data.odd !== undefined) facts.columns[index]!.type = 'text';
      }
      return;
    }
  } catch {
    // Whatever is wrong with the rows is told to whoever reads them.
  }
}
