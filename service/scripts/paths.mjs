import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The folder of the whole project. */
export const ROOT = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');
/** What the scripts remember between runs; safe to delete. */
export const CACHE = join(ROOT, 'node_modules', '.cache', 'eremite');
