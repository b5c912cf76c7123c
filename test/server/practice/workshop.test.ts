import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { evaluateLog } from '../../../models/evaluation/judge.ts';
import { verifyChains } from '../../../server/actions/verify-chains.ts';
import type { RunLine } from '../../../server/contract/runs.ts';
import { BROKEN_AT_KN } from '../../../server/practice/plan-failures.ts';
import { PLANNED_RUNS, UNLOADED_RUN } from '../../../server/practice/plan-runs.ts';
import { writePracticeWorkshop } from '../../../server/practice/write-workshop.ts';
import { type Db, openDatabase } from '../../../server/store/database.ts';
import { listWaitingImports } from '../../../server/store/imports.ts';
import { listRuns } from '../../../server/store/run-lines.ts';

const folder = mkdtempSync(join(tmpdir(), 'practice-'));
const said: string[] = [];
let db: Db;
let lines: readonly RunLine[];

function write(): Promise<void> {
  return writePracticeWorkshop({
    db,
    evaluate: async (log, inputs) => evaluateLog(log, inputs),
    say: (sentence) => said.push(sentence),
  });
}

beforeAll(async () => {
  db = openDatabase(join(folder, 'practice.sqlite'), { at: '2025-10-20T07:00:00.000Z' });
  await write();
  lines = listRuns(db, { limit: 200 }).runs;
}, 180_000);

afterAll(() => {
  db.close();
  rmSync(folder, { recursive: true });
});

function lineOf(startsAt: string): RunLine {
  return lines.find(({ from }) => Date.parse(from) === Date.parse(startsAt))!;
}

describe('the practice workshop in its database', () => {
  it('judges every run as it was made to come out, limit by limit', () => {
    for (const { run, startsAt, expected } of PLANNED_RUNS) {
      const line = lineOf(startsAt);
      expect(`${run} ${line.verdict}`).toBe(`${run} ${expected.verdict}`);
      expect([...line.notMet].sort(), run).toEqual([...(expected.notMet ?? [])].sort());
      if (expected.verdict === 'conforms') expect(line.cannotTell, run).toEqual([]);
      if (expected.cannotTell !== undefined) expect(line.cannotTell, run).toEqual(expected.cannotTell);
      if (expected.verdict === 'cannot-tell') expect(line.cannotTell, run).not.toEqual([]);
    }
  });

  it('is mostly sound, as workshops are', () => {
    const sound = lines.filter(({ verdict }) => verdict === 'conforms').length;
    expect(sound / PLANNED_RUNS.length).toBeGreaterThan(0.6);
    expect(sound / PLANNED_RUNS.length).toBeLessThan(0.75);
  });

  it('says how far it is', () => {
    expect(said).toHaveLength(PLANNED_RUNS.length);
    expect(said.at(-1)).toContain(`${PLANNED_RUNS.length} of ${PLANNED_RUNS.length}`);
  });

  it('has every chain whole, and a trail that goes forward in time', () => {
    expect(verifyChains(db)).toMatchObject({ holds: true, firstBroken: null });
    const times = db.prepare<[], string>('SELECT at FROM audit ORDER BY n').pluck().all();
    expect(times.every((at, n) => n === 0 || at >= times[n - 1]!)).toBe(true);
    expect(times[0]! >= '2025-10').toBe(true);
    expect(times.at(-1)! < '2026-12').toBe(true);
  });

  it('leaves something to do: a run without its load, a file without a layout, suspects to decide on', () => {
    expect(lineOf(UNLOADED_RUN.startsAt)).toMatchObject({ state: 'awaiting-load', verdict: null });
    expect(listWaitingImports(db).map(({ name }) => name)).toEqual(['O1-0001.csv']);
    expect(lineOf('2026-04-08T06:41:00Z').undecided).toBeGreaterThan(0);
  });

  it('is the same to the last hash when it is written again', async () => {
    const lastHash = async (name: string): Promise<unknown> => {
      const again = openDatabase(join(folder, name), { at: '2025-10-20T07:00:00.000Z' });
      await writePracticeWorkshop({
        db: again,
        evaluate: async (log, inputs) => evaluateLog(log, inputs),
        runs: PLANNED_RUNS.slice(0, 3),
      });
      const hash = again.prepare('SELECT sha256 FROM audit ORDER BY n DESC LIMIT 1').pluck().get();
      again.close();
      return hash;
    };
    expect(await lastHash('one.sqlite')).toBe(await lastHash('other.sqlite'));
  });

  it('is never written over a workshop that is there', async () => {
    await expect(write()).rejects.toThrow(/in use/);
  });
});

describe('the struts that broke', () => {
  const broken = () =>
    db
      .prepare<[], string>(
        `SELECT serial FROM part_results JOIN parts ON parts.id = part_id WHERE outcome = 'failed' ORDER BY serial`,
      )
      .pluck()
      .all();

  it('are the six of the plan, all from runs that conform', () => {
    expect(broken()).toEqual(Object.keys(BROKEN_AT_KN).sort());
    for (const serial of broken()) {
      const line = lines.find(({ parts }) => parts.includes(serial))!;
      expect(line.verdict).toBe('conforms');
    }
  });

  it('are exactly those that an aged roll and a line slow to draw down have in common, and neither alone', () => {
    const all = PLANNED_RUNS.filter(({ vessel }) => vessel === 'Autoclave 1').flatMap(({ parts, fouledLines = [] }) =>
      parts.map(({ part, bagLine, roll }) => ({
        part,
        isAged: roll === 'K-23',
        isSlow: fouledLines.some(({ line }) => line === bagLine),
      })),
    );
    expect(all.filter(({ isAged, isSlow }) => isAged && isSlow).map(({ part }) => part)).toEqual(broken());
    expect(all.filter(({ isAged, isSlow }) => isAged && !isSlow).length).toBeGreaterThan(12);
    expect(all.filter(({ isAged, isSlow }) => !isAged && isSlow).length).toBeGreaterThanOrEqual(2);
  });
});
