import { describe, expect, it } from 'vitest';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import { addItemEvent, extendLife, recordExcursion } from '../../server/actions/add-item-event.ts';
import { correctEvent } from '../../server/actions/correct-event.ts';
import { cutKit } from '../../server/actions/cut-kit.ts';
import { importCycle } from '../../server/actions/import-cycle.ts';
import { importMaterial } from '../../server/actions/import-material.ts';
import type { JudgingParts } from '../../server/actions/judge-run.ts';
import { receiveRoll } from '../../server/actions/receive-roll.ts';
import { recordRun } from '../../server/actions/record-run.ts';
import { setBatch } from '../../server/actions/set-batch.ts';
import { setLoad } from '../../server/actions/set-load.ts';
import { setPartMaterials } from '../../server/actions/set-part-materials.ts';
import { verifyChains } from '../../server/actions/verify-chains.ts';
import { ROLES } from '../../server/contract/roles.ts';
import { sha256Of } from '../../server/store/canonical.ts';
import type { Db } from '../../server/store/database.ts';
import { failNthInsert } from './fail-nth-insert.ts';
import { freshDatabase } from './fresh-database.ts';
import { CASE, room21, TAPE } from './material-steps.ts';
import { recordedCase } from './recorded-case.ts';

const { log, layout, cycle, load } = recordedCase(CASE);
const asking = { ...cycle, material: { outLife: true } };
const night = (hour: number): [string, number] => [`2026-02-20T${hour}:00:00Z`, hour === 21 ? -8 : -18];

/** Every action of materials, each after those it needs; several judge the run anew. */
const DEEDS: readonly [string, (parts: JudgingParts) => unknown][] = [
  ['import-material', (parts) => importMaterial(parts, TAPE)],
  [
    'set-batch',
    (parts) => setBatch(parts, { batch: 'B-1', material: { code: 'tape', issue: 'A' }, made: '2026-01-15' }),
  ],
  ['receive-roll', (parts) => receiveRoll(parts, { roll: 'K-1', batch: 'B-1', at: '2026-02-01T08:00:00Z' })],
  ['add-item-event', (parts) => addItemEvent(parts, 'K-1', { kind: 'out', at: '2026-03-02T08:00:00Z', room: room21 })],
  ['cut-kit', (parts) => cutKit(parts, 'K-1', { kit: 'K-1A', at: '2026-03-02T10:00:00Z', lengthM: 3 })],
  ['import-cycle', (parts) => importCycle(parts, asking)],
  [
    'record-run',
    (parts) =>
      recordRun(parts, {
        files: [{ name: 'run.csv', sha256: sha256Of(log), bytes: log.length, chunks: () => [log] }],
        layout,
      }),
  ],
  [
    'set-load',
    (parts) =>
      setLoad(parts, 1, {
        load: { ...load(), parts: [{ part: 'P-1' }], sensors: [] },
        cycle: { code: cycle.code, issue: cycle.issue },
      }),
  ],
  [
    'set-part-materials',
    (parts) => setPartMaterials(parts, 'P-1', { materials: [{ item: 'K-1A', laidUpFrom: '2026-03-02T11:00:00Z' }] }),
  ],
  [
    'correct-event',
    (parts) =>
      correctEvent(parts, 'K-1', 2, {
        event: { kind: 'out', at: '2026-03-01T08:00:00Z', room: room21 },
        reason: 'the day before',
      }),
  ],
  [
    'set-batch again',
    (parts) =>
      setBatch(parts, { batch: 'B-1', material: { code: 'tape', issue: 'A' }, made: '2026-01-14', reason: 'misread' }),
  ],
  [
    'record-excursion',
    (parts) => recordExcursion(parts, { items: ['K-1'], points: [night(20), night(21), night(22)], unit: '°C' }),
  ],
  [
    'extend-life',
    (parts) =>
      extendLife(parts, 'K-1', {
        life: 'shelf-life',
        until: '2027-06-01T00:00:00Z',
        authority: 'materials engineer 1',
        tests: 'DSC',
        reason: 'as tested',
        at: '2026-03-02T08:30:00Z',
      }),
  ],
];

describe('an action on materials whose n-th insert fails', () => {
  it('leaves everything as it was, for every action and every n', async () => {
    const db = freshDatabase();
    const parts: JudgingParts = {
      db,
      clock: () => Date.parse('2026-03-10T08:00:00Z'),
      actor: { name: 'operator 1', roles: ROLES },
      evaluate: async (readings, inputs) => evaluateLog(readings, inputs),
    };
    for (const [verb, does] of DEEDS) {
      let failures = 0;
      for (let n = 1; ; n += 1) {
        const before = contentOf(db);
        const fault = failNthInsert(db, n);
        const outcome = await attempt(() => does(parts));
        fault.end();
        expect(db.inTransaction, `${verb}, insert ${n}`).toBe(false);
        if (outcome === null) break;
        expect(outcome, `${verb}, insert ${n}`).toMatch(/injected fault/);
        expect(contentOf(db), `${verb}, insert ${n}`).toEqual(before);
        failures = n;
      }
      expect(failures, verb).toBeGreaterThan(0);
      expect(db.pragma('integrity_check', { simple: true }), verb).toBe('ok');
      expect(db.pragma('foreign_key_check'), verb).toEqual([]);
    }
    expect(verifyChains(db)).toMatchObject({ holds: true, firstBroken: null });
    // What touched the part's material judged its run; what was written before its load did not.
    expect(db.prepare('SELECT because FROM evaluations ORDER BY id').pluck().all()).toEqual([
      'load set',
      'materials of P-1',
      'ledger of K-1 corrected',
      'batch B-1',
      'ledger of K-1',
      'ledger of K-1',
    ]);
  });

  it('rows of a ledger are never changed nor taken away', () => {
    const db = freshDatabase();
    for (const table of [
      'materials',
      'batch_particulars',
      'material_items',
      'material_events',
      'part_material_sets',
      'part_materials',
    ]) {
      const triggers = db
        .prepare<[string], string>("SELECT sql FROM sqlite_schema WHERE type = 'trigger' AND tbl_name = ?")
        .pluck()
        .all(table);
      expect(
        triggers.filter((sql) => /BEFORE UPDATE ON/.test(sql)),
        table,
      ).toHaveLength(1);
      expect(
        triggers.filter((sql) => /BEFORE DELETE ON/.test(sql)),
        table,
      ).toHaveLength(1);
    }
  });
});

async function attempt(does: () => unknown): Promise<string | null> {
  try {
    await does();
    return null;
  } catch (error) {
    return String(error);
  }
}

/** Every row of every table, as text. */
function contentOf(db: Db): Record<string, string> {
  const tables = db
    .prepare<[], string>("SELECT name FROM sqlite_schema WHERE type = 'table' AND name <> 'sqlite_sequence'")
    .pluck()
    .all();
  return Object.fromEntries(
    tables.map((table) => [table, sha256Of(JSON.stringify(db.prepare(`SELECT * FROM ${table}`).all()))]),
  );
}
