import { afterEach, expect } from 'vitest';
import type { LiveScan, LiveSource } from '../../../models/log/live-source.ts';
import { parseLiveSource } from '../../../models/log/parse-live-source.ts';
import type { Pushed } from '../../../server/contract/live.ts';
import { driverOf, type RunningSource, type SourceParts } from '../../../server/live/sources/source.ts';

const running: RunningSource[] = [];
const faults: unknown[] = [];

afterEach(async () => {
  for (const one of running.splice(0)) await one.close();
  expect(faults.splice(0)).toEqual([]);
});

/** What a source brought and told. */
export interface Heard {
  readonly source: RunningSource;
  readonly scans: LiveScan[];
  readonly notes: string[];
  readonly told: (readonly [string, string | null])[];
  /** Figures of every scan, absent ones as null. */
  readonly figures: () => (number | null)[][];
}

/** Starts a source by its document; its scans are kept in a list instead of on a disk. */
export async function listenTo(document: object, changes: Partial<SourceParts> = {}): Promise<Heard> {
  const source: LiveSource = parseLiveSource(document);
  const scans: LiveScan[] = [];
  const notes: string[] = [];
  const told: [string, string | null][] = [];
  const driver = await driverOf(source.reads.kind);
  if (driver === null) throw new Error(`${source.reads.kind} has no driver`);
  const started = driver.start({
    document: source,
    take: async (taken): Promise<Pushed> => {
      scans.push(...taken);
      return { kept: taken.length, known: 0, refused: [] };
    },
    tell: (state, because) => {
      const last = told.at(-1);
      if (last?.[0] !== state || last[1] !== because) told.push([state, because]);
    },
    note: (sentence) => notes.push(sentence),
    fault: (error) => faults.push(error),
    now: () => performance.timeOrigin + performance.now(),
    kept: null,
    inventVessel: null,
    ...changes,
  });
  running.push(started);
  const figures = () => scans.map((scan) => [...scan.figures].map((figure) => (Number.isNaN(figure) ? null : figure)));
  return { source: started, scans, notes, told, figures };
}

export async function until(holds: () => boolean, longestMs = 15_000): Promise<void> {
  const end = performance.now() + longestMs;
  while (!holds() && performance.now() < end) await new Promise((resolve) => setTimeout(resolve, 10));
  expect(holds()).toBe(true);
}

export function sleep(ms: number): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, ms));
}
