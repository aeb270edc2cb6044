import { randomBytes } from 'node:crypto';
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Env } from './env.ts';

/** Key that signs access tokens: from the environment, or made once and kept in the data folder for its owner only. */
export function signingSecret(env: Pick<Env, 'secret' | 'dataDir'>): string {
  if (env.secret) return env.secret;
  const path = join(env.dataDir, 'secret');
  mkdirSync(env.dataDir, { recursive: true });
  try {
    writeFileSync(path, randomBytes(48).toString('base64url'), { flag: 'wx', mode: 0o600, flush: true });
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error;
  }
  return readFileSync(path, 'utf8').trim();
}
