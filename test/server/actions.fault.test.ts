import { describe, expect, it } from 'vitest';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import type { Layout } from '../../models/log/layout.ts';
import { addNote } from '../../server/actions/add-note.ts';
import { addPartResult } from '../../server/actions/add-part-result.ts';
import { addPartWork } from '../../server/actions/add-part-work.ts';
import { addRecorder } from '../../server/actions/add-recorder.ts';
import { addSource } from '../../server/actions/add-source.ts';
import { addVessel } from '../../server/actions/add-vessel.ts';
import { decideSuspect } from '../../server/actions/decide-suspect.ts';
import { discardImport } from '../../server/actions/discard-import.ts';
import { importCycle } from '../../server/actions/import-cycle.ts';
import { importResin } from '../../server/actions/import-resin.ts';
import type { IncomingFile } from '../../server/actions/incoming-file.ts';
import { type JudgingParts, judgeRun } from '../../server/actions/judge-run.ts';
import { keepLayout } from '../../server/actions/keep-layout.ts';
import { readAgain } from '../../server/actions/read-again.ts';
import { receiveFile } from '../../server/actions/receive-file.ts';
import { recordRun } from '../../server/actions/record-run.ts';
import { releaseCycle } from '../../server/actions/release-cycle.ts';
import { setCoupon } from '../../server/actions/set-coupon.ts';
import { setLayup } from '../../server/actions/set-layup.ts';
import { setLoad } from '../../server/actions/set-load.ts';
import { setTool } from '../../server/actions/set-tool.ts';
import { setWorkshop } from '../../server/actions/set-workshop.ts';
import { verifyChains } from '../../server/actions/verify-chains.ts';
import { withdrawCycle } from '../../server/actions/withdraw-cycle.ts';
import { ROLES } from '../../server/contract/roles.ts';
import { sha256Of } from '../../server/store/canonical.ts';
import type { Db } from '../../server/store/database.ts';
import { failNthInsert } from './fail-nth-insert.ts';
import { freshDatabase } from './fresh-database.ts';
import { recordedCase } from './recorded-case.ts';

const { log, layout, cycle, load } = recordedCase('must-work');
const units = { temperature: '°C', pressure: 'bar', vacuum: 'bar' } as const;
const resin = {
  format: 'dwellbook-resin/1',
  code: 'r',
  name: 'r',
  source: { citation: 'none', status: 'illustrative' },
  initialDegree: 0.01,
  gasConstant: 8.314462618,
  kinetics: { law: 'nth-order', A: 2600, E: 61300, n: 1 },
};

const otherLog = Buffer.from('time,V9\n2026-03-03 08:14:10,0.9\n2026-03-03 08:14:40,0.8\n');
const otherLayout: Layout = {
  format: 'dwellbook-layout/1',
  name: 'vacuum recorder',
  header: 1,
  time: { columns: ['time'], pattern: 'yyyy-MM-dd HH:mm:ss', zone: 'UTC' },
  channels: [{ column: 'V9', name: 'line 9', role: 'other', unit: 'bar' }],
};

function file(bytes: Uint8Array = log): IncomingFile {
  return { name: 'run.csv', sha256: sha256Of(bytes), bytes: bytes.length, chunks: () => [bytes] };
}

const loadOf = (part: string) => ({
  load: { ...load(), parts: [{ part }], sensors: [] },
  cycle: { code: cycle.code, issue: cycle.issue },
});

/** Every action, each after those it needs. `n` makes what it writes new each time it is tried. */
const DEEDS: readonly [string, (parts: JudgingParts, n: number) => unknown][] = [
  ['set-workshop', (parts, n) => setWorkshop(parts, { name: `Shed ${n}`, zone: 'UTC', units })],
  ['add-vessel', (parts, n) => addVessel(parts, { name: `Oven ${n}`, kind: 'oven' })],
  ['add-recorder', (parts, n) => addRecorder(parts, { name: `recorder ${n}`, layout: { ...layout, name: `${n}` } })],
  ['keep-layout', (parts, n) => keepLayout(parts, 'recorder 0', { ...layout, name: `other ${n}` })],
  ['import-cycle', (parts, n) => importCycle(parts, n === 0 ? cycle : { ...cycle, issue: `B${n}` })],
  ['import-resin', (parts, n) => importResin(parts, { ...resin, code: `r${n}` })],
  ['release-cycle', (parts) => releaseCycle(parts, cycle.code, cycle.issue, 'ready')],
  ['record-run', (parts) => recordRun(parts, { files: [file()], layout, recorder: 'recorder 9', vessel: 'Oven 0' })],
  ['set-load', (parts, n) => setLoad(parts, 1, { ...loadOf(`P-${n}`), ...(n === 0 ? {} : { reason: 'again' }) })],
  ['add-source', (parts) => addSource(parts, 1, { files: [file(otherLog)], layout: otherLayout })],
  ['read-again', (parts) => readAgain(parts, 1, 2, { layout: { ...otherLayout, missing: ['-'] }, reason: 'a code' })],
  ['decide-suspect', (parts) => decideSuspect(parts, 1, { decision: 'keep', channel: 'TC1', reason: 'sound' })],
  ['judge-run', (parts) => judgeRun(parts, 1)],
  ['add-note', (parts) => addNote(parts, 1, { text: 'door opened' })],
  [
    'add-part-result',
    (parts) => addPartResult(parts, 'P-0', { at: '2026-03-04T08:00:00Z', test: 'DSC', outcome: 'noted' }),
  ],
  ['set-tool', (parts) => setTool(parts, 'T-0', { title: 'Mould', thicknessMm: 12 })],
  [
    'set-layup',
    (parts) =>
      setLayup(parts, 'P-0', {
        drawing: 'D-1',
        tool: 'T-1',
        thicknessMm: 30,
        debulks: [{ minutes: 15 }, { minutes: 30 }],
      }),
  ],
  [
    'add-part-work',
    (parts) => addPartWork(parts, 'P-0', { work: 'trimming', text: 'edges', at: '2026-03-05T08:00:00Z' }),
  ],
  ['set-coupon', (parts) => setCoupon(parts, 'P-0', { code: 'C-0', run: 1 })],
  ['receive-file', (parts, n) => receiveFile(parts, { file: file(Buffer.from(`rubbish ${n}`)), origin: 'upload' })],
  ['discard-import', (parts) => discardImport(parts, 1, 'rubbish')],
  ['withdraw-cycle', (parts) => withdrawCycle(parts, cycle.code, cycle.issue, 'done')],
];

describe('an action whose n-th insert fails', () => {
  it('leaves everything as it was, for every action and every n', async () => {
    const db = freshDatabase();
    const parts: JudgingParts = {
      db,
      clock: () => Date.parse('2026-03-10T08:00:00Z'),
      actor: { name: 'inspector 2', roles: ROLES },
      evaluate: async (readings, inputs) => evaluateLog(readings, inputs),
    };
    for (const [verb, does] of DEEDS) {
      let failures = 0;
      for (let n = 1; ; n += 1) {
        const before = contentOf(db);
        const fault = failNthInsert(db, n);
        const outcome = await attempt(() => does(parts, 0));
        fault.end();
        expect(db.inTransaction, `${verb}, insert ${n}`).toBe(false);
        if (outcome === null) break;
        expect(outcome, `${verb}, insert ${n}`).toMatch(/injected fault/);
        expect(contentOf(db), `${verb}, insert ${n}`).toEqual(before);
        failures = n;
      }
      // Every action writes at least its audit line.
      expect(failures, verb).toBeGreaterThan(0);
      expect(db.pragma('integrity_check', { simple: true }), verb).toBe('ok');
      expect(db.pragma('foreign_key_check'), verb).toEqual([]);
    }
    expect(verifyChains(db)).toEqual({ holds: true, lines: expect.any(Number), sources: 3, firstBroken: null });
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
