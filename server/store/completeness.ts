import type { Completeness } from '../contract/trace.ts';
import type { Db } from './database.ts';
import type { Span } from './kin.ts';
import { prepared } from './prepared.ts';

type Gaps = Omit<Completeness, 'notFollowed'>;

/** The last answer of each connection, and the state of the book it was given in. */
const lastAnswers = new WeakMap<Db, { readonly state: string; readonly gaps: Gaps }>();

/**
 * How much is not on record, of the parts cured within a span and of those in no run, and of the runs in it.
 *
 * Counting looks at every part there is. Nothing is written without a line in the audit trail, so an answer stands until
 * the next line that is about more than a list or a whereabouts.
 */
export function countGaps(db: Db, span: Span): Gaps {
  const line = prepared<[], number>(db, LAST_LINE).pluck().get() ?? 0;
  const state = `${line} ${span.fromMs} ${span.untilMs}`;
  const known = lastAnswers.get(db);
  if (known?.state === state) return known.gaps;
  const gaps = readGaps(db, span);
  lastAnswers.set(db, { state, gaps });
  return gaps;
}

function readGaps(db: Db, span: Span): Gaps {
  const counts = prepared<[Span], Omit<Completeness, 'notFollowed' | 'runsWithoutLoad' | 'runsWithoutVessel'>>(
    db,
    COUNTS,
  ).get(span);
  if (counts === undefined) throw new Error('a count gives a row');
  return {
    ...counts,
    runsWithoutLoad: prepared<[Span], number>(db, NO_LOAD).pluck().all(span),
    runsWithoutVessel: prepared<[Span], number>(db, NO_VESSEL).pluck().all(span),
  };
}

const LAST_LINE = `
  SELECT n FROM audit WHERE verb NOT IN ('make-hold-list', 'set-whereabouts') ORDER BY n DESC LIMIT 1`;

const IN_SPAN = 'from_ms >= @fromMs AND from_ms < @untilMs';

/** Each set is read along an index once; asking part by part would cost as much as the list itself. */
const COUNTS = `
  WITH
    held AS MATERIALIZED (
      SELECT loads.id AS load_id, from_ms FROM runs JOIN loads ON loads.id = (SELECT max(id) FROM loads WHERE run_id = runs.id)),
    cured AS MATERIALIZED (SELECT part_id, max(${IN_SPAN}) AS is_in FROM held CROSS JOIN load_parts USING (load_id) GROUP BY part_id),
    rolled AS MATERIALIZED (SELECT DISTINCT part_id FROM part_materials_now),
    tooled AS MATERIALIZED (
      SELECT part_id FROM part_particulars AS about
      WHERE tool <> '' AND id = (SELECT max(id) FROM part_particulars WHERE part_id = about.part_id)),
    bagged AS MATERIALIZED (
      SELECT DISTINCT part_id FROM held CROSS JOIN load_places USING (load_id) WHERE kind = 'bag-line'),
    sensed AS MATERIALIZED (
      SELECT DISTINCT part_id FROM held CROSS JOIN load_places USING (load_id) WHERE kind = 'thermocouple')
  SELECT count(*) AS parts,
    sum(rolled.part_id IS NULL) AS withoutRoll,
    sum(tooled.part_id IS NULL) AS withoutTool,
    sum(bagged.part_id IS NULL) AS withoutBagLine,
    sum(sensed.part_id IS NULL) AS withoutThermocouple,
    sum(cured.part_id IS NULL) AS withoutRun
  FROM parts
  LEFT JOIN cured ON cured.part_id = parts.id
  LEFT JOIN rolled ON rolled.part_id = parts.id
  LEFT JOIN tooled ON tooled.part_id = parts.id
  LEFT JOIN bagged ON bagged.part_id = parts.id
  LEFT JOIN sensed ON sensed.part_id = parts.id
  WHERE coalesce(is_in, 1) = 1`;

const NO_LOAD = `
  SELECT id FROM runs WHERE ${IN_SPAN} AND NOT EXISTS (SELECT 1 FROM loads WHERE run_id = runs.id) ORDER BY id`;

const NO_VESSEL = `SELECT id FROM runs WHERE ${IN_SPAN} AND vessel_id IS NULL ORDER BY id`;
