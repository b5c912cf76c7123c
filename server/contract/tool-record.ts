import * as z from 'zod';
import { deed, figureWithin, name, reason } from './scalars.ts';

/** What a tool is made of, near cure temperatures; own figures, or those of a table, each with its source. */
export const toolMaterial = z.strictObject({
  name,
  densityKgM3: figureWithin(50, 25_000, 'kg/m³'),
  specificHeatJKgK: figureWithin(100, 5000, 'J/(kg K)'),
  conductivityWMK: figureWithin(0.01, 500, 'W/(m K)'),
  source: reason,
});
export type ToolMaterial = z.infer<typeof toolMaterial>;

const toolFigures = z.strictObject({
  title: z.string().trim().max(200).nullable().default(null),
  drawing: z.string().trim().max(120).nullable().default(null),
  /** Under the part. */
  thicknessMm: figureWithin(0.05, 1000, 'mm').nullable().default(null),
  material: toolMaterial.nullable().default(null),
});

export const toolRecord = toolFigures.extend({ reason: z.string().nullable(), deed });
export type ToolRecord = z.infer<typeof toolRecord>;

/** `reason` is asked for where the tool has a record already. */
export const setToolRequest = toolFigures.extend({ reason: reason.optional() });
export type SetToolRequest = z.input<typeof setToolRequest>;
