import type { Resin } from '../cure/resin.ts';
import type { Cycle } from '../cycle/cycle.ts';
import { defaultSentences } from '../cycle/words-of-defaults.ts';
import { DomainError } from '../errors.ts';
import type { ReadLog } from '../log/readings.ts';
import type { MaterialRecords } from '../material/ledger.ts';
import type { RunChannel } from '../run/channel.ts';
import { foldReadings, type RunDigest } from '../run/digest.ts';
import { gapsOf } from '../run/gaps.ts';
import type { InstrumentRecords } from '../run/instrument-records.ts';
import type { Exclusion, Load, LoadPart } from '../run/load.ts';
import { parseBarometer } from '../run/parse-load.ts';
import { type SuspectedFault, suspectedFaults } from '../run/suspected-faults.ts';
import { calibrationSentences } from './calibration-sentences.ts';
import { type Suspect, setsOf, withUndecided } from './decide-suspects.ts';
import type { Evaluation, Finding, GapRecord, OpenDecision, PartEvaluation, SensorState } from './evaluation.ts';
import { iso, say, verdictOf } from './finding.ts';
import { judgePart, recordPart, sourcesOf } from './judge-part.ts';
import { changesAtMost, type Judgement, judgedSensor, longestGapMs } from './judgement.ts';
import { usesAir } from './log-gap-limit.ts';

/** Everything a judgement rests on besides the readings. */
export interface JudgementInputs {
  readonly cycle: Cycle;
  readonly load: Load | null;
  readonly resin: Resin | null;
  /** What the parts were laid up from, as their ledgers tell it. */
  readonly materials?: MaterialRecords | null;
  /** What the channels were read by. The load is corrected by it already: see `calibratedLoad`. */
  readonly instruments?: InstrumentRecords | null;
  /** Decisions that do not stand in the load document. */
  readonly exclusions: readonly Exclusion[];
  /** Channels that a person decided to go on believing although a fault was suspected. */
  readonly believed?: readonly string[];
  /** As written, `1009 mbar`; where null, that of the load. */
  readonly barometer: string | null;
  /** The run goes on. */
  readonly open: boolean;
}

/** Judges a whole log. The hashes are the caller's to fill in. */
export function evaluateLog(log: ReadLog, inputs: JudgementInputs): Evaluation {
  const digest = foldReadings(log.readings, inputs.load);
  const evaluation = judge(digest, inputs);
  return { ...evaluation, log: { ...evaluation.log, repairs: log.repairs, passedOver: log.passedOver } };
}

/** Judges what a run has shown so far. The digest must have been begun with the same load. */
export function judge(digest: RunDigest, inputs: JudgementInputs): Evaluation {
  const { cycle, resin } = inputs;
  if (digest.scanMs.length === 0) throw new DomainError('log-no-readings', 'The log holds no scan to judge');
  if (resin !== null && cycle.cure !== undefined && resin.code !== cycle.cure.resin) {
    throw new DomainError(
      'resin-not-the-cycles',
      `The cycle asks for the resin "${cycle.cure.resin}", not "${resin.code}"`,
      {
        asked: cycle.cure.resin,
        given: resin.code,
      },
    );
  }
  const setting = settingOf(digest, inputs);
  const { gapMs, exclusions, faults, suspects } = setting;
  const parts: PartEvaluation[] = [];
  const changes = new Map<string, Set<string>>();
  for (const part of partsOf(digest, inputs.load)) parts.push(evaluatePart(setting, part, changes));
  return {
    format: 'dwellbook-evaluation/1',
    verdict: verdictOf(parts.flatMap(({ findings }) => findings)),
    log: {
      sha256: null,
      from: iso(digest.log.from)!,
      until: iso(digest.log.until)!,
      scans: digest.scanMs.length,
      repairs: [],
      passedOver: [],
      gaps: gapRecords(digest, gapMs),
    },
    cycle: { code: cycle.code, issue: cycle.issue, sha256: null },
    resin: resin === null ? null : { code: resin.code, status: resin.source.status, citation: resin.source.citation },
    assumptions: [...assumptionsOf(digest, cycle, gapMs), ...calibrationSentences(digest, inputs.instruments ?? null)],
    sensors: sensorStates(digest, faults, suspects, exclusions),
    decisions: openDecisions(suspects, changes),
    parts,
  };
}

/** What one part's limits look at: with every suspect believed, and without each set of them that is undecided. */
export interface PartJudgements {
  readonly part: string | null;
  readonly asIs: Judgement;
  readonly without: readonly { readonly j: Judgement; readonly without: readonly string[] }[];
}

/** The judgements behind `judge`, for what is foretold of an open run. */
export function judgementsOf(digest: RunDigest, inputs: JudgementInputs): PartJudgements[] {
  const setting = settingOf(digest, inputs);
  return partsOf(digest, inputs.load).map((part) => {
    const asIs = judgementOf(setting, part, new Map());
    const without = setsOf(relevantSuspects(setting, asIs)).map((set) => ({
      j: judgementOf(setting, part, instantsOf(set)),
      without: set.map(({ channel }) => channel.layout.name),
    }));
    return { part: part?.part ?? null, asIs, without };
  });
}

interface Setting {
  readonly digest: RunDigest;
  readonly inputs: JudgementInputs;
  readonly gapMs: number;
  readonly exclusions: readonly Exclusion[];
  readonly excludedMs: ReadonlyMap<string, number>;
  readonly faults: ReadonlyMap<RunChannel, readonly SuspectedFault[]>;
  readonly suspects: readonly Suspect[];
}

function settingOf(digest: RunDigest, inputs: JudgementInputs): Setting {
  const gapMs = longestGapMs(inputs.cycle, digest);
  const exclusions = [...(inputs.load?.exclusions ?? []), ...inputs.exclusions];
  const excludedMs = exclusionInstants(digest, exclusions);
  const believed = new Set(inputs.believed ?? []);
  const faults = suspectedFaults(digest, gapMs);
  const suspects = [...faults]
    .filter(([{ layout }]) => !excludedMs.has(layout.name) && !believed.has(layout.name))
    .map(([channel, found]): Suspect => ({ channel, faults: found }));
  return { digest, inputs, gapMs, exclusions, excludedMs, faults, suspects };
}

/** Suspects among the sensors a part's limits look at. */
function relevantSuspects({ inputs, suspects }: Setting, { sensors, air }: Judgement): Suspect[] {
  const looked = usesAir(inputs.cycle) ? [...sensors, ...air] : sensors;
  return suspects.filter(({ channel }) => looked.some((s) => s.channel === channel));
}

/** From when on each of a set of suspects is left out. */
function instantsOf(set: readonly Suspect[]): Map<string, number> {
  return new Map(set.map(({ channel, faults }) => [channel.layout.name, faults[0]!.fromMs]));
}

function evaluatePart(setting: Setting, part: LoadPart | null, changes: Map<string, Set<string>>): PartEvaluation {
  const asIs = judgementOf(setting, part, new Map());
  const sources = sourcesOf(asIs);
  const relevant = relevantSuspects(setting, asIs);
  const findings =
    asIs.sensors.length === 0
      ? nothingToJudge(setting.inputs.cycle)
      : withUndecided(relevant, changes, (without) => {
          const j = judgementOf(setting, part, instantsOf(without));
          return judgePart(without.length === 0 ? sources : sourcesOf(j));
        });
  const { stages, windows, heatOn, cure, notEstimated } = recordPart(sources);
  return {
    part: part?.part ?? null,
    verdict: verdictOf(findings),
    withoutEstimates: verdictOf(findings.filter(({ limit }) => !limit.startsWith('cure/'))),
    judgedBy: asIs.sensors.map(({ name }) => name),
    ownSensors: asIs.ownSensors,
    stages,
    windows,
    heatOn,
    findings,
    cure,
    ...(notEstimated.length === 0 ? {} : { notEstimated }),
  };
}

function judgementOf(
  { digest, inputs, gapMs, excludedMs }: Setting,
  part: LoadPart | null,
  without: ReadonlyMap<string, number>,
): Judgement {
  const { cycle } = inputs;
  const isGuarded = cycle.decision?.rule === 'guarded';
  const untilMs = ({ layout }: RunChannel) =>
    Math.min(
      excludedMs.get(layout.name) ?? Number.POSITIVE_INFINITY,
      without.get(layout.name) ?? Number.POSITIVE_INFINITY,
    );
  const sensor = (channel: RunChannel) => judgedSensor(channel, digest, untilMs(channel), gapMs, isGuarded);
  const ofRole = digest.withRole(cycle.judgedBy);
  const own = part === null ? [] : ofRole.filter(({ parts }) => parts.includes(part.part));
  const barometer = inputs.barometer ?? inputs.load?.barometer ?? null;
  return {
    digest,
    cycle,
    part,
    resin: inputs.resin,
    materials: inputs.materials ?? null,
    instruments: inputs.instruments ?? null,
    log: digest.log,
    isOpen: inputs.open,
    longestGapMs: gapMs,
    changesAtMost: changesAtMost(cycle),
    barometerPa: barometer === null ? null : parseBarometer(barometer),
    sensors: (own.length > 0 ? own : ofRole).map(sensor),
    air: digest.withRole('air').map(sensor),
    ownSensors: own.length > 0,
  };
}

/** The parts of a load; of the layout where only that names some; one nameless part where nobody does. */
function partsOf(digest: RunDigest, load: Load | null): (LoadPart | null)[] {
  if (load !== null && load.parts.length > 0) return [...load.parts];
  const named = new Set(digest.channels.flatMap(({ parts }) => parts));
  return named.size === 0 ? [null] : [...named].sort().map((part) => ({ part }));
}

function exclusionInstants(digest: RunDigest, exclusions: readonly Exclusion[]): Map<string, number> {
  const instants = new Map<string, number>();
  for (const { channel, from } of exclusions) {
    if (!digest.channels.some(({ layout }) => layout.name === channel)) {
      const names = digest.channels.map(({ layout }) => layout.name).join(', ');
      throw new DomainError('channel-unknown', `The exclusion names the channel "${channel}"; the log has ${names}`, {
        channel,
      });
    }
    instants.set(channel, Math.min(Date.parse(from), instants.get(channel) ?? Number.POSITIVE_INFINITY));
  }
  return instants;
}

function nothingToJudge(cycle: Cycle): Finding[] {
  const because = `The log has no channel of the role "${cycle.judgedBy}" to judge by.`;
  const cannot = {
    outcome: 'cannot-tell' as const,
    observed: null,
    possible: null,
    atLeast: null,
    atMost: null,
    unit: '',
    margin: null,
  };
  return [{ limit: 'sensors/working', ...cannot, uncertainty: null, sensor: null, from: null, until: null, because }];
}

function sensorStates(
  digest: RunDigest,
  faults: ReadonlyMap<RunChannel, readonly SuspectedFault[]>,
  suspects: readonly Suspect[],
  exclusions: readonly Exclusion[],
): SensorState[] {
  return digest.channels.map((channel) => {
    const { name, role } = channel.layout;
    const exclusion = exclusions.find((one) => one.channel === name) ?? null;
    const isSuspect = suspects.some((suspect) => suspect.channel === channel);
    return {
      channel: name,
      role,
      state: exclusion !== null ? 'excluded' : isSuspect ? 'suspect' : 'working',
      faults: (faults.get(channel) ?? []).map(({ kind, fromMs, because }) => ({ kind, from: iso(fromMs)!, because })),
      exclusion: exclusion === null ? null : { from: exclusion.from, reason: exclusion.reason, by: exclusion.by },
    };
  });
}

/** Suspects on whom a finding hangs; whatever is decided on the others, nothing changes. */
function openDecisions(
  suspects: readonly Suspect[],
  changes: ReadonlyMap<string, ReadonlySet<string>>,
): OpenDecision[] {
  return suspects.flatMap(({ channel, faults }) => {
    const { name } = channel.layout;
    const changed = changes.get(name);
    if (changed === undefined) return [];
    const { kind, fromMs, because } = faults[0]!;
    return [{ channel: name, kind, from: iso(fromMs)!, because, changes: [...changed] }];
  });
}

function gapRecords(digest: RunDigest, gapMs: number): GapRecord[] {
  return digest.channels.flatMap(({ layout, track }) =>
    gapsOf(track, gapMs, digest.log)
      .filter(({ from, until }) => until - from > gapMs)
      .map(({ from, until }) => ({ channel: layout.name, from: iso(from)!, until: iso(until)! })),
  );
}

/** The cycle's defaults in words, and what they came to in this run. */
function assumptionsOf(digest: RunDigest, cycle: Cycle, gapMs: number): string[] {
  const sentences = defaultSentences(cycle);
  if (cycle.log?.longestGap === undefined)
    sentences.push(`In this log a gap is a stretch of more than ${say(gapMs / 1000)} s without readings.`);
  const unknown = digest.channels.filter(({ uncertainty }) => uncertainty === null).map(({ layout }) => layout.name);
  if (cycle.decision?.rule === 'guarded' && unknown.length > 0) {
    sentences.push(`Judged as indicated, because no uncertainty is known: ${unknown.join(', ')}.`);
  }
  return sentences;
}
