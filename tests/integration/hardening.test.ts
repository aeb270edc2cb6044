import { idempotentAnswers } from '@eremite/schema';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey } from '../support/builders.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

type Staff = Awaited<ReturnType<typeof aStaffedSurvey>>;

describe('requests made to do harm, or by mistake', () => {
  let app: TestApp;
  let staff: Staff;
  beforeAll(async () => {
    app = await startApp();
    staff = await aStaffedSurvey(app);
  });
  afterAll(() => app.close());

  it('are never answered from a copy: the version of a survey does not stand for its latest run', async () => {
    const path = `/surveys/${staff.survey.id}`;
    const first = await staff.lead.get(path);
    expect(first.headers.get('cache-control')).toBe('no-store');
    const etag = first.headers.get('etag')!;
    expect((await staff.lead.get(path, { 'if-none-match': etag })).status).toBe(200);
    expect((await staff.lead.patch(path, { description: 'new' }, { 'if-match': '"other"' })).status).toBe(412);
  });

  it('are answered 400 where a text holds NUL, which no database stores', async () => {
    const { lead, survey, team } = staff;
    const named = await lead.post('/surveys', { teamId: team.id, name: 'a\0b' });
    expect(named).toMatchObject({ status: 400, body: { type: 'urn:eremite:error:validation-failed' } });
    expect((await lead.get(`/surveys/${survey.id}/detections?search=%00`)).status).toBe(400);
    const settings = { kind: 'hi', name: 'a\0b' };
    const upload = await lead.upload(`/surveys/${survey.id}/intakes`, 'a.csv', 'ra,dec\n1,2\n', { settings });
    expect(upload.status).toBe(400);
  });

  it('are answered 400 where JSON is nested without end', async () => {
    let deep: unknown = {};
    for (let i = 0; i < 2000; i += 1) deep = { deep };
    const answer = await staff.lead.post('/surveys', deep, { 'idempotency-key': 'deep' });
    expect(answer).toMatchObject({ status: 400, body: { detail: expect.stringContaining('nested') } });
  });

  it('are answered 400 where a cursor or a row number is beyond any table', async () => {
    const { lead, survey } = staff;
    const cursor = Buffer.from('[1e300]').toString('base64url');
    expect((await lead.get(`/surveys/${survey.id}/detections?cursor=${cursor}`)).status).toBe(400);
    expect((await lead.get(`/surveys/${survey.id}/ledger?cursor=${cursor}`)).status).toBe(400);
    const path = `/catalogues/${survey.id}/rows?row=`;
    expect((await lead.get(`${path}99999999999`)).status).toBe(400);
    expect((await lead.get(`${path}1`)).status).toBe(404);
  });

  it('never find a personal token among the answers kept for repeats', async () => {
    const made = await staff.lead.post('/tokens', { name: 'script' }, { 'idempotency-key': 'token-1' });
    expect(made.status).toBe(201);
    const kept = await app.db.select().from(idempotentAnswers);
    expect(JSON.stringify(kept)).not.toContain(made.body.token);
  });

  it('do not get invitation links with a token that may only read', async () => {
    await staff.lead.post(`/teams/${staff.team.id}/invitations`, { email: 'new@example.org', role: 'observer' });
    const token = async (scope: string) => (await staff.lead.post('/tokens', { name: scope, scope })).body.token;
    expect((await app.client(await token('read')).get('/outbox')).status).toBe(403);
    expect((await app.client(await token('write')).get('/outbox')).body.items).toHaveLength(1);
  });

  it('do not sign anyone in by a form, which another site could send', async () => {
    const answer = await app.client().request('POST', '/auth/sign-in', 'email=a%40example.org&password=p', {
      'content-type': 'application/x-www-form-urlencoded',
    });
    expect(answer.status).toBe(400);
  });

  it('keep a file name without its control characters', async () => {
    const { lead, survey } = staff;
    const { body } = await lead.upload(`/surveys/${survey.id}/intakes`, '../..\\e\u0085vil.csv', 'ra,dec\n1,2\n', {});
    expect(body.fileName).toMatch(/evil\.csv$/);
    expect(body.fileName).not.toContain('/');
  });
});
