import * as z from 'zod';
import { deed, sha256 } from './scalars.ts';

/** Most bytes of a photograph or document: 64 MiB. */
export const MOST_PAPER_BYTES = 64 << 20;

export const PICTURE_TYPES = ['image/jpeg', 'image/png', 'image/webp', 'image/gif'] as const;
export type PictureType = (typeof PICTURE_TYPES)[number];

/** A photograph or document, kept by its hash. */
export const paper = z.object({
  id: z.number(),
  name: z.string(),
  bytes: z.number(),
  sha256,
  /** What it is shown as, told from its own bytes; null where it is only handed out. */
  picture: z.enum(PICTURE_TYPES).nullable(),
  shows: z.string().nullable(),
  deed,
});
export type Paper = z.infer<typeof paper>;

export const papers = z.object({ papers: z.array(paper) });
export type Papers = z.infer<typeof papers>;

export const sendPaperQuery = z.strictObject({
  name: z.string().trim().min(1).max(400),
  /** What is to be seen on it. */
  shows: z.string().trim().max(400).optional(),
});
