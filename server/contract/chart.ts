import * as z from 'zod';
import { instant } from './scalars.ts';

export const chartQuery = z.strictObject({
  from: instant.optional(),
  until: instant.optional(),
  /** The most points a series may hold; least and greatest of every bucket are kept. */
  points: z.coerce.number().int().min(50).max(4000).default(1500),
  part: z.string().optional(),
});
export type ChartQuery = z.output<typeof chartQuery>;
