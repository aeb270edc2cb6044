import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { demoSurvey, type DemoSurvey, json } from './support/demo-survey.ts';
import { openBrowser, type TestBrowser } from './support/open-browser.ts';
import { stopAtFailure } from './support/stop-at-failure.ts';

let browser: TestBrowser;
let page: Page;
let survey: DemoSurvey;
beforeAll(async () => {
  browser = await openBrowser();
  page = await browser.as('reviewer');
  survey = await demoSurvey(page);
});
afterAll(() => browser?.close());

const title = () => page.getByRole('heading', { level: 1 }).innerText();
const reviewsOf = async (id: string) =>
  (await json<{ items: { mine: boolean; note: string }[] }>(page, `/detections/${id}/reviews`)).items.filter(
    ({ mine }) => mine,
  );
const idInAddress = () => /docket\/([0-9a-f-]{36})/.exec(page.url())![1]!;

/** Presses a key and waits until another detection stands on the page: in the address, in the heading, on the sky. */
async function moves(key: string): Promise<void> {
  const [before, heading] = [idInAddress(), await title()];
  await page.keyboard.press(key);
  await page.waitForURL((url) => !url.pathname.includes(before));
  await page.waitForFunction((old) => (document.querySelector('h1')?.innerText ?? old) !== old, heading);
  await page.getByRole('group', { name: /^Sky about/ }).waitFor();
}

describe('a reviewer with nothing but the keyboard', () => {
  stopAtFailure();

  it('begins with the first of the docket', async () => {
    await page.goto(`/surveys/${survey.id}/docket?assigned=me`);
    const begin = page.getByRole('button', { name: 'Begin with the first' });
    await begin.focus();
    await page.keyboard.press('Enter');
    await page.waitForURL(/docket\/[0-9a-f-]{36}/);
    await page.getByRole('group', { name: /^Sky about/ }).waitFor();
    await page.evaluate(() => (document.activeElement as HTMLElement | null)?.blur());
  });

  it('moves on and back without deciding', async () => {
    const first = await title();
    const id = idInAddress();
    await moves('j');
    expect(await title()).not.toBe(first);
    await moves('k');
    expect(await title()).toBe(first);
    await moves('ArrowRight');
    await moves('ArrowLeft');
    expect(idInAddress()).toBe(id);
    expect(await reviewsOf(id)).toEqual([]);
  });

  it('agrees with Enter and is at the next', async () => {
    const id = idInAddress();
    await moves('Enter');
    await page
      .getByText(/^You agreed/)
      .first()
      .waitFor();
    expect(await reviewsOf(id)).toHaveLength(1);
  });

  it('departs from the verdict only with a note', async () => {
    const id = idInAddress();
    await page.keyboard.press('o');
    const dialog = page.getByRole('dialog');
    const note = dialog.getByLabel('Note');
    await note.waitFor();
    await page.keyboard.press('Control+Enter');
    expect(await dialog.getByRole('button', { name: 'Override' }).isDisabled()).toBe(true);
    expect(await reviewsOf(id)).toEqual([]);
    await dialog.getByLabel('Starlight').selectOption('cannot tell');
    await note.focus();
    await page.keyboard.type('The noise is higher here than stated.');
    await page.keyboard.press('Control+Enter');
    await dialog.waitFor({ state: 'detached' });
    expect(await reviewsOf(id)).toMatchObject([{ note: 'The noise is higher here than stated.' }]);
    // Deciding goes on to the next.
    await page.waitForURL((url) => !url.pathname.includes(id));
    await page.getByRole('group', { name: /^Sky about/ }).waitFor();
  });

  it('types o, n and j into a note without anything happening', async () => {
    const id = idInAddress();
    await page.keyboard.press('n');
    const note = page.getByRole('dialog').getByLabel('Note');
    await note.waitFor();
    await page.keyboard.type('join on');
    expect(await note.inputValue()).toBe('join on');
    expect(idInAddress()).toBe(id);
    await page.keyboard.press('Escape');
    await page.getByRole('dialog').waitFor({ state: 'detached' });
  });

  it('sees every key on the sheet that ? opens', async () => {
    await page.keyboard.press('Shift+?');
    const sheet = page.locator('.bp6-hotkey-dialog');
    await sheet.waitFor();
    const words = await sheet.innerText();
    for (const line of ['agree', 'override…', 'next', 'previous']) expect(words).toContain(line);
    await page.keyboard.press('Escape');
    await sheet.waitFor({ state: 'detached' });
  });

  it('can switch the single keys off; the buttons stay', async () => {
    const at = page.url();
    await page.goto('/account');
    await page.getByLabel('Single-key commands on the detection page').uncheck({ force: true });
    await page.goto(at);
    await page.getByRole('group', { name: /^Sky about/ }).waitFor();
    await page.keyboard.press('o');
    await page.keyboard.press('j');
    expect(page.url()).toBe(at);
    expect(await page.getByRole('dialog').count()).toBe(0);
    await page.getByRole('button', { name: 'override…' }).click();
    await page.getByRole('dialog').waitFor();
  });

  it('met no error of a script and asked no other host', () => {
    expect(browser.complaints()).toEqual([]);
  });
});
