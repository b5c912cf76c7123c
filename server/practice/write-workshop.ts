import type { Actor } from '../actions/action-parts.ts';
import { addNote } from '../actions/add-note.ts';
import { addPartResult } from '../actions/add-part-result.ts';
import { decideSuspect } from '../actions/decide-suspect.ts';
import type { EvaluateLog } from '../actions/evaluate-log.ts';
import type { JudgingParts } from '../actions/judge-run.ts';
import { receiveFile } from '../actions/receive-file.ts';
import type { Role } from '../contract/roles.ts';
import type { Db } from '../store/database.ts';
import { resultsOf } from './part-results.ts';
import type { PlannedRun } from './plan-run.ts';
import { PLANNED_RUNS, UNLOADED_RUN, UNREAD_RUN } from './plan-runs.ts';
import type { PracticeDeed } from './practice-deed.ts';
import { simulationOf } from './simulation-of-run.ts';
import { seedFrom } from './simulator/random.ts';
import { type SimulatedRun, simulateRun } from './simulator/simulate-run.ts';
import { documentDeeds, openWorkshop } from './write-documents.ts';
import { instrumentDeeds, surveyDeeds } from './write-instruments.ts';
import { layupDeeds, toolDeeds } from './write-layups.ts';
import { materialDeeds } from './write-materials.ts';
import { incoming, writeLoad, writeRecording } from './write-run.ts';

export interface PracticeParts {
  /** A database nobody has used yet. */
  readonly db: Db;
  readonly evaluate: EvaluateLog;
  /** Told how far it is, a sentence at a time. */
  readonly say?: (sentence: string) => void;
  /** Default: the whole year. A test may want the first few. */
  readonly runs?: readonly PlannedRun[];
}

/** The workshop's present: tests of its last parts are still to come. */
const ENDS_MS = Date.parse('2026-11-27T17:00:00Z');

/**
 * Writes Skerry Row, an invented workshop, into an empty database: through the same actions a real file takes, each
 * deed by the person and at the time it would have been.
 *
 * Nothing is left to chance or to the clock: the same program writes the same workshop.
 */
export async function writePracticeWorkshop({
  db,
  evaluate,
  say = () => undefined,
  runs = PLANNED_RUNS,
}: PracticeParts): Promise<void> {
  const partsFor = ({ atMs, by }: Pick<PracticeDeed, 'atMs' | 'by'>): JudgingParts => ({
    db,
    evaluate,
    clock: () => atMs,
    actor: actorNamed(by),
  });
  openWorkshop(partsFor);
  // A run's later deeds are known once it is simulated; they wait here until the year has come to them.
  const waiting: PracticeDeed[] = [
    ...documentDeeds(),
    ...toolDeeds(),
    ...instrumentDeeds(),
    ...surveyDeeds(),
    ...layupDeeds(runs),
    ...materialDeeds(runs),
  ];
  const catchUp = async (untilMs: number): Promise<void> => {
    waiting.sort((one, other) => one.atMs - other.atMs);
    while (waiting[0] !== undefined && waiting[0].atMs <= untilMs) {
      const deed = waiting.shift()!;
      await deed.does(partsFor(deed));
    }
  };
  for (const [i, planned] of runs.entries()) {
    const run = simulate(planned);
    await catchUp(endMs(run));
    waiting.push(...deedsOf(planned, run));
    say(`${i + 1} of ${runs.length} runs: ${planned.run}, ${planned.vessel}, ${planned.startsAt.slice(0, 10)}`);
  }
  waiting.push(...leftForSomeone());
  await catchUp(ENDS_MS);
}

function deedsOf(planned: PlannedRun, run: SimulatedRun): PracticeDeed[] {
  const doneMs = endMs(run);
  let n = 0;
  const at = (minutes: number, by: string, does: PracticeDeed['does']): PracticeDeed => ({
    atMs: doneMs + Math.round(minutes * 60) * 1000,
    by,
    does,
  });
  const { operator, notes = [], decisions = [] } = planned;
  const instantOf = (minute: number) => new Date(run.truth.history.startMs + minute * 60_000).toISOString();
  return [
    at(11, operator, async (parts) => {
      n = await writeRecording(parts, planned, run, simulationOf(planned).recorder.name);
    }),
    at(19, operator, (parts) => writeLoad(parts, n, planned, run)),
    ...notes.map(({ minute, text, by }) => at(24, by, (parts) => addNote(parts, n, { text, at: instantOf(minute) }))),
    ...decisions.map(({ channel, decision, fromMin, reason, by }) =>
      at(60 * 20, by, (parts) => decideSuspect(parts, n, { decision, channel, from: instantOf(fromMin), reason })),
    ),
    ...resultsOf(planned, run.truth).map(({ part, afterDays, by, result }) =>
      at(1440 * afterDays, by, (parts) =>
        addPartResult(parts, part, { ...result, at: new Date(parts.clock() - 3_600_000).toISOString() }),
      ),
    ),
  ];
}

/** What waits for whoever opens the workshop: a run without its load, and a file of a recorder nobody has set up. */
function leftForSomeone(): PracticeDeed[] {
  const unloaded = simulate(UNLOADED_RUN);
  const unread = simulate(UNREAD_RUN);
  const recorder = simulationOf(UNLOADED_RUN).recorder.name;
  return [
    {
      atMs: endMs(unloaded) + 900_000,
      by: UNLOADED_RUN.operator,
      does: (parts) => writeRecording(parts, UNLOADED_RUN, unloaded, recorder),
    },
    {
      atMs: endMs(unread) + 900_000,
      by: UNREAD_RUN.operator,
      does: (parts) => receiveFile(parts, { file: incoming(unread.files[0]!), origin: 'upload' }),
    },
  ];
}

function simulate(planned: PlannedRun): SimulatedRun {
  return simulateRun(simulationOf(planned), seedFrom(planned.run));
}

function endMs({ truth: { history } }: SimulatedRun): number {
  return history.startMs + (history.count - 1) * history.stepS * 1000;
}

const ROLES_OF: Readonly<Record<string, readonly Role[]>> = {
  operator: ['operator'],
  inspector: ['inspector'],
  'process engineer': ['engineer'],
  'test engineer': ['engineer'],
};

function actorNamed(name: string): Actor {
  return { name, roles: ROLES_OF[name.replace(/ \d+$/, '')] ?? [] };
}
