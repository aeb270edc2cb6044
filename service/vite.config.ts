import { readdirSync } from 'node:fs';
import { basename, join } from 'node:path';
import { defineConfig } from 'vite';

const root = import.meta.dirname;
const sources = readdirSync(join(root, 'src'), { recursive: true, encoding: 'utf8' });
const entries = sources.filter((path) => /^(main|plan|replay|worker)\.ts$/.test(path) || path.endsWith('.worker.ts'));

/** One flat folder of scripts: entries and worker threads by name, what they share as chunks beside them. */
export default defineConfig({
  root,
  build: {
    ssr: true,
    outDir: 'dist',
    // Scripts of a running server must not vanish under it; the build script clears away old chunks later.
    emptyOutDir: false,
    target: 'node20',
    sourcemap: true,
    minify: false,
    rollupOptions: {
      input: Object.fromEntries(entries.map((path) => [basename(path, '.ts'), join(root, 'src', path)])),
      output: { entryFileNames: '[name].js', chunkFileNames: 'chunk-[name]-[hash].js' },
    },
  },
  ssr: { noExternal: [/^@eremite\//] },
});
