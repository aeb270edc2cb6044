import { afterAll, beforeAll, expect, it } from 'vitest';
import { demoSurvey } from './support/demo-survey.ts';
import { openBrowser, type TestBrowser } from './support/open-browser.ts';

let browser: TestBrowser;
beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser?.close());

it('a colleague is invited, finds the mail in the outbox, joins from a clean browser and is a member', async () => {
  const lead = await browser.as('lead');
  const { id } = await demoSurvey(lead);
  const email = `ilse.${Date.now()}@example.org`;
  await lead.goto(`/surveys/${id}/people`);
  await lead.getByLabel('E-mail').fill(email);
  await lead.getByLabel('Role', { exact: true }).selectOption('reviewer');
  await lead.getByRole('button', { name: 'Invite' }).click();
  await lead.getByText(`${email} is invited.`).waitFor();
  await lead.getByRole('button', { name: `Revoke the invitation of ${email}` }).waitFor();
  const mail = lead
    .getByRole('listitem')
    .filter({ has: lead.locator('details') })
    .filter({ hasText: email });
  await mail.locator('summary').click();
  const link = /https?:\/\/\S+\/accept-invitation\?token=\S+/.exec(await mail.innerText())?.[0];
  expect(link).toBeDefined();

  const guest = await browser.visitor();
  const { pathname, search } = new URL(link!);
  await guest.goto(pathname + search);
  await guest.getByText(`invites ${email} as reviewer`).waitFor();
  await guest.getByLabel('Your name').fill('Ilse Varga');
  await guest.getByLabel('Password').fill('a long enough word');
  await guest.getByRole('button', { name: 'Join the team' }).click();
  await guest.getByRole('link', { name: 'Halcyon Strip' }).click();
  await guest.getByRole('link', { name: 'People' }).click();
  await guest.getByRole('row').filter({ hasText: email }).waitFor();

  const again = await browser.visitor();
  await again.goto(pathname + search);
  await again.getByText('This invitation cannot be used.').waitFor();
  expect(browser.complaints()).toEqual([]);
});
