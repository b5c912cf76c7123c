import { DomainError } from '../../models/errors.ts';
import type { LabelKind } from '../contract/labels.ts';
import type { Db } from '../store/database.ts';
import { requireItem } from '../store/material-items.ts';
import { requirePart } from '../store/parts.ts';
import { requireTool } from '../store/tools.ts';
import type { SomeHandlers } from './handler.ts';

export const labelHandlers: SomeHandlers<'readLabel'> = {
  async readLabel({ db }, { query: { kind, code, symbol } }) {
    requireThing(db, kind, code);
    // The library that draws symbols is large, and few starts of the program print a label.
    const { labelSymbol } = await import('../report/label-symbol.ts');
    return { type: 'image/svg+xml', chunks: [labelSymbol(symbol, code)] };
  },
};

/** A label leads to its thing; one that leads nowhere is not printed. */
function requireThing(db: Db, kind: LabelKind, code: string): void {
  if (kind === 'part') requirePart(db, code);
  else if (kind === 'tool') requireTool(db, code);
  else if (requireItem(db, code).kind !== kind) {
    throw new DomainError('not-found', `"${code}" is no ${kind}`, { code });
  }
}
