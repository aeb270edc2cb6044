import { ledger } from '@eremite/schema';
import { LedgerService } from '@eremite/service/modules/ledger/ledger.service.ts';
import { and, eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey, aSurvey } from '../support/builders.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

describe('surveys', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startApp();
  });
  afterAll(() => app.close());

  it('take the documented cosmology where none is given', async () => {
    const { survey } = await aStaffedSurvey(app);
    expect(survey).toMatchObject({ cosmology: { h0: 70, omegaM: 0.3 }, role: 'lead', detections: 0, latestRun: null });
  });

  it('can be seen by every role of the team and are 404 to anyone else', async () => {
    const { survey, lead, reviewer, observer, stranger } = await aStaffedSurvey(app);
    for (const client of [lead, reviewer, observer])
      expect((await client.get(`/surveys/${survey.id}`)).status).toBe(200);
    for (const path of [`/surveys/${survey.id}`, `/surveys/${survey.id}/ledger`]) {
      expect((await stranger.get(path)).status).toBe(404);
      expect((await app.client().get(path)).status).toBe(401);
    }
    expect((await stranger.patch(`/surveys/${survey.id}`, { name: 'x' })).status).toBe(404);
    expect((await stranger.delete(`/surveys/${survey.id}`)).status).toBe(404);
    expect((await stranger.get('/surveys')).body.items).toEqual([]);
    expect((await lead.get('/surveys/not-an-id')).status).toBe(400);
  });

  it('are changed by leads only', async () => {
    const { survey, team, lead, reviewer, observer } = await aStaffedSurvey(app);
    for (const client of [reviewer, observer]) {
      expect((await client.patch(`/surveys/${survey.id}`, { name: 'x' })).status).toBe(403);
      expect((await client.delete(`/surveys/${survey.id}`)).status).toBe(403);
      expect((await client.post('/surveys', { teamId: team.id, name: 'x' })).status).toBe(403);
    }
    const changed = await lead.patch(`/surveys/${survey.id}`, {
      name: 'renamed',
      cosmology: { h0: 67.4, omegaM: 0.315 },
    });
    expect(changed.body).toMatchObject({ name: 'renamed', cosmology: { h0: 67.4, omegaM: 0.315 } });
  });

  it('answer 412 with the present state to a change that did not see it', async () => {
    const { survey, lead } = await aStaffedSurvey(app);
    const tag = (await lead.get(`/surveys/${survey.id}`)).headers.get('etag')!;
    const first = await lead.patch(`/surveys/${survey.id}`, { description: 'first' }, { 'if-match': tag });
    expect(first.status).toBe(200);
    const second = await lead.patch(`/surveys/${survey.id}`, { description: 'second' }, { 'if-match': tag });
    expect(second).toMatchObject({ status: 412, body: { current: { description: 'first' } } });
    const third = await lead.patch(
      `/surveys/${survey.id}`,
      { description: 'third' },
      { 'if-match': first.headers.get('etag')! },
    );
    expect(third.body.description).toBe('third');
  });

  it('vanish when deleted and come back when restored', async () => {
    const { survey, lead, observer } = await aStaffedSurvey(app);
    expect((await lead.delete(`/surveys/${survey.id}`)).status).toBe(204);
    expect((await lead.get(`/surveys/${survey.id}`)).status).toBe(404);
    expect((await lead.get('/surveys')).body.total).toBe(0);
    expect((await lead.get('/surveys?deleted=true')).body.items[0].id).toBe(survey.id);
    expect((await observer.post(`/surveys/${survey.id}/restore`)).status).toBe(403);
    expect((await lead.post(`/surveys/${survey.id}/restore`)).body.id).toBe(survey.id);
    expect((await observer.get(`/surveys/${survey.id}`)).status).toBe(200);
  });

  it('are handed out in pages that cover all of them once', async () => {
    const { survey, team, lead } = await aStaffedSurvey(app);
    const names = ['a', 'b', 'c', 'd'];
    for (const name of names) await aSurvey(lead, team.id, { name });
    const seen: string[] = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const page: { body: { items: { name: string }[]; nextCursor: string | null; total: number } } = await lead.get(
        `/surveys?limit=2${cursor && `&cursor=${cursor}`}`,
      );
      expect(page.body.total).toBe(5);
      seen.push(...page.body.items.map((one) => one.name));
      cursor = page.body.nextCursor;
    }
    expect(seen.sort()).toEqual([...names, survey.name].sort());
    expect((await lead.get('/surveys?limit=1001')).status).toBe(400);
    expect((await lead.get('/surveys?cursor=nonsense')).status).toBe(400);
  });

  it('are made once by a repeated request with the same Idempotency-Key', async () => {
    const { team, lead } = await aStaffedSurvey(app);
    const body = { teamId: team.id, name: 'once' };
    const headers = { 'idempotency-key': 'a-key' };
    const [first, second] = [await lead.post('/surveys', body, headers), await lead.post('/surveys', body, headers)];
    expect(second.status).toBe(201);
    expect(second.body).toEqual(first.body);
    expect((await lead.post('/surveys', { ...body, name: 'other' }, headers)).status).toBe(409);
    expect((await lead.get('/surveys')).body.items.filter((one: { name: string }) => one.name === 'once')).toHaveLength(
      1,
    );
  });

  it('try again with the same Idempotency-Key after a failure', async () => {
    const { team, lead } = await aStaffedSurvey(app);
    const headers = { 'idempotency-key': 'another-key' };
    expect((await lead.post('/surveys', { teamId: team.id, name: '' }, headers)).status).toBe(400);
    expect((await lead.post('/surveys', { teamId: team.id, name: 'now' }, headers)).status).toBe(201);
  });
});

describe('the ledger', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startApp();
  });
  afterAll(() => app.close());

  it('tells every change, newest first, and holds together', async () => {
    const { survey, lead, observer } = await aStaffedSurvey(app);
    await lead.patch(`/surveys/${survey.id}`, { name: 'renamed' });
    await lead.delete(`/surveys/${survey.id}`);
    await lead.post(`/surveys/${survey.id}/restore`);
    const { body } = await observer.get(`/surveys/${survey.id}/ledger`);
    expect(body.items.map((line: { action: string }) => line.action)).toEqual([
      'survey restored',
      'survey deleted',
      'survey changed',
      'survey created',
    ]);
    expect(body.items[2].detail).toMatchObject({ before: { name: survey.name }, after: { name: 'renamed' } });
    const { body: found } = await observer.get(`/surveys/${survey.id}/ledger/verification`);
    expect(found).toMatchObject({ entries: 4, intact: true, brokenAt: null });
  });

  it('keeps its chain when many write at once', async () => {
    const { survey } = await aStaffedSurvey(app);
    const service = app.get(LedgerService);
    const line = (i: number) => ({ surveyId: survey.id, actor: { id: null, name: 'x' }, action: 'a', subject: `${i}` });
    await Promise.all(Array.from({ length: 30 }, (_, i) => service.append(line(i))));
    expect(await service.verify(survey.id)).toMatchObject({ entries: 31, intact: true, brokenAt: null });
  });

  it.each([
    ['a changed note', { note: 'never happened' }],
    ['another author', { actor: 'someone else' }],
    ['another detail', { detail: { cosmology: { h0: 50 } } }],
  ])('refuses %s, and shows it where the refusal was switched off', async (_, change) => {
    const { survey, lead } = await aStaffedSurvey(app);
    await lead.patch(`/surveys/${survey.id}`, { name: 'renamed' });
    const tamper = () =>
      app.db
        .update(ledger)
        .set(change)
        .where(and(eq(ledger.surveyId, survey.id), eq(ledger.number, 1)));
    await expect(tamper()).rejects.toMatchObject({ cause: { message: 'the ledger is append-only' } });
    // Whoever owns the database can switch its own guard off; the chain tells all the same.
    await app.db.execute(sql`alter table ledger disable trigger user`);
    await tamper();
    await app.db.execute(sql`alter table ledger enable trigger user`);
    const { body } = await lead.get(`/surveys/${survey.id}/ledger/verification`);
    expect(body).toMatchObject({ entries: 2, intact: false, brokenAt: 1 });
  });
});
