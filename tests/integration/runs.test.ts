import type { Candidate, Neighbour, VerdictItem } from '@eremite/shared/contracts/verdict';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
  aRun,
  aScreenedSurvey,
  DEEP_TABLE,
  ledgerOf,
  NAMES,
  SETTINGS,
  someCriteria,
  verdictsOf,
} from '../support/builders/small-survey.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
});
afterAll(() => app.close());
const list = (query = '') => screened.observer.get(`/runs/${screened.run.id}/verdicts${query}`);
const namesOf = (items: { name: string }[]) => items.map(({ name }) => name);

describe('a run', () => {
  it('judges each detection by what stands about it', () => {
    const { items } = screened;
    const words = (name: string) => [items[name]!.starlight, items[name]!.surroundings];
    for (const name of NAMES.slice(0, 5)) expect(words(name), name).toEqual(['starlit', 'alone']);
    expect(words('S06')).toEqual(['contested', 'alone']);
    expect(words('S07')).toEqual(['dark', 'accompanied']);
    for (const name of NAMES.slice(7)) expect(words(name), name).toEqual(['dark', 'alone']);
    expect(items['S01']!.counterpart).toMatchObject({ catalogueId: screened.catalogues.deep, rowId: 1, name: 'd1' });
    expect(items['S01']!.counterpart!.separationArcsec).toBeCloseTo(2, 3);
    expect(items['S07']!.nearest).toMatchObject({ name: 'n7', catalogueId: screened.catalogues.redshifts });
    // cz 5060 against 5000 km/s: 60 / (1 + 5000/299792.458).
    expect(items['S07']!.nearest!.velocityDifferenceKms).toBeCloseTo(59.0157, 3);
  });

  it('tells its inputs with their hashes, its counts and who started it', () => {
    const { run, catalogues } = screened;
    expect(run).toMatchObject({
      number: 1,
      state: 'done',
      criteriaNumber: 1,
      createdBy: 'A lead',
      error: null,
      counts: {
        detections: 12,
        starlight: { starlit: 5, contested: 1, dark: 6 },
        surroundings: { alone: 11, accompanied: 1 },
        candidates: 7,
      },
    });
    expect(run.inputs.map(({ catalogueId }) => catalogueId)).toEqual(Object.values(catalogues));
    for (const text of [run.inputHash, ...run.inputs.map(({ sha256 }) => sha256)])
      expect(text).toMatch(/^[0-9a-f]{64}$/);
    expect(run.seconds).toBeGreaterThan(0);
  });

  it('gives the same bytes and the same hash for the same inputs', async () => {
    const again = await aRun(screened.lead, screened.surveyId, screened.criteria.id);
    expect(again.number).toBe(2);
    expect(again.inputHash).toBe(screened.run.inputHash);
    const items = await verdictsOf(screened.lead, again.id);
    expect(JSON.stringify(items)).toBe(JSON.stringify(screened.items));
    for (const which of ['candidates', 'neighbours']) {
      const [one, two] = await Promise.all(
        [screened.run.id, again.id].map((id) => screened.lead.get(`/runs/${id}/${which}?limit=1000`)),
      );
      expect(two!.text).toBe(one!.text);
    }
    const { body } = await screened.observer.get(`/runs/${again.id}/difference?from=${screened.run.id}`);
    expect(body).toMatchObject({ criteriaChanged: [], inputsChanged: [], changed: [], unchanged: 12 });
  });

  it('of some catalogues leaves the others out, and refuses unknown ones', async () => {
    const { lead, surveyId, criteria, catalogues } = screened;
    const start = (catalogueIds: string[]) =>
      lead.post(`/surveys/${surveyId}/runs`, { criteriaId: criteria.id, catalogueIds });
    expect((await start([catalogues.deep])).body.type).toBe('urn:eremite:error:no-detections');
    const stranger = await start([catalogues.hi, surveyId]);
    expect([stranger.status, stranger.body.errors[0].pointer]).toEqual([404, '/catalogueIds']);
    expect((await lead.post(`/surveys/${surveyId}/runs`, { criteriaId: surveyId })).status).toBe(404);
  });

  it('started twice with one key is one run', async () => {
    const { lead, surveyId, criteria } = screened;
    const start = () =>
      lead.post(`/surveys/${surveyId}/runs`, { criteriaId: criteria.id }, { 'idempotency-key': 'one-run' });
    const first = await start();
    const second = await start();
    expect([first.status, second.status]).toEqual([202, 202]);
    expect(second.body).toEqual(first.body);
    expect(second.headers.get('idempotent-replay')).toBe('true');
  });

  it('stands in the ledger when it starts and when it ends', async () => {
    const lines = (await ledgerOf(screened.observer, screened.surveyId)).filter(
      ({ detail }) => detail['runId'] === screened.run.id,
    );
    expect(lines.map(({ action }) => action)).toEqual(['finished a run', 'started a run']);
    expect(lines[1]!.detail).toMatchObject({ inputHash: screened.run.inputHash });
    expect(lines[0]!.detail).toMatchObject({ counts: { detections: 12 } });
  });
});

describe('the list of verdicts', () => {
  it('is in input order and pages without gap or repeat', async () => {
    const seen: string[] = [];
    for (let cursor: string | null = ''; cursor !== null;) {
      const { body }: { body: { items: VerdictItem[]; total: number; nextCursor: string | null } } = await list(
        `?limit=5${cursor && `&cursor=${cursor}`}`,
      );
      expect(body.total).toBe(12);
      seen.push(...namesOf(body.items));
      cursor = body.nextCursor;
    }
    expect(seen).toEqual(NAMES);
  });

  it.each([
    ['starlight=dark', NAMES.slice(6)],
    ['starlight=contested,starlit&search=s0', NAMES.slice(0, 6)],
    ['starlight=dark&starlight=contested&surroundings=accompanied', ['S07']],
    ['minPNone=0.5', NAMES.slice(6)],
    ['search=1', ['S01', 'S10', 'S11', 'S12']],
    ['search=%25', []],
    ['search=_', []],
    ['doubt=interference&doubtGrade=serious', []],
    ['reviewed=yes', []],
    ['reviewed=no&limit=2', ['S01', 'S02']],
  ])('is narrowed by %s', async (query, expected) => {
    const { body, text } = await list(`?${query}`);
    expect(namesOf(body.items), text).toEqual(expected);
  });

  it.each(['name', 'raDeg', 'decDeg', 'pNone', 'pNoneOrMissed', 'power', 'pAlone', 'starlight', 'surroundings'])(
    'is sorted by %s both ways',
    async (sort) => {
      const value = (item: VerdictItem) =>
        sort === 'pNoneOrMissed' ? item.pNone + item.pMissed : (item as unknown as Record<string, number>)[sort]!;
      const up = (await list(`?sort=${sort}`)).body.items.map(value);
      const down = (await list(`?sort=-${sort}`)).body.items.map(value);
      expect(up).toEqual([...up].sort((a, b) => (a < b ? -1 : a > b ? 1 : 0)));
      expect(down).toEqual([...up].reverse());
      expect(new Set(up).size).toBeGreaterThan(1);
    },
  );

  it('refuses an unknown order, an unknown word and a foreign cursor', async () => {
    expect((await list('?sort=colour')).body.errors[0].pointer).toBe('/sort');
    expect((await list('?starlight=dim')).status).toBe(400);
    expect((await list('?cursor=abc')).status).toBe(400);
    expect((await list('?limit=0')).status).toBe(400);
  });

  it('comes as CSV and VOTable with the same filter and order, and the caution', async () => {
    const csv = await list('?format=csv&starlight=dark&sort=-name');
    expect(csv.headers.get('content-type')).toMatch(/^text\/csv/);
    expect(csv.headers.get('content-disposition')).toBe('attachment; filename="run-1-verdicts.csv"');
    const lines = csv.text.trim().split(/\r?\n/);
    expect(lines[0]).toMatch(/^# .*screening/i);
    const rows = lines.filter((line) => !line.startsWith('#'));
    expect(rows[0]).toMatch(/^detection,ra_deg,dec_deg,cz_kms/);
    expect(rows.slice(1).map((row) => row.split(',')[0])).toEqual(NAMES.slice(6).reverse());
    const votable = await list('?format=votable');
    expect(votable.text.match(/<TR>/g)).toHaveLength(12);
    expect(votable.text).toMatch(/<FIELD[^>]*name="p_none"/);
  });
});

describe('everything behind one verdict', () => {
  it('is told with candidates, neighbours, limits and grounds', async () => {
    const { body, text } = await screened.observer.get(
      `/runs/${screened.run.id}/detections/${screened.items['S06']!.detectionId}`,
    );
    expect(body, text).toMatchObject({ runNumber: 1, criteriaNumber: 1, verdict: { name: 'S06' } });
    expect(namesOf(body.candidates).sort()).toEqual(['d6a', 'd6b']);
    for (const candidate of body.candidates as Candidate[]) {
      expect(candidate.separationArcsec).toBeCloseTo(3, 3);
      expect(candidate.probability).toBeCloseTo(0.5, 3);
      expect(candidate.override).toBeNull();
    }
    expect(body.limits[0]).toMatchObject({ band: 'r', testable: true, depthPoint: 25.5 });
    expect(body.verdict.grounds.length).toBeGreaterThan(1);
    expect(body.searchRadiusArcsec).toBeGreaterThan(5);
  });

  it('is not there for another survey, another run or an unknown detection', async () => {
    const path = `/runs/${screened.run.id}/detections/`;
    const { detectionId } = screened.items['S01']!;
    expect((await screened.stranger.get(path + detectionId)).status).toBe(404);
    expect((await screened.lead.get(path + screened.run.id)).status).toBe(404);
    expect((await app.client().get(path + detectionId)).status).toBe(401);
  });
});

describe('the flat lists', () => {
  const all = async <T>(which: string, query: string) => {
    const items: (T & { detection: string })[] = [];
    const totals = new Set<number>();
    for (let cursor: string | null = ''; cursor !== null;) {
      const { body }: { body: { items: typeof items; total: number; nextCursor: string | null } } =
        await screened.observer.get(`/runs/${screened.run.id}/${which}?${query}${cursor && `&cursor=${cursor}`}`);
      items.push(...body.items);
      totals.add(body.total);
      cursor = body.nextCursor;
    }
    return { items, totals: [...totals] };
  };

  it.each([1, 2, 3, 100])('of candidates page by %i across detections', async (limit) => {
    const { items, totals } = await all<Candidate>('candidates', `limit=${limit}`);
    expect(items.map(({ detection, name }) => `${detection} ${name}`)).toEqual([
      'S01 d1',
      'S02 d2',
      'S03 d3',
      'S04 d4',
      'S05 d5',
      'S06 d6a',
      'S06 d6b',
    ]);
    expect(totals).toEqual([7]);
  });

  it('of one detection count and page that one', async () => {
    const { detectionId } = screened.items['S06']!;
    const { items, totals } = await all<Candidate>('candidates', `limit=1&detectionId=${detectionId}`);
    expect(namesOf(items)).toEqual(['d6a', 'd6b']);
    expect(totals).toEqual([2]);
  });

  it('of neighbours hold the one that is there', async () => {
    const { items, totals } = await all<Neighbour>('neighbours', 'limit=100');
    expect(items.map(({ detection, name }) => [detection, name])).toEqual([['S07', 'n7']]);
    expect(items[0]!.separationArcsec).toBeCloseTo(180, 3);
    expect(totals).toEqual([1]);
    expect(screened.run.counts!.neighbours).toBe(1);
  });

  it('come as CSV and VOTable', async () => {
    const get = (path: string) => screened.observer.get(`/runs/${screened.run.id}/${path}`);
    const rows = (text: string) =>
      text
        .trim()
        .split(/\r?\n/)
        .filter((line) => !line.startsWith('#'));
    const csv = rows((await get('candidates?format=csv')).text);
    expect(csv[0]).toMatch(/^detection,catalogue,row,row_number,/);
    expect(csv).toHaveLength(8);
    expect(csv[1]).toMatch(/^S01,small deep,d1,1,/);
    expect(rows((await get('neighbours?format=csv')).text)[1]).toMatch(/^S07,small redshifts,n7,1,/);
    expect((await get('candidates?format=votable')).text.match(/<TR>/g)).toHaveLength(7);
    expect((await get('candidates?cursor=W10')).status).toBe(400);
  });
});

describe('the difference of two runs', () => {
  it('tells changed criteria and why each verdict moved', async () => {
    const { lead, surveyId, run } = screened;
    const criteria = await someCriteria(lead, surveyId, { ...SETTINGS, absence: { darkProbability: 0.999 } });
    const later = await aRun(lead, surveyId, criteria.id);
    const { body } = await screened.observer.get(`/runs/${later.id}/difference?from=${run.id}`);
    expect(body.criteriaChanged).toEqual([{ key: 'absence.darkProbability', from: 0.8, to: 0.999 }]);
    expect(body.unchanged).toBe(6);
    expect(namesOf(body.changed).sort()).toEqual(NAMES.slice(6));
    expect(body.changed[0].starlight).toEqual(['dark', 'cannot tell']);
    expect((await screened.stranger.get(`/runs/${later.id}/difference?from=${run.id}`)).status).toBe(404);
  });

  it('tells new tables and the new best object', async () => {
    const { lead, surveyId, run, criteria, catalogues } = screened;
    const nothing = await lead.post(`/surveys/${surveyId}/runs`, {
      criteriaId: criteria.id,
      catalogueIds: [catalogues.hi, catalogues.redshifts],
    });
    await expect
      .poll(async () => (await lead.get(`/runs/${nothing.body.runId}`)).body.state, { timeout: 30_000 })
      .toBe('done');
    const { body } = await lead.get(`/runs/${run.id}/difference?from=${nothing.body.runId}`);
    expect(body.inputsChanged).toEqual([`new: ${DEEP_TABLE.settings.name}`]);
    const first = body.changed.find(({ name }: { name: string }) => name === 'S01');
    expect(first.why.join('; ')).toContain('best object none -> d1');
  });
});

describe('the overview', () => {
  it('counts and marks by the latest finished run', async () => {
    const { body } = await screened.reviewer.get(`/surveys/${screened.surveyId}/overview`);
    expect(body.marks).toHaveLength(12);
    expect(namesOf(body.marks).sort()).toEqual(NAMES);
    expect(body.survey).toMatchObject({ detections: 12, catalogues: 3 });
    expect(Object.values(body.counts.starlight as Record<string, number>).reduce((a, b) => a + b)).toBe(12);
    expect(body).toMatchObject({ reviewed: 0, awaitingMe: 0 });
  });
});
