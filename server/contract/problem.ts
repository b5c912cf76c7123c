import * as z from 'zod';

/** RFC 9457. `type` is what callers switch on; it is also the address of the help page. */
export const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number(),
  detail: z.string().optional(),
  facts: z.record(z.string(), z.union([z.string(), z.number(), z.boolean(), z.null()])).optional(),
  /** Each fault of a body, with a JSON pointer to its place. */
  errors: z.array(z.object({ pointer: z.string(), detail: z.string() })).optional(),
  /** `urn:uuid:` of the incident; on 500 alone. */
  instance: z.string().optional(),
});
export type Problem = z.infer<typeof problem>;
