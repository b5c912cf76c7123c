import { DomainError } from '../../../models/errors.ts';
import type { LiveReading, LiveRun, LiveVessel, LiveVessels, SourceLine, Warning } from '../../contract/live.ts';
import type { Db } from '../../store/database.ts';
import { isoFromMs } from '../../store/instants.ts';
import { type LiveRunRow, listOpenRuns } from '../../store/live-runs.ts';
import { type LiveSourceRow, listLiveSources } from '../../store/live-sources.ts';
import { findRunLine } from '../../store/run-lines.ts';
import { listVessels, requireVessel } from '../../store/vessels.ts';
import { zoneOfWorkshop } from '../../store/workshop.ts';
import type { Journal } from '../journal.ts';
import type { SteadyClock } from '../steady-clock.ts';
import { extremesOf } from './extremes.ts';
import { type Followed, type RunNews, stopTelling, tellScans, tellSoon } from './followed.ts';
import { LatestReadings } from './latest-readings.ts';
import { type LiveJudgement, RunFollower } from './run-follower.ts';
import { saysOf } from './says.ts';

export interface LiveEngineParts {
  readonly db: Db;
  readonly journal: Journal;
  readonly clock: SteadyClock;
  /** Sources of a vessel as they do now. */
  readonly sourceLines: (vesselId: number) => readonly SourceLine[];
  /** Looks at what a vessel came to, and answers the warnings that last. */
  readonly look: (vesselId: number, seen: SeenVessel) => void;
  readonly warnings: (vesselId: number) => readonly Warning[];
  readonly log: { error(facts: object, message: string): void };
}

/** What warnings are looked for in. */
export interface SeenVessel {
  readonly run: number | null;
  readonly judged: LiveJudgement | null;
  readonly sources: readonly SourceLine[];
  readonly nowMs: number;
}

export interface LiveEngine {
  vessels(): LiveVessels;
  run(run: number): LiveRun;
  /** Tells of every vessel once a second while something changed; the answer ends it. */
  watchVessels(tell: (vessels: LiveVessels) => void): () => void;
  watchRun(run: number, tell: (news: RunNews) => void): () => void;
  /** Resolves once every open run is followed. */
  ready(): Promise<void>;
  close(): Promise<void>;
}

const TURN_MS = 1000;
/** What warns is looked at so often when nothing was judged. */
const TURNS_BETWEEN_LOOKS = 5;
/** A run nobody watches is judged so seldom. */
const UNWATCHED_MS = 10_000;
/** What came late is folded in no more often than this: the whole run is folded again for it. */
const BEGIN_AGAIN_MS = 10_000;

/** Follows every vessel: its latest readings, and its open run judged with what is to come. */
export function startLiveEngine(parts: LiveEngineParts): LiveEngine {
  const { db, journal, clock, log } = parts;
  const followed = new Map<number, Followed>();
  const latest = new LatestReadings();
  const vesselWatchers = new Set<(vessels: LiveVessels) => void>();
  const starting: Promise<void>[] = [];
  let vesselsChanged = true;
  let turns = 0;
  for (const source of listLiveSources(db)) latest.begin(db, source);

  const endListening = journal.onKept((event) => {
    latest.take(event);
    vesselsChanged = true;
    for (const one of followed.values()) {
      if (one.follower.row.vesselId !== event.vesselId) continue;
      one.follower.take(event);
      one.changed = true;
      tellSoon(one, clock, log);
    }
  });

  const turn = () => {
    try {
      followOpenRuns();
      for (const one of followed.values()) advance(one);
      if (turns % TURNS_BETWEEN_LOOKS === 0) for (const { id } of vesselIds(db)) lookAt(id);
      turns += 1;
      if (vesselsChanged && vesselWatchers.size > 0) {
        vesselsChanged = false;
        const vessels = all();
        for (const tell of vesselWatchers) tell(vessels);
      }
    } catch (error) {
      // One vessel's fault must not stop the others from being followed at the next turn.
      log.error({ err: error }, 'a turn of the live engine failed');
    }
  };

  const followOpenRuns = () => {
    const open = listOpenRuns(db);
    for (const row of open) {
      const known = followed.get(row.run);
      if (known === undefined) followed.set(row.run, newlyFollowed(row, new Set()));
      else if (known.follower.row.endedMs !== row.endedMs) replace(known, row);
    }
    for (const [run, gone] of followed) {
      if (open.some((row) => row.run === run)) continue;
      stopTelling(gone);
      followed.delete(run);
      vesselsChanged = true;
      for (const tell of gone.watchers) tell({ kind: 'closed' });
    }
  };

  const replace = (known: Followed, row: LiveRunRow) => {
    stopTelling(known);
    followed.set(row.run, newlyFollowed(row, known.watchers));
  };

  const newlyFollowed = (row: LiveRunRow, watchers: Followed['watchers']): Followed => {
    vesselsChanged = true;
    const follower = new RunFollower(db, row);
    return {
      follower,
      watchers,
      judged: null,
      judgedMs: 0,
      begunMs: 0,
      beginnings: 0,
      changed: true,
      soon: null,
      asJudged: new Map(),
    };
  };

  const advance = (one: Followed) => {
    const nowMs = clock.now(one.follower.row.vesselId);
    if (one.follower.mustBegin && Math.abs(nowMs - one.begunMs) >= BEGIN_AGAIN_MS) {
      one.begunMs = nowMs;
      starting.push(beginFollowing(one));
      return;
    }
    tellScans(one, nowMs);
    const dueMs = one.watchers.size > 0 ? TURN_MS / 2 : UNWATCHED_MS;
    if (!one.changed || Math.abs(nowMs - one.judgedMs) < dueMs) return;
    judgeNow(one, nowMs);
  };

  const beginFollowing = async (one: Followed) => {
    try {
      await one.follower.begin();
    } catch (error) {
      // What cannot be folded now is tried again; the other vessels are followed meanwhile.
      log.error({ err: error, run: one.follower.row.run }, 'a run cannot be followed');
    }
  };

  const judgeNow = (one: Followed, nowMs: number) => {
    one.judgedMs = nowMs;
    one.changed = false;
    vesselsChanged = true;
    try {
      one.judged = one.follower.judge();
    } catch (error) {
      // A cycle and a load that do not fit are told where they are set; the scans go on being kept.
      if (!(error instanceof DomainError)) log.error({ err: error, run: one.follower.row.run }, 'cannot be judged');
      one.judged = null;
    }
    lookAt(one.follower.row.vesselId);
    if (one.watchers.size === 0) return;
    const state = stateOf(one);
    for (const tell of one.watchers) tell({ kind: 'state', state });
  };

  const lookAt = (vesselId: number) => {
    const one = ofVessel(vesselId);
    const nowMs = clock.now(vesselId);
    const run = one?.follower.row.run ?? null;
    parts.look(vesselId, { run, judged: one?.judged ?? null, sources: parts.sourceLines(vesselId), nowMs });
  };

  const ofVessel = (vesselId: number) =>
    [...followed.values()].find(({ follower }) => follower.row.vesselId === vesselId);

  const readingsOf = (vesselId: number) => {
    const nowMs = clock.now(vesselId);
    return listLiveSources(db, vesselId)
      .filter(({ settings }) => !settings.isResting)
      .flatMap((source: LiveSourceRow) => latest.of(source, nowMs));
  };

  const stateOf = ({ follower, judged }: Followed): LiveRun => {
    const { run, vesselId, begunMs, endedMs } = follower.row;
    return {
      at: isoFromMs(clock.now(vesselId)),
      run,
      vessel: findRunLine(db, run)?.vessel ?? '',
      state: endedMs === null ? 'running' : 'ended',
      begun: isoFromMs(begunMs),
      ended: endedMs === null ? null : isoFromMs(endedMs),
      scans: follower.scans,
      channels: [...follower.channels],
      readings: readingsOf(vesselId),
      sources: [...parts.sourceLines(vesselId)],
      evaluation: judged?.evaluation ?? null,
      forecasts: [...(judged?.forecasts ?? [])],
      warnings: [...parts.warnings(vesselId)],
    };
  };

  const all = (): LiveVessels => {
    const zone = zoneOfWorkshop(db);
    const vessels = listVessels(db).map(({ name, kind }): LiveVessel => {
      const vesselId = requireVessel(db, name);
      const readings = readingsOf(vesselId);
      const one = ofVessel(vesselId);
      return {
        vessel: name,
        kind,
        sources: [...parts.sourceLines(vesselId)],
        readings,
        run: one === undefined ? null : runLineOf(one, readings, zone),
        warnings: [...parts.warnings(vesselId)],
      };
    });
    return { at: isoFromMs(clock.now(0)), vessels };
  };

  const runLineOf = (
    { follower, judged, asJudged }: Followed,
    readings: readonly LiveReading[],
    zone: string,
  ): LiveVessel['run'] => {
    const { run, begunMs, endedMs } = follower.row;
    const line = findRunLine(db, run);
    const forecasts = judged?.forecasts ?? [];
    return {
      run,
      state: endedMs === null ? 'running' : 'ended',
      begun: isoFromMs(begunMs),
      cycle: line?.cycle ?? null,
      parts: line?.parts ?? [],
      verdict: judged?.evaluation.verdict ?? null,
      says: saysOf(judged?.evaluation ?? null, forecasts, zone),
      ...extremesOf(judged?.evaluation ?? null, forecasts, readings, asJudged),
    };
  };

  const requireFollowed = (run: number): Followed => {
    followOpenRuns();
    const one = followed.get(run);
    if (one !== undefined) return one;
    throw new DomainError('state-conflict', `Run ${run} is not being logged now`, { run });
  };

  const timer = setInterval(turn, TURN_MS);
  timer.unref();
  turn();
  return {
    vessels: all,
    run(run) {
      const one = requireFollowed(run);
      advance(one);
      if (one.judged === null || one.changed) judgeNow(one, clock.now(one.follower.row.vesselId));
      return stateOf(one);
    },
    watchVessels(tell) {
      vesselWatchers.add(tell);
      return () => vesselWatchers.delete(tell);
    },
    watchRun(run, tell) {
      const { watchers } = requireFollowed(run);
      watchers.add(tell);
      return () => watchers.delete(tell);
    },
    async ready() {
      turn();
      await Promise.all(starting.splice(0));
      turn();
    },
    async close() {
      clearInterval(timer);
      for (const one of followed.values()) stopTelling(one);
      endListening();
      await Promise.allSettled(starting);
    },
  };
}

function vesselIds(db: Db): { readonly id: number }[] {
  return listVessels(db).map(({ name }) => ({ id: requireVessel(db, name) }));
}
