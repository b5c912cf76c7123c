import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { LiveScan } from '../../models/log/live-source.ts';
import { growingSources, readGrowing, readKeptScans } from '../../server/store/live-readings.ts';
import { keptSpanOf, pruneScans } from '../../server/store/live-rolling.ts';
import { findOpenRunOf } from '../../server/store/live-runs.ts';
import { keepScans } from '../../server/store/live-scans.ts';
import {
  insertLiveSource,
  insertSettings,
  type LiveSettings,
  requireLiveSource,
} from '../../server/store/live-sources.ts';
import { findBrokenLiveChain } from '../../server/store/live-verify.ts';
import { chainOfReadings } from '../../server/store/reading-chain.ts';
import { freshDatabase } from './fresh-database.ts';
import { addLiveVessel, BEGUN_MS, DEED, openRun, pushSource, scanAt } from './live-workshop.ts';

const figure = fc.oneof(fc.double(), fc.constant(Number.NaN), fc.constant(-0), fc.integer({ min: 0, max: 200 }));
/** Scans with instants before, in and after each other, some twice, some twice with other figures. */
const scan = fc
  .tuple(fc.integer({ min: -20, max: 60 }), fc.tuple(figure, figure, figure))
  .map(([s, figures]) => scanAt(BEGUN_MS + 1000 * s, ...figures));
const commits = fc.array(fc.array(scan, { minLength: 1, maxLength: 8 }), { maxLength: 30 });

/** What a reader of the rule would keep: the first figures of each instant. */
function keptByRule(all: readonly LiveScan[]): LiveScan[] {
  const first = new Map<number, LiveScan>();
  for (const one of all) if (!first.has(one.timeMs)) first.set(one.timeMs, one);
  return [...first.values()].sort((a, b) => a.timeMs - b.timeMs);
}

describe('keepScans', () => {
  it('keeps the first figures of each instant, in order of time, with the chain of all of them', () => {
    fc.assert(
      fc.property(commits, (all) => {
        const db = freshDatabase(':memory:');
        const { vesselId, settings } = addLiveVessel(db, 'Autoclave 1', pushSource('plc'));
        openRun(db, vesselId);
        let told = 0;
        for (const scans of all) {
          const [kept] = keepScans(db, [{ vesselId, settings, scans, arrivedMs: BEGUN_MS }]);
          if (kept === undefined) throw new Error('nothing was told');
          expect(kept.fresh.length + kept.known + kept.refused.length).toBe(scans.length);
          told += kept.fresh.length;
          expect(findBrokenLiveChain(db)).toBeNull();
        }
        // Within a commit scans are taken in order of time, the first sent first.
        const expected = keptByRule(all.flatMap((scans) => [...scans].sort((a, b) => a.timeMs - b.timeMs)));
        expect(told).toBe(expected.length);
        const stored = readKeptScans(db, { sourceId: settings.sourceId, fromMs: 0, untilMs: Number.MAX_VALUE });
        expect(stored.map(({ timeMs, figures }) => [timeMs, ...figures].map(String))).toEqual(
          expected.map(({ timeMs, figures }) => [timeMs, ...figures].map(String)),
        );
        const run = findOpenRunOf(db, vesselId);
        if (run === undefined) throw new Error('no run is open');
        const [growing] = growingSources(db, run);
        if (growing === undefined) throw new Error('the source is not the run’s');
        const readings = readGrowing(db, growing);
        expect([...readings.timeMs]).toEqual(expected.map(({ timeMs }) => timeMs).filter((at) => at >= BEGUN_MS));
        expect(growing.chainSha256).toBe(chainOfReadings(readings));
        db.close();
      }),
      { numRuns: 150 },
    );
  });
});

describe('the hash of an open run', () => {
  it('is that of all scans in order of time, however late in a long run one comes', () => {
    const db = freshDatabase(':memory:');
    const { vesselId, settings } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 1));
    openRun(db, vesselId);
    const keep = (...scans: LiveScan[]) => keepScans(db, [{ vesselId, settings, scans, arrivedMs: BEGUN_MS }]);
    for (let n = 0; n < 2000; n += 1) keep(scanAt(BEGUN_MS + 2000 * n, n / 10));
    // Before the first mark, on both sides of one, and before the last scan.
    for (const late of [1, 1023, 1025, 2047, 3997]) keep(scanAt(BEGUN_MS + 1000 * late, late));
    keep(scanAt(BEGUN_MS + 4_000_000, 1), scanAt(BEGUN_MS + 1_535_000, 2));
    const run = findOpenRunOf(db, vesselId);
    const [growing] = run === undefined ? [] : growingSources(db, run);
    if (growing === undefined) throw new Error('no run is open');
    expect(growing.head.scans).toBe(2007);
    expect(growing.chainSha256).toBe(chainOfReadings(readGrowing(db, growing)));
    expect(findBrokenLiveChain(db)).toBeNull();
  });

  it('no longer holds where a stored scan was changed behind its back', () => {
    const db = freshDatabase(':memory:');
    const { vesselId, settings } = addLiveVessel(db, 'Autoclave 1', pushSource('plc'));
    openRun(db, vesselId);
    for (let s = 0; s < 20; s += 1) {
      keepScans(db, [{ vesselId, settings, scans: [scanAt(BEGUN_MS + 1000 * s, 20, 21, s)], arrivedMs: BEGUN_MS }]);
    }
    expect(findBrokenLiveChain(db)).toBeNull();
    db.exec('DROP TRIGGER live_scans_are_never_updated');
    const at = BEGUN_MS + 7000;
    const { packed } =
      db.prepare<[number], { packed: Buffer }>('SELECT packed FROM live_scans WHERE time_ms = ?').get(at) ?? {};
    packed?.writeDoubleLE(22, 0);
    db.prepare('UPDATE live_scans SET packed = ? WHERE time_ms = ?').run(packed, at);
    expect(findBrokenLiveChain(db)).toBe('run 1, source "plc"');
  });

  it('begins anew where the source is read by another document, and each stretch keeps its own', () => {
    const db = freshDatabase(':memory:');
    const { vesselId, settings } = addLiveVessel(db, 'Autoclave 1', pushSource('plc'));
    openRun(db, vesselId);
    keepScans(db, [{ vesselId, settings, scans: [scanAt(BEGUN_MS, 20, 21, 22)], arrivedMs: BEGUN_MS }]);
    const id = insertSettings(db, settings.sourceId, { document: pushSource('plc', 2), isResting: false, ...DEED });
    const after = requireLiveSource(db, settings.sourceId).settings;
    expect(after.id).toBe(id);
    const scans = [scanAt(BEGUN_MS + 1000, 23, 24)];
    keepScans(db, [{ vesselId, settings: after, scans, arrivedMs: BEGUN_MS }]);
    const run = findOpenRunOf(db, vesselId);
    if (run === undefined) throw new Error('no run is open');
    const sources = growingSources(db, run);
    expect(sources.map(({ head }) => head.scans)).toEqual([1, 1]);
    for (const source of sources) expect(source.chainSha256).toBe(chainOfReadings(readGrowing(db, source)));
  });
});

describe('a setting', () => {
  it('may not give a channel of an open run another unit', () => {
    const db = freshDatabase(':memory:');
    const document = pushSource('plc');
    const { vesselId, settings } = addLiveVessel(db, 'Autoclave 1', document);
    const other = { ...document, channels: document.channels.map((one) => ({ ...one, unit: '°F' })) };
    const set = () => insertSettings(db, settings.sourceId, { document: other, isResting: false, ...DEED });
    openRun(db, vesselId);
    expect(set).toThrow(expect.objectContaining({ code: 'state-conflict', facts: { channel: 'TC1' } }));
  });
});

describe('two sources of one vessel', () => {
  it('have no channel of one name, unless one of them rests: then the other may take over', () => {
    const db = freshDatabase(':memory:');
    const { vesselId, settings } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 2));
    const add = (name: string) =>
      insertLiveSource(db, vesselId, { document: pushSource(name, 1), isResting: false, ...DEED });
    expect(() => db.transaction(() => add('spare'))()).toThrow(
      expect.objectContaining({ code: 'state-conflict', facts: { channel: 'TC1', source: 'plc' } }),
    );
    openRun(db, vesselId);
    const keep = (own: LiveSettings, ...scans: LiveScan[]) =>
      keepScans(db, [{ vesselId, settings: own, scans, arrivedMs: BEGUN_MS }]);
    keep(settings, scanAt(BEGUN_MS, 20, 21), scanAt(BEGUN_MS + 1000, 22, 23));
    insertSettings(db, settings.sourceId, { document: settings.document, isResting: true, ...DEED });
    const spare = requireLiveSource(db, add('spare')).settings;
    keep(spare, scanAt(BEGUN_MS + 5000, 24));
    const run = findOpenRunOf(db, vesselId);
    expect(run === undefined ? [] : growingSources(db, run).map(({ head }) => head.scans)).toEqual([2, 1]);
    const back = () =>
      insertSettings(db, settings.sourceId, { document: settings.document, isResting: false, ...DEED });
    expect(back).toThrow(expect.objectContaining({ code: 'state-conflict' }));
  });
});

describe('pruneScans', () => {
  it('takes the oldest, in portions, and nothing of an open run however old', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 60 }),
        fc.integer({ min: 0, max: 80 }),
        fc.boolean(),
        (atMost, beforeS, open) => {
          const db = freshDatabase(':memory:');
          const { vesselId, settings } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 1));
          const scans = Array.from({ length: 60 }, (_, s) => scanAt(BEGUN_MS + 1000 * (s - 20), s));
          keepScans(db, [{ vesselId, settings, scans, arrivedMs: BEGUN_MS }]);
          if (open) openRun(db, vesselId);
          const beforeMs = BEGUN_MS + 1000 * (beforeS - 20);
          let gone = 0;
          for (;;) {
            const portion = pruneScans(db, { sourceId: settings.sourceId, vesselId, beforeMs, atMost });
            expect(portion.scans).toBeLessThanOrEqual(atMost);
            if (portion.scans === 0) break;
            gone += portion.scans;
          }
          const expected = Math.min(beforeS, open ? 20 : 60);
          expect(gone).toBe(expected);
          expect(keptSpanOf(db, settings.sourceId)?.fromMs ?? null).toBe(
            expected === 60 ? null : BEGUN_MS + 1000 * (expected - 20),
          );
          db.close();
        },
      ),
      { numRuns: 60 },
    );
  });

  it('is refused by the database itself for a scan of an open run', () => {
    const db = freshDatabase(':memory:');
    const { vesselId, settings } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 1));
    openRun(db, vesselId);
    keepScans(db, [{ vesselId, settings, scans: [scanAt(BEGUN_MS, 20)], arrivedMs: BEGUN_MS }]);
    expect(() => db.exec('DELETE FROM live_scans')).toThrow(/scans of an open run stay/);
  });
});
