import type { Preview } from '@eremite/shared/contracts/preview';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aCatalogue, aRun, aScreenedSurvey, SETTINGS, someCriteria } from '../support/builders/small-survey.ts';
import type { Client } from '../support/client.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
});
afterAll(() => app.close());
const ids = (...names: string[]) => names.map((name) => screened.items[name]!.detectionId);
const ask = (request: object, client: Client = screened.lead) =>
  client.post(`/surveys/${screened.surveyId}/preview`, request);
const shown = (item: object) => ({ ...item, robustness: null });

describe('a preview', () => {
  it('under the criteria of a run says what the run says, to the last digit', async () => {
    const names = ['S01', 'S06', 'S07', 'S12'];
    const { body, status, text } = await ask({ settings: SETTINGS, detectionIds: ids(...names) });
    expect(status, text).toBe(200);
    const preview = body as Preview;
    expect(preview.items.map((item) => item.verdict.name)).toEqual(names);
    for (const { before, verdict, ...detail } of preview.items) {
      expect(shown(verdict)).toEqual(shown(screened.items[verdict.name]!));
      expect(before).toEqual(screened.items[verdict.name]);
      const stored = await screened.lead.get(`/runs/${screened.run.id}/detections/${verdict.detectionId}`);
      const { runId: _, runNumber: __, criteriaNumber: ___, verdict: ____, ...expected } = stored.body;
      expect(detail).toEqual(expected);
    }
    expect(preview.basedOn).toMatchObject({ number: 1 });
    expect(preview.notes.join(' ')).toMatch(/run 1 learnt/);
  });

  it('under other criteria says what a run under them would, and keeps nothing', async () => {
    const settings = { ...SETTINGS, surroundings: { radiusMpc: 0.02 }, position: { searchRadiusArcsec: 2.5 } };
    const before = (await screened.lead.get(`/surveys/${screened.surveyId}/ledger`)).body.total;
    const { body } = await ask({ settings, detectionIds: ids('S06', 'S07') });
    const [s06, s07] = (body as Preview).items;
    expect(s06).toMatchObject({ candidates: [], searchRadiusArcsec: 2.5, before: { starlight: 'contested' } });
    expect([s07!.before!.surroundings, s07!.verdict.surroundings]).toEqual(['accompanied', 'alone']);
    expect((await screened.lead.get(`/surveys/${screened.surveyId}/ledger`)).body.total).toBe(before);
    expect((await screened.lead.get(`/surveys/${screened.surveyId}/runs`)).body.total).toBe(1);
    const criteria = await someCriteria(screened.lead, screened.surveyId, settings);
    const run = await aRun(screened.lead, screened.surveyId, criteria.id);
    const later = await screened.lead.get(`/runs/${run.id}/detections/${ids('S07')[0]}`);
    expect(shown(s07!.verdict)).toEqual(shown(later.body.verdict));
  });

  it('of some catalogues leaves the others out', async () => {
    const { hi, redshifts } = screened.catalogues;
    const { body } = await ask({ settings: SETTINGS, detectionIds: ids('S01'), catalogueIds: [hi, redshifts] });
    expect(body.items[0]).toMatchObject({ candidates: [], verdict: { starlight: 'cannot tell' } });
    const without = await ask({ detectionIds: ids('S01'), catalogueIds: [redshifts] });
    expect([without.status, without.body.errors[0].pointer]).toEqual([400, '/catalogueIds']);
  });

  it('takes a word given since the run into account', async () => {
    const word = { catalogueId: screened.catalogues.deep, rowId: 2, action: 'reject', note: 'a star spike' };
    await screened.reviewer.post(`/detections/${ids('S02')[0]}/overrides`, word);
    const { body } = await ask({ settings: SETTINGS, detectionIds: ids('S02') });
    expect(body.items[0]).toMatchObject({
      verdict: { starlight: 'dark', overrides: 1 },
      candidates: [{ name: 'd2', override: 'reject' }],
    });
  });

  it('reads of a table too large to read whole only what is near, and says so', async () => {
    // 210,000 rows on a grid over 30 by 20 degrees, none within 20 arcsec of a detection.
    const lines = ['id,ra,dec,rmag'];
    for (let i = 0; i < 600; i++) {
      for (let j = 0; j < 350; j++) {
        lines.push(
          `g${i}-${j},${(140.025 + i * 0.05).toFixed(3)},${(-6.97 + j * 0.057).toFixed(3)},${18 + ((i + j) % 50) / 10}`,
        );
      }
    }
    const text = lines.join('\n');
    const settings = {
      kind: 'optical',
      name: 'large',
      columns: { name: 'id', ra: 'ra', dec: 'dec', magnitudes: [{ column: 'rmag', band: 'r' }] },
      frame: 'icrs',
      positionErrorArcsec: 0.2,
      bands: [{ name: 'r', system: 'AB', depth5Sigma: 24, seeingFwhmArcsec: 1, extinction: 'none' }],
      footprint: { type: 'rows' },
    };
    await aCatalogue(screened.lead, screened.surveyId, { name: 'large.csv', text, settings });
    const { body, text: answer } = await ask({ settings: SETTINGS, detectionIds: ids('S01', 'S09') });
    expect(body.items, answer).toHaveLength(2);
    expect(body.notes.join(' ')).toMatch(/Of large only the parts of the sky near/);
    const [s01, s09] = (body as Preview).items;
    expect([s01!.verdict.starlight, s09!.verdict.starlight]).toEqual(['starlit', 'dark']);
    expect(s01!.limits.map(({ catalogueName }) => catalogueName)).toContain('large');
  });

  it('is for leads and reviewers, of at most twenty detections of the survey', async () => {
    const request = { detectionIds: ids('S01') };
    expect((await ask(request, screened.reviewer)).status).toBe(200);
    expect((await ask(request, screened.observer)).status).toBe(403);
    expect((await ask(request, screened.stranger)).status).toBe(404);
    expect((await ask(request, app.client())).status).toBe(401);
    expect((await ask({ detectionIds: [screened.surveyId] })).status).toBe(404);
    expect((await ask({ detectionIds: [] })).status).toBe(400);
    const many = Array.from({ length: 21 }, () => ids('S01')[0]);
    expect((await ask({ detectionIds: many })).status).toBe(400);
    const wrong = await ask({ settings: { absence: { darkProbability: 2 } }, detectionIds: ids('S01') });
    expect(wrong.body.errors[0].pointer).toBe('/settings/absence/darkProbability');
  });
});
