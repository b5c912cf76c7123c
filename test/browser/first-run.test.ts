import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium, openPage } from '../support/browser.ts';
import { recordedJson, recordedPath } from '../support/recorded-workshop.ts';
import { type ServedProgram, serveProgram } from '../support/served-program.ts';

// Two parts in one load, one of them in a cold corner: what must come out is known by construction.
const CASE = 'mixed-load';
const EXPECTED = recordedJson<{
  parts: Record<string, { verdict: string; findings: { limit: string; outcome: string; observed: number }[] }>;
}>(CASE, 'expected.json');

let program: ServedProgram;
let browser: Browser;

beforeAll(async () => {
  program = await serveProgram();
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await program?.stop();
});

describe('a new user in an empty workshop', () => {
  it('imports a file, says what was where, reads the verdict and follows a part to its history', {
    timeout: 120_000,
  }, async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto('/');
    await page.getByText('Nothing has been logged yet. Do this first').waitFor();
    await nameTheWorkshop(page);
    await bringInTheCycle(page);
    await importTheFile(page);
    await sayWhatWasInIt(page);

    await page.locator('.verdict h2', { hasText: 'Does not conform' }).waitFor();
    expect(await page.locator('.verdict p').first().textContent()).toMatch(/^P-B, dwell 2, time: .*P-A conforms\.$/);
    expect(EXPECTED.parts['P-B']?.findings).toContainEqual(
      expect.objectContaining({ limit: 'dwell 2/time', outcome: 'not-met' }),
    );
    const worst = page.locator('.finding').first();
    expect(await worst.textContent()).toContain('not met: Dwell 2, time0.0');

    await page.locator('.judged-by').getByRole('link', { name: 'P-B' }).click();
    await page.waitForURL('**/parts/P-B');
    await page.locator('.page-head', { hasText: 'Does not conform' }).waitFor();
    const history = await page.locator('main').textContent();
    expect(history).toContain('Does not conform');
    expect(history).toContain('T3 (cold corner)');
    expect(history).toContain('Load-matesP-A');
    expect(history).toContain('run.csv');
    expect(history).toMatch(/SHA-256 [0-9a-f]{64}/);
    expect(history).toContain('a leak test of its bag.');
    await page.getByRole('link', { name: 'P-A', exact: true }).first().click();
    await page.waitForURL('**/parts/P-A');
    await page.locator('.page-head', { hasText: 'Conforms' }).waitFor();
    expectNoComplaints();
    await close();
  });
});

async function nameTheWorkshop(page: Page): Promise<void> {
  await page.getByRole('link', { name: 'Name the workshop and its vessels' }).click();
  await page.getByLabel('Name', { exact: true }).fill('First workshop');
  await page.getByLabel('Zone of its clock').fill('Europe/Lisbon');
  await page.getByRole('button', { name: 'Keep' }).click();
  await page.getByText('Kept.').waitFor();
  await page.getByLabel('Name of another vessel').fill('Autoclave 1');
  await page.getByLabel('Kind').selectOption('autoclave');
  await page.getByRole('button', { name: 'Add vessel' }).click();
  await page.locator('.entry', { hasText: 'Autoclave 1' }).waitFor();
}

async function bringInTheCycle(page: Page): Promise<void> {
  await page.getByRole('link', { name: 'Now in the shop' }).click();
  await page.getByRole('link', { name: 'Bring in a cycle' }).click();
  await page.locator('input[type=file]').setInputFiles(recordedPath(CASE, 'cycle.json'));
  await page.getByRole('button', { name: /^Keep SR-180 issue B/ }).click();
  await page.waitForURL('**/cycles/SR-180/B');
  await page.getByLabel('Reason').fill('read against SR-PS-014');
  await page.getByRole('button', { name: /^Release/ }).click();
  await page.getByRole('button', { name: /^Withdraw/ }).waitFor();
}

async function importTheFile(page: Page): Promise<void> {
  await page.getByRole('link', { name: 'Now in the shop' }).click();
  await page.getByRole('link', { name: 'Import a recorder’s file' }).click();
  await page.locator('input[type=file]').setInputFiles(recordedPath(CASE, 'run.csv'));
  await page.waitForURL('**/imports/*');
  await answerWhatTheFileCannotTell(page);
  await page.getByLabel('Recorder it came from').fill('Autoclave 1 recorder');
  await page.getByLabel('Vessel', { exact: true }).selectOption('Autoclave 1');
  const make = page.getByRole('button', { name: /^Make it a run/ });
  await make.waitFor();
  await expect.poll(() => make.isEnabled(), { timeout: 20_000 }).toBe(true);
  await make.click();
  await page.waitForURL('**/runs/*/load');
}

/** The zone of a clock stands in no file; whatever else is asked has likely answers on a button. */
async function answerWhatTheFileCannotTell(page: Page): Promise<void> {
  const questions = page.locator('.questions');
  await questions.waitFor();
  expect(await questions.textContent()).toContain('the zone of the recorder’s clock');
  await questions.getByRole('button', { name: 'Europe/Lisbon' }).click();
  while ((await questions.count()) > 0) {
    await questions.locator('fieldset').first().getByRole('button').first().click();
  }
}

async function sayWhatWasInIt(page: Page): Promise<void> {
  await page
    .getByLabel('Cycle it was cured to')
    .selectOption({ label: 'SR-180 issue B: Two-dwell autoclave cure, solid laminate' });
  await page.getByLabel('Serial of a part').fill('P-A P-B');
  await page.keyboard.press('Enter');
  const sensors = page.locator('.sensor-line');
  const names = await sensors.locator('strong').allTextContents();
  const on = async (n: number, part: string) => sensors.nth(n).getByRole('button', { name: part }).click();
  expect(names.length).toBeGreaterThanOrEqual(4);
  await on(0, 'P-A');
  await on(1, 'P-A');
  await on(2, 'P-B');
  await on(3, 'P-B');
  await sensors
    .nth(2)
    .getByLabel(/^Place of/)
    .fill('cold corner');
  const targets = await sensors
    .getByRole('button')
    .evaluateAll((buttons) => buttons.map((b) => b.getBoundingClientRect().height));
  expect(Math.min(...targets)).toBeGreaterThanOrEqual(48);
  await page.getByRole('button', { name: 'Keep the load and judge the run' }).click();
  await page.waitForURL(/\/runs\/\d+$/);
}
