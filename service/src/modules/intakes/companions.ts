import type { StoredFile } from '../../intake/intake-messages.ts';
import type { FilesService } from '../files/files.service.ts';
import type { IntakeRow } from './intakes.repository.ts';

/** A file that came with a table: the ReadMe that describes it, or a further part of the same catalogue. */
export interface Companion {
  role: 'readMe' | 'part';
  fileName: string;
  key: string;
  bytes: number;
  /** Hex. */
  sha256: string;
}

export const companionsOf = (row: Pick<IntakeRow, 'companions'>): Companion[] => row.companions as Companion[];

/** Where the files of an upload lie, as the reading thread wants them. */
export function storedFiles(
  files: FilesService,
  { fileKey, fileName, companions }: Pick<IntakeRow, 'fileKey' | 'fileName' | 'companions'>,
): StoredFile & { readMe?: StoredFile; parts: StoredFile[] } {
  const all = companionsOf({ companions });
  const stored = ({ key, fileName: name }: Companion): StoredFile => ({ path: files.path(key), fileName: name });
  const readMe = all.find(({ role }) => role === 'readMe');
  return {
    path: files.path(fileKey),
    fileName,
    ...(readMe ? { readMe: stored(readMe) } : {}),
    parts: all.filter(({ role }) => role === 'part').map(stored),
  };
}
