import { afterEach, describe, expect, it } from 'vitest';
import { evaluateLog } from '../../../models/evaluation/judge.ts';
import type { LiveSource } from '../../../models/log/live-source.ts';
import { beginRun } from '../../../server/actions/begin-run.ts';
import { decideSuspect } from '../../../server/actions/decide-suspect.ts';
import { importCycle } from '../../../server/actions/import-cycle.ts';
import { gatherInputs } from '../../../server/actions/run-inputs.ts';
import type { RunNews } from '../../../server/live/engine/followed.ts';
import { type LiveEngine, startLiveEngine } from '../../../server/live/engine/live-engine.ts';
import { type LiveLogging, startLiveLogging } from '../../../server/live/live-logging.ts';
import type { Db } from '../../../server/store/database.ts';
import { insertLiveSource } from '../../../server/store/live-sources.ts';
import { HOUR } from '../../support/open-run.ts';
import { freshDatabase } from '../fresh-database.ts';
import { addLiveVessel, BEGUN_MS, pushSource, scanAt } from '../live-workshop.ts';

const running: (() => Promise<void>)[] = [];

afterEach(async () => {
  for (const stop of running.splice(0).reverse()) await stop();
});

interface LiveShop {
  readonly db: Db;
  readonly live: LiveLogging;
  readonly engine: LiveEngine;
  readonly sourceIds: readonly number[];
  readonly run: number;
  at: number;
}

const silence = { info: () => undefined, error: (facts: object) => expect(facts).toEqual({}) };

/** One vessel with its sources, and a run of the made cycle begun in it. */
async function shop(documents: readonly LiveSource[], sensors: readonly string[]): Promise<LiveShop> {
  const db = freshDatabase();
  const made: { at: number } = { at: BEGUN_MS };
  const clock = () => made.at;
  const live = startLiveLogging({ db, clock, monotonic: clock, log: silence });
  running.push(() => live.close());
  const parts = {
    db,
    clock,
    actor: { name: 'engineer 1', roles: ['engineer' as const] },
    evaluate: async (...given: Parameters<typeof evaluateLog>) => evaluateLog(...given),
  };
  const [first, ...others] = documents;
  const { vesselId, settings } = addLiveVessel(db, 'Oven 1', first!);
  const sourceIds = [settings.sourceId];
  for (const document of others) {
    sourceIds.push(
      insertLiveSource(db, vesselId, {
        document,
        isResting: false,
        at: '2026-03-10T08:00:00.000Z',
        by: 'engineer 1',
      }),
    );
  }
  importCycle(parts, HOUR);
  const run = beginRun(parts, 'Oven 1', {
    load: {
      format: 'dwellbook-load/1',
      parts: [{ part: 'SR-1' }],
      sensors: sensors.map((channel) => ({ channel, parts: ['SR-1'] })),
    },
    cycle: { code: HOUR.code, issue: HOUR.issue },
  });
  const engine = startLiveEngine({
    db,
    journal: live.journal,
    clock: live.steadyClock,
    sourceLines: () => [],
    look: () => undefined,
    warnings: () => [],
    log: silence,
  });
  running.push(() => engine.close());
  await engine.ready();
  return Object.assign(made, { db, live, engine, sourceIds, run });
}

/** 2 °C/min and 1.7 °C/min up to 110 °C, with a recorder's tenth of a degree. */
function figuresAt(minutes: number): readonly number[] {
  const noise = Math.round(Math.sin(minutes * 12.9898) * 3) / 10;
  return [2, 1.7].map((rate) => Math.round((Math.min(110, 20 + rate * minutes) + noise) * 10) / 10);
}

async function send(made: LiveShop, sourceId: number, seconds: number, figures: readonly number[]): Promise<void> {
  made.at = BEGUN_MS + seconds * 1000;
  await made.live.journal.take(sourceId, [scanAt(made.at, ...figures)]);
}

/** What a stored run of the same scans comes to, judged while it is open. */
function judgedFromStore({ db, run }: LiveShop) {
  const inputs = gatherInputs(db, run)!;
  const { cycle, load, resin, materials, decisions } = inputs;
  const { exclusions, believed } = decisions;
  return evaluateLog(inputs.readLog(), {
    cycle,
    load,
    resin,
    materials,
    exclusions,
    believed,
    barometer: null,
    open: true,
  });
}

describe('the live engine', () => {
  it('judges an open run as the stored scans are judged, at any moment', async () => {
    const made = await shop([pushSource('plc', 2)], ['TC1', 'TC2']);
    for (let minute = 0; minute <= 120; minute += 0.5) {
      await send(made, made.sourceIds[0]!, minute * 60, figuresAt(minute));
      if (minute % 15 !== 0) continue;
      const { evaluation, scans } = made.engine.run(made.run);
      expect(scans).toBe(minute * 2 + 1);
      expect(evaluation).toEqual(judgedFromStore(made));
    }
    const { forecasts } = made.engine.run(made.run);
    expect(forecasts[0]?.stage?.name).toBe('dwell 1');
  });

  it('goes on after a restart from what is kept', async () => {
    const made = await shop([pushSource('plc', 2)], ['TC1', 'TC2']);
    for (let minute = 0; minute <= 60; minute += 1)
      await send(made, made.sourceIds[0]!, minute * 60, figuresAt(minute));
    await made.engine.close();
    const again = startLiveEngine({
      db: made.db,
      journal: made.live.journal,
      clock: made.live.steadyClock,
      sourceLines: () => [],
      look: () => undefined,
      warnings: () => [],
      log: silence,
    });
    running.push(() => again.close());
    await again.ready();
    expect(again.run(made.run).evaluation).toEqual(judgedFromStore(made));
    await send(made, made.sourceIds[0]!, 61 * 60, figuresAt(61));
    expect(again.run(made.run).scans).toBe(62);
    expect(again.run(made.run).evaluation).toEqual(judgedFromStore(made));
  });

  it('folds two sources at their own instants into one run', async () => {
    const second: LiveSource = {
      ...pushSource('second', 1),
      channels: [{ column: 'p', name: 'TC9', role: 'part', unit: '°C' }],
    };
    const made = await shop([pushSource('plc', 2), second], ['TC1', 'TC2', 'TC9']);
    for (let second_ = 0; second_ <= 600; second_ += 1) {
      await send(made, made.sourceIds[0]!, second_, figuresAt(second_ / 60));
      if (second_ % 2 === 0) await send(made, made.sourceIds[1]!, second_ + 0.4, [figuresAt(second_ / 60)[0]!]);
      if (second_ % 100 === 0) made.engine.run(made.run);
    }
    // Once both are silent nothing is waited for.
    made.at += 60_000;
    expect(made.engine.run(made.run).evaluation).toEqual(judgedFromStore(made));
  });

  it('folds a scan that came late in its place', async () => {
    const made = await shop([pushSource('plc', 2)], ['TC1', 'TC2']);
    for (const second of [0, 10, 20, 40, 50]) await send(made, made.sourceIds[0]!, second, figuresAt(second / 60));
    expect(made.engine.run(made.run).scans).toBe(5);
    await made.live.journal.take(made.sourceIds[0]!, [scanAt(BEGUN_MS + 30_000, ...figuresAt(0.5))]);
    made.at += 60_000;
    made.engine.run(made.run);
    await made.engine.ready();
    expect(made.engine.run(made.run).scans).toBe(6);
    expect(made.engine.run(made.run).evaluation).toEqual(judgedFromStore(made));
  });

  it('begins anew when a suspect is decided on', async () => {
    const made = await shop([pushSource('plc', 3)], ['TC1', 'TC2', 'TC3']);
    for (let minute = 0; minute <= 70; minute += 1) {
      await send(made, made.sourceIds[0]!, minute * 60, [...figuresAt(minute), Math.min(60, 20 + 2 * minute)]);
    }
    const before = made.engine.run(made.run);
    const stateOf = ({ evaluation }: typeof before) =>
      evaluation?.sensors.find(({ channel }) => channel === 'TC3')?.state;
    expect(stateOf(before)).toBe('suspect');
    const parts = {
      db: made.db,
      clock: () => made.at,
      actor: { name: 'inspector 2', roles: ['inspector' as const] },
      evaluate: async (...given: Parameters<typeof evaluateLog>) => evaluateLog(...given),
    };
    await decideSuspect(parts, made.run, {
      decision: 'exclude',
      channel: 'TC3',
      from: new Date(BEGUN_MS + 20 * 60_000).toISOString(),
      reason: 'stuck',
    });
    made.at += 60_000;
    made.engine.run(made.run);
    await made.engine.ready();
    const after = made.engine.run(made.run);
    expect(stateOf(after)).toBe('excluded');
    expect(after.evaluation).toEqual(judgedFromStore(made));
  });

  it('tells a watcher every scan once, numbered in order', async () => {
    const made = await shop([pushSource('plc', 2)], ['TC1', 'TC2']);
    const news: RunNews[] = [];
    const stop = made.engine.watchRun(made.run, (one) => news.push(one));
    for (let second = 0; second < 30; second += 1) {
      await send(made, made.sourceIds[0]!, second, figuresAt(second / 60));
      if (second % 7 === 0) made.engine.run(made.run);
    }
    made.engine.run(made.run);
    stop();
    const scans = news.flatMap((one) => (one.kind === 'scans' ? one.scans : []));
    expect(scans.map(({ n }) => n)).toEqual(Array.from({ length: 30 }, (_, i) => i + 1));
    expect([...scans[12]!.values]).toEqual(figuresAt(0.2));
  });

  it('reads recorded emf as the stored scans are read', async () => {
    const emf: LiveSource = {
      ...pushSource('emf', 0),
      channels: [
        {
          column: 'a',
          name: 'TC1',
          role: 'part',
          unit: 'mV',
          thermocouple: { type: 'K', coldJunction: 'terminals' },
        },
        { column: 'b', name: 'terminals', role: 'other', unit: '°C' },
      ],
    };
    const made = await shop([emf], ['TC1']);
    for (let minute = 0; minute <= 30; minute += 1) {
      await send(made, made.sourceIds[0]!, minute * 60, [Math.round(minute * 50) / 1000, 23.5]);
    }
    const { evaluation, readings } = made.engine.run(made.run);
    expect(evaluation).toEqual(judgedFromStore(made));
    expect(readings.find(({ channel }) => channel === 'TC1')).toMatchObject({ unit: '°C' });
  });
});
