// npm run dev: the whole stack with reload. Vite serves the application and hands API calls to the service, which is
// rebuilt and started anew whenever its sources change.
import { fork } from 'node:child_process';
import { join } from 'node:path';
import { install } from './install.mjs';
import { ROOT } from './paths.mjs';

install();
const { build, createServer } = await import('vite');
const DIST = join(ROOT, 'service', 'dist');
let server;
let turn = Promise.resolve();

function stop() {
  const old = server;
  server = undefined;
  if (!old || old.exitCode !== null) return Promise.resolve();
  return new Promise((resolve) => {
    old.once('exit', resolve);
    old.kill('SIGTERM');
  });
}

function restart() {
  turn = turn.then(async () => {
    await stop();
    server = fork(join(DIST, 'main.js'), [], { cwd: ROOT, env: { ...process.env, NODE_ENV: 'development' } });
  });
}

const watcher = await build({
  root: join(ROOT, 'service'),
  configFile: join(ROOT, 'service', 'vite.config.ts'),
  logLevel: 'warn',
  build: { outDir: DIST, emptyOutDir: false, watch: {} },
});
watcher.on('event', (event) => {
  if (event.code === 'END') restart();
  if (event.code === 'ERROR') console.error(event.error.message);
});

const app = await createServer({ root: join(ROOT, 'app'), configFile: join(ROOT, 'app', 'vite.config.ts') });
await app.listen();
app.printUrls();

let ending = false;
for (const signal of ['SIGINT', 'SIGTERM']) {
  process.on(signal, async () => {
    if (ending) return;
    ending = true;
    await Promise.allSettled([watcher.close(), app.close(), turn.then(stop)]);
    process.exit(0);
  });
}
