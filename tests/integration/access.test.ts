import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey } from '../support/builders.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

/** Whoever has no account may do these, and nothing else. */
const PUBLIC = new Set([
  'POST /auth/sign-in',
  'POST /auth/sign-out',
  'GET /invitations/preview',
  'POST /invitations/accept',
  'GET /health/live',
  'GET /health/ready',
  // A frozen edition, for whoever holds its link.
  'GET /shared/{linkToken}',
  'GET /shared/{linkToken}/detections/{detectionId}',
  'GET /shared/{linkToken}/export/{format}',
]);

describe('every route of the API', () => {
  let app: TestApp;
  const routes: { method: string; path: string }[] = [];
  beforeAll(async () => {
    app = await startApp();
    const { body } = await app.client().get('//api/openapi.json');
    for (const [path, methods] of Object.entries(body.paths as Record<string, object>)) {
      for (const method of Object.keys(methods)) {
        if (/^(get|post|put|patch|delete)$/.test(method)) {
          routes.push({ method: method.toUpperCase(), path: path.replace('/api/v1', '') });
        }
      }
    }
  });
  afterAll(() => app.close());

  it('refuses whoever is not signed in, but for the few that are public', async () => {
    expect(routes.length).toBeGreaterThan(30);
    const open: string[] = [];
    for (const { method, path } of routes) {
      const given = path.replace(/\{\w+\}/g, () => randomUUID());
      const { status } = await app.client().request(method, given, method === 'GET' ? undefined : {});
      if (status !== 401) open.push(`${method} ${path}`);
      // A link that was never given out opens nothing.
      if (path.startsWith('/shared/')) expect([400, 404], path).toContain(status);
    }
    expect(open.filter((route) => !PUBLIC.has(route))).toEqual([]);
  });

  it('shows nothing of a survey to another team', async () => {
    const { survey, team, stranger } = await aStaffedSurvey(app);
    const seen: string[] = [];
    const scoped = routes.filter(({ path }) => /^\/(surveys|teams)\/\{/.test(path));
    expect(scoped.length).toBeGreaterThan(8);
    for (const { method, path } of scoped) {
      const given = path
        .replace(/^\/surveys\/\{\w+\}/, `/surveys/${survey.id}`)
        .replace(/^\/teams\/\{\w+\}/, `/teams/${team.id}`)
        .replace(/\{\w+\}/g, () => randomUUID());
      const { status } = await stranger.request(method, given, method === 'GET' ? undefined : {});
      // A body or query that does not fit its schema is refused before anyone asks whose survey it is.
      if (status !== 404 && status !== 400) seen.push(`${method} ${path}: ${status}`);
    }
    expect(seen).toEqual([]);
  });
});
