import type { Page } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { drawnPixels, leftmostChange, mapPicture, type Picture } from './support/canvas.ts';
import { type DemoSurvey, demoSurvey, detections, json } from './support/demo-survey.ts';
import { openBrowser, type TestBrowser } from './support/open-browser.ts';

interface Row {
  catalogueId: string;
  rowId: number;
  raDeg: number;
  decDeg: number;
  separationArcsec: number;
}

let browser: TestBrowser;
let page: Page;
let survey: DemoSurvey;
/** Candidates of the detection on the page with how far east they lie, arcsec; the easternmost first. */
let candidates: { key: string; eastArcsec: number }[];

const panel = () => page.getByRole('group', { name: /^Sky about/ });
const table = () => page.getByRole('region', { name: 'Candidates within the search radius' });
const row = (key: string) => table().locator(`tr[data-key="${key}"]`);

/** The picture once it has stopped changing. */
async function settledPicture(): Promise<Picture> {
  let last = await mapPicture(page);
  for (;;) {
    await page.evaluate(() => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))));
    const next = await mapPicture(page);
    if (drawnPixels(next) > 0 && leftmostChange(last, next) === undefined) return next;
    last = next;
  }
}

beforeAll(async () => {
  browser = await openBrowser();
  page = await browser.as('reviewer');
  survey = await demoSurvey(page);
  const items = await detections(page, survey, 'starlight=contested,confused,starlit&limit=60');
  for (const { detectionId } of items) {
    const detail = await json<{
      verdict: { raDeg: number; decDeg: number };
      searchRadiusArcsec: number;
      candidates: Row[];
    }>(page, `/runs/${survey.runId}/detections/${detectionId}`);
    const { raDeg, decDeg } = detail.verdict;
    candidates = detail.candidates
      .map(({ catalogueId, rowId, raDeg: ra }) => ({
        key: `${catalogueId}:${rowId}`,
        eastArcsec: (ra - raDeg) * 3600 * Math.cos((decDeg * Math.PI) / 180),
      }))
      .sort((a, b) => b.eastArcsec - a.eastArcsec);
    const far = detail.searchRadiusArcsec * 0.4;
    if ((candidates[0]?.eastArcsec ?? 0) < far || (candidates.at(-1)?.eastArcsec ?? 0) > -far) continue;
    await page.goto(`/surveys/${survey.id}/detections/${detectionId}`);
    await panel().waitFor();
    return;
  }
  throw new Error('no detection of the demo has candidates well to the east and well to the west');
});
afterAll(() => browser?.close());

it('draws the sky: rings, beam and marks', async () => {
  const picture = await settledPicture();
  expect(drawnPixels(picture)).toBeGreaterThan(1500);
});

it('draws an object with a greater right ascension left of the centre, one with a smaller right of it', async () => {
  const plain = await settledPicture();
  const middle = plain.width / 2;
  const ringOf = async (key: string) => {
    await row(key).hover();
    const ring = leftmostChange(plain, await settledPicture());
    await page.getByRole('heading', { level: 1 }).hover();
    return ring!;
  };
  // The leftmost changed pixel is that of the ring about the mark: its label stands to the right.
  expect((await ringOf(candidates[0]!.key)).x).toBeLessThan(middle - 20);
  expect((await ringOf(candidates.at(-1)!.key)).x).toBeGreaterThan(middle);
});

it('lights the row of the mark that is pointed at, and chooses it with a click; the row lights the mark', async () => {
  const { key } = candidates[0]!;
  const plain = await settledPicture();
  await row(key).hover();
  const ring = leftmostChange(plain, await settledPicture())!;
  const box = (await panel().boundingBox())!;
  await page.getByRole('heading', { level: 1 }).hover();
  const within = 9;
  await page.mouse.move(box.x + ring.x + within, box.y + ring.y);
  await page.locator('tr.is-hovered').first().waitFor();
  const lit = await page.locator('tr.is-hovered').first().getAttribute('data-key');
  await page.mouse.click(box.x + ring.x + within, box.y + ring.y);
  await page.locator('tr.is-selected').first().waitFor();
  expect(await page.locator('tr.is-selected').first().getAttribute('data-key')).toBe(lit);
  expect(candidates.filter(({ eastArcsec }) => eastArcsec > 0).map((one) => one.key)).toContain(lit);
});

it('chooses by the keyboard too: the name of each object in the table is a button', async () => {
  const { key } = candidates.at(-1)!;
  await row(key).getByRole('button').focus();
  await page.keyboard.press('Enter');
  await page.locator(`tr.is-selected[data-key="${key}"]`).waitFor();
});

it('reaches from the error circle to the neighbours, with a ruler in both measures', async () => {
  const ruler = () => page.locator('.sky-frame').innerHTML();
  await page.getByRole('button', { name: 'error', exact: true }).click();
  await settledPicture();
  const near = await ruler();
  const neighbours = page.getByRole('button', { name: 'neighbours', exact: true });
  if ((await neighbours.count()) > 0) {
    await neighbours.click();
    await settledPicture();
    expect(await ruler()).not.toBe(near);
    expect(await ruler()).toMatch(/[kM]pc/);
  }
  expect(near).toMatch(/″|′/);
});

it('leaves nothing behind on the way through ten detections', async () => {
  const items = await detections(page, survey, 'limit=12&sort=-pNone');
  await page.goto(`/surveys/${survey.id}/detections/${items[0]!.detectionId}?sort=-pNone`);
  for (let i = 1; i <= 10; i++) {
    await panel().waitFor();
    await page.getByRole('button', { name: 'next', exact: true }).click();
    await page.waitForURL(new RegExp(items[i]!.detectionId));
    await page.getByRole('heading', { level: 1, name: items[i]!.name }).waitFor();
  }
  await settledPicture();
  expect(await page.locator('.ol-viewport').count()).toBe(1);
  expect(await page.locator('canvas').count()).toBeLessThanOrEqual(3);
  expect(browser.complaints()).toEqual([]);
});
