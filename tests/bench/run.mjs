// Bundles the benchmark and its worker for Node 20, which loads no TypeScript, and starts it.
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { build } from 'vite';

const here = import.meta.dirname;
const service = join(here, '../../service/src/matching');
await build({
  configFile: false,
  logLevel: 'error',
  root: here,
  build: {
    ssr: true,
    outDir: join(here, 'dist'),
    emptyOutDir: true,
    target: 'node20',
    rollupOptions: {
      input: { run: join(here, 'run.ts'), worker: join(service, 'matching.worker.ts') },
      output: { entryFileNames: '[name].mjs', chunkFileNames: '[name]-[hash].mjs' },
    },
  },
  ssr: { noExternal: [/^@eremite\//] },
});
const { status } = spawnSync(process.execPath, [join(here, 'dist/run.mjs'), ...process.argv.slice(2)], {
  stdio: 'inherit',
});
process.exitCode = status ?? 1;
