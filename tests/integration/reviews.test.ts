import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aMember } from '../support/builders.ts';
import { aRun, aScreenedSurvey, ledgerOf, verdictsOf } from '../support/builders/small-survey.ts';
import type { Client } from '../support/client.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
let second: { client: Client; user: { id: string } };
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
  second = await aMember(app, screened.team.id, 'reviewer');
});
afterAll(() => app.close());
const idOf = (name: string) => screened.items[name]!.detectionId;
const review = (client: Client, name: string, word: object) =>
  client.post(`/detections/${idOf(name)}/reviews`, { runId: screened.run.id, ...word });
const reviewsOf = async (client: Client, name: string) => (await client.get(`/detections/${idOf(name)}/reviews`)).body;
const AGREE = { starlight: 'starlit', surroundings: 'alone' };

describe('a review', () => {
  it('agrees without a note, and departs only with one', async () => {
    const agreed = await review(screened.reviewer, 'S01', AGREE);
    expect(agreed.status, agreed.text).toBe(201);
    expect(agreed.body).toMatchObject({ agrees: true, mine: true, note: '', runNumber: 1, reviewer: 'A reviewer' });
    const departing = { starlight: 'nearly dark', surroundings: 'alone' };
    const bare = await review(screened.reviewer, 'S02', departing);
    expect([bare.status, bare.body.errors[0].pointer]).toEqual([400, '/note']);
    expect(bare.body.detail).toContain('starlit, alone');
    expect((await review(screened.reviewer, 'S02', { ...departing, note: '   ' })).status).toBe(400);
    const noted = await review(screened.reviewer, 'S02', { ...departing, note: 'its light is a star spike' });
    expect(noted.body).toMatchObject({ agrees: false, note: 'its light is a star spike' });
    const [departed, before] = await ledgerOf(screened.observer, screened.surveyId);
    expect(departed).toMatchObject({
      action: 'departed from a verdict',
      subject: 'S02',
      note: 'its light is a star spike',
    });
    expect(before).toMatchObject({ action: 'agreed with a verdict', subject: 'S01' });
  });

  it('of another is hidden from a reviewer until she has given her own on that run', async () => {
    await review(screened.reviewer, 'S03', AGREE);
    expect(await reviewsOf(second.client, 'S03')).toMatchObject({ items: [], total: 0 });
    // The ledger tells her that someone spoke, not what was said.
    const [line] = await ledgerOf(second.client, screened.surveyId);
    expect(line).toMatchObject({ action: 'reviewed a verdict', subject: 'S03', note: '', detail: {} });
    expect((await reviewsOf(screened.lead, 'S03')).total).toBe(1);
    const word = { starlight: 'contested', surroundings: 'alone', note: 'two blobs in one' };
    const given = await review(second.client, 'S03', word);
    expect(given.body).toMatchObject({ mine: true, agrees: false });
    const { items } = await reviewsOf(second.client, 'S03');
    expect(items.map(({ mine }: { mine: boolean }) => mine)).toEqual([true, false]);
    expect((await reviewsOf(screened.reviewer, 'S03')).total).toBe(2);
  });

  it('given again on the same run takes the place of the earlier one', async () => {
    await review(screened.reviewer, 'S04', AGREE);
    await review(screened.reviewer, 'S04', { ...AGREE, note: 'looked again' });
    const { items } = await reviewsOf(screened.reviewer, 'S04');
    expect(items).toHaveLength(1);
    expect(items[0].note).toBe('looked again');
  });

  it('is counted in the list, the filter and the overview', async () => {
    const items = await verdictsOf(screened.observer, screened.run.id);
    expect([items['S03']!.reviews, items['S04']!.reviews, items['S05']!.reviews]).toEqual([2, 1, 0]);
    const { body } = await screened.observer.get(`/runs/${screened.run.id}/verdicts?reviewed=yes`);
    expect(body.items.map(({ name }: { name: string }) => name)).toEqual(['S01', 'S02', 'S03', 'S04']);
    expect((await screened.lead.get(`/surveys/${screened.surveyId}/overview`)).body.reviewed).toBe(4);
  });

  it('needs a verdict of that run on that detection, and words that exist', async () => {
    const other = await screened.reviewer.post(`/detections/${idOf('S01')}/reviews`, {
      ...AGREE,
      runId: screened.surveyId,
    });
    expect(other.status).toBe(404);
    expect((await review(screened.reviewer, 'S01', { ...AGREE, starlight: 'dim' })).status).toBe(400);
    expect((await screened.reviewer.get(`/detections/${screened.run.id}/reviews`)).status).toBe(404);
  });
});

describe('settling', () => {
  it('is the lead’s, needs a note, and shows in lists, details and exports', async () => {
    const settle = (client: Client, note: string) =>
      client.post(`/detections/${idOf('S06')}/settlements`, {
        runId: screened.run.id,
        starlight: 'starlit',
        surroundings: 'alone',
        note,
      });
    expect((await settle(screened.reviewer, 'mine')).status).toBe(403);
    expect((await settle(screened.lead, ' ')).body.errors[0].pointer).toBe('/note');
    const settled = await settle(screened.lead, 'one galaxy and its knot');
    expect(settled.status, settled.text).toBe(204);
    const expected = {
      starlight: 'starlit',
      surroundings: 'alone',
      by: 'A lead',
      note: 'one galaxy and its knot',
      outcome: 'verdict',
      stands: true,
    };
    const item = (await verdictsOf(screened.observer, screened.run.id))['S06']!;
    expect(item.settled).toEqual(expected);
    expect(item.starlight).toBe('contested');
    const detail = await screened.observer.get(`/runs/${screened.run.id}/detections/${idOf('S06')}`);
    expect(detail.body.verdict.settled).toEqual(expected);
    const csv = (await screened.observer.get(`/runs/${screened.run.id}/verdicts?format=csv&search=S06`)).text;
    expect(csv).toContain(',starlit,alone,');
    expect((await ledgerOf(screened.observer, screened.surveyId))[0]).toMatchObject({
      action: 'settled a verdict',
      subject: 'S06',
      note: 'one galaxy and its knot',
      detail: { computed: { starlight: 'contested' } },
    });
    await settle(screened.lead, 'on second thoughts the same');
    expect((await verdictsOf(screened.lead, screened.run.id))['S06']!.settled!.note).toMatch(/second thoughts/);
  });
});

describe('the docket', () => {
  const docket = async (client: Client, query = '') =>
    (await client.get(`/surveys/${screened.surveyId}/docket${query}`)).body;
  const namesOf = (page: { items: { name: string }[] }) => page.items.map(({ name }) => name);
  const assign = (client: Client, names: string[], userId: string, method = 'POST') =>
    client.request(method, `/surveys/${screened.surveyId}/assignments`, { detectionIds: names.map(idOf), userId });

  it('has the likeliest dark first and leaves out what one has reviewed', async () => {
    const page = await docket(second.client);
    expect(page.total).toBe(11);
    expect(namesOf(page)).not.toContain('S03');
    expect(namesOf(page).slice(0, 6).sort()).toEqual(['S07', 'S08', 'S09', 'S10', 'S11', 'S12']);
    const chances = page.items.slice(0, 6).map((item: { pNone: number; pMissed: number }) => item.pNone + item.pMissed);
    expect(chances).toEqual([...chances].sort((a, b) => b - a));
    expect(namesOf(await docket(second.client, '?state=done'))).toEqual(['S03']);
    expect((await docket(second.client, '?state=all&limit=5')).total).toBe(12);
  });

  it('holds what a lead assigned, for whom, and gives it back', async () => {
    const userId = second.user.id;
    expect((await assign(screened.reviewer, ['S03', 'S07'], userId)).status).toBe(403);
    expect((await assign(screened.lead, ['S03', 'S07', 'S08'], userId)).status).toBe(204);
    expect((await assign(screened.lead, ['S07'], userId)).status).toBe(204);
    const mine = await docket(second.client, '?assigned=me');
    expect(namesOf(mine)).toEqual(expect.arrayContaining(['S07', 'S08']));
    expect(mine.total).toBe(2);
    expect(mine.items[0]).toMatchObject({ assignedTo: ['A reviewer'], reviewedByMe: false });
    expect((await docket(screened.reviewer, '?assigned=me')).total).toBe(0);
    // S03 is reviewed already, S07 and S08 are not; only the lead is told.
    const progress = await screened.lead.get(`/surveys/${screened.surveyId}/assignments`);
    expect(progress.body.items).toEqual([{ userId, name: 'A reviewer', assigned: 3, reviewed: 1, returned: 0 }]);
    expect((await screened.reviewer.get(`/surveys/${screened.surveyId}/assignments`)).status).toBe(403);
    const overview = await second.client.get(`/surveys/${screened.surveyId}/overview`);
    expect(overview.body.awaitingMe).toBe(2);
    expect((await assign(screened.lead, ['S08'], userId, 'DELETE')).status).toBe(204);
    expect(namesOf(await docket(second.client, '?assigned=me'))).toEqual(['S07']);
    const [taken, , given] = await ledgerOf(screened.lead, screened.surveyId);
    expect([taken!.action, given!.action]).toEqual(['took detections back', 'assigned detections']);
  });

  it('takes no observer, no stranger and no detection of another survey', async () => {
    const observer = await aMember(app, screened.team.id, 'observer');
    const refused = await assign(screened.lead, ['S07'], observer.user.id);
    expect([refused.status, refused.body.errors[0].pointer]).toEqual([400, '/userId']);
    expect((await assign(screened.lead, ['S07'], screened.run.id)).status).toBe(400);
    const foreign = await screened.lead.post(`/surveys/${screened.surveyId}/assignments`, {
      detectionIds: [screened.run.id],
      userId: second.user.id,
    });
    expect(foreign.status).toBe(404);
  });

  it('keeps what was reviewed where the evidence stands in the newest run', async () => {
    const run = await aRun(screened.lead, screened.surveyId, screened.criteria.id);
    expect((await docket(second.client)).total).toBe(11);
    expect((await verdictsOf(screened.lead, run.id))['S03']!.reviews).toBe(2);
    const { items } = await reviewsOf(screened.reviewer, 'S03');
    expect(items.map((item: { carriedTo: number; runNumber: number }) => [item.runNumber, item.carriedTo])).toEqual([
      [1, 2],
      [1, 2],
    ]);
  });
});
