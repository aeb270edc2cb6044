import { setTimeout as sleep } from 'node:timers/promises';
import { expect, it } from 'vitest';
import { aSurvey, jobEnd } from '../support/builders.ts';
import { startServer } from '../support/start-server.ts';

const LONG = process.env['EREMITE_LONG'] !== undefined;
const KILLS = LONG ? 50 : 2;
const ROWS = 60_000;
/** For one start, on a machine that does other things as well. */
const START_MS = 180_000;
const ADMIN = { email: 'first@example.org', password: 'a long enough password' };
const env = { EREMITE_ADMIN_EMAIL: ADMIN.email, EREMITE_ADMIN_PASSWORD: ADMIN.password };

function table(): string {
  const rows = Array.from(
    { length: ROWS },
    (_, i) => `g${i},${((i * 7.31) % 360).toFixed(4)},${(((i * 3.7) % 160) - 80).toFixed(4)},18`,
  );
  return `id,ra_deg,dec_deg,rmag\n${rows.join('\n')}\n`;
}

it(
  'leaves a whole catalogue or none when the process is killed while it publishes, and the upload survives',
  { timeout: KILLS * 120_000 + 60_000 },
  async () => {
    let server = await startServer({ env, timeoutMs: START_MS });
    const { dataDir } = server;
    try {
      let client = await server.signIn(ADMIN.email, ADMIN.password);
      const team = await client.post('/teams', { name: 'kills' });
      expect(team.status, team.text).toBe(201);
      const survey = await aSurvey(client, team.body.id);
      const text = table();
      const { body } = await client.upload(`/surveys/${survey.id}/intakes`, 'many.csv', text, {
        settings: { kind: 'optical' },
      });
      let whole = 0;
      let midway = 0;
      for (let kill = 0; kill < KILLS; kill++) {
        const { jobId } = (await client.post(`/intakes/${body.id}/publish`)).body;
        await sleep(LONG ? Math.random() * 3000 : 100 + kill * 700);
        const { state } = (await client.get(`/jobs/${jobId}`)).body;
        if (state !== 'done') midway++;
        await server.stop('SIGKILL');
        server = await startServer({ dataDir, env, timeoutMs: START_MS });
        client = await server.signIn(ADMIN.email, ADMIN.password);
        // The job is taken up again, so that in the end the catalogue is there, whole.
        const job = await jobEnd(client, jobId);
        expect(job.state, JSON.stringify(job)).toBe('done');
        const { body: list } = await client.get(`/surveys/${survey.id}/catalogues`);
        expect(list.total).toBe(1);
        expect(list.items[0]).toMatchObject({ id: job.result.catalogueId, rows: ROWS });
        const last = await client.get(`/catalogues/${list.items[0].id}/rows?row=${ROWS}`);
        expect(last.body.items[0].cells[0]).toBe(`g${ROWS - 1}`);
        whole++;
        if (LONG && whole % 10 === 0) console.info(`${whole} kills, ${midway} of them while publishing: nothing lost`);
        expect((await client.delete(`/catalogues/${list.items[0].id}`)).status).toBe(204);
      }
      expect(whole).toBe(KILLS);
    } finally {
      await server.close();
    }
  },
);
