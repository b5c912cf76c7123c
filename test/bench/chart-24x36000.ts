import { readFileSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { throughPart } from '../../models/cure/heat/through-part.ts';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import type { Layout } from '../../models/log/layout.ts';
import type { Readings } from '../../models/log/readings.ts';
import { compareParts } from '../../server/actions/compare-parts.ts';
import { cureCourses } from '../../server/actions/cure-courses.ts';
import { importCycle } from '../../server/actions/import-cycle.ts';
import { importResin } from '../../server/actions/import-resin.ts';
import type { JudgingParts } from '../../server/actions/judge-run.ts';
import { overlayParts } from '../../server/actions/overlay-parts.ts';
import { setLoad } from '../../server/actions/set-load.ts';
import { verifyChains } from '../../server/actions/verify-chains.ts';
import { createApp } from '../../server/app.ts';
import { runChartPath } from '../../server/contract/paths.ts';
import { ROLES } from '../../server/contract/roles.ts';
import { followLive } from '../../server/live/follow-live.ts';
import { startLiveLogging } from '../../server/live/live-logging.ts';
import { runSources } from '../../server/live/run-sources.ts';
import { type Db, openDatabase } from '../../server/store/database.ts';
import { insertRun } from '../../server/store/runs.ts';
import { insertSource } from '../../server/store/sources.ts';
import type { BenchResult } from './result.ts';
import { inTemporaryFolder } from './temporary-workshop.ts';
import { fullCycle, tenHourRun } from './ten-hour-run.ts';

const AT = '2026-03-03T20:00:00.000Z';
const RESIN = new URL('../../models/cure/resins/skerry-180.json', import.meta.url);
const GOAL_MS = 50;

/** Stretches as a person zooms: the run whole, then ever shorter, then moved along. */
const VIEWS = [
  [8, 18],
  [9, 14],
  [10, 12],
  [10.5, 11],
  [10.9, 11.1],
  [11.1, 11.3],
  [13, 16],
  [8, 13],
] as const;

/**
 * Time from asking for a chart to its last byte, on this machine's own socket, judged and with cure estimates.
 *
 * Floor: a request that reads one row. The value is the dearest of the views once the run is being looked at; what the
 * first look costs is in the note.
 */
export async function benchChart(): Promise<BenchResult[]> {
  return inTemporaryFolder(async (folder) => {
    const db = openDatabase(join(folder, 'workshop.sqlite'), { at: AT });
    const parts: JudgingParts = {
      db,
      clock: () => Date.parse(AT),
      actor: { name: 'bench', roles: ROLES },
      evaluate: async (log, inputs) => evaluateLog(log, inputs),
    };
    const run = await writeJudgedRun(parts, tenHourRun());
    const server = await serve(parts, folder);
    const origin = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
    await fetched(`${origin}/api/vessels`);
    const floor = await medianOf(21, () => fetched(`${origin}/api/vessels`));
    const pathOf = ([from, until]: readonly [number, number]) =>
      `${origin}${runChartPath(run, { from: hour(from), until: hour(until), points: 1500 })}`;
    const first = await fetched(pathOf(VIEWS[0]));
    const times: number[] = [];
    for (const view of VIEWS) times.push(await medianOf(5, () => fetched(pathOf(view))));
    server.close();
    server.closeAllConnections();
    db.close();
    const value = Math.max(...times);
    return [
      {
        name: 'chart-24x36000',
        value,
        unit: 'ms',
        floor,
        ratio: value / floor,
        goal: `≤ ${GOAL_MS} ms`,
        holds: value <= GOAL_MS,
        note: `the first look, reading the run from the disk and estimating its cure, took ${first.toFixed(0)} ms; the shortest stretch ${times[4]?.toFixed(0)} ms`,
      },
    ];
  });
}

async function writeJudgedRun(parts: JudgingParts, readings: Readings): Promise<number> {
  const { db } = parts;
  const run = writeReadings(db, readings);
  importResin(parts, JSON.parse(readFileSync(RESIN, 'utf8')));
  const cycle = { ...fullCycle(), cure: { resin: 'skerry-180', degreeAtLeast: 0.9 } };
  importCycle(parts, cycle);
  const load = { format: 'dwellbook-load/1', parts: [{ part: 'SR-0417' }], sensors: [] } as const;
  await setLoad(parts, run, { load, cycle: { code: cycle.code, issue: cycle.issue } });
  return run;
}

function writeReadings(db: Db, readings: Readings): number {
  const deed = { at: AT, by: 'bench' };
  const layout: Layout = {
    format: 'dwellbook-layout/1',
    name: 'bench',
    header: 1,
    time: { columns: ['time'], pattern: 'yyyy-MM-dd HH:mm:ss', zone: 'UTC' },
    channels: readings.channels.map(({ channel }) => channel),
  };
  const runId = insertRun(db, {
    vesselId: null,
    fromMs: readings.timeMs[0] ?? 0,
    untilMs: readings.timeMs.at(-1) ?? 0,
    ...deed,
  });
  const log = { readings, repairs: [], passedOver: [] };
  insertSource(db, { runId, recorderId: null, replacesId: null, layout, log, files: [], ...deed });
  return runId;
}

function serve(parts: JudgingParts, folder: string): Promise<Server> {
  const log = { info: () => undefined, error: (facts: object) => console.error(facts) };
  const live = startLiveLogging({ db: parts.db, clock: parts.clock, log });
  const sources = runSources({ db: parts.db, live, inventVessel: null, log });
  const { engine, telling } = followLive({ db: parts.db, folder, live, sources, clock: parts.clock, log });
  const app = createApp({
    ...parts,
    log,
    live,
    sources,
    engine,
    telling,
    siteFolder: null,
    incomingFolder: folder,
    watchedFolder: null,
    mostUploadBytes: 0,
    estimateCure: async (...given) => cureCourses(...given),
    evaluateAside: async (log, inputs) => evaluateLog(log, inputs),
    cureThroughPart: async (asked) => throughPart(asked),
    trace: { compare: async (asked) => compareParts(asked), overlay: async (asked) => overlayParts(asked) },
    verify: async () => verifyChains(parts.db),
  });
  const server = createServer(app);
  return new Promise((resolve) => {
    server.listen(0, '127.0.0.1', () => resolve(server));
  });
}

async function fetched(address: string): Promise<number> {
  const startMs = performance.now();
  // As a browser on the same machine would ask, so that nothing is spent on packing.
  const response = await fetch(address, { headers: { 'accept-encoding': 'identity' } });
  await response.arrayBuffer();
  if (!response.ok) throw new Error(`${address} answered ${response.status}`);
  return performance.now() - startMs;
}

async function medianOf(times: number, ask: () => Promise<number>): Promise<number> {
  const taken: number[] = [];
  for (let n = 0; n < times; n += 1) taken.push(await ask());
  return taken.sort((a, b) => a - b)[times >> 1] ?? Number.NaN;
}

function hour(hours: number): string {
  return new Date(Date.UTC(2026, 2, 3) + hours * 3_600_000).toISOString();
}
