import { DomainError } from '../../models/errors.ts';
import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import { asTemperature } from '../../models/log/temperatures-of-emf.ts';
import type { RunSource, RunView } from '../contract/runs.ts';
import { findCycle, readCycleDocument } from '../store/cycles.ts';
import type { Db } from '../store/database.ts';
import { readDecisions } from '../store/decisions.ts';
import { findLatestEvaluation, listEvaluations } from '../store/evaluations.ts';
import { findLoad, type LoadRow } from '../store/loads.ts';
import { readNotes } from '../store/notes.ts';
import { findResin, readResinDocument } from '../store/resins.ts';
import { findRunLine } from '../store/run-lines.ts';
import { readSources, type StoredSource } from '../store/sources.ts';
import { joinedChannels } from './joined-channels.ts';
import { marginOf } from './run-margin.ts';

/** Everything of a run but its readings; `now` is what an open run came to so far. */
export function runView(db: Db, run: number, now?: Evaluation | null): RunView {
  const line = findRunLine(db, run);
  if (line === undefined) throw new DomainError('not-found', `There is no run ${run}`, { run });
  const sources = readSources(db, run);
  const channels = channelsOfSources(sources);
  const load = findLoad(db, run);
  const cycleIssue = cycleIssueOf(db, load);
  const resin = resinOf(db, cycleIssue);
  const evaluation = findLatestEvaluation(db, run);
  const decisions = readDecisions(db, run);
  const notes = readNotes(db, run);
  return {
    ...line,
    channels,
    sources: sources.map(shownSource),
    joined: channels.length < countChannels(sources) ? joinedChannels(db, run) : [],
    load: load?.document ?? null,
    loadSet: load === null ? null : { at: load.at, by: load.by },
    cycleIssue,
    resin,
    evaluation,
    evaluations: listEvaluations(db, run),
    decisions,
    notes,
    margin: marginOf(line, now ?? evaluation?.document ?? null, decisions, notes),
  };
}

function shownSource(source: StoredSource): RunSource {
  const { id: _id, recorderId: _recorderId, shiftMs: _shiftMs, fills: _fills, growing: _growing, ...shown } = source;
  return shown;
}

/** Each channel once: of those that several sources read, the first. */
function channelsOfSources(sources: readonly StoredSource[]): RunView['channels'] {
  const channels = sources.flatMap(({ n, layout }) =>
    layout.channels.map(asTemperature).map(({ name, role, unit }) => ({ name, role, unit, source: n })),
  );
  return [...new Map(channels.toReversed().map((channel) => [channel.name, channel])).values()].reverse();
}

function countChannels(sources: readonly StoredSource[]): number {
  return sources.reduce((sum, { layout }) => sum + layout.channels.length, 0);
}

function cycleIssueOf(db: Db, load: LoadRow | null): RunView['cycleIssue'] {
  if (load === null || load.cycle === null) return null;
  const cycle = findCycle(db, load.cycle.code, load.cycle.issue);
  if (cycle === undefined) return null;
  const { code, issue, status, sha256 } = cycle;
  return { code, issue, status, sha256, document: readCycleDocument(db, cycle) };
}

function resinOf(db: Db, cycle: RunView['cycleIssue']): RunView['resin'] {
  const code = cycle?.document.cure?.resin;
  const resin = code === undefined ? undefined : findResin(db, code);
  if (resin === undefined) return null;
  return { code: resin.code, sha256: resin.sha256, document: readResinDocument(db, resin) };
}
