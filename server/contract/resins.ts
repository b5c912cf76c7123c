import * as z from 'zod';
import { RESIN_STATUSES } from '../../models/cure/resin.ts';
import { resinDocument } from './documents.ts';
import { deed, sha256 } from './scalars.ts';

export const resinLine = z.object({
  code: z.string(),
  name: z.string(),
  status: z.enum(RESIN_STATUSES),
  citation: z.string(),
  sha256,
  imported: deed,
  /** Cycles that estimate with it. */
  cycles: z.array(z.object({ code: z.string(), issue: z.string() })),
});
export type ResinLine = z.infer<typeof resinLine>;

export const resins = z.object({ resins: z.array(resinLine) });
export type Resins = z.infer<typeof resins>;

export const resinView = resinLine.extend({ document: resinDocument });
export type ResinView = z.infer<typeof resinView>;

export const importResinRequest = z.strictObject({ document: resinDocument });
