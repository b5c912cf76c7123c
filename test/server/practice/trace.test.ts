import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { evaluateLog } from '../../../models/evaluation/judge.ts';
import { compareParts } from '../../../server/actions/compare-parts.ts';
import { overlayParts } from '../../../server/actions/overlay-parts.ts';
import type { Compared, Overlaid } from '../../../server/contract/comparison.ts';
import { BROKEN_AT_KN } from '../../../server/practice/plan-failures.ts';
import { AUTOCLAVE_1_SPRING } from '../../../server/practice/plan-runs-autoclave-1-spring.ts';
import { writePracticeWorkshop } from '../../../server/practice/write-workshop.ts';
import { type Db, openDatabase } from '../../../server/store/database.ts';

const folder = mkdtempSync(join(tmpdir(), 'practice-trace-'));
const path = join(folder, 'practice.sqlite');
const at = '2026-12-01T08:00:00.000Z';
let db: Db;

beforeAll(async () => {
  db = openDatabase(path, { at: '2025-10-20T07:00:00.000Z' });
  const evaluate = async (...given: Parameters<typeof evaluateLog>) => evaluateLog(...given);
  await writePracticeWorkshop({ db, evaluate, runs: AUTOCLAVE_1_SPRING });
}, 120_000);

afterAll(() => {
  db.close();
  rmSync(folder, { recursive: true });
});

const struts = { drawing: 'SR-D-1104', sound: 'others' } as const;

describe('the struts that broke in the practice workshop', () => {
  let compared: Compared;

  beforeAll(() => {
    compared = compareParts({ path, at, query: struts });
  });

  it('are told from the sound ones by their failed test', () => {
    const failed = compared.parts.filter((part) => part.failed).map(({ serial }) => serial);
    expect(failed).toEqual(Object.keys(BROKEN_AT_KN).sort());
    expect(compared.parts.length - failed.length).toBeGreaterThan(40);
  });

  it('go with the slow vacuum of their line first of all, however it is measured', () => {
    const { factors, groups } = compared.comparison;
    expect(factors[0]?.name).toMatch(/^vacuum/);
    expect(factors[0]?.standing).toBe('stands-out');
    const [first] = groups;
    expect(first?.first).toBe(factors[0]?.name);
    expect(
      [first?.first, ...(first?.tied.map(({ name }) => name) ?? [])].filter((name) => /^vacuum/.test(name ?? '')),
    ).toHaveLength(2);
  });

  it('cannot have line, tool and thermocouple told apart: all three moved together', () => {
    const group = compared.comparison.groups.find(
      ({ first, tied }) => first === 'bag line' || tied.some(({ name }) => name === 'bag line'),
    );
    const names = [group?.first, ...(group?.tied.map(({ name }) => name) ?? [])];
    expect(names).toEqual(expect.arrayContaining(['bag line', 'tool', 'thermocouple']));
  });

  it('are never said to have a cause', () => {
    const { words, factors } = compared.comparison;
    const said = [...words, ...factors.flatMap(({ sentence, evidence }) => [sentence, evidence])].join(' ');
    expect(said).not.toMatch(/\bcaus/i);
    expect(said).toMatch(/[Gg]oes with failure/);
  });

  it('show their vacuum below the band of the sound ones until it is vented, and no other temperature', () => {
    const overlaid: Overlaid = overlayParts({ path, at, query: { ...struts, event: 'heat-on' } });
    expect(overlaid.failed).toBe(6);
    const strip = (what: string) => overlaid.strips.find((one) => one.what === what)!.overlay;
    const { minutes, failed, band } = strip('vacuum');
    const heatOn = minutes.findIndex((minute) => minute >= 0);
    for (const { values } of failed) expect(values[heatOn]).toBeLessThan(band.low[heatOn]! + 0.02);
    const differences = strip('coldest').difference.flatMap(({ values }) => values.filter((value) => value !== null));
    const mean = differences.reduce((sum, value) => sum + value, 0) / differences.length;
    expect(Math.abs(mean)).toBeLessThan(5);
    expect(strip('degree').minutes.length).toBeLessThanOrEqual(2000);
  });

  it('leave out what has no such event, by name', () => {
    const { failed, sound, leftOut } = overlayParts({ path, at, query: { ...struts, event: 'vent' } });
    expect(failed + sound + leftOut.length).toBe(compared.parts.length);
  });
});
