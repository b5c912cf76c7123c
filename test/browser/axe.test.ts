import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { AxeResults } from 'axe-core';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium, openPage, settle } from '../support/browser.ts';
import { openLive } from '../support/live-shop.ts';
import { leaveWaiting, recordMaterials, recordWorkshop } from '../support/recorded-workshop.ts';
import { type ServedProgram, serveProgram } from '../support/served-program.ts';
import { CASES, EXPECTED_COMPLAINT, screensOf } from './screens.ts';

// axe-core 4 with its own rules, WCAG 2.2 AA and best practice among them: Deque Systems, MPL-2.0.
const AXE = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

let program: ServedProgram;
let browser: Browser;
let screens: Readonly<Record<string, string>>;

beforeAll(async () => {
  program = await serveProgram();
  const runs = await recordWorkshop(program.address, CASES);
  await recordMaterials(program.address);
  screens = screensOf(runs, await leaveWaiting(program.address, 'bad-cell'), await openLive(program.address));
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await program?.stop();
});

describe('every screen', () => {
  it('has no violation that axe finds, in light and in dark', { timeout: 600_000 }, async () => {
    // Without motion, or a colour would be measured halfway from light to dark.
    const { page, expectNoComplaints, close } = await openPage(browser, program.address, { reducedMotion: 'reduce' });
    const found: string[] = [];
    for (const [name, path] of Object.entries(screens)) {
      await page.emulateMedia({ colorScheme: 'light' });
      await page.goto(path);
      await settle(page);
      const light = await runAxe(page, null);
      await page.emulateMedia({ colorScheme: 'dark' });
      await page.locator('html[data-scheme=dark]').waitFor();
      await coloursHaveSettled(page);
      // Dark differs from light in its colours alone.
      const dark = await runAxe(page, ['color-contrast', 'link-in-text-block']);
      expect([light.passes.length > 10, dark.passes.length > 0], name).toEqual([true, true]);
      found.push(...violationsOf(`${name}, light`, light), ...violationsOf(`${name}, dark`, dark));
    }
    expect(found).toEqual([]);
    expectNoComplaints(EXPECTED_COMPLAINT);
    await close();
  });
});

/** Waits until no colour is on its way to another any more. */
async function coloursHaveSettled(page: Page): Promise<void> {
  await page.evaluate(async () => {
    await new Promise((resolve) => requestAnimationFrame(() => requestAnimationFrame(resolve)));
    await Promise.allSettled(document.getAnimations().map(({ finished }) => finished));
  });
}

function violationsOf(where: string, { violations }: AxeResults): string[] {
  return violations.flatMap(({ id, nodes }) => nodes.map(({ html }) => `${where}: ${id}: ${html}`));
}

async function runAxe(page: Page, rules: readonly string[] | null): Promise<AxeResults> {
  await page.evaluate(() => {
    for (const closed of document.querySelectorAll('details')) closed.open = true;
  });
  await page.evaluate(AXE);
  return page.evaluate((names) => {
    const { axe } = globalThis as unknown as { axe: { run(options: object): Promise<AxeResults> } };
    return axe.run({ resultTypes: ['violations'], ...(names ? { runOnly: { type: 'rule', values: names } } : {}) });
  }, rules);
}

describe('every screen of an empty workshop', () => {
  it('has no violation that axe finds, and says what to do first', { timeout: 300_000 }, async () => {
    const empty = await serveProgram();
    const { page, expectNoComplaints, close } = await openPage(browser, empty.address);
    const found: string[] = [];
    for (const path of [
      '/',
      '/runs',
      '/parts',
      '/materials',
      '/cycles',
      '/resins',
      '/recorders',
      '/audit',
      '/import',
    ]) {
      await page.goto(path);
      await settle(page);
      found.push(...violationsOf(`empty ${path}`, await runAxe(page, null)));
    }
    expect(found).toEqual([]);
    await page.goto('/parts');
    await page.getByText('No part is on record yet').waitFor();
    expect(await page.locator('main').textContent()).toContain('Import a log');
    expectNoComplaints();
    await close();
    await empty.stop();
  });
});

describe('axe itself', () => {
  it('would notice: a button without a name is found', async () => {
    const { page, close } = await openPage(browser, program.address);
    await page.goto('/');
    await settle(page);
    await page.evaluate(() => document.querySelector('main')?.append(document.createElement('button')));
    const results = await runAxe(page, null);
    expect(results.violations.map(({ id }) => id)).toContain('button-name');
    await close();
  });
});
