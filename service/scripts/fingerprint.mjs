import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync } from 'node:fs';
import { join, relative } from 'node:path';

const SKIPPED = new Set(['node_modules', 'dist', '.data', '.cache', '.git']);

function* filesUnder(path) {
  if (!existsSync(path)) return;
  if (statSync(path).isFile()) {
    yield path;
    return;
  }
  for (const entry of readdirSync(path, { withFileTypes: true }).sort((a, b) => (a.name < b.name ? -1 : 1))) {
    if (SKIPPED.has(entry.name)) continue;
    yield* filesUnder(join(path, entry.name));
  }
}

/** Hash over names and contents of files and folders, so that a fresh clone and an old checkout compare alike. */
export function fingerprint(root, paths, skip = () => false) {
  const hash = createHash('sha256');
  for (const path of paths) {
    for (const file of filesUnder(join(root, path))) {
      const name = relative(root, file);
      if (!skip(name)) hash.update(name).update('\0').update(readFileSync(file)).update('\0');
    }
  }
  return hash.digest('hex');
}
