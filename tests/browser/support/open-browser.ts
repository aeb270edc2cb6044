import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';
import { inject } from 'vitest';
import { DEMO_PASSWORD, type DemoRole, emailOf } from './demo-people.ts';
import { watchPage } from './watch-page.ts';

/** Generous: the machine may be slow and shared. */
const PATIENCE_MS = 30_000;
/** The browser of the system; none is downloaded. */
const CHROMIUM = process.env['EREMITE_TEST_CHROMIUM'] ?? '/usr/bin/chromium';
const QUIET = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking'];

export interface TestBrowser {
  readonly url: string;
  /** A clean browser: no cookies, no preferences. */
  visitor(options?: VisitOptions): Promise<Page>;
  /** A clean browser in which an account of the demo is signed in. */
  as(role: DemoRole, options?: VisitOptions): Promise<Page>;
  /** Complaints of all pages so far: console errors, scripts that threw, requests to other hosts. */
  complaints(): readonly string[];
  close(): Promise<void>;
}

export interface VisitOptions {
  width?: number;
  height?: number;
  theme?: 'dark' | 'light';
}

/** A real Chromium against the shared demo server. */
export async function openBrowser(): Promise<TestBrowser> {
  const url = inject('demoUrl');
  const browser: Browser = await chromium.launch({ executablePath: CHROMIUM, args: QUIET });
  const complaints: string[] = [];
  const context = async ({ width = 1440, height = 900, theme }: VisitOptions = {}): Promise<BrowserContext> => {
    const made = await browser.newContext({
      baseURL: url,
      viewport: { width, height },
      reducedMotion: 'reduce',
      acceptDownloads: true,
    });
    made.setDefaultTimeout(PATIENCE_MS);
    made.on('page', (page) => watchPage(page, url, complaints));
    if (theme) {
      const kept = JSON.stringify({ theme });
      await made.addInitScript((value) => {
        // Not on the blank page a tab begins with, which may keep nothing.
        if (location.protocol === 'http:') localStorage.setItem('eremite.preferences', value);
      }, kept);
    }
    return made;
  };
  return {
    url,
    visitor: async (options) => (await context(options)).newPage(),
    as: async (role, options) => {
      const own = await context(options);
      const data = { email: emailOf(role), password: DEMO_PASSWORD };
      const answer = await own.request.post('/api/v1/auth/sign-in', { data });
      if (!answer.ok()) throw new Error(`sign-in as ${role} answered ${answer.status()}`);
      return own.newPage();
    },
    complaints: () => complaints,
    close: () => browser.close(),
  };
}
