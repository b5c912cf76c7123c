import * as z from 'zod';
import { RESIN_STATUSES } from '../../models/cure/resin.ts';
import { CHANNEL_ROLES } from '../../models/log/layout.ts';
import { SIDES } from '../../models/run/side-of-place.ts';
import { instant, name, runNumber, sha256 } from './scalars.ts';

const filmInQuery = z.coerce.number().positive().max(10_000).optional();

/** What is supposed about the faces, where the load does not say: channels, and film coefficients in W/(m² K). */
export const thicknessQuery = z.strictObject({
  bag: name.optional(),
  tool: name.optional(),
  bagFilm: filmInQuery,
  toolFilm: filmInQuery,
  /** Code of a resin set; default: the cycle's own. */
  resin: name.optional(),
});
export type ThicknessQuery = z.output<typeof thicknessQuery>;

const place = z.object({ degree: z.number(), tgC: z.number().nullable(), depthMm: z.number() });

/** One supposition about the two faces, and what it comes to. Depths are from the bag side, minutes from `from`. */
export const thicknessCase = z.object({
  name: z.string(),
  /** °C at `minutes`, of the hottest and the coldest place of the laminate and of its middle. */
  minutes: z.array(z.number()),
  hottestC: z.array(z.number()),
  coldestC: z.array(z.number()),
  middleC: z.array(z.number()),
  peak: z.object({ temperatureC: z.number(), depthMm: z.number(), at: instant }),
  middlePeak: z.object({ temperatureC: z.number(), at: instant }),
  /** By how much at most the laminate was hotter than the hotter of its faces, and colder than the colder, °C. */
  overshootC: z.number(),
  lagC: z.number(),
  /** Through the laminate at the end. */
  depthMm: z.array(z.number()),
  degree: z.array(z.number()),
  tgC: z.array(z.number()).nullable(),
  middle: place,
  least: place,
  most: place,
});
export type ThicknessCase = z.infer<typeof thicknessCase>;

const range = z.tuple([z.number(), z.number()]);

export const thickness = z.object({
  part: z.string(),
  run: runNumber,
  /** Stretch that the readings used cover. */
  from: instant,
  until: instant,
  /** From the bag side. */
  layers: z.array(
    z.object({
      name: z.string(),
      thicknessMm: z.number(),
      densityKgM3: z.number(),
      specificHeatJKgK: z.number(),
      conductivityWMK: z.number(),
      source: z.string(),
    }),
  ),
  resin: z.object({
    code: z.string(),
    name: z.string(),
    status: z.enum(RESIN_STATUSES),
    citation: z.string(),
    sha256,
    heatJKg: z.number(),
    basis: z.enum(['resin', 'composite']),
    /** Whether the cycle asks by this set. */
    isCycles: z.boolean(),
  }),
  startDegree: z.object({ degree: z.number(), from: z.enum(['load', 'resin']) }),
  /** Channels that may be put to a face, and where each is taken to sit. */
  sensors: z.array(
    z.object({
      channel: z.string(),
      place: z.string().nullable(),
      role: z.enum(CHANNEL_ROLES),
      side: z.enum(SIDES).nullable(),
      isUsed: z.boolean(),
    }),
  ),
  /** What the thermocouples of the part read, surfaces and those inside, °C. */
  measured: z.array(
    z.object({
      channel: z.string(),
      isInside: z.boolean(),
      minutes: z.array(z.number()),
      temperatureC: z.array(z.number()),
    }),
  ),
  cases: z.array(thicknessCase),
  /** Over all cases. */
  peakC: range,
  middleDegree: range,
  middleTgC: range.nullable(),
  leastDegree: range,
  leastTgC: range.nullable(),
  /** What the cycle asks of the estimate, where it asks by this set. An estimate is never a verdict by itself. */
  reached: z.array(
    z.object({
      what: z.enum(['degree', 'tg']),
      /** In the cycle's unit. */
      atLeast: z.number(),
      unit: z.string(),
      middle: z.enum(['reached', 'not-reached', 'cannot-tell']),
      throughout: z.enum(['reached', 'not-reached', 'cannot-tell']),
    }),
  ),
  /** The cycle's ceiling, in its unit, beside the hottest place: it limits thermocouples, not estimates. */
  ceiling: z
    .object({ atMost: z.number(), unit: z.enum(['°C', '°F']), stayed: z.enum(['below', 'above', 'cannot-tell']) })
    .nullable(),
  assumptions: z.array(z.string()),
});
export type Thickness = z.infer<typeof thickness>;
