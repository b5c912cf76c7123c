import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium, openPage, settle, type Watched } from '../support/browser.ts';
import { recordWorkshop } from '../support/recorded-workshop.ts';
import { type ServedProgram, serveProgram } from '../support/served-program.ts';

let program: ServedProgram;
let browser: Browser;
let runs: ReadonlyMap<string, number>;

beforeAll(async () => {
  program = await serveProgram();
  runs = await recordWorkshop(program.address, ['short-for-the-lagging', 'stuck']);
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await program?.stop();
});

async function openRun(name: string): Promise<Watched> {
  const watched = await openPage(browser, program.address);
  await watched.page.goto(`/runs/${runs.get(name)}`);
  await watched.page.locator('canvas').waitFor();
  await settle(watched.page);
  return watched;
}

describe('the keyboard alone', () => {
  it('reaches the scan box with / and goes where a code leads', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto('/workshop');
    await settle(page);
    await page.keyboard.press('/');
    await page.keyboard.type('part of stuck');
    await page.keyboard.press('Enter');
    await page.waitForURL('**/parts/part%20of%20stuck');
    expect(await page.locator('h1').textContent()).toBe('part of stuck');
    // A slash inside a field is text.
    await page.keyboard.press('/');
    await page.keyboard.type('a/b');
    expect(await page.getByRole('searchbox').inputValue()).toBe('a/b');
    expectNoComplaints();
    await close();
  });

  it('skips to the page, and shows where it is', async () => {
    const { page, close } = await openPage(browser, program.address);
    await page.goto('/runs');
    await settle(page);
    await page.keyboard.press('Tab');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toContain('Skip to the page');
    await page.keyboard.press('Enter');
    await page.keyboard.press('Tab');
    const focus = await page.evaluate(() => {
      const focused = document.activeElement as HTMLElement;
      const { outlineStyle, outlineWidth } = getComputedStyle(focused);
      return { isInMain: document.querySelector('main')?.contains(focused), outlineStyle, outlineWidth };
    });
    expect(focus).toEqual({ isInMain: true, outlineStyle: 'solid', outlineWidth: '3px' });
    await close();
  });

  it('walks the findings with f, worst first, and opens the table with t', async () => {
    const { page, expectNoComplaints, close } = await openRun('short-for-the-lagging');
    await page.keyboard.press('f');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toContain('not met: Dwell 2, time');
    await page.keyboard.press('f');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toContain('met: Heat-up 1, slowest');
    expect(await page.locator('.run-chart table').count()).toBe(0);
    await page.keyboard.press('t');
    await page.getByText('What happened when').first().waitFor();
    expect(await page.locator('.run-chart table').first().textContent()).toContain('dwell 2 opens, TC3');
    expectNoComplaints();
    await close();
  });

  it('zooms with + and fetches the stretch in view, and moves the cursor with arrows', async () => {
    const { page, expectNoComplaints, close } = await openRun('short-for-the-lagging');
    const detail = page.waitForRequest((request) => /\/chart\?.*from=/.test(request.url()));
    await page.keyboard.press('+');
    const asked = new URL((await detail).url()).searchParams;
    const whole = 6.75 * 3_600_000;
    const span = Date.parse(asked.get('until') ?? '') - Date.parse(asked.get('from') ?? '');
    expect(span).toBeGreaterThan(whole / 2);
    expect(span).toBeLessThan(whole / 1.5);
    await page.locator('.chart-keys').focus();
    await page.keyboard.press('ArrowRight');
    const first = await page.locator('.readout').textContent();
    await page.keyboard.press('ArrowRight');
    expect(await page.locator('.readout').textContent()).not.toBe(first);
    expect(first).toMatch(/TC1.*°C/);
    await page.keyboard.press('Escape');
    expect(await page.locator('.readout').count()).toBe(0);
    expectNoComplaints();
    await close();
  });

  it('decides on a suspect: reason asked for, then the verdict without it', async () => {
    const { page, expectNoComplaints, close } = await openRun('stuck');
    expect(await page.locator('.verdict h2').textContent()).toBe('Cannot tell');
    const exclude = page.getByRole('button', { name: /^Exclude TC3 from/ });
    await exclude.focus();
    await page.keyboard.press('Enter');
    expect(await page.getByText('Say why: the record keeps it.').isVisible()).toBe(true);
    await page.getByLabel('Reason').focus();
    await page.keyboard.type('same figure for five hours; junction found loose');
    await exclude.focus();
    await page.keyboard.press('Enter');
    await page.locator('.verdict h2', { hasText: 'Conforms' }).waitFor();
    expect(await page.getByText('junction found loose').first().isVisible()).toBe(true);
    expect(await page.locator('.decision').count()).toBe(0);
    expectNoComplaints();
    await close();
  });
});
