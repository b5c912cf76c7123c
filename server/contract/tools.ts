import * as z from 'zod';
import { partLine } from './parts.ts';
import { name } from './scalars.ts';
import { toolRecord } from './tool-record.ts';

export const toolLine = z.object({
  code: name,
  /** Null where the tool is known by its code alone. */
  record: toolRecord.nullable(),
  /** How many parts are on record as made on it. */
  parts: z.number(),
});
export type ToolLine = z.infer<typeof toolLine>;

export const tools = z.object({ tools: z.array(toolLine) });
export type Tools = z.infer<typeof tools>;

export const toolView = z.object({
  code: name,
  record: toolRecord.nullable(),
  /** Earlier records, latest first. */
  earlier: z.array(toolRecord),
  parts: z.array(partLine),
});
export type ToolView = z.infer<typeof toolView>;
