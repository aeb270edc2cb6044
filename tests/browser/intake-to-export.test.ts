import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { send } from './support/api.ts';
import { DEMO_PASSWORD, emailOf } from './support/demo-people.ts';
import { openBrowser, type TestBrowser } from './support/open-browser.ts';
import { stopAtFailure } from './support/stop-at-failure.ts';

const FILES = join(import.meta.dirname, '../../testdata/browser');
let browser: TestBrowser;
let page: Page;
beforeAll(async () => {
  browser = await openBrowser();
  page = await browser.visitor();
});
afterAll(() => browser?.close());

const button = (name: string | RegExp) => page.getByRole('button', { name });
const heading = (name: string | RegExp) => page.getByRole('heading', { name });
const outcome = () => page.getByRole('complementary', { name: 'Outcome' });

/** Bytes of what a click downloads, and the name it is saved under. */
async function download(click: () => Promise<void>): Promise<{ name: string; text: string }> {
  const [file] = await Promise.all([page.waitForEvent('download'), click()]);
  return { name: file.suggestedFilename(), text: readFileSync(await file.path(), 'utf8') };
}

/** Hands a file to the intake and waits for the wizard with its first check. */
async function bringIn(file: string): Promise<void> {
  await page.getByRole('link', { name: 'Intake', exact: true }).click();
  await heading('Drop a table here').waitFor();
  await page.getByLabel('Table file').setInputFiles(join(FILES, file));
  await heading(file).waitFor();
  await heading('As it stands').waitFor();
}

describe('a lead of a new survey', () => {
  stopAtFailure();

  it('signs in and creates the survey', async () => {
    await page.goto('/');
    await page.getByLabel('E-mail').fill(emailOf('lead'));
    await page.getByLabel('Password').fill(DEMO_PASSWORD);
    await button('Sign in').click();
    await heading('Surveys').waitFor();
    await button('New survey').click();
    await page.getByRole('dialog').getByLabel('Name').fill('Kestrel Field');
    await button('Create survey').click();
    await heading('Kestrel Field').waitFor();
    await heading('No detections yet').waitFor();
  });

  it('brings the HI list in: sees the guesses, the row put aside and why, and answers what is asked', async () => {
    await bringIn('kestrel-hi.csv');
    expect(await page.getByLabel('Role of cz_kms').inputValue()).toBe('velocity');
    expect(await page.getByLabel('Role of flux_jykms').inputValue()).toBe('flux');
    expect(await outcome().innerText()).toMatch(/usable\s+10\s+sidelined\s+1\s/);
    await outcome().getByText('Declination must lie in -90 to +90 degrees').click();
    expect(await outcome().getByRole('group').getByRole('listitem').innerText()).toBe('line 12 dec_deg “97”');
    expect(await button(/^Publish/).isDisabled()).toBe(true);
    await page.getByLabel('What it lists').selectOption('hi');
    await page.getByLabel('Beam, major axis').fill('45');
    await outcome().getByText('ready', { exact: true }).waitFor();
    await outcome()
      .getByText(/Neither beam nor position error/)
      .waitFor({ state: 'detached' });
  });

  it('changes what a column is taken for and sees the check follow', async () => {
    await page.getByLabel('Role of dec_deg').selectOption('');
    await outcome().getByText('not ready').waitFor();
    expect(await button(/^Publish/).isDisabled()).toBe(true);
    await page.getByLabel('Role of dec_deg').selectOption('dec');
    await outcome().getByText('ready', { exact: true }).waitFor();
  });

  it('publishes it and lands on the table with its rows and the one put aside', async () => {
    await button('Publish 10 rows').click();
    await page.waitForURL(/\/catalogues\//);
    await heading('kestrel-hi').waitFor();
    await page.getByText('KRL 10').first().waitFor();
    const aside = page.getByRole('region', { name: 'Sidelined rows' });
    await aside.getByText('97', { exact: true }).first().waitFor();
  });

  it('publishes an optical catalogue with its depth and footprint', async () => {
    await bringIn('kestrel-r.csv');
    await page.getByLabel('What it lists').selectOption('optical');
    await page.getByLabel('System').selectOption('AB');
    await page.getByLabel('Depth, 5 sigma').fill('23.5');
    await page.getByLabel('Footprint').selectOption('all-sky');
    await outcome().getByText('ready', { exact: true }).waitFor();
    await outcome()
      .getByText(/depth of r is not stated/)
      .waitFor({ state: 'detached' });
    await button('Publish 125 rows').click();
    await page.waitForURL(/\/catalogues\//);
    await heading('kestrel-r').waitFor();
    await page.getByText('23.5').first().waitFor();
  });

  it('saves criteria that differ from the defaults', async () => {
    await page.getByRole('link', { name: 'Criteria', exact: true }).click();
    await button('New criteria').first().click();
    await heading('New criteria').waitFor();
    await page.getByLabel('Note').fill('A first look.');
    await button('Save as the next number').click();
    await page.getByRole('link', { name: 'Criteria 1' }).waitFor();
  });

  it('starts a run, sees it finish and reads its counts', async () => {
    await page.getByRole('link', { name: 'Runs', exact: true }).click();
    await button('Start a run').first().click();
    await button('Start').and(page.locator('.bp6-dialog button')).click();
    await heading('Run 1').waitFor();
    await heading('Verdicts').waitFor();
    const facts = await page.getByRole('region', { name: 'What was run' }).innerText();
    expect(facts).toMatch(/Detections\s+10/);
  });

  it('opens a detection and rejects a candidate, but not without a note', async () => {
    await page.getByRole('link', { name: 'Its detections' }).click();
    await page.getByRole('link', { name: 'KRL 03' }).click();
    const candidates = page.getByRole('region', { name: 'Candidates within the search radius' });
    await candidates.getByRole('button').first().click();
    await button('Reject it').click();
    const dialog = page.getByRole('dialog');
    const doIt = dialog.getByRole('button', { name: 'Reject it' });
    expect(await doIt.isDisabled()).toBe(true);
    await dialog.getByLabel('Note').fill('   ');
    expect(await doIt.isDisabled()).toBe(true);
    await dialog.getByLabel('Note').fill('A foreground dwarf by its shape.');
    await doIt.click();
    await dialog.waitFor({ state: 'detached' });
    await page.getByRole('tab', { name: 'History 1' }).click();
    await page.getByText('A foreground dwarf by its shape.').waitFor();
  });

  it('puts it on the shortlist once it is settled, and exports that with the verdict', async () => {
    const detectionId = /detections\/([\w-]+)/.exec(page.url())![1]!;
    const runId = new URL(page.url()).searchParams.get('run')!;
    const word = { runId, starlight: 'cannot tell', surroundings: 'cannot tell', note: 'Not deep enough.' };
    expect((await send(page, 'POST', `/detections/${detectionId}/settlements`, word)).ok()).toBe(true);
    await button(/shortlist$/).click();
    await button(/off the shortlist$/).waitFor();
    await page.getByRole('link', { name: 'Shortlist', exact: true }).click();
    await page.getByRole('link', { name: 'KRL 03' }).waitFor();
    const csv = await download(() =>
      page
        .getByRole('button', { name: 'Export CSV' })
        .or(page.getByRole('link', { name: 'Export CSV' }))
        .click(),
    );
    expect(csv.name).toMatch(/\.csv$/);
    const lines = csv.text
      .trim()
      .split('\n')
      .filter((line) => !line.startsWith('#'));
    expect(lines).toHaveLength(2);
    expect(lines[1]).toContain('KRL 03');
  });

  it('exports all verdicts as CSV and as VOTable, and both hold every detection', async () => {
    await page.getByRole('link', { name: 'Detections', exact: true }).click();
    await page.getByRole('link', { name: 'KRL 01' }).waitFor();
    const item = (name: string) => async () => {
      await button('Export').click();
      await page.getByRole('menuitem', { name }).click();
    };
    const csv = await download(item('Verdicts as CSV'));
    const rows = csv.text
      .trim()
      .split('\n')
      .filter((line) => !line.startsWith('#'));
    expect(rows).toHaveLength(11);
    expect(rows.slice(1).every((row) => /KRL \d\d/.test(row))).toBe(true);
    const votable = await download(item('Verdicts as VOTable'));
    expect(votable.text).toMatch(/^<\?xml[^>]*>\s*(<!--[\s\S]*?-->\s*)?<VOTABLE/);
    expect(votable.text.match(/<TR>/g)).toHaveLength(10);
    expect(votable.text).toContain('KRL 10');
  });

  it('met no error of a script and asked no other host', () => {
    expect(browser.complaints()).toEqual([]);
  });
});
