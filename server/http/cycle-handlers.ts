import { importCycle } from '../actions/import-cycle.ts';
import { importResin } from '../actions/import-resin.ts';
import { releaseCycle } from '../actions/release-cycle.ts';
import { withdrawCycle } from '../actions/withdraw-cycle.ts';
import type { CycleLine, CycleView } from '../contract/cycles.ts';
import type { ResinView } from '../contract/resins.ts';
import { type CycleRow, listCycles, readCycleDocument, readCycleHistory, requireCycle } from '../store/cycles.ts';
import type { Db } from '../store/database.ts';
import { listResins, readResinDocument, requireResin } from '../store/resins.ts';
import { listRuns } from '../store/run-lines.ts';
import type { SomeHandlers } from './handler.ts';

const LATEST_RUNS = 20;

export const cycleHandlers: SomeHandlers<
  | 'listCycles'
  | 'importCycle'
  | 'readCycle'
  | 'releaseCycle'
  | 'withdrawCycle'
  | 'listResins'
  | 'importResin'
  | 'readResin'
> = {
  listCycles: ({ db }) => ({ cycles: listCycles(db).map(lineOf) }),
  importCycle(parts, { body }) {
    const { code, issue } = importCycle(parts, body.document);
    return cycleView(parts.db, code, issue);
  },
  readCycle: ({ db }, { params }) => cycleView(db, params.code ?? '', params.issue ?? ''),
  releaseCycle(parts, { params, body }) {
    const { code = '', issue = '' } = params;
    releaseCycle(parts, code, issue, body.reason);
    return cycleView(parts.db, code, issue);
  },
  withdrawCycle(parts, { params, body }) {
    const { code = '', issue = '' } = params;
    withdrawCycle(parts, code, issue, body.reason);
    return cycleView(parts.db, code, issue);
  },
  listResins: ({ db }) => ({ resins: listResins(db) }),
  importResin: (parts, { body }) => resinView(parts.db, importResin(parts, body.document)),
  readResin: ({ db }, { params }) => resinView(db, params.code ?? ''),
};

function cycleView(db: Db, code: string, issue: string): CycleView {
  const cycle = requireCycle(db, code, issue);
  return {
    ...lineOf(cycle),
    document: readCycleDocument(db, cycle),
    history: readCycleHistory(db, cycle.id),
    issues: listCycles(db, code)
      .filter(({ id }) => id !== cycle.id)
      .map(lineOf),
    latestRuns: listRuns(db, { cycle: `${code}/${issue}`, limit: LATEST_RUNS }).runs,
  };
}

function lineOf({ id: _id, ...line }: CycleRow): CycleLine {
  return line;
}

function resinView(db: Db, code: string): ResinView {
  const resin = requireResin(db, code);
  return { ...resin, document: readResinDocument(db, resin) };
}
