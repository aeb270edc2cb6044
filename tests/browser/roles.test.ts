import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { send } from './support/api.ts';
import { DEMO_PASSWORD, emailOf } from './support/demo-people.ts';
import { demoSurvey, type DemoSurvey, detections } from './support/demo-survey.ts';
import { openBrowser, type TestBrowser } from './support/open-browser.ts';

let browser: TestBrowser;
beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser?.close());

/** What only a lead or a reviewer may press, wherever it stands. */
const FORBIDDEN =
  /^(New |Bring in|Choose a file|Publish|Discard|Start|Cancel|Remove|Assign|Begin|Invite|Revoke|Edit|Move|Make it|Reject|Withdraw|change$|Save$|Save (the|these) (survey|criteria|settings))|agree|override|settle|shortlist$/i;

async function buttons(page: Page): Promise<string[]> {
  const all = page.locator('#content, .det-page').getByRole('button');
  return (
    await all.evaluateAll((found) => found.map((one) => one.getAttribute('aria-label') ?? one.textContent ?? ''))
  ).map((text) => text.trim());
}

describe('an observer', () => {
  let page: Page;
  let survey: DemoSurvey;
  let detectionId: string;
  beforeAll(async () => {
    page = await browser.as('observer');
    survey = await demoSurvey(page);
    detectionId = (await detections(page, survey, 'starlight=contested&limit=1'))[0]!.detectionId;
  });

  it('finds no button on any screen that is not for observers', async () => {
    const screens = {
      '': 'Halcyon Strip',
      '/detections': 'Detections',
      [`/detections/${detectionId}`]: /^HLY/,
      '/docket': 'Docket',
      '/catalogues': 'Catalogues',
      '/intake': 'Intake',
      '/criteria': 'Criteria',
      '/runs': 'Runs',
      [`/runs/${survey.runId}`]: /^Run/,
      '/shortlist': 'Shortlist',
      '/people': 'People',
    };
    for (const [path, title] of Object.entries(screens)) {
      await page.goto(`/surveys/${survey.id}${path}`);
      await page.getByRole('heading', { level: 1, name: title }).waitFor();
      expect(
        (await buttons(page)).filter((text) => FORBIDDEN.test(text)),
        path || 'overview',
      ).toEqual([]);
    }
    await page.goto('/surveys');
    await page.getByRole('link', { name: 'Halcyon Strip' }).waitFor();
    expect(await page.getByRole('button', { name: 'New survey' }).count()).toBe(0);
  });

  it('may open every catalogue, where nothing can be removed', async () => {
    await page.goto(`/surveys/${survey.id}/catalogues`);
    await page.getByRole('link', { name: 'Halcyon W1' }).click();
    await page.getByRole('heading', { level: 1, name: 'Halcyon W1' }).waitFor();
    expect(await page.getByRole('button', { name: 'Remove' }).count()).toBe(0);
  });

  it('is refused with 403 where he asks the interface directly', async () => {
    const verdict = { runId: survey.runId, starlight: 'dark', surroundings: 'alone', note: 'mine' };
    const asked: [string, string, unknown][] = [
      ['POST', `/detections/${detectionId}/reviews`, verdict],
      ['POST', `/detections/${detectionId}/settlements`, verdict],
      ['POST', `/surveys/${survey.id}/criteria`, { settings: {}, note: '' }],
      ['PUT', `/surveys/${survey.id}/shortlist`, { runId: survey.runId, entries: [] }],
      ['POST', `/teams/${survey.teamId}/invitations`, { email: 'x@example.org', role: 'lead' }],
    ];
    for (const [method, path, body] of asked) {
      expect((await send(page, method, path, body)).status(), `${method} ${path}`).toBe(403);
    }
  });
});

describe('the survey of another team', () => {
  it('is not found, as if it were not there', async () => {
    const member = await browser.as('observer');
    const { id } = await demoSurvey(member);
    const stranger = await browser.as('admin');
    for (const path of [
      `/surveys/${id}`,
      `/surveys/${id}/detections`,
      '/surveys/00000000-0000-4000-8000-000000000000',
    ]) {
      await stranger.goto(path);
      await stranger.getByText('There is no such page').waitFor();
    }
    expect((await stranger.request.get(`/api/v1/surveys/${id}`)).status()).toBe(404);
  });
});

describe('somebody who is not signed in', () => {
  it('is led to the sign-in, told when the password is wrong, and brought to the address asked for', async () => {
    const member = await browser.as('reviewer');
    const { id } = await demoSurvey(member);
    const page = await browser.visitor();
    const wanted = `/surveys/${id}/detections?starlight=dark`;
    await page.goto(wanted);
    await page.getByRole('heading', { name: 'Sign in' }).waitFor();
    await page.getByLabel('E-mail').fill(emailOf('reviewer'));
    await page.getByLabel('Password').fill('not the password');
    await page.getByRole('button', { name: 'Sign in' }).click();
    expect(await page.getByRole('alert').innerText()).toMatch(/password/i);
    await page.getByLabel('Password').fill(DEMO_PASSWORD);
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.getByRole('heading', { name: 'Detections' }).waitFor();
    const { pathname, search } = new URL(page.url());
    expect(pathname + search).toBe(wanted);
  });

  it('who has signed out cannot come back by the address', async () => {
    const page = await browser.as('observer');
    const { id } = await demoSurvey(page);
    await page.goto(`/surveys/${id}`);
    await page.getByRole('button', { name: /menu of/i }).click();
    await page.getByRole('menuitem', { name: 'Sign out' }).click();
    await page.getByRole('heading', { name: 'Sign in' }).waitFor();
    await page.goto(`/surveys/${id}`);
    await page.getByRole('heading', { name: 'Sign in' }).waitFor();
  });

  it('is never sent to another site after signing in', async () => {
    const page = await browser.visitor();
    await page.goto('/sign-in?from=//elsewhere.example/x');
    await page.getByLabel('E-mail').fill(emailOf('observer'));
    await page.getByLabel('Password').fill(DEMO_PASSWORD);
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.getByRole('heading', { name: 'Surveys' }).waitFor();
    expect(new URL(page.url()).origin).toBe(new URL(browser.url).origin);
  });
});
