import 'reflect-metadata';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createApp } from '@eremite/service/create-app.ts';
import { type Env, readEnv } from '@eremite/service/config/env.ts';
import { DATABASE, type Database } from '@eremite/service/database/database.ts';
import { startApp as start } from '@eremite/service/start-app.ts';
import type { Type } from '@nestjs/common';
import { inject } from 'vitest';
import { Client } from './client.ts';

export interface TestApp {
  readonly url: string;
  readonly env: Env;
  readonly db: Database;
  /** Anything the application injects. */
  get<T>(token: Type<T> | symbol | (abstract new (...args: never[]) => T)): T;
  /** Someone who is not signed in, or who brings a personal token. */
  client(bearer?: string): Client;
  signIn(email: string, password?: string): Promise<Client>;
  close(): Promise<void>;
}

/** Password of every account the builders make. */
export const PASSWORD = 'correct horse battery';

/**
 * The real application from source, with real HTTP on a port of its own and an in-memory database copied from the
 * migrated template. Nothing is replaced.
 */
export async function startApp(overrides: Partial<Env> = {}): Promise<TestApp> {
  const folder = mkdtempSync(join(tmpdir(), 'eremite-test-'));
  const env = readEnv({
    port: 0,
    host: '127.0.0.1',
    dataDir: folder,
    databaseUrl: undefined,
    databaseInMemory: true,
    databaseTemplate: inject('databaseTemplate'),
    demo: false,
    logLevel: process.env['EREMITE_TEST_LOG'] ?? 'silent',
    secret: 'the secret of a test, which is long enough',
    publicUrl: undefined,
    smtpUrl: undefined,
    adminEmail: undefined,
    adminPassword: undefined,
    metricsToken: undefined,
    ...overrides,
  });
  const app = await createApp(env);
  await start(app, env, () => undefined);
  const { port } = app.getHttpServer().address() as { port: number };
  const url = `http://127.0.0.1:${port}`;
  const get = <T>(token: unknown): T => app.get<T>(token as symbol, { strict: false });
  return {
    url,
    env,
    db: get<Database>(DATABASE),
    get,
    client: (bearer) => new Client(url, bearer),
    signIn: async (email, password = PASSWORD) => {
      const client = new Client(url);
      const answer = await client.post('/auth/sign-in', { email, password });
      if (answer.status !== 200) throw new Error(`sign-in of ${email} answered ${answer.status}: ${answer.text}`);
      return client;
    },
    close: async () => {
      await app.close();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}
