import * as z from 'zod';
import { sha256 } from './scalars.ts';

export const TABLE_KINDS = ['parts', 'rolls'] as const;
export type TableKind = (typeof TABLE_KINDS)[number];

/** What a column of a table may hold; the first of each is what a row is known by. */
export const TABLE_FIELDS = {
  parts: ['serial', 'title', 'drawing', 'drawing-issue', 'tool', 'work-order', 'customer', 'thickness-mm', 'plies'],
  rolls: ['roll', 'batch', 'received', 'as', 'length-m', 'out-minutes'],
} as const;
export type TableField = (typeof TABLE_FIELDS)[TableKind][number];

/** Most bytes of a table: 100 000 rows have about 8 MB. */
export const MOST_TABLE_BYTES = 32 << 20;
/** Refused rows told one by one; further ones are counted. */
export const MOST_REFUSALS = 1000;

export const tableQuery = z.strictObject({
  /** What each column holds, separated by commas; nothing between two where a column is passed over. Default: as proposed. */
  columns: z.string().max(4000).optional(),
  /** The SHA-256 the preview showed: then the good rows are kept. */
  commit: sha256.optional(),
});

/** What a table would make, or made. */
export const tableImport = z.object({
  kind: z.enum(TABLE_KINDS),
  sha256,
  encoding: z.enum(['utf-8', 'windows-1252']),
  delimiter: z.string(),
  columns: z.array(z.object({ heading: z.string(), field: z.string().nullable() })),
  /** Fields without which no row can be made, and which no column holds. */
  missing: z.array(z.string()),
  rows: z.number(),
  good: z.number(),
  refused: z.number(),
  refusals: z.array(
    z.object({ line: z.number(), column: z.string().nullable(), value: z.string(), because: z.string() }),
  ),
  /** The first good rows, as they would be made. */
  first: z.array(z.object({ line: z.number(), cells: z.record(z.string(), z.string()) })),
  /** Whether the good rows are on record now. */
  kept: z.boolean(),
});
export type TableImport = z.infer<typeof tableImport>;
