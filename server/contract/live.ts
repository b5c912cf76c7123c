import * as z from 'zod';
import { SOURCE_KINDS } from '../../models/log/live-source.ts';
import { evaluationDocument, forecastDocument, loadDocument, sourceDocument } from './documents.ts';
import { particulars } from './runs.ts';
import { deed, instant, name, reason, runNumber, sha256 } from './scalars.ts';

export const SOURCE_STATES = ['sending', 'silent', 'cannot-be-reached', 'cannot-be-kept', 'resting'] as const;

/** A live source on one line: what it is and how it does. */
export const sourceLine = z.object({
  id: z.number(),
  name: z.string(),
  vessel: z.string(),
  kind: z.enum(SOURCE_KINDS),
  state: z.enum(SOURCE_STATES),
  /** Since when it is in that state. */
  since: instant,
  /** Why, in words a workshop would understand; null while it sends. */
  because: z.string().nullable(),
  lastScan: instant.nullable(),
  /** Scans kept in the rolling store, and from when. */
  kept: z.number(),
  keptFrom: instant.nullable(),
});
export type SourceLine = z.infer<typeof sourceLine>;

export const sourceView = sourceLine.extend({
  document: sourceDocument,
  sha256,
  set: deed,
  /** Latest figures: as they came, and scaled into the channel's unit; null is absent. */
  latest: z.array(
    z.object({ channel: z.string(), unit: z.string(), raw: z.number().nullable(), value: z.number().nullable() }),
  ),
  /** What was repaired or left out since the program began to listen, the latest last. */
  notes: z.array(z.object({ at: instant, text: z.string() })),
});
export type SourceView = z.infer<typeof sourceView>;

export const sources = z.object({ sources: z.array(sourceLine) });
export type Sources = z.infer<typeof sources>;

/** A password is kept beside the document and is never shown again. */
export const setSourceRequest = z.strictObject({ document: sourceDocument, password: z.string().max(200).optional() });
export type SetSourceRequest = z.infer<typeof setSourceRequest>;

/** A source that rests is not listened to. */
export const restSourceRequest = z.strictObject({ resting: z.boolean(), reason });
export type RestSourceRequest = z.infer<typeof restSourceRequest>;

/** One reading by settings nobody has saved: raw beside scaled, or the problem it met. */
export const tryRequest = setSourceRequest;
export const tried = z.object({
  at: instant,
  channels: z.array(
    z.object({
      channel: z.string(),
      unit: z.string(),
      raw: z.number().nullable(),
      value: z.number().nullable(),
      because: z.string().nullable(),
    }),
  ),
});
export type Tried = z.infer<typeof tried>;

/** A sender's key to one vessel. The key itself is shown once, when it is made; only its hash is kept. */
export const senderKey = z.object({
  id: z.number(),
  name: z.string(),
  made: deed,
  revoked: deed.nullable(),
  lastUsed: instant.nullable(),
});
export type SenderKey = z.infer<typeof senderKey>;
export const senderKeys = z.object({ keys: z.array(senderKey) });
export type SenderKeys = z.infer<typeof senderKeys>;
export const makeKeyRequest = z.strictObject({ name });
export const madeKey = senderKey.extend({ key: z.string() });
export type MadeKey = z.infer<typeof madeKey>;
export const revokeKeyRequest = z.strictObject({ reason });

/** Scans as a sender pushes them, with `Authorization: Bearer KEY`. Sending one again does no harm. */
export const pushRequest = z.strictObject({
  /** Name of the source; may be left out where the vessel has one push source. */
  source: name.optional(),
  scans: z
    .array(
      z.strictObject({
        /** By the sender's clock. */
        at: instant,
        sequence: z.number().int().min(0).optional(),
        /** By the channels' keys; a key that is left out, or null, is an absent reading. */
        values: z.record(z.string(), z.number().nullable()),
      }),
    )
    .min(1)
    .max(10_000),
});
export type PushRequest = z.infer<typeof pushRequest>;
/** Everything named here is on the disk. */
export const pushed = z.object({
  /** Scans that were new, and scans that were there already. */
  kept: z.number(),
  known: z.number(),
  /** Scans whose instant is taken by other figures, or that no figure can be made of: not kept. */
  refused: z.array(z.object({ at: instant, because: z.string() })),
});
export type Pushed = z.infer<typeof pushed>;

/** What a person read off a gauge. */
export const enterRequest = z.strictObject({
  at: instant.optional(),
  values: z.record(z.string(), z.number().nullable()),
});
export type EnterRequest = z.infer<typeof enterRequest>;

/** Begins a run in a vessel, now or from an instant the rolling store still holds. */
export const beginRunRequest = z.strictObject({
  from: instant.optional(),
  load: loadDocument.nullable(),
  cycle: z.strictObject({ code: name, issue: name }).nullable(),
  particulars: z.array(particulars).optional(),
});
export type BeginRunRequest = z.infer<typeof beginRunRequest>;

export const endRunRequest = z.strictObject({ at: instant.optional(), reason: reason.optional() });
export type EndRunRequest = z.infer<typeof endRunRequest>;

/** What is to be seen before the door closes: told, not enforced. */
export const DOOR_CHECK_OUTCOMES = ['in-order', 'not-in-order', 'not-on-record'] as const;
export const doorCheck = z.object({
  /** `sensors-agree`, `calibration`, `survey`, `material-life`, `leak-test`, `enough-sensors`, `sources-sending` … */
  check: z.string(),
  outcome: z.enum(DOOR_CHECK_OUTCOMES),
  because: z.string(),
});
export type DoorCheck = z.infer<typeof doorCheck>;
export const doorChecksRequest = z.strictObject({
  load: loadDocument.nullable(),
  cycle: z.strictObject({ code: name, issue: name }).nullable(),
});
export const doorChecks = z.object({ checks: z.array(doorCheck) });
export type DoorChecks = z.infer<typeof doorChecks>;

export const WARNING_KINDS = [
  'approaching-limit',
  'limit-broken',
  'sensor-fault',
  'source-silent',
  'disk-low',
  'cannot-be-kept',
  'clock-jumped',
  'program-restarted',
  'damaged',
] as const;

/** Something a person should know. Advisory only: it is no safety function and no alarm anyone may rely on. */
export const warning = z.object({
  id: z.number(),
  kind: z.enum(WARNING_KINDS),
  vessel: z.string().nullable(),
  run: runNumber.nullable(),
  /** What it is about: a limit's name, a channel, a source. */
  subject: z.string(),
  text: z.string(),
  began: instant,
  /** Null while it lasts. */
  over: instant.nullable(),
  acknowledged: deed.nullable(),
});
export type Warning = z.infer<typeof warning>;
export const warnings = z.object({ warnings: z.array(warning) });
export type Warnings = z.infer<typeof warnings>;
export const acknowledgeRequest = z.strictObject({ text: z.string().max(2000).optional() });

/** The latest reading of a channel, in the channel's unit. Old ones are shown struck through with their age. */
export const liveReading = z.object({
  channel: z.string(),
  role: z.string(),
  unit: z.string(),
  value: z.number().nullable(),
  at: instant.nullable(),
  /** Longer without a reading than a gap. */
  isStale: z.boolean(),
});
export type LiveReading = z.infer<typeof liveReading>;

export const LIVE_RUN_STATES = ['running', 'ended'] as const;

/** A vessel as it is now. */
export const liveVessel = z.object({
  vessel: z.string(),
  kind: z.string(),
  sources: z.array(sourceLine),
  readings: z.array(liveReading),
  /** The run that is open in it; null where none is. */
  run: z
    .object({
      run: runNumber,
      state: z.enum(LIVE_RUN_STATES),
      begun: instant,
      cycle: z.object({ code: z.string(), issue: z.string() }).nullable(),
      parts: z.array(z.string()),
      verdict: z.string().nullable(),
      /** The one line to read at a distance: `dwell 2 · 41 min left, not before 14:32, by TC3`. */
      says: z.string(),
      /** Hottest and coldest judged reading now, °C, with their channels; null where none is. */
      hottest: z.object({ channel: z.string(), valueC: z.number() }).nullable(),
      coldest: z.object({ channel: z.string(), valueC: z.number() }).nullable(),
    })
    .nullable(),
  warnings: z.array(warning),
});
export type LiveVessel = z.infer<typeof liveVessel>;

export const liveVessels = z.object({ at: instant, vessels: z.array(liveVessel) });
export type LiveVessels = z.infer<typeof liveVessels>;

/** An open run as it stands: judged with what is to come, and where it is heading. */
export const liveRun = z.object({
  at: instant,
  run: runNumber,
  vessel: z.string(),
  state: z.enum(LIVE_RUN_STATES),
  begun: instant,
  ended: instant.nullable(),
  /** Scans kept so far: the number a reader of events goes on from. */
  scans: z.number(),
  /** Channels of a scan that events bring, in order. */
  channels: z.array(z.string()),
  readings: z.array(liveReading),
  sources: z.array(sourceLine),
  evaluation: evaluationDocument.nullable(),
  /** One for each part, in the order of the evaluation's. */
  forecasts: z.array(forecastDocument),
  warnings: z.array(warning),
});
export type LiveRun = z.infer<typeof liveRun>;

/** A scan as the events of a run bring it: `values` in the order of the live run's channels, as judged: °C or Pa. */
export const scanEvent = z.object({
  n: z.number(),
  timeMs: z.number(),
  values: z.array(z.number().nullable()),
});
export type ScanEvent = z.infer<typeof scanEvent>;
