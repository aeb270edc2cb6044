import type { Page } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { keepPicture, leftmostChange } from './support/canvas.ts';
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

/** Where the ring about the mark of a row begins: the leftmost pixel that changes when the row is pointed at. */
async function ringOf(key: string): Promise<{ x: number; y: number }> {
  await page.getByRole('heading', { level: 1 }).hover();
  await keepPicture(page, 'plain');
  await row(key).hover();
  await keepPicture(page, 'lit');
  const ring = await leftmostChange(page, 'plain', 'lit');
  await page.getByRole('heading', { level: 1 }).hover();
  return ring!;
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
  expect((await keepPicture(page, 'plain')).drawn).toBeGreaterThan(1500);
});

it('draws an object with a greater right ascension left of the centre, one with a smaller right of it', async () => {
  const middle = (await keepPicture(page, 'plain')).width / 2;
  // The label stands right of the mark, so that the leftmost change is the ring's.
  expect((await ringOf(candidates[0]!.key)).x).toBeLessThan(middle - 20);
  expect((await ringOf(candidates.at(-1)!.key)).x).toBeGreaterThan(middle);
});

it('lights the row of the mark that is pointed at, and chooses it with a click', async () => {
  const ring = await ringOf(candidates[0]!.key);
  const box = (await panel().boundingBox())!;
  const within = 9;
  await page.mouse.move(box.x + ring.x + within, box.y + ring.y);
  const lit = page.locator('tr.is-hovered');
  await lit.waitFor();
  const key = await lit.getAttribute('data-key');
  expect(candidates.filter(({ eastArcsec }) => eastArcsec > 0).map((one) => one.key)).toContain(key);
  await page.mouse.click(box.x + ring.x + within, box.y + ring.y);
  await page.locator(`tr.is-selected[data-key="${key}"]`).waitFor();
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
  await keepPicture(page, 'near');
  const near = await ruler();
  const neighbours = page.getByRole('button', { name: 'neighbours', exact: true });
  if ((await neighbours.count()) > 0) {
    await neighbours.click();
    await keepPicture(page, 'far');
    expect(await leftmostChange(page, 'near', 'far')).not.toBeNull();
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
  const { canvases } = await keepPicture(page, 'last');
  expect(canvases).toBeLessThanOrEqual(3);
  expect(await page.locator('.ol-viewport').count()).toBe(1);
  expect(browser.complaints()).toEqual([]);
});
