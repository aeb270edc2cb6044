import { writeCsv } from '../../tables/writers/csv.ts';
import type { OutputColumn } from '../../tables/writers/output-column.ts';
import { canonicalJson } from './ledger-hash.ts';
import type { LedgerRow } from './ledger.repository.ts';

const COLUMNS: OutputColumn[] = [
  { name: 'number', datatype: 'integer' },
  ...['at', 'actor', 'action', 'subject', 'note', 'detail', 'previous_hash', 'hash'].map((name): OutputColumn => ({
    name,
    datatype: 'text',
  })),
];

/** Lines for reading: one row each, what was done in full as JSON. */
export function ledgerCsv(lines: AsyncIterable<LedgerRow>): AsyncIterable<Uint8Array> {
  async function* rows() {
    for await (const { number, at, actor, action, subject, note, detail, previousHash, hash } of lines)
      yield [number, at.toISOString(), actor, action, subject, note, canonicalJson(detail), previousHash, hash];
  }
  return writeCsv(COLUMNS, rows());
}

/** Lines for checking: one JSON object each, with all that the hash covers, in the order it is covered. */
export async function* ledgerJsonLines(lines: AsyncIterable<LedgerRow>): AsyncIterable<Uint8Array> {
  const text = new TextEncoder();
  for await (const { id: _, ...line } of lines) {
    const { previousHash, surveyId, number, at, actorId, actor, action, subject, note, detail, hash } = line;
    const told = { previousHash, surveyId, number, at, actorId, actor, action, subject, note, detail, hash };
    yield text.encode(`${JSON.stringify(told)}\n`);
  }
}
