import type { APIResponse, Page } from 'playwright-core';

export const API = '/api/v1';

/** A changing request by the person on the page, with the echo of the cookie that the app sends too. */
export async function send(page: Page, method: string, path: string, data?: unknown): Promise<APIResponse> {
  const cookies = await page.context().cookies();
  const csrf = cookies.find(({ name }) => name === 'csrf')?.value ?? '';
  return page.request.fetch(API + path, { method, headers: { 'x-csrf-token': csrf }, data: data ?? {} });
}
