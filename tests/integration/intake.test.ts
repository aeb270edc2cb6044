import { gzipSync } from 'node:zlib';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey, aSurvey, jobEnd } from '../support/builders.ts';
import type { Client } from '../support/client.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let staff: Awaited<ReturnType<typeof aStaffedSurvey>>;
beforeAll(async () => {
  app = await startApp();
  staff = await aStaffedSurvey(app);
});
afterAll(() => app.close());

const HI = [
  'name,ra_deg,dec_deg,cz_kms,w50_kms,flux_jykms,snr,dist_mpc',
  'H1,150.1,2.1,3000,90,2.5,12,40',
  'H2,400,2.2,3100,80,1.5,9,41',
  'H3,150.3,95,3200,70,1.2,8,42',
  'H4,150.4,2.4,,60,1.1,7,',
  'H5,150.5,-0.00001,bad,50,1,6,44',
].join('\n');
const hiSettings = { kind: 'hi', columns: { ra: 'ra_deg', dec: 'dec_deg' }, beamArcsec: { major: 210, minor: 210 } };
const upload = (
  content: string | Uint8Array,
  settings?: object,
  name = 'table.csv',
  client: Client = staff.lead,
  survey = staff.survey.id,
) => client.upload(`/surveys/${survey}/intakes`, name, content, settings ? { settings } : {});
async function publish(intakeId: string, client: Client = staff.lead) {
  const accepted = await client.post(`/intakes/${intakeId}/publish`);
  expect(accepted.status, accepted.text).toBe(202);
  return jobEnd(client, accepted.body.jobId);
}

describe('an upload', () => {
  it('is answered with format, columns, guesses, preview and what would be put aside', async () => {
    const { status, body, text } = await upload(HI, hiSettings);
    expect(status, text).toBe(201);
    expect(body).toMatchObject({ format: 'csv', rows: 5, state: 'staged', catalogueId: null });
    expect(body.tables).toEqual([{ index: 0, name: expect.any(String), rows: 5, columns: 8 }]);
    expect(body.columns[3]).toMatchObject({ name: 'cz_kms', guess: 'velocity' });
    expect(body.columns[3].confidence).toBeGreaterThan(0.9);
    expect(body.preview[0]).toEqual(['H1', '150.1', '2.1', '3000', '90', '2.5', '12', '40']);
    expect(body.check).toMatchObject({ usable: 3, sidelined: 2, leftOut: 0, ready: true });
    expect(body.check.reasons[0].first[0]).toMatchObject({ row: 2, line: 3, column: 'ra_deg', value: '400' });
    expect(body.settings.columns).toMatchObject({ velocity: 'cz_kms', width50: 'w50_kms', flux: 'flux_jykms' });
  });

  it('is taken in whatever it holds, if it can be read: no rows, no position, gzipped, of several tables', async () => {
    const empty = await upload('ra,dec\n');
    expect([empty.status, empty.body.rows]).toEqual([201, 0]);
    const colours = await upload('name,colour\na,red\nb,blue\n', { kind: 'optical' });
    expect([colours.status, colours.body.rows, colours.body.check.ready]).toEqual([201, 2, false]);
    expect(colours.body.check.questions.map((q: { pointer: string }) => q.pointer)).toContain('/columns/ra');
    const zipped = await upload(gzipSync(HI), hiSettings, 'hi.csv.gz');
    expect([zipped.status, zipped.body.rows]).toEqual([201, 5]);
    const table = (name: string, row: string) =>
      `<TABLE name="${name}"><FIELD name="ra" datatype="double" unit="deg"/><FIELD name="dec" datatype="double" unit="deg"/><DATA><TABLEDATA>${row}</TABLEDATA></DATA></TABLE>`;
    const row = '<TR><TD>10</TD><TD>20</TD></TR>';
    const two = await upload(
      `<VOTABLE version="1.4"><RESOURCE>${table('one', row)}${table('two', row + row)}</RESOURCE></VOTABLE>`,
      { table: 1 },
    );
    expect(two.body.tables.map(({ name, columns }: { name: string; columns: number }) => [name, columns])).toEqual([
      ['one', 2],
      ['two', 2],
    ]);
    expect(two.body.rows).toBe(2);
  });

  it.each([
    ['an empty file', '', /empty/i],
    ['no table', Buffer.from([0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10, 0, 0, 0, 13]), /./],
    ['a VOTable cut in its head', '<VOTABLE version="1.4"><RESOURCE><TABLE><FIELD name="ra" data', /./],
    ['a FITS header that promises ten gigabytes', fitsOfTenGigabytes(), /./],
  ])('of %s is refused with one clear message and not kept', async (_, content, message) => {
    const before = (await staff.lead.get(`/surveys/${staff.survey.id}/intakes`)).body.total;
    const { status, body } = await upload(content);
    expect(status).toBe(422);
    expect(body.type).toBe('urn:eremite:error:table-unreadable');
    expect(body.detail).toMatch(message);
    expect(body.detail.length).toBeGreaterThan(20);
    expect((await staff.lead.get(`/surveys/${staff.survey.id}/intakes`)).body.total).toBe(before);
  });

  it('without its file, or with settings that are no settings, is refused with the place', async () => {
    const form = await staff.lead.post(`/surveys/${staff.survey.id}/intakes`, {});
    expect([form.status, form.body.errors?.[0]?.pointer]).toEqual([400, '/file']);
    const odd = await upload(HI, { kind: 'hi', colums: {} });
    expect(odd.status).toBe(400);
    expect(odd.body.detail).toMatch(/colums/);
  });

  it('is for leads; others are refused, strangers see nothing', async () => {
    expect((await upload(HI, hiSettings, 'a.csv', staff.observer)).status).toBe(403);
    expect((await upload(HI, hiSettings, 'a.csv', staff.reviewer)).status).toBe(403);
    expect((await upload(HI, hiSettings, 'a.csv', staff.stranger)).status).toBe(404);
    expect((await upload(HI, hiSettings, 'a.csv', app.client())).status).toBe(401);
    const { body } = await upload(HI, hiSettings);
    expect((await staff.stranger.get(`/intakes/${body.id}`)).status).toBe(404);
    expect((await staff.observer.get(`/intakes/${body.id}`)).status).toBe(200);
    expect((await staff.observer.post(`/intakes/${body.id}/publish`)).status).toBe(403);
  });

  it('names a column that is not there and what is near, and keeps the settings it had', async () => {
    const { body } = await upload(HI, hiSettings);
    const wrong = await staff.lead.patch(`/intakes/${body.id}`, {
      settings: { ...hiSettings, columns: { ra: 'ra_degr', dec: 'dec_deg' } },
    });
    expect(wrong.status).toBe(422);
    expect(wrong.body.errors[0]).toMatchObject({ pointer: '/columns/ra' });
    expect(wrong.body.detail).toMatch(/no column "ra_degr".*"ra_deg"/);
    const changed = await staff.lead.patch(`/intakes/${body.id}`, {
      settings: { ...hiSettings, columns: { ra: 'ra_deg', dec: 'dec_deg', velocity: null } },
    });
    expect(changed.status, changed.text).toBe(200);
    expect(changed.body.settings.columns.velocity).toBeNull();
  });

  it('cannot be published before its questions are answered', async () => {
    const hours = `id,ra,dec\n${Array.from({ length: 30 }, (_, i) => `${i},${i / 2},5`).join('\n')}\n`;
    const { body } = await upload(hours, { kind: 'optical' });
    const refused = await staff.lead.post(`/intakes/${body.id}/publish`);
    expect([refused.status, refused.body.errors?.[0]?.pointer]).toEqual([422, '/units/ra']);
    const answered = await staff.lead.patch(`/intakes/${body.id}`, {
      settings: { kind: 'optical', units: { ra: 'h' } },
    });
    expect(answered.body.check.ready).toBe(true);
    const useless = await upload('ra_deg,dec_deg\n400,95\n', {
      kind: 'optical',
      columns: { ra: 'ra_deg', dec: 'dec_deg' },
    });
    expect((await staff.lead.post(`/intakes/${useless.body.id}/publish`)).body.type).toBe(
      'urn:eremite:error:nothing-to-publish',
    );
  });

  it('can be discarded', async () => {
    const { body } = await upload(HI, hiSettings);
    expect((await staff.lead.delete(`/intakes/${body.id}`)).status).toBe(204);
    expect((await staff.lead.get(`/intakes/${body.id}`)).status).toBe(404);
  });
});

describe('publishing', () => {
  it('gives a catalogue, detections, the rows put aside, and a line in the ledger', async () => {
    const survey = await aSurvey(staff.lead, staff.team.id);
    const { body } = await upload(HI, hiSettings, 'hi.csv', staff.lead, survey.id);
    const job = await publish(body.id);
    expect(job).toMatchObject({ state: 'done', progress: 1, result: { rows: 3, sidelined: 2 } });
    const catalogue = await staff.observer.get(`/catalogues/${job.result.catalogueId}`);
    expect(catalogue.status, catalogue.text).toBe(200);
    expect(catalogue.body).toMatchObject({
      kind: 'hi',
      state: 'published',
      rows: 3,
      sidelined: 2,
      withVelocity: 1,
      usedByRuns: 0,
    });
    expect(catalogue.body.assumed.join()).toMatch(/ICRS/);
    const { body: found } = await staff.observer.get(`/surveys/${survey.id}/detections`);
    expect(found.total).toBe(3);
    expect(found.items[0]).toMatchObject({
      name: 'H1',
      row: 1,
      raDeg: 150.1,
      velocityKms: 3000,
      distanceMpc: 40,
      distanceOverride: null,
    });
    expect(found.items[1]).toMatchObject({ name: 'H4', row: 4, velocityKms: null, distanceMpc: null });
    expect(found.items[2].decDeg).toBe(-0.00001);
    const ledger = await staff.observer.get(`/surveys/${survey.id}/ledger`);
    expect(ledger.body.items[0]).toMatchObject({ action: 'catalogue published', detail: { rows: 3, sidelined: 2 } });
    expect((await staff.lead.post(`/intakes/${body.id}/publish`)).status).toBe(409);
  });

  it('remembers settings for a table with the same columns and warns of the same content', async () => {
    const survey = await aSurvey(staff.lead, staff.team.id);
    const settings = { ...hiSettings, velocity: { convention: 'radio', frame: 'lsrk' } };
    const first = await upload(HI, settings, 'first.csv', staff.lead, survey.id);
    await publish(first.body.id);
    const again = await upload(HI, undefined, 'second.csv', staff.lead, survey.id);
    expect(again.body.settings).toMatchObject({ kind: 'hi', velocity: { convention: 'radio', frame: 'lsrk' } });
    expect(again.body.warnings.join('\n')).toMatch(/"first.csv".*same columns[^]*same content: "first.csv"/);
    const other = await upload(`${HI}\nH6,150,2,3000,1,1,1,1`, { kind: 'hi' }, 'third.csv', staff.lead, survey.id);
    expect(other.body.warnings).toEqual([]);
  });

  it('takes sexagesimal positions and keeps the sign of minus zero degrees', async () => {
    const { body } = await upload(
      'id,ra,dec\nA,01:39:30,-00:00:01\nB,01 39 30,+43 28 30\n',
      { kind: 'hi' },
      'sexa.csv',
    );
    const { result } = await publish(body.id);
    const rows = await staff.lead.get(`/catalogues/${result.catalogueId}/rows`);
    expect(rows.body.items[0]).toMatchObject({ row: 1, raDeg: 24.875, cells: ['A', '01:39:30', '-00:00:01'] });
    // Source: -1/3600 degree.
    expect(rows.body.items[0].decDeg).toBeCloseTo(-0.0002777777777777778, 12);
  });
});

function fitsOfTenGigabytes(): Uint8Array {
  const card = (text: string) => text.padEnd(80);
  const block = (cards: string[]) => [...cards, 'END'].map(card).join('').padEnd(2880);
  const primary = block([
    'SIMPLE  =                    T',
    'BITPIX  =                    8',
    'NAXIS   =                    0',
  ]);
  const table = block([
    "XTENSION= 'BINTABLE'",
    'BITPIX  =                    8',
    'NAXIS   =                    2',
    'NAXIS1  =                   16',
    'NAXIS2  =            625000000',
    'PCOUNT  =                    0',
    'GCOUNT  =                    1',
    'TFIELDS =                    2',
    "TTYPE1  = 'RA'",
    "TFORM1  = 'D'",
    "TTYPE2  = 'DEC'",
    "TFORM2  = 'D'",
  ]);
  return Buffer.from(primary + table, 'latin1');
}
