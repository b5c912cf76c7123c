import { mkdirSync, rmSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium, openPage, settle } from '../support/browser.ts';
import { openLive } from '../support/live-shop.ts';
import { leaveWaiting, recordMaterials, recordWorkshop } from '../support/recorded-workshop.ts';
import { type ServedProgram, serveProgram } from '../support/served-program.ts';
import { CASES, EXPECTED_COMPLAINT, screensOf } from './screens.ts';

const FOLDER = fileURLToPath(new URL('../screenshots/', import.meta.url));

let program: ServedProgram;
let browser: Browser;
let screens: Readonly<Record<string, string>>;

beforeAll(async () => {
  program = await serveProgram();
  const runs = await recordWorkshop(program.address, CASES);
  await recordMaterials(program.address);
  screens = screensOf(runs, await leaveWaiting(program.address, 'bad-cell'), await openLive(program.address));
  browser = await launchChromium();
  rmSync(FOLDER, { recursive: true, force: true });
  mkdirSync(FOLDER, { recursive: true });
});

afterAll(async () => {
  await browser?.close();
  await program?.stop();
});

describe('every screen', () => {
  it('fits at 360, 768 and 1440 px; its pictures are kept to be looked at', { timeout: 600_000 }, async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address, { reducedMotion: 'reduce' });
    const tooWide: string[] = [];
    for (const [name, path] of Object.entries(screens)) {
      await page.goto(path);
      await settle(page);
      for (const width of [1440, 768, 360]) {
        await page.setViewportSize({ width, height: 900 });
        for (const colorScheme of ['light', 'dark'] as const) {
          await page.emulateMedia({ colorScheme });
          await page.evaluate(
            () => new Promise((resolve) => requestAnimationFrame(() => requestAnimationFrame(resolve))),
          );
          if ((await widthOf(page)) > width) tooWide.push(`${name} at ${width} px is ${await widthOf(page)} px`);
          await page.screenshot({ path: `${FOLDER}${name}-${width}-${colorScheme}.png`, fullPage: true });
        }
      }
    }
    expect(tooWide).toEqual([]);
    expectNoComplaints(EXPECTED_COMPLAINT);
    await close();
  });
});

describe('on paper', () => {
  it('prints a record: verdict, findings and hashes, and nothing that can be pressed', {
    timeout: 120_000,
  }, async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address, { colorScheme: 'dark' });
    for (const name of ['run-does-not-conform', 'run-of-two-parts', 'part', 'cycle', 'resin']) {
      await page.goto(screens[name] ?? '');
      await settle(page);
      await page.emulateMedia({ media: 'print', colorScheme: 'dark' });
      await page.pdf({
        path: `${FOLDER}${name}-print.pdf`,
        format: 'A4',
        preferCSSPageSize: true,
        printBackground: true,
      });
      // A4 at 96 px an inch, less its margins.
      await page.setViewportSize({ width: 688, height: 1000 });
      await page.screenshot({ path: `${FOLDER}${name}-print.png`, fullPage: true });
      expect(await widthOf(page), name).toBe(688);
      expect(await inkOutside(page), name).toBe(false);
      expect(
        await page
          .getByRole('button')
          .filter({ visible: true, hasNotText: /min|°C|bar|–|\d$/ })
          .count(),
      ).toBe(0);
      expect(await page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor)).toBe(
        'rgb(255, 255, 255)',
      );
      await page.setViewportSize({ width: 1440, height: 900 });
      await page.emulateMedia({ media: 'screen', colorScheme: 'dark' });
    }
    await page.goto(screens['run-does-not-conform'] ?? '');
    await settle(page);
    await page.emulateMedia({ media: 'print' });
    // What is not shown on paper is not said there either.
    // biome-ignore lint/performance/useDomNodeTextContent: text that is hidden must not count
    const said = await page.locator('body').innerText();
    expect(said).toContain('Does not conform');
    expect(said).toContain('Dwell 2, time');
    expect(said).toMatch(/SHA-256 [0-9a-f]{64}/);
    expect(said).toContain('says nothing about whether a vessel is safe to open');
    expectNoComplaints();
    await close();
  });
});

function widthOf(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth);
}

/** Whether the chart's canvas reaches beyond the paper, where it would be cut off without a scroll bar. */
function inkOutside(page: Page): Promise<boolean> {
  return page.evaluate(() => {
    const right = document.querySelector('canvas')?.getBoundingClientRect().right ?? 0;
    return right > document.documentElement.clientWidth;
  });
}
