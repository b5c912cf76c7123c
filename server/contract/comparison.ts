import * as z from 'zod';
import type { Overlay } from '../../models/chart/overlay.ts';
import type { Comparison } from '../../models/trace/comparison.ts';
import { instant } from './scalars.ts';

/** Serials, a line each: they may hold any other character. */
const serials = z
  .string()
  .max(20_000)
  .transform((text) => [...new Set(text.split('\n').filter((serial) => serial !== ''))]);

/** Which parts are compared. */
export const SCOPE_QUERY = {
  /** The failed ones, where they are chosen by hand; absent: those with a failed test. */
  failed: serials.optional(),
  drawing: z.string().max(120).optional(),
  /** `SR-180`, or `SR-180/B` for one issue. */
  cycle: z.string().max(250).optional(),
  from: instant.optional(),
  until: instant.optional(),
  /** Whether every other part counts as sound, or only those that passed a test. */
  sound: z.enum(['others', 'passed']).default('others'),
} as const;

export const compareQuery = z.strictObject(SCOPE_QUERY);
export type CompareQuery = z.output<typeof compareQuery>;

/** A part in a comparison, and the run its figures are of. */
export const comparedPart = z.object({ serial: z.string(), run: z.number(), at: instant, failed: z.boolean() });
export type ComparedPart = z.infer<typeof comparedPart>;

export const comparison = z
  .custom<Comparison>((value) => typeof value === 'object' && value !== null)
  .meta({ id: 'Comparison', description: 'What failed parts share that sound ones do not, ranked' });

export const compared = z.object({
  parts: z.array(comparedPart),
  /** Sound parts that no test is on record of. */
  untested: z.number(),
  /** Parts in scope that were left out, and why. */
  leftOut: z.array(z.object({ serial: z.string(), because: z.string() })),
  comparison,
});
export type Compared = z.infer<typeof compared>;

export const OVERLAY_EVENTS = ['heat-on', 'dwell-opens', 'gel', 'vent'] as const;
export type OverlayEvent = (typeof OVERLAY_EVENTS)[number];

export const overlayQuery = z.strictObject({ ...SCOPE_QUERY, event: z.enum(OVERLAY_EVENTS).default('heat-on') });
export type OverlayQuery = z.output<typeof overlayQuery>;

export const overlayStrip = z.object({
  what: z.enum(['coldest', 'vacuum', 'pressure', 'degree']),
  /** Empty for a degree of cure. */
  unit: z.string(),
  overlay: z
    .custom<Overlay>((value) => typeof value === 'object' && value !== null)
    .meta({ id: 'Overlay', description: 'Failed runs as lines over a band of sound ones' }),
});
export type OverlayStrip = z.infer<typeof overlayStrip>;

export const overlaid = z.object({
  event: z.enum(OVERLAY_EVENTS),
  failed: z.number(),
  sound: z.number(),
  /** Sound parts in scope; where there are more than are drawn, those drawn are spread evenly over them. */
  soundInScope: z.number(),
  leftOut: z.array(z.object({ serial: z.string(), because: z.string() })),
  strips: z.array(overlayStrip),
});
export type Overlaid = z.infer<typeof overlaid>;
