import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Thickness } from '../../server/contract/thickness.ts';
import { launchChromium, openPage, settle } from '../support/browser.ts';
import { recordedJson, recordWorkshop } from '../support/recorded-workshop.ts';
import { type ServedProgram, serveProgram } from '../support/served-program.ts';

const SERIAL = 'part of cure-estimates';
const PAGE = `/parts/${encodeURIComponent(SERIAL)}`;

let program: ServedProgram;
let browser: Browser;
let run: number;

beforeAll(async () => {
  program = await serveProgram();
  run = (await recordWorkshop(program.address, ['cure-estimates'])).get('cure-estimates') ?? 0;
  const set = recordedJson<object>('cure-estimates', 'resin.json');
  const thermal = { heatOfReaction: 466_000, basis: 'resin' };
  const document = { ...set, code: 'with-heat', thermal };
  const answer = await fetch(`${program.address}/api/resins`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ document }),
  });
  expect(answer.status).toBe(201);
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await program?.stop();
});

/** Fills the field that has the focus and goes on to the next, as hands on a keyboard do. */
async function type(page: Page, ...texts: string[]): Promise<void> {
  for (const text of texts) {
    await page.keyboard.type(text);
    await page.keyboard.press('Tab');
  }
}

describe('a part whose middle nobody measured', () => {
  it('asks for its lay-up, takes it by keyboard alone, and answers', { timeout: 120_000 }, async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto(PAGE);
    await settle(page);
    const section = page.locator('#thickness');
    expect(await section.textContent()).toContain('How it was laid up');
    await section.getByRole('link', { name: 'Write the lay-up down' }).press('Enter');
    await page.waitForURL('**/layup');
    await page.getByLabel('What it is').focus();
    await type(page, 'Test stock', 'D-77', 'B', 'T-9', '24,5', '120', 'W-9', 'the pier');
    await page.keyboard.type('carbon/epoxy from');
    await page.keyboard.press('Tab');
    await type(page, '58');
    expect(await page.locator('main').textContent()).toContain('resin 1260');
    await page.getByRole('button', { name: 'Keep the lay-up' }).press('Enter');
    await page.waitForURL((url) => url.pathname === PAGE);
    await page.getByText(/24\.5.mm, 120.plies/).waitFor();
    // The cycle's set gives no heat: the page says so and offers the others.
    await section.getByText('gives no heat of reaction').waitFor();
    await section.getByLabel('Resin set').selectOption('with-heat');
    await section.getByRole('button', { name: 'Work it out' }).press('Enter');
    await section.getByText('Hottest inside').waitFor();
    const answered = await fetch(`${program.address}/api${PAGE}/runs/${run}/thickness?resin=with-heat`);
    const answer = (await answered.json()) as Thickness;
    const [least, most] = answer.peakC.map((peakC) => peakC.toFixed(0));
    const said = (await section.textContent()) ?? '';
    expect(said).toContain(least === most ? `${least}\u00a0°C` : `${least} to ${most}\u00a0°C`);
    expect(said).toContain('chosen here, not named by the cycle');
    expect(said).toContain('by itself no verdict');
    expect(await section.locator('.line-plot svg[role=img]').count()).toBe(3);
    expect(await page.locator('main').textContent()).toContain('What tool T-9 is made of, and how thick it is.');
    expectNoComplaints(/status of 409 .*\/thickness/);
    await close();
  });

  it('is the starting point of the next part on its tool', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto('/parts/NEXT-1/layup');
    await settle(page);
    expect(await page.locator('main').textContent()).toContain('not on record yet');
    await page.getByLabel('Tool', { exact: true }).fill('T-9');
    await page.getByRole('button', { name: `Fill in as ${SERIAL}` }).press('Enter');
    expect(await page.getByLabel('Thickness when cured, mm').inputValue()).toBe('24.5');
    expect(await page.getByLabel('Drawing', { exact: true }).inputValue()).toBe('D-77');
    expect(await page.getByLabel('Work order', { exact: true }).inputValue()).toBe('');
    await page.getByRole('button', { name: 'Add a debulk' }).press('Enter');
    await page.getByLabel('Minutes').fill('15');
    await page.getByRole('button', { name: 'Keep the lay-up' }).press('Enter');
    await page.waitForURL('**/parts/NEXT-1');
    await page.getByText(/1, each 15.min/).waitFor();
    expectNoComplaints();
    await close();
  });

  it('names its tool, its coupon and the work done on it', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto('/tools/T-9');
    await settle(page);
    await page.getByLabel('Thickness under the part, mm').fill('12');
    await page.getByLabel('Material').selectOption('Invar 36');
    await page.getByRole('button', { name: 'Keep the record' }).press('Enter');
    await page.getByText('As it was written down').waitFor();
    await page.goto(PAGE);
    await settle(page);
    expect(await page.locator('main').textContent()).not.toContain('What tool T-9 is made of');
    await page.getByText('Write down a coupon').click();
    await page.getByLabel('Code of the coupon').fill('C-9');
    await page.getByLabel('Cured in').selectOption(String(run));
    await page.getByRole('button', { name: 'Write the coupon down' }).press('Enter');
    await page.getByText(`cured in run ${run}`).waitFor();
    await page.getByText('Write down work on it').click();
    await page.getByLabel('What was done').fill('edges, 2 mm');
    await page.getByRole('button', { name: 'Write the work down' }).press('Enter');
    await page.locator('.entry', { hasText: 'Trimming edges, 2 mm' }).waitFor();
    await page.keyboard.press('/');
    await page.keyboard.type('C-9');
    await page.keyboard.press('Enter');
    await page.waitForURL(`**${PAGE}`);
    expectNoComplaints(/status of 409 .*\/thickness/);
    await close();
  });
});
