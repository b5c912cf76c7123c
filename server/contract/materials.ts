import * as z from 'zod';
import { EXTENDED_LIVES } from '../../models/material/ledger.ts';
import { TEMPERATURE_UNITS } from '../../models/units.ts';
import { auditLine } from './audit.ts';
import { ledgerEventDocument, materialDocument, materialStateDocument } from './documents.ts';
import { deed, instant, name, reason, sha256 } from './scalars.ts';

/** A calendar day, `2026-03-02`. */
export const day = z.iso.date();

export const ITEM_KINDS = ['roll', 'kit'] as const;

/** An issue of a material document on one line. */
export const materialLine = z.object({
  code: z.string(),
  issue: z.string(),
  name: z.string(),
  sha256,
  imported: deed,
});
export type MaterialLine = z.infer<typeof materialLine>;

export const batchLine = z.object({
  batch: z.string(),
  material: z.object({ code: z.string(), issue: z.string() }),
  made: day.nullable(),
  expires: day.nullable(),
  certificate: z.string().nullable(),
  rolls: z.array(z.string()),
  recorded: deed,
});
export type BatchLine = z.infer<typeof batchLine>;

/** A roll or kit on one line, as it stands now. */
export const itemLine = z.object({
  item: z.string(),
  kind: z.enum(ITEM_KINDS),
  batch: z.string().nullable(),
  material: z.object({ code: z.string(), issue: z.string(), name: z.string() }).nullable(),
  cutFrom: z.string().nullable(),
  /** A kit that lies in a part; it is judged there. */
  laidUp: z.boolean(),
  /** Worked out by `models/material` as of now; null where every line of it was taken back. */
  state: materialStateDocument.nullable(),
});
export type ItemLine = z.infer<typeof itemLine>;

/** What is in life and what is due: the soonest first, last what nobody can tell. */
export const materials = z.object({
  now: instant,
  materials: z.array(materialLine),
  batches: z.array(batchLine),
  items: z.array(itemLine),
  /** Left out: scrapped ones, and kits that lie in a part. */
  done: z.number(),
});
export type Materials = z.infer<typeof materials>;

/** The latest issue of a material, with what is here of it. */
export const materialView = materialLine.extend({
  document: materialDocument,
  issues: z.array(materialLine),
  batches: z.array(batchLine),
  items: z.array(itemLine),
});
export type MaterialView = z.infer<typeof materialView>;

/** A line of an item's ledger as it was written. */
export const ledgerLine = z.object({
  id: z.number(),
  /** Null where the line only takes another back. */
  event: ledgerEventDocument.nullable(),
  lengthM: z.number().nullable(),
  /** The line it replaces, and why. */
  replaces: z.number().nullable(),
  reason: z.string().nullable(),
  /** The line that replaces it. */
  replacedBy: z.number().nullable(),
  deed,
});
export type LedgerLine = z.infer<typeof ledgerLine>;

export const itemUse = z.object({
  part: z.string(),
  plies: z.number().nullable(),
  laidUpFrom: instant.nullable(),
  laidUpUntil: instant.nullable(),
});
export type ItemUse = z.infer<typeof itemUse>;

export const itemView = itemLine.extend({
  now: instant,
  /** In the order they were written. */
  ledger: z.array(ledgerLine),
  children: z.array(itemLine),
  parts: z.array(itemUse),
  /** Length received or cut, and what its kits and lengths cut off leave of it. */
  lengthM: z.number().nullable(),
  lengthLeftM: z.number().nullable(),
  audit: z.array(auditLine),
});
export type ItemView = z.infer<typeof itemView>;

export const importMaterialRequest = z.strictObject({ document: materialDocument });

/** Said again with a reason, it corrects what was said before. */
export const setBatchRequest = z.strictObject({
  batch: name,
  material: z.strictObject({ code: name, issue: name }),
  made: day.nullish(),
  expires: day.nullish(),
  certificate: z.string().trim().max(400).nullish(),
  reason: reason.optional(),
});
export type SetBatchRequest = z.input<typeof setBatchRequest>;

const room = z.strictObject({
  temperature: z.number().min(-100).max(200).optional(),
  unit: z.enum(TEMPERATURE_UNITS),
  humidity: z.number().min(0).max(100).optional(),
});

const lengthM = z.number().positive().max(1e5).nullish();

export const receiveRollRequest = z.strictObject({
  roll: name,
  batch: name,
  /** Default: now. */
  at: instant.optional(),
  as: z.enum(['frozen', 'out']).default('frozen'),
  room: room.optional(),
  outMinutesBefore: z.number().min(0).max(1e7).optional(),
  lengthM,
});
export type ReceiveRollRequest = z.input<typeof receiveRollRequest>;

export const cutKitRequest = z.strictObject({ kit: name, at: instant.optional(), room: room.optional(), lengthM });
export type CutKitRequest = z.input<typeof cutKitRequest>;

const at = instant.optional();

/** A freezer's record: instants and temperatures, in rising time. */
const points = z
  .array(z.tuple([instant, z.number().min(-200).max(100)]))
  .min(2)
  .max(10_000);

/** What anyone in the shop writes. `at` is when it happened; default: now. */
export const itemEvent = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('out'), at, room: room.optional() }),
  z.strictObject({ kind: z.literal('in'), at }),
  z.strictObject({ kind: z.literal('room'), at, room }),
  z.strictObject({ kind: z.literal('thawed'), at }),
  z.strictObject({ kind: z.literal('opened'), at }),
  z.strictObject({ kind: z.literal('scrapped'), at, reason }),
]);
export type ItemEvent = z.input<typeof itemEvent>;

/** An extension or re-test, by whoever answers for it. */
export const extendLifeRequest = z.strictObject({
  life: z.enum(EXTENDED_LIVES),
  lifeDays: z.number().positive().max(36_500).optional(),
  until: instant,
  authority: name,
  tests: reason,
  at,
  reason,
});
export type ExtendLifeRequest = z.input<typeof extendLifeRequest>;

/** A freezer's record while it was too warm or too cold, for everything that lay in it. */
export const recordExcursionRequest = z.strictObject({
  items: z.array(name).min(1).max(2000),
  points: z
    .array(z.tuple([instant, z.number().min(-200).max(100)]))
    .min(2)
    .max(10_000),
  unit: z.enum(TEMPERATURE_UNITS),
  reason: reason.optional(),
});
export type RecordExcursionRequest = z.input<typeof recordExcursionRequest>;

/** Any line of a ledger, whole. */
const writtenEvent = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('received'),
    at: instant,
    batch: name,
    as: z.enum(['frozen', 'out']),
    room: room.optional(),
    outMinutesBefore: z.number().min(0).max(1e7).optional(),
  }),
  z.strictObject({ kind: z.literal('cut'), at: instant, from: name, room: room.optional() }),
  z.strictObject({ kind: z.literal('out'), at: instant, room: room.optional() }),
  z.strictObject({ kind: z.enum(['in', 'thawed', 'opened', 'scrapped']), at: instant }),
  z.strictObject({ kind: z.literal('room'), at: instant, room }),
  z.strictObject({ kind: z.literal('excursion'), at: instant, points, unit: z.enum(TEMPERATURE_UNITS) }),
  z.strictObject({
    kind: z.literal('extended'),
    at: instant,
    life: z.enum(EXTENDED_LIVES),
    lifeDays: z.number().positive().max(36_500).optional(),
    until: instant,
    authority: name,
    tests: reason,
  }),
]);

/** The line that should have been written instead; null: it never happened. */
export const correctEventRequest = z.strictObject({
  event: writtenEvent.nullable(),
  lengthM,
  reason,
});
export type CorrectEventRequest = z.input<typeof correctEventRequest>;

export const partMaterial = z.strictObject({
  item: name,
  plies: z.number().int().positive().max(10_000).nullish(),
  laidUpFrom: instant.nullish(),
  laidUpUntil: instant.nullish(),
});
export type PartMaterialRequest = z.input<typeof partMaterial>;

export const setPartMaterialsRequest = z.strictObject({
  materials: z.array(partMaterial).max(200),
  /** Asked for where they were said before. */
  reason: reason.optional(),
});
export type SetPartMaterialsRequest = z.input<typeof setPartMaterialsRequest>;

export const partMaterialsQuery = z.strictObject({ at: instant.optional() });

/** The degree of cure a part's material had aged to, and by which rule; or why there is none. */
export const agedOffer = z.object({
  degree: z.number().nullable(),
  basis: z.enum(['resin-set', 'equivalent-time']).nullable(),
  because: z.string(),
});
export type AgedOffer = z.infer<typeof agedOffer>;

export const partMaterials = z.object({
  part: z.string(),
  /** The instant asked for, or now; each state says which instant it is of. */
  at: instant,
  materials: z.array(
    itemUse.omit({ part: true }).extend({
      item: z.string(),
      material: z.object({ code: z.string(), issue: z.string(), name: z.string() }).nullable(),
      batch: z.string().nullable(),
      state: materialStateDocument,
      aged: agedOffer,
    }),
  ),
  /** The furthest aged of what no earlier run has cured. */
  aged: agedOffer.nullable(),
  set: deed.nullable(),
});
export type PartMaterials = z.infer<typeof partMaterials>;
