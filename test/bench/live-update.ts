import type { Page } from 'playwright-core';
import { LIVE_CYCLE, liveShop, type PushedScan, post } from '../support/live-shop.ts';
import { inBrowser } from './bench-browser.ts';
import type { BenchResult } from './result.ts';

const CHANNELS = Array.from({ length: 24 }, (_, n) => `TC${n + 1}`);
const BEFORE_S = 3600;
const SCANS = 20;
const GOAL_MS = 300;

/**
 * Time from sending a scan to its pixels on the page of an open run: 24 thermocouples, an hour at 1 Hz behind it.
 *
 * The canvas is read in every frame, so that what is timed is a picture that changed and no event that was heard.
 * Floor: the acknowledgement of the same scan.
 */
export async function benchLiveUpdate(): Promise<BenchResult[]> {
  return inBrowser(async (origin, page) => {
    await post(origin, '/api/cycles', { document: LIVE_CYCLE });
    const shop = await liveShop(origin, CHANNELS, 1);
    const startMs = Date.now() - BEFORE_S * 1000;
    await shop.push(Array.from({ length: BEFORE_S - 5 }, (_, second) => scanAt(startMs, second)));
    const { run } = await post<{ run: number }>(origin, `/api/vessels/${encodeURIComponent(shop.vessel)}/runs`, {
      from: new Date(startMs).toISOString(),
      load: {
        format: 'dwellbook-load/1',
        parts: [{ part: 'B-1' }],
        sensors: CHANNELS.map((channel) => ({ channel, parts: ['B-1'] })),
      },
      cycle: { code: LIVE_CYCLE.code, issue: LIVE_CYCLE.issue },
    });
    await page.goto(`/runs/${run}`);
    await page.locator('canvas').waitFor();
    await page.getByText('TC1').first().waitFor();
    await page.waitForTimeout(3000);
    await watchPixels(page);
    const tookMs: number[] = [];
    const acknowledgedMs: number[] = [];
    for (let n = 0; n < SCANS; n += 1) {
      await page.waitForTimeout(700 + 37 * n);
      const second = (Date.now() - startMs) / 1000;
      const sentMs = Date.now();
      await shop.push([scanAt(startMs, second)]);
      acknowledgedMs.push(Date.now() - sentMs);
      tookMs.push((await changedAfter(page, sentMs)) - sentMs);
    }
    return [resultOf(tookMs.sort(rising), acknowledgedMs.sort(rising))];
  });
}

function resultOf(tookMs: readonly number[], acknowledgedMs: readonly number[]): BenchResult {
  const value = tookMs.at(-1) ?? Number.NaN;
  const floor = acknowledgedMs.at(-1) ?? Number.NaN;
  return {
    name: 'live-update',
    value,
    unit: 'ms',
    floor,
    ratio: value / floor,
    goal: `≤ ${GOAL_MS} ms`,
    holds: value <= GOAL_MS,
    note: `slowest of ${SCANS}; the middle one ${tookMs[SCANS >> 1]?.toFixed(0)} ms; floor: its acknowledgement`,
  };
}

function rising(a: number, b: number): number {
  return a - b;
}

function scanAt(startMs: number, second: number): PushedScan {
  // Strides of 40 °C up and down, so that each scan moves the end of its line.
  const along = (n: number) => 60 + 40 * Math.sin(second / 7 + n / 9);
  const values = Object.fromEntries(CHANNELS.map((name, n) => [name, Math.round(10 * along(n)) / 10]));
  return { at: new Date(startMs + second * 1000).toISOString(), values };
}

/** Notes, by the clock both processes share, every frame whose picture of the courses is another than before. */
async function watchPixels(page: Page): Promise<void> {
  await page.evaluate(() => {
    const shown = globalThis as unknown as { changesMs: number[] };
    shown.changesMs = [];
    let before = 0;
    const look = () => {
      const canvas = document.querySelector('canvas');
      const context = canvas?.getContext('2d');
      if (canvas && context) {
        const { data } = context.getImageData(Math.max(0, canvas.width - 320), 40, 220, 260);
        let sum = 0;
        for (let i = 0; i < data.length; i += 4) sum = (Math.imul(sum, 31) + (data[i] ?? 0)) | 0;
        // The frame after is the one in which this picture has been seen.
        if (sum !== before) requestAnimationFrame(() => shown.changesMs.push(Date.now()));
        before = sum;
      }
      requestAnimationFrame(look);
    };
    requestAnimationFrame(look);
  });
}

async function changedAfter(page: Page, sentMs: number): Promise<number> {
  const found = await page.waitForFunction(
    (ms) => (globalThis as unknown as { changesMs: number[] }).changesMs.find((at) => at >= ms) ?? false,
    sentMs,
    { timeout: 10_000 },
  );
  return Number(await found.jsonValue());
}
