import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join, relative } from 'node:path';
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
/** How long the pieces of an older build stay: a running server or an open page may still want to load them. */
const KEEP_MS = 24 * 3600_000;

/**
 * Moves a fresh build in file by file, the entry last: whoever loads a file at this moment gets the old one or the new
 * one, never half, and a page or a server still running on the old build finds the pieces it has yet to ask for.
 */
function moveIn(from, to, entry) {
  mkdirSync(to, { recursive: true });
  const files = (folder) =>
    readdirSync(folder, { recursive: true, withFileTypes: true })
      .filter((found) => found.isFile())
      .map((found) => relative(folder, join(found.parentPath, found.name)));
  const fresh = new Set(files(from));
  for (const name of [...fresh].sort((a, b) => Number(a === entry) - Number(b === entry))) {
    mkdirSync(dirname(join(to, name)), { recursive: true });
    renameSync(join(from, name), join(to, name));
  }
  for (const name of files(to)) {
    const path = join(to, name);
    if (!fresh.has(name) && Date.now() - statSync(path).mtimeMs > KEEP_MS) rmSync(path);
  }
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
    moveIn(draft, join(root, 'dist'), PARTS[part].entry);
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
