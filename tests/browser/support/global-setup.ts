import type { TestProject } from 'vitest/node';
import { startServer } from '../../support/start-server.ts';
import { DEMO_PASSWORD } from './demo-people.ts';

declare module 'vitest' {
  interface ProvidedContext {
    /** Address of the one server, filled with the demo, that all browser tests share. */
    demoUrl: string;
  }
}

/**
 * Starts the built server with the demo, once for all browser tests.
 * `EREMITE_TEST_URL` names a server that is up already, with the demo and its password, to write tests against.
 */
export default async function setUp(project: TestProject): Promise<(() => Promise<void>) | undefined> {
  const running = process.env['EREMITE_TEST_URL'];
  if (running) {
    project.provide('demoUrl', running);
    return undefined;
  }
  const env = { EREMITE_DEMO: 'on', EREMITE_DEMO_PASSWORD: DEMO_PASSWORD };
  const server = await startServer({ env, timeoutMs: 300_000 });
  project.provide('demoUrl', server.url);
  return () => server.close();
}
