import { evidence, verdicts } from '@eremite/schema';
import { eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey, jobEnd } from '../support/builders.ts';
import { crowdedTables, QUICK_SETTINGS } from '../support/builders/crowded-tables.ts';
import { aCatalogue, aFilledSurvey, aRun, ledgerOf, someCriteria } from '../support/builders/small-survey.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startApp();
});
afterAll(() => app.close());
const tables = { verdicts, evidence };
const rowsOf = async (table: 'verdicts' | 'evidence', runId: string) => {
  return app.db.$count(tables[table], eq(tables[table].runId, runId));
};

describe('a run that takes a while', () => {
  let staff: Awaited<ReturnType<typeof aStaffedSurvey>>;
  let criteriaId: string;
  beforeAll(async () => {
    staff = await aStaffedSurvey(app);
    const { hi, deep } = crowdedTables();
    await aCatalogue(staff.lead, staff.survey.id, hi);
    await aCatalogue(staff.lead, staff.survey.id, deep);
    criteriaId = (await someCriteria(staff.lead, staff.survey.id, QUICK_SETTINGS)).id;
  });
  const start = async () =>
    (await staff.lead.post(`/surveys/${staff.survey.id}/runs`, { criteriaId })).body as {
      runId: string;
      jobId: string;
    };

  it('tells progress that grows with the work, and shows nothing before its end', async () => {
    const { runId, jobId } = await start();
    const seen: number[] = [];
    let early = 0;
    for (;;) {
      const { body } = await staff.observer.get(`/jobs/${jobId}`);
      if (body.finishedAt) break;
      seen.push(body.progress);
      const verdicts = await staff.observer.get(`/runs/${runId}/verdicts?limit=1`);
      if (verdicts.status === 200)
        early = (await staff.observer.get(`/jobs/${jobId}`)).body.finishedAt ? early : early + 1;
      else expect(verdicts.body.type).toBe('urn:eremite:error:not-ready');
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    expect(seen).toEqual([...seen].sort((a, b) => a - b));
    expect(new Set(seen).size).toBeGreaterThan(3);
    // Results and the state `done` of the run appear together, a moment before the job says so.
    expect(early).toBeLessThanOrEqual(1);
    const { body } = await staff.observer.get(`/runs/${runId}/verdicts?limit=1`);
    expect(body.total).toBe(6000);
  });

  it('is cancelled within a second and leaves nothing behind', async () => {
    const { runId, jobId } = await start();
    await expect
      .poll(async () => (await staff.lead.get(`/jobs/${jobId}`)).body.progress, { timeout: 30_000, interval: 50 })
      .toBeGreaterThan(0.2);
    expect((await staff.reviewer.delete(`/jobs/${jobId}`)).status).toBe(403);
    const asked = Date.now();
    expect((await staff.lead.delete(`/jobs/${jobId}`)).status).toBe(200);
    expect(await jobEnd(staff.lead, jobId)).toMatchObject({ state: 'cancelled' });
    // A generous bound: it shows that the run was not waited for.
    expect(Date.now() - asked).toBeLessThan(2000);
    await expect.poll(async () => (await staff.lead.get(`/runs/${runId}`)).body.state).toBe('cancelled');
    expect([await rowsOf('verdicts', runId), await rowsOf('evidence', runId)]).toEqual([0, 0]);
    expect((await staff.lead.get(`/runs/${runId}/verdicts`)).status).toBe(409);
    const { body } = await staff.lead.get(`/surveys/${staff.survey.id}/overview`);
    expect(Object.values(body.counts.starlight as Record<string, number>).reduce((a, b) => a + b)).toBe(6000);
  });
});

describe('a run that cannot be done', () => {
  it('fails with the reason, and the service and earlier runs stay well', async () => {
    const { lead, surveyId, catalogues } = await aFilledSurvey(app);
    const criteria = await someCriteria(lead, surveyId);
    const first = await aRun(lead, surveyId, criteria.id);
    const before = (await lead.get(`/runs/${first.id}/verdicts`)).text;
    // A stored tile damaged in the database: what a failing disk would leave.
    await app.db.execute(
      sql`update tiles set roles = substring(roles from 1 for 40) where catalogue_id = ${catalogues.deep} and cell >= 0`,
    );
    const accepted = await lead.post(`/surveys/${surveyId}/runs`, { criteriaId: criteria.id });
    const job = await jobEnd(lead, accepted.body.jobId);
    expect(job).toMatchObject({ state: 'failed', error: { title: 'The scoring could not be finished' } });
    expect(job.error.detail).toMatch(/stored rows of small deep are damaged/);
    const run = (await lead.get(`/runs/${accepted.body.runId}`)).body;
    expect([run.state, run.error]).toEqual(['failed', job.error.detail]);
    expect(await rowsOf('verdicts', run.id)).toBe(0);
    expect((await lead.get(`/runs/${first.id}/verdicts`)).text).toBe(before);
    expect((await lead.get(`/surveys/${surveyId}/overview`)).body.survey.latestRun.state).toBe('failed');
    const preview = await lead.post(`/surveys/${surveyId}/preview`, {
      detectionIds: [JSON.parse(before).items[0].detectionId],
    });
    expect([preview.status, preview.body.detail]).toEqual([500, job.error.detail]);
    const { hi, redshifts } = catalogues;
    const sound = await lead.post(`/surveys/${surveyId}/runs`, {
      criteriaId: criteria.id,
      catalogueIds: [hi, redshifts],
    });
    expect((await jobEnd(lead, sound.body.jobId)).state).toBe('done');
    expect((await ledgerOf(lead, surveyId)).filter(({ action }) => action === 'finished a run')).toHaveLength(2);
  });
});

describe('a run whose threads or rows need more memory than they may have', () => {
  let tight: TestApp | undefined;
  afterAll(() => tight?.close());
  const failedRun = async (limits: Parameters<typeof startApp>[0], settings: object) => {
    await tight?.close();
    tight = await startApp(limits);
    const { lead, survey } = await aStaffedSurvey(tight);
    const { hi, deep } = crowdedTables(1500);
    await aCatalogue(lead, survey.id, hi);
    await aCatalogue(lead, survey.id, deep);
    const { id } = await someCriteria(lead, survey.id, { ...QUICK_SETTINGS, ...settings });
    const { jobId, runId } = (await lead.post(`/surveys/${survey.id}/runs`, { criteriaId: id })).body;
    const job = await jobEnd(lead, jobId);
    expect(job.state).toBe('failed');
    const run = (await lead.get(`/runs/${runId}`)).body;
    expect([run.state, run.error]).toEqual(['failed', job.error.detail]);
    expect(await tight.db.$count(verdicts, eq(verdicts.runId, runId))).toBe(0);
    return { lead, surveyId: survey.id, error: job.error as { title: string; detail: string } };
  };

  it(
    'fails with a clear reason when a thread dies of it, and the service does the next run',
    { timeout: 300_000 },
    async () => {
      // Hundreds of candidates each are more than so small a heap holds.
      const wide = { position: { searchRadiusArcsec: 3600 } };
      const { lead, surveyId, error } = await failedRun({ threadMemoryBytes: 48 * 2 ** 20 }, wide);
      expect(error.detail).toMatch(/A thread that scores ended early.*memory.*48 MiB, EREMITE_THREAD_MEMORY/);
      const narrow = await someCriteria(lead, surveyId, { ...QUICK_SETTINGS, position: { searchRadiusArcsec: 5 } });
      expect((await aRun(lead, surveyId, narrow.id)).state).toBe('done');
    },
  );

  it(
    'is refused when the rows that matter are too many, with their number and the limit',
    { timeout: 300_000 },
    async () => {
      const { error } = await failedRun({ runMemoryBytes: 2 ** 17 }, {});
      expect(error.detail).toMatch(
        /More than [\d,]+ rows \([\d.]+ MiB\).*allows a run 0\.1 MiB \(EREMITE_RUN_MEMORY\)/,
      );
    },
  );
});
