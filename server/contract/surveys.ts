import * as z from 'zod';
import { TEMPERATURE_UNITS } from '../../models/units.ts';
import { deed, name, reason } from './scalars.ts';

const day = z.iso.date();
const unit = z.enum(TEMPERATURE_UNITS);
const certificate = z.string().trim().max(400).nullish();
const temperature = z.number().min(-100).max(1500);

const written = {
  id: z.number(),
  certificate: z.string().nullable(),
  replaces: z.number().nullable(),
  replacedBy: z.number().nullable(),
  reason: z.string().nullable(),
  deed,
};

/** A uniformity survey: how far any place of the zone was from the setpoint, over a range of temperature. */
export const survey = z.object({
  ...written,
  done: day,
  until: day,
  zone: z.string(),
  unit,
  lowest: z.number(),
  highest: z.number(),
  uniformity: z.number(),
});
export type Survey = z.infer<typeof survey>;

/** A system accuracy test: the vessel's sensor less a test sensor beside it. */
export const accuracyTest = z.object({
  ...written,
  done: day,
  until: day,
  channel: z.string().nullable(),
  unit,
  difference: z.number(),
  temperature: z.number().nullable(),
});
export type AccuracyTest = z.infer<typeof accuracyTest>;

export const qualifiedRange = z.object({
  unit,
  lowest: z.number(),
  highest: z.number(),
  document: z.string(),
  reason: z.string().nullable(),
  deed,
});
export type QualifiedRange = z.infer<typeof qualifiedRange>;

export const SURVEY_STANDINGS = ['in-date', 'due-soon', 'out-of-date', 'not-on-record'] as const;
const standing = z.object({ standing: z.enum(SURVEY_STANDINGS), due: day.nullable() });

/** Latest first. */
export const vesselSurveys = z.object({
  vessel: z.string(),
  today: day,
  survey: standing,
  accuracy: standing,
  surveys: z.array(survey),
  accuracyTests: z.array(accuracyTest),
  /** The first holds. */
  ranges: z.array(qualifiedRange),
});
export type VesselSurveys = z.infer<typeof vesselSurveys>;

const correcting = { replaces: z.number().int().positive().optional(), reason: reason.optional() };

export const addSurveyRequest = z.strictObject({
  done: day,
  until: day,
  zone: name,
  unit,
  lowest: temperature,
  highest: temperature,
  uniformity: z.number().min(0).max(500),
  certificate,
  ...correcting,
});
export type AddSurveyRequest = z.input<typeof addSurveyRequest>;

export const addAccuracyTestRequest = z.strictObject({
  done: day,
  until: day,
  channel: name.nullish(),
  unit,
  difference: z.number().min(-500).max(500),
  temperature: temperature.nullish(),
  certificate,
  ...correcting,
});
export type AddAccuracyTestRequest = z.input<typeof addAccuracyTestRequest>;

/** Said again with a reason. */
export const setQualifiedRangeRequest = z.strictObject({
  unit,
  lowest: temperature,
  highest: temperature,
  document: name,
  reason: reason.optional(),
});
export type SetQualifiedRangeRequest = z.input<typeof setQualifiedRangeRequest>;
