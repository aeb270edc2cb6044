import type { Page } from 'playwright-core';
import { API, send } from './api.ts';
import { json } from './demo-survey.ts';
import type { TestBrowser } from './open-browser.ts';

/** A second reviewer of the demo's team, invited by the lead, in a browser of her own. */
export async function aColleague(browser: TestBrowser, lead: Page, teamId: string, name: string): Promise<Page> {
  const email = `${name.toLowerCase().replaceAll(' ', '.')}.${Date.now()}@example.org`;
  const invited = await send(lead, 'POST', `/teams/${teamId}/invitations`, { email, role: 'reviewer' });
  if (!invited.ok()) throw new Error(`the invitation answered ${invited.status()}`);
  const { items } = await json<{ items: { to: string; text: string }[] }>(lead, '/outbox?limit=100');
  const token = /token=(\S+)/.exec(items.find((mail) => mail.to === email)!.text)![1]!;
  const page = await browser.visitor();
  const data = { token, name, password: 'a long enough word' };
  const accepted = await page.request.post(`${API}/invitations/accept`, { data });
  if (!accepted.ok()) throw new Error(`accepting answered ${accepted.status()}`);
  return page;
}
