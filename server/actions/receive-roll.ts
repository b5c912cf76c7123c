import type { LedgerEvent } from '../../models/material/ledger.ts';
import type { ReceiveRollRequest } from '../contract/materials.ts';
import { requireBatchId } from '../store/batches.ts';
import { insertItem } from '../store/material-items.ts';
import { deedOf } from './action-parts.ts';
import { changeMaterials } from './change-materials.ts';
import type { JudgingParts } from './judge-run.ts';
import { writeLedgerLine } from './write-ledger-line.ts';

/** Records a roll that came in, of a batch that is on record. */
export async function receiveRoll(parts: JudgingParts, request: ReceiveRollRequest): Promise<void> {
  const { db } = parts;
  const { roll, batch, at = deedOf(parts).at, as = 'frozen', room, outMinutesBefore, lengthM } = request;
  requireBatchId(db, batch);
  const event: LedgerEvent = { kind: 'received', at, batch, as, room, outMinutesBefore };
  await changeMaterials(parts, {
    because: `roll ${roll}`,
    items: [roll],
    runs: () => [],
    write: () => void writeLedgerLine(parts, insertItem(db, roll, 'roll'), 'receive-roll', { event, lengthM }),
  });
}
