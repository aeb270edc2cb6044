import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aScreenedSurvey, ledgerOf } from '../support/builders/small-survey.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
});
afterAll(() => app.close());
const path = () => `/surveys/${screened.surveyId}/shortlist`;
const entry = (name: string, reason = '') => ({ detectionId: screened.items[name]!.detectionId, reason });
const put = (entries: object[], ifMatch?: string, runId = screened.run.id) =>
  screened.lead.put(path(), { runId, entries }, ifMatch === undefined ? {} : { 'if-match': ifMatch });

describe('the shortlist', () => {
  it('is empty at first, and exports as an empty table', async () => {
    const { body, headers } = await screened.observer.get(path());
    expect(body).toEqual({ runId: null, runNumber: null, version: 0, entries: [] });
    expect(headers.get('etag')).toBe('"0"');
    const csv = await screened.observer.get(`${path()}/export`);
    expect(csv.status).toBe(200);
    expect(csv.text.split(/\r?\n/).filter((line) => line && !line.startsWith('#'))).toHaveLength(1);
  });

  it('is put in order by the lead, with reasons, and stands in the ledger', async () => {
    const done = await put([entry('S12', 'the emptiest'), { ...entry('S08'), nullResult: 'nothing to 29 mag' }], '"0"');
    expect(done.status, done.text).toBe(200);
    expect(done.headers.get('etag')).toBe('"1"');
    expect(done.body).toMatchObject({
      version: 1,
      runNumber: 1,
      entries: [
        { rank: 1, reason: 'the emptiest', verdict: { name: 'S12', starlight: 'dark' } },
        { rank: 2, nullResult: 'nothing to 29 mag', verdict: { name: 'S08' } },
      ],
    });
    expect((await ledgerOf(screened.observer, screened.surveyId))[0]).toMatchObject({
      action: 'changed the shortlist',
      subject: '2 detections of run 1',
      detail: { names: ['S12', 'S08'] },
    });
  });

  it('refuses a change made to an older state, and answers with the present one', async () => {
    const before = (await screened.lead.get(path())).body;
    const stale = await put([entry('S09')], '"0"');
    expect(stale.status).toBe(412);
    expect(stale.body).toMatchObject({ type: 'urn:eremite:error:changed-meanwhile', current: before });
    expect((await put([entry('S09')], 'nonsense')).status).toBe(412);
    expect((await screened.lead.get(path())).body).toEqual(before);
    expect((await put([entry('S08'), entry('S12')], `"${before.version}"`)).body.version).toBe(before.version + 1);
  });

  it('lets one of two at once through', async () => {
    const { version } = (await screened.lead.get(path())).body;
    const both = await Promise.all([put([entry('S10')], `"${version}"`), put([entry('S11')], `"${version}"`)]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 412]);
    expect((await screened.lead.get(path())).body.version).toBe(version + 1);
  });

  it('takes each detection once, of a finished run of the survey only', async () => {
    expect((await put([entry('S08'), entry('S08')])).status).toBe(400);
    const unknown = await put([entry('S08'), { detectionId: screened.surveyId }]);
    expect([unknown.status, unknown.body.errors[0].pointer]).toEqual([400, '/entries/1/detectionId']);
    expect((await put([], undefined, screened.surveyId)).status).toBe(404);
  });

  it('exports as CSV and VOTable in its order, with reasons and the caution', async () => {
    await put([entry('S12', 'the emptiest, "by far"'), entry('S08')]);
    const csv = await screened.observer.get(`${path()}/export?format=csv`);
    expect(csv.headers.get('content-disposition')).toBe('attachment; filename="shortlist.csv"');
    const lines = csv.text.trim().split(/\r?\n/);
    expect(lines[0]).toMatch(/^#.*screening/i);
    const rows = lines.filter((line) => !line.startsWith('#'));
    expect(rows[0]).toMatch(/^rank,detection,.*,reason,null_result$/);
    expect(rows[1]).toMatch(/^1,S12,.*"the emptiest, ""by far"""/);
    expect(rows[2]).toMatch(/^2,S08,/);
    const votable = await screened.observer.get(`${path()}/export?format=votable`);
    expect(votable.headers.get('content-type')).toMatch(/^application\/x-votable\+xml/);
    expect(votable.text.match(/<TR>/g)).toHaveLength(2);
    expect((await screened.observer.get(`${path()}/export?format=xlsx`)).status).toBe(400);
  });
});
