import * as z from 'zod';
import { instant } from './scalars.ts';

const address = z.email().max(200);

/** Where warnings are told besides the screen; either may be left out. */
export const warningRoutes = z.object({
  /** Each warning, and its end, is posted there as JSON. */
  webhook: z.strictObject({ url: z.url({ protocol: /^https?$/ }).max(500) }).nullable(),
  mail: z
    .strictObject({
      host: z.string().trim().min(1).max(200),
      port: z.number().int().min(1).max(65535),
      /** TLS from the first byte (port 465); else STARTTLS where the server offers it. */
      secure: z.boolean(),
      user: z.string().max(200).nullable(),
      from: address,
      to: z.array(address).min(1).max(20),
    })
    .nullable(),
});
export type WarningRoutes = z.infer<typeof warningRoutes>;

export const warningRoutesView = warningRoutes.extend({
  /** What became of the last message each way; null before the first. */
  lastWebhook: z.object({ at: instant, problem: z.string().nullable() }).nullable(),
  lastMail: z.object({ at: instant, problem: z.string().nullable() }).nullable(),
});
export type WarningRoutesView = z.infer<typeof warningRoutesView>;

/** A password is kept beside and is never shown again; left out, the one kept stays. */
export const setWarningRoutesRequest = z.strictObject({
  webhook: warningRoutes.shape.webhook,
  mail: warningRoutes.shape.mail,
  password: z.string().max(200).optional(),
});
export type SetWarningRoutesRequest = z.infer<typeof setWarningRoutesRequest>;
