import type { HeldPart } from '../contract/trace.ts';
import type { Db } from './database.ts';
import { isoFromMs } from './instants.ts';
import { prepared } from './prepared.ts';

export type HeldPartRow = Omit<HeldPart, 'isStart' | 'because'> & {
  readonly partId: number;
  readonly runs: readonly number[];
  /** First scans of those runs, in ms, in the same order. */
  readonly runsFromMs: readonly number[];
};

/** What is said of each of these parts on a list: what it is, its runs, its verdict, its failed tests, and where it is. */
export function readHeldParts(db: Db, partIds: readonly number[]): HeldPartRow[] {
  const given = { parts: JSON.stringify(partIds) };
  const runs = byPart(prepared<[object], RunRow>(db, RUNS).all(given));
  const failures = byPart(prepared<[object], { partId: number; test: string }>(db, FAILURES).all(given));
  const places = byPart(prepared<[object], WhereRow>(db, PLACES).all(given));
  return prepared<[object], Particulars>(db, PARTICULARS)
    .all(given)
    .map(({ partId, serial, title, drawing }) => {
      const cured = (runs.get(partId) ?? []).toSorted((a, b) => a.fromMs - b.fromMs || a.run - b.run);
      const where = places.get(partId)?.[0];
      return {
        partId,
        serial,
        title,
        drawing,
        quantity: Math.max(1, ...cured.map(({ quantity }) => quantity)),
        runs: cured.map(({ run }) => run),
        runsFromMs: cured.map(({ fromMs }) => fromMs),
        lastRunAt: cured.length === 0 ? null : isoFromMs(cured.at(-1)?.fromMs ?? 0),
        verdict: cured.findLast(({ verdict }) => verdict !== null)?.verdict ?? null,
        failedTests: (failures.get(partId) ?? []).map(({ test }) => test),
        whereabouts: where === undefined ? null : { place: where.place, customer: where.customer, since: where.since },
      };
    });
}

interface RunRow {
  readonly partId: number;
  readonly run: number;
  readonly fromMs: number;
  readonly quantity: number;
  /** Of the run's latest judgement. */
  readonly verdict: HeldPart['verdict'];
}

interface WhereRow extends NonNullable<HeldPart['whereabouts']> {
  readonly partId: number;
}

interface Particulars {
  readonly partId: number;
  readonly serial: string;
  readonly title: string | null;
  readonly drawing: string | null;
}

function byPart<T extends { readonly partId: number }>(rows: readonly T[]): Map<number, T[]> {
  const found = new Map<number, T[]>();
  for (const row of rows) {
    const known = found.get(row.partId);
    if (known === undefined) found.set(row.partId, [row]);
    else known.push(row);
  }
  return found;
}

const NAMED = 'named CROSS JOIN';
const WITH = 'WITH named (part_id) AS (SELECT value FROM json_each(@parts))';

const PARTICULARS = `${WITH}
  SELECT parts.id AS partId, serial, title, drawing FROM ${NAMED} parts ON parts.id = named.part_id
  LEFT JOIN part_particulars AS about
    ON about.id = (SELECT max(id) FROM part_particulars WHERE part_id = named.part_id)`;

const RUNS = `${WITH}
  SELECT load_parts.part_id AS partId, run_id AS run, from_ms AS fromMs, quantity,
    (SELECT verdict FROM evaluation_parts
     WHERE evaluation_id = (SELECT max(id) FROM evaluations WHERE run_id = runs.id)
       AND evaluation_parts.part_id = named.part_id) AS verdict
  FROM ${NAMED} load_parts ON load_parts.part_id = named.part_id JOIN loads ON loads.id = load_id
  JOIN runs ON runs.id = run_id WHERE loads.id = (SELECT max(id) FROM loads WHERE run_id = runs.id)`;

const FAILURES = `${WITH}
  SELECT DISTINCT results.part_id AS partId, test
  FROM ${NAMED} part_results_now AS results ON results.part_id = named.part_id WHERE outcome = 'failed'`;

const PLACES = `${WITH}
  SELECT part_whereabouts.part_id AS partId, place, customer, since
  FROM ${NAMED} part_whereabouts ON part_whereabouts.part_id = named.part_id
  WHERE part_whereabouts.id = (SELECT max(id) FROM part_whereabouts WHERE part_id = named.part_id)`;
