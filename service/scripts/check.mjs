// npm run check: what is quick enough to run before every commit.
import { install } from './install.mjs';

install();
const { run, steps } = await import('./run.mjs');
const failed = await steps(['format', 'lint', 'types']);
if ((await run('vitest', ['run', '--project', 'unit', '--project', 'app', '--project', 'architecture'])) !== 0)
  failed.push('tests');
if (failed.length > 0) {
  console.error(`\nfailed: ${failed.join(', ')}`);
  process.exitCode = 1;
}
