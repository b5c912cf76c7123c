import { type Browser, type BrowserContextOptions, chromium, type Page } from 'playwright-core';
import { expect } from 'vitest';
// @ts-expect-error: a plain script, because it runs before anything is built
import { findChromium } from './find-chromium.mjs';

const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export async function launchChromium(): Promise<Browser> {
  const executablePath: string | null = findChromium();
  if (executablePath === null) throw new Error('No Chromium: node test/support/find-chromium.mjs says what to do');
  return chromium.launch({ executablePath, args: FLAGS });
}

/** A page of its own; what the browser complains of is gathered, to be asked for at the end. */
export interface Watched {
  readonly page: Page;
  /** Refusals the test makes on purpose are named: `404 … /api/runs/9999`. */
  readonly expectNoComplaints: (...expected: readonly RegExp[]) => void;
  readonly close: () => Promise<void>;
}

export async function openPage(
  browser: Browser,
  address: string,
  options: BrowserContextOptions = {},
): Promise<Watched> {
  const context = await browser.newContext({
    baseURL: address,
    locale: 'en-GB',
    timezoneId: 'America/Denver',
    viewport: { width: 1440, height: 900 },
    ...options,
  });
  const page = await context.newPage();
  const complaints: string[] = [];
  page.on('console', (message) => {
    if (message.type() === 'error' || message.type() === 'warning')
      complaints.push(`${message.text()} ${message.location().url}`);
  });
  page.on('pageerror', (error) => complaints.push(String(error)));
  return {
    page,
    expectNoComplaints: (...expected) => {
      const unexpected = complaints.filter((text) => !expected.some((pattern) => pattern.test(text)));
      expect(unexpected).toEqual([]);
    },
    close: () => context.close(),
  };
}

/** Waits until a page has read what it asked for and drawn it. */
export async function settle(page: Page): Promise<void> {
  await page.waitForLoadState('networkidle');
  await page.evaluate(() => document.fonts.ready.then(() => new Promise(requestAnimationFrame)));
}
