import * as z from 'zod';
import { name } from './scalars.ts';

export const LABEL_KINDS = ['part', 'tool', 'roll', 'kit'] as const;
export type LabelKind = (typeof LABEL_KINDS)[number];

export const LABEL_SYMBOLS = ['qr', 'code128'] as const;
export type LabelSymbol = (typeof LABEL_SYMBOLS)[number];

export const labelQuery = z.strictObject({
  kind: z.enum(LABEL_KINDS),
  code: name,
  symbol: z.enum(LABEL_SYMBOLS).default('qr'),
});
