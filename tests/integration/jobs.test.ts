import { jobs } from '@eremite/schema';
import type { JobContext } from '@eremite/service/jobs/job-handler.ts';
import { JobsService } from '@eremite/service/jobs/jobs.service.ts';
import { JobsRepository } from '@eremite/service/jobs/jobs.repository.ts';
import { AppError } from '@eremite/service/common/app-error.ts';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey, jobEnd } from '../support/builders.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

/** Waits until told to stop. */
const untilAborted = ({ signal }: JobContext) =>
  new Promise<never>((_, reject) => signal.addEventListener('abort', () => reject(signal.reason as Error)));

describe('jobs', () => {
  let app: TestApp;
  let service: JobsService;
  const ended: { state: string; error: string }[] = [];

  beforeAll(async () => {
    app = await startApp();
    service = app.get(JobsService);
    service.register<{ add: number[] }, { sum: number }>({
      kind: 'sum',
      run: ({ add }, { progress }) => {
        progress(0.5, 'half way');
        return Promise.resolve({ sum: add.reduce((a, b) => a + b, 0) });
      },
    });
    service.register({
      kind: 'wait',
      run: (_, context) => {
        context.progress(0.25, 'waiting');
        return untilAborted(context);
      },
      ended: (_, outcome) => {
        ended.push(outcome);
        return Promise.resolve();
      },
    });
    service.register({
      kind: 'refuse',
      run: () => Promise.reject(new AppError('NOTHING_TO_PUBLISH', 'all 3 rows lack a position')),
    });
    service.register({ kind: 'break', run: () => Promise.reject(new Error('a secret detail')) });
  });
  afterAll(() => app.close());

  it('run soon and keep their result for the members of the team, and for no one else', async () => {
    const { survey, observer, stranger } = await aStaffedSurvey(app);
    const started = Date.now();
    const id = await service.enqueue('sum', { add: [1, 2, 3] }, { surveyId: survey.id });
    const done = await jobEnd(observer, id);
    expect(Date.now() - started).toBeLessThan(4000);
    expect(done).toMatchObject({ state: 'done', progress: 1, result: { sum: 6 }, secondsLeft: null });
    expect((await stranger.get(`/jobs/${id}`)).status).toBe(404);
    expect((await stranger.delete(`/jobs/${id}`)).status).toBe(404);
    expect((await observer.delete(`/jobs/${id}`)).status).toBe(403);
  });

  it('can be cancelled by a lead while they run', async () => {
    const { survey, lead } = await aStaffedSurvey(app);
    const id = await service.enqueue('wait', {}, { surveyId: survey.id });
    await expect.poll(async () => (await lead.get(`/jobs/${id}`)).body.state, { timeout: 10_000 }).toBe('running');
    expect((await lead.delete(`/jobs/${id}`)).status).toBe(200);
    expect(await jobEnd(lead, id)).toMatchObject({ state: 'cancelled' });
    await expect.poll(() => ended.at(-1)?.state).toBe('cancelled');
  });

  it('can be cancelled before they begin', async () => {
    const { survey, lead } = await aStaffedSurvey(app);
    const id = await service.add('wait', {}, { surveyId: survey.id });
    expect((await lead.delete(`/jobs/${id}`)).body.state).toBe('cancelled');
    await service.release(id);
    await new Promise((resolve) => setTimeout(resolve, 500));
    expect((await lead.get(`/jobs/${id}`)).body.state).toBe('cancelled');
  });

  it('say why they failed where that is known, and nothing of the inside where not', async () => {
    const { survey, lead } = await aStaffedSurvey(app);
    const refused = await service.enqueue('refuse', {}, { surveyId: survey.id });
    expect(await jobEnd(lead, refused)).toMatchObject({
      state: 'failed',
      error: { title: 'No row of the table can be used', detail: 'all 3 rows lack a position' },
    });
    const broken = await jobEnd(lead, await service.enqueue('break', {}, { surveyId: survey.id }));
    expect(broken.state).toBe('failed');
    expect(JSON.stringify(broken)).not.toContain('secret');
  });

  it('stream every change as server-sent events and then end', async () => {
    const { survey, lead } = await aStaffedSurvey(app);
    const id = await service.enqueue('wait', {}, { surveyId: survey.id });
    const response = await lead.raw('GET', `/jobs/${id}/events`);
    expect(response.headers.get('content-type')).toMatch(/^text\/event-stream/);
    setTimeout(() => void lead.delete(`/jobs/${id}`), 700);
    const events = [...(await response.text()).matchAll(/^data: (.*)$/gm)].map((match) => JSON.parse(match[1]!));
    expect(events.at(-1)).toMatchObject({ id, state: 'cancelled' });
    expect(events.some((event) => event.state === 'running')).toBe(true);
  });

  it('start once, however often the queue hands them out', async () => {
    const { survey } = await aStaffedSurvey(app);
    const id = await service.add('sum', { add: [1] }, { surveyId: survey.id });
    const table = app.get(JobsRepository);
    const starts = await Promise.all([table.start(id), table.start(id), table.start(id)]);
    expect(starts.filter((row) => row !== undefined)).toHaveLength(1);
    await app.db.update(jobs).set({ state: 'failed' }).where(eq(jobs.id, id));
  });
});

describe('jobs left behind by a process that died', () => {
  it('are put back, or fail and say so, when the service starts again', async () => {
    // The state such a process leaves: rows that say running, and nobody who runs them.
    const before = await startApp();
    const table = before.get(JobsRepository);
    const service = before.get(JobsService);
    const done = new Set<unknown>();
    const recovered: unknown[] = [];
    service.register<{ name: string }, object>({
      kind: 'again',
      run: (payload) => {
        done.add(payload.name);
        return Promise.resolve({});
      },
      recover: (payload) => {
        recovered.push(payload.name);
        return Promise.resolve();
      },
    });
    service.register({ kind: 'once', run: () => Promise.resolve({}) });
    const left = async (kind: string, attempts = 1) => {
      const id = await service.add(kind, { name: `${kind}-${attempts}` }, {});
      await table.start(id);
      await before.db
        .update(jobs)
        .set({ attempts, heartbeatAt: new Date(0) })
        .where(eq(jobs.id, id));
      return id;
    };
    const [again, worn, once] = [await left('again'), await left('again', 3), await left('once')];
    await service.takeUp();
    await expect.poll(async () => (await table.get(again))?.state, { timeout: 10_000 }).toBe('done');
    expect((await table.get(again))!.attempts).toBe(2);
    expect((await table.get(worn))!).toMatchObject({
      state: 'failed',
      error: { detail: 'It did not survive 3 attempts.' },
    });
    expect((await table.get(once))!).toMatchObject({ state: 'failed' });
    expect(recovered).toEqual(['again-1', 'again-3']);
    expect([...done]).toEqual(['again-1']);
    await before.close();
  });
});
