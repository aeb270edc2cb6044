import { JobsService } from '@eremite/service/jobs/jobs.service.ts';
import { BulkStore } from '@eremite/service/database/bulk.ts';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey, aUser, jobEnd } from '../support/builders.ts';
import { startApp, type TestApp } from '../support/start-app.ts';
import { startPostgres } from '../support/start-postgres.ts';

describe('two processes on one PostgreSQL', () => {
  let postgres: Awaited<ReturnType<typeof startPostgres>>;
  let first: TestApp;
  let second: TestApp;
  beforeAll(async () => {
    postgres = await startPostgres();
    const on = { databaseUrl: postgres.url, databaseInMemory: false, databaseTemplate: undefined };
    // At once, as an orchestrator starts them: both want to migrate. Only the second does jobs.
    [first, second] = await Promise.all([startApp({ ...on, jobWorkers: 0 }), startApp(on)]);
  });
  afterAll(async () => {
    await Promise.all([first?.close(), second?.close()]);
    await postgres?.stop();
  });

  it('share accounts, surveys and the ledger', async () => {
    const { survey, lead } = await aStaffedSurvey(first);
    const elsewhere = second.client();
    for (const name of ['access', 'csrf']) elsewhere.setCookie(name, lead.cookie(name)!);
    expect((await elsewhere.patch(`/surveys/${survey.id}`, { name: 'from the other' })).status).toBe(200);
    expect((await lead.get(`/surveys/${survey.id}`)).body.name).toBe('from the other');
    expect((await lead.get(`/surveys/${survey.id}/ledger/verification`)).body).toMatchObject({
      entries: 2,
      intact: true,
    });
    expect((await lead.get('/surveys?limit=1')).body).toMatchObject({ total: 1, items: [{ detections: 0 }] });
  });

  it('share work: one asks, the other does it, both can follow and cancel', async () => {
    const { survey, lead } = await aStaffedSurvey(first);
    for (const app of [first, second]) {
      const service = app.get(JobsService);
      service.register({ kind: 'double', run: ({ n }: { n: number }) => Promise.resolve({ n: n * 2 }) });
      service.register({
        kind: 'wait',
        run: (_, { signal }) =>
          new Promise((_ok, no) => signal.addEventListener('abort', () => no(signal.reason as Error))),
      });
    }
    const of = { surveyId: survey.id };
    const doubled = await first.get(JobsService).enqueue('double', { n: 21 }, of);
    expect(await jobEnd(lead, doubled)).toMatchObject({ state: 'done', result: { n: 42 } });
    const waiting = await first.get(JobsService).enqueue('wait', {}, of);
    await expect.poll(async () => (await lead.get(`/jobs/${waiting}`)).body.state, { timeout: 15_000 }).toBe('running');
    expect((await lead.delete(`/jobs/${waiting}`)).status).toBe(200);
    expect(await jobEnd(lead, waiting)).toMatchObject({ state: 'cancelled' });
  });

  it('carry bulk rows like the built-in database', async () => {
    const bulk = first.get<BulkStore>(BulkStore);
    await first.db.execute(sql`create table bulk_try (id uuid, n int8, x float8, t text, b bytea, j jsonb)`);
    const columns = [
      { name: 'id', type: 'uuid' },
      { name: 'n', type: 'int8' },
      { name: 'x', type: 'float8' },
      { name: 't', type: 'text' },
      { name: 'b', type: 'bytea' },
      { name: 'j', type: 'jsonb' },
    ] as const;
    const uuid = '01234567-89ab-cdef-0123-456789abcdef';
    const rows = Array.from({ length: 5000 }, (_, i) => [
      uuid,
      i,
      i / 3,
      `row ${i}`,
      new Uint8Array(2000).fill(i),
      { i },
    ]);
    expect(await bulk.copyInto('bulk_try', columns, [rows])).toBe(5000);
    const read: unknown[][] = [];
    const types = columns.map((column) => column.type);
    for await (const batch of bulk.read('select * from bulk_try where n >= $1 order by n', [4990], types))
      read.push(...batch);
    expect(read).toEqual(rows.slice(4990));
  });

  it('tell an administrator how much room they take', async () => {
    const admin = await first.signIn((await aUser(first, { isAdministrator: true })).email);
    const { body } = await admin.get('/admin/storage');
    expect(body).toMatchObject({ database: { kind: 'postgresql' }, catalogues: 0, files: { files: 0 } });
    expect(body.database.bytes).toBeGreaterThan(1e6);
    expect((await admin.get('/admin/accounts')).body.total).toBeGreaterThan(4);
    expect((await admin.get('/admin/jobs')).body.items[0]).not.toHaveProperty('result');
  });
});
