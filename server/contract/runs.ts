import * as z from 'zod';
import { CHANNEL_ROLES } from '../../models/log/layout.ts';
import { PASSED_OVER_KINDS, REPAIR_KINDS } from '../../models/log/readings.ts';
import { FAULT_KINDS } from '../../models/run/fault-kinds.ts';
import {
  cycleDocument,
  evaluationDocument,
  layoutDocument,
  loadDocument,
  resinDocument,
  sourceDocument,
} from './documents.ts';
import { countInQuery, deed, instant, name, reason, runNumber, sha256, verdict } from './scalars.ts';

export const RUN_STATES = ['awaiting-load', 'awaiting-cycle', 'judged'] as const;

/** A run on one line of a list. */
export const runLine = z.object({
  run: runNumber,
  vessel: z.string().nullable(),
  recorder: z.string().nullable(),
  /** First and last scan. */
  from: instant,
  until: instant,
  scans: z.number(),
  workOrder: z.string().nullable(),
  cycle: z.object({ code: z.string(), issue: z.string() }).nullable(),
  parts: z.array(z.string()),
  state: z.enum(RUN_STATES),
  /** Of a run that is logged as it happens, until it is closed; null of any other. */
  live: z.enum(['running', 'ended']).nullable(),
  /** Of the latest evaluation; null before the first. */
  verdict: verdict.nullable(),
  /** Suspected sensors nobody has decided on yet. */
  undecided: z.number(),
  /** Names of the limits that are not met, worst first, and of those that cannot be told. */
  notMet: z.array(z.string()),
  cannotTell: z.array(z.string()),
});
export type RunLine = z.infer<typeof runLine>;

export const runsQuery = z.strictObject({
  vessel: z.string().optional(),
  cycle: z.string().optional(),
  part: z.string().optional(),
  verdict: verdict.optional(),
  state: z.enum(RUN_STATES).optional(),
  /** Runs whose first scan is in [from, until). */
  from: instant.optional(),
  until: instant.optional(),
  /** Goes on after this many: the `next` of the page before. */
  after: z.coerce.number().int().min(0).default(0),
  limit: countInQuery(200, 50),
});

export type RunsQuery = z.output<typeof runsQuery>;

export const runs = z.object({ runs: z.array(runLine), total: z.number(), next: z.number().nullable() });
export type Runs = z.infer<typeof runs>;

const lines = z.tuple([z.number(), z.number()]).readonly();

export const runFile = z.object({
  /** Counted from 1 through the run: the file's place in its address. */
  n: z.number(),
  name: z.string(),
  bytes: z.number(),
  sha256,
});
export type RunFile = z.infer<typeof runFile>;

/** Where readings of a run came from: one recorder or live source, one document that says how, one chain. */
export const runSource = z.object({
  n: z.number(),
  recorder: z.string().nullable(),
  /** How its files are read; of what was logged live, the document of its source. */
  layout: z.union([layoutDocument, sourceDocument]),
  layoutSha256: sha256,
  files: z.array(runFile),
  /** SHA-256 over the canonical form of the scans in order. */
  chainSha256: sha256,
  scans: z.number(),
  from: instant,
  until: instant,
  repairs: z.array(
    z.object({ kind: z.enum(REPAIR_KINDS), lines, file: z.number(), scans: z.number(), because: z.string() }),
  ),
  passedOver: z.array(z.object({ kind: z.enum(PASSED_OVER_KINDS), file: z.number(), lines })),
  /**
   * Where its channels are those of an earlier source: it fills what that one did not read. What was added to its
   * instants, and why; `from` and `until` have it in them.
   */
  joined: z.object({ shiftS: z.number(), because: z.string() }).nullable(),
  recorded: deed,
});
export type RunSource = z.infer<typeof runSource>;

export const DECISIONS = ['exclude', 'keep'] as const;

/** A channel that more than one source read: who said which stretch, and where they differ. */
export const joinedChannel = z.object({
  channel: z.string(),
  /** In order of time; `source` is the `n` of a source. */
  stretches: z.array(z.object({ source: z.number(), from: instant, until: instant, readings: z.number() })),
  /** What each later source read where the earlier ones did, in the channel's unit. */
  differences: z.array(
    z.object({
      source: z.number(),
      unit: z.string(),
      compared: z.number(),
      /** Those further apart than the uncertainties of both together; where one is not known, than 0. */
      differing: z.number(),
      toleranceOfBoth: z.number().nullable(),
      /** Later less earlier. */
      largest: z.object({ difference: z.number(), at: instant }).nullable(),
    }),
  ),
});
export type JoinedChannel = z.infer<typeof joinedChannel>;

/** What a person decided about a suspected sensor; the latest of a channel holds. */
export const sensorDecision = z.object({
  channel: z.string(),
  decision: z.enum(DECISIONS),
  kind: z.enum(FAULT_KINDS).nullable(),
  /** The instant an exclusion holds from; null for `keep`. */
  from: instant.nullable(),
  reason: z.string(),
  deed,
});
export type SensorDecision = z.infer<typeof sensorDecision>;

export const evaluationLine = z.object({
  id: z.number(),
  deed,
  engine: z.string(),
  verdict,
  /** What made it necessary: `load set`, `TC3 excluded`, `judged again` … */
  because: z.string(),
  /** SHA-256 of every input: readings, layout, load, cycle, resin, decisions. */
  inputs: z.record(z.string(), sha256.nullable()),
  sha256,
});
export type EvaluationLine = z.infer<typeof evaluationLine>;

export const evaluationView = evaluationLine.extend({ document: evaluationDocument });
export type EvaluationView = z.infer<typeof evaluationView>;

export const note = z.object({ deed, at: instant, text: z.string() });
export type Note = z.infer<typeof note>;

export const MARGIN_KINDS = ['log', 'heat-on', 'dwell', 'gel', 'decision', 'note'] as const;

/** One entry of the page's margin: what happened at an instant. */
export const marginEntry = z.object({ at: instant, kind: z.enum(MARGIN_KINDS), text: z.string() });
export type MarginEntry = z.infer<typeof marginEntry>;

export const runView = runLine.extend({
  channels: z.array(z.object({ name: z.string(), role: z.enum(CHANNEL_ROLES), unit: z.string(), source: z.number() })),
  sources: z.array(runSource),
  joined: z.array(joinedChannel),
  load: loadDocument.nullable(),
  loadSet: deed.nullable(),
  cycleIssue: z
    .object({
      code: z.string(),
      issue: z.string(),
      status: z.enum(['draft', 'released', 'withdrawn']),
      sha256,
      document: cycleDocument,
    })
    .nullable(),
  resin: z.object({ code: z.string(), sha256, document: resinDocument }).nullable(),
  evaluation: evaluationView.nullable(),
  evaluations: z.array(evaluationLine),
  decisions: z.array(sensorDecision),
  notes: z.array(note),
  margin: z.array(marginEntry),
});
export type RunView = z.infer<typeof runView>;

/** What a part is, beside its place in the load; kept with the part. */
export const particulars = z.strictObject({
  part: name,
  title: z.string().max(200).optional(),
  drawing: z.string().max(120).optional(),
  drawingIssue: z.string().max(40).optional(),
  tool: z.string().max(120).optional(),
});
export type Particulars = z.infer<typeof particulars>;

export const setLoadRequest = z.strictObject({
  load: loadDocument,
  /** The issue the load was cured to; null where it is not known yet. */
  cycle: z.strictObject({ code: name, issue: name }).nullable(),
  vessel: name.nullish(),
  particulars: z.array(particulars).optional(),
  /** Asked for where a load was set before. */
  reason: reason.optional(),
});
export type SetLoadRequest = z.infer<typeof setLoadRequest>;

export const decideSuspectRequest = z.discriminatedUnion('decision', [
  z.strictObject({
    decision: z.literal('exclude'),
    channel: name,
    kind: z.enum(FAULT_KINDS).nullish(),
    from: instant,
    reason,
  }),
  z.strictObject({ decision: z.literal('keep'), channel: name, kind: z.enum(FAULT_KINDS).nullish(), reason }),
]);
export type DecideSuspectRequest = z.infer<typeof decideSuspectRequest>;

export const readAgainRequest = z.strictObject({ layout: layoutDocument, reason });
export type ReadAgainRequest = z.infer<typeof readAgainRequest>;

/** Nothing need be said. */
export const closeRunRequest = z.strictObject({});

export const judgeAgainRequest = z.strictObject({ reason: reason.optional() });
export type JudgeAgainRequest = z.infer<typeof judgeAgainRequest>;

/** `at` is the instant of the run the note is about; default: now. */
export const addNoteRequest = z.strictObject({ text: reason, at: instant.optional() });
export type AddNoteRequest = z.infer<typeof addNoteRequest>;
