import 'reflect-metadata';
import { fileURLToPath } from 'node:url';
import { serveApp } from './common/app-files.ts';
import { EnvError, readEnv } from './config/env.ts';
import { createApp } from './create-app.ts';
import { DataLockError } from './database/data-lock.ts';
import { startApp } from './start-app.ts';

const say = (text: string): void => void process.stdout.write(`${text}\n`);

async function main(): Promise<void> {
  const env = readEnv();
  const app = await createApp(env);
  const hasApp = serveApp(app, fileURLToPath(new URL('../../app/dist', import.meta.url)));
  let stopping = false;
  const stop = (signal: string): void => {
    if (stopping) return;
    stopping = true;
    say(`Eremite stops (${signal})`);
    // Whatever hangs must not keep the process for ever.
    setTimeout(() => process.exit(1), 15_000).unref();
    app.close().then(
      () => process.exit(0),
      () => process.exit(1),
    );
  };
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => stop(signal));
  const { demo } = await startApp(app, env, (message) => say(`  ${message} ...`));
  const { port } = app.getHttpServer().address() as { port: number };
  say(`\nEremite is ready: ${env.publicUrl ?? `http://localhost:${port}`}`);
  if (!hasApp) say('The application is not built; only the API is served (npm start builds both).');
  if (demo) {
    const password = demo.password
      ? `password ${demo.password} (shown only now, unless you set EREMITE_DEMO_PASSWORD)`
      : 'with the password of the first start';
    say(`\nDemo accounts, ${password}:`);
    for (const { email, role } of demo.accounts) say(`  ${email.padEnd(28)} ${role}`);
  }
}

main().catch((error: unknown) => {
  const expected = error instanceof EnvError || error instanceof DataLockError;
  process.stderr.write(`${expected ? error.message : error instanceof Error ? error.stack : String(error)}\n`);
  process.exit(1);
});
