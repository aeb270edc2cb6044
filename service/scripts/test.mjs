// npm test: installs and builds what is missing, then lint, types and every test. The last line of the output is
// `N passed, N failed`, over tests and the checks before them. Arguments go to vitest: npm test -- --project unit.
import { mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { ensureChromium } from './chromium.mjs';
import { install } from './install.mjs';
import { CACHE } from './paths.mjs';

const LONG = process.argv.includes('--long');
const ARGUMENTS = process.argv.slice(2).filter((argument) => argument !== '--long');
const RESULTS = join(CACHE, 'test-results.json');
let passed = 0;
let failed = 0;

/** Counts one piece of work; what it throws is its failure. */
async function counted(work) {
  try {
    await work();
    passed += 1;
  } catch (error) {
    failed += 1;
    console.error(error.message);
  }
}

function readResults() {
  const results = JSON.parse(readFileSync(RESULTS, 'utf8'));
  passed += results.numPassedTests;
  failed += results.numFailedTests;
  // A file that could not even be loaded has no tests to count.
  failed += results.testResults.filter((file) => file.status === 'failed' && file.assertionResults.length === 0).length;
  return results;
}

async function main() {
  install();
  const { run, steps } = await import('./run.mjs');
  const { ensureBuilt } = await import('./build.mjs');
  await counted(() => ensureBuilt(['service', 'app']));
  await counted(() => (process.env.EREMITE_CHROMIUM = ensureChromium()));
  if (!LONG) {
    const check = (step) =>
      counted(async () => {
        if ((await steps([step])).length > 0) throw new Error(`${step} failed`);
      });
    // Types take about as long as the two others together.
    await Promise.all([check('types'), check('format').then(() => check('lint'))]);
  }
  mkdirSync(CACHE, { recursive: true });
  rmSync(RESULTS, { force: true });
  console.log('\n--- tests');
  // A build in this process has set NODE_ENV to production, under which React refuses to be tested.
  const env = { ...process.env, NODE_ENV: 'test', ...(LONG && { EREMITE_LONG: '1' }) };
  const args = ['run', '--reporter=default', '--reporter=json', `--outputFile.json=${RESULTS}`, ...ARGUMENTS];
  const before = failed;
  const status = await run('vitest', args, { env });
  try {
    readResults();
  } catch {
    console.error('vitest wrote no results');
  }
  // An error outside any test (an unhandled rejection, a set-up that broke) fails the run too.
  if (status !== 0 && failed === before) failed += 1;
}

try {
  await main();
} catch (error) {
  failed += 1;
  console.error(error.message);
}
process.exitCode = failed === 0 ? 0 : 1;
console.log(`\n${passed} passed, ${failed} failed`);
