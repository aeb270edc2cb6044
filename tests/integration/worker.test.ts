import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { jobEnd } from '../support/builders.ts';
import { crowdedTables, QUICK_SETTINGS } from '../support/builders/crowded-tables.ts';
import { aCatalogue, someCriteria } from '../support/builders/small-survey.ts';
import { startPostgres } from '../support/start-postgres.ts';
import { startServer, type TestServer } from '../support/start-server.ts';

const WORKER = join(import.meta.dirname, '../../service/dist/worker.js');
const ADMIN = { email: 'admin@example.org', password: 'a long password' };

/** A worker process; answers once it says that it is ready, or with what it said when it ended. */
function startWorker(env: Record<string, string>): Promise<{ child: ChildProcess; said: string; code: number | null }> {
  const { DATABASE_URL: _, ...inherited } = process.env;
  const child = spawn(process.execPath, [WORKER], { env: { ...inherited, EREMITE_LOG_LEVEL: 'warn', ...env } });
  let said = '';
  return new Promise((resolve) => {
    const read = (chunk: Buffer) => {
      said += chunk.toString();
      if (said.includes('worker is ready')) resolve({ child, said, code: null });
    };
    child.stdout.on('data', read);
    child.stderr.on('data', read);
    child.once('close', (code) => resolve({ child, said, code }));
  });
}

describe('a worker', () => {
  it('refuses the built-in database, and says why', async () => {
    const dataDir = mkdtempSync(join(tmpdir(), 'eremite-worker-'));
    const { code, said } = await startWorker({ EREMITE_DATA_DIR: dataDir });
    rmSync(dataDir, { recursive: true });
    expect(code).toBe(1);
    expect(said).toContain('needs PostgreSQL (DATABASE_URL)');
    expect(said).toContain('belongs to one process');
  });
});

describe('workers beside a web process that does no jobs', () => {
  let postgres: Awaited<ReturnType<typeof startPostgres>>;
  let web: TestServer;
  let worker: ChildProcess | undefined;
  let env: Record<string, string>;
  const dataDir = mkdtempSync(join(tmpdir(), 'eremite-worker-'));
  beforeAll(async () => {
    postgres = await startPostgres();
    env = { DATABASE_URL: postgres.url, EREMITE_SECRET: 'a secret that all processes share, long enough' };
    const accounts = { EREMITE_ADMIN_EMAIL: ADMIN.email, EREMITE_ADMIN_PASSWORD: ADMIN.password };
    web = await startServer({ dataDir, env: { ...env, ...accounts, EREMITE_JOB_WORKERS: '0' } });
    env['EREMITE_DATA_DIR'] = dataDir;
  });
  afterAll(async () => {
    worker?.kill('SIGKILL');
    await web?.close();
    await postgres?.stop();
    rmSync(dataDir, { recursive: true, force: true });
  });

  it(
    'do its intakes and runs, hear a cancel at once, and take up what a killed one left',
    { timeout: 300_000 },
    async () => {
      const lead = await web.signIn(ADMIN.email, ADMIN.password);
      const team = (await lead.post('/teams', { name: 'apart' })).body;
      const surveyId = (await lead.post('/surveys', { teamId: team.id, name: 'apart' })).body.id as string;
      const begun = await startWorker(env);
      worker = begun.child;
      expect(begun.code, begun.said).toBeNull();
      const { hi, deep } = crowdedTables(3000);
      await aCatalogue(lead, surveyId, hi);
      await aCatalogue(lead, surveyId, deep);
      const criteria = await someCriteria(lead, surveyId, QUICK_SETTINGS);
      const start = async () =>
        (await lead.post(`/surveys/${surveyId}/runs`, { criteriaId: criteria.id })).body as {
          runId: string;
          jobId: string;
        };
      const underWay = (jobId: string) =>
        expect
          .poll(async () => (await lead.get(`/jobs/${jobId}`)).body.progress, { timeout: 60_000, interval: 50 })
          .toBeGreaterThan(0.25);

      const unwanted = await start();
      await underWay(unwanted.jobId);
      expect((await lead.delete(`/jobs/${unwanted.jobId}`)).status).toBe(200);
      expect(await jobEnd(lead, unwanted.jobId)).toMatchObject({ state: 'cancelled' });

      const { runId, jobId } = await start();
      await underWay(jobId);
      worker.kill('SIGKILL');
      await sleep(200);
      expect((await lead.get('/surveys')).status).toBe(200);
      worker = (await startWorker(env)).child;
      expect(await jobEnd(lead, jobId, 120_000)).toMatchObject({ state: 'done' });
      const { body } = await lead.get(`/runs/${runId}`);
      expect([body.state, body.counts.detections]).toEqual(['done', 3000]);
    },
  );
});
