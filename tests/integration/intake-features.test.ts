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
    expect(aside.body.items).toMatchObject([{ row: 1, line: 2, reason: 'same source as row 2' }]);
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
