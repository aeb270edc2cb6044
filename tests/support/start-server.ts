import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Client } from './client.ts';

const MAIN = join(import.meta.dirname, '../../service/dist/main.js');

export interface TestServer {
  readonly url: string;
  readonly dataDir: string;
  readonly process: ChildProcess;
  /** All it has printed so far. */
  output(): string;
  client(bearer?: string): Client;
  signIn(email: string, password: string): Promise<Client>;
  /** Ends the process and waits for it; answers its exit status, or null when the signal killed it. */
  stop(signal?: NodeJS.Signals): Promise<number | null>;
  /** {@link stop}, then removes the data, unless they were given from outside. */
  close(): Promise<void>;
}

/**
 * The built server as a process of its own, on a port of its own, without the demo unless asked for.
 *
 * @param options.dataDir an existing data folder, kept at the end
 * @param options.main its script, where that is not the build's
 */
export async function startServer(
  options: { dataDir?: string; env?: Record<string, string>; timeoutMs?: number; main?: string } = {},
): Promise<TestServer> {
  const dataDir = options.dataDir ?? mkdtempSync(join(tmpdir(), 'eremite-server-'));
  const { DATABASE_URL: _, ...inherited } = process.env;
  const child = spawn(process.execPath, [options.main ?? MAIN], {
    env: {
      ...inherited,
      PORT: '0',
      EREMITE_HOST: '127.0.0.1',
      EREMITE_DATA_DIR: dataDir,
      EREMITE_DEMO: 'off',
      EREMITE_LOG_LEVEL: 'warn',
      NODE_ENV: 'production',
      ...options.env,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let output = '';
  const url = await new Promise<string>((resolve, reject) => {
    const fail = (reason: string) => reject(new Error(`${reason}\n${output}`));
    const timer = setTimeout(() => {
      child.kill('SIGKILL');
      fail('the server did not get ready');
    }, options.timeoutMs ?? 60_000);
    const read = (chunk: Buffer) => {
      output += chunk.toString();
      const ready = /Eremite is ready: (http\S+)/.exec(output)?.[1];
      if (!ready) return;
      clearTimeout(timer);
      resolve(ready.replace('localhost', '127.0.0.1'));
    };
    child.stdout.on('data', read);
    child.stderr.on('data', read);
    child.once('exit', (code) => {
      clearTimeout(timer);
      fail(`the server ended with ${code}`);
    });
  });
  const stop = (signal: NodeJS.Signals = 'SIGTERM') =>
    new Promise<number | null>((resolve) => {
      if (child.exitCode !== null || child.signalCode !== null) return resolve(child.exitCode);
      child.once('exit', (code) => resolve(code));
      child.kill(signal);
    });
  return {
    url,
    dataDir,
    process: child,
    output: () => output,
    client: (bearer) => new Client(url, bearer),
    signIn: async (email, password) => {
      const client = new Client(url);
      const answer = await client.post('/auth/sign-in', { email, password });
      if (answer.status !== 200) throw new Error(`sign-in of ${email} answered ${answer.status}: ${answer.text}`);
      return client;
    },
    stop,
    close: async () => {
      await stop();
      if (!options.dataDir) rmSync(dataDir, { recursive: true, force: true });
    },
  };
}
