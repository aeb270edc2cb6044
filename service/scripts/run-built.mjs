import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { install } from './install.mjs';
import { ROOT } from './paths.mjs';

/**
 * Builds the service when stale and runs one of its entries with the arguments of this command. Paths are relative to
 * where the command was called, which npm tells in INIT_CWD.
 */
export async function runBuilt(entry) {
  try {
    install();
    const { ensureBuilt } = await import('./build.mjs');
    await ensureBuilt(['service']);
  } catch (error) {
    console.error(error.message);
    process.exit(1);
  }
  const child = spawn(process.execPath, [join(ROOT, 'service', 'dist', entry), ...process.argv.slice(2)], {
    cwd: process.env.INIT_CWD ?? process.cwd(),
    stdio: 'inherit',
  });
  for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => child.kill(signal));
  child.on('close', (code, signal) => process.exit(signal ? 130 : code));
}
