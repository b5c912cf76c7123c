import * as z from 'zod';
import { deed, figureWithin, instant, name, reason } from './scalars.ts';

export const RESULT_OUTCOMES = ['passed', 'failed', 'noted'] as const;

export const TG_CRITERIA = ['storage-onset', 'loss-peak', 'tan-delta-peak'] as const;
export const LOAD_ENDS = ['held', 'broke', 'stopped'] as const;

const method = z.string().trim().max(200).nullable().default(null);
const loadKn = figureWithin(1e-6, 1e5, 'kN');
const strain = z.strictObject({ by: name, microstrain: figureWithin(-100_000, 100_000, 'µm/m') });

/** What was measured, by kind of test. */
export const measured = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('dsc'),
    residualJG: figureWithin(0, 2000, 'J/g'),
    totalJG: figureWithin(1, 2000, 'J/g'),
    method,
  }),
  z.strictObject({
    kind: z.literal('dma'),
    tgC: figureWithin(-100, 500, '°C'),
    criterion: z.enum(TG_CRITERIA),
    /** Standard, frequency, heating rate. */
    method,
  }),
  z.strictObject({
    kind: z.literal('ultrasonic'),
    /** Null where nothing was seen. */
    largestMm: figureWithin(0, 10_000, 'mm').nullable().default(null),
    method,
  }),
  z.strictObject({
    kind: z.literal('short-beam'),
    strengthMpa: figureWithin(0.1, 1000, 'MPa'),
    specimens: z.number().int().min(1).max(1000).nullable().default(null),
    method,
  }),
  z.strictObject({
    kind: z.literal('load'),
    limitKn: loadKn.nullable().default(null),
    ultimateKn: loadKn.nullable().default(null),
    reachedKn: loadKn,
    end: z.enum(LOAD_ENDS),
    method,
  }),
  z.strictObject({
    kind: z.literal('strain'),
    first: strain,
    second: strain,
    loadKn: loadKn.nullable().default(null),
    method,
  }),
]);
export type Measured = z.output<typeof measured>;

/** What a test or inspection of a part showed. */
export const partResult = z.object({
  id: z.number(),
  at: instant,
  deed,
  /** `DSC residual cure`, `ultrasonic`, `proof load` … */
  test: z.string(),
  outcome: z.enum(RESULT_OUTCOMES),
  /** Where something was measured by kind, what it comes to: degree in %, Tg, strength, load reached, difference in %. */
  figure: z.number().nullable(),
  unit: z.string().nullable(),
  text: z.string(),
  measured: measured.nullable(),
  /** Why it stands in the place of another. */
  reason: z.string().nullable(),
});
export type PartResult = z.infer<typeof partResult>;

/** `measured` gives the figure itself. `replaces` is the `id` of one that was written down wrong; then `reason` says why. */
export const addPartResultRequest = z.strictObject({
  at: instant,
  test: reason,
  outcome: z.enum(RESULT_OUTCOMES),
  figure: z.number().nullish(),
  unit: z.string().max(40).nullish(),
  text: z.string().max(2000).default(''),
  measured: measured.optional(),
  replaces: z.number().int().positive().optional(),
  reason: reason.optional(),
});
export type AddPartResultRequest = z.input<typeof addPartResultRequest>;

/** ISO 9000, 3.12: what may be done about a nonconformity of a product. */
export const DECISION_WORDS = ['concession', 'rework', 'repair', 'regrade', 'scrap'] as const;

const decision = z.strictObject({
  word: z.enum(DECISION_WORDS),
  authority: name,
  because: reason,
  conditions: z.string().trim().min(1).max(2000).nullable().default(null),
  at: instant,
});

/** What does not conform, and what a named authority decided on it. It is recorded here, and taken elsewhere. */
export const nonconformance = z.object({
  number: name,
  text: reason,
  /** Null while nobody has decided. */
  decision: decision.nullable(),
  reason: z.string().nullable(),
  deed,
});
export type Nonconformance = z.infer<typeof nonconformance>;

/** `reason` is asked for where the number is on record already. */
export const setNonconformanceRequest = z.strictObject({
  number: name,
  text: reason,
  decision: decision.nullable().default(null),
  reason: reason.optional(),
});
export type SetNonconformanceRequest = z.input<typeof setNonconformanceRequest>;
