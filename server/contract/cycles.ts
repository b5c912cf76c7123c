import * as z from 'zod';
import { cycleDocument } from './documents.ts';
import { runLine } from './runs.ts';
import { deed, reason, sha256 } from './scalars.ts';

export const DOCUMENT_STATUSES = ['draft', 'released', 'withdrawn'] as const;

export const cycleLine = z.object({
  code: z.string(),
  issue: z.string(),
  title: z.string(),
  status: z.enum(DOCUMENT_STATUSES),
  /** Of the document's canonical form; frozen once released. */
  sha256,
  imported: deed,
  runs: z.number(),
});
export type CycleLine = z.infer<typeof cycleLine>;

export const cycles = z.object({ cycles: z.array(cycleLine) });
export type Cycles = z.infer<typeof cycles>;

/** The words of the cycle are made from the document by `models/cycle`, on either side. */
export const cycleView = cycleLine.extend({
  document: cycleDocument,
  history: z.array(z.object({ status: z.enum(DOCUMENT_STATUSES), deed, reason: z.string().nullable() })),
  /** Other issues of the same code, latest first. */
  issues: z.array(cycleLine),
  /** The latest runs judged by this issue. */
  latestRuns: z.array(runLine),
});
export type CycleView = z.infer<typeof cycleView>;

export const importCycleRequest = z.strictObject({ document: cycleDocument });

export const changeStatusRequest = z.strictObject({ reason });
