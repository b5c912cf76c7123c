import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium, openPage } from '../support/browser.ts';
import { type ServedProgram, serveProgram } from '../support/served-program.ts';

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

const TABLE = 'Strut,Title,Tool,Plies\nSR-1,Left,T-7,8\nSR-2,Right,T-7,many\nSR-3,Spare,T-7,9\n';

/** One pixel: GIF89a, 17 to 27. */
const GIF = Buffer.from('R0lGODlhAQABAIAAAAAAAP///yH5BAEAAAAALAAAAAABAAEAAAIBRAA7', 'base64');

describe('parts from a table', () => {
  it('are seen, their columns put right, kept, and then printed as labels that lead back to them', async () => {
    const { page, expectNoComplaints, close } = await openPage(browser, program.address);
    await page.goto('/parts/import');
    const [chooser] = await Promise.all([
      page.waitForEvent('filechooser'),
      page.getByRole('button', { name: 'Choose a table' }).click(),
    ]);
    await chooser.setFiles({ name: 'parts.csv', mimeType: 'text/csv', buffer: Buffer.from(TABLE) });
    await page.getByText('Say which column holds serial').waitFor();
    await page.getByLabel('Strut', { exact: true }).selectOption({ label: 'serial' });
    await page.getByText('Line 3, Plies').waitFor();
    await page.setViewportSize({ width: 360, height: 800 });
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth - innerWidth);
    expect(overflow).toBeLessThanOrEqual(0);
    const keep = page.getByRole('button', { name: /^Keep 2/ });
    expect((await keep.boundingBox())?.height).toBeGreaterThanOrEqual(44);
    await keep.focus();
    await page.keyboard.press('Enter');
    await page.getByText('1 row stayed behind', { exact: false }).waitFor();

    await page.goto('/parts/SR-1');
    await page.getByText('Write down a test or an inspection').click();
    await page.getByLabel('Kind').first().selectOption({ label: 'load test' });
    await page.getByLabel('Limit load, kN').fill('6');
    await page.getByLabel('Ultimate load, kN').fill('9,0');
    await page.getByText('Ultimate is 1.5 times limit; that is common practice.').waitFor();
    await page.getByLabel('Load reached, kN').fill('7,9');
    await page.getByLabel('There it').selectOption({ label: 'broke' });
    await page.getByLabel('Outcome').selectOption({ label: 'failed' });
    await page.getByRole('button', { name: 'Write it down' }).first().click();
    await page.getByText('Broke at 7.9').waitFor();
    const [photo] = await Promise.all([
      page.waitForEvent('filechooser'),
      page.getByRole('button', { name: 'Add a photograph or document' }).click(),
    ]);
    await photo.setFiles({ name: 'break.gif', mimeType: 'image/gif', buffer: GIF });
    await page.getByRole('img', { name: 'break.gif' }).waitFor();
    const width = () => document.querySelector<HTMLImageElement>('img.paper')?.naturalWidth;
    await expect.poll(() => page.evaluate(width)).toBe(1);
    await page.getByRole('link', { name: 'Print label' }).click();
    await page.getByRole('img', { name: 'Labels of SR-1' }).waitFor();
    const symbol = await page.evaluate(async () => {
      const href = document.querySelector('.label-sheet image')?.getAttribute('href') ?? '';
      return (await fetch(href)).status;
    });
    expect(symbol).toBe(200);
    await page.emulateMedia({ media: 'print' });
    expect(await page.getByRole('button', { name: /^Print/ }).isVisible()).toBe(false);
    const box = await page.locator('.label-sheet').boundingBox();
    // A4 in CSS pixels, 96 to the inch.
    expect(box?.width).toBeCloseTo((210 / 25.4) * 96, 0);
    expectNoComplaints();
    await close();
  });
});
