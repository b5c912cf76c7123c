import { mkdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { Browser, Locator } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Load } from '../../models/run/load.ts';
import { launchChromium, openPage, settle } from '../support/browser.ts';
import { recordWorkshop } from '../support/recorded-workshop.ts';
import { type ServedProgram, serveProgram } from '../support/served-program.ts';

// Invented for practice, as the set it is added to.
const viscosity = {
  law: 'castro-macosko',
  A: 2.1e-9,
  E: 68000,
  gelDegree: 0.5,
  a: 1.6,
  b: 1.2,
  flowsBelow: 100,
} as const;

/** The lay-up's humidity, the day's barometer, and the uncertainty of every thermocouple but the third. */
const known = (load: Load): Load => ({
  ...load,
  barometer: '1009 mbar',
  parts: load.parts.map((part) => ({ ...part, humidity: 45 })),
  sensors: load.sensors.map((sensor) => (sensor.channel === 'TC3' ? sensor : { ...sensor, uncertainty: 2.2 })),
});

let program: ServedProgram;
let browser: Browser;
let path: string;

beforeAll(async () => {
  program = await serveProgram();
  const runs = await recordWorkshop(program.address, ['cure-estimates'], { resin: { viscosity }, load: known });
  path = `/runs/${runs.get('cure-estimates')}`;
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await program?.stop();
});

async function openRun(options: Parameters<typeof openPage>[2] = {}) {
  const watched = await openPage(browser, program.address, { reducedMotion: 'reduce', ...options });
  await watched.page.goto(path);
  await watched.page.locator('canvas').waitFor();
  await settle(watched.page);
  return watched;
}

describe('the estimates of a run', () => {
  it('say in words where the resin is thinnest and how long it flows, as the strip draws it', async () => {
    const { page, expectNoComplaints, close } = await openRun();
    const words = await page.locator('canvas').getAttribute('aria-label');
    expect(words).toMatch(
      /TC\d flows for \d+ min from \d\d:\d\d, when its viscosity falls below 100 Pa s, to gel at \d\d:\d\d; it is thinnest at \d\d:\d\d, \d+(\.\d+)? Pa s\./,
    );
    await page.getByRole('button', { name: 'Table' }).click();
    const heads = await page.getByRole('table', { name: 'Readings in view' }).locator('th').allInnerTexts();
    expect(heads.filter((head) => head.includes('Pa s'))).toHaveLength(2);
    expect(heads.some((head) => head.includes('void guide'))).toBe(true);
    expectNoComplaints();
    await close();
  });

  it('tell the interval of every figure, and for whom none is known', async () => {
    const { page, close } = await openRun();
    const table = page.getByRole('region', { name: 'Cure at the end, estimated' }).getByRole('row');
    const rowOf = async (channel: string) =>
      (await shownIn(table.filter({ hasText: channel }))).replaceAll(/\s+/g, ' ');
    expect(await rowOf('TC1')).toMatch(/^TC1 0\.\d{3} ± 0\.\d{3} \d+(\.\d)? ± \d+(\.\d)? \d\d:\d\d ± \d+\.\d min/);
    expect(await rowOf('TC3')).toMatch(/^TC3 0\.\d{3} \d+ \d\d:\d\d/);
    const said = await shownIn(page.locator('body'));
    expect(said).toContain('No uncertainty of TC3 is on record');
    expect(said).toContain('the set gives no covariance of its constants');
    await close();
  });

  it('set the vessel’s pressure beside what voids need, on the screen and on paper', async () => {
    const { page, close } = await openRun();
    for (const media of ['screen', 'print'] as const) {
      await page.emulateMedia({ media });
      const said = await shownIn(page.locator('body'));
      expect(said).toContain('at 45 % relative humidity of the lay-up');
      expect(said).toMatch(/The vessel pressure (stayed above|lay below) the least resin pressure/);
    }
    await close();
  });

  it('fit on every screen; their pictures are kept to be looked at', async () => {
    const folder = fileURLToPath(new URL('../screenshots/', import.meta.url));
    mkdirSync(folder, { recursive: true });
    const { page, expectNoComplaints, close } = await openRun();
    for (const width of [1440, 768, 360]) {
      await page.setViewportSize({ width, height: 900 });
      await page.evaluate(() => new Promise((resolve) => requestAnimationFrame(() => requestAnimationFrame(resolve))));
      expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(width);
      await page.screenshot({ path: `${folder}estimates-${width}.png`, fullPage: true });
    }
    expectNoComplaints();
    await close();
  });
});

/** What can be read just now: text that is hidden must not count. */
function shownIn(locator: Locator): Promise<string> {
  // biome-ignore lint/performance/useDomNodeTextContent: text that is hidden must not count
  return locator.innerText();
}
