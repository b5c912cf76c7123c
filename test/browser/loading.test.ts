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
  runs = await recordWorkshop(program.address, ['sound']);
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await program?.stop();
});

describe('loading', () => {
  it('takes four parts and their thermocouples with the keyboard alone', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto(`/runs/${runs.get('sound')}/load`);
    await settle(page);
    await page.getByRole('button', { name: 'Take out part of sound' }).press('Enter');
    await page.getByLabel('Serial of a part').focus();
    // As a scanner does: each code, then Enter.
    for (const serial of ['A-1', 'A-2', 'A-3', 'A-4']) {
      await page.keyboard.type(serial);
      await page.keyboard.press('Enter');
    }
    const first = page.locator('.sensor-line').first().getByRole('button').first();
    await first.focus();
    // A number takes the part of that number; an arrow goes to the next thermocouple.
    for (const number of ['1', '2', '3', '4']) {
      await page.keyboard.press(number);
      await page.keyboard.press('ArrowDown');
    }
    expect(await page.locator('.sensor-line button[aria-pressed=true]').allTextContents()).toEqual([
      'A-1',
      'A-2',
      'A-3',
      'A-4',
    ]);
    expect(await page.locator('main').textContent()).toContain('A-3 is judged by TC3.');
    await page.getByLabel('Why the load is set again').focus();
    await page.keyboard.type('parts were named wrongly');
    await page.keyboard.press('Enter');
    await page.waitForURL(/\/runs\/\d+$/);
    await page.locator('.part-switch').waitFor();
    expect(await page.locator('.part-switch button').allTextContents()).toEqual(['A-1', 'A-2', 'A-3', 'A-4']);
    expectNoComplaints();
    await close();
  });

  it('keeps a half-filled load through a reload, and can begin again', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto(`/runs/${runs.get('sound')}/load`);
    await settle(page);
    await page.getByLabel('Work order', { exact: true }).fill('W-777');
    await page.reload();
    await settle(page);
    expect(await page.getByLabel('Work order', { exact: true }).inputValue()).toBe('W-777');
    await page.getByRole('button', { name: 'Start again from what is on record' }).click();
    expect(await page.getByLabel('Work order', { exact: true }).inputValue()).toBe('W-sound');
    expectNoComplaints();
    await close();
  });
});

describe('a run read by a wrong layout', () => {
  it('is read again when its layout is put right, and judged anew', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto(`/runs/${runs.get('sound')}`);
    await settle(page);
    await page.getByText('The layout it was read by').click();
    await page.getByRole('link', { name: 'Read these files again' }).click();
    // A thermocouple the load names may not lose its name: the refusal says so, and nothing has changed.
    await page.getByLabel('Called').first().fill('nose');
    await page.getByLabel('Reason').fill('named as on the drawing');
    await page.getByRole('button', { name: 'Read again and judge' }).click();
    await page.getByRole('alert').waitFor();
    expect(await page.getByRole('alert').textContent()).toContain('TC1');
    await page.getByLabel('Called').first().fill('TC1');
    await page.getByLabel('Called').nth(4).fill('air inlet');
    await page.getByRole('button', { name: 'Read again and judge' }).click();
    await page.waitForURL(/\/runs\/\d+$/);
    await page.getByText(/sensors worked throughout: .*air inlet/).waitFor();
    expect(await page.locator('main').textContent()).toMatch(/read again/i);
    expectNoComplaints(/status of 4\d\d .*\/sources\/1\/layout/);
    await close();
  });
});

describe('records', () => {
  it('take a test of a part, and show that every chain holds', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto('/parts/A-1');
    await settle(page);
    await page.getByText('Write down a test or an inspection').click();
    await page.getByLabel('Test or inspection', { exact: true }).fill('proof load');
    await page.getByLabel('Outcome').selectOption('failed');
    await page.getByLabel('Figure').fill('11,4');
    await page.getByLabel('Unit').fill('kN');
    await page.getByRole('button', { name: 'Write it down' }).click();
    await page.locator('.entry', { hasText: 'proof load' }).waitFor();
    expect(await page.locator('.entry', { hasText: 'proof load' }).textContent()).toMatch(/failed11\.4.kN/);
    expect(await page.locator('.page-head').textContent()).toContain('Failed a test');
    await page.goto('/audit');
    await page.getByRole('button', { name: 'Recompute every chain' }).click();
    await page.getByText('Every chain holds').waitFor();
    expect(await page.locator('.entries').first().textContent()).toContain('add part result');
    expectNoComplaints();
    await close();
  });
});
