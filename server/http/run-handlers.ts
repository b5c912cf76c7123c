import { addNote } from '../actions/add-note.ts';
import { decideSuspect } from '../actions/decide-suspect.ts';
import { judgeRun } from '../actions/judge-run.ts';
import { readAgain } from '../actions/read-again.ts';
import { setLoad } from '../actions/set-load.ts';
import { requireEvaluation } from '../store/evaluations.ts';
import { listRuns } from '../store/run-lines.ts';
import { requireRun } from '../store/runs.ts';
import { evaluationNow } from './evaluation-now.ts';
import type { SomeHandlers } from './handler.ts';
import { numberIn } from './number-in.ts';
import { readChart } from './read-chart.ts';
import { readFileOfRun } from './read-file-of-run.ts';
import { readingsCsv } from './readings-csv.ts';
import { runView } from './run-view.ts';

export const runHandlers: SomeHandlers<
  | 'listRuns'
  | 'readRun'
  | 'readRunChart'
  | 'setLoad'
  | 'readAgain'
  | 'decideSuspect'
  | 'judgeAgain'
  | 'readEvaluation'
  | 'addNote'
  | 'readReadings'
  | 'readFile'
> = {
  listRuns: ({ db }, { query }) => listRuns(db, query),
  readRun(parts, { params }) {
    const run = numberIn(params, 'run');
    return runView(parts.db, run, evaluationNow(parts, run));
  },
  readRunChart: (parts, { params, query }) => readChart(parts, numberIn(params, 'run'), query),
  async setLoad(parts, { params, body }) {
    const run = numberIn(params, 'run');
    await setLoad(parts, run, body);
    return runView(parts.db, run);
  },
  async readAgain(parts, { params, body }) {
    const run = numberIn(params, 'run');
    await readAgain(parts, run, numberIn(params, 'source'), body);
    return runView(parts.db, run);
  },
  async decideSuspect(parts, { params, body }) {
    const run = numberIn(params, 'run');
    await decideSuspect(parts, run, body);
    return runView(parts.db, run);
  },
  async judgeAgain(parts, { params, body }) {
    const run = numberIn(params, 'run');
    return requireEvaluation(parts.db, run, await judgeRun(parts, run, body.reason));
  },
  readEvaluation({ db }, { params }) {
    const run = numberIn(params, 'run');
    requireRun(db, run);
    return requireEvaluation(db, run, numberIn(params, 'evaluation'));
  },
  addNote(parts, { params, body }) {
    const run = numberIn(params, 'run');
    addNote(parts, run, body);
    return runView(parts.db, run);
  },
  readReadings: (parts, { params }) => readingsCsv(parts, numberIn(params, 'run')),
  readFile: ({ db }, { params }) => readFileOfRun(db, numberIn(params, 'run'), numberIn(params, 'n')),
};
