import type { LiveScan, LiveSource } from '../../models/log/live-source.ts';
import type { Pushed, SourceLine, SourceView, Tried } from '../contract/live.ts';
import type { Db } from '../store/database.ts';
import { isoFromMs } from '../store/instants.ts';
import { findLastScan } from '../store/live-readings.ts';
import { firstScanUnder } from '../store/live-settings-spans.ts';
import { findPassword, type LiveSourceRow, listLiveSources, requireLiveSource } from '../store/live-sources.ts';
import type { LiveLogging } from './live-logging.ts';
import { type SourceCondition, sourceCondition } from './source-condition.ts';
import type { InventVessel } from './sources/invented-vessel.ts';
import { shownChannels } from './sources/shown-channels.ts';
import { driverOf, type KeptScans, type OneScan, type RunningSource, type SourceDriver } from './sources/source.ts';
import { vesselTime } from './vessel-time.ts';

export interface RunSourcesParts {
  readonly db: Db;
  readonly live: Pick<LiveLogging, 'journal' | 'steadyClock' | 'rolling'>;
  /** Makes invented vessels; null in a real workshop. */
  readonly inventVessel: InventVessel | null;
  readonly log: { info(facts: object, message: string): void; error(facts: object, message: string): void };
}

/** Everything that is listened to. */
export interface RunningSources {
  /** Begins all that is to be listened to. */
  begin(): void;
  /** Sources as they do now; of one vessel, or all. */
  lines(vesselId?: number): SourceLine[];
  view(sourceId: number): SourceView;
  /** Begins a source, or begins it again by settings that changed, or ends it where it rests. */
  refresh(sourceId: number): Promise<void>;
  /** One reading by settings nobody has saved. */
  tryOut(vesselId: number, document: LiveSource, password: string | undefined): Promise<Tried>;
  close(): Promise<void>;
}

/** Sentences kept of a source, the latest. */
const MOST_NOTES = 50;

interface Listened {
  condition: SourceCondition;
  readonly notes: { at: string; text: string }[];
  /** What follows what, so that a source never runs twice. */
  turn: Promise<void>;
  running: RunningSource | null;
}

/** Listens to what the store says is to be listened to. */
export function runSources(parts: RunSourcesParts): RunningSources {
  const { db, live, inventVessel, log } = parts;
  const { journal, steadyClock } = live;
  const listened = new Map<number, Listened>();
  let isOver = false;

  const listenedOf = ({ id, vesselId, settings }: LiveSourceRow): Listened => {
    const known = listened.get(id);
    if (known !== undefined) return known;
    const condition = sourceCondition(settings.document.intervalS, steadyClock.now(vesselId));
    const one: Listened = { condition, notes: [], turn: Promise.resolve(), running: null };
    listened.set(id, one);
    return one;
  };
  const endListening = journal.onKept(({ vesselId, settings }) => {
    listened.get(settings.sourceId)?.condition.sent(steadyClock.now(vesselId));
  });

  const begin = async (source: LiveSourceRow, one: Listened): Promise<void> => {
    const { id, vesselId, settings } = source;
    const { document } = settings;
    const now = () => steadyClock.now(vesselId);
    one.condition = sourceCondition(document.intervalS, now());
    const driver = settings.isResting || isOver ? null : await driverOf(document.reads.kind);
    if (driver === null) return;
    const note = (text: string) => {
      one.notes.push({ at: isoFromMs(now()), text });
      if (one.notes.length > MOST_NOTES) one.notes.shift();
    };
    // What can be read again is not held in memory while the disk is full.
    const hold = document.reads.kind !== 'growing-files';
    const take = async (scans: readonly LiveScan[]): Promise<Pushed> => {
      const pushed = await journal.take(id, scans, { settings, hold });
      const [first] = pushed.refused;
      if (first) note(`${pushed.refused.length} scans were not kept; the first, of ${first.at}: ${first.because}`);
      return pushed;
    };
    one.running = driver.start({
      document,
      password: findPassword(db, id),
      take,
      tell: (state, because) => one.condition.told(state, because, now()),
      note,
      fault: (error) => log.error({ err: error, source: source.name }, 'a source met a fault of the program'),
      now,
      kept: keptOf(db, source),
      inventVessel,
    });
    log.info({ source: source.name, kind: document.reads.kind }, 'listening');
  };

  const refresh = (sourceId: number): Promise<void> => {
    const source = requireLiveSource(db, sourceId);
    const one = listenedOf(source);
    if (inventVessel !== null) leadVessel(parts, source);
    one.turn = one.turn.then(async () => {
      await one.running?.close();
      one.running = null;
      try {
        await begin(requireLiveSource(db, sourceId), one);
      } catch (error) {
        // One source that cannot be begun must not keep the others from being listened to.
        one.condition.told('cannot-be-reached', (error as Error).message, steadyClock.now(source.vesselId));
        log.error({ err: error, source: source.name }, 'a source could not be begun');
      }
    });
    return one.turn;
  };

  const lineOf = (source: LiveSourceRow): SourceLine => {
    const { id, name, vessel, vesselId, settings } = source;
    const { scans, fromMs } = live.rolling.keptOf(id);
    const last = findLastScan(db, id);
    return {
      id,
      name,
      vessel,
      kind: settings.document.reads.kind,
      ...conditionOf(source, listenedOf(source).condition, steadyClock.now(vesselId)),
      lastScan: last === undefined ? null : isoFromMs(last.timeMs),
      kept: scans,
      keptFrom: fromMs === null ? null : isoFromMs(fromMs),
    };
  };

  const conditionOf = ({ settings }: LiveSourceRow, condition: SourceCondition, nowMs: number) => {
    if (settings.isResting) return { state: 'resting' as const, since: settings.at, because: null };
    const keeps = journal.state();
    if (!keeps.keeps) return { state: 'cannot-be-kept' as const, since: keeps.since, because: keeps.because };
    const { state, sinceMs, because } = condition.at(nowMs);
    return { state, since: isoFromMs(sinceMs), because };
  };

  if (inventVessel !== null) for (const source of listLiveSources(db)) leadVessel(parts, source);

  return {
    begin() {
      for (const { id } of listLiveSources(db)) void refresh(id);
    },
    refresh,
    lines: (vesselId) => listLiveSources(db, vesselId).map(lineOf),
    view(sourceId) {
      const source = requireLiveSource(db, sourceId);
      const { document, sha256, at, by } = source.settings;
      const last = findLastScan(db, sourceId);
      const isOfThese = last !== undefined && last.settingsId === source.settings.id;
      const figures = isOfThese ? last.figures : new Float64Array(document.channels.length).fill(NaN);
      return {
        ...lineOf(source),
        document,
        sha256,
        set: { at, by },
        latest: shownChannels(document, { figures, because: [] }).map(({ because: _because, ...one }) => one),
        notes: [...listenedOf(source).notes],
      };
    },
    async tryOut(vesselId, document, password) {
      const driver = await driverOf(document.reads.kind);
      const now = () => steadyClock.now(vesselId);
      const one = driver === null ? nothing(document, COMES_BY_ITSELF) : await once(driver);
      return { at: isoFromMs(now()), channels: shownChannels(document, one) };

      async function once({ readOnce }: SourceDriver): Promise<OneScan> {
        try {
          return await readOnce({ document, password, now, inventVessel });
        } catch (error) {
          // Whatever it met is what whoever sets it up wants to know.
          return nothing(document, (error as Error).message);
        }
      }
    },
    async close() {
      isOver = true;
      endListening();
      for (const one of listened.values()) {
        await one.turn;
        await one.running?.close();
      }
    },
  };
}

/** An invented vessel has a time of its own from the start on, so that nothing is stamped by another before. */
function leadVessel({ db, live: { steadyClock } }: RunSourcesParts, source: LiveSourceRow): void {
  const { reads } = source.settings.document;
  if (reads.kind !== 'practice') return;
  const lastMs = findLastScan(db, source.id)?.timeMs ?? -Infinity;
  steadyClock.lead(source.vesselId, (nowMs) => vesselTime(Math.max(nowMs, lastMs), reads.speed));
}

function keptOf(db: Db, { id, settings }: LiveSourceRow): KeptScans | null {
  const last = findLastScan(db, id);
  if (last === undefined) return null;
  const isPractice = settings.document.reads.kind === 'practice';
  return { firstMs: isPractice ? firstScanUnder(db, id, settings.id) : null, lastMs: last.timeMs };
}

const COMES_BY_ITSELF = 'It cannot be asked: its readings are sent, or entered by a person';

function nothing({ channels }: LiveSource, because: string): OneScan {
  return { figures: new Float64Array(channels.length).fill(NaN), because: channels.map(() => because) };
}
