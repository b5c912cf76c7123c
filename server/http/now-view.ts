import type { Need, Now } from '../contract/now.ts';
import { listWaitingImports } from '../store/imports.ts';
import { listRuns, listRunsInNeed, type RunInNeed } from '../store/run-lines.ts';
import { listVessels } from '../store/vessels.ts';
import type { AppParts } from './app-parts.ts';
import { dueNeeds } from './due-needs.ts';
import { importLineOf } from './import-view.ts';

const MOST_NEEDS = 100;
const LAST_RUNS = 12;
/** Most pressing first. */
const PRESSING: readonly Need['kind'][] = ['awaiting-load', 'undecided-suspect', 'cannot-tell'];
const DAY_MS = 86_400_000;

/** What each vessel did last, what needs someone, and the last runs. */
export function nowView({ db, clock }: AppParts): Now {
  const lastRuns = listRuns(db, { limit: LAST_RUNS }).runs;
  // Counted from the last run, so that a shop that was closed still sees its last month.
  const recently = new Date(Date.parse(lastRuns[0]?.from ?? '1970-01-01T00:00:00Z') - 30 * DAY_MS).toISOString();
  const vessels = listVessels(db).map(({ name, kind }) => {
    const recent = listRuns(db, { vessel: name, from: recently, limit: 1 }).total;
    return {
      name,
      kind,
      lastRun: listRuns(db, { vessel: name, limit: 1 }).runs[0] ?? null,
      recentRuns: recent,
      recentConforming: listRuns(db, { vessel: name, from: recently, verdict: 'conforms', limit: 1 }).total,
    };
  });
  const needs = [
    ...listWaitingImports(db).map((row): Need => ({ kind: 'unread-file', import: importLineOf(row) })),
    ...listRunsInNeed(db, MOST_NEEDS)
      .map(needOf)
      .sort((a, b) => PRESSING.indexOf(a.kind) - PRESSING.indexOf(b.kind)),
    ...dueNeeds(db, clock()),
  ];
  return { vessels, needs, lastRuns };
}

function needOf({ run, undecided }: RunInNeed): Need {
  if (run.state !== 'judged') return { kind: 'awaiting-load', run };
  if (undecided.length > 0) return { kind: 'undecided-suspect', run, channels: [...undecided] };
  return { kind: 'cannot-tell', run };
}
