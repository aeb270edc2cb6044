import { AppError } from '../../common/app-error.ts';
import { engineCatalogue } from '../../scoring/engine-catalogue.ts';
import type { EngineCatalogue, EngineInput } from '../../scoring/engine-input.ts';
import type { RowSelection } from '../../scoring/row-selection.ts';
import type { SiftedRows } from '../../scoring/sift-rows.ts';
import type { PackedColumns } from '../../tiles/column-pack.ts';
import { type PackedTable, packTable } from './packed-input.ts';
import type { RunSource, RunTable } from './run-inputs.ts';

/** What threads are asked while the tables are read. */
export type ReadingAsked =
  | { unpack: PackedTable }
  | { select: EngineInput }
  | { sift: PackedTable; selection: RowSelection }
  | { join: SiftedRows[] };

export interface ReadingOptions {
  /** Pieces worked on side by side. */
  threads: number;
  /** Most bytes of rows that a run may hold. */
  memoryBytes: number;
  ask(asked: ReadingAsked): Promise<unknown>;
  signal: AbortSignal;
  progress(fraction: number, message: string): void;
}

/**
 * Reads the tables of a run: the detections first, then of every other table, piece by piece, the rows that can matter to
 * them. Memory is that of these rows and of a few pieces, however long the tables are.
 *
 * @throws {AppError} SELECTS_EVERYTHING where the rows that matter are more than the memory allows
 */
export async function readRunTables(source: RunSource, options: ReadingOptions): Promise<EngineInput> {
  const { tables, ...rest } = source;
  const { ask, progress, signal } = options;
  const total = tables.reduce((sum, { rows }) => sum + rows, 1);
  let done = 0;
  const catalogues: EngineCatalogue[] = [];
  const budget = { bytes: 0, rows: 0, limit: options.memoryBytes };
  const order = [...tables.keys()].sort((a, b) => rank(tables[a]!) - rank(tables[b]!) || a - b);
  let selection: RowSelection | undefined;
  for (const index of order) {
    const table = tables[index]!;
    signal.throwIfAborted();
    progress(done / total, `reading ${table.about.settings.name}`);
    if (rank(table) === 0) {
      const blobs: Uint8Array[] = [];
      for await (const piece of table.pieces()) blobs.push(...piece);
      catalogues[index] = (await ask({ unpack: packTable(table.about, blobs) })) as EngineCatalogue;
      spend(budget, catalogues[index].roles);
    } else {
      const detections = catalogues.filter((catalogue) => catalogue?.kind === 'hi');
      selection ??= (await ask({ select: { ...rest, catalogues: detections } })) as RowSelection;
      catalogues[index] = await readSifted(table, selection, options, budget);
    }
    done += table.rows;
  }
  return { ...rest, catalogues };
}

/** Tables that are read whole come first: detections, and the structures they may belong to. */
const rank = ({ about: { settings } }: RunTable): number =>
  settings.kind === 'hi' || settings.kind === 'groups' ? 0 : 1;

async function readSifted(
  { about, pieces }: RunTable,
  selection: RowSelection,
  { ask, threads, signal }: ReadingOptions,
  budget: Budget,
): Promise<EngineCatalogue> {
  const sifted: SiftedRows[] = [];
  const underWay: Promise<SiftedRows>[] = [];
  const settle = async () => {
    const part = await underWay.shift()!;
    spend(budget, part.roles);
    sifted.push(part);
  };
  for await (const piece of pieces()) {
    signal.throwIfAborted();
    const part = ask({ sift: packTable(about, piece), selection }) as Promise<SiftedRows>;
    // Waited for in its turn; until then its failure must not count as unheard.
    part.catch(() => undefined);
    underWay.push(part);
    if (underWay.length > threads) await settle();
  }
  while (underWay.length > 0) await settle();
  if (sifted.length === 0) return (await ask({ unpack: packTable(about, []) })) as EngineCatalogue;
  const { roles, digest } = (await ask({ join: sifted })) as SiftedRows;
  return { ...engineCatalogue(about.identity, about.settings, roles, about.coverage), digest };
}

interface Budget {
  bytes: number;
  rows: number;
  limit: number;
}

function spend(budget: Budget, { rows, columns }: PackedColumns): void {
  budget.rows += rows;
  for (const column of Object.values(columns)) {
    budget.bytes += 'kind' in column ? column.offsets.byteLength + column.bytes.byteLength : column.byteLength;
  }
  if (budget.bytes <= budget.limit) return;
  const mib = (bytes: number) => `${(bytes / 2 ** 20).toLocaleString('en', { maximumFractionDigits: 1 })} MiB`;
  throw new AppError(
    'SELECTS_EVERYTHING',
    `More than ${budget.rows.toLocaleString('en')} rows (${mib(budget.bytes)}) lie where they can matter to the detections; this installation allows a run ${mib(budget.limit)} (EREMITE_RUN_MEMORY). Use narrower search radii or fewer tables.`,
  );
}
