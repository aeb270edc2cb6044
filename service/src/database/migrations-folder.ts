import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** Folder of the generated migrations, whether this runs from the build or from source. */
export function migrationsFolder(): string {
  for (let folder = dirname(fileURLToPath(import.meta.url)); ; folder = dirname(folder)) {
    const candidate = join(folder, 'schema', 'migrations');
    if (existsSync(join(candidate, 'meta', '_journal.json'))) return candidate;
    if (dirname(folder) === folder) throw new Error('schema/migrations was not found above the service');
  }
}
