import { afterAll, describe, expect, it } from 'vitest';
import { startServer, type TestServer } from '../support/start-server.ts';

const ADMIN = { email: 'admin@example.org', password: 'a long password' };
const ENV = { EREMITE_ADMIN_EMAIL: ADMIN.email, EREMITE_ADMIN_PASSWORD: ADMIN.password };

describe('a server killed without warning', () => {
  let server: TestServer;
  afterAll(() => server?.close());

  it('loses nothing it had acknowledged, and starts again by itself', async () => {
    server = await startServer({ env: ENV });
    const client = await server.signIn(ADMIN.email, ADMIN.password);
    const acknowledged: string[] = [];
    let killed = false;
    const writers = Array.from({ length: 3 }, async (_, writer) => {
      for (let i = 0; !killed; i += 1) {
        const answer = await client.post('/teams', { name: `team ${writer}-${i}` }).catch(() => undefined);
        if (answer?.status === 201) acknowledged.push(answer.body.id);
        else if (answer) throw new Error(`answered ${answer.status}: ${answer.text}`);
      }
    });
    await new Promise((resolve) => setTimeout(resolve, 1500));
    await server.stop('SIGKILL');
    killed = true;
    await Promise.all(writers);
    expect(acknowledged.length).toBeGreaterThan(5);

    const { dataDir } = server;
    server = await startServer({ env: ENV, dataDir });
    const again = await server.signIn(ADMIN.email, ADMIN.password);
    const kept: string[] = [];
    for (let cursor: string | null = ''; cursor !== null;) {
      const page: { body: { items: { id: string }[]; nextCursor: string | null } } = await again.get(
        `/teams?limit=1000${cursor && `&cursor=${cursor}`}`,
      );
      kept.push(...page.body.items.map((team) => team.id));
      cursor = page.body.nextCursor;
    }
    expect(new Set(kept)).toEqual(new Set([...acknowledged, ...kept]));
  });
});
