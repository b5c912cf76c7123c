import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findEndangered, makeHoldList } from '../../server/actions/make-hold-list.ts';
import { ROLES } from '../../server/contract/roles.ts';
import { KIN_KINDS, type KinKind } from '../../server/contract/trace.ts';
import { sha256Of } from '../../server/store/canonical.ts';
import type { Db } from '../../server/store/database.ts';
import { failNthInsert } from './fail-nth-insert.ts';
import { freshDatabase } from './fresh-database.ts';
import { type MadePart, type MadeRun, writeItems, writePart, writeRuns } from './hold-steps.ts';

const ROLLS = [
  { roll: 'K-1', batch: 'B-1', kits: ['K-1A', 'K-1B'] },
  { roll: 'K-2', batch: 'B-1', kits: ['K-2A'] },
  { roll: 'K-3', batch: 'B-2', kits: [] },
];
const BATCH_OF: Record<string, string> = { 'K-1': 'B-1', 'K-2': 'B-1', 'K-3': 'B-2' };
const ITEMS = ROLLS.flatMap(({ roll, kits }) => [roll, ...kits]);
const maybe = <T>(...of: T[]) => fc.constantFrom<T | null>(null, ...of);

const shops = fc
  .record({
    parts: fc.array(
      fc.record({
        item: maybe(...ITEMS),
        tool: maybe('T-1', 'T-2'),
        bagLine: maybe('V1', 'V2'),
        channel: maybe('TC1', 'TC2'),
      }),
      { minLength: 2, maxLength: 12 },
    ),
    runs: fc.array(fc.record({ vessel: maybe('A', 'B'), by: fc.constantFrom('one', 'two') }), {
      minLength: 1,
      maxLength: 4,
    }),
    places: fc.array(fc.nat(4), { minLength: 12, maxLength: 12 }),
    failed: fc.nat(1),
  })
  .map(({ parts: said, runs: ran, places, failed }) => {
    const parts: MadePart[] = said.map((one, n) => ({ serial: `P-${n}`, ...one }));
    const runs: MadeRun[] = ran.map(({ vessel, by }, day) => ({
      vessel,
      by,
      day,
      parts: parts.filter((_, n) => places[n] === day),
    }));
    return { parts, runs, loose: parts.filter((_, n) => (places[n] ?? 0) >= runs.length), failed: `P-${failed}` };
  });

/** What a part has, told without SQL from how it was made. */
function traitsOf({ parts, runs }: { parts: readonly MadePart[]; runs: readonly MadeRun[] }, serial: string) {
  const part = parts.find((one) => one.serial === serial);
  const place = runs.findIndex((run) => run.parts?.some((one) => one.serial === serial));
  const run = runs[place];
  const { item = null, tool = null, bagLine = null, channel = null } = part ?? {};
  const roll = item === null ? null : item.slice(0, 3);
  const inVessel = (name: string | null) => (run?.vessel == null || name === null ? null : `${run.vessel} ${name}`);
  const has: Record<KinKind, string | null> = {
    load: run === undefined ? null : String(place),
    kit: item !== null && item.length > 3 ? item : null,
    roll,
    batch: roll === null ? null : (BATCH_OF[roll] ?? null),
    tool,
    'bag-line': inVessel(bagLine),
    thermocouple: inVessel(channel),
    vessel: run?.vessel ?? null,
    cycle: null,
    operator: run?.by ?? null,
  };
  return has;
}

describe('a hold list of any shop', () => {
  it('holds exactly the parts that share something, for exactly those reasons', () => {
    fc.assert(
      fc.property(shops, fc.subarray([...KIN_KINDS], { minLength: 1 }), (shop, kinds) => {
        const db = freshDatabase(':memory:');
        writeItems(db, ROLLS);
        writeRuns(db, shop.runs);
        for (const part of shop.loose) writePart(db, part);
        const { document } = findEndangered(db, { failed: [shop.failed], kinds, why: 'broke' });
        const own = traitsOf(shop, shop.failed);
        const expected = Object.fromEntries(
          shop.parts.flatMap(({ serial }) => {
            const has = traitsOf(shop, serial);
            const because = KIN_KINDS.filter(
              (kind) => kinds.includes(kind) && own[kind] !== null && own[kind] === has[kind],
            );
            return because.length > 0 || serial === shop.failed ? [[serial, because]] : [];
          }),
        );
        const found = Object.fromEntries(
          document.parts.map(({ serial, because }) => [
            serial,
            because.map(({ shared }) => document.shared[shared]?.kind),
          ]),
        );
        expect(found).toEqual(expected);
        db.close();
      }),
      { numRuns: 60 },
    );
  });
});

describe('a hold list whose n-th insert fails', () => {
  it('is not there at all, and nothing else of it either', () => {
    const db = freshDatabase();
    const part = (serial: string): MadePart => ({ serial, item: null, tool: 'T-1', bagLine: null, channel: null });
    writeRuns(db, [{ vessel: 'A', day: 0, parts: [part('P-1'), part('P-2')] }]);
    const parts = { db, clock: () => Date.parse('2026-03-10T08:00:00Z'), actor: { name: 'inspector 2', roles: ROLES } };
    const make = () => makeHoldList(parts, { failed: ['P-1'], kinds: ['load', 'tool'], why: 'broke' });
    let failures = 0;
    for (let n = 1; ; n += 1) {
      const before = contentOf(db);
      const fault = failNthInsert(db, n);
      try {
        make();
        break;
      } catch (error) {
        expect(String(error)).toMatch(/injected fault/);
        failures = n;
      } finally {
        fault.end();
      }
      expect(db.inTransaction).toBe(false);
      expect(contentOf(db), `insert ${n}`).toEqual(before);
    }
    // The document, the list, its two parts, the audit line.
    expect(failures).toBe(5);
    expect(db.pragma('foreign_key_check')).toEqual([]);
  });
});

function contentOf(db: Db): Record<string, string> {
  const tables = db.prepare<[], string>("SELECT name FROM sqlite_schema WHERE type = 'table'").pluck().all();
  return Object.fromEntries(
    tables.map((table) => [table, sha256Of(JSON.stringify(db.prepare(`SELECT * FROM ${table}`).all()))]),
  );
}
