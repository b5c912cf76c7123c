import * as z from 'zod';
import { layoutDocument } from './documents.ts';
import { deed, name, sha256 } from './scalars.ts';

export const keptLayout = z.object({ sha256, kept: deed, document: layoutDocument });
export type KeptLayout = z.infer<typeof keptLayout>;

export const recorder = z.object({
  name: z.string(),
  vessel: z.string().nullable(),
  /** The layout its files are read by; null before the first is kept. */
  layout: keptLayout.nullable(),
  /** Those it was read by before, latest first. */
  earlierLayouts: z.array(keptLayout),
  runs: z.number(),
});
export type Recorder = z.infer<typeof recorder>;

export const recorders = z.object({ recorders: z.array(recorder) });
export type Recorders = z.infer<typeof recorders>;

export const addRecorderRequest = z.strictObject({ name, vessel: name.nullish(), layout: layoutDocument.optional() });

export const keepLayoutRequest = z.strictObject({ layout: layoutDocument });
