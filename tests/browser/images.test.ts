import type { Page } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { violations } from './support/axe.ts';
import { type DemoSurvey, demoSurvey, detections } from './support/demo-survey.ts';
import { openBrowser, type TestBrowser } from './support/open-browser.ts';

let browser: TestBrowser;
let page: Page;
let survey: DemoSurvey;

/** Share of the panel whose colour is the grey of an image: red, green and blue alike. */
const greyShare = () =>
  page.evaluate(() => {
    const canvas = document.querySelector<HTMLCanvasElement>('.sky-panel canvas')!;
    const { data } = canvas.getContext('2d')!.getImageData(0, 0, canvas.width, canvas.height);
    let grey = 0;
    for (let i = 0; i < data.length; i += 4) {
      if (data[i + 3] === 255 && data[i] === data[i + 1] && data[i] === data[i + 2]) grey++;
    }
    return (4 * grey) / data.length;
  });

beforeAll(async () => {
  browser = await openBrowser();
  page = await browser.as('reviewer');
  survey = await demoSurvey(page);
  const [dark] = await detections(page, survey, 'search=J0307%2B1407&limit=1');
  await page.goto(`/surveys/${survey.id}/detections/${dark!.detectionId}`);
  await page.getByRole('group', { name: /^Sky about/ }).waitFor();
});
afterAll(() => browser?.close());

it('shows the first image behind the panel, another band on demand, and none when asked', async () => {
  await page.getByRole('button', { name: 'r', exact: true, pressed: true }).waitFor();
  await expect.poll(greyShare, { timeout: 20_000 }).toBeGreaterThan(0.3);
  await page.getByRole('button', { name: 'W1', exact: true }).click();
  await page.getByRole('button', { name: 'W1', exact: true, pressed: true }).waitFor();
  await page.getByRole('button', { name: 'no image' }).click();
  await expect.poll(greyShare, { timeout: 20_000 }).toBeLessThan(0.05);
  await page.getByRole('button', { name: 'r', exact: true }).click();
  await expect.poll(greyShare, { timeout: 20_000 }).toBeGreaterThan(0.3);
});

it('reads value and surface brightness under the pointer', async () => {
  await page.getByRole('group', { name: /^Sky about/ }).hover({ position: { x: 240, y: 240 } });
  await expect.poll(() => page.locator('.image-bar__reading').textContent()).toMatch(/03ʰ07ᵐ.*adu/);
});

it('puts all bands side by side, and holds the measured line against the table', async () => {
  await page.getByRole('tab', { name: 'Images' }).click();
  await expect.poll(() => page.locator('.band-strip canvas').count(), { timeout: 20_000 }).toBe(2);
  await page.getByRole('tab', { name: 'Line' }).click();
  const table = page.getByRole('table', { name: /measured of the line/ });
  await table.waitFor();
  expect(await table.getByRole('row', { name: /^W50/ }).textContent()).toMatch(/±/);
  await page.getByRole('img', { name: /^Line at/ }).waitFor();
  expect(await violations(page, ['.image-bar', '.observation'])).toEqual([]);
});
