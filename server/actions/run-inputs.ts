import type { Resin } from '../../models/cure/resin.ts';
import type { Cycle } from '../../models/cycle/cycle.ts';
import type { Layout } from '../../models/log/layout.ts';
import type { LiveSource } from '../../models/log/live-source.ts';
import type { ReadLog } from '../../models/log/readings.ts';
import { channelsOf } from '../../models/log/source-channels.ts';
import { asTemperature, temperaturesOfEmf } from '../../models/log/temperatures-of-emf.ts';
import type { MaterialRecords } from '../../models/material/ledger.ts';
import { calibratedLoad } from '../../models/run/calibrated-load.ts';
import type { InstrumentRecords } from '../../models/run/instrument-records.ts';
import type { Exclusion, Load } from '../../models/run/load.ts';
import type { SensorDecision } from '../contract/runs.ts';
import { oneHash, sha256Of, sha256OfDocument } from '../store/canonical.ts';
import { type CycleRow, readCycleDocument, requireCycle } from '../store/cycles.ts';
import type { Db } from '../store/database.ts';
import { readDecisions } from '../store/decisions.ts';
import type { EvaluationInputs } from '../store/evaluations.ts';
import { recordsOfInstruments } from '../store/instrument-records.ts';
import { findOpenRun } from '../store/live-runs.ts';
import { findLoad } from '../store/loads.ts';
import { recordsOfParts } from '../store/material-records.ts';
import { findResin } from '../store/resins.ts';
import { startOfRun } from '../store/runs.ts';
import { readSourceLog, readSources } from '../store/sources.ts';
import { vesselOfRun } from '../store/vessels.ts';
import { type MergedLog, mergeLogs } from './merge-logs.ts';
import { resinOfWorkshop } from './resin-of-workshop.ts';
import { shiftedLog } from './shifted-log.ts';

/** What people decided about suspects, as one document: hashed and kept with each evaluation. */
export interface DecisionsDocument {
  readonly format: 'dwellbook-decisions/1';
  readonly exclusions: readonly Exclusion[];
  /** Channels that somebody decided to go on believing. */
  readonly believed: readonly string[];
}

/** Everything a run is judged by, with its hashes. */
export interface RunInputs {
  /** As it is judged by: where it names no correction of its own, with that of the instruments' calibrations. */
  readonly load: Load;
  readonly cycle: Cycle;
  readonly resin: Resin | null;
  readonly decisions: DecisionsDocument;
  /** What the parts were laid up from; null where the cycle does not ask, or nothing of it is on record. */
  readonly materials: MaterialRecords | null;
  /** What its channels were read by; null where nothing of it is on record. */
  readonly instruments: InstrumentRecords | null;
  readonly hashes: EvaluationInputs;
  /** Of the bytes as they came. */
  readonly logSha256: string;
  /** Whether it is still being logged: what is to come is pending then. */
  readonly open: boolean;
  /** Scans of all its sources; without one there is nothing to judge. */
  readonly scans: number;
  /** The run whose sources, as they are stored, these are; null where they are about to change. */
  readonly storedRun: number | null;
  /** Reads the readings: the one costly part, put off until it is needed. */
  readonly readLog: () => ReadLog;
}

/** What a write is about to change, so that a judgement can be made before anything is written. */
export interface Changes {
  readonly load?: Load;
  readonly cycle?: CycleRow | null;
  readonly decisions?: readonly SensorDecision[];
  /** All sources as they would stand, in order. */
  readonly sources?: readonly SourceInput[];
  /** Whether it is judged as one that is still being logged. */
  readonly open?: boolean;
  readonly vesselId?: number | null;
}

/** One source's part in a judgement. */
export interface SourceInput {
  readonly n: number;
  readonly recorderId: number | null;
  readonly layout: Layout | LiveSource;
  readonly chainSha256: string;
  readonly layoutSha256: string;
  /** Added to the instants of its scans when it is read. */
  readonly shiftMs: number;
  /** Whether its channels may be those of an earlier source. */
  readonly fills: boolean;
  readonly scans: number;
  readonly fileSha256s: readonly string[];
  /** The first and the last scan, in whole ms. */
  readonly fromMs: number;
  readonly untilMs: number;
  readonly readLog: () => ReadLog;
}

/** The inputs of a run's judgement; null while it has no load or no cycle. */
export function gatherInputs(db: Db, run: number, changes: Changes = {}): RunInputs | null {
  const stored = findLoad(db, run);
  const written = changes.load ?? stored?.document;
  const cycleRow = changes.cycle === undefined ? cycleOf(db, stored?.cycle ?? null) : changes.cycle;
  if (written === undefined || cycleRow === null) return null;
  const cycle = readCycleDocument(db, cycleRow);
  const resin = cycle.cure === undefined ? undefined : findResin(db, cycle.cure.resin);
  const decisions = decisionsDocument([...readDecisions(db, run), ...(changes.decisions ?? [])]);
  const sources = changes.sources ?? sourceInputs(db, run);
  const untilMs = Math.max(...sources.map((source) => source.untilMs));
  const asks = cycle.material?.outLife === true;
  const materials = asks
    ? recordsOfParts(
        db,
        written.parts.map(({ part }) => part),
        untilMs,
        startOfRun(db, run),
      )
    : null;
  const instruments = instrumentsOf(db, run, sources, changes);
  const layouts = sources.flatMap(({ layout }) => channelsOf(layout)).map(asTemperature);
  return {
    load: calibratedLoad(written, instruments, layouts),
    cycle,
    resin: resin === undefined ? null : resinOfWorkshop(db, resin),
    decisions,
    materials,
    instruments,
    hashes: {
      readings: oneHash(sources.map(hashOfReadings)),
      layout: oneHash(sources.map(({ layoutSha256 }) => layoutSha256)),
      load: sha256OfDocument(written),
      cycle: cycleRow.sha256,
      resin: resin?.sha256 ?? null,
      decisions: sha256OfDocument(decisions),
      materials: materials === null ? null : sha256OfDocument(materials),
      instruments: instruments === null ? null : sha256OfDocument(instruments),
    },
    logSha256: oneHash(sources.flatMap(({ fileSha256s }) => fileSha256s)),
    open: changes.open ?? findOpenRun(db, run) !== undefined,
    scans: sources.reduce((sum, { scans }) => sum + scans, 0),
    storedRun: changes.sources === undefined ? run : null,
    readLog: () => readRunLog(sources),
  };
}

/** What is on record of the instruments of a run's channels. */
export function instrumentsOfRun(db: Db, run: number): InstrumentRecords | null {
  return instrumentsOf(db, run, sourceInputs(db, run), {});
}

function instrumentsOf(
  db: Db,
  run: number,
  sources: readonly SourceInput[],
  { vesselId = vesselOfRun(db, run) }: Changes,
): InstrumentRecords | null {
  const fromMs = Math.min(...sources.map((source) => source.fromMs));
  const untilMs = Math.max(...sources.map((source) => source.untilMs));
  if (!Number.isFinite(fromMs)) return null;
  return recordsOfInstruments(db, { vesselId, fromMs, untilMs }, sources.flatMap(recordedChannels));
}

/** The channels of a source, each with the recorder or live source it came through. */
export function recordedChannels({ layout, recorderId }: Pick<SourceInput, 'layout' | 'recorderId'>) {
  const source = layout.format === 'dwellbook-source/1' ? layout.name : null;
  return layout.channels.map(({ name }) => ({ channel: name, recorderId, source }));
}

/** The sources a run is judged by. */
export function sourceInputs(db: Db, run: number): SourceInput[] {
  return readSources(db, run).map((source) => ({
    n: source.n,
    recorderId: source.recorderId,
    layout: source.layout,
    chainSha256: source.chainSha256,
    layoutSha256: source.layoutSha256,
    shiftMs: source.shiftMs,
    fills: source.fills,
    scans: source.scans,
    // What was logged live has no file; its bytes are its scans.
    fileSha256s: source.files.length > 0 ? source.files.map(({ sha256 }) => sha256) : [source.chainSha256],
    fromMs: Date.parse(source.from),
    untilMs: Date.parse(source.until),
    readLog: () => shiftedLog(readSourceLog(db, source), source.shiftMs),
  }));
}

/** All readings of a run, of however many sources; where a recorder wrote emf, as the temperatures it stands for. */
export function readRunLog(sources: readonly SourceInput[]): ReadLog {
  return readRunSources(sources).log;
}

/** All readings of a run, and what was joined in them. */
export function readRunSources(sources: readonly SourceInput[]): MergedLog {
  return mergeLogs(
    sources.map(({ n, fills, readLog }) => {
      const log = readLog();
      return { n, fills, log: { ...log, readings: temperaturesOfEmf(log.readings) } };
    }),
  );
}

/** A source that is read by another clock is another input. */
function hashOfReadings({ chainSha256, shiftMs }: SourceInput): string {
  return shiftMs === 0 ? chainSha256 : sha256Of(`${chainSha256} ${shiftMs}`);
}

function cycleOf(db: Db, named: { readonly code: string; readonly issue: string } | null): CycleRow | null {
  return named === null ? null : requireCycle(db, named.code, named.issue);
}

/** The latest decision of each channel, in the order of the channels' names. */
function decisionsDocument(decisions: readonly SensorDecision[]): DecisionsDocument {
  const latest = new Map(decisions.map((decision) => [decision.channel, decision]));
  const ordered = [...latest.values()].sort((a, b) => (a.channel < b.channel ? -1 : 1));
  return {
    format: 'dwellbook-decisions/1',
    exclusions: ordered.flatMap(({ channel, from, reason, deed }) =>
      from === null ? [] : [{ channel, from, reason, by: deed.by }],
    ),
    believed: ordered.filter(({ decision }) => decision === 'keep').map(({ channel }) => channel),
  };
}
