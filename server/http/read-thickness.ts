import { DomainError } from '../../models/errors.ts';
import { askThickness } from '../actions/ask-thickness.ts';
import { sourceInputs } from '../actions/run-inputs.ts';
import { thicknessRecords } from '../actions/thickness-records.ts';
import type { Thickness, ThicknessQuery } from '../contract/thickness.ts';
import { sha256OfDocument } from '../store/canonical.ts';
import { readCycleDocument, requireCycle } from '../store/cycles.ts';
import type { Db } from '../store/database.ts';
import { readDecisions } from '../store/decisions.ts';
import { findLatestEvaluation } from '../store/evaluations.ts';
import { findLoad, type LoadRow } from '../store/loads.ts';
import { findRunLine } from '../store/run-lines.ts';
import { requireRun } from '../store/runs.ts';
import { listVessels } from '../store/vessels.ts';
import type { AppParts } from './app-parts.ts';
import { readLogOnce } from './read-chart.ts';
import { remember } from './remember.ts';
import { thicknessView } from './thickness-view.ts';

/** How hot a part got between its faces in one run, and how far it cured there. */
export function readThickness(
  { db, cureThroughPart }: Pick<AppParts, 'db' | 'cureThroughPart'>,
  serial: string,
  run: number,
  query: ThicknessQuery,
): Promise<Thickness> {
  requireRun(db, run);
  const load = loadWith(db, run, serial);
  const row = load.cycle === null ? null : requireCycle(db, load.cycle.code, load.cycle.issue);
  const cycle = row === null ? null : readCycleDocument(db, row);
  const records = thicknessRecords(db, serial, query.resin ?? cycle?.cure?.resin ?? null);
  const decisions = readDecisions(db, run);
  const vessel = vesselKind(db, run);
  const key = sha256OfDocument({
    serial,
    run,
    query,
    vessel,
    decisions,
    load: load.sha256,
    cycle: row?.sha256 ?? null,
    resin: records.resin.sha256,
    layup: records.layup,
    tool: records.toolRecord,
    readings: sourceInputs(db, run).map(({ chainSha256, layoutSha256 }) => [chainSha256, layoutSha256]),
  });
  return remember(cureThroughPart, key, async () => {
    const asked = askThickness(
      {
        readings: readLogOnce(db, run).readings,
        load: load.document,
        cycle,
        vessel,
        excludedFromMs: exclusions(decisions),
      },
      serial,
      records,
      query,
    );
    const through = await cureThroughPart(asked.asked);
    const suspects = findLatestEvaluation(db, run)?.document.decisions.map(({ channel }) => channel) ?? [];
    return thicknessView({ part: serial, run, cycle, records, asked, through, suspects });
  });
}

function loadWith(db: Db, run: number, serial: string): LoadRow {
  const load = findLoad(db, run);
  if (load?.document.parts.some(({ part }) => part === serial)) return load;
  throw new DomainError('part-unknown', `Part ${serial} is not in the load of run ${run}`, { part: serial, run });
}

function vesselKind(db: Db, run: number): string | null {
  const name = findRunLine(db, run)?.vessel ?? null;
  return listVessels(db).find((vessel) => vessel.name === name)?.kind ?? null;
}

/** The instant each excluded channel is not to be believed from, by the latest decision on it. */
function exclusions(decisions: ReturnType<typeof readDecisions>): ReadonlyMap<string, number> {
  const latest = new Map(decisions.map(({ channel, from }) => [channel, from]));
  return new Map([...latest].flatMap(([channel, from]) => (from === null ? [] : [[channel, Date.parse(from)]])));
}
