import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aUser, jobEnd } from '../support/builders.ts';
import { aScreenedSurvey, HI_TABLE, settle } from '../support/builders/small-survey.ts';
import type { Answer, Client } from '../support/client.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

type Screened = Awaited<ReturnType<typeof aScreenedSurvey>>;

/** Fails unless the answer has the status and, if given, at least these keys. */
function expectAnswer(answer: Answer, status: number, keys: readonly string[] = []): void {
  expect(answer.status, answer.text).toBe(status);
  if (keys.length > 0) expect(Object.keys(answer.body)).toEqual(expect.arrayContaining([...keys]));
}

/** A list in the one shape all lists have; answers its items. */
function itemsOf(answer: Answer, keys: readonly string[] = []) {
  expectAnswer(answer, 200);
  expect(Object.keys(answer.body).sort()).toEqual(['items', 'nextCursor', 'total']);
  for (const item of answer.body.items) expect(Object.keys(item)).toEqual(expect.arrayContaining([...keys]));
  return answer.body.items;
}

/** The interface scripts are written against: these paths, statuses and keys stay. */
describe('the paths that scripts rely on', () => {
  let app: TestApp;
  let all: Screened;
  let lead: Client;
  let survey: string;
  let run: string;
  let detection: string;

  beforeAll(async () => {
    app = await startApp();
    all = await aScreenedSurvey(app);
    lead = all.lead;
    survey = `/surveys/${all.surveyId}`;
    run = `/runs/${all.run.id}`;
    detection = `/detections/${all.items['S07']!.detectionId}`;
  }, 180_000);
  afterAll(() => app.close());

  it('serve sessions and personal tokens', async () => {
    const { email } = await aUser(app);
    const client = await app.signIn(email);
    expectAnswer(await client.get('/auth/me'), 200, ['id', 'email', 'name', 'isAdministrator', 'teams']);
    expectAnswer(await client.post('/auth/refresh'), 204);
    const made = await client.post('/tokens', { name: 'script', scope: 'write' });
    expectAnswer(made, 201, ['id', 'name', 'scope', 'expiresAt', 'token']);
    const script = app.client(made.body.token);
    const [listed] = itemsOf(await script.get('/tokens'), ['id', 'name', 'scope', 'createdAt', 'expiresAt']);
    expect(listed).not.toHaveProperty('token');
    expectAnswer(await script.delete(`/tokens/${made.body.id}`), 204);
    expectAnswer(await script.get('/tokens'), 401);
    expectAnswer(await client.post('/auth/sign-out'), 204);
    expectAnswer(await client.get('/auth/me'), 401, ['type', 'title', 'status', 'instance']);
  });

  it('serve teams, members and invitations', async () => {
    const administrator = await app.signIn((await aUser(app, { isAdministrator: true })).email);
    expectAnswer(await administrator.post('/teams', { name: 'Another' }), 201, ['id', 'name']);
    itemsOf(await lead.get('/teams'), ['id', 'name', 'role']);
    itemsOf(await lead.get(`/teams/${all.team.id}/members`), ['userId', 'name', 'email', 'role']);
    const invited = { email: 'invited@example.org', role: 'reviewer' };
    expectAnswer(await lead.post(`/teams/${all.team.id}/invitations`, invited), 201, ['id', 'email', 'role']);
    const [mail] = itemsOf(await lead.get('/outbox'));
    const token = /token=(\S+)/.exec(mail.text)![1];
    const accepted = { token, name: 'Invited', password: 'a long enough one' };
    expectAnswer(await app.client().post('/invitations/accept', accepted), 200, ['id', 'teams']);
    expectAnswer(await app.client().post('/invitations/accept', accepted), 410);
  });

  it('serve surveys', async () => {
    const keys = ['id', 'teamId', 'name', 'description', 'cosmology'];
    const body = { teamId: all.team.id, name: 'Second', description: 'd', cosmology: { h0: 71, omegaM: 0.27 } };
    const made = await lead.post('/surveys', body);
    expectAnswer(made, 201, keys);
    expect(made.body).toMatchObject(body);
    itemsOf(await lead.get('/surveys'), keys);
    const path = `/surveys/${made.body.id}`;
    const seen = await lead.get(path);
    expectAnswer(seen, 200, keys);
    const etag = { 'if-match': seen.headers.get('etag')! };
    expectAnswer(await lead.patch(path, { name: 'Third' }, etag), 200, keys);
    const late = await lead.patch(path, { name: 'Fourth' }, etag);
    expectAnswer(late, 412, ['type', 'title', 'status', 'current']);
    expect(late.body.current.name).toBe('Third');
    expectAnswer(await lead.delete(path), 204);
    expectAnswer(await lead.get(path), 404);
  });

  it('take a table in, show what it would become, publish it and give back what was sidelined', async () => {
    const text = HI_TABLE.text + 'bad,not a number,2,5000,80,1.2,10,0.99\n';
    const first = await lead.upload(`${survey}/intakes`, 'again.csv', text, { settings: HI_TABLE.settings });
    expectAnswer(first, 201, ['id', 'format', 'tables', 'columns', 'preview', 'settings']);
    const { id, tables, columns, preview } = first.body;
    expect(tables).toEqual([{ index: 0, name: expect.any(String), rows: 13, columns: 8 }]);
    expect(Object.keys(columns[0]).sort()).toEqual(
      ['confidence', 'description', 'guess', 'name', 'type', 'ucd', 'unit'].sort(),
    );
    expect(preview[0]).toEqual(['S01', '150', '2', '5000', '80', '1.2', '10', '0.99']);
    expectAnswer(await lead.get(`/intakes/${id}`), 200, ['id', 'settings']);
    const changed = await lead.patch(`/intakes/${id}`, { settings: { ...HI_TABLE.settings, name: 'again' } });
    expectAnswer(changed, 200, ['id', 'settings', 'check']);
    expect(changed.body.check).toMatchObject({ rows: 13, usable: 12, sidelined: 1 });
    const accepted = await lead.post(`/intakes/${id}/publish`);
    expectAnswer(accepted, 202);
    expect(Object.keys(accepted.body)).toEqual(['jobId']);
    const job = await jobEnd(lead, accepted.body.jobId);
    expect(job).toMatchObject({ state: 'done', progress: 1, result: { rows: 12, sidelined: 1 } });
    const catalogue = `/catalogues/${job.result.catalogueId}`;
    expectAnswer(await lead.get(catalogue), 200, ['id', 'name', 'kind', 'rows', 'sidelined', 'columns', 'settings']);
    itemsOf(await lead.get(`${survey}/catalogues`), ['id', 'name', 'kind', 'rows']);
    itemsOf(await lead.get(`${catalogue}/rows?limit=5`), ['row', 'raDeg', 'decDeg', 'cells']);
    expect(itemsOf(await lead.get(`${catalogue}/sidelined`), ['row', 'line', 'column', 'reason'])).toHaveLength(1);
    const csv = await lead.get(`${catalogue}/sidelined`, { accept: 'text/csv' });
    expectAnswer(csv, 200);
    expect(csv.headers.get('content-type')).toContain('text/csv');
    expect(csv.text).toContain('bad,not a number,2,5000');
    expectAnswer(await lead.delete(catalogue), 204);
    expectAnswer(await lead.get(catalogue), 404);
  });

  it('take in any readable table, also without rows or a position', async () => {
    const noRows = await lead.upload(`${survey}/intakes`, 'empty.csv', 'ra,dec\n');
    expectAnswer(noRows, 201);
    expect(noRows.body.tables[0].rows).toBe(0);
    expectAnswer(await lead.upload(`${survey}/intakes`, 'b.csv', 'name,colour\na,red\nb,blue\n'), 201);
  });

  it('serve jobs, also as events', async () => {
    const path = `/jobs/${all.run.jobId}`;
    expectAnswer(await lead.get(path), 200, ['state', 'progress', 'message', 'startedAt', 'finishedAt', 'result']);
    const events = await lead.get(`${path}/events`);
    expect(events.headers.get('content-type')).toContain('text/event-stream');
    expect(events.text).toMatch(/^event: job\ndata: \{.*"state":"done"/);
    expectAnswer(await lead.delete(path), 200, ['state']);
    expectAnswer(await all.stranger.get(path), 404);
  });

  it('serve detections and replace a distance', async () => {
    const keys = ['id', 'name', 'raDeg', 'decDeg', 'velocityKms', 'fluxJyKms', 'distanceMpc'];
    itemsOf(await lead.get(`${survey}/detections?sort=-raDeg&limit=3`), keys);
    expectAnswer(await lead.get(detection), 200, keys);
    const given = { distanceMpc: 70, errorMpc: 5, source: 'a paper', note: 'better' };
    const changed = await lead.patch(detection, given);
    expectAnswer(changed, 200, keys);
    expect(changed.body.distanceMpc).toBe(70);
    expectAnswer(await lead.patch(detection, { distanceMpc: null, note: 'no better after all' }), 200, keys);
    const lines = itemsOf(await lead.get(`${survey}/ledger`), ['number', 'at', 'actor', 'action', 'subject', 'hash']);
    expect(lines[1]).toMatchObject({ action: 'distance replaced', note: 'better' });
  });

  it('serve criteria and runs', async () => {
    itemsOf(await lead.get(`${survey}/criteria`), ['id', 'number', 'settings']);
    expectAnswer(await lead.get(`/criteria/${all.criteria.id}`), 200, ['id', 'number', 'settings']);
    const plain = await lead.post(`${survey}/criteria`, { settings: {} });
    expectAnswer(plain, 201, ['id', 'number', 'settings']);
    const sections = ['distance', 'position', 'counterpart', 'absence', 'surroundings', 'doubts', 'robustness'];
    expect(Object.keys(plain.body.settings)).toEqual(expect.arrayContaining([...sections, 'control']));
    expect(plain.body.settings).toMatchObject({
      position: { searchRadiusArcsec: null },
      surroundings: { radiusMpc: 1, velocityWindowKms: 500, faintestNeighbourMag: -17 },
      absence: { minimumPower: 0.99, darkProbability: 0.8 },
      robustness: { draws: 2000, seed: 1 },
      control: { offsetsPerSource: 20 },
      counterpart: { minimumProbability: 0.5 },
    });
    const request = { criteriaId: plain.body.id, catalogueIds: Object.values(all.catalogues) };
    const accepted = await lead.post(`${survey}/runs`, request);
    expectAnswer(accepted, 202);
    expect(Object.keys(accepted.body).sort()).toEqual(['jobId', 'runId']);
    expect(await jobEnd(lead, accepted.body.jobId)).toMatchObject({ state: 'done' });
    const keys = ['id', 'number', 'state', 'counts', 'inputs', 'inputHash', 'control'];
    const runs = itemsOf(await lead.get(`${survey}/runs`), keys);
    expect(runs[0].id).toBe(accepted.body.runId);
    expectAnswer(await lead.get(`/runs/${accepted.body.runId}`), 200, keys);
    const difference = await lead.get(`/runs/${accepted.body.runId}/difference?from=${all.run.id}`);
    expectAnswer(difference, 200, ['from', 'to', 'criteriaChanged', 'changed', 'unchanged']);
  });

  it('serve verdicts with everything behind them', async () => {
    const items = itemsOf(await lead.get(`${run}/verdicts`), [
      ...[
        'detectionId',
        'name',
        'raDeg',
        'decDeg',
        'distanceMpc',
        'starlight',
        'pNone',
        'pMissed',
        'pSpurious',
        'power',
      ],
      ...['counterpart', 'surroundings', 'pAlone', 'nearest', 'doubts', 'grounds', 'robustness', 'settled'],
    ]);
    expect(items).toHaveLength(12);
    const { counterpart } = all.items['S01']!;
    expect(Object.keys(counterpart!).sort()).toEqual(
      ['catalogueId', 'name', 'probability', 'rowId', 'separationArcsec'].sort(),
    );
    expect(all.items['S07']!.nearest).toMatchObject({ name: 'n7', separationKpc: expect.any(Number) });
    const detail = await lead.get(`${run}${detection}`);
    const keys = ['verdict', 'candidates', 'neighbours', 'limits', 'doubts', 'distance', 'masks'];
    expectAnswer(detail, 200, keys);
    itemsOf(await lead.get(`${run}/candidates`), ['detection', 'name', 'separationArcsec', 'probability']);
    itemsOf(await lead.get(`${run}/neighbours`), ['detection', 'name', 'separationKpc', 'velocityDifferenceKms']);
    for (const list of ['candidates', 'neighbours']) {
      expect((await lead.get(`${run}/${list}?format=csv`)).text).toMatch(/^#|^detection/);
      expect((await lead.get(`${run}/${list}?format=votable`)).text).toContain('<VOTABLE');
    }
  });

  it('serve reviews, overrides, the docket and assignments', async () => {
    const { starlight, surroundings } = all.items['S07']!;
    const word = { runId: all.run.id, starlight, surroundings, note: '' };
    expectAnswer(await all.reviewer.post(`${detection}/reviews`, word), 201, ['id', 'reviewer', 'starlight', 'note']);
    itemsOf(await lead.get(`${detection}/reviews`), ['id', 'reviewer', 'starlight', 'surroundings', 'note']);
    const pair = { catalogueId: all.catalogues.deep, rowId: 1, action: 'reject' };
    expectAnswer(await lead.post(`${detection}/overrides`, pair), 400, ['errors']);
    const made = await lead.post(`${detection}/overrides`, { ...pair, note: 'an artefact' });
    expectAnswer(made, 201, ['id', 'action', 'note']);
    expectAnswer(await lead.delete(`/overrides/${made.body.id}`, { note: 'it is real' }), 200, ['withdrawnAt']);
    itemsOf(await lead.get(`${survey}/docket?state=all`), ['detectionId', 'starlight', 'assignedTo']);
    const { id: userId } = (await all.reviewer.get('/auth/me')).body;
    const ids = [all.items['S01']!.detectionId];
    expectAnswer(await lead.post(`${survey}/assignments`, { detectionIds: ids, userId }), 204);
    expect(itemsOf(await all.reviewer.get(`${survey}/docket?assigned=me`))).toHaveLength(1);
  });

  it('serve the shortlist', async () => {
    const seen = await lead.get(`${survey}/shortlist`);
    expectAnswer(seen, 200, ['runId', 'version', 'entries']);
    const [latest] = (await lead.get(`${survey}/runs?limit=1`)).body.items;
    await settle({ ...all, run: latest }, 'S08');
    const body = { runId: latest.id, entries: [{ detectionId: all.items['S08']!.detectionId, reason: 'dark' }] };
    const etag = { 'if-match': seen.headers.get('etag')! };
    expectAnswer(await lead.put(`${survey}/shortlist`, body, etag), 200, ['runId', 'version', 'entries']);
    expectAnswer(await lead.put(`${survey}/shortlist`, body, etag), 412, ['current']);
  });

  it('tell errors as problem documents, with pointers for bad input', async () => {
    const bad = await lead.post('/surveys', { teamId: all.team.id, cosmology: { h0: 'fast' } });
    expectAnswer(bad, 400, ['type', 'title', 'status', 'detail', 'instance', 'errors']);
    expect(bad.headers.get('content-type')).toContain('application/problem+json');
    expect(bad.body.type).toBe('urn:eremite:error:validation-failed');
    const pointers = bad.body.errors.map(({ pointer }: { pointer: string }) => pointer);
    expect(pointers).toEqual(expect.arrayContaining(['/name', '/cosmology/h0']));
    for (const path of [survey, run, detection, `/catalogues/${all.catalogues.hi}`, `/criteria/${all.criteria.id}`]) {
      expectAnswer(await all.stranger.get(path), 404);
    }
    expectAnswer(await lead.get(`/runs/${randomUUID()}`), 404);
    expectAnswer(await all.observer.post(`${survey}/criteria`, { settings: {} }), 403);
    expectAnswer(await lead.get('/no/such/path'), 404, ['type', 'title', 'status']);
  });

  it('serve lists a page at a time', async () => {
    const first = await lead.get(`${survey}/detections?limit=7`);
    expect(itemsOf(first)).toHaveLength(7);
    const rest = await lead.get(`${survey}/detections?limit=7&cursor=${first.body.nextCursor}`);
    expect(itemsOf(rest)).toHaveLength(5);
    expect(rest.body.nextCursor).toBeNull();
    expectAnswer(await lead.get(`${survey}/detections?limit=1001`), 400);
  });

  it('serve probes, figures and their own description', async () => {
    expectAnswer(await app.client().get('/health/live'), 200);
    expectAnswer(await app.client().get('/health/ready'), 200);
    expectAnswer(await app.client().get('//health/ready'), 200);
    expectAnswer(await app.client().get('/metrics'), 401);
    expectAnswer(await lead.get('/metrics'), 403);
    expectAnswer(await app.client().get('//api/openapi.json'), 200, ['openapi', 'paths']);
  });
});
