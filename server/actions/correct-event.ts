import { DomainError } from '../../models/errors.ts';
import type { CorrectEventRequest } from '../contract/materials.ts';
import { readEvents, readLedger, requireItem } from '../store/material-items.ts';
import { readUsesOfItem } from '../store/part-materials.ts';
import { changeMaterials, runsOfItems } from './change-materials.ts';
import type { JudgingParts } from './judge-run.ts';
import { writeLedgerLine } from './write-ledger-line.ts';

/** Puts another line in the place of a wrong one, or takes it back; what was written stays to be read. */
export function correctEvent(
  parts: JudgingParts,
  item: string,
  line: number,
  request: CorrectEventRequest,
): Promise<readonly number[]> {
  const { db } = parts;
  const row = requireItem(db, item);
  const wrong = readLedger(db, row.id).find(({ id }) => id === line);
  if (wrong === undefined) throw new DomainError('not-found', `${item} has no line ${line}`, { item, line });
  if (wrong.replacedBy !== null || wrong.event === null) {
    const why = wrong.event === null ? 'only took another one back' : 'was corrected already';
    throw new DomainError('state-conflict', `Line ${line} of ${item} ${why}; correct the line that holds now`, {
      item,
      line,
    });
  }
  const { reason, lengthM = wrong.lengthM } = request;
  const { event } = request;
  const { at } = wrong.event;
  const parents = [wrong.event, event].flatMap((one) => (one?.kind === 'cut' ? [one.from] : []));
  return changeMaterials(parts, {
    because: `ledger of ${item} corrected`,
    items: [item],
    runs: runsOfItems([item, ...parents], Math.min(Date.parse(at), Date.parse(event?.at ?? at))),
    write() {
      const replaces = { id: line, happenedAt: at };
      writeLedgerLine(parts, row, 'correct-event', {
        event,
        lengthM: event === null ? null : lengthM,
        replaces,
        reason,
      });
      refuseUsedAndGone(parts, item, row.id);
    },
  });
}

/** What a part was laid up from cannot be taken back whole. */
function refuseUsedAndGone({ db }: JudgingParts, item: string, itemId: number): void {
  const [use] = readUsesOfItem(db, itemId);
  if (use === undefined || readEvents(db, itemId).length > 0) return;
  throw new DomainError(
    'event-impossible',
    `${item} was used before it was received or cut: ${use.part} is laid up from it`,
    {
      item,
      part: use.part,
    },
  );
}
