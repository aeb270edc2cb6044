import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aMember } from '../support/builders.ts';
import { aRun, aScreenedSurvey, ledgerOf, verdictsOf } from '../support/builders/small-survey.ts';
import type { Client } from '../support/client.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
});
afterAll(() => app.close());
const path = (name: string) => `/detections/${screened.items[name]!.detectionId}/overrides`;
const give = (client: Client, name: string, word: object) =>
  client.post(path(name), { catalogueId: screened.catalogues.deep, note: 'seen in the image', ...word });

describe('an override', () => {
  it('needs a note, a catalogue of the survey and a row that is there', async () => {
    const refused = await give(screened.reviewer, 'S01', { rowId: 1, action: 'reject', note: ' ' });
    expect([refused.status, refused.body.errors[0].pointer]).toEqual([400, '/note']);
    expect((await give(screened.reviewer, 'S01', { rowId: 99, action: 'reject' })).status).toBe(404);
    expect((await give(screened.reviewer, 'S01', { rowId: 0, action: 'reject' })).status).toBe(400);
    const elsewhere = { rowId: 1, action: 'reject', catalogueId: screened.surveyId };
    expect((await give(screened.reviewer, 'S01', elsewhere)).status).toBe(404);
    expect((await give(screened.observer, 'S01', { rowId: 1, action: 'reject' })).status).toBe(403);
    expect((await give(screened.stranger, 'S01', { rowId: 1, action: 'reject' })).status).toBe(404);
    expect((await screened.lead.get(path('S01'))).body.total).toBe(0);
  });

  it('marks the candidate at once, is taken up by the next run, and leaves earlier runs as they were', async () => {
    const { lead, reviewer, surveyId, criteria, run } = screened;
    const rejected = await give(reviewer, 'S01', { rowId: 1, action: 'reject' });
    expect(rejected.status, rejected.text).toBe(201);
    expect(rejected.body).toMatchObject({ objectName: 'd1', action: 'reject', by: 'A reviewer', withdrawnAt: null });
    expect((await give(reviewer, 'S06', { rowId: 7, action: 'accept', note: 'the bluer one' })).status).toBe(201);
    const [accepted, first] = await ledgerOf(screened.observer, surveyId);
    expect(accepted).toMatchObject({ action: 'accepted a counterpart', subject: 'S06: d6b', note: 'the bluer one' });
    expect(first).toMatchObject({ action: 'rejected a counterpart', subject: 'S01: d1', detail: { row: 1 } });

    const { detectionId } = screened.items['S01']!;
    const detail = await lead.get(`/runs/${run.id}/detections/${detectionId}`);
    expect(detail.body.candidates[0]).toMatchObject({ name: 'd1', override: 'reject' });
    expect(detail.body.verdict).toMatchObject({ starlight: 'starlit', overrides: 1 });

    const later = await aRun(lead, surveyId, criteria.id);
    expect(later.inputHash).not.toBe(run.inputHash);
    const items = await verdictsOf(lead, later.id);
    expect(items['S01']!.starlight).toBe('dark');
    expect(items['S01']!.counterpart).toBeNull();
    expect(items['S06']).toMatchObject({ starlight: 'starlit', counterpart: { name: 'd6b' } });
    const before = await verdictsOf(lead, run.id);
    for (const name of ['S01', 'S06']) expect(before[name]!.starlight).toBe(screened.items[name]!.starlight);
    const { body } = await lead.get(`/runs/${later.id}/difference?from=${run.id}`);
    expect(body.changed.map(({ name }: { name: string }) => name).sort()).toEqual(['S01', 'S06']);
  });

  it('given again on the same pair takes the place of the earlier word', async () => {
    await give(screened.reviewer, 'S02', { rowId: 2, action: 'reject' });
    await give(screened.reviewer, 'S02', { rowId: 2, action: 'accept', note: 'it is right after all' });
    const { items } = (await screened.observer.get(path('S02'))).body;
    expect(
      items.map(({ action, withdrawnAt }: { action: string; withdrawnAt: unknown }) => [action, !withdrawnAt]),
    ).toEqual([
      ['accept', true],
      ['reject', false],
    ]);
    expect(items[1].withdrawnNote).toContain('it is right after all');
  });

  it('is taken back by its author or a lead, with a note, once', async () => {
    const colleague = await aMember(app, screened.team.id, 'reviewer');
    const { id } = (await give(screened.reviewer, 'S03', { rowId: 3, action: 'reject' })).body;
    const back = (client: Client, note = 'I was wrong') => client.delete(`/overrides/${id}`, { note });
    expect((await back(colleague.client)).status).toBe(403);
    expect((await back(screened.observer)).status).toBe(403);
    expect((await back(screened.stranger)).status).toBe(404);
    expect((await back(screened.reviewer, '')).body.errors[0].pointer).toBe('/note');
    const taken = await back(screened.reviewer);
    expect(taken.status, taken.text).toBe(200);
    expect(taken.body).toMatchObject({ withdrawnBy: 'A reviewer', withdrawnNote: 'I was wrong' });
    expect((await back(screened.lead)).status).toBe(409);
    expect((await ledgerOf(screened.lead, screened.surveyId))[0]).toMatchObject({
      action: 'took an override back',
      subject: 'S03: d3',
      note: 'I was wrong',
    });
    const other = (await give(screened.reviewer, 'S04', { rowId: 4, action: 'reject' })).body;
    expect((await screened.lead.delete(`/overrides/${other.id}`, { note: 'no' })).body.withdrawnBy).toBe('A lead');
    const later = await aRun(screened.lead, screened.surveyId, screened.criteria.id);
    const items = await verdictsOf(screened.lead, later.id);
    expect([items['S03']!.starlight, items['S04']!.starlight]).toEqual(['starlit', 'starlit']);
  });
});

describe('a replaced distance', () => {
  it('is taken up by the next run', async () => {
    const { lead, reviewer, surveyId, criteria } = screened;
    const { detectionId } = screened.items['S08']!;
    const change = { distanceMpc: 30, errorMpc: 1, source: 'an invented paper', note: 'nearer than its redshift says' };
    expect((await reviewer.patch(`/detections/${detectionId}`, change)).status).toBe(200);
    const later = await aRun(lead, surveyId, criteria.id);
    const { body } = await lead.get(`/runs/${later.id}/detections/${detectionId}`);
    expect(body.distance.kind).toBe('measured');
    // Given as the distance to project with: the luminosity distance is (1 + z)^2 times it.
    expect(body.distance.angularMpc).toBeCloseTo(30, 6);
    expect(body.verdict.logHiMass).toBeLessThan(screened.items['S08']!.logHiMass!);
  });
});
