import { existsSync } from 'node:fs';

/**
 * Where the built script of a worker thread lies: beside the running bundle, or, when running from source in a test,
 * in the build the test set-up made.
 */
export function workerUrl(name: string): URL {
  const beside = new URL(`./${name}.worker.js`, import.meta.url);
  return existsSync(beside) ? beside : new URL(`../../dist/${name}.worker.js`, import.meta.url);
}
