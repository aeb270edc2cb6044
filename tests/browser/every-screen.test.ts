import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { API, send } from './support/api.ts';
import { violations } from './support/axe.ts';
import { demoSurvey, type DemoSurvey, detections, json } from './support/demo-survey.ts';
import { openBrowser, type TestBrowser } from './support/open-browser.ts';
import { overflow } from './support/overflow.ts';

/** The smallest window the screens are made for. */
const SMALL = { width: 1024, height: 768 } as const;
const HI_LIST = join(import.meta.dirname, '../../testdata/browser/kestrel-hi.csv');

let browser: TestBrowser;
let page: Page;
let survey: DemoSurvey;
let screens: Record<string, string>;
let intakeId: string;

beforeAll(async () => {
  browser = await openBrowser();
  page = await browser.as('lead', SMALL);
  survey = await demoSurvey(page);
  const list = <T extends { id: string; name?: string }>(what: string) =>
    json<{ items: T[] }>(page, `/surveys/${survey.id}/${what}`).then(({ items }) => items);
  const [dark] = await detections(page, survey, 'starlight=dark&limit=1');
  const [contested] = await detections(page, survey, 'starlight=contested&limit=1');
  const catalogue = (await list('catalogues')).find(({ name }) => name === 'Halcyon deep g, r')!;
  const criteria = await list('criteria');
  const editions = await list('editions');
  intakeId = await stagedIntake(page, survey.id);
  const inSurvey = {
    overview: '',
    detections: '/detections',
    'a dark detection': `/detections/${dark!.detectionId}`,
    'neighbours of a detection': `/detections/${contested!.detectionId}?tab=neighbours`,
    plots: '/plots',
    docket: '/docket',
    shortlist: '/shortlist',
    editions: '/editions',
    'an edition': `/editions/${editions[0]!.id}`,
    catalogues: '/catalogues',
    'a catalogue': `/catalogues/${catalogue.id}`,
    intake: '/intake',
    'the wizard': `/intake/${intakeId}`,
    criteria: '/criteria',
    'new criteria': '/criteria/new',
    'saved criteria': `/criteria/${criteria[0]!.id}`,
    runs: '/runs',
    'a run': `/runs/${survey.runId}`,
    ledger: '/ledger',
    people: '/people',
    settings: '/settings',
  };
  screens = Object.fromEntries(Object.entries(inSurvey).map(([name, path]) => [name, `/surveys/${survey.id}${path}`]));
  screens['surveys'] = '/surveys';
  screens['account'] = '/account';
  screens['methods'] = '/methods';
  screens['no such page'] = '/nowhere';
});
afterAll(async () => {
  if (intakeId) await send(page, 'DELETE', `/intakes/${intakeId}`);
  await browser?.close();
});

/** A table that is brought in and not published. */
async function stagedIntake(on: Page, surveyId: string): Promise<string> {
  const csrf = (await on.context().cookies()).find(({ name }) => name === 'csrf')?.value ?? '';
  const file = { name: 'kestrel-hi.csv', mimeType: 'text/csv', buffer: readFileSync(HI_LIST) };
  const answer = await on.request.post(`${API}/surveys/${surveyId}/intakes`, {
    headers: { 'x-csrf-token': csrf },
    multipart: { file },
  });
  return ((await answer.json()) as { id: string }).id;
}

const theme = (on: Page) => on.evaluate(() => document.documentElement.dataset['theme']);

async function open(on: Page, path: string): Promise<void> {
  await on.goto(path);
  await on.waitForLoadState('networkidle');
}

/** The other theme, by the menu, as people do it. */
async function switchTheme(on: Page): Promise<void> {
  await on.getByRole('button', { name: /menu of/i }).click();
  const item = on.getByRole('menuitem', { name: /^Use the (dark|light) theme/ });
  await item.click();
  await item.waitFor({ state: 'detached' });
}

/** Nothing serious in either theme, nothing cut off in a small window. */
async function faults(on: Page, name: string): Promise<string[]> {
  const found = [...(await overflow(on)), ...(await violations(on))];
  const first = await theme(on);
  await switchTheme(on);
  expect(await theme(on)).toBe(first === 'dark' ? 'light' : 'dark');
  found.push(...(await violations(on)));
  return found.map((fault) => `${name}: ${fault}`);
}

describe('every screen', () => {
  it('is accessible in both themes and fits a window of 1024 by 768', { timeout: 400_000 }, async () => {
    const found: string[] = [];
    for (const [name, path] of Object.entries(screens)) {
      await open(page, path);
      found.push(...(await faults(page, name)));
    }
    expect(found).toEqual([]);
  });

  it('of the administrator too', async () => {
    const admin = await browser.as('admin', SMALL);
    await open(admin, '/administration');
    expect(await faults(admin, 'administration')).toEqual([]);
  });

  it('before one is in, too', async () => {
    const found: string[] = [];
    for (const mode of ['dark', 'light'] as const) {
      const visitor = await browser.visitor({ ...SMALL, theme: mode });
      for (const path of ['/sign-in', '/accept-invitation?token=not-a-token']) {
        await open(visitor, path);
        expect(await theme(visitor)).toBe(mode);
        found.push(...(await overflow(visitor)), ...(await violations(visitor)));
      }
    }
    expect(found).toEqual([]);
  });

  it('asks its questions in dialogs that are accessible', async () => {
    const found: string[] = [];
    await open(page, screens['a dark detection']!);
    for (const name of ['override…', 'settle…', 'change']) {
      await page.getByRole('button', { name, exact: true }).click();
      await page.getByRole('dialog').waitFor();
      found.push(...(await violations(page)));
      await page.keyboard.press('Escape');
      await page.getByRole('dialog').waitFor({ state: 'detached' });
    }
    await open(page, screens['surveys']!);
    await page.getByRole('button', { name: 'New survey' }).click();
    await page.getByRole('dialog').waitFor();
    found.push(...(await violations(page)));
    expect(found).toEqual([]);
  });

  it('asked no other host and met no error of a script', () => {
    expect(browser.complaints()).toEqual([]);
  });
});

it('leads a comparison with no other run to the run, which offers the choice', async () => {
  await page.goto(`/surveys/${survey.id}/runs/${survey.runId}/difference`);
  await page.getByRole('heading', { level: 1, name: /^Run \d+$/ }).waitFor();
  expect(new URL(page.url()).pathname).toBe(`/surveys/${survey.id}/runs/${survey.runId}`);
});
