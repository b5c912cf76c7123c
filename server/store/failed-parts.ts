import type { FailedParts } from '../contract/trace.ts';
import type { Db } from './database.ts';

const MOST = 100;

/** Parts with a failed test, each with its latest, those tested last first. */
export function listFailedParts(db: Db): FailedParts {
  const parts = db.prepare<[number], FailedParts['parts'][number]>(SELECT).all(MOST);
  const total = db.prepare<[], number>(COUNT).pluck().get() ?? 0;
  return { parts, total };
}

const COUNT = "SELECT count(DISTINCT part_id) FROM part_results_now WHERE outcome = 'failed'";

const SELECT = `
  SELECT serial, title, drawing, test, text, tested_at AS at
  FROM part_results_now AS result JOIN parts ON parts.id = result.part_id
  LEFT JOIN part_particulars AS about
    ON about.id = (SELECT max(id) FROM part_particulars WHERE part_id = parts.id)
  WHERE result.id IN (SELECT max(id) FROM part_results_now WHERE outcome = 'failed' GROUP BY part_id)
  ORDER BY tested_at DESC, serial LIMIT ?`;
