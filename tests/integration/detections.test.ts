import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey, jobEnd } from '../support/builders.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let staff: Awaited<ReturnType<typeof aStaffedSurvey>>;
const list = (query = '') => staff.observer.get(`/surveys/${staff.survey.id}/detections${query}`);
const LINES = ['H1,150,2,3000,10', 'H2,151,2,2000,', ',152,2,1000,30', 'H1,153,2,4000,40'];

beforeAll(async () => {
  app = await startApp();
  staff = await aStaffedSurvey(app);
  const text = `name,ra_deg,dec_deg,cz_kms,dist_mpc\n${LINES.join('\n')}\n`;
  const { body } = await staff.lead.upload(`/surveys/${staff.survey.id}/intakes`, 'hi.csv', text, {
    settings: { kind: 'hi' },
  });
  const { jobId } = (await staff.lead.post(`/intakes/${body.id}/publish`)).body;
  expect((await jobEnd(staff.lead, jobId)).state).toBe('done');
});
afterAll(() => app.close());

describe('detections', () => {
  it('stand in file order under names of their own', async () => {
    const { body } = await list();
    expect(body.items.map(({ name }: { name: string }) => name)).toEqual(['H1', 'H2', '3', 'H1 (row 4)']);
  });

  it('are sorted with what is missing last, paged and searched', async () => {
    const far = await list('?sort=-distanceMpc&limit=3');
    expect(far.body.items.map(({ distanceMpc }: { distanceMpc: number }) => distanceMpc)).toEqual([40, 30, 10]);
    const rest = await list(`?sort=-distanceMpc&limit=3&cursor=${far.body.nextCursor}`);
    expect(rest.body).toMatchObject({ nextCursor: null, total: 4, items: [{ name: 'H2' }] });
    expect((await list('?search=h1')).body.total).toBe(2);
    expect((await list('?search=%25')).body.total).toBe(0);
    expect((await list('?sort=colour')).status).toBe(400);
  });

  it('take a distance with its source and note, say so in the ledger, and give it back', async () => {
    const [{ id }] = (await list()).body.items;
    const change = {
      distanceMpc: 12.5,
      errorMpc: 0.6,
      source: 'TRGB, invented paper',
      note: 'closer than the flow says',
    };
    expect((await staff.observer.patch(`/detections/${id}`, change)).status).toBe(403);
    expect((await staff.stranger.get(`/detections/${id}`)).status).toBe(404);
    expect((await staff.reviewer.patch(`/detections/${id}`, { ...change, note: ' ' })).status).toBe(400);
    expect((await staff.reviewer.patch(`/detections/${id}`, { ...change, source: '' })).status).toBe(400);
    const changed = await staff.reviewer.patch(`/detections/${id}`, change);
    expect(changed.body).toMatchObject({
      distanceMpc: 12.5,
      distanceErrorMpc: 0.6,
      distanceOverride: { source: change.source, by: 'A reviewer' },
    });
    expect((await list()).body.items[0].distanceMpc).toBe(12.5);
    const ledger = await staff.observer.get(`/surveys/${staff.survey.id}/ledger`);
    expect(ledger.body.items[0]).toMatchObject({
      action: 'distance replaced',
      subject: 'H1',
      note: change.note,
      detail: { before: { distanceMpc: 10 }, after: { distanceMpc: 12.5 } },
    });
    const back = await staff.lead.patch(`/detections/${id}`, { distanceMpc: null, note: 'the paper was withdrawn' });
    expect(back.body).toMatchObject({ distanceMpc: 10, distanceOverride: null });
  });

  it('are handed out as positions with a radius for an archive, as CSV or VOTable', async () => {
    const path = `/surveys/${staff.survey.id}/positions`;
    const csv = await staff.observer.get(`${path}?radiusArcsec=90`);
    expect(csv.status, csv.text).toBe(200);
    expect(csv.text.trim().split(/\r?\n/)).toEqual([
      'name,ra,dec,radius',
      'H1,150,2,90',
      'H2,151,2,90',
      '3,152,2,90',
      'H1 (row 4),153,2,90',
    ]);
    const votable = await staff.observer.get(`${path}?radiusArcsec=90&format=votable`);
    expect(votable.text).toContain('<TR><TD>H2</TD><TD>151</TD><TD>2</TD><TD>90</TD></TR>');
    expect((await staff.observer.get(path)).status).toBe(400);
    expect((await staff.stranger.get(`${path}?radiusArcsec=90`)).status).toBe(404);
  });
});
