import * as z from 'zod';
import { deed, instant, name, reason, verdict } from './scalars.ts';

/** What two parts may have in common, from the closest kin to the widest. */
export const KIN_KINDS = [
  'load',
  'kit',
  'roll',
  'batch',
  'tool',
  'bag-line',
  'thermocouple',
  'vessel',
  'cycle',
  'operator',
] as const;
export const kinKind = z.enum(KIN_KINDS);
export type KinKind = z.infer<typeof kinKind>;

/** A day of the workshop's calendar: `2026-03-02`. */
const day = z.iso.date();

export const whereabouts = z.object({
  place: z.enum(['in-shop', 'shipped']),
  /** To whom; null while it is in the shop. */
  customer: z.string().nullable(),
  since: day,
  text: z.string().nullable(),
  deed,
});
export type Whereabouts = z.infer<typeof whereabouts>;

export const setWhereaboutsRequest = z.strictObject({
  place: z.enum(['in-shop', 'shipped']),
  customer: name.nullish(),
  since: day,
  text: z.string().max(2000).nullish(),
});
export type SetWhereaboutsRequest = z.input<typeof setWhereaboutsRequest>;

/** Where a part is, and the hold lists it is on, latest first. */
export const partDanger = z.object({
  serial: z.string(),
  whereabouts: whereabouts.nullable(),
  earlier: z.array(whereabouts),
  holds: z.array(z.object({ hold: z.number(), why: z.string(), deed })),
});
export type PartDanger = z.infer<typeof partDanger>;

/** Parts with a failed test, those tested last first. */
export const failedParts = z.object({
  parts: z.array(
    z.object({
      serial: z.string(),
      title: z.string().nullable(),
      drawing: z.string().nullable(),
      /** What the latest failed test showed. */
      test: z.string(),
      text: z.string(),
      at: instant,
    }),
  ),
  total: z.number(),
});
export type FailedParts = z.infer<typeof failedParts>;

export const makeHoldRequest = z.strictObject({
  /** Serials of the failed parts it starts from. */
  failed: z.array(name).min(1).max(200),
  kinds: z.array(kinKind).min(1),
  /** Runs that began within these instants; absent: all. */
  from: instant.nullish(),
  until: instant.nullish(),
  why: reason,
});
export type MakeHoldRequest = z.input<typeof makeHoldRequest>;

/** Something the failed parts have, that others may share. */
export const shared = z.object({
  kind: kinKind,
  /** `roll K-23`, `bag line V3 of Autoclave 1`. */
  what: z.string(),
  /** The failed parts that have it. */
  failed: z.array(z.string()),
});
export type Shared = z.infer<typeof shared>;

export const heldPart = z.object({
  serial: z.string(),
  title: z.string().nullable(),
  drawing: z.string().nullable(),
  quantity: z.number(),
  /** Whether the list was started from it. */
  isStart: z.boolean(),
  runs: z.array(z.number()),
  lastRunAt: instant.nullable(),
  verdict: verdict.nullable(),
  failedTests: z.array(z.string()),
  /** Null where nobody said. */
  whereabouts: z
    .object({ place: z.enum(['in-shop', 'shipped']), customer: z.string().nullable(), since: day })
    .nullable(),
  /** Every reason: a place in `shared`, and the part's own runs in which it is shared, where it is a matter of runs. */
  because: z.array(z.object({ shared: z.number(), runs: z.array(z.number()) })),
});
export type HeldPart = z.infer<typeof heldPart>;

/** What is not on record, and so may have been missed. */
export const completeness = z.object({
  /** Parts cured within the dates, or in no run on record. */
  parts: z.number(),
  withoutRoll: z.number(),
  withoutTool: z.number(),
  withoutBagLine: z.number(),
  withoutThermocouple: z.number(),
  withoutRun: z.number(),
  runsWithoutLoad: z.array(z.number()),
  runsWithoutVessel: z.array(z.number()),
  /** What the failed parts themselves lack: nothing could be followed there. */
  notFollowed: z.array(z.object({ serial: z.string(), lacks: z.array(kinKind) })),
});
export type Completeness = z.infer<typeof completeness>;

export const holdDocument = z.object({
  format: z.literal('dwellbook-hold-list/1'),
  failed: z.array(z.string()),
  kinds: z.array(kinKind),
  from: instant.nullable(),
  until: instant.nullable(),
  why: z.string(),
  shared: z.array(shared),
  /** Those it started from first, then by how much they share. */
  parts: z.array(heldPart),
  completeness,
});
export type HoldDocument = z.infer<typeof holdDocument>;

export const holdView = z.object({ hold: z.number(), sha256: z.string(), deed, document: holdDocument });
export type HoldView = z.infer<typeof holdView>;

export const holds = z.object({
  holds: z.array(z.object({ hold: z.number(), why: z.string(), parts: z.number(), deed })),
});
export type Holds = z.infer<typeof holds>;
