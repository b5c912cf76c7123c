import * as z from 'zod';
import { ROLES } from './roles.ts';
import { name } from './scalars.ts';

export const units = z.object({
  temperature: z.enum(['°C', '°F']),
  pressure: z.enum(['bar', 'kPa', 'MPa', 'psi']),
  vacuum: z.enum(['bar', 'kPa', 'mbar', 'inHg', 'mmHg']),
});
export type Units = z.infer<typeof units>;

export const workshop = z.object({
  name: z.string(),
  /** True in the practice workshop: every name and figure is invented, and every page says so. */
  practice: z.boolean(),
  /** The sentence every page of a practice workshop shows; null in a real one. */
  sentence: z.string().nullable(),
  /** IANA zone the shop's clock is in. */
  zone: z.string(),
  units,
  actor: z.object({ name: z.string(), roles: z.array(z.enum(ROLES)) }),
  /** Version of the program, which is the version of the engine that judges. */
  version: z.string(),
  /** Folder that is watched for finished files; null where none is. */
  watchedFolder: z.string().nullable(),
  /** What there is already, so that an empty page can say what to do first. */
  counts: z.object({
    runs: z.number(),
    parts: z.number(),
    cycles: z.number(),
    resins: z.number(),
    recorders: z.number(),
    vessels: z.number(),
  }),
});
export type Workshop = z.infer<typeof workshop>;

export const setWorkshopRequest = z.strictObject({ name, zone: z.string(), units });
export type SetWorkshopRequest = z.infer<typeof setWorkshopRequest>;

export const VESSEL_KINDS = ['autoclave', 'oven', 'press', 'heated-tool', 'heat-blanket'] as const;

export const vessel = z.object({ name, kind: z.enum(VESSEL_KINDS), runs: z.number() });
export type Vessel = z.infer<typeof vessel>;

export const vessels = z.object({ vessels: z.array(vessel) });
export type Vessels = z.infer<typeof vessels>;

export const addVesselRequest = z.strictObject({ name, kind: z.enum(VESSEL_KINDS) });
export type AddVesselRequest = z.infer<typeof addVesselRequest>;
