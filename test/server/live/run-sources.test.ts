import { afterEach, describe, expect, it } from 'vitest';
import type { LiveSource } from '../../../models/log/live-source.ts';
import { parseLiveSource } from '../../../models/log/parse-live-source.ts';
import { startLiveLogging } from '../../../server/live/live-logging.ts';
import { type RunningSources, runSources } from '../../../server/live/run-sources.ts';
import type { InventVessel } from '../../../server/live/sources/invented-vessel.ts';
import { inventVesselBy } from '../../../server/practice/invented-vessel.ts';
import { STRUTS_B } from '../../../server/practice/plan-practices.ts';
import { SKERRY_180 } from '../../../server/practice/plan-resins.ts';
import { insertCycle, insertCycleStatus } from '../../../server/store/cycles.ts';
import type { Db } from '../../../server/store/database.ts';
import { readKeptScans } from '../../../server/store/live-readings.ts';
import { insertLiveSource } from '../../../server/store/live-sources.ts';
import { insertResin } from '../../../server/store/resins.ts';
import { insertVessel, requireVessel } from '../../../server/store/vessels.ts';
import { freshDatabase } from '../fresh-database.ts';
import { DEED, openRun } from '../live-workshop.ts';
import { floodingBroker } from './brokers.ts';
import { sleep, until } from './listening.ts';
import { modbusDevice, strangePeer } from './modbus-peers.ts';

const running: (() => Promise<void>)[] = [];

afterEach(async () => {
  for (const stop of running.splice(0)) await stop();
});

/** Listens to what a database says, as the program does. */
function listening(db: Db, inventVessel: InventVessel | null = null) {
  const faults: object[] = [];
  const log = { info: () => undefined, error: (facts: object) => faults.push(facts) };
  const live = startLiveLogging({ db, clock: Date.now, log });
  const sources = runSources({ db, live, inventVessel, log });
  sources.begin();
  let ending: Promise<void> | null = null;
  const close = () => {
    ending ??= sources.close().then(() => live.close());
    return ending;
  };
  running.push(close);
  return { db, live, sources, faults, close };
}

function add(db: Db, vessel: string, document: object): number {
  if (db.prepare('SELECT 1 FROM vessels WHERE name = ?').get(vessel) === undefined) {
    insertVessel(db, { name: vessel, kind: 'autoclave' });
  }
  const source: LiveSource = parseLiveSource(document);
  return insertLiveSource(db, requireVessel(db, vessel), { document: source, isResting: false, ...DEED });
}

const kept = (db: Db, sourceId: number) => readKeptScans(db, { sourceId, fromMs: 0, untilMs: Number.MAX_SAFE_INTEGER });
const stateOf = (sources: RunningSources, id: number) => sources.lines().find((line) => line.id === id)?.state;

const channels = [{ column: '1', name: 'TC1', role: 'part', unit: '°C', scale: 0.1 }];
const gateway = (name: string, port: number, intervalS = 0.2) => ({
  format: 'dwellbook-source/1',
  name,
  intervalS,
  reads: {
    kind: 'modbus-tcp',
    host: '127.0.0.1',
    port,
    registers: { TC1: { unitId: 1, table: 'input', address: 1, type: 'int16' } },
  },
  channels,
});
const practice = {
  format: 'dwellbook-source/1',
  name: 'Autoclave 1 practice',
  intervalS: 10,
  reads: { kind: 'practice', speed: 300, cycle: { code: 'SR-180', issue: 'B' } },
  channels,
};

function practiceWorkshop(): Db {
  const db = freshDatabase();
  insertResin(db, SKERRY_180, DEED.at, DEED.by);
  const id = insertCycle(db, STRUTS_B.cycle, DEED.at, DEED.by);
  insertCycleStatus(db, id, 'released', 'practice', DEED.at, DEED.by);
  return db;
}

describe('runSources', () => {
  it('keeps the rate of one vessel while others hang, flood and send rubbish', async () => {
    const db = freshDatabase();
    const device = await modbusDevice();
    device.input.set(1, 1753);
    const broker = await floodingBroker('oven/2');
    const hangs = await strangePeer(() => undefined);
    const rubbish = await strangePeer((socket) => socket.on('data', () => socket.write(Buffer.alloc(5000, 7))));
    const flooded = {
      ...gateway('flood', 1, 1),
      reads: { kind: 'mqtt', broker, topics: { TC1: { topic: 'oven/2' } } },
    };
    const good = add(db, 'Autoclave 1', gateway('good', device.port));
    const bad = [
      add(db, 'Autoclave 2', gateway('hangs', hangs)),
      add(db, 'Oven 1', gateway('rubbish', rubbish)),
      add(db, 'Press 1', practice),
    ];
    const flood = add(db, 'Oven 2', flooded);
    const { sources, faults } = listening(db);
    await until(() => kept(db, flood).length > 0 && kept(db, good).length > 0);
    await sleep(5000);
    // Meant every 0.2 s. A machine under load may be slower; one that waited for the others would stand still.
    const times = kept(db, good).map(({ timeMs }) => timeMs);
    expect(times.length).toBeGreaterThan(5);
    expect(Math.max(...times.slice(1).map((timeMs, i) => timeMs - times[i]!))).toBeLessThan(3000);
    // Twenty scans a second, and ten seconds' worth of them at once.
    expect(kept(db, flood).length).toBeLessThanOrEqual(20 * 10 + 20 * 6);
    expect(sources.lines().find(({ id }) => id === flood)?.because).toMatch(
      /^more than 20 messages a second|^it floods/,
    );
    // What was invented is nothing a real workshop has.
    expect(bad.map((id) => [stateOf(sources, id), kept(db, id).length])).toEqual(
      bad.map(() => ['cannot-be-reached', 0]),
    );
    expect(faults).toEqual([]);
  });

  it('says that scans cannot be kept, holds them, and writes them when space returns', async () => {
    const db = freshDatabase();
    const device = await modbusDevice();
    const wide = Array.from({ length: 40 }, (_, n) => `TC${n}`);
    for (const n of wide.keys()) device.input.set(n, 1753);
    const registers = wide.map((name, address) => [name, { unitId: 1, table: 'input', address, type: 'int16' }]);
    const id = add(db, 'Autoclave 1', {
      ...gateway('good', device.port, 0.1),
      reads: { kind: 'modbus-tcp', host: '127.0.0.1', port: device.port, registers: Object.fromEntries(registers) },
      channels: wide.map((name) => ({ ...channels[0], column: name, name })),
    });
    const { sources } = listening(db);
    await until(() => kept(db, id).length > 2);
    db.pragma(`max_page_count = ${db.pragma('page_count', { simple: true })}`);
    await until(() => stateOf(sources, id) === 'cannot-be-kept', 30_000);
    const full = kept(db, id).length;
    await sleep(1000);
    db.pragma('max_page_count = 1000000');
    await until(() => kept(db, id).length >= full + 4);
    expect(stateOf(sources, id)).toBe('sending');
    const times = kept(db, id).map(({ timeMs }) => timeMs);
    const gaps = times.slice(1).map((timeMs, i) => timeMs - times[i]!);
    expect(Math.max(...gaps)).toBeLessThan(1000);
  });

  it('lets an invented vessel go by its own time, and goes on after a restart', async () => {
    const db = practiceWorkshop();
    const id = add(db, 'Autoclave 1', practice);
    const vesselId = requireVessel(db, 'Autoclave 1');
    const began = Date.now();
    const first = listening(db, inventVesselBy(db));
    await until(() => kept(db, id).length > 40);
    const run = openRun(db, vesselId, kept(db, id).at(-1)!.timeMs);
    expect(run).toBe(1);
    expect(Math.abs(first.live.steadyClock.now(vesselId) - kept(db, id).at(-1)!.timeMs)).toBeLessThan(60_000);
    expect(kept(db, id).at(-1)!.timeMs - began).toBeGreaterThan(400_000 - 20_000);
    await first.close();
    const before = kept(db, id).length;
    const notices: object[] = [];
    const second = listening(db, inventVesselBy(db));
    second.live.onNotice((notice) => notices.push(notice));
    await until(() => kept(db, id).length > before + 10);
    const times = kept(db, id).map(({ timeMs }) => timeMs);
    // The vessel went on while nobody listened: a gap may show there, and nowhere else, and its scans stay in step.
    const gaps = times.slice(1).map((timeMs, i) => timeMs - times[i]!);
    expect(gaps.filter((gapMs, i) => gapMs !== 10_000 && i !== before - 1)).toEqual([]);
    expect(gaps[before - 1]! % 10_000).toBe(0);
    expect(kept(db, id).every(({ figures }) => figures[0]! > 150 && figures[0]! < 2000)).toBe(true);
    expect(stateOf(second.sources, id)).toBe('sending');
    expect([...notices, ...first.faults, ...second.faults]).toEqual([]);
  });
});
