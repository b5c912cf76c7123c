import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium, openPage, settle } from '../support/browser.ts';
import { type ServedProgram, serveProgram } from '../support/served-program.ts';

let program: ServedProgram;
let browser: Browser;

const TAPE = {
  format: 'dwellbook-material/1',
  code: 'tape',
  issue: 'A',
  name: 'Practice tape',
  units: { temperature: '°C' },
  storage: { atMost: -18, lifeDays: 365 },
  out: { lifeDays: 10, atMost: 24 },
};

beforeAll(async () => {
  program = await serveProgram();
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await program?.stop();
});

describe('a roll of material', () => {
  it('comes in, goes out, has a kit cut from it and goes back, tap by tap', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto('/materials');
    await page.getByText('No roll is on record yet').waitFor();
    const [chooser] = await Promise.all([
      page.waitForEvent('filechooser'),
      page.getByRole('button', { name: 'Choose a document' }).click(),
    ]);
    const buffer = Buffer.from(JSON.stringify(TAPE));
    await chooser.setFiles({ name: 'tape.json', mimeType: 'application/json', buffer });
    await page.getByText('Record a batch').click();
    await page.getByLabel('Maker’s lot').fill('B-0911');
    await page
      .getByLabel('Made', { exact: true })
      .fill(new Date(Date.now() - 30 * 86_400_000).toISOString().slice(0, 10));
    await page.getByRole('button', { name: 'Record the batch' }).click();
    await page.getByText('A roll has come in').click();
    await page.getByLabel('Code of the roll').fill('K-17');
    await page.getByLabel('Length, m').fill('40');
    await page.getByRole('button', { name: 'Record the roll' }).click();
    await page.getByRole('link', { name: 'K-17' }).click();

    await page.getByRole('button', { name: 'Out of the freezer' }).waitFor();
    await page.getByLabel('Room, °C').fill('21');
    await page.getByRole('button', { name: 'Out of the freezer' }).click();
    await page.getByText('Out of the freezer into 21 °C').waitFor();
    expect(await page.getByLabel('Code of the kit').inputValue()).toBe('K-17-1');
    await page.getByLabel('Length, m').fill('6,5');
    await page.getByRole('button', { name: 'Cut a kit' }).click();
    await page.getByRole('link', { name: 'K-17-1' }).waitFor();
    await page.getByText('33.5 of 40 m not cut off yet').waitFor();
    await page.getByRole('button', { name: 'Back in the freezer' }).click();
    await page.getByRole('button', { name: 'Out of the freezer' }).waitFor();

    // A gloved finger: every button one taps is at least 48 px high, at a tablet's width.
    await page.setViewportSize({ width: 768, height: 1024 });
    for (const button of await page.locator('.taps button').all()) {
      expect((await button.boundingBox())?.height).toBeGreaterThanOrEqual(48);
    }
    await landOn(page, 'K-17-1', 'Kit K-17-1');
    await page.getByRole('button', { name: 'Back in the freezer' }).waitFor();
    expectNoComplaints();
    await close();
  });

  it('keeps a wrong line struck through, with who corrected it and why', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await landOn(page, 'K-17', 'Roll K-17');
    const wrong = page.locator('.entry', { hasText: 'Back in the freezer' });
    await wrong.getByText('This is wrong').click();
    await wrong.getByLabel('Why').fill('it was K-18');
    await wrong.getByRole('button', { name: 'It never happened: take it back' }).click();
    await page.locator('s', { hasText: 'Back in the freezer' }).waitFor();
    await page.getByText('Taken back by').waitFor();
    await page.getByText('it was K-18').first().waitFor();
    // What contradicts the ledger is refused, and the page says what does.
    await page.getByLabel(/^When, in/).fill('2020-01-01T08:00');
    await page.getByRole('button', { name: 'Back in the freezer' }).click();
    await page.getByRole('alert').getByText('Cannot have happened so').waitFor();
    expectNoComplaints(/status of 422 .*\/events/);
    await close();
  });
});

/** Types a code into the box and lands on its page, by keyboard alone. */
async function landOn(page: Page, code: string, title: string): Promise<void> {
  await page.goto('/');
  await settle(page);
  await page.keyboard.press('/');
  await page.keyboard.type(code);
  await page.keyboard.press('Enter');
  await page
    .getByRole('link', { name: title, exact: true })
    .or(page.getByRole('heading', { name: title, level: 1 }))
    .first()
    .waitFor();
  const link = page.getByRole('link', { name: title, exact: true });
  if ((await link.count()) > 0) await link.first().click();
  await page.getByRole('heading', { name: title, level: 1 }).waitFor();
}
