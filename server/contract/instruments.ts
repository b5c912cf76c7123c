import * as z from 'zod';
import { THERMOCOUPLE_TYPES } from '../../models/log/layout.ts';
import { PA_PER_UNIT, TEMPERATURE_UNITS } from '../../models/units.ts';
import { auditLine } from './audit.ts';
import { deed, instant, name, reason } from './scalars.ts';

/** A calendar day in the workshop's zone, `2026-03-02`. */
const day = z.iso.date();

export const INSTRUMENT_KINDS = ['thermocouple', 'pressure', 'vacuum'] as const;

/** What a channel is a channel of: the vessel whatever records it, or one recorder or live source. */
export const PLACE_KINDS = ['vessel', 'recorder', 'source'] as const;

const points = z.array(z.tuple([z.number(), z.number()])).max(200);

/** What an instrument's correction was as it came in, before anybody adjusted it. */
const asFound = z.object({
  outOfTolerance: z.boolean(),
  /** Points [reading, correction] in the calibration's unit; null where it was in tolerance. */
  points: points.nullable(),
});

export const calibrationLine = z.object({
  id: z.number(),
  done: day,
  from: day,
  until: day,
  by: z.string(),
  certificate: z.string().nullable(),
  unit: z.string(),
  points,
  /** Expanded, k = 2, in `unit`. */
  uncertainty: z.number().nullable(),
  /** Null where nobody looked. */
  asFound: asFound.nullable(),
  replaces: z.number().nullable(),
  replacedBy: z.number().nullable(),
  reason: z.string().nullable(),
  deed,
});
export type CalibrationLine = z.infer<typeof calibrationLine>;

export const instrumentPlace = z.object({
  id: z.number(),
  on: z.object({ kind: z.enum(PLACE_KINDS), name: z.string() }),
  channel: z.string(),
  from: instant,
  /** Null while it sits there. */
  until: instant.nullable(),
  /** It never sat there. */
  void: z.boolean(),
  replaces: z.number().nullable(),
  replacedBy: z.number().nullable(),
  reason: z.string().nullable(),
  deed,
});
export type InstrumentPlace = z.infer<typeof instrumentPlace>;

export const STANDINGS = ['in-date', 'due-soon', 'out-of-date', 'not-on-record', 'out-of-use'] as const;

/** An instrument on one line, as it stands today. */
export const instrumentLine = z.object({
  instrument: z.string(),
  kind: z.enum(INSTRUMENT_KINDS),
  type: z.enum(THERMOCOUPLE_TYPES).nullable(),
  makerNumber: z.string().nullable(),
  standing: z.enum(STANDINGS),
  /** The last day its calibrations hold. */
  due: day.nullable(),
  /** Where it sits now. */
  places: z.array(instrumentPlace),
  recorded: deed,
});
export type InstrumentLine = z.infer<typeof instrumentLine>;

/** Due soonest first; last what is out of use. */
export const instruments = z.object({ today: day, instruments: z.array(instrumentLine) });
export type Instruments = z.infer<typeof instruments>;

export const instrumentView = instrumentLine.extend({
  today: day,
  /** Latest first, those that were replaced among them. */
  calibrations: z.array(calibrationLine),
  allPlaces: z.array(instrumentPlace),
  /** What new wire of its type may be off by, where it is a thermocouple; with its source. */
  newWire: z.object({ standardC: z.number(), specialC: z.number(), atC: z.number(), source: z.string() }).nullable(),
  audit: z.array(auditLine),
});
export type InstrumentView = z.infer<typeof instrumentView>;

/** Said again with a reason, it corrects what was said before. */
export const setInstrumentRequest = z.strictObject({
  instrument: name,
  kind: z.enum(INSTRUMENT_KINDS),
  type: z.enum(THERMOCOUPLE_TYPES).nullish(),
  makerNumber: z.string().trim().max(120).nullish(),
  outOfUse: z.boolean().default(false),
  reason: reason.optional(),
});
export type SetInstrumentRequest = z.input<typeof setInstrumentRequest>;

const unit = z
  .string()
  .refine((text) => UNITS.has(text), { error: `expected °C, °F or a unit of pressure, with " abs" from vacuum` });
const UNITS: ReadonlySet<string> = new Set([
  ...TEMPERATURE_UNITS,
  ...Object.keys(PA_PER_UNIT).flatMap((pressure) => [pressure, `${pressure} abs`]),
]);

/** In rising order of reading. */
const writtenPoints = points.refine(
  (all) => all.every(([reading], n) => n === 0 || reading > (all[n - 1]?.[0] ?? Number.POSITIVE_INFINITY)),
  { error: 'expected points [reading, correction] in rising order of reading' },
);

export const addCalibrationRequest = z.strictObject({
  done: day,
  /** Default: the day it was done. */
  from: day.optional(),
  until: day,
  by: name,
  certificate: z.string().trim().max(400).nullish(),
  unit,
  points: writtenPoints.default([]),
  uncertainty: z.number().positive().nullish(),
  asFound: z
    .discriminatedUnion('outOfTolerance', [
      z.strictObject({ outOfTolerance: z.literal(false) }),
      z.strictObject({ outOfTolerance: z.literal(true), points: writtenPoints.min(1) }),
    ])
    .nullish(),
  /** The calibration it is written in the place of, and why. */
  replaces: z.number().int().positive().optional(),
  reason: reason.optional(),
});
export type AddCalibrationRequest = z.input<typeof addCalibrationRequest>;

export const placeInstrumentRequest = z.strictObject({
  on: z.strictObject({ kind: z.enum(PLACE_KINDS), name }),
  channel: name,
  from: instant,
  until: instant.nullish(),
  replaces: z.number().int().positive().optional(),
  reason: reason.optional(),
});
export type PlaceInstrumentRequest = z.input<typeof placeInstrumentRequest>;

/** `at` null: it never sat there. */
export const takeOffRequest = z.strictObject({ at: instant.nullable(), reason });
export type TakeOffRequest = z.input<typeof takeOffRequest>;

/** What each channel of a run was read by as the run began, by what is on record now; empty where nothing is. */
export const runInstruments = z.object({
  channels: z.array(
    z.object({
      channel: z.string(),
      instrument: z.string(),
      /** The calibration that held on the day. */
      calibration: z
        .object({
          done: day,
          until: day,
          certificate: z.string().nullable(),
          unit: z.string(),
          points,
          uncertainty: z.number().nullable(),
        })
        .nullable(),
      /** Where none held: when the last before ran out. */
      ranOut: day.nullable(),
      replacedBy: z.string().nullable(),
    }),
  ),
});
export type RunInstruments = z.infer<typeof runInstruments>;
