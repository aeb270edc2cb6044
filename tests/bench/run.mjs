// Bundles the benchmarks for Node 20, which loads no TypeScript, and starts them.
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { build } from 'vite';

const here = import.meta.dirname;
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
      input: {
        run: join(here, 'run.ts'),
        intake: join(here, 'intake-run.ts'),
        survey: join(here, 'survey-run.ts'),
      },
      output: { entryFileNames: '[name].mjs', chunkFileNames: '[name]-[hash].mjs' },
    },
  },
  ssr: { noExternal: [/^@eremite\//] },
});
const asked = process.argv.slice(2);
const start = (script, args) =>
  spawnSync(process.execPath, [join(here, 'dist', script), ...args], { stdio: 'inherit' });
const runs = [];
const survey = asked[0] === 'plan' || asked[0] === 'run';
if (asked[0] !== 'intake' && !survey) runs.push(['run.mjs', asked]);
if (survey || asked.length === 0) runs.push(['survey.mjs', asked]);
if (asked[0] === 'intake' || asked.length === 0) runs.push(['intake.mjs', asked.slice(1)]);
if (asked[0] === '--list') console.log('intake\nplan\nrun');
for (const [script, args] of runs) {
  const { status } = start(script, args);
  if (status !== 0) process.exitCode = status ?? 1;
}
