import type { Db } from '../store/database.ts';
import { type LiveEngine, startLiveEngine } from './engine/live-engine.ts';
import type { LiveLogging } from './live-logging.ts';
import type { RunningSources } from './run-sources.ts';
import { startTelling, type Telling } from './warnings/tell-outside.ts';
import { openWarningDesk } from './warnings/warning-desk.ts';
import { watchProgram } from './warnings/watch-program.ts';

export interface FollowingParts {
  readonly db: Db;
  /** Where the database lies. */
  readonly folder: string;
  readonly live: LiveLogging;
  readonly sources: RunningSources;
  readonly clock: () => number;
  readonly log: { info(facts: object, message: string): void; error(facts: object, message: string): void };
}

/** What follows the vessels and says what a person should know of them. */
export interface Following {
  readonly engine: LiveEngine;
  readonly telling: Telling;
  close(): Promise<void>;
}

export function followLive({ db, folder, live, sources, clock, log }: FollowingParts): Following {
  const telling = startTelling({ db, clock, log });
  const desk = openWarningDesk({ db, tell: (warning) => telling.tell(warning) });
  const endWatch = watchProgram({ db, folder, live, desk });
  const engine = startLiveEngine({
    db,
    journal: live.journal,
    clock: live.steadyClock,
    sourceLines: (vesselId) => sources.lines(vesselId),
    look: (vesselId, seen) => desk.look(vesselId, seen),
    warnings: (vesselId) => desk.lasting(vesselId),
    log,
  });
  return {
    engine,
    telling,
    async close() {
      endWatch();
      await engine.close();
      await telling.close();
    },
  };
}
