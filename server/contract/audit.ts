import * as z from 'zod';
import { countInQuery, instant, sha256 } from './scalars.ts';

export const auditLine = z.object({
  n: z.number(),
  at: instant,
  by: z.string(),
  /** `record-run`, `set-load`, `decide-suspect`, `release-cycle` … */
  verb: z.string(),
  /** What it was done to: `run/212`, `cycle/SR-180/B`, `part/SR-0417` … */
  subject: z.string(),
  why: z.string().nullable(),
  /** Of this line and all before it. */
  sha256,
});
export type AuditLine = z.infer<typeof auditLine>;

export const auditQuery = z.strictObject({
  before: z.coerce.number().int().positive().optional(),
  subject: z.string().optional(),
  limit: countInQuery(500, 100),
});

export const audit = z.object({ lines: z.array(auditLine), next: z.number().nullable() });
export type Audit = z.infer<typeof audit>;

/** What recomputing every chain showed. `firstBroken` names the first link that does not hold. */
export const auditVerification = z.object({
  holds: z.boolean(),
  lines: z.number(),
  sources: z.number(),
  firstBroken: z.string().nullable(),
});
export type AuditVerification = z.infer<typeof auditVerification>;
