// npm run worker: builds what is stale, then becomes a worker: a process that does the jobs of the web processes on the
// same PostgreSQL. In this very process, so that a signal to it reaches the worker and nothing is left behind.
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { install } from './install.mjs';
import { ROOT } from './paths.mjs';

try {
  install();
  const { ensureBuilt } = await import('./build.mjs');
  await ensureBuilt(['service']);
} catch (error) {
  console.error(error.message);
  process.exit(1);
}
process.env.NODE_ENV ??= 'production';
await import(pathToFileURL(join(ROOT, 'service', 'dist', 'worker.js')).href);
