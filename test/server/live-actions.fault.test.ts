import { describe, expect, it } from 'vitest';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import { readLog } from '../../models/log/read-log.ts';
import { addSource } from '../../server/actions/add-source.ts';
import { beginRun } from '../../server/actions/begin-run.ts';
import { closeRun } from '../../server/actions/close-run.ts';
import { endRun } from '../../server/actions/end-run.ts';
import { importCycle } from '../../server/actions/import-cycle.ts';
import type { JudgingParts } from '../../server/actions/judge-run.ts';
import { makeKey } from '../../server/actions/make-key.ts';
import { revokeKey } from '../../server/actions/revoke-key.ts';
import { verifyChains } from '../../server/actions/verify-chains.ts';
import { ROLES } from '../../server/contract/roles.ts';
import { asLogFile } from '../../server/files/as-log-file.ts';
import { sha256Of } from '../../server/store/canonical.ts';
import type { Db } from '../../server/store/database.ts';
import { keepScans } from '../../server/store/live-scans.ts';
import { failNthInsert } from './fail-nth-insert.ts';
import { freshDatabase } from './fresh-database.ts';
import { addLiveVessel, pushSource } from './live-workshop.ts';
import { recordedCase } from './recorded-case.ts';

const { log, layout, cycle, load } = recordedCase('must-work');

async function caseScans() {
  const { timeMs, channels } = readLog([await asLogFile('run.csv', [log], log.length)], layout).readings;
  return [...timeMs].map((at, n) => ({
    timeMs: at,
    sequence: n,
    figures: Float64Array.from(channels, ({ value }) => value[n] ?? Number.NaN),
  }));
}

describe('an action of a live run whose n-th insert fails', () => {
  it('leaves everything as it was, for every action and every n', async () => {
    const db = freshDatabase();
    const parts: JudgingParts = {
      db,
      clock: () => Date.parse('2026-03-10T08:00:00Z'),
      actor: { name: 'operator 1', roles: ROLES },
      evaluate: async (readings, inputs) => evaluateLog(readings, inputs),
    };
    const { vesselId, settings } = addLiveVessel(db, 'Autoclave 1', {
      ...pushSource('plc'),
      channels: layout.channels,
    });
    importCycle(parts, cycle);
    const scans = await caseScans();
    const half = Math.floor(scans.length / 2);
    const keep = (some: typeof scans) => keepScans(db, [{ vesselId, settings, scans: some, arrivedMs: parts.clock() }]);
    const from = new Date(scans[0]?.timeMs ?? 0).toISOString();
    const request = { from, load: load(), cycle: { code: cycle.code, issue: cycle.issue } };
    const file = { name: 'run.csv', sha256: sha256Of(log), bytes: log.length, chunks: () => [log] };
    const deeds: readonly [string, () => unknown][] = [
      ['make-key', () => makeKey(parts, 'Autoclave 1', 'cell controller')],
      ['revoke-key', () => revokeKey(parts, 'Autoclave 1', 1, 'lost')],
      ['keep-scans before', () => keep(scans.slice(0, 20))],
      ['begin-run', () => beginRun(parts, 'Autoclave 1', request)],
      ['keep-scans late', () => keep(scans.slice(half, half + 30))],
      ['keep-scans', () => keep(scans)],
      ['end-run', () => endRun(parts, 1, { at: new Date(scans.at(-1)?.timeMs ?? 0).toISOString() })],
      ['close-run', () => closeRun(parts, 1)],
      ['join-source', () => addSource(parts, 1, { files: [file], layout }, { shiftMs: 500, because: 'same cards' })],
    ];
    for (const [deed, does] of deeds) await failAtEveryInsert(db, deed, does);
    expect(verifyChains(db)).toMatchObject({ holds: true, firstBroken: null, sources: 2 });
  });
});

async function failAtEveryInsert(db: Db, deed: string, does: () => unknown): Promise<void> {
  for (let n = 1; ; n += 1) {
    const before = contentOf(db);
    const fault = failNthInsert(db, n);
    const outcome = await attempt(does);
    fault.end();
    expect(db.inTransaction, `${deed}, insert ${n}`).toBe(false);
    if (outcome === null) {
      expect(n, deed).toBeGreaterThan(1);
      break;
    }
    expect(outcome, `${deed}, insert ${n}`).toMatch(/injected fault/);
    expect(contentOf(db), `${deed}, insert ${n}`).toEqual(before);
    // Looking at every insert of a long run is for the first few and then every so many.
    if (n > 40) n += 97;
  }
  expect(verifyChains(db).firstBroken, deed).toBeNull();
  expect(db.pragma('integrity_check', { simple: true }), deed).toBe('ok');
  expect(db.pragma('foreign_key_check'), deed).toEqual([]);
}

async function attempt(does: () => unknown): Promise<string | null> {
  try {
    await does();
    return null;
  } catch (error) {
    return String(error);
  }
}

/** Every row of every table but the reservation of arrivals, as text. */
function contentOf(db: Db): Record<string, string> {
  const tables = db
    .prepare<[], string>(
      "SELECT name FROM sqlite_schema WHERE type = 'table' AND name NOT IN ('sqlite_sequence', 'live_arrivals')",
    )
    .pluck()
    .all();
  return Object.fromEntries(
    tables.map((table) => [table, sha256Of(JSON.stringify(db.prepare(`SELECT * FROM ${table}`).all()))]),
  );
}
