import { statfs } from 'node:fs/promises';
import { clockTimeIn } from '../../../models/chart/clock-time.ts';
import type { Db } from '../../store/database.ts';
import { findLastScan } from '../../store/live-readings.ts';
import { listOpenRuns } from '../../store/live-runs.ts';
import { listLiveSources } from '../../store/live-sources.ts';
import { zoneOfWorkshop } from '../../store/workshop.ts';
import type { LiveLogging, LiveNotice } from '../live-logging.ts';
import type { Claim } from './claims.ts';
import type { WarningDesk } from './warning-desk.ts';

export interface WatchedProgram {
  readonly db: Db;
  /** Where the database lies. */
  readonly folder: string;
  readonly live: Pick<LiveLogging, 'journal' | 'steadyClock' | 'onNotice'>;
  readonly desk: WarningDesk;
}

const TURN_MS = 10_000;
const LOW_BYTES = 1024 ** 3;

/** Watches what all vessels share: the disk, the clock, and that the program itself was away. */
export function watchProgram({ db, folder, live, desk }: WatchedProgram): () => void {
  const { journal, steadyClock } = live;
  const now = () => steadyClock.now(0);
  tellRestart(db, desk, now());
  const endNotices = live.onNotice((notice) => {
    const claim = claimOf(notice);
    if (claim !== null) desk.note(claim, now(), 'vesselId' in notice ? notice.vesselId : null);
  });
  let isOver = false;
  const turn = async () => {
    const claims: Claim[] = [];
    const state = journal.state();
    if (!state.keeps) {
      const text = `Scans cannot be kept: ${state.because}. ${state.held} wait in memory; make room on the disk.`;
      claims.push({ kind: 'cannot-be-kept', subject: 'disk', text });
    }
    const freeBytes = await freeBytesIn(folder);
    if (isOver) return;
    if (freeBytes < LOW_BYTES) {
      const text = `${Math.floor(freeBytes / 1024 ** 2)} MB are left on the disk of the database.`;
      claims.push({ kind: 'disk-low', subject: 'disk', text });
    }
    desk.lookAtProgram(claims, now());
  };
  const timer = setInterval(() => void turn(), TURN_MS);
  timer.unref();
  void turn();
  return () => {
    isOver = true;
    clearInterval(timer);
    endNotices();
  };
}

async function freeBytesIn(folder: string): Promise<number> {
  const { bavail, bsize } = await statfs(folder);
  return bavail * bsize;
}

/** A run that was open when the program went away goes on; the stretch nothing was kept of is told. */
function tellRestart(db: Db, desk: WarningDesk, nowMs: number): void {
  const { time } = clockTimeIn(zoneOfWorkshop(db));
  for (const { run, vesselId, endedMs } of listOpenRuns(db)) {
    if (endedMs !== null) continue;
    const lastMs = Math.max(...listLiveSources(db, vesselId).map(({ id }) => findLastScan(db, id)?.timeMs ?? 0));
    const since = lastMs > 0 ? ` The last scan kept before is of ${time(lastMs)}; what is missing is a gap.` : '';
    desk.note(
      {
        kind: 'program-restarted',
        subject: `run ${run}`,
        text: `The program was started again; run ${run} goes on.${since}`,
      },
      nowMs,
      vesselId,
    );
  }
}

function claimOf(notice: LiveNotice): Claim | null {
  switch (notice.kind) {
    case 'clock-jumped': {
      const way = notice.byMs > 0 ? 'forward' : 'back';
      const text = `The clock of this machine was set ${way} by ${seconds(notice.byMs)}. Runs that are open keep the time they had.`;
      return { kind: 'clock-jumped', subject: 'clock', text };
    }
    case 'clock-behind': {
      const text = `The clock of this machine stands ${seconds(notice.byMs)} before the last scan kept; stamps go on after that scan.`;
      return { kind: 'clock-jumped', subject: 'clock', text };
    }
    case 'sender-ahead': {
      const text = `The clock of a sender is ${seconds(notice.byMs)} ahead of this machine's; its stamps are kept as they are sent.`;
      return { kind: 'clock-jumped', subject: `source ${notice.sourceId}`, text };
    }
    case 'damaged': {
      const text = `Scans of run ${notice.run} are not as they were kept: their hash differs. Keep a copy of the database and have it looked at.`;
      return { kind: 'damaged', subject: `run ${notice.run}`, text };
    }
    case 'cannot-be-kept':
    case 'kept-again':
      // Told as long as it lasts, by the state of the journal.
      return null;
  }
}

function seconds(byMs: number): string {
  const s = Math.round(Math.abs(byMs) / 1000);
  return s < 120 ? `${s} s` : `${Math.round(s / 60)} min`;
}
