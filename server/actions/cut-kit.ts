import type { LedgerEvent } from '../../models/material/ledger.ts';
import type { CutKitRequest } from '../contract/materials.ts';
import { insertItem, requireItem } from '../store/material-items.ts';
import { deedOf } from './action-parts.ts';
import { changeMaterials, runsOfItems } from './change-materials.ts';
import type { JudgingParts } from './judge-run.ts';
import { writeLedgerLine } from './write-ledger-line.ts';

/** Cuts a kit from a roll or from another kit; it inherits what that had aged. */
export async function cutKit(parts: JudgingParts, from: string, request: CutKitRequest): Promise<readonly number[]> {
  const { db } = parts;
  requireItem(db, from);
  const { kit, at = deedOf(parts).at, room, lengthM } = request;
  const event: LedgerEvent = { kind: 'cut', at, from, room };
  return changeMaterials(parts, {
    because: `kit ${kit} cut from ${from}`,
    items: [kit],
    runs: runsOfItems([from], Date.parse(at)),
    write: () => void writeLedgerLine(parts, insertItem(db, kit, 'kit'), 'cut-kit', { event, lengthM }),
  });
}
