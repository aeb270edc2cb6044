import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { fitsBytes, floats, tanCards } from '@eremite/service/images/testing/fits-bytes.ts';
import { FilesService } from '@eremite/service/modules/files/files.service.ts';
import { gaussianLine } from '@eremite/shared/science/spectrum/line-shapes';
import { randomStream } from '@eremite/shared/science/robustness/random';
import { aMember, aUser } from '../support/builders.ts';
import { aScreenedSurvey } from '../support/builders/small-survey.ts';
import type { Client } from '../support/client.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

type Screened = Awaited<ReturnType<typeof aScreenedSurvey>>;

/** An image of 30 x 30 pixels of 3.6 arcsec about a position. */
const imageOf = (raDeg: number, decDeg: number, fill = 1) =>
  fitsBytes(
    { ...tanCards(30, 30, raDeg, decDeg), FILTER: 'r' },
    floats(Array.from({ length: 900 }, (_, i) => fill + i)),
  );

function spectrumOf(centreKms: number, unit = 'mJy'): string {
  const random = randomStream(4, 'spectrum');
  const lines = Array.from({ length: 160 }, (_, i) => {
    const v = centreKms - 400 + 5 * i;
    const value = gaussianLine(v, { peak: 14, centreKms, sigmaKms: 34 }) + random.gaussian();
    return `${v},${value.toFixed(3)}`;
  });
  return [`cz (km/s),flux (${unit})`, ...lines].join('\n');
}

describe('images and spectra of detections', () => {
  let app: TestApp;
  let all: Screened;
  let lead: Client;
  let survey: string;
  let first: string;

  beforeAll(async () => {
    app = await startApp();
    all = await aScreenedSurvey(app);
    lead = all.lead;
    survey = `/surveys/${all.surveyId}/observations`;
    first = `/detections/${all.items['S01']!.detectionId}/observations`;
  }, 180_000);
  afterAll(() => app.close());

  it('goes with the detection an image shows, by its coordinates', async () => {
    const answer = await lead.upload(survey, 'anything.fits', imageOf(152.001, 2));
    expect(answer.status, answer.text).toBe(201);
    expect(answer.body).toMatchObject({ detectionName: 'S02', label: 'r', spectrum: null, mayDelete: true });
    expect(answer.body.image).toMatchObject({ width: 30, height: 30, projection: 'TAN' });
  });

  it('goes with the detection a spectrum is named after, and the line is measured', async () => {
    const answer = await lead.upload(survey, 'S03_line.csv', spectrumOf(5000));
    expect(answer.status, answer.text).toBe(201);
    expect(answer.body.detectionName).toBe('S03');
    const { measurement } = answer.body.spectrum;
    expect(measurement.peaks).toBe('one');
    expect(Math.abs(measurement.w50Kms.value - 80.06)).toBeLessThan(4 * measurement.w50Kms.error);
    expect(Math.abs(measurement.flux.value - 14 * 34 * 2.5066)).toBeLessThan(4 * measurement.flux.error);
    const channels = await lead.get(`/observations/${answer.body.id}/channels`);
    expect(channels.body.czKms).toHaveLength(160);
    expect(channels.body.fit).toHaveLength(160);
  });

  it('answers values about the detection, and takes the file back out again', async () => {
    const made = (await lead.upload(first, 'a.fits', imageOf(150, 2), { label: 'deep r' })).body;
    expect(made.label).toBe('deep r');
    const answer = await lead.raw('GET', `/observations/${made.id}/raster?halfArcsec=54&pixels=30`);
    const values = new Float32Array(await answer.arrayBuffer());
    expect(values).toHaveLength(900);
    // North-east corner first: the first pixel of the last row of the file.
    expect(values[0]).toBe(1 + 29 * 30);
    const file = await lead.raw('GET', `/observations/${made.id}/file`);
    expect(Buffer.from(await file.arrayBuffer()).equals(imageOf(150, 2))).toBe(true);
  });

  it('refuses an image of another place and says how far off it is, and keeps nothing of it', async () => {
    const usage = () => app.get(FilesService).usage();
    const before = (await usage()).files;
    const answer = await lead.upload(first, 'elsewhere.fits', imageOf(151, 2));
    expect(answer.status).toBe(422);
    expect(answer.body.type).toMatch(/observation-elsewhere/);
    expect(answer.body.detail).toMatch(/S01 lies 60\.0′|S01 lies 1\.0°|S01 lies 59\.\d′/);
    const nowhere = await lead.upload(survey, 'nowhere.fits', imageOf(20, -60));
    expect(nowhere.body.detail).toMatch(/nearest detection, S\d\d, lies \d+\.\d°/);
    expect((await usage()).files).toBe(before);
  });

  it.each<[string, string, string | Buffer, RegExp]>([
    ['a damaged header', 'x.fits', fitsBytes({ ...tanCards(4, 3), BITPIX: 24 }, floats([1])), /BITPIX/],
    ['a billion pixels', 'x.fits', fitsBytes(tanCards(40_000, 25_000), floats([1])), /limit/],
    ['a picture', 'x.png', Buffer.from('89504e470d0a1a0a0000', 'hex'), /picture/],
    ['words', 'S01.txt', 'nothing to see here', /./],
    ['no unit', 'S01.csv', spectrumOf(5000).replace(' (mJy)', ''), /unit/],
  ])('says in one message what is wrong with %s', async (_what, name, bytes, words) => {
    const answer = await lead.upload(first, name, bytes);
    expect(answer.status, answer.text).toBe(422);
    expect(answer.body.type).toMatch(/observation-unreadable/);
    expect(answer.body.detail).toMatch(words);
  });

  it('takes the unit from the form where the file has none, and the same file only once', async () => {
    const text = spectrumOf(5000).replace(' (mJy)', '');
    const answer = await lead.upload(first, 'S01.csv', text, { fluxUnit: 'Jy' });
    expect(answer.body.spectrum.measurement.flux.value).toBeGreaterThan(1e6);
    expect((await lead.upload(first, 'again.csv', text, { fluxUnit: 'Jy' })).status).toBe(409);
  });

  it('is seen by the team alone, added by those who may review, and removed by the lead or its giver', async () => {
    const { client: reviewer } = await aMember(app, all.team.id, 'reviewer');
    const { client: observer } = await aMember(app, all.team.id, 'observer');
    const stranger = await app.signIn((await aUser(app)).email);
    const made = (await reviewer.upload(first, 'mine.fits', imageOf(150, 2, 7))).body;
    expect((await observer.get(first)).body.items.some(({ id }: { id: string }) => id === made.id)).toBe(true);
    expect((await observer.upload(first, 'x.fits', imageOf(150, 2, 8))).status).toBe(403);
    expect((await stranger.get(first)).status).toBe(404);
    expect((await stranger.raw('GET', `/observations/${made.id}/raster?halfArcsec=10&pixels=8`)).status).toBe(404);
    const leads = (await lead.upload(first, 'lead.fits', imageOf(150, 2, 9))).body;
    expect((await reviewer.delete(`/observations/${leads.id}`)).status).toBe(403);
    expect((await observer.delete(`/observations/${made.id}`)).status).toBe(403);
    expect((await reviewer.delete(`/observations/${made.id}`)).status).toBe(204);
    expect((await lead.delete(`/observations/${leads.id}`)).status).toBe(204);
    const ledger = await lead.get(`/surveys/${all.surveyId}/ledger?search=S01&limit=50`);
    const actions = ledger.body.items.map(({ action }: { action: string }) => action);
    expect(actions).toEqual(expect.arrayContaining(['added an image', 'removed an image', 'added a spectrum']));
  });
});
