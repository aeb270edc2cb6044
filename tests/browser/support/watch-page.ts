import type { Page } from 'playwright-core';

/** The browser reports an answer the server rightly refused as an error of the console; that one is no fault. */
const REFUSED = /^Failed to load resource: the server responded with a status of 4\d\d/;

/** Collects what a page complains of, and every request that leaves the server under test. */
export function watchPage(page: Page, url: string, complaints: string[]): void {
  const { origin } = new URL(url);
  page.on('console', (message) => {
    if (message.type() === 'error' && !REFUSED.test(message.text())) {
      complaints.push(`${page.url()}: console: ${message.text()}`);
    }
  });
  page.on('pageerror', (error) => complaints.push(`${page.url()}: threw: ${error.message}`));
  page.on('request', (request) => {
    const asked = request.url();
    if (!/^(data|blob|about):/.test(asked) && new URL(asked).origin !== origin) {
      complaints.push(`${page.url()}: asked another host: ${asked}`);
    }
  });
}
