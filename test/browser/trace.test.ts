import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium, openPage, settle } from '../support/browser.ts';
import { recordWorkshop } from '../support/recorded-workshop.ts';
import { type ServedProgram, serveProgram } from '../support/served-program.ts';

let program: ServedProgram;
let browser: Browser;

beforeAll(async () => {
  program = await serveProgram();
  await recordWorkshop(program.address, ['two-bag-lines', 'sound', 'short-for-the-lagging']);
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await program?.stop();
});

/** Goes from stop to stop of the Tab key until it stands on what bears these words. */
async function tabTo(page: Page, words: RegExp): Promise<void> {
  for (let stops = 0; stops < 150; stops += 1) {
    await page.keyboard.press('Tab');
    const told = await page.evaluate(() => {
      const focused = document.activeElement as HTMLInputElement | null;
      const label = focused?.labels?.[0]?.textContent;
      return (label ?? focused?.textContent ?? '').trim();
    });
    if (words.test(told)) return;
  }
  throw new Error(`the Tab key does not come to ${words}`);
}

async function press(page: Page, words: RegExp, key = 'Enter'): Promise<void> {
  await tabTo(page, words);
  await page.keyboard.press(key);
}

async function type(page: Page, words: RegExp, text: string): Promise<void> {
  await tabTo(page, words);
  await page.keyboard.type(text);
}

describe('a strut broke at 7.9 kN of 9.0 kN', () => {
  it('leads to a printed hold list and an overlay, by the keyboard alone', { timeout: 120_000 }, async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.addInitScript(() => {
      window.print = () => document.documentElement.setAttribute('data-printed', 'yes');
    });
    await page.goto('/');
    await settle(page);
    await page.keyboard.press('/');
    await page.keyboard.type('part of two-bag-lines');
    await page.keyboard.press('Enter');
    await page.waitForURL('**/parts/part%20of%20two-bag-lines');
    await settle(page);

    await press(page, /^Write down a test or an inspection$/);
    await type(page, /^Test or inspection/, 'proof load');
    await type(page, /^Outcome/, 'failed');
    await type(page, /^Figure/, '7.9');
    await type(page, /^Unit/, 'kN');
    await type(page, /^What was seen/, 'Broke at 7.9 kN of 9.0 kN asked');
    await page.keyboard.press('Enter');
    await page.getByRole('link', { name: 'This part failed' }).waitFor();
    await press(page, /^This part failed: what else is in danger$/);

    await page.getByRole('heading', { name: 'Trace' }).waitFor();
    await settle(page);
    expect(await page.getByRole('checkbox', { name: /^part of two-bag-lines/ }).isChecked()).toBe(true);
    await press(page, /^same vessel$/, 'Space');
    await type(page, /^Why the list is made/, 'broke at 7.9 kN of 9.0 kN');
    await press(page, /^Make the hold list$/);

    await page.waitForURL('**/trace/holds/1');
    await settle(page);
    await page.getByText('The list began from it.').waitFor();
    const others = ['part of sound', 'part of short-for-the-lagging'];
    for (const serial of others) expect(await page.getByRole('link', { name: serial }).count()).toBe(1);
    expect(await page.getByText('The list began from it.').count()).toBe(1);
    await press(page, /^Print$/);
    expect(await page.locator('html').getAttribute('data-printed')).toBe('yes');
    await page.emulateMedia({ media: 'print' });
    expect(await page.getByRole('button', { name: 'Print' }).isVisible()).toBe(false);
    expect(await page.getByText('This list holds nothing and releases nothing.').isVisible()).toBe(true);
    expect((await page.pdf()).length).toBeGreaterThan(10_000);
    await page.emulateMedia({ media: 'screen' });

    await press(page, /^What they share$/);
    await page.waitForURL('**/trace/compare*');
    await page.locator('.overlay svg').first().waitFor();
    await page.getByText('With 1 failed part').waitFor();
    expect(await page.getByText('With 1 failed part nothing can be told apart').count()).toBe(1);
    expect(await page.locator('.overlay .failed path').first().getAttribute('d')).toMatch(/^M.*L/);
    expect(await page.locator('.overlay .sound .between').count()).toBeGreaterThan(0);
    await type(page, /^Aligned on/, 'the first');
    await page.waitForURL('**event=gel*');
    await settle(page);
    expect(await page.locator('main').textContent()).toMatch(/the first estimated gel/);
    expect(await page.locator('main').textContent()).not.toMatch(/\bcause/i);
    expectNoComplaints();
    await close();
  });

  it('may be typed where no test of it is on record', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto('/trace');
    await settle(page);
    await type(page, /^Serial of a failed part/, 'part of sound');
    await page.keyboard.press('Enter');
    expect(await page.getByRole('checkbox', { name: /^part of sound chosen by hand/ }).isChecked()).toBe(true);
    await type(page, /^Runs from/, '2026-01-01');
    await type(page, /^Why the list is made/, 'a customer rang');
    await press(page, /^Make the hold list$/);
    await page.waitForURL('**/trace/holds/*');
    await settle(page);
    await page.getByText('a customer rang').waitFor();
    expectNoComplaints();
    await close();
  });
});
