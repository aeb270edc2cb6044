import { readFileSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { send } from './support/api.ts';
import { violations } from './support/axe.ts';
import { demoSurvey, type DemoSurvey, detections } from './support/demo-survey.ts';
import { openBrowser, type TestBrowser } from './support/open-browser.ts';
import { overflow } from './support/overflow.ts';
import { stopAtFailure } from './support/stop-at-failure.ts';

let browser: TestBrowser;
let page: Page;
let survey: DemoSurvey;
let name: string;
let link: string;
beforeAll(async () => {
  browser = await openBrowser();
  page = await browser.as('lead');
  survey = await demoSurvey(page);
});
afterAll(() => browser?.close());

const button = (text: string | RegExp) => page.getByRole('button', { name: text, exact: true });

async function download(on: Page, text: string): Promise<{ name: string; bytes: Buffer }> {
  const [file] = await Promise.all([
    on.waitForEvent('download').catch((error: Error) => {
      throw new Error(`${text}: ${error.message}`, { cause: error });
    }),
    on.getByRole('button', { name: text, exact: true }).click(),
  ]);
  return { name: file.suggestedFilename(), bytes: readFileSync(await file.path()) };
}

describe('from a settled detection to a referee', () => {
  stopAtFailure();

  it('refuses a detection that is not settled, and says why', async () => {
    const found = await detections(page, survey, 'starlight=starlit&limit=1');
    const { detectionId } = found[0]!;
    name = found[0]!.name;
    await page.goto(`/surveys/${survey.id}/detections/${detectionId}`);
    await page
      .getByRole('button', { name: /on the shortlist$|shortlist$/i })
      .first()
      .click();
    await page
      .getByText(/not settled: the lead has not given the last word/)
      .first()
      .waitFor();
    const word = { runId: survey.runId, starlight: 'starlit', surroundings: 'cannot tell', note: 'Plain.' };
    const settled = await send(page, 'POST', `/detections/${detectionId}/settlements`, word);
    expect(settled.ok(), await settled.text()).toBe(true);
  });

  it('picks by a rule what is settled', async () => {
    await page.goto(`/surveys/${survey.id}/shortlist`);
    await page.getByText('starlit', { exact: true }).last().click();
    await page.getByText('cannot tell', { exact: true }).last().click();
    await page.getByLabel('Gravest doubt').selectOption('serious');
    await button('Show what fits').click();
    await page.getByRole('status').getByRole('link', { name }).waitFor();
    await button('Add to the list').click();
    await page.getByRole('table', { name: 'Shortlist' }).getByRole('link', { name }).waitFor();
    expect(await violations(page)).toEqual([]);
    expect(await overflow(page)).toEqual([]);
  });

  it('says from where and when the list can be seen', async () => {
    await page.getByLabel('Site').fill('Invented dome');
    await page.getByLabel('Latitude').fill('28.7');
    await page.getByLabel('Longitude').fill('-17.9');
    await page.getByLabel('Semester').fill('2026B');
    await button('Look').click();
    const table = page.getByRole('table', { name: 'Observability' });
    await table.getByRole('row').nth(1).waitFor();
    expect(await table.getByRole('row').nth(1).textContent()).toMatch(/\d{3}\.\d.*2026-1\d-\d\d/);
  });

  it('freezes an edition, but not without saying what it is for', async () => {
    await button('Freeze an edition').click();
    const dialog = page.getByRole('dialog');
    expect(await dialog.getByRole('button', { name: 'Freeze' }).isDisabled()).toBe(true);
    await dialog.getByLabel('Note').fill('For the referee.');
    await dialog.getByRole('button', { name: 'Freeze' }).click();
    await page.getByRole('heading', { name: /^Edition \d+$/, level: 1 }).waitFor();
    await page.getByRole('table', { name: 'Sources of the edition' }).getByText(name).waitFor();
    await page.getByText(/^What changed since edition/).waitFor();
    await page.getByText(`Added: ${name}`).waitFor();
  });

  it('hands it out in every format', async () => {
    const archive = page.getByRole('button', { name: 'Archive (zip)', exact: true });
    await page.waitForFunction(
      (element) => !element?.classList.contains('bp6-disabled'),
      await archive.elementHandle(),
    );
    const starts: [text: string, ending: RegExp, start: RegExp][] = [
      ['CSV', /\.csv$/, /screening result/],
      ['VOTable 1.5', /\.vot$/, /<VOTABLE version="1\.5"/],
      ['VOTable 1.4', /\.vot$/, /<VOTABLE version="1\.4"/],
      ['FITS table', /\.fits$/, /^SIMPLE {2}=/],
      ['Machine-readable table', /\.txt$/, /^Title: Shortlist of edition/],
      ['LaTeX table', /\.tex$/, /\\begin\{deluxetable\*\}/],
      ['JSON', /\.json$/, /^\{"table"/],
      ['Target list', /\.txt$/, /^# Targets of edition/],
      ['Methods (TeX)', /\.tex$/, /\\citep\{/],
      ['References (BibTeX)', /\.bib$/, /^@article\{/],
      ['Dossier (PDF)', /\.pdf$/, /^%PDF-/],
      ['Archive (zip)', /\.zip$/, /^PK/],
    ];
    for (const [text, ending, start] of starts) {
      // The browser lets a page start ten downloads before it asks; a new page begins anew.
      if (text === 'Dossier (PDF)') await page.reload();
      const file = await download(page, text);
      expect(file.name, text).toMatch(ending);
      expect(file.bytes.subarray(0, 4000).toString('latin1'), text).toMatch(start);
      if (text === 'CSV') expect(file.bytes.toString()).toContain(name);
    }
    await page.getByLabel('Table', { exact: true }).selectOption('limits');
    expect((await download(page, 'CSV')).bytes.toString()).toMatch(/detection,catalogue,band/);
  });

  it('comes out the same when repeated from its inputs', async () => {
    await button('Repeat from the inputs').click();
    await page.getByText(/Identical: all \d+ verdicts/).waitFor({ timeout: 120_000 });
  });

  it('is read by a guest in a clean browser, and only that', async () => {
    await page.getByLabel('For').fill('the referee');
    await button('Make a link').click();
    link = (await page.locator('code', { hasText: '/shared/' }).textContent())!;
    expect(await violations(page)).toEqual([]);
    const guest = await browser.visitor();
    await guest.goto(link);
    await guest.getByRole('heading', { name: /Halcyon Strip, edition/ }).waitFor();
    await guest.getByText('A verdict is a screening result').first().waitFor();
    await guest.getByRole('table', { name: 'Sources of the edition' }).getByText(name).waitFor();
    expect((await download(guest, 'CSV')).bytes.toString()).toContain(name);
    expect((await download(guest, 'Dossier (PDF)')).bytes.subarray(0, 5).toString()).toBe('%PDF-');
    expect(await guest.getByRole('button', { name: /Freeze|Repeat|Make a link/ }).count()).toBe(0);
    expect(await violations(guest)).toEqual([]);
    expect(await overflow(guest)).toEqual([]);
    await guest.goto(`/surveys/${survey.id}/shortlist`);
    await guest.getByRole('heading', { name: 'Sign in' }).waitFor();
    await guest.context().close();
  });

  it('is closed to the guest once the link is revoked', async () => {
    await button('Revoke the link for the referee').click();
    await page.getByRole('dialog').getByRole('button', { name: 'Revoke' }).click();
    await page.getByText(/revoked \d/).waitFor();
    const guest = await browser.visitor();
    await guest.goto(link);
    await guest.getByRole('heading', { name: 'This link opens nothing' }).waitFor();
    await guest
      .getByText(/was revoked/)
      .first()
      .waitFor();
    await guest.context().close();
  });

  it('met no error of a script and asked no other host', () => {
    expect(browser.complaints()).toEqual([]);
  });
});
