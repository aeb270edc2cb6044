import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aScreenedSurvey } from '../support/builders/small-survey.ts';
import type { Client } from '../support/client.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

type Request = [method: string, path: string, body?: object];

let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
let reads: Request[];
let writes: { lead: Request[]; review: Request[] };
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
  const { surveyId, run, criteria, catalogues, items, team } = screened;
  const { detectionId } = items['S01']!;
  const word = { runId: run.id, starlight: 'starlit', surroundings: 'alone' };
  const overriding = { catalogueId: catalogues.deep, rowId: 1, action: 'reject', note: 'no' };
  const { id: overrideId } = (await screened.lead.post(`/detections/${detectionId}/overrides`, overriding)).body;
  const me = (await screened.reviewer.get('/auth/me')).body;
  const assignment = { detectionIds: [detectionId], userId: me.id ?? me.user.id };
  const survey = `/surveys/${surveyId}`;
  reads = [
    ...[
      'overview',
      'catalogues',
      'detections',
      'criteria',
      'runs',
      'docket',
      'shortlist',
      'shortlist/export',
      'ledger',
    ].map((part): Request => ['GET', `${survey}/${part}`]),
    ...['', '/verdicts', '/candidates', '/neighbours', `/difference?from=${run.id}`, `/detections/${detectionId}`].map(
      (part): Request => ['GET', `/runs/${run.id}${part}`],
    ),
    ['GET', survey],
    ['GET', `/criteria/${criteria.id}`],
    ['GET', `/jobs/${run.jobId}`],
    ['GET', `/catalogues/${catalogues.deep}`],
    ['GET', `/detections/${detectionId}`],
    ['GET', `/detections/${detectionId}/reviews`],
    ['GET', `/detections/${detectionId}/overrides`],
    ['GET', `/teams/${team.id}/members`],
  ];
  writes = {
    lead: [
      ['PATCH', survey, { description: 'x' }],
      ['POST', `${survey}/criteria`, { settings: {} }],
      ['POST', `${survey}/runs`, { criteriaId: criteria.id }],
      ['POST', `${survey}/assignments`, assignment],
      ['DELETE', `${survey}/assignments`, assignment],
      ['PUT', `${survey}/shortlist`, { runId: run.id, entries: [] }],
      ['POST', `/detections/${detectionId}/settlements`, { ...word, note: 'so be it' }],
      ['DELETE', `/catalogues/${catalogues.deep}`],
      ['DELETE', survey],
    ],
    review: [
      ['POST', `/detections/${detectionId}/reviews`, word],
      // Another row than the lead's: what a colleague has said of an object is shown, not written over.
      ['POST', `/detections/${detectionId}/overrides`, { ...overriding, rowId: 2 }],
      ['DELETE', `/overrides/${overrideId}`, { note: 'no' }],
      ['PATCH', `/detections/${detectionId}`, { distanceMpc: 3, source: 's', note: 'n' }],
    ],
  };
});
afterAll(() => app.close());
const answers = async (client: Client, requests: Request[]) => {
  const found: Record<string, number> = {};
  for (const [method, path, body] of requests) {
    found[`${method} ${path}`] = (await client.request(method, path, body)).status;
  }
  return found;
};
const all = (requests: Request[], status: number) =>
  Object.fromEntries(requests.map(([method, path]) => [`${method} ${path}`, status]));

describe('what the roles may do', () => {
  it('an observer reads everything', async () => {
    expect(await answers(screened.observer, reads)).toEqual(all(reads, 200));
  });

  it('an observer changes nothing', async () => {
    const requests = [...writes.review, ...writes.lead];
    expect(await answers(screened.observer, requests)).toEqual(all(requests, 403));
  });

  it('a reviewer does nothing of the lead’s', async () => {
    expect(await answers(screened.reviewer, writes.lead)).toEqual(all(writes.lead, 403));
  });

  it('another team’s lead finds nothing there', async () => {
    const requests = [...reads, ...writes.review, ...writes.lead];
    expect(await answers(screened.stranger, requests)).toEqual(all(requests, 404));
  });

  it('whoever is not signed in is asked to', async () => {
    const requests = [...reads, ...writes.review, ...writes.lead];
    expect(await answers(app.client(), requests)).toEqual(all(requests, 401));
  });

  it('a token that may only read changes nothing, whosesoever it is', async () => {
    const made = await screened.lead.post('/tokens', { name: 'look', scope: 'read', expiresInDays: 1 });
    const token = app.client(made.body.token);
    expect((await token.get(`/runs/${screened.run.id}/verdicts`)).status).toBe(200);
    const requests = [...writes.review, ...writes.lead];
    expect(await answers(token, requests)).toEqual(all(requests, 403));
  });

  it('a reviewer does what is a reviewer’s', async () => {
    const found = await answers(
      screened.reviewer,
      writes.review.filter(([method]) => method !== 'DELETE'),
    );
    expect(
      Object.values(found).every((status) => status < 300),
      JSON.stringify(found),
    ).toBe(true);
  });
});
