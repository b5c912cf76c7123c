import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { parseResin } from '../../../models/cure/parse-resin.ts';
import { parseCycle } from '../../../models/cycle/parse-cycle.ts';
import { parseLayout } from '../../../models/log/parse-layout.ts';
import { parseMaterial } from '../../../models/material/parse-material.ts';
import { MATERIALS } from '../../../server/practice/plan-materials.ts';
import { PRACTICES } from '../../../server/practice/plan-practices.ts';
import { OVEN_1_RECORDER, RECORDERS } from '../../../server/practice/plan-recorders.ts';
import { RESINS, SKERRY_180 } from '../../../server/practice/plan-resins.ts';
import { PLANNED_RUNS } from '../../../server/practice/plan-runs.ts';
import { simulationOf } from '../../../server/practice/simulation-of-run.ts';

describe('the plan of the practice workshop', () => {
  it('is a year of about sixty runs and a hundred and fifty parts', () => {
    expect(PLANNED_RUNS.length).toBeGreaterThanOrEqual(60);
    expect(PLANNED_RUNS[0]!.startsAt.slice(0, 7)).toBe('2025-11');
    expect(PLANNED_RUNS.at(-1)!.startsAt.slice(0, 7)).toBe('2026-11');
    const parts = new Set(PLANNED_RUNS.flatMap(({ parts: load }) => load.map(({ part }) => part)));
    expect(parts.size).toBeGreaterThan(140);
    expect(parts.size).toBeLessThan(180);
  });

  it('holds documents that their own parsers take as they stand', () => {
    for (const { cycle } of Object.values(PRACTICES)) expect(parseCycle(cycle)).toEqual(cycle);
    for (const resin of RESINS) expect(parseResin(resin)).toEqual(resin);
    for (const material of MATERIALS) expect(parseMaterial(material)).toEqual(material);
    for (const { layout } of [...RECORDERS, OVEN_1_RECORDER]) expect(parseLayout(layout)).toEqual(layout);
  });

  it('cures with the practice resin that ships with the cure models', () => {
    const shipped = join(import.meta.dirname, '../../../models/cure/resins/skerry-180.json');
    expect(SKERRY_180).toEqual(JSON.parse(readFileSync(shipped, 'utf8')));
  });

  it('puts no thermocouple on two places, no part twice in a load, and names only channels its recorder has', () => {
    for (const planned of PLANNED_RUNS) {
      const { recorder, sensors, parts } = simulationOf(planned);
      const known = recorder.layout.channels.map(({ name }) => name);
      const channels = sensors.map(({ channel }) => channel);
      const lines = parts.flatMap(({ bagLine }) => bagLine ?? []);
      const named = [
        ...channels,
        ...lines,
        ...(planned.faults ?? []).map(({ channel }) => channel),
        ...(planned.decisions ?? []).map(({ channel }) => channel),
        ...Object.keys(planned.corrections ?? {}),
      ];
      expect(new Set(channels).size, planned.run).toBe(channels.length);
      expect(new Set(parts.map(({ part }) => part)).size, planned.run).toBe(parts.length);
      expect(
        named.filter((name) => !known.includes(name)),
        planned.run,
      ).toEqual([]);
    }
  });

  it('cures no part twice, and post-cures or repairs only what was cured before', () => {
    const cured = new Set<string>();
    for (const { run, parts } of PLANNED_RUNS) {
      for (const { part, kind } of parts) {
        const isFirst = kind !== 'post-cured-strut' && kind !== 'repair';
        expect(cured.has(part), `${run} ${part}`).toBe(!isFirst);
        cured.add(part);
      }
    }
  });

  it('never has a vessel in two runs at once', () => {
    const endsMs = new Map<string, number>();
    for (const { run, vessel, startsAt } of PLANNED_RUNS) {
      const startMs = Date.parse(startsAt);
      expect(startMs, run).toBeGreaterThan(endsMs.get(vessel) ?? 0);
      endsMs.set(vessel, startMs + 12 * 3_600_000);
    }
  });
});
