import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { ErrorPlace } from '../tables/table.ts';
import type { TilePiece } from '../tiles/tile-piece.ts';
import type { Inspection } from './inspect.ts';
import type { Published, SidelinedCells } from './publish.ts';
import type { SettingsFault } from './resolved.ts';

export interface StoredFile {
  path: string;
  fileName: string;
}

/** What the worker thread is started with. */
export interface IntakeTask {
  what: 'inspect' | 'publish';
  path: string;
  fileName: string;
  settings: IntakeSettings;
  /** What the tiles are stored under, where it is to publish. */
  catalogueId?: string;
  /** The ReadMe that describes a journal's data file. */
  readMe?: StoredFile;
  /** Further files of the same catalogue. */
  parts?: StoredFile[];
}

/** Errors cross threads as data; each kind is told differently. */
export type IntakeFailure =
  | ({ kind: 'table'; message: string; mend: string } & ErrorPlace)
  | { kind: 'settings'; faults: SettingsFault[] }
  | { kind: 'unexpected'; message: string; stack?: string };

/** From the worker. `tiles` and `sidelined` are answered by a `taken` each, so that it never runs far ahead of the database. */
export type IntakeMessage =
  | { kind: 'progress'; fraction: number; rows: number }
  | { kind: 'tiles'; piece: TilePiece }
  | { kind: 'sidelined'; rows: SidelinedCells[] }
  | { kind: 'inspected'; inspection: Inspection }
  | { kind: 'published'; published: Published }
  | { kind: 'failed'; failure: IntakeFailure };
