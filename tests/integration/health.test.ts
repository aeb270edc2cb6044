import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aUser } from '../support/builders.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

const METRICS_TOKEN = 'a token for the scraper';

describe('the probes and the figures', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startApp({ metricsToken: METRICS_TOKEN.replaceAll(' ', '-') });
  });
  afterAll(() => app.close());

  it.each(['//health/live', '//health/ready', '/health/live', '/health/ready'])(
    'answer at %s without signing in',
    async (path) => {
      expect(await app.client().get(path)).toMatchObject({ status: 200, body: { status: 'ok' } });
    },
  );

  it('refuse the figures to whoever is not signed in, and to an ordinary account', async () => {
    expect((await app.client().get('//metrics')).status).toBe(401);
    const user = await aUser(app);
    expect((await (await app.signIn(user.email)).get('//metrics')).status).toBe(403);
  });

  it('give the figures to the configured scraper and to an administrator', async () => {
    const scraped = await app.client(METRICS_TOKEN.replaceAll(' ', '-')).get('//metrics');
    expect(scraped.status).toBe(200);
    expect(scraped.headers.get('content-type')).toMatch(/^text\/plain/);
    expect(scraped.text).toMatch(/^eremite_http_requests_total\{method="GET",status="2xx"\} [1-9]/m);
    const { email } = await aUser(app, { isAdministrator: true });
    expect((await (await app.signIn(email)).get('/metrics')).status).toBe(200);
  });

  it('describe every path in an OpenAPI 3.1 document that a signed-out reader may have', async () => {
    const { status, body } = await app.client().get('//api/openapi.json');
    expect(status).toBe(200);
    expect(body.openapi).toBe('3.1.0');
    expect(body.paths['/api/v1/surveys'].post.requestBody.content['application/json'].schema.required).toContain(
      'teamId',
    );
    const page = await app.client().get('//api/docs');
    expect(page.text).toContain('swagger-ui');
    expect(page.text).not.toMatch(/(src|href)=["'](https?:)?\/\//);
  });

  it('answer an unknown path of the API as a problem without a stack', async () => {
    const answer = await app.client().get('/nothing-here');
    expect(answer.status).toBe(404);
    expect(answer.headers.get('content-type')).toMatch(/^application\/problem\+json/);
    expect(answer.body).toMatchObject({
      type: 'urn:eremite:error:not-found',
      status: 404,
      instance: '/api/v1/nothing-here',
    });
    expect(answer.text).not.toMatch(/\bat .*\.(ts|js):\d/);
  });

  it('send a content policy of this origin only', async () => {
    const policy = (await app.client().get('//health/live')).headers.get('content-security-policy') ?? '';
    expect(policy).toContain("default-src 'self'");
    expect(policy).not.toMatch(/https?:|unsafe-eval|script-src[^;]*unsafe-inline/);
  });
});
