import * as z from 'zod';
import { importLine } from './imports.ts';
import { runLine } from './runs.ts';
import { VESSEL_KINDS } from './workshop.ts';

/** Something that waits for a person, most pressing first. */
export const need = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('awaiting-load'), run: runLine }),
  z.object({ kind: z.literal('undecided-suspect'), run: runLine, channels: z.array(z.string()) }),
  z.object({ kind: z.literal('cannot-tell'), run: runLine }),
  z.object({ kind: z.literal('unread-file'), import: importLine }),
  /** An instrument that sits somewhere, out of date or due within a fortnight. */
  z.object({
    kind: z.literal('calibration-due'),
    instrument: z.string(),
    due: z.iso.date(),
    isOver: z.boolean(),
    places: z.array(z.string()),
  }),
  z.object({
    kind: z.literal('survey-due'),
    vessel: z.string(),
    what: z.enum(['uniformity survey', 'system accuracy test']),
    due: z.iso.date(),
    isOver: z.boolean(),
  }),
  /** A maker's lot near the end of its shelf life, with rolls of it still here. */
  z.object({
    kind: z.literal('batch-ends'),
    batch: z.string(),
    material: z.string(),
    due: z.iso.date(),
    isOver: z.boolean(),
  }),
]);
export type Need = z.infer<typeof need>;

export const now = z.object({
  vessels: z.array(
    z.object({
      /** Null gathers runs of no named vessel. */
      name: z.string().nullable(),
      kind: z.enum(VESSEL_KINDS).nullable(),
      lastRun: runLine.nullable(),
      /** Runs in the 30 days up to the workshop's last run, and those of them that conform. */
      recentRuns: z.number(),
      recentConforming: z.number(),
    }),
  ),
  needs: z.array(need),
  lastRuns: z.array(runLine),
});
export type Now = z.infer<typeof now>;
