// npm start: installs and builds what is missing, then becomes the server. The server runs in this very process, so
// that a signal to it reaches the server and nothing is left behind.
import { install } from './install.mjs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { ROOT } from './paths.mjs';

try {
  install();
  const { ensureBuilt } = await import('./build.mjs');
  await ensureBuilt(['service', 'app']);
} catch (error) {
  console.error(error.message);
  process.exit(1);
}
process.env.NODE_ENV ??= 'production';
if (process.env.npm_lifecycle_event === 'start') {
  // npm killed outright cannot hand its signal on; a server no one can stop any more must not stay behind.
  const parent = process.ppid;
  setInterval(() => process.ppid === parent || process.kill(process.pid, 'SIGTERM'), 1000).unref();
}
await import(pathToFileURL(join(ROOT, 'service', 'dist', 'main.js')).href);
