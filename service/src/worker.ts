import 'reflect-metadata';
import { NestFactory } from '@nestjs/core';
import { AppModule } from './app.module.ts';
import { makeLogger, nestLogger } from './common/request-log.ts';
import { EnvError, readEnv } from './config/env.ts';
import { DataLockError } from './database/data-lock.ts';

const say = (text: string): void => void process.stdout.write(`${text}\n`);

/** A process that does jobs and serves nobody: one of several on a PostgreSQL that web processes share. */
async function main(): Promise<void> {
  const env = readEnv();
  if (!env.databaseUrl) {
    throw new EnvError(
      'A worker needs PostgreSQL (DATABASE_URL): the built-in database belongs to one process. Without PostgreSQL the threads of the server do the work; start the server alone.',
    );
  }
  if (env.jobWorkers === 0) {
    throw new EnvError('EREMITE_JOB_WORKERS is 0: this worker would do nothing. That is a setting for web processes.');
  }
  const app = await NestFactory.createApplicationContext(AppModule.register(env), {
    logger: nestLogger(makeLogger(env.logLevel)),
    abortOnError: false,
  });
  let stopping = false;
  const stop = (signal: string): void => {
    if (stopping) return;
    stopping = true;
    say(`The worker stops (${signal}); what it has in hand is put back`);
    setTimeout(() => process.exit(1), 15_000).unref();
    app.close().then(
      () => process.exit(0),
      () => process.exit(1),
    );
  };
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => stop(signal));
  say(`Eremite's worker is ready: ${env.jobWorkers} jobs at a time, ${env.threads} threads a run`);
}

main().catch((error: unknown) => {
  const expected = error instanceof EnvError || error instanceof DataLockError;
  process.stderr.write(`${expected ? error.message : error instanceof Error ? error.stack : String(error)}\n`);
  process.exit(1);
});
