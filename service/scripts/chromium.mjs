import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';

const PLACES = ['/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'];

/** The browser the tests drive: EREMITE_CHROMIUM, or where systems put it. */
export function findChromium() {
  const named = process.env.EREMITE_CHROMIUM;
  return [...(named ? [named] : []), ...PLACES].find((path) => existsSync(path));
}

/** Installs Debian's Chromium where it is missing and that is possible; answers its path, or says what to do. */
export function ensureChromium(report = (text) => console.error(text)) {
  const found = findChromium();
  if (found) return found;
  if (process.getuid?.() === 0 && existsSync('/usr/bin/apt-get')) {
    report('Installing Chromium (apt-get) ...');
    const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
    const apt = (...args) => spawnSync('apt-get', args, { stdio: ['ignore', 2, 2], env });
    apt('update', '-q');
    apt('install', '-y', '-q', '--no-install-recommends', 'chromium');
    const installed = findChromium();
    if (installed) return installed;
  }
  throw new Error(
    'The browser tests need Chromium: install it (Debian: apt-get install chromium) or name it in EREMITE_CHROMIUM.',
  );
}
