import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aScreenedSurvey, ledgerOf, settle } from '../support/builders/small-survey.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
  for (const name of ['S08', 'S09', 'S10', 'S11', 'S12']) await settle(screened, name);
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

  it('refuses what is not settled, and says why of each', async () => {
    const refused = await put([entry('S12'), entry('S01'), entry('S02')]);
    expect(refused.status).toBe(409);
    expect(refused.body.detail).toMatch(/takes settled detections\. S01: not settled.*and 1 more/);
    expect(refused.body.errors.map(({ pointer }: { pointer: string }) => pointer)).toEqual([
      '/entries/1/detectionId',
      '/entries/2/detectionId',
    ]);
    await settle(screened, 'S02', { outcome: 'not real' });
    expect((await put([entry('S02')])).body.detail).toMatch(/S02: settled as not real/);
  });

  it('proposes by a rule what is settled, best first, and names what is not settled yet', async () => {
    const { lead, observer, run } = screened;
    const rule = {
      runId: run.id,
      starlight: ['dark'],
      surroundings: ['alone', 'cannot tell', 'accompanied'],
      worstDoubt: 'serious',
    };
    const { status, body, text } = await observer.post(`${path()}/proposals`, rule);
    expect(status, text).toBe(200);
    expect(body.entries.map(({ name }: { name: string }) => name).sort()).toEqual(['S08', 'S09', 'S10', 'S11', 'S12']);
    const values = body.entries.map(({ priority }: { priority: { value: number } }) => priority.value);
    expect(values).toEqual([...values].sort((a, b) => b - a));
    expect(body.entries[0].reason).toMatch(/^P\(none\) 0\.\d\d; P\(no neighbour\)/);
    expect(body.refused.map(({ name }: { name: string }) => name)).toEqual(['S07']);
    expect(body.refused[0].why).toMatch(/not settled/);
    const strict = await lead.post(`${path()}/proposals`, { ...rule, minPNone: 1, minStability: 1 });
    expect(strict.body.entries).toEqual([]);
    const seen = { name: 'dome', latitudeDeg: -80, longitudeDeg: 0, semester: '2026B' };
    const south = await lead.post(`${path()}/proposals`, { ...rule, observe: seen });
    expect(south.body.entries.every(({ hours }: { hours: number }) => hours === 0)).toBe(true);
  });

  it('tells the dark hours of what is on the list', async () => {
    const query = 'latitudeDeg=28&longitudeDeg=-17&semester=2026B';
    const { body } = await screened.observer.get(`${path()}/observability?${query}`);
    expect(body.items[0]).toMatchObject({ name: expect.any(String), hours: expect.any(Number) });
    expect(body.items[0].hours).toBeGreaterThan(10);
    expect((await screened.observer.get(`${path()}/observability?${query.replace('28', '128')}`)).status).toBe(400);
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
