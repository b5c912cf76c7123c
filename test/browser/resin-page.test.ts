import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { recalledResin, referenceSets } from '../reference/cure/reference-sets.ts';
import { launchChromium, openPage, settle } from '../support/browser.ts';
import { recordedJson, recordWorkshop } from '../support/recorded-workshop.ts';
import { type ServedProgram, serveProgram } from '../support/served-program.ts';

// The two-dwell history of test/reference/cure/kinetics.json, written as a programme.
const TWO_DWELL = 'programme=20C_2to110_hold60_2to180_hold120_3to60';
const FROM_MEMORY = 'Figures from memory: for tests and trials, never a limit in a real workshop.';

let program: ServedProgram;
let browser: Browser;

beforeAll(async () => {
  program = await serveProgram();
  await recordWorkshop(program.address, ['cure-estimates']);
  for (const name of ['hubert_8552', 'dusi_976', 'lls_3501_6']) await post('/api/resins', recalledResin(name));
  const cycle = recordedJson<object>('cure-estimates', 'cycle.json');
  await post('/api/cycles', { ...cycle, issue: 'from-memory', cure: { resin: 'hubert_8552', degreeAtLeast: 0.8 } });
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await program?.stop();
});

describe('a cure at any programme', () => {
  it('is drawn while the programme is typed, and ends as the reference does', async () => {
    const { page, expectNoComplaints, close } = await openResin('hubert_8552');
    // By the keyboard alone, from the start's field on: rows are added where they are wanted.
    await page.getByLabel('Starts at, °C').focus();
    await typeOver(page, '20');
    await fillRamp(page, 1, '2', '110');
    await step(page, 2).getByLabel('For, min').fill('60');
    await page.getByRole('button', { name: 'Add a ramp' }).press('Enter');
    // The new row has the focus: its first field is next.
    await page.keyboard.type('2');
    await page.keyboard.press('Tab');
    await page.keyboard.type('180');
    await page.getByRole('button', { name: 'Add a hold' }).press('Enter');
    await page.keyboard.type('120');
    await page.getByRole('button', { name: 'Add a ramp' }).press('Enter');
    await fillRamp(page, 5, '3', '60');
    await expectReference(page, 'hubert_8552', 1);
    // Source: test/reference/cure/temperature-offset.json, ±1.1 K: (0.91830 − 0.90826) / 2 × 2, gel 87.2 / 2 / 60 × 2.
    expect(await figureIn(page, 'Degree at the end', 1)).toBe('0.913 ± 0.010');
    expect(await figureIn(page, 'Gels after', 1)).toMatch(/^137\.9 ± 1\.5.min/);
    expect(new URL(page.url()).search).toBe(`?${TWO_DWELL}`);
    expect(await wordsOfPicture(page)).toMatch(/gels after 137\.9 ± 1\.5.min; vitrifies after 151\.9.min/);
    expectNoComplaints();
    await close();
  });

  it('refuses at the field, in words, and keeps what was typed', async () => {
    const { page, expectNoComplaints, close } = await openResin('hubert_8552', TWO_DWELL);
    await page.getByLabel('Starts at, °C').fill('-300');
    await page.locator('.wrong', { hasText: 'Below absolute zero' }).waitFor();
    expect(await page.getByLabel('Starts at, °C').inputValue()).toBe('-300');
    await page.getByLabel('Starts at, °C').fill('293.15');
    await page.locator('.wrong', { hasText: 'Is it in K or °F?' }).waitFor();
    await page.getByLabel('Starts at, °C').fill('20');
    await step(page, 1).getByLabel('At, °C/min').fill('0');
    await page.locator('.wrong', { hasText: 'Expected a rate above 0 °C/min' }).waitFor();
    await page.getByText('Nothing is drawn while something above is refused').waitFor();
    expect(await step(page, 1).getByLabel('At, °C/min').getAttribute('aria-invalid')).toBe('true');
    // The address keeps the last programme that could be drawn.
    expect(new URL(page.url()).search).toBe(`?${TWO_DWELL}`);
    await step(page, 1).getByLabel('At, °C/min').fill('2');
    const start = page.getByLabel('Degree of cure at the start, hubert_8552');
    await start.fill('1');
    await page.getByText('The start degree is 1; expected a number of at least 0 and below 1.').waitFor();
    expect(await start.inputValue()).toBe('1');
    // By this law nothing ever starts from 0: the model says so.
    await start.fill('0');
    await page.getByText('expected a number above 0: by the law "autocatalytic"').waitFor();
    await start.fill('');
    for (let n = 5; n > 0; n -= 1) await page.getByRole('button', { name: `Remove step ${n}`, exact: true }).click();
    await page.getByText('The programme is empty: add a ramp or a hold.').waitFor();
    expectNoComplaints();
    await close();
  });

  it('opens from its address with both sets, each by its own gel and Tg, and says they are not comparable', async () => {
    const { page, expectNoComplaints, close } = await openResin('hubert_8552', `${TWO_DWELL}&with=dusi_976`);
    await page.getByText('not comparable across studies').waitFor();
    await expectReference(page, 'hubert_8552', 1);
    await expectReference(page, 'dusi_976', 2);
    const words = await wordsOfPicture(page);
    expect(words).toMatch(/hubert_8552 over 300\.0.min.*dusi_976 over 300\.0.min/);
    await page.getByLabel('Beside it, the set').selectOption('');
    await expectHeads(page, 1);
    expect(new URL(page.url()).searchParams.has('with')).toBe(false);
    await page.getByLabel('Beside it, the set').selectOption('lls_3501_6');
    await expectHeads(page, 2);
    // The switch of Lee, Loos and Springer: test/reference/cure/kinetics.json.
    const switchS = referenceSets.lls_3501_6?.cases.two_dwell?.events_s.switch ?? Number.NaN;
    expect(await figureIn(page, 'Law switches after', 2)).toBe(`${(switchS / 60).toFixed(1)}\u00a0min`);
    expectNoComplaints();
    await close();
  });

  it('takes the programme of a cycle on record, says how it was made, and gives back what was typed', async () => {
    const { page, expectNoComplaints, close } = await openResin('hubert_8552', TWO_DWELL);
    await page.getByRole('button', { name: 'Take its programme' }).click();
    await page.getByText('which is a set of limits, not a curve').waitFor();
    await page.getByText(/Dwell 2: 180 °C for \d+ min, its least time\./).waitFor();
    expect(await step(page, 1).getByLabel('To, °C').inputValue()).not.toBe('');
    await page.getByRole('button', { name: 'Back to what was typed' }).click();
    expect(await step(page, 1).getByLabel('At, °C/min').inputValue()).toBe('2');
    expect(new URL(page.url()).search).toBe(`?${TWO_DWELL}`);
    expectNoComplaints();
    await close();
  });

  it('stops where the law stalls and says so, with nothing made up beyond', async () => {
    const stall = 'programme=20C_hold10_1to5_hold100&start=0.2985';
    const { page, expectNoComplaints, close } = await openResin('lls_3501_6', stall);
    await page.getByText('never passes degree 0.29').waitFor();
    expect(await figureIn(page, 'Degree at the end', 1)).toContain('where it cannot go on');
    expectNoComplaints();
    await close();
  });
});

describe('the rate of cure', () => {
  it('is drawn at the temperatures typed, and tells in words where a law jumps or stands still', async () => {
    const { page, expectNoComplaints, close } = await openResin('lls_3501_6');
    await page.getByLabel('At temperatures, °C').fill('2, 150');
    await page.getByText('at degree 0.3 the law passes from one form to the other').waitFor();
    // −k1/k2 at 275.15 K by the constants of test/reference/cure/kinetics.json.
    const { A1, E1, A2, E2 } = recalledResin('lls_3501_6').kinetics as unknown as Record<string, number>;
    const at = (A = 0, E = 0) => A * Math.exp(-E / (8.314462618 * 275.15));
    const stall = (-at(A1, E1) / at(A2, E2)).toFixed(4);
    await page.getByText(`At 2 °C the set stands still at degree ${stall}; its rate is below 0`).waitFor();
    await page.getByLabel('At temperatures, °C').fill('-274');
    await page.locator('.wrong', { hasText: 'Below absolute zero' }).waitFor();
    expectNoComplaints();
    await close();
  });
});

describe('a set from memory', () => {
  it('says so on its page, in the list, on the cycle that names it and at the estimates of a run', async () => {
    const { page, expectNoComplaints, close } = await openResin('hubert_8552');
    expect(await page.getByText(FROM_MEMORY).count()).toBeGreaterThan(0);
    await page.goto('/resins');
    await settle(page);
    const entry = page.locator('.entry', { hasText: 'hubert_8552' });
    expect(await entry.getByText('recalled · for trials only').count()).toBe(1);
    expect(await entry.getByText(FROM_MEMORY).count()).toBe(1);
    await page.goto('/cycles/SR-180/from-memory');
    await page.locator('.standing', { hasText: FROM_MEMORY }).waitFor();
    // The recorded case estimates with a set of another standing: its cycle and its run say that one's.
    const status = await statusOf('SR-180', 'B-cure-estimates');
    for (const path of ['/cycles/SR-180/B-cure-estimates', '/runs/1']) {
      await page.goto(path);
      await page.locator('.standing', { hasText: status }).waitFor();
    }
    expectNoComplaints();
    await close();
  });
});

async function post(path: string, document: unknown): Promise<void> {
  const response = await fetch(program.address + path, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ document }),
  });
  if (!response.ok) throw new Error(`${path}: ${response.status} ${await response.text()}`);
}

async function statusOf(code: string, issue: string): Promise<string> {
  const cycle = await (await fetch(`${program.address}/api/cycles/${code}/${issue}`)).json();
  const resin = await (await fetch(`${program.address}/api/resins/${cycle.document.cure.resin}`)).json();
  return resin.document.source.status;
}

async function openResin(code: string, query = '') {
  const watched = await openPage(browser, program.address);
  await watched.page.goto(`/resins/${code}?${query}`);
  await watched.page.locator('canvas').first().waitFor();
  await settle(watched.page);
  return watched;
}

const step = (page: Page, n: number) => page.getByRole('group', { name: `Step ${n}`, exact: true });

async function fillRamp(page: Page, n: number, rate: string, to: string): Promise<void> {
  await step(page, n).getByLabel('At, °C/min').fill(rate);
  await step(page, n).getByLabel('To, °C').fill(to);
}

async function typeOver(page: Page, text: string): Promise<void> {
  await page.keyboard.press('Control+a');
  await page.keyboard.type(text);
}

async function figureIn(page: Page, row: string, column: number): Promise<string> {
  const cells = page.locator('.trial-figures tbody tr', {
    has: page.getByRole('rowheader', { name: row, exact: true }),
  });
  return (
    (await cells
      .locator('td')
      .nth(column - 1)
      .textContent()) ?? ''
  );
}

async function wordsOfPicture(page: Page): Promise<string> {
  return (await page.locator('#programme canvas').getAttribute('aria-label')) ?? '';
}

async function expectHeads(page: Page, sets: number): Promise<void> {
  await page.waitForFunction((n) => document.querySelectorAll('.trial-figures thead th').length === n + 1, sets);
}

/** What is shown is the reference, rounded. */
async function expectReference(page: Page, set: string, column: number): Promise<void> {
  const reference = referenceSets[set]?.cases.two_dwell;
  if (reference === undefined) throw new Error(`no reference for ${set}`);
  const { gel = Number.NaN, vitrification = Number.NaN } = reference.events_s;
  const minutes = (s: number) => (s / 60).toFixed(1);
  await page.locator('.trial-figures').waitFor();
  expect(await figureIn(page, 'Degree at the end', column)).toContain(reference.final_alpha.toFixed(3));
  expect(await figureIn(page, 'Tg at the end', column)).toContain(reference.final_Tg_C.toFixed(1));
  expect(await figureIn(page, 'Gels after', column)).toMatch(new RegExp(`^${minutes(gel)} `));
  expect(await figureIn(page, 'Vitrifies after', column)).toMatch(new RegExp(`^${minutes(vitrification)}\\s`));
}
