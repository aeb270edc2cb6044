import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { send } from './support/api.ts';
import { aColleague } from './support/colleague.ts';
import { demoSurvey, type DemoSurvey, detections, json } from './support/demo-survey.ts';
import { openBrowser, type TestBrowser } from './support/open-browser.ts';

interface Review {
  runId: string;
  mine: boolean;
  note: string;
  starlight: string;
  outcome: string;
}
let browser: TestBrowser;
let lead: Page;
let reviewer: Page;
let colleague: Page;
let survey: DemoSurvey;
beforeAll(async () => {
  browser = await openBrowser();
  lead = await browser.as('lead');
  survey = await demoSurvey(lead);
  reviewer = await browser.as('reviewer');
  colleague = await aColleague(browser, lead, survey.teamId, 'Ada Brandt');
});
afterAll(() => browser?.close());

const reviewsOf = async (page: Page, id: string) =>
  (await json<{ items: Review[] }>(page, `/detections/${id}/reviews`)).items;
const mine = async (page: Page, id: string) =>
  (await reviewsOf(page, id)).filter((review) => review.mine && review.runId === survey.runId);
const onSky = (page: Page) => page.getByRole('group', { name: /^Sky about/ }).waitFor();
async function openDetection(page: Page, id: string, search = ''): Promise<void> {
  await page.goto(`/surveys/${survey.id}/detections/${id}${search}`);
  await onSky(page);
}
describe('two reviewers and a lead', () => {
  it('are blind until both have spoken; then the lead settles with a note', async () => {
    const [, , , , , dark] = await detections(lead, survey, 'starlight=nearly%20dark&limit=10&sort=name');
    const id = dark!.detectionId;
    await openDetection(reviewer, id, '?tab=history');
    await openDetection(colleague, id, '?tab=history');
    await reviewer.keyboard.press('n');
    await reviewer.getByRole('dialog').getByLabel('Note').fill('Plain to see.');
    await reviewer.getByRole('dialog').getByLabel('Note').press('Control+Enter');
    await expect.poll(() => mine(reviewer, id)).toHaveLength(1);
    // She is told that someone spoke, but not what was said.
    await colleague.getByText('reviewed a verdict just now').waitFor();
    expect(await colleague.getByText('Plain to see.').count()).toBe(0);
    await colleague.keyboard.press('o');
    await colleague.getByRole('dialog').getByLabel('Starlight').selectOption('starlit');
    await colleague.getByRole('dialog').getByLabel('Note').fill('I see a disc.');
    await colleague.getByRole('dialog').getByLabel('Note').press('Control+Enter');
    await expect.poll(() => mine(colleague, id)).toHaveLength(1);
    await openDetection(colleague, id, '?tab=history');
    await colleague.getByText('Plain to see.').waitFor();

    await lead.goto(`/surveys/${survey.id}/docket?state=all&disagreement=yes`);
    await lead.getByRole('link', { name: dark!.name }).click();
    await onSky(lead);
    await lead.keyboard.press('s');
    await lead.getByRole('dialog').getByLabel('Note').fill('The disc is a background galaxy.');
    await lead.getByRole('dialog').getByLabel('Note').press('Control+Enter');
    await lead.getByRole('dialog').waitFor({ state: 'detached' });
    // Both see it without asking anew.
    await colleague
      .getByText(/^Settled by/)
      .first()
      .waitFor();
    const { items } = await json<{ items: { reviewers: string[]; detections: number }[] }>(
      lead,
      `/surveys/${survey.id}/agreement`,
    );
    expect(items.find(({ reviewers }) => reviewers.includes('Ada Brandt'))!.detections).toBeGreaterThan(0);
  });
});

describe('two browsers at once', () => {
  it('show each other’s work without reload, and a collision overwrites nothing', async () => {
    const [dark] = await detections(lead, survey, 'starlight=confused&limit=1');
    const id = dark!.detectionId;
    const other = await browser.as('lead');
    await openDetection(lead, id);
    await openDetection(other, id);
    // The second decides while the first is typing, on a page that has not heard of it.
    await other.context().route('**/events*', (route) => route.abort());
    await lead.keyboard.press('s');
    await lead.getByRole('dialog').getByLabel('Note').fill('Typed with care.');
    const settled = await send(other, 'POST', `/detections/${id}/settlements`, {
      runId: survey.runId,
      starlight: 'confused',
      surroundings: 'accompanied',
      note: 'Settled in the other window.',
    });
    expect(settled.status()).toBe(204);
    // The settlement reaches the first by itself, behind the dialog.
    await lead
      .getByText(/^Settled by/)
      .first()
      .waitFor();
    expect(await lead.getByRole('dialog').getByLabel('Note').inputValue()).toBe('Typed with care.');
    await lead.keyboard.press('Escape');
    await lead.getByRole('dialog').waitFor({ state: 'detached' });
    await lead.keyboard.press('s');
    // What was typed is still there.
    expect(await lead.getByRole('dialog').getByLabel('Note').inputValue()).toBe('Typed with care.');
    await lead.keyboard.press('Escape');
    await other.close();
  });

  it('a word of someone else that one has not seen is shown, and stays', async () => {
    const [, second] = await detections(lead, survey, 'starlight=confused&limit=2');
    const id = second!.detectionId;
    const { items } = (await json<{ candidates: { catalogueId: string; rowId: number; name: string }[] }>(
      lead,
      `/runs/${survey.runId}/detections/${id}`,
    ).then(({ candidates }) => ({ items: candidates })))!;
    const object = items[0]!;
    // Blind to each other, the reviewers do not see what the other said of an object.
    await openDetection(colleague, id);
    await colleague.keyboard.press('.');
    await colleague.getByRole('button', { name: 'Reject it' }).waitFor();
    const word = {
      catalogueId: object.catalogueId,
      rowId: object.rowId,
      action: 'accept',
      note: 'It has the velocity.',
    };
    expect((await send(reviewer, 'POST', `/detections/${id}/overrides`, word)).status()).toBe(201);
    await colleague.keyboard.press('x');
    const dialog = colleague.getByRole('dialog');
    await dialog.getByLabel('Note').fill('It is a star.');
    await dialog.getByLabel('Note').press('Control+Enter');
    await dialog.getByText('Osei Lindqvist decided meanwhile').waitFor();
    await dialog.getByText('It has the velocity.').waitFor();
    expect(await dialog.getByLabel('Note').inputValue()).toBe('It is a star.');
    const { items: kept } = await json<{ items: { action: string }[] }>(lead, `/detections/${id}/overrides`);
    expect(kept.map(({ action }) => action)).toEqual(['accept']);
    await dialog.getByRole('button', { name: 'Cancel' }).click();
  });
});
