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

const newSurvey = () => aSurvey(staff.lead, staff.team.id);
const upload = (surveyId: string, name: string, content: string, settings?: object) =>
  staff.lead.upload(`/surveys/${surveyId}/intakes`, name, content, settings ? { settings } : {});
async function publish(intakeId: string): Promise<string> {
  const accepted = await staff.lead.post(`/intakes/${intakeId}/publish`);
  expect(accepted.status, accepted.text).toBe(202);
  const job = await jobEnd(staff.lead, accepted.body.jobId);
  expect(job.state, JSON.stringify(job.error)).toBe('done');
  return job.result.catalogueId;
}
async function published(surveyId: string, name: string, content: string, settings: object): Promise<string> {
  const { body, status, text } = await upload(surveyId, name, content, settings);
  expect(status, text).toBe(201);
  return publish(body.id);
}

const HI = 'name,ra_deg,dec_deg,cz_kms,w50_kms,flux_jykms,snr,dist_mpc\n';
const hiSettings = { kind: 'hi', columns: { ra: 'ra_deg', dec: 'dec_deg' }, beamArcsec: { major: 45, minor: 45 } };

describe('what an upload looks like', () => {
  it('is told with counts of its magnitudes, the depth they suggest, and the region of its rows', async () => {
    const survey = await newSurvey();
    // Counts rise by 10^0.6 a magnitude, as in a static universe of equal galaxies, to a cut at 22.
    const rows = Array.from({ length: 12_000 }, (_, i) => {
      const share = (i + 0.5) / 12_000;
      const mag = 22 + Math.log10(share) / 0.6;
      const [x, y] = [(i * 0.754877666) % 1, (i * 0.569840291) % 1];
      return `g${i},${(150 + x).toFixed(5)},${(2 + y).toFixed(5)},${mag.toFixed(3)}`;
    });
    const { body } = await upload(survey.id, 'r.csv', `id,ra_deg,dec_deg,rmag\n${rows.join('\n')}\n`, {
      kind: 'optical',
    });
    const [band] = body.magnitudes;
    expect(band).toMatchObject({ band: 'r', count: 12_000, depth5Sigma: null });
    expect(band.counts.reduce((sum: number, n: number) => sum + n, 0)).toBe(12_000);
    // Smoothed over three bins of 0.25 mag, a sharp cut is seen a bin and a half early.
    expect(Math.abs(band.suggestedDepth.magnitude - 22)).toBeLessThan(0.4);
    expect(body.coverage.type).toBe('rows');
    expect(Math.abs(body.coverage.areaSqDeg - 1)).toBeLessThan(0.1);
    expect(body.coverage.moc).toMatch(/^\d+\//);
    const patched = await staff.lead.patch(`/intakes/${body.id}`, {
      settings: { ...body.settings, bands: [{ name: 'r', system: 'AB', depth5Sigma: 21.9 }] },
    });
    expect(patched.body.magnitudes[0].depth5Sigma).toBe(21.9);
  });

  it('has no region where its rows are too few to tell, and says why', async () => {
    const survey = await newSurvey();
    const rows = Array.from({ length: 30 }, (_, i) => `g${i},${150 + i},${i - 15},18`).join('\n');
    const { body } = await upload(survey.id, 'r.csv', `id,ra_deg,dec_deg,rmag\n${rows}\n`, { kind: 'optical' });
    expect(body.coverage).toMatchObject({ type: 'unknown', moc: null, areaSqDeg: null });
    expect(body.coverage.note).toMatch(/rows/);
  });

  it('names the pairs that seem one source; a person merges them and keeps apart those that are two', async () => {
    const survey = await newSurvey();
    const list =
      HI +
      [
        'A1,150,2,3000,80,2,12,40',
        'A2,150.002,2,3020,80,2,20,40',
        'B1,160,2,900,80,2,8,12',
        'B2,160.001,2,905,80,2,9,12',
      ].join('\n');
    const { body } = await upload(survey.id, 'hi.csv', list, hiSettings);
    expect(body.duplicates.count).toBe(2);
    expect(body.duplicates.pairs[0]).toMatchObject({
      better: { row: 2, name: 'A2', raDeg: 150.002, velocityKms: 3020, signalToNoise: 20 },
      other: { row: 1, name: 'A1', signalToNoise: 12 },
    });
    // Source: 0.002 degree times cos 2 degrees, in arcsec.
    expect(body.duplicates.pairs[0].separationArcsec).toBeCloseTo(7.1956, 3);
    const merged = await staff.lead.patch(`/intakes/${body.id}`, {
      settings: { ...hiSettings, mergeDuplicates: true, keepApart: [3] },
    });
    expect(merged.body.check).toMatchObject({ usable: 3, sidelined: 1 });
    expect(merged.body.duplicates.count).toBe(2);
    const id = await publish(body.id);
    const { items } = (await staff.observer.get(`/surveys/${survey.id}/detections`)).body;
    expect(items.map(({ name }: { name: string }) => name)).toEqual(['A2', 'B1', 'B2']);
    const aside = await staff.observer.get(`/catalogues/${id}/sidelined`);
    expect(aside.body.items).toMatchObject([{ row: 1, line: 2, value: 'row 2' }]);
  });
});

describe('a catalogue fetched in cones around the detections', () => {
  const galaxies = 'id,ra_deg,dec_deg,rmag,cz\ng1,150.001,2,17,5000\ng2,160,2.01,18,\n';
  const cones = (radiusArcsec: number) => ({
    kind: 'optical',
    bands: [{ name: 'r', system: 'AB', depth5Sigma: 24 }],
    redshiftDepth: { band: 'r', magnitude: 17.8 },
    footprint: { type: 'cones', value: { radiusArcsec } },
  });

  it('covers those cones and nothing else', async () => {
    const survey = await newSurvey();
    const early = await upload(survey.id, 'cones.csv', galaxies, cones(180));
    expect(early.body.check.questions).toContainEqual(
      expect.objectContaining({
        level: 'ask',
        pointer: '/footprint/value',
        text: expect.stringMatching(/HI list first/),
      }),
    );
    await published(survey.id, 'hi.csv', `${HI}A,150,2,5000,80,2,12,70\nB,160,2,5200,80,2,20,72\n`, hiSettings);
    const { body } = await staff.lead.patch(`/intakes/${early.body.id}`, { settings: cones(180) });
    expect(body.check.ready).toBe(true);
    expect(body.settings.footprint).toEqual({ type: 'cones', value: { radiusArcsec: 180 } });
    expect(body.coverage.note).toMatch(/^the 2 cones of 180 arcsec/);
    // Source: area of two small circles of 0.05 degree, pi r^2; the edge is known to a cell.
    expect(body.coverage.areaSqDeg / (2 * Math.PI * 0.05 ** 2)).toBeCloseTo(1, 2);
    const id = await publish(body.id);
    const { body: catalogue } = await staff.observer.get(`/catalogues/${id}`);
    expect(catalogue.coverage.type).toBe('cones');
    expect(catalogue.settings.footprint.value.centres).toEqual([
      [150, 2],
      [160, 2],
    ]);
  });

  it('does not answer for neighbours and shifted positions outside: they cannot be told, which is not zero', async () => {
    const survey = await newSurvey();
    await published(survey.id, 'hi.csv', `${HI}A,150,2,5000,80,2,12,70\nB,160,2,5200,80,2,20,72\n`, hiSettings);
    await published(survey.id, 'cones.csv', galaxies, cones(40));
    const criteria = await staff.lead.post(`/surveys/${survey.id}/criteria`, { settings: {}, note: 'defaults' });
    const started = await staff.lead.post(`/surveys/${survey.id}/runs`, { criteriaId: criteria.body.id });
    expect(started.status, started.text).toBe(202);
    const job = await jobEnd(staff.lead, started.body.jobId);
    expect(job.state, JSON.stringify(job.error)).toBe('done');
    const { body: run } = await staff.observer.get(`/runs/${started.body.runId}`);
    expect(run.control).toBeNull();
    const { items } = (await staff.observer.get(`/runs/${started.body.runId}/verdicts`)).body;
    for (const item of items) {
      expect(item.surroundings).toBe('cannot tell');
      expect(item.grounds.map(({ text }: { text: string }) => text).join(' ')).toMatch(
        /per cent of the neighbour circle is covered/,
      );
    }
    // Inside its cone a detection is searched: the galaxy 4 arcsec off is found.
    expect(items.find(({ name }: { name: string }) => name === 'A').counterpart).toMatchObject({ name: 'g1' });
  });
});

/** A form of several files, in the fields the server knows. */
function form(files: [field: string, name: string, content: string][], settings?: object): FormData {
  const made = new FormData();
  if (settings) made.append('settings', JSON.stringify(settings));
  for (const [field, name, content] of files) made.append(field, new Blob([content]), name);
  return made;
}

describe("a journal's data file", () => {
  const README = [
    'J/XX/1/1   An invented list                              (Nobody, 2026)',
    '================================================================================',
    'Byte-by-byte Description of file: table1.dat',
    '--------------------------------------------------------------------------------',
    '   Bytes Format Units   Label     Explanations',
    '--------------------------------------------------------------------------------',
    '   1-  3  A3    ---     Name      Name of the source',
    '   5-  6  I2    h       RAh       Hour of Right Ascension (J2000)',
    '   8-  9  I2    min     RAm       Minute of Right Ascension (J2000)',
    '  11- 15  F5.2  s       RAs       Second of Right Ascension (J2000)',
    '      17  A1    ---     DE-       Sign of the Declination (J2000)',
    '  18- 19  I2    deg     DEd       Degree of Declination (J2000)',
    '  21- 22  I2    arcmin  DEm       Arcminute of Declination (J2000)',
    '  24- 25  I2    arcsec  DEs       Arcsecond of Declination (J2000)',
    '  27- 30  I4    km/s    cz        ? Velocity',
    '--------------------------------------------------------------------------------',
  ].join('\n');
  const DATA = 'A 1 01 39 30.25 +43 28 30 2464\nB 2 23 59 59.90 -00 00 01     \n';

  it('is read by the ReadMe uploaded with it, and published', async () => {
    const survey = await newSurvey();
    const files: [string, string, string][] = [
      ['readMe', 'ReadMe', README],
      ['file', 'table1.dat', DATA],
    ];
    const { status, body, text } = await staff.lead.request(
      'POST',
      `/surveys/${survey.id}/intakes`,
      form(files, { kind: 'hi' }),
    );
    expect(status, text).toBe(201);
    expect(body).toMatchObject({ format: 'mrt', fileName: 'table1.dat', readMe: 'ReadMe', parts: [], rows: 2 });
    expect(body.columns[8]).toMatchObject({ name: 'cz', unit: 'km/s', guess: 'velocity' });
    expect(body.check).toMatchObject({ usable: 2, ready: true });
    const checked = await staff.lead.patch(`/intakes/${body.id}`, { settings: { ...body.settings, name: 'listed' } });
    expect(checked.body).toMatchObject({ rows: 2, readMe: 'ReadMe' });
    const id = await publish(body.id);
    const { items } = (await staff.observer.get(`/catalogues/${id}/rows`)).body;
    expect(items[0].cells).toEqual(['A 1', '01', '39', '30.25', '+', '43', '28', '30', '2464']);
    // Source: 15 (1 + 39/60 + 30.25/3600) and -1/3600 degrees.
    expect(items[0].raDeg).toBeCloseTo(24.876041666666666, 10);
    expect(items[1].decDeg).toBeCloseTo(-1 / 3600, 12);
  });

  it('is refused clearly where the ReadMe describes another file, and a ReadMe alone where its data are missing', async () => {
    const survey = await newSurvey();
    const post = (files: [string, string, string][]) =>
      staff.lead.request('POST', `/surveys/${survey.id}/intakes`, form(files));
    const two = README.replace('file: table1.dat', 'file: table2.dat');
    const other = await post([
      ['readMe', 'ReadMe', `${README}\n${two.slice(two.indexOf('Byte-by-byte'))}`],
      ['file', 'table7.dat', DATA],
    ]);
    expect([other.status, other.body.type]).toEqual([422, 'urn:eremite:error:table-unreadable']);
    expect(other.body.detail).toMatch(/describes table1.dat, table2.dat, but not table7.dat/);
    const alone = await post([['file', 'ReadMe', README + '\n(End)\n']]);
    expect(alone.body.detail).toMatch(/data file/);
    const bare = await post([['readMe', 'ReadMe', README]]);
    expect([bare.status, bare.body.errors?.[0]?.pointer]).toEqual([400, '/file']);
  });
});

describe('a catalogue of several files', () => {
  const settings = {
    kind: 'optical',
    bands: [{ name: 'r', system: 'AB', depth5Sigma: 23 }],
    footprint: { type: 'circles', value: [[150, 2, 0.2]] },
  };
  const first = 'id,ra_deg,dec_deg,rmag\na1,150,2,18\na2,150.1,2,19\na2,150.1,2,19\n';
  // The second tile has its columns in another order, names that are numbers, and one row of the overlap.
  const second = 'rmag,id,dec_deg,ra_deg\n19.01,7,2.00002,150.10001\n20,8,2,150.2\n,,95,1\n';
  const create = async (surveyId: string, parts: [string, string][], more: object = {}) =>
    staff.lead.request(
      'POST',
      `/surveys/${surveyId}/intakes`,
      form(
        parts.map(([name, content]) => ['file', name, content]),
        { ...settings, ...more },
      ),
    );

  it('is one table with its rows numbered on, without what the files have in common', async () => {
    const survey = await newSurvey();
    const { status, body, text } = await create(survey.id, [
      ['tile1.csv', first],
      ['tile2.csv', second],
    ]);
    expect(status, text).toBe(201);
    expect(body.parts).toMatchObject([
      { fileName: 'tile1.csv', firstRow: 1, rows: 3 },
      { fileName: 'tile2.csv', firstRow: 4, rows: 3 },
    ]);
    // Two equal rows of one file stay: only what another file has is an overlap.
    expect(body.check).toMatchObject({ rows: 6, usable: 4, sidelined: 2, ready: true });
    expect(body.check.questions.map(({ text: said }: { text: string }) => said).join('\n')).toMatch(
      /One row lies within 0.5 arcsec of a row of an earlier part/,
    );
    const id = await publish(body.id);
    const { body: rows } = await staff.observer.get(`/catalogues/${id}/rows`);
    expect(rows.items.map(({ row, cells }: { row: number; cells: string[] }) => [row, ...cells])).toEqual([
      [1, 'a1', '150', '2', '18'],
      [2, 'a2', '150.1', '2', '19'],
      [3, 'a2', '150.1', '2', '19'],
      [5, '8', '150.2', '2', '20'],
    ]);
    const { body: aside } = await staff.observer.get(`/catalogues/${id}/sidelined`);
    expect(aside.items).toMatchObject([
      { row: 4, line: 2, value: 'row 2', reason: expect.stringMatching(/earlier part/) },
      { row: 6, line: 4, column: 'dec_deg', value: '95' },
    ]);
    const { body: catalogue } = await staff.observer.get(`/catalogues/${id}`);
    expect(catalogue.parts.map(({ fileName, rows: n }: { fileName: string; rows: number }) => [fileName, n])).toEqual([
      ['tile1.csv', 3],
      ['tile2.csv', 3],
    ]);
    expect(new Set(catalogue.parts.map(({ sha256 }: { sha256: string }) => sha256)).size).toBe(2);
  });

  it('grows and shrinks by a part, and can keep its overlaps', async () => {
    const survey = await newSurvey();
    const { body } = await create(survey.id, [['tile1.csv', first]]);
    expect(body.parts).toEqual([]);
    const add = (files: [string, string][]) =>
      staff.lead.request(
        'POST',
        `/intakes/${body.id}/parts`,
        form(files.map(([name, content]) => ['file', name, content])),
      );
    const grown = await add([['tile2.csv', second]]);
    expect(grown.status, grown.text).toBe(201);
    expect(grown.body.check).toMatchObject({ rows: 6, usable: 4 });
    const all = await staff.lead.patch(`/intakes/${body.id}`, { settings: { ...settings, overlapArcsec: 0 } });
    expect(all.body.check).toMatchObject({ rows: 6, usable: 5 });
    const wrong = await add([['stars.csv', 'id,ra_deg,dec_deg,gmag\ns,1,2,3\n']]);
    expect([wrong.status, wrong.body.type]).toEqual([422, 'urn:eremite:error:table-unreadable']);
    expect(wrong.body.detail).toMatch(
      /"stars.csv" does not have the columns of "tile1.csv": it lacks rmag; it also has gmag/,
    );
    const shrunk = await staff.lead.delete(`/intakes/${body.id}/parts/1`);
    expect(shrunk.body).toMatchObject({ parts: [], check: { rows: 3 } });
    expect((await staff.lead.delete(`/intakes/${body.id}/parts/1`)).status).toBe(404);
    expect((await staff.reviewer.delete(`/intakes/${body.id}/parts/1`)).status).toBe(403);
    expect((await staff.stranger.delete(`/intakes/${body.id}/parts/1`)).status).toBe(404);
  });

  it('says which of its files breaks off, and reads the ones after it', async () => {
    const survey = await newSurvey();
    const votable = (rows: string, end = '</TABLEDATA></DATA></TABLE></RESOURCE></VOTABLE>') =>
      `<?xml version="1.0"?><VOTABLE version="1.4"><RESOURCE><TABLE><FIELD name="ra_deg" datatype="double" unit="deg"/><FIELD name="dec_deg" datatype="double" unit="deg"/><DATA><TABLEDATA>${rows}${end}`;
    const row = (ra: number) => `<TR><TD>${ra}</TD><TD>2</TD></TR>`;
    const { body, status, text } = await create(
      survey.id,
      [
        ['a.vot', votable(row(150))],
        ['b.vot', votable(row(151) + row(152), '<TR><TD>15')],
        ['c.vot', votable(row(153))],
      ],
      { bands: [], columns: { ra: 'ra_deg', dec: 'dec_deg' } },
    );
    expect(status, text).toBe(201);
    expect(body.check).toMatchObject({ rows: 4, usable: 4, ready: false });
    const [asked] = body.check.questions.filter(({ level }: { level: string }) => level === 'ask');
    expect(asked.pointer).toBe('/acceptTruncated');
    expect(asked.text).toMatch(/"b.vot": /);
  });
});
