import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey } from '../support/builders.ts';
import { ledgerOf, someCriteria } from '../support/builders/small-survey.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let staff: Awaited<ReturnType<typeof aStaffedSurvey>>;
beforeAll(async () => {
  app = await startApp();
  staff = await aStaffedSurvey(app);
});
afterAll(() => app.close());
const path = () => `/surveys/${staff.survey.id}/criteria`;

describe('criteria', () => {
  it('are all the defaults where nothing is said, and number themselves', async () => {
    const first = await staff.lead.post(path(), { settings: {} });
    expect(first.status, first.text).toBe(201);
    expect(first.body).toMatchObject({ number: 1, note: '', usedByRuns: 0, createdBy: 'A lead' });
    expect(first.body.settings).toMatchObject({
      position: { searchRadiusArcsec: null },
      surroundings: { radiusMpc: 1, velocityWindowKms: 500, faintestNeighbourMag: -17 },
      absence: { darkProbability: 0.8, minimumPower: 0.99 },
      counterpart: { minimumProbability: 0.5 },
      robustness: { draws: 2000, seed: 1 },
      control: { offsetsPerSource: 20 },
    });
    const second = await someCriteria(staff.lead, staff.survey.id, { surroundings: { radiusMpc: 0.7 } });
    expect([second.number, second.settings.surroundings.radiusMpc]).toEqual([2, 0.7]);
    const [newest, oldest] = (await staff.observer.get(path())).body.items;
    expect([newest.number, oldest.number]).toEqual([2, 1]);
  });

  it('keep their numbers apart when many are made at once', async () => {
    const made = await Promise.all(Array.from({ length: 6 }, () => someCriteria(staff.lead, staff.survey.id)));
    expect(new Set(made.map(({ number }) => number)).size).toBe(6);
  });

  it('cannot be changed or removed', async () => {
    const { id } = await someCriteria(staff.lead, staff.survey.id);
    for (const method of ['PUT', 'PATCH', 'DELETE'])
      expect((await staff.lead.request(method, `/criteria/${id}`, {})).status, method).toBe(404);
  });

  it('name what does not fit: a wrong key, a value out of range, a word for a number', async () => {
    const refused = async (settings: object) => (await staff.lead.post(path(), { settings })).body;
    const wrong = await refused({ surroundings: { radiusKpc: 3 } });
    expect(wrong.status).toBe(400);
    expect(JSON.stringify(wrong.errors)).toContain('radiusKpc');
    expect((await refused({ absence: { darkProbability: 1.2 } })).errors[0].pointer).toBe(
      '/settings/absence/darkProbability',
    );
    expect((await refused({ position: { searchRadiusArcsec: -5 } })).errors[0].pointer).toBe(
      '/settings/position/searchRadiusArcsec',
    );
    expect((await refused({ position: { searchRadiusArcsec: 'far' } })).status).toBe(400);
  });

  it('stand in the ledger with their note', async () => {
    await staff.lead.post(path(), { settings: {}, note: 'as agreed in the meeting' });
    const [line] = await ledgerOf(staff.observer, staff.survey.id);
    expect(line).toMatchObject({ action: 'set criteria', note: 'as agreed in the meeting', actor: 'A lead' });
  });
});
