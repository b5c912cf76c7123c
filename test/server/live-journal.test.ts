import { afterEach, describe, expect, it } from 'vitest';
import { type LiveLogging, type LiveNotice, startLiveLogging } from '../../server/live/live-logging.ts';
import type { Db } from '../../server/store/database.ts';
import { readKeptScans } from '../../server/store/live-readings.ts';
import { findBrokenLiveChain } from '../../server/store/live-verify.ts';
import { freshDatabase } from './fresh-database.ts';
import { addLiveVessel, BEGUN_MS, openRun, pushSource, scanAt } from './live-workshop.ts';

const running: LiveLogging[] = [];

afterEach(async () => {
  for (const live of running.splice(0)) await live.close();
});

/** Live logging by a clock the test sets. */
function logging(db: Db, time = { wall: BEGUN_MS, monotonic: 0 }) {
  const faults: object[] = [];
  const notices: LiveNotice[] = [];
  const live = startLiveLogging({
    db,
    clock: () => time.wall,
    monotonic: () => time.monotonic,
    log: { info: () => undefined, error: (facts) => faults.push(facts) },
  });
  running.push(live);
  live.onNotice((notice) => notices.push(notice));
  const pass = (ms: number) => {
    time.wall += ms;
    time.monotonic += ms;
  };
  return { live, notices, faults, time, pass };
}

function keptOf(db: Db, sourceId: number) {
  return readKeptScans(db, { sourceId, fromMs: 0, untilMs: Number.MAX_VALUE });
}

describe('the journal', () => {
  it('answers only after what it says is on the disk, and tells others then', async () => {
    const db = freshDatabase();
    const { settings, vesselId } = addLiveVessel(db, 'Autoclave 1', pushSource('plc'));
    openRun(db, vesselId);
    const { live } = logging(db);
    const told: number[] = [];
    live.journal.onKept(({ scans }) => told.push(...scans.map(({ timeMs }) => timeMs)));
    const taking = live.journal.take(settings.sourceId, [scanAt(BEGUN_MS, 20, 21, 22)]);
    expect(keptOf(db, settings.sourceId)).toEqual([]);
    expect(await taking).toEqual({ kept: 1, known: 0, refused: [] });
    expect(keptOf(db, settings.sourceId)).toHaveLength(1);
    expect(told).toEqual([BEGUN_MS]);
  });

  it('knows what was sent before, and refuses other figures for an instant by name', async () => {
    const db = freshDatabase();
    const { settings } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 1));
    const { live } = logging(db);
    await live.journal.take(settings.sourceId, [scanAt(BEGUN_MS, 20)]);
    const again = [scanAt(BEGUN_MS, 20), scanAt(BEGUN_MS, 21), scanAt(Number.NaN, 20), scanAt(20, 20)];
    expect(await live.journal.take(settings.sourceId, again)).toEqual({
      kept: 0,
      known: 1,
      refused: [
        { at: '1970-01-01T00:00:00.000Z', because: 'the instant lies outside 2000 to 2100' },
        { at: '1970-01-01T00:00:00.020Z', because: 'the instant lies outside 2000 to 2100' },
        { at: '2026-03-10T08:00:00.000Z', because: 'other figures are kept for this instant already; the first stay' },
      ],
    });
    expect(keptOf(db, settings.sourceId).map(({ figures }) => [...figures])).toEqual([[20]]);
  });

  it('keeps as absent what no thermocouple can read', async () => {
    const db = freshDatabase();
    const { settings } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 3));
    const { live } = logging(db);
    await live.journal.take(settings.sourceId, [scanAt(BEGUN_MS, 1372, 1372.1, -200.1)]);
    expect(keptOf(db, settings.sourceId).map(({ figures }) => [...figures])).toEqual([[1372, Number.NaN, Number.NaN]]);
  });

  it('lets a flood from one source wait, not the others', async () => {
    const db = freshDatabase();
    const one = addLiveVessel(db, 'Autoclave 1', pushSource('flood', 24)).settings.sourceId;
    const two = addLiveVessel(db, 'Oven 2', pushSource('calm', 24)).settings.sourceId;
    const { live } = logging(db);
    const figures = Array.from({ length: 24 }, (_, n) => 20 + n);
    const flood = Array.from({ length: 20_000 }, (_, s) => scanAt(BEGUN_MS + 1000 * s, ...figures));
    let floodIsOver = false;
    const flooded = live.journal.take(one, flood).then((pushed) => {
      floodIsOver = true;
      return pushed;
    });
    let scansDuringFlood = 0;
    while (!floodIsOver) {
      await live.journal.take(two, [scanAt(BEGUN_MS + 1000 * scansDuringFlood, ...figures)]);
      scansDuringFlood += 1;
    }
    expect(await flooded).toMatchObject({ kept: 20_000 });
    // One answer for every 128 scans of the flood: none of the calm one's scans waited for the rest of it.
    expect(scansDuringFlood).toBeGreaterThanOrEqual(20_000 / 128);
  });

  it('does not let a source whose scans cannot be written take another one down', async () => {
    const db = freshDatabase();
    const one = addLiveVessel(db, 'Autoclave 1', pushSource('wrong', 2)).settings.sourceId;
    const two = addLiveVessel(db, 'Oven 2', pushSource('right', 1)).settings.sourceId;
    const { live } = logging(db);
    const wrong = live.journal.take(one, [scanAt(BEGUN_MS, 20)]);
    const right = live.journal.take(two, [scanAt(BEGUN_MS, 20)]);
    await expect(wrong).rejects.toThrow('a scan of "wrong" has 1 figures, not 2');
    expect(await right).toMatchObject({ kept: 1 });
  });
});

describe('a full disk', () => {
  it('is told at once; what can be sent again is refused, what cannot is held, and both are kept when there is room', async () => {
    const db = freshDatabase();
    const { settings, vesselId } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 24));
    const other = addLiveVessel(db, 'Oven 2', pushSource('polled', 24));
    openRun(db, vesselId);
    const { live, notices } = logging(db);
    const figures = Array.from({ length: 24 }, (_, n) => 20 + n);
    const acknowledged: number[] = [];
    // SQLite's own limit: an allocation beyond it fails as it does on a full disk.
    db.pragma(`max_page_count = ${Number(db.pragma('page_count', { simple: true })) + 20}`);
    let refusal: unknown = null;
    for (let s = 0; refusal === null && s < 2000; s += 1) {
      try {
        await live.journal.take(settings.sourceId, [scanAt(BEGUN_MS + 1000 * s, ...figures)]);
        acknowledged.push(BEGUN_MS + 1000 * s);
      } catch (error) {
        refusal = error;
      }
    }
    expect(refusal).toMatchObject({
      code: 'disk-full',
      message: 'Nothing was kept: the disk is full; send it again later',
    });
    expect(acknowledged.length).toBeGreaterThan(50);
    expect(notices).toEqual([{ kind: 'cannot-be-kept', because: 'the disk is full' }]);
    const held = live.journal.take(
      other.settings.sourceId,
      Array.from({ length: 500 }, (_, s) => scanAt(BEGUN_MS + 1000 * s, ...figures)),
      { hold: true },
    );
    await live.journal.settle();
    expect(live.journal.state()).toMatchObject({ keeps: false, because: 'the disk is full', held: 500 });
    expect(db.inTransaction).toBe(false);
    expect(db.pragma('integrity_check', { simple: true })).toBe('ok');
    expect(keptOf(db, settings.sourceId).map(({ timeMs }) => timeMs)).toEqual(acknowledged);
    expect(findBrokenLiveChain(db)).toBeNull();
    db.pragma('max_page_count = 1073741823');
    // By itself, within a second, without anything new coming.
    expect(await held).toEqual({ kept: 500, known: 0, refused: [] });
    expect(live.journal.state()).toEqual({ keeps: true });
    expect(notices.at(-1)).toEqual({ kind: 'kept-again', lost: 0 });
    const next = BEGUN_MS + 1000 * acknowledged.length;
    expect(await live.journal.take(settings.sourceId, [scanAt(next, ...figures)])).toMatchObject({ kept: 1 });
    expect(keptOf(db, settings.sourceId).map(({ timeMs }) => timeMs)).toEqual([...acknowledged, next]);
    expect(findBrokenLiveChain(db)).toBeNull();
  });
});

describe('the steady clock', () => {
  it('goes on while a run is open when the wall clock is set back or forward, and says by how much', () => {
    const db = freshDatabase();
    const { vesselId } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 1));
    const { live, notices, time, pass } = logging(db);
    const now = () => live.steadyClock.now(vesselId);
    expect(now()).toBe(BEGUN_MS);
    openRun(db, vesselId);
    pass(1000);
    expect(now()).toBe(BEGUN_MS + 1000);
    time.wall -= 3_600_000;
    pass(1000);
    expect(now()).toBe(BEGUN_MS + 2000);
    time.wall += 7_200_000;
    pass(1000);
    expect(now()).toBe(BEGUN_MS + 3000);
    expect(now()).toBe(BEGUN_MS + 3000);
    expect(notices).toEqual([
      { kind: 'clock-jumped', byMs: -3_600_000 },
      { kind: 'clock-jumped', byMs: 7_200_000 },
    ]);
  });

  it('follows the wall clock where no run is open', () => {
    const db = freshDatabase();
    const { vesselId } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 1));
    const { live, notices, time, pass } = logging(db);
    live.steadyClock.now(vesselId);
    time.wall -= 3_600_000;
    pass(1000);
    expect(live.steadyClock.now(vesselId)).toBe(BEGUN_MS - 3_599_000);
    expect(notices).toEqual([{ kind: 'clock-jumped', byMs: -3_600_000 }]);
  });

  it('takes a drift of a second an hour for what it is', () => {
    const db = freshDatabase();
    const { vesselId } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 1));
    const { live, notices, time, pass } = logging(db);
    for (let hour = 0; hour < 100; hour += 1) {
      pass(3_600_000);
      time.wall += 1000;
      live.steadyClock.now(vesselId);
    }
    expect(notices).toEqual([]);
  });

  it('goes on one interval after the last scan where the program starts with a clock that stands before it', async () => {
    const db = freshDatabase();
    const { settings, vesselId } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 1));
    openRun(db, vesselId);
    const before = logging(db);
    before.pass(60_000);
    await before.live.journal.take(settings.sourceId, [scanAt(BEGUN_MS + 60_000, 20)]);
    const { live, notices, pass } = logging(db, { wall: BEGUN_MS - 86_400_000, monotonic: 5 });
    expect(live.steadyClock.now(vesselId)).toBe(BEGUN_MS + 61_000);
    pass(1000);
    expect(live.steadyClock.now(vesselId)).toBe(BEGUN_MS + 62_000);
    expect(notices).toEqual([{ kind: 'clock-behind', vesselId, byMs: -86_460_000 }]);
  });

  it('tells of a sender whose clock is far ahead, once, and keeps what it sends as it is stamped', async () => {
    const db = freshDatabase();
    const { settings } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 1));
    const { live, notices } = logging(db);
    for (let s = 0; s < 3; s += 1) {
      await live.journal.take(settings.sourceId, [scanAt(BEGUN_MS + 1000 * s + 360_000, 20)]);
    }
    expect(notices).toEqual([{ kind: 'sender-ahead', sourceId: settings.sourceId, byMs: 360_000 }]);
    expect(keptOf(db, settings.sourceId)).toHaveLength(3);
  });
});

describe('the rolling store', () => {
  it('keeps three days, and says how much it keeps', async () => {
    const db = freshDatabase();
    const { settings } = addLiveVessel(db, 'Autoclave 1', pushSource('plc', 1));
    const { live, pass } = logging(db);
    const scans = Array.from({ length: 5000 }, (_, m) => scanAt(BEGUN_MS + 60_000 * m, 20));
    await live.journal.take(settings.sourceId, scans);
    pass(60_000 * 4999);
    await live.rolling.sweep();
    const days = 3 * 86_400_000;
    const kept = scans.filter(({ timeMs }) => timeMs >= BEGUN_MS + 60_000 * 4999 - days);
    expect(live.rolling.keptOf(settings.sourceId)).toEqual({ scans: kept.length, fromMs: kept[0]?.timeMs });
    expect(keptOf(db, settings.sourceId)).toHaveLength(kept.length);
    // Counted anew after a start: the same.
    const again = logging(db);
    again.pass(60_000 * 4999);
    await again.live.rolling.sweep();
    expect(again.live.rolling.keptOf(settings.sourceId).scans).toBe(kept.length);
  });
});
