import { afterAll, describe, expect, it } from 'vitest';
import { jobEnd } from '../support/builders.ts';
import { crowdedTables, QUICK_SETTINGS } from '../support/builders/crowded-tables.ts';
import { aCatalogue, aRun, someCriteria } from '../support/builders/small-survey.ts';
import { startServer, type TestServer } from '../support/start-server.ts';

const ADMIN = { email: 'admin@example.org', password: 'a long password' };
const ENV = { EREMITE_ADMIN_EMAIL: ADMIN.email, EREMITE_ADMIN_PASSWORD: ADMIN.password };
const ROUNDS = process.env['EREMITE_LONG'] ? 20 : 2;

describe('a server killed in the middle of a run', () => {
  let server: TestServer;
  afterAll(() => server?.close());

  it(
    'starts the run again by itself, or says clearly that it failed, and earlier results are intact',
    { timeout: 90_000 * (ROUNDS + 1) },
    async () => {
      server = await startServer({ env: ENV });
      let lead = await server.signIn(ADMIN.email, ADMIN.password);
      const team = (await lead.post('/teams', { name: 'night shift' })).body;
      const surveyId = (await lead.post('/surveys', { teamId: team.id, name: 'crowded' })).body.id as string;
      const { hi, deep } = crowdedTables(1500);
      await aCatalogue(lead, surveyId, hi);
      await aCatalogue(lead, surveyId, deep);
      const criteria = await someCriteria(lead, surveyId, QUICK_SETTINGS);
      const began = Date.now();
      const first = await aRun(lead, surveyId, criteria.id);
      const seconds = (Date.now() - began) / 1000;
      const results = async (id: string) =>
        (await lead.get(`/runs/${id}/verdicts?format=csv`)).text.replace(/^#[^\n]*\n/, '');
      const expected = await results(first.id);
      expect(expected.trim().split('\n')).toHaveLength(1501);

      const ends: string[] = [];
      for (let round = 0; round < ROUNDS; round++) {
        const { runId, jobId } = (await lead.post(`/surveys/${surveyId}/runs`, { criteriaId: criteria.id })).body;
        // Somewhere between its first reading and its last writing, another place each round.
        await new Promise((resolve) => setTimeout(resolve, (1000 * seconds * (round + 0.5)) / ROUNDS));
        await server.stop('SIGKILL');
        const { dataDir } = server;
        server = await startServer({ env: ENV, dataDir });
        lead = await server.signIn(ADMIN.email, ADMIN.password);
        const job = await jobEnd(lead, jobId, 60_000);
        const run = (await lead.get(`/runs/${runId}`)).body;
        expect(['done', 'failed']).toContain(run.state);
        expect(job.state).toBe(run.state);
        if (run.state === 'done') expect(await results(runId)).toBe(expected);
        else expect(run.error.length).toBeGreaterThan(10);
        expect(await results(first.id)).toBe(expected);
        ends.push(run.state);
      }
      const { body } = await lead.get(`/surveys/${surveyId}/ledger/verification`);
      expect(body.intact).toBe(true);
      const { items } = (await lead.get(`/surveys/${surveyId}/ledger?limit=1000`)).body;
      const finished = items.filter(({ action }: { action: string }) => action === 'finished a run');
      expect(finished).toHaveLength(1 + ends.filter((state) => state === 'done').length);
    },
  );
});
