import { type CatalogueSettings, engineCatalogue } from '../../scoring/engine-catalogue.ts';
import { plainMemory, sharedMemory } from '../../matching/memory.ts';
import type { EngineCatalogue, EngineCoverage, EngineInput } from '../../scoring/engine-input.ts';
import { ColumnPackError } from '../../tiles/column-pack.ts';
import { joinRoles } from '../../tiles/join-roles.ts';

/** A table on its way to a thread: still packed, in memory that both sides see. */
export interface PackedTable {
  identity: { id: string; hash: string };
  settings: CatalogueSettings;
  coverage: { region: EngineCoverage | null; note: string };
  memory: SharedArrayBuffer;
  /** Offset and length of each tile in `memory`. */
  tiles: [offset: number, length: number][];
}

/** An {@link EngineInput} whose tables are still packed. */
export type PackedInput = Omit<EngineInput, 'catalogues'> & { tables: PackedTable[] };

/** A fault of a stored table, in words for whoever started the work. */
export class DamagedTableError extends Error {
  override readonly name = 'DamagedTableError';
}

const align = (bytes: number): number => Math.ceil(bytes / 8) * 8;

/** Lays tiles end to end into shared memory; the blobs may then be let go. */
export function packTable(
  about: Pick<PackedTable, 'identity' | 'settings' | 'coverage'>,
  blobs: readonly Uint8Array[],
): PackedTable {
  const memory = new SharedArrayBuffer(blobs.reduce((sum, blob) => sum + align(blob.length), 0));
  const whole = new Uint8Array(memory);
  const tiles: PackedTable['tiles'] = [];
  let at = 0;
  for (const blob of blobs) {
    whole.set(blob, at);
    tiles.push([at, blob.length]);
    at += align(blob.length);
  }
  return { ...about, memory, tiles };
}

/**
 * Unpacks a table: a second of work for a large one, so it is done in a thread.
 *
 * @param order `file`: by row number, in memory that threads share; `sky`: as the tiles come, for this thread alone
 * @throws {DamagedTableError} when a stored tile is not what was written
 */
export function unpackTable(
  { identity, settings, coverage, memory, tiles }: PackedTable,
  order: 'file' | 'sky' = 'file',
): EngineCatalogue {
  const blobs = tiles.map(([offset, length]) => new Uint8Array(memory, offset, length));
  try {
    return engineCatalogue(
      identity,
      settings,
      joinRoles(blobs, order, order === 'file' ? sharedMemory : plainMemory),
      coverage,
    );
  } catch (error) {
    if (!(error instanceof ColumnPackError)) throw error;
    throw new DamagedTableError(
      `The stored rows of ${settings.name} are damaged (${error.message}). Publish the table again and start another run.`,
    );
  }
}

export function unpackInput({ tables, ...rest }: PackedInput): EngineInput {
  return { ...rest, catalogues: tables.map((table) => unpackTable(table)) };
}
