import { randomBytes } from 'node:crypto';
import type { NestExpressApplication } from '@nestjs/platform-express';
import { DEMO_ACCOUNTS, DemoHook } from './common/demo-filler.ts';
import { Readiness } from './common/readiness.ts';
import type { Env } from './config/env.ts';
import { markDemoBegun, markDemoDone } from './database/unfinished-demo.ts';
import { FirstAccounts } from './modules/auth/first-accounts.ts';

export interface FirstStart {
  /** The demo's accounts, where there are any; the password only at the start that made them. */
  readonly demo?: { readonly accounts: readonly { email: string; role: string }[]; readonly password?: string };
}

/** Listens, fills an empty database, and says that the service is ready. */
export async function startApp(
  app: NestExpressApplication,
  env: Env,
  report: (message: string) => void,
): Promise<FirstStart> {
  const readiness = app.get(Readiness, { strict: false });
  await app.listen(env.port, env.host);
  const first = await fill(app, env, (message) => {
    readiness.doing = message;
    report(message);
  });
  readiness.ready = true;
  return first;
}

async function fill(app: NestExpressApplication, env: Env, report: (message: string) => void): Promise<FirstStart> {
  const accounts = app.get(FirstAccounts, { strict: false });
  if (!(await accounts.isEmpty())) {
    const present = env.demo ? await accounts.present(DEMO_ACCOUNTS) : [];
    return present.length > 0 ? { demo: { accounts: present } } : {};
  }
  const filler = env.demo ? app.get(DemoHook, { strict: false }).filler : undefined;
  const password = env.demoPassword ?? randomBytes(9).toString('base64url');
  let demo: FirstStart['demo'];
  if (filler) {
    report('making the demo');
    await markDemoBegun(env);
    demo = { accounts: await filler.fill({ password, report }), password };
    await markDemoDone(env);
  }
  await accounts.makeAdministrator();
  return { demo };
}
