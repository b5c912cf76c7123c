import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium, openPage, settle } from '../support/browser.ts';
import { recordWorkshop } from '../support/recorded-workshop.ts';
import { type ServedProgram, serveProgram } from '../support/served-program.ts';

let program: ServedProgram;
let browser: Browser;
let runs: ReadonlyMap<string, number>;

beforeAll(async () => {
  program = await serveProgram();
  runs = await recordWorkshop(program.address, ['short-for-the-lagging', 'gap-in-dwell', 'mixed-load']);
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await program?.stop();
});

async function openRun(name: string) {
  const watched = await openPage(browser, program.address);
  await watched.page.goto(`/runs/${runs.get(name)}`);
  await watched.page.locator('canvas').waitFor();
  await settle(watched.page);
  return watched;
}

describe('the chart of a run', () => {
  it('says in words what it draws: dwells, what breaks, gaps', async () => {
    const short = await openRun('short-for-the-lagging');
    const words = await short.page.locator('canvas').getAttribute('aria-label');
    // The run is 112 min in its second dwell of 120: known by construction, see the case's expected.json.
    expect(words).toMatch(/dwell 2 · 111 of 120 min/);
    expect(words).toMatch(/TC3 lagging/);
    await short.close();
    const gap = await openRun('gap-in-dwell');
    expect(await gap.page.locator('canvas').getAttribute('aria-label')).toMatch(/1.gap without readings/);
    await gap.close();
  });

  it('draws ink, and dims what lies outside the stretch of a finding that is pointed at', async () => {
    const { page, close } = await openRun('short-for-the-lagging');
    const inked = () =>
      page.locator('canvas').evaluate((canvas: HTMLCanvasElement) => {
        const { data } = canvas.getContext('2d')?.getImageData(0, 0, canvas.width, 400) ?? { data: [] };
        let dark = 0;
        for (let i = 0; i < data.length; i += 4) {
          if ((data[i] ?? 255) + (data[i + 1] ?? 255) + (data[i + 2] ?? 255) < 250 && (data[i + 3] ?? 0) > 200)
            dark += 1;
        }
        return dark;
      });
    const before = await inked();
    expect(before).toBeGreaterThan(1000);
    await page.getByRole('button', { name: /Dwell 1, time/ }).focus();
    await page.waitForTimeout(100);
    expect(await inked()).toBeLessThan(before * 0.8);
    await close();
  });

  it('shows another part when it is asked for, at an address of its own', async () => {
    const { page, expectNoComplaints, close } = await openRun('mixed-load');
    expect(await page.locator('.judged-by').first().textContent()).toContain('P-B of mixed-load');
    await page.getByRole('button', { name: 'P-A of mixed-load' }).click();
    await page.waitForURL(/part=P-A/);
    expect(await page.locator('.judged-by').first().textContent()).toContain('judged by TC1 and TC2');
    await page.reload();
    await settle(page);
    expect(await page.locator('.judged-by').first().textContent()).toContain('judged by TC1 and TC2');
    expectNoComplaints();
    await close();
  });

  it('shows the units of whoever looks, and leaves findings as the cycle wrote them', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto('/workshop');
    await page.getByLabel('Temperature on charts').selectOption('°F');
    await page.goto(`/runs/${runs.get('short-for-the-lagging')}`);
    await page.locator('canvas').waitFor();
    await settle(page);
    // 180.2 °C is 356.4 °F.
    expect(await page.locator('canvas').getAttribute('aria-label')).toMatch(/highest 356\.\d.°F/);
    expect(await page.getByRole('button', { name: /Ceiling/ }).textContent()).toMatch(/180\.2.°C/);
    expectNoComplaints();
    await close();
  });
});
