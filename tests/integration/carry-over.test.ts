import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
  aCatalogue,
  aRun,
  aScreenedSurvey,
  DEEP_TABLE,
  HI_TABLE,
  ledgerOf,
  verdictsOf,
} from '../support/builders/small-survey.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
const idOf = (name: string) => screened.items[name]!.detectionId;
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
});
afterAll(() => app.close());

interface DocketItem {
  name: string;
  reviews: number;
  moved: { what: string; from: string; to: string; by: number | null; unit: string }[];
}
const docket = async (query = '') => {
  const answer = await screened.reviewer.get(`/surveys/${screened.surveyId}/docket?${query}`);
  expect(answer.status, answer.text).toBe(200);
  return answer.body.items as DocketItem[];
};

describe('after a run with one distance replaced', () => {
  const names = ['S01', 'S02', 'S07', 'S08'];

  it('the words whose evidence stands are kept, and exactly the moved one comes back, with what moved and by how much', async () => {
    const { reviewer, lead, surveyId, run, criteria } = screened;
    for (const name of names) {
      const { starlight, surroundings } = screened.items[name]!;
      const word = { runId: run.id, starlight, surroundings };
      expect((await reviewer.post(`/detections/${idOf(name)}/reviews`, word)).status).toBe(201);
    }
    for (const name of ['S02', 'S07']) {
      const { starlight, surroundings } = screened.items[name]!;
      const settled = { runId: run.id, starlight, surroundings, note: 'so be it' };
      expect((await lead.post(`/detections/${idOf(name)}/settlements`, settled)).status).toBe(204);
    }
    const distance = { distanceMpc: 31, errorMpc: 2, source: 'tip of the red giant branch', note: 'measured' };
    expect((await lead.patch(`/detections/${idOf('S07')}`, distance)).status).toBe(200);

    const later = await aRun(lead, surveyId, criteria.id);
    const back = await docket('returned=yes');
    expect(back.map(({ name }) => name)).toEqual(['S07']);
    const before = screened.items['S07']!.distanceMpc!;
    const moved = back[0]!.moved.find(({ what }) => what === 'distance')!;
    expect(moved).toMatchObject({ from: before.toFixed(1), to: '31.0', unit: 'Mpc' });
    expect(moved.by).toBeCloseTo(31 - before, 6);
    expect((await docket('state=done')).map(({ name }) => name).sort()).toEqual(['S01', 'S02', 'S08']);
    expect((await docket('sort=returned'))[0]!.name).toBe('S07');

    const items = await verdictsOf(lead, later.id);
    expect(items['S02']!.settled).toMatchObject({ stands: true });
    expect(items['S07']!.settled).toMatchObject({ stands: false, note: 'so be it' });
    expect([items['S01']!.reviews, items['S07']!.reviews]).toEqual([1, 0]);
    const { settlement } = (await lead.get(`/detections/${idOf('S07')}/settlements`)).body;
    expect(settlement.moved.map(({ what }: { what: string }) => what)).toContain('distance');
    const [line] = await ledgerOf(lead, surveyId);
    expect(line).toMatchObject({
      action: 'carried decisions over',
      detail: { reviews: { kept: 3, returned: 1 }, settlements: { kept: 1, returned: 1 } },
    });
    const { items: mine } = (await reviewer.get(`/detections/${idOf('S07')}/reviews`)).body;
    expect(mine[0].returned).toMatchObject({ runNumber: 2 });
  });

  it('the difference of the runs names the input that did it', async () => {
    const { lead, surveyId, run } = screened;
    const { items } = (await lead.get(`/surveys/${surveyId}/runs`)).body;
    const { body } = await lead.get(`/runs/${items[0].id}/difference?from=${run.id}`);
    const change = `distance replaced: the table’s -> 31.0 Mpc (tip of the red giant branch)`;
    expect(body.decisionsChanged).toEqual([{ detectionId: idOf('S07'), name: 'S07', change }]);
    const moved = body.changed.find(({ name }: { name: string }) => name === 'S07');
    if (moved) expect(moved.causes).toEqual([change]);
    for (const other of body.changed.filter(({ name }: { name: string }) => name !== 'S07'))
      expect(other.causes).toEqual(['words on other detections, through what the run learnt']);
  });

  it('a word given on the earlier run from a stale page is held to the latest at once', async () => {
    const { reviewer, run } = screened;
    const say = (name: string) => {
      const { starlight, surroundings } = screened.items[name]!;
      return reviewer.post(`/detections/${idOf(name)}/reviews`, { runId: run.id, starlight, surroundings });
    };
    expect((await say('S09')).body).toMatchObject({ runNumber: 1, carriedTo: 2, returned: null });
    expect((await say('S07')).body).toMatchObject({ carriedTo: null, returned: { runNumber: 2 } });
  });

  it('a new word on the moved one settles it: it comes back no more', async () => {
    const { reviewer, lead, surveyId } = screened;
    const { items } = (await lead.get(`/surveys/${surveyId}/runs`)).body;
    const now = (await verdictsOf(lead, items[0].id))['S07']!;
    const word = { runId: items[0].id, starlight: now.starlight, surroundings: now.surroundings };
    expect((await reviewer.post(`/detections/${idOf('S07')}/reviews`, word)).status).toBe(201);
    await lead.post(`/detections/${idOf('S07')}/settlements`, { ...word, note: 'again' });
    expect(await docket('returned=yes')).toEqual([]);
  });
});

describe('a new version of a table', () => {
  it('takes words along by name and position, and asks where it cannot tell', async () => {
    const { lead, reviewer, surveyId, catalogues, criteria } = screened;
    const reject = (name: string, rowId: number) =>
      reviewer.post(`/detections/${idOf(name)}/overrides`, {
        catalogueId: catalogues.deep,
        rowId,
        action: 'reject',
        note: `row ${rowId} is a star`,
      });
    expect((await reject('S01', 1)).status).toBe(201);
    expect((await reject('S03', 3)).status).toBe(201);
    // A row goes before the others, so that all row numbers move; d3 is renamed and has a twin beside it.
    const [head, ...rows] = DEEP_TABLE.text.trim().split('\n');
    const d3 = rows.findIndex((row) => row.startsWith('d3,'));
    const [, ra, dec, mag] = rows[d3]!.split(',');
    rows[d3] = `x3a,${ra},${dec},${mag}`;
    rows.splice(d3 + 1, 0, `x3b,${ra},${Number(dec) + 0.5 / 3600},${mag}`);
    const text = [head, 'first,140,-5,20', ...rows].join('\n') + '\n';
    const settings = { ...DEEP_TABLE.settings, name: 'small deep, second edition', supersedes: catalogues.deep };
    const deep = await aCatalogue(lead, surveyId, { name: 'deep-2.csv', text, settings });

    const overrides = async (name: string) =>
      (await reviewer.get(`/detections/${idOf(name)}/overrides`)).body.items as {
        catalogueId: string;
        rowId: number;
        objectName: string;
        carried: boolean;
      }[];
    const ofNew = (list: Awaited<ReturnType<typeof overrides>>) => list.filter((item) => item.catalogueId === deep);
    expect(ofNew(await overrides('S01'))).toMatchObject([{ rowId: 2, objectName: 'd1', carried: true }]);
    expect(ofNew(await overrides('S03'))).toEqual([]);
    const { items: asked } = (await reviewer.get(`/surveys/${surveyId}/bindings`)).body;
    expect(asked).toMatchObject([
      { kind: 'object', name: 'd3', catalogueName: settings.name, words: ['rejected as counterpart by A reviewer'] },
    ]);
    expect(asked[0].candidates.map(({ name }: { name: string }) => name).sort()).toEqual(['x3a', 'x3b']);

    const answer = (client: typeof lead, row: number | null) =>
      client.post(`/bindings/${asked[0].id}/answer`, { row, note: 'the southern one' });
    expect((await answer(screened.observer, 4)).status).toBe(403);
    expect((await answer(screened.stranger, 4)).status).toBe(404);
    expect((await answer(reviewer, 99)).status).toBe(404);
    expect((await answer(reviewer, 4)).status).toBe(204);
    expect((await answer(reviewer, 4)).status).toBe(409);
    expect(ofNew(await overrides('S03'))).toMatchObject([{ rowId: 4, objectName: 'x3a', carried: true }]);
    const run = await aRun(lead, surveyId, criteria.id);
    const items = await verdictsOf(lead, run.id);
    expect(items['S01']).toMatchObject({ starlight: 'dark', counterpart: null });
  });

  it('of the HI list keeps what was said of its detections', async () => {
    const { lead, reviewer, surveyId, catalogues, criteria } = screened;
    // In another order; S02 has a new name; S08 stands 10 arcsec further north; S12 is gone.
    const [head, ...rows] = HI_TABLE.text.trim().split('\n');
    const changed = rows
      .filter((row) => !row.startsWith('S12,'))
      .reverse()
      .map((row) => {
        const [name, ra, dec, ...rest] = row.split(',');
        const at = name === 'S08' ? Number(dec) + 10 / 3600 : dec;
        return [name === 'S02' ? 'H0203' : name, ra, at, ...rest].join(',');
      });
    const settings = { ...HI_TABLE.settings, name: 'small HI list, second edition', supersedes: catalogues.hi };
    await aCatalogue(lead, surveyId, { name: 'hi-2.csv', text: [head, ...changed].join('\n') + '\n', settings });
    expect((await reviewer.get(`/surveys/${surveyId}/bindings`)).body.items).toEqual([]);
    const before = (await lead.get(`/surveys/${surveyId}/runs`)).body.items[0];
    const run = await aRun(lead, surveyId, criteria.id);
    expect(run.number).toBe(before.number + 1);
    const items = await verdictsOf(lead, run.id);
    expect(items['S12']).toBeUndefined();
    // The name is no evidence; the position is.
    expect(items['H0203']).toMatchObject({ reviews: 1, settled: { stands: true, note: 'so be it' } });
    expect(items['S07']).toMatchObject({ distanceMpc: 31 });
    const back = await docket('returned=yes');
    const shifted = back.find(({ name }) => name === 'S08')!;
    expect(shifted.moved).toContainEqual({
      what: 'position',
      from: '0.0',
      to: '10.0',
      by: expect.closeTo(10, 3),
      unit: 'arcsec',
    });
    const { items: kept } = (await reviewer.get(`/detections/${items['H0203']!.detectionId}/reviews`)).body;
    expect(kept).toMatchObject([{ mine: true, carriedTo: run.number }]);
    // S01's counterpart stays rejected, though both tables are new.
    expect(items['S01']!.counterpart).toBeNull();
    const chain = await lead.get(`/surveys/${surveyId}/ledger/verification`);
    expect(chain.body).toMatchObject({ intact: true });
  });
});
