import * as z from 'zod';
import { auditLine } from './audit.ts';
import { partEvaluationDocument } from './documents.ts';
import { coupon, layup, partWork } from './layups.ts';
import { nonconformance, partResult } from './results.ts';
import { runFile, runLine, sensorDecision } from './runs.ts';
import { countInQuery, instant, verdict } from './scalars.ts';
import { toolRecord } from './tool-record.ts';

export const partLine = z.object({
  serial: z.string(),
  title: z.string().nullable(),
  drawing: z.string().nullable(),
  quantity: z.number(),
  runs: z.array(z.number()),
  /** Of its latest run; null before the first evaluation. */
  verdict: verdict.nullable(),
  failedTest: z.boolean(),
  lastRunAt: instant.nullable(),
});
export type PartLine = z.infer<typeof partLine>;

export const partsQuery = z.strictObject({ q: z.string().max(200).optional(), limit: countInQuery(500, 100) });

export const parts = z.object({ parts: z.array(partLine), total: z.number() });
export type Parts = z.infer<typeof parts>;

/** One cure of a part: everything that touched it there. */
export const partRun = z.object({
  line: runLine,
  evaluation: partEvaluationDocument.nullable(),
  evaluatedAt: instant.nullable(),
  /** What its sensors were, and whether they were on this part alone. */
  sensors: z.array(z.object({ channel: z.string(), place: z.string().nullable(), sharedWith: z.array(z.string()) })),
  bagLine: z.string().nullable(),
  startDegree: z.number().nullable(),
  leakTest: z.object({ start: z.number(), end: z.number(), minutes: z.number() }).nullable(),
  workOrder: z.string().nullable(),
  loadMates: z.array(z.string()),
  files: z.array(runFile),
  cycleSha256: z.string().nullable(),
  decisions: z.array(sensorDecision),
});
export type PartRun = z.infer<typeof partRun>;

export const partView = z.object({
  serial: z.string(),
  title: z.string().nullable(),
  drawing: z.string().nullable(),
  drawingIssue: z.string().nullable(),
  tool: z.string().nullable(),
  quantity: z.number(),
  verdict: verdict.nullable(),
  runs: z.array(partRun),
  results: z.array(partResult),
  nonconformances: z.array(nonconformance),
  /** How it was laid up; null where nobody wrote it down. */
  layup: layup.nullable(),
  /** What is on record of the tool it was laid up on. */
  toolRecord: toolRecord.nullable(),
  /** What was done to it after cure, in order of time. */
  works: z.array(partWork),
  coupons: z.array(coupon),
  /** Parts that share something with it, and what. */
  shares: z.array(
    z.object({ serial: z.string(), verdict: verdict.nullable(), failedTest: z.boolean(), what: z.array(z.string()) }),
  ),
  audit: z.array(auditLine),
});
export type PartView = z.infer<typeof partView>;
