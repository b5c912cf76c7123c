import * as z from 'zod';

/** An ISO 8601 instant with `Z` or an offset. */
export const instant = z.iso.datetime({ offset: true });
export const sha256 = z.string().regex(/^[0-9a-f]{64}$/);
export const name = z.string().trim().min(1).max(120);
export const reason = z.string().trim().min(1).max(2000);
export const runNumber = z.number().int().positive();

export const verdict = z.enum(['conforms', 'does-not-conform', 'cannot-tell', 'pending']);

/** Who did something, and when. */
export const deed = z.object({ at: instant, by: z.string() });

/** Numbers arrive as text in an address. */
export const countInQuery = (most: number, otherwise: number) =>
  z.coerce.number().int().min(1).max(most).default(otherwise);

/** A figure whose bounds no sound one lies outside of: one in another unit is caught by them. */
export const figureWithin = (least: number, most: number, unit: string) =>
  z
    .number()
    .min(least, { error: `expected ${least} to ${most} ${unit}` })
    .max(most, { error: `expected ${least} to ${most} ${unit}` });
