import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { fingerprint } from './fingerprint.mjs';
import { CACHE, ROOT } from './paths.mjs';
import { withLock } from './with-lock.mjs';

const isTest = (name) => /\.(test|spec)\.tsx?$/.test(name);
const SHARED = ['package-lock.json', 'tsconfig.base.json', 'shared/src'];
const PARTS = {
  service: {
    sources: [...SHARED, 'schema/src', 'service/src', 'service/vite.config.ts', 'service/tsconfig.json'],
    entry: 'main.js',
  },
  app: {
    sources: [...SHARED, 'app/src', 'app/public', 'app/index.html', 'app/vite.config.ts', 'app/tsconfig.json'],
    entry: 'index.html',
  },
};
/** Scripts of an older build that a running server may still want to load. */
const KEEP_MS = 10 * 60_000;

/** Moves the new scripts in one by one, so that whoever loads one at this moment gets the old or the new, never half. */
function moveIn(from, to) {
  mkdirSync(to, { recursive: true });
  const fresh = new Set(readdirSync(from));
  for (const name of fresh) renameSync(join(from, name), join(to, name));
  for (const name of readdirSync(to)) {
    const path = join(to, name);
    if (!fresh.has(name) && name.startsWith('chunk-') && Date.now() - statSync(path).mtimeMs > KEEP_MS) rmSync(path);
  }
}

function swap(from, to) {
  const old = `${to}.old`;
  rmSync(old, { recursive: true, force: true });
  if (existsSync(to)) renameSync(to, old);
  renameSync(from, to);
  rmSync(old, { recursive: true, force: true });
}

async function build(part) {
  const { build: bundle } = await import('vite');
  const root = join(ROOT, part);
  const draft = join(CACHE, `draft-${part}-${process.pid}`);
  rmSync(draft, { recursive: true, force: true });
  try {
    const options = { outDir: draft, emptyOutDir: true };
    await bundle({
      root,
      configFile: join(root, 'vite.config.ts'),
      logLevel: 'warn',
      mode: 'production',
      build: options,
    });
    if (part === 'service') moveIn(draft, join(root, 'dist'));
    else swap(draft, join(root, 'dist'));
  } finally {
    rmSync(draft, { recursive: true, force: true });
  }
}

/** Builds the parts whose sources are not those of their last build. */
export async function ensureBuilt(parts, report = (text) => console.error(text)) {
  for (const part of parts) {
    const { sources, entry } = PARTS[part];
    await withLock(join(CACHE, `build-${part}.lock`), async () => {
      const stamp = join(CACHE, `built-${part}`);
      const print = fingerprint(ROOT, sources, isTest);
      const done = existsSync(stamp) && readFileSync(stamp, 'utf8') === print;
      if (done && existsSync(join(ROOT, part, 'dist', entry))) return;
      report(`Building the ${part} ...`);
      await build(part);
      writeFileSync(stamp, print);
    });
  }
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const parts = process.argv.slice(2);
  await ensureBuilt(parts.length > 0 ? parts : Object.keys(PARTS));
}
