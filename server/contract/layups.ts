import * as z from 'zod';
import { deed, figureWithin, instant, name, reason, runNumber } from './scalars.ts';

const text = (most: number) => z.string().trim().max(most).nullable().default(null);

/** What a laminate is as a slab, near cure temperatures; own figures, or those of a table, each with its source. */
export const laminate = z.strictObject({
  name,
  densityKgM3: figureWithin(300, 5000, 'kg/m³'),
  specificHeatJKgK: figureWithin(300, 4000, 'J/(kg K)'),
  /** Across the thickness. */
  conductivityWMK: figureWithin(0.03, 20, 'W/(m K)'),
  /** Needed where a resin set states its heat by the resin's mass. */
  resinDensityKgM3: figureWithin(700, 2500, 'kg/m³').nullable().default(null),
  source: reason,
});
export type RecordedLaminate = z.infer<typeof laminate>;

export const debulk = z.strictObject({
  at: instant.nullable().default(null),
  minutes: figureWithin(0.1, 100_000, 'min').nullable().default(null),
  vacuum: z.number().nullable().default(null),
  vacuumUnit: text(20),
});
export type Debulk = z.infer<typeof debulk>;

/** How a part was laid up. Nothing is required: what is not known is named as missing. */
const layupFigures = z.strictObject({
  tool: name.nullable().default(null),
  workOrder: text(120),
  customer: text(200),
  /** Of the cured part. */
  thicknessMm: figureWithin(0.05, 1000, 'mm').nullable().default(null),
  plies: z.number().int().min(1).max(10_000).nullable().default(null),
  /** By volume. */
  fibreFraction: figureWithin(0.01, 0.9, '(a share of the volume)').nullable().default(null),
  laminate: laminate.nullable().default(null),
  beganAt: instant.nullable().default(null),
  endedAt: instant.nullable().default(null),
  roomC: figureWithin(-30, 60, '°C').nullable().default(null),
  humidityPercent: figureWithin(0, 100, '%').nullable().default(null),
  debulks: z.array(debulk).max(500).default([]),
});
export type LayupFigures = z.infer<typeof layupFigures>;

export const layup = layupFigures.extend({ reason: z.string().nullable(), deed });
export type Layup = z.infer<typeof layup>;

/** What the part is goes with it where it is said: it may not have lain in a load yet. */
export const setLayupRequest = layupFigures.extend({
  title: z.string().trim().max(200).nullish(),
  drawing: z.string().trim().max(120).nullish(),
  drawingIssue: z.string().trim().max(40).nullish(),
  /** Asked for where the part has a lay-up already. */
  reason: reason.optional(),
});
export type SetLayupRequest = z.input<typeof setLayupRequest>;

/** Drawing and tool of a part that has none on record yet. */
export const layupQuery = z.strictObject({
  drawing: z.string().max(120).optional(),
  tool: z.string().max(120).optional(),
});

export const layupView = z.object({
  serial: z.string(),
  /** False where no load and no lay-up names the part yet. */
  known: z.boolean(),
  title: z.string().nullable(),
  drawing: z.string().nullable(),
  drawingIssue: z.string().nullable(),
  tool: z.string().nullable(),
  layup: layup.nullable(),
  /** Earlier ones, latest first. */
  earlier: z.array(layup),
  /** The latest other part of the same drawing or tool, as a starting point. */
  similar: z
    .object({
      serial: z.string(),
      shares: z.array(z.enum(['drawing', 'tool'])),
      title: z.string().nullable(),
      drawing: z.string().nullable(),
      drawingIssue: z.string().nullable(),
      layup,
    })
    .nullable(),
});
export type LayupView = z.infer<typeof layupView>;

export const PART_WORKS = ['trimming', 'drilling', 'other'] as const;

/** Something done to a part after its cure. */
export const partWork = z.object({
  id: z.number(),
  work: z.enum(PART_WORKS),
  text: z.string(),
  at: instant,
  reason: z.string().nullable(),
  deed,
});
export type PartWork = z.infer<typeof partWork>;

/** `replaces` is the `id` of one that was written down wrong; then `reason` says why. */
export const addPartWorkRequest = z.strictObject({
  work: z.enum(PART_WORKS),
  text: reason,
  at: instant,
  replaces: z.number().int().positive().optional(),
  reason: reason.optional(),
});
export type AddPartWorkRequest = z.input<typeof addPartWorkRequest>;

/** A witness coupon: cured beside a part, tested for it. */
export const coupon = z.object({
  code: name,
  run: runNumber.nullable(),
  position: z.string().nullable(),
  reason: z.string().nullable(),
  deed,
});
export type Coupon = z.infer<typeof coupon>;

/** `reason` is asked for where the code is on record already. */
export const setCouponRequest = z.strictObject({
  code: name,
  run: runNumber.nullish(),
  position: z.string().trim().max(200).nullish(),
  reason: reason.optional(),
});
export type SetCouponRequest = z.input<typeof setCouponRequest>;
