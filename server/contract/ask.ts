import * as z from 'zod';
import { runLine } from './runs.ts';
import { countInQuery, instant, name, runNumber, verdict } from './scalars.ts';

const day = z.iso.date();

/** What a part can have seen. A thermocouple is a channel of a vessel; an instrument is what sat on one. */
export const SEEN_KINDS = ['roll', 'kit', 'batch', 'tool', 'vessel', 'thermocouple', 'instrument'] as const;

/** Parts that were cured between two instants and saw something. */
export const askPartsQuery = z.strictObject({
  kind: z.enum(SEEN_KINDS),
  code: name,
  /** Of a thermocouple. */
  vessel: name.optional(),
  /** Runs whose first scan is in [from, until). */
  from: instant.optional(),
  until: instant.optional(),
  limit: countInQuery(2000, 200),
});
export type AskPartsQuery = z.output<typeof askPartsQuery>;

export const askedParts = z.object({
  what: z.string(),
  total: z.number(),
  /** The latest cured first, at most as many as were asked for. */
  parts: z.array(
    z.object({
      serial: z.string(),
      title: z.string().nullable(),
      /** Its runs between the two instants, in order. */
      runs: z.array(runNumber),
      lastRunAt: instant.nullable(),
      /** Of its latest judged run. */
      verdict: verdict.nullable(),
      whereabouts: z.object({ place: z.string(), customer: z.string().nullable() }).nullable(),
    }),
  ),
});
export type AskedParts = z.infer<typeof askedParts>;

const gap = z.object({ total: z.number(), parts: z.array(z.string()) });

/** Parts of which something is not on record, the latest known first, 200 of each at most. */
export const withoutRecord = z.object({ parts: z.number(), noRun: gap, noLayup: gap, noMaterial: gap });
export type WithoutRecord = z.infer<typeof withoutRecord>;

/** Runs a calibration that found its instrument out of tolerance casts doubt on: since the calibration before. */
export const touched = z.object({
  instrument: z.string(),
  calibration: z.number(),
  /** The day the calibration before held from; null where there is none. */
  since: day.nullable(),
  until: day,
  runs: z.array(runLine),
});
export type Touched = z.infer<typeof touched>;

export const VERDICT_CHANGES = ['issue', 'exclusion', 'calibration', 'records'] as const;

/**
 * What runs are judged by instead, for the asking: another `issue` of their cycle; a run without a `channel` `from` an
 * instant on; an `instrument` as a `calibration` found it; or what is on record now of an `instrument`.
 */
export const askVerdictsQuery = z.strictObject({
  by: z.enum(VERDICT_CHANGES),
  cycle: name.optional(),
  issue: name.optional(),
  other: name.optional(),
  run: z.coerce.number().int().positive().optional(),
  channel: name.optional(),
  from: instant.optional(),
  instrument: name.optional(),
  calibration: z.coerce.number().int().positive().optional(),
});
export type AskVerdictsQuery = z.output<typeof askVerdictsQuery>;

/** A run as it was judged and as it would be: another verdict, or the same with other outcomes of its limits. */
export const verdictChange = z.object({
  run: runNumber,
  from: instant,
  vessel: z.string().nullable(),
  was: verdict,
  becomes: verdict,
  parts: z.array(z.object({ part: z.string().nullable(), was: verdict.nullable(), becomes: verdict })),
  /** Limits whose outcome is another, with the sentence that would be given. */
  limits: z.array(z.object({ part: z.string().nullable(), limit: z.string(), because: z.string() })),
});
export type VerdictChange = z.infer<typeof verdictChange>;

/** How far the re-judging is. `change` is of the run judged last: null where all stays as it is. */
export const verdictProgress = z.object({
  done: z.number(),
  of: z.number(),
  change: verdictChange.nullable(),
  /** Why the run judged last could not be judged so. */
  refused: z.object({ run: runNumber, because: z.string() }).nullable(),
});
export type VerdictProgress = z.infer<typeof verdictProgress>;
