import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { CACHE, ROOT } from './paths.mjs';
import { fingerprint } from './fingerprint.mjs';

/**
 * Dependencies of another lock file than npm last wrote down. `npm run` arguments, scripts and the like change the
 * manifests without changing what is installed, so only the lock file is compared.
 */
function isInstalled() {
  const inner = join(ROOT, 'node_modules', '.package-lock.json');
  if (!existsSync(inner)) return false;
  const stamp = join(CACHE, 'installed');
  const wanted = fingerprint(ROOT, ['package-lock.json']);
  if (existsSync(stamp)) return readFileSync(stamp, 'utf8') === wanted;
  // Installed by hand: trust it when every package of the lock file is there in the locked version.
  const installed = JSON.parse(readFileSync(inner, 'utf8')).packages;
  const locked = JSON.parse(readFileSync(join(ROOT, 'package-lock.json'), 'utf8')).packages;
  const complete = Object.entries(locked).every(
    ([path, entry]) =>
      !path.startsWith('node_modules/') ||
      entry.optional ||
      entry.peer ||
      entry.link ||
      installed[path]?.version === entry.version,
  );
  if (complete) remember(wanted);
  return complete;
}

function remember(print) {
  const stamp = join(CACHE, 'installed');
  mkdirSync(dirname(stamp), { recursive: true });
  writeFileSync(stamp, print);
}

/** Installs the dependencies where they are missing or of another lock file. */
export function install(report = (text) => console.error(text)) {
  if (isInstalled()) return;
  report('Installing dependencies (npm ci) ...');
  const npm = process.env.npm_execpath;
  const [command, args] = npm ? [process.execPath, [npm]] : [process.platform === 'win32' ? 'npm.cmd' : 'npm', []];
  const env = { ...process.env, NODE_ENV: 'development' };
  const { status } = spawnSync(command, [...args, 'ci', '--no-audit', '--no-fund'], {
    cwd: ROOT,
    stdio: ['ignore', 2, 2],
    env,
  });
  if (status !== 0) throw new Error('npm ci failed; see above');
  remember(fingerprint(ROOT, ['package-lock.json']));
}
