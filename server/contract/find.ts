import * as z from 'zod';

export const FIND_KINDS = [
  'run',
  'part',
  'tool',
  'coupon',
  'roll',
  'kit',
  'batch',
  'material',
  'instrument',
  'cycle',
  'resin',
  'work-order',
  'vessel',
  'recorder',
  'file',
] as const;

export const findQuery = z.strictObject({ code: z.string().trim().min(1).max(200) });

/** Where a code lands. With one exact hit a page may go there at once. */
export const found = z.object({
  code: z.string(),
  hits: z.array(
    z.object({
      kind: z.enum(FIND_KINDS),
      title: z.string(),
      /** Address of the page: `/runs/212`, `/parts/SR-0417`, `/cycles/SR-180/B`, `/resins/skerry-180`. */
      page: z.string(),
      exact: z.boolean(),
    }),
  ),
});
export type Found = z.infer<typeof found>;
