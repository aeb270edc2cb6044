import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey, aSurvey, jobEnd } from '../support/builders.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let staff: Awaited<ReturnType<typeof aStaffedSurvey>>;
beforeAll(async () => {
  app = await startApp();
  staff = await aStaffedSurvey(app);
});
afterAll(() => app.close());

/** Seeded, so that a failure can be repeated. */
function* noise(seed: number): Generator<number> {
  for (let state = seed; ;) {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    yield state / 2 ** 32;
  }
}
function manyRows(count: number): { text: string; ra: number[]; dec: number[] } {
  const random = noise(7);
  const next = () => random.next().value as number;
  const [ra, dec]: [number[], number[]] = [[], []];
  const lines = Array.from({ length: count }, (_, i) => {
    ra.push(Math.round((358 + 4 * next()) * 1e6) / 1e6);
    dec.push(Math.round((-2 + 4 * next()) * 1e6) / 1e6);
    return `g${i + 1},${ra[i]! % 360},${dec[i]},${(15 + 7 * next()).toFixed(2)},${i % 3 ? '' : Math.round(1000 + 9000 * next())}`;
  });
  return { text: `id,ra_deg,dec_deg,rmag,cz\n${lines.join('\n')}\n`, ra, dec };
}
async function publish(
  content: string,
  settings: object,
  name = 'table.csv',
  surveyId = staff.survey.id,
): Promise<string> {
  const { body, status, text } = await staff.lead.upload(`/surveys/${surveyId}/intakes`, name, content, { settings });
  expect(status, text).toBe(201);
  const accepted = await staff.lead.post(`/intakes/${body.id}/publish`);
  expect(accepted.status, accepted.text).toBe(202);
  const job = await jobEnd(staff.lead, accepted.body.jobId);
  expect(job.state, JSON.stringify(job.error)).toBe('done');
  return job.result.catalogueId;
}

describe('a new version', () => {
  const hi = (rows: string[]) => `name,ra_deg,dec_deg,cz_kms,snr\n${rows.join('\n')}\n`;
  const settings = { kind: 'hi', columns: { ra: 'ra_deg', dec: 'dec_deg' } };

  it('takes the place of a catalogue, which stays readable and comes back when the new one is removed', async () => {
    const survey = await aSurvey(staff.lead, staff.team.id);
    const first = await publish(hi(['A,10,5,3000,9']), settings, 'first.csv', survey.id);
    const [old] = (await staff.observer.get(`/surveys/${survey.id}/detections`)).body.items;
    const second = await publish(
      hi(['A,10,5,3000,9', 'B,11,5,3100,9']),
      { ...settings, supersedes: first },
      'second.csv',
      survey.id,
    );
    expect((await staff.observer.get(`/catalogues/${first}`)).body.state).toBe('superseded');
    expect((await staff.observer.get(`/catalogues/${first}/rows`)).body.total).toBe(1);
    expect((await staff.observer.get(`/detections/${old.id}`)).status).toBe(200);
    expect((await staff.observer.get(`/surveys/${survey.id}/detections`)).body.total).toBe(2);
    const list = await staff.observer.get(`/surveys/${survey.id}/catalogues`);
    expect(list.body.items.map(({ state }: { state: string }) => state)).toEqual(['superseded', 'published']);
    expect((await staff.lead.delete(`/catalogues/${second}`)).status).toBe(204);
    expect((await staff.observer.get(`/catalogues/${first}`)).body.state).toBe('published');
    expect((await staff.observer.get(`/surveys/${survey.id}/detections`)).body.total).toBe(1);
  });

  it('is refused where there is no such catalogue of the survey and kind', async () => {
    const survey = await aSurvey(staff.lead, staff.team.id);
    const elsewhere = await publish(hi(['A,10,5,3000,9']), settings);
    const { body } = await staff.lead.upload(`/surveys/${survey.id}/intakes`, 'b.csv', hi(['A,10,5,3000,9']), {
      settings: { ...settings, supersedes: elsewhere },
    });
    const refused = await staff.lead.post(`/intakes/${body.id}/publish`);
    expect([refused.status, refused.body.errors?.[0]?.pointer]).toEqual([422, '/supersedes']);
  });
});

describe('a catalogue', () => {
  it('hands out its rows in file order, page by page, and around a place across 0 h', async () => {
    const { text, ra, dec } = manyRows(3000);
    const id = await publish(text, { kind: 'optical', bands: [{ name: 'r', depth5Sigma: 23 }] });
    const rows: number[] = [];
    for (let cursor = ''; ;) {
      const { body } = await staff.observer.get(`/catalogues/${id}/rows?limit=700${cursor && `&cursor=${cursor}`}`);
      expect(body.total).toBe(3000);
      rows.push(...body.items.map((item: { row: number }) => item.row));
      if (!body.nextCursor) break;
      cursor = body.nextCursor;
    }
    expect(rows).toEqual(Array.from({ length: 3000 }, (_, i) => i + 1));
    const radius = 1200;
    const flat = ra.map((value, i) => Math.hypot((value - 360) * Math.cos((dec[i]! * Math.PI) / 180), dec[i]!) * 3600);
    const { body: cone } = await staff.observer.get(
      `/catalogues/${id}/rows?raDeg=0&decDeg=0&radiusArcsec=${radius}&limit=1000`,
    );
    // The flat distance is good to a part in 10^5 here, and no row lies that near the limit.
    const expected = flat.flatMap((d, i) => (d <= radius ? [i + 1] : [])).sort((a, b) => flat[a - 1]! - flat[b - 1]!);
    expect(cone.items.map((item: { row: number }) => item.row)).toEqual(expected);
    expect(cone.items[0].separationArcsec).toBeCloseTo(flat[expected[0]! - 1]!, 1);
    for (const [k, at] of [
      [7, 'raDeg=0&decDeg=0'],
      [3, 'raDeg=180&decDeg=-40'],
    ] as const) {
      const { body } = await staff.observer.get(`/catalogues/${id}/rows?${at}&nearest=${k}`);
      expect(body.items).toHaveLength(k);
      if (at === 'raDeg=0&decDeg=0') {
        const nearest = flat.map((_, i) => i + 1).sort((a, b) => flat[a - 1]! - flat[b - 1]!);
        expect(body.items.map((item: { row: number }) => item.row)).toEqual(nearest.slice(0, k));
      } else expect(body.items[0].separationArcsec).toBeGreaterThan(400_000);
    }
    const single = await staff.observer.get(`/catalogues/${id}/rows?row=1234`);
    expect(single.body.items[0].cells[0]).toBe('g1234');
    expect((await staff.observer.get(`/catalogues/${id}/rows?raDeg=0`)).status).toBe(400);
  });

  it('tells facts, coverage and the counts of its magnitudes', async () => {
    const rows: string[] = [];
    for (let i = 0; i < 60; i++)
      for (let j = 0; j < 60; j++) rows.push(`${150 + i / 20},${2 + j / 20},${16 + (i % 8) / 2}`);
    const id = await publish(`ra_deg,dec_deg,rmag\n${rows.join('\n')}\n`, { kind: 'optical', name: 'deep r' });
    const { body } = await staff.observer.get(`/catalogues/${id}`);
    expect(body).toMatchObject({
      name: 'deep r',
      rows: 3600,
      coverage: { type: 'rows' },
      bands: [{ name: 'r', system: 'AB', depth5Sigma: null }],
    });
    expect(body.coverage.areaSqDeg / 9).toBeGreaterThan(0.8);
    expect(body.coverage.moc).toMatch(/^\d+\/\d+/);
    expect(body.assumed.join()).toMatch(/r AB/);
    const { body: counts } = await staff.observer.get(`/catalogues/${id}/magnitudes`);
    const facts = { band: 'r', count: 3600, brightest: 16, faintest: 19.5, start: 16 };
    // Counts as many at every magnitude turn over nowhere; what is suggested is never taken for the depth.
    expect(counts.bands[0]).toMatchObject({ ...facts, suggestedDepth: null, depth5Sigma: null });
    expect(counts.bands[0].counts.reduce((a: number, b: number) => a + b)).toBe(3600);
  });

  it('lists the rows put aside, and gives them as CSV with all their cells and the reason', async () => {
    const text = 'id,ra_deg,dec_deg,note\na,10,20,fine\nb,400,20,"=1+1"\nc,10,,"a, b"\n';
    const id = await publish(text, { kind: 'optical' });
    const list = await staff.observer.get(`/catalogues/${id}/sidelined`);
    expect(list.body).toMatchObject({ total: 2, nextCursor: null });
    expect(list.body.items[1]).toMatchObject({ row: 3, line: 4, column: 'dec_deg', value: '' });
    const csv = await staff.observer.get(`/catalogues/${id}/sidelined`, { accept: 'text/csv' });
    expect(csv.headers.get('content-type')).toMatch(/^text\/csv/);
    const [head, first, second] = csv.text.trim().split('\r\n');
    expect(head).toBe('id,ra_deg,dec_deg,note,row_in_file,line_in_file,column_at_fault,reason');
    expect(first).toMatch(/^b,400,20,'=1\+1,2,3,ra_deg,/);
    expect(second).toMatch(/^c,10,,"a, b",3,4,dec_deg,/);
    expect((await staff.observer.get(`/catalogues/${id}/sidelined?format=csv`)).text).toBe(csv.text);
  });

  it('can be removed by a lead, after which its upload can be published again', async () => {
    const survey = await aSurvey(staff.lead, staff.team.id);
    const id = await publish('id,ra_deg,dec_deg\na,10,20\n', { kind: 'hi' }, 'one.csv', survey.id);
    expect((await staff.observer.delete(`/catalogues/${id}`)).status).toBe(403);
    expect((await staff.stranger.get(`/catalogues/${id}`)).status).toBe(404);
    expect((await staff.lead.delete(`/catalogues/${id}`)).status).toBe(204);
    expect((await staff.lead.get(`/catalogues/${id}`)).status).toBe(404);
    expect((await staff.lead.get(`/surveys/${survey.id}/detections`)).body.total).toBe(0);
    const { body } = await staff.lead.get(`/surveys/${survey.id}/intakes`);
    expect(body.items[0]).toMatchObject({ state: 'staged', catalogueId: null });
    expect((await staff.lead.post(`/intakes/${body.items[0].id}/publish`)).status).toBe(202);
  });

  it('leaves nothing behind when its publishing is cancelled', async () => {
    const { text } = manyRows(150_000);
    const survey = await aSurvey(staff.lead, staff.team.id);
    const { body } = await staff.lead.upload(`/surveys/${survey.id}/intakes`, 'many.csv', text, {
      settings: { kind: 'optical' },
    });
    const { jobId } = (await staff.lead.post(`/intakes/${body.id}/publish`)).body;
    expect((await staff.lead.delete(`/jobs/${jobId}`)).status).toBeLessThan(300);
    expect((await jobEnd(staff.lead, jobId)).state).toBe('cancelled');
    expect((await staff.lead.get(`/surveys/${survey.id}/catalogues`)).body.total).toBe(0);
    expect((await staff.lead.get(`/intakes/${body.id}`)).body.state).toBe('staged');
  });
});
