import type { Page } from 'playwright-core';
import { API } from './api.ts';

export interface DemoSurvey {
  readonly id: string;
  readonly teamId: string;
  readonly runId: string;
}

interface VerdictRow {
  detectionId: string;
  name: string;
  starlight: string;
}

/** The Halcyon Strip, as the API tells whoever is signed in on the page. */
export async function demoSurvey(page: Page): Promise<DemoSurvey> {
  const { items } = await json<{ items: { id: string; name: string; teamId: string }[] }>(page, '/surveys');
  const survey = items.find(({ name }) => name === 'Halcyon Strip')!;
  const runs = await json<{ items: { id: string; state: string }[] }>(page, `/surveys/${survey.id}/runs`);
  const run = runs.items.find(({ state }) => state === 'done')!;
  return { id: survey.id, teamId: survey.teamId, runId: run.id };
}

/** Detections of the demo's run, filtered as the table is. */
export async function detections(page: Page, { runId }: DemoSurvey, query: string): Promise<VerdictRow[]> {
  return (await json<{ items: VerdictRow[] }>(page, `/runs/${runId}/verdicts?${query}`)).items;
}

/** What the API answers the person on the page. */
export async function json<T>(page: Page, path: string): Promise<T> {
  const answer = await page.request.get(API + path);
  if (!answer.ok()) throw new Error(`${path} answered ${answer.status()}`);
  return (await answer.json()) as T;
}
