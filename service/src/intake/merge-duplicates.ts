import type { DuplicatePair } from '@eremite/shared/contracts/duplicate-pair';
import type { SettingsQuestion } from '@eremite/shared/contracts/intake';
import type { ColumnFacts, RowChunk } from '../tables/table.ts';
import type { Column, PackedColumns } from '../tiles/column-pack.ts';
import { concatColumns, selectRows } from '../tiles/column-rows.ts';
import { type ExtractedChunk, RoleExtractor } from './extract-roles.ts';
import { duplicatePairs } from './duplicate-pairs.ts';
import { type Duplicate, findDuplicates } from './find-duplicates.ts';
import { lineOf } from './number-cells.ts';
import type { ResolvedSettings } from './resolved.ts';

const NEEDED = ['row', 'name', 'raDeg', 'decDeg', 'czKms', 'width50Kms', 'signalToNoise', 'positionErrorArcsec'];
const EXAMPLES = 3;
/** Pairs shown to a person; more are counted. */
const MOST_PAIRS = 200;

export interface FoundDuplicates {
  duplicates: Duplicate[];
  /** The first of them with what tells the two rows apart. */
  pairs: DuplicatePair[];
}

/** Gathers what is needed of every row of an HI list and finds the sources that are in it twice. */
export class DuplicateFinder {
  private readonly pieces: PackedColumns[] = [];

  constructor(private readonly resolved: ResolvedSettings) {}

  add({ rows, columns }: PackedColumns): void {
    const own = NEEDED.filter((name) => columns[name]).map((name): [string, Column] => [name, columns[name]!]);
    if (rows > 0) this.pieces.push({ rows, columns: Object.fromEntries(own) });
  }

  find(): FoundDuplicates {
    if (this.pieces.length === 0) return { duplicates: [], pairs: [] };
    const list = concatColumns(this.pieces);
    const duplicates = findDuplicates(list, this.resolved);
    return { duplicates, pairs: duplicatePairs(list, duplicates.slice(0, MOST_PAIRS)) };
  }
}

/** Reads a list once through to find its duplicates. */
export async function duplicatesIn(
  chunks: AsyncIterable<RowChunk>,
  resolved: ResolvedSettings,
  columns: readonly ColumnFacts[],
): Promise<FoundDuplicates> {
  const extractor = new RoleExtractor(resolved, columns);
  const finder = new DuplicateFinder(resolved);
  for await (const chunk of chunks) finder.add(extractor.extract(chunk).roles);
  return finder.find();
}

const TWICE = 'The same source is in another row, which is kept';

/**
 * The chunk with its duplicates put aside.
 *
 * @param duplicates by row number, with the row that is kept
 */
export function withoutDuplicates(
  extracted: ExtractedChunk,
  chunk: RowChunk,
  duplicates: ReadonlyMap<number, Pick<Duplicate, 'of'>>,
  reason = TWICE,
): ExtractedChunk {
  const rows = extracted.roles.columns['row'] as Uint32Array;
  const stays = Uint32Array.from({ length: rows.length }, (_, i) => i).filter((i) => !duplicates.has(rows[i]!));
  if (stays.length === rows.length) return extracted;
  const sidelined = [...extracted.sidelined];
  for (let i = 0; i < rows.length; i++) {
    const duplicate = duplicates.get(rows[i]!);
    if (!duplicate) continue;
    const index = extracted.kept[i]!;
    const value = `row ${duplicate.of}`;
    sidelined.push({ index, row: { row: rows[i]!, line: lineOf(chunk, index), column: null, value, reason } });
  }
  sidelined.sort((a, b) => a.row.row - b.row.row);
  return {
    ...extracted,
    sidelined,
    roles: selectRows(extracted.roles, stays),
    kept: Uint32Array.from(stays, (i) => extracted.kept[i]!),
  };
}

/**
 * One sentence with the count and the first examples; none where there are none.
 *
 * @param keptApart how many of them a person says are sources of their own
 */
export function duplicateQuestions(
  duplicates: readonly Duplicate[],
  merged: boolean,
  keptApart: number,
): SettingsQuestion[] {
  if (duplicates.length === 0) return [];
  const pointer = '/mergeDuplicates';
  const told = duplicates.slice(0, EXAMPLES).map(({ row, of, separationArcsec, differenceKms }) => {
    return `row ${row} and row ${of} (${separationArcsec.toFixed(1)} arcsec and ${differenceKms.toFixed(1)} km/s apart)`;
  });
  const count = duplicates.length === 1 ? 'One row seems' : `${duplicates.length.toLocaleString('en')} rows seem`;
  const first = `${duplicates.length > EXAMPLES ? 'the first are ' : ''}${told.join(', ')}`;
  const text = `${count} to be a source that another row has too: ${first}.`;
  if (merged) {
    const kept = 'The row of the higher signal-to-noise ratio is kept, the other put aside.';
    const some = keptApart === 1 ? 'One of them is' : `${keptApart.toLocaleString('en')} of them are`;
    const apart = keptApart > 0 ? ` ${some} kept apart, as stated.` : '';
    return [{ level: 'assumed', pointer, text: `${text} ${kept}${apart}` }];
  }
  return [{ level: 'warning', pointer, text: `${text} Set mergeDuplicates to keep the better one of each.` }];
}
