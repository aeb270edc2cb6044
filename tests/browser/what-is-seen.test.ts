import { readFile } from 'node:fs/promises';
import type { Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { violations } from './support/axe.ts';
import { type DemoSurvey, demoSurvey, detections, json } from './support/demo-survey.ts';
import { openBrowser, type TestBrowser } from './support/open-browser.ts';

interface Detail {
  verdict: { name: string };
  candidates: { name: string; separationArcsec: number }[];
  neighbours: unknown[];
  limits: { band: string }[];
}
interface Answer {
  points: { angularMpc: number; starlight: string; surroundings: string }[];
}

/** The machine may be slow and shared. */
const SLOW = { timeout: 30_000 };

let browser: TestBrowser;
let page: Page;
let survey: DemoSurvey;
let detectionId: string;
let detail: Detail;

const panel = () => page.getByRole('group', { name: /^Sky about/ });
const strip = () => page.getByRole('group', { name: /^Surroundings strip/ });
const status = () => page.locator('.sky-panel [role="status"]');
/** How many objects the panel says it shows. */
const shown = async () => Number(/: (\d+) objects/.exec((await panel().getAttribute('aria-label'))!)![1]);
const bare = (text: string | null) => text!.replace(/\s+/g, ' ').trim();

async function saved(open: Locator, format: 'SVG' | 'PNG'): Promise<{ name: string; bytes: Buffer }> {
  await open.click();
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('menuitem', { name: format }).click(),
  ]);
  return { name: download.suggestedFilename(), bytes: await readFile(await download.path()) };
}

beforeAll(async () => {
  browser = await openBrowser();
  page = await browser.as('reviewer');
  survey = await demoSurvey(page);
  for (const item of await detections(page, survey, 'surroundings=accompanied&starlight=starlit&limit=40')) {
    detail = await json<Detail>(page, `/runs/${survey.runId}/detections/${item.detectionId}`);
    if (detail.candidates.length < 2 || detail.neighbours.length === 0) continue;
    ({ detectionId } = item);
    await page.goto(`/surveys/${survey.id}/detections/${detectionId}`);
    await panel().waitFor();
    return;
  }
  throw new Error('no accompanied detection of the demo has two candidates');
});
afterAll(() => browser?.close());

describe('the sky panel', () => {
  it('shows every object of the field, and of each table as many as the person wants', async () => {
    const own = detail.candidates.length + detail.neighbours.length;
    await expect.poll(shown, SLOW).toBeGreaterThan(own);
    const all = await shown();
    await page.getByRole('button', { name: 'Layers and filters' }).click();
    await page.getByRole('checkbox', { name: /^Halcyon deep/ }).uncheck({ force: true });
    await expect.poll(shown, SLOW).toBeLessThan(all);
    expect(bare(await page.locator('.sky-panel__notes').textContent())).toMatch(/\d+ of \d+ objects pass the filter/);
    await page.getByRole('button', { name: 'Show everything' }).click();
    await expect.poll(shown, SLOW).toBe(all);
    await page.getByLabel(/^Not fainter than/).fill('18');
    await expect.poll(shown, SLOW).toBeLessThan(all);
    expect(await violations(page, ['.sky-panel', '.bp6-portal'])).toEqual([]);
    await page.getByRole('button', { name: 'Show everything' }).click();
    await page.keyboard.press('Escape');
    // The focus goes back to the button once the choices are gone; a key pressed before would be lost.
    const opener = page.getByRole('button', { name: 'Layers and filters' });
    await expect.poll(() => opener.evaluate((button) => button === document.activeElement), SLOW).toBe(true);
  });

  it('steps through the objects by the keyboard, and lights the row of the table', async () => {
    await panel().focus();
    await page.keyboard.press(']');
    const nearest = [...detail.candidates].sort((a, b) => a.separationArcsec - b.separationArcsec)[0]!;
    await expect.poll(async () => bare(await status().textContent()), SLOW).toContain(nearest.name);
    expect(bare(await page.locator('tr.is-selected').first().textContent())).toContain(nearest.name);
  });

  it('measures from the chosen object to the next one, in angle and in kpc', async () => {
    await panel().focus();
    await page.keyboard.press('m');
    await page.getByText(/to the next object you choose$/).waitFor({ timeout: SLOW.timeout });
    await page.keyboard.press(']');
    await expect
      .poll(async () => bare(await status().textContent()), SLOW)
      .toMatch(/From \S+: [\d.]+[″′] = [\d.]+ [kM]pc, PA \d+°/);
    await page.keyboard.press('m');
    await expect.poll(async () => bare(await status().textContent()), SLOW).not.toContain('From');
  });

  it('is saved as a finder chart: SVG with compass, scale and legend, and the same as PNG', async () => {
    const button = page.getByRole('button', { name: 'Save a finder chart' });
    const svg = await saved(button, 'SVG');
    expect(svg.name).toMatch(/finder\.svg$/);
    const text = svg.bytes.toString('utf8');
    for (const part of ['>N<', '>E<', ' kpc<', 'velocity agrees', 'screening result', detail.verdict.name]) {
      expect(text).toContain(part);
    }
    const png = await saved(button, 'PNG');
    expect(png.bytes.subarray(1, 4).toString('latin1')).toBe('PNG');
    expect(png.bytes.length).toBeGreaterThan(20_000);
  });
});

describe('the surroundings strip', () => {
  it('steps through what has a velocity, nearest first, together with the panel', async () => {
    await strip().focus();
    await page.keyboard.press(']');
    const marked = strip().locator('.strip__mark.is-selected');
    await marked.waitFor();
    const name = bare(await marked.locator('title').textContent()).split(':')[0]!;
    expect(bare(await status().textContent())).toContain(name);
  });

  it('supposes other distances, and says what the server would', async () => {
    const answer = await json<Answer>(page, `/runs/${survey.runId}/detections/${detectionId}/what-if`);
    await page.getByRole('button', { name: /^what if the distance were/ }).click();
    const slider = page.getByRole('slider', { name: /^If the distance were/ });
    await slider.focus();
    for (const [key, point] of [
      ['Home', answer.points[0]!],
      ['End', answer.points.at(-1)!],
    ] as const) {
      await page.keyboard.press(key);
      await expect.poll(async () => slider.getAttribute('aria-valuetext'), SLOW).toContain(point.angularMpc.toFixed(1));
      const words = bare(await page.locator('.what-if__verdict').textContent());
      expect(words).toContain(point.starlight);
      expect(words).toContain(point.surroundings);
    }
    const spans = await page.getByRole('list', { name: 'Surroundings by distance' }).getByRole('listitem').count();
    const changes = answer.points.filter(({ surroundings }, i) => surroundings !== answer.points[i - 1]?.surroundings);
    expect(spans).toBe(changes.length);
    expect(await violations(page, ['.strip', '.limits-chart'])).toEqual([]);
    await page.getByRole('button', { name: /^what if the distance were/ }).click();
  });
});

it('says of every band what is expected and how deep it is', async () => {
  const chart = page.getByRole('img', { name: /^What silence is worth/ });
  const words = (await chart.getAttribute('aria-label'))!;
  for (const { band } of detail.limits) expect(words).toContain(`${band}: `);
});

describe('the plots of the survey', () => {
  const inside = async () => Number(/^(\d+) of/.exec(bare(await page.locator('p[role="status"]').textContent()))![1]);

  it('list what is brushed, keep the brush in the address, and can be brushed by numbers', async () => {
    await page.goto(`/surveys/${survey.id}/plots`);
    const plane = page.getByRole('img', { name: /^Starlight and surroundings/ });
    await plane.locator('svg').waitFor();
    expect(await page.getByRole('img', { name: /^(Starlight and|Baryonic|Gas to)/ }).count()).toBe(3);
    const all = await inside();
    const brush = async () => {
      const box = (await plane.boundingBox())!;
      await page.mouse.move(box.x + box.width * 0.5, box.y + 30);
      await page.mouse.down();
      await page.mouse.move(box.x + box.width - 4, box.y + box.height - 50, { steps: 4 });
      await page.mouse.up();
      return inside();
    };
    // A plot that is drawn anew while the brush moves drops it, as for a person who drags too early.
    await expect.poll(brush, { ...SLOW, interval: 1000 }).toBeLessThan(all);
    const some = await inside();
    expect(some).toBeGreaterThan(0);
    await page.reload();
    await plane.locator('svg').waitFor();
    await expect.poll(inside, SLOW).toBe(some);
    await page.getByRole('textbox', { name: 'P(no starlight), from' }).fill('0.9');
    await page.keyboard.press('Enter');
    // The lower limit in the address is on the scale of the axis: ln(0.9 / 0.1).
    await page.waitForURL(/brush=verdicts%3A2\.197%2C/);
    expect(await inside()).toBeLessThanOrEqual(some);
    const rows = page.getByRole('region', { name: 'Detections inside the brush' }).locator('tbody tr');
    await expect.poll(() => rows.count(), SLOW).toBe(Math.min(100, await inside()));
    expect(await violations(page)).toEqual([]);
  });

  it('are saved as SVG with their sources, and as the numbers behind them', async () => {
    const svg = await saved(page.getByRole('button', { name: 'Save Baryonic Tully-Fisher' }), 'SVG');
    const text = svg.bytes.toString('utf8');
    expect(text).toContain('Lelli et al. (2019)');
    expect(text).toContain('screening result');
    expect(text).not.toContain('var(--');
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('link', { name: 'The numbers as CSV' }).click(),
    ]);
    const csv = await readFile(await download.path(), 'utf8');
    const lines = csv.split('\n').filter((line) => line !== '' && !line.startsWith('#'));
    const { total } = await json<{ total: number }>(page, `/runs/${survey.runId}/verdicts?limit=1`);
    expect(lines).toHaveLength(1 + total);
  });
});

it('shows where each table looked on the map of the survey', async () => {
  await page.goto(`/surveys/${survey.id}`);
  const choice = page.getByRole('combobox', { name: 'Footprint shown' });
  await choice.waitFor();
  expect(await page.locator('.sky-chart__footprint').count()).toBe(0);
  await choice.selectOption({ index: 1 });
  const path = await page.locator('.sky-chart__footprint').getAttribute('d');
  expect(path!.length).toBeGreaterThan(100);
  expect(browser.complaints()).toEqual([]);
});
