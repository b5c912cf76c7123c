import { celsiusFrom } from '../units.ts';
import { ageingRate } from './ageing-rate.ts';
import { type Course, courseOf } from './course.ts';
import { impossible } from './impossible.ts';
import type { MaterialRecords } from './ledger.ts';
import { type Life, outLife, refreezing, shelfLife, tackLife } from './lives.ts';
import type { Material } from './material.ts';

/** What a roll or kit has aged to at an instant, as plain data. */
export interface MaterialState {
  readonly at: string;
  readonly item: string;
  readonly place: 'freezer' | 'room' | 'scrapped';
  /** Since when it has been there. */
  readonly since: string;
  /** The worst of its lives. */
  readonly outcome: Life['outcome'];
  /** One sentence for that. */
  readonly because: string;
  readonly lives: readonly Life[];
  /** When the first of its lives ends if it stays where it is; null where that cannot be told. */
  readonly dueAt: string | null;
}

/**
 * What an item has aged to at an instant: each life with its figures and sentences, and the worst of them.
 *
 * @throws {DomainError} `event-impossible` where its ledger cannot be true.
 */
export function materialState(records: MaterialRecords, item: string, atMs: number): MaterialState {
  return stateOfCourse(records, courseOf(records, item, atMs), atMs);
}

/** The same of a course already worked out; tack is held against `tackMs`, the instant it was last needed. */
export function stateOfCourse(records: MaterialRecords, course: Course, atMs: number, tackMs = atMs): MaterialState {
  const { material, batch } = productOf(records, course);
  const lives = [
    outLife(course, material, atMs),
    shelfLife(course, material, batch, atMs),
    ...(material.tack === undefined ? [] : [tackLife(course, material.tack.lifeDays, tackMs)]),
    ...(material.refreezing === undefined ? [] : [refreezing(course, material.refreezing.atMost)]),
  ];
  const worst = lives.reduce((a, b) => (RANK[b.outcome] > RANK[a.outcome] ? b : a));
  const last = course.stays.at(-1);
  const isOut = last?.kind === 'out';
  return {
    at: new Date(atMs).toISOString(),
    item: course.item,
    place: course.scrappedMs !== null ? 'scrapped' : isOut ? 'room' : 'freezer',
    since: new Date(course.scrappedMs ?? sinceMs(course, atMs)).toISOString(),
    outcome: worst.outcome,
    because: worst.because,
    lives,
    dueAt: isoOf(course.scrappedMs !== null ? null : dueMs(course, material, lives, atMs)),
  };
}

const RANK: Readonly<Record<Life['outcome'], number>> = { met: 0, 'cannot-tell': 1, 'not-met': 2 };

/** The material document and the batch of a course. */
export function productOf(records: MaterialRecords, { item, batch: code }: Course) {
  const batch = records.batches.find((one) => one.batch === code);
  const named = batch?.material;
  const material = records.materials.find((one) => one.code === named?.code && one.issue === named?.issue);
  if (batch === undefined || material === undefined) {
    return impossible(`${item} is of batch ${code}, of which nothing is on record`, { item, batch: code });
  }
  return { batch, material };
}

/** When the item came to where it is: stays of one place follow each other. */
function sinceMs({ stays }: Course, atMs: number): number {
  const isOut = stays.at(-1)?.kind === 'out';
  let since = atMs;
  for (let i = stays.length - 1; i >= 0 && (stays[i]!.kind === 'out') === isOut; i--) since = stays[i]!.fromMs;
  return since;
}

/** The first end of a life if the item stays where it is. */
function dueMs(course: Course, material: Material, lives: readonly Life[], atMs: number): number | null {
  const ends: number[] = [];
  const last = course.stays.at(-1);
  for (const life of lives) {
    if (life.leftMinutes === null) {
      if (life.name !== 're-freezing') return null;
      continue;
    }
    if (life.name === 'shelf-life') ends.push(atMs + life.leftMinutes * 60_000);
    if (last?.kind !== 'out') continue;
    const { temperature, unit = '°C' } = last.room ?? {};
    const rate = temperature === undefined ? null : ageingRate(material).at(celsiusFrom(temperature, unit));
    if (life.name === 'out-life' && rate !== null && rate > 0) ends.push(atMs + (life.leftMinutes / rate) * 60_000);
    if (life.name === 'tack-life') ends.push(atMs + life.leftMinutes * 60_000);
  }
  return ends.length === 0 ? null : Math.min(...ends);
}

function isoOf(ms: number | null): string | null {
  return ms === null ? null : new Date(ms).toISOString();
}
