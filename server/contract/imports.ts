import * as z from 'zod';
import { CHANNEL_ROLES } from '../../models/log/layout.ts';
import { PASSED_OVER_KINDS, REPAIR_KINDS } from '../../models/log/readings.ts';
import { layoutDocument } from './documents.ts';
import { problem } from './problem.ts';
import { joinedChannel } from './runs.ts';
import { deed, instant, name, reason, runNumber, sha256 } from './scalars.ts';

export const IMPORT_STATES = ['waiting', 'recorded', 'discarded'] as const;
export const IMPORT_ORIGINS = ['upload', 'watched-folder', 'command'] as const;

/** A file that came in and is not a run yet, on one line. */
export const importLine = z.object({
  id: z.number(),
  name: z.string(),
  bytes: z.number(),
  sha256,
  origin: z.enum(IMPORT_ORIGINS),
  /** Recorder it came from, where that is known. */
  recorder: z.string().nullable(),
  state: z.enum(IMPORT_STATES),
  received: deed,
  /** The run it became. */
  run: runNumber.nullable(),
  /** Why it could not become a run by itself. */
  problem: problem.nullable(),
});
export type ImportLine = z.infer<typeof importLine>;

export const imports = z.object({ imports: z.array(importLine) });
export type Imports = z.infer<typeof imports>;

/** One thing the proposed layout says, and how sure it is. */
export const proposalStatement = z.object({
  /** Place in the layout: `encoding`, `delimiter`, `time.pattern`, `channels/3/role` … */
  key: z.string(),
  /** `asked` must be answered before the layout can be used. */
  basis: z.enum(['proved', 'guessed', 'asked']),
  because: z.string(),
  /** What may be answered, where the answers are few. */
  choices: z.array(z.string()),
});
export type ProposalStatement = z.infer<typeof proposalStatement>;

export const proposal = z.object({
  /** The layout as far as it is known; it can be posted once nothing is `asked`. */
  layout: layoutDocument,
  statements: z.array(proposalStatement),
});

export const importView = importLine.extend({
  /** The first lines of the file as text, line 1 first, cut at 300 characters. */
  firstLines: z.array(z.string()),
  /** Null where the file is no text table at all; then `problem` says why. */
  proposal: proposal.nullable(),
  /** Stored layouts, those that read this file first. */
  knownLayouts: z.array(
    z.object({ recorder: z.string(), vessel: z.string().nullable(), layout: layoutDocument, reads: z.boolean() }),
  ),
});
export type ImportView = z.infer<typeof importView>;

export const uploadQuery = z.strictObject({ name, recorder: name.optional() });

export const previewRequest = z.strictObject({ layout: layoutDocument });

const lines = z.tuple([z.number(), z.number()]).readonly();

/** The file read whole by a layout. What cannot be read is a problem with `line` and `column` in its facts. */
export const preview = z.object({
  scans: z.number(),
  from: instant,
  until: instant,
  /** Seconds between scans, median. */
  intervalS: z.number().nullable(),
  channels: z.array(
    z.object({
      name: z.string(),
      role: z.enum(CHANNEL_ROLES),
      unit: z.string(),
      least: z.number().nullable(),
      greatest: z.number().nullable(),
      absent: z.number(),
    }),
  ),
  /** The first scans, as read; null is an absent reading. */
  first: z.array(z.object({ at: instant, values: z.array(z.number().nullable()) })),
  repairs: z.array(
    z.object({ kind: z.enum(REPAIR_KINDS), lines, file: z.number(), scans: z.number(), because: z.string() }),
  ),
  passedOver: z.array(z.object({ kind: z.enum(PASSED_OVER_KINDS), file: z.number(), lines })),
});
export type Preview = z.infer<typeof preview>;

/** A person may say a clock was wrong by up to a day. */
const shiftS = z.number().min(-86_400).max(86_400);

/** What joining the file to a run would make of it, with its clock shifted so much. */
export const previewJoinRequest = z.strictObject({ layout: layoutDocument, run: runNumber, shiftS: shiftS.default(0) });

export const joinPreview = z.object({
  /** Number it would have among the run's sources. */
  source: z.number(),
  /** Channels both have: who would say which stretch, and where they differ. */
  joined: z.array(joinedChannel),
  /** Channels of the file that the run has not. */
  ownChannels: z.array(z.string()),
  /** Where the readings of both say that its clock stands; a proposal, never applied by itself. */
  proposal: z.object({
    shiftS: z.number().nullable(),
    because: z.string(),
    /** How far the differences scatter about their mean without and with it, in `unit`. */
    scatterWithout: z.number().nullable(),
    scatterWith: z.number().nullable(),
    unit: z.string(),
    channels: z.array(z.string()),
    compared: z.number(),
  }),
});
export type JoinPreviewView = z.infer<typeof joinPreview>;

export const recordRunRequest = z.strictObject({
  layout: layoutDocument,
  /** Keeps the layout for this recorder, making the recorder where it is new. */
  recorder: name.nullish(),
  vessel: name.nullish(),
  /** Adds the file to this run as another source, instead of making a run. */
  run: runNumber.nullish(),
  /** Joins it to that run: its channels may be the run's, and fill what was not read. Its clock is shifted as said. */
  join: z.strictObject({ shiftS: shiftS.default(0), because: reason }).nullish(),
});
export type RecordRunRequest = z.infer<typeof recordRunRequest>;

export const recordedRun = z.object({ run: runNumber });
export type RecordedRun = z.infer<typeof recordedRun>;

export const discardImportRequest = z.strictObject({ reason });
