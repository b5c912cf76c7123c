import { DomainError } from '../../models/errors.ts';
import type { LedgerEvent } from '../../models/material/ledger.ts';
import type { ExtendLifeRequest, ItemEvent, RecordExcursionRequest } from '../contract/materials.ts';
import { requireItem } from '../store/material-items.ts';
import { deedOf } from './action-parts.ts';
import { changeMaterials, runsOfItems } from './change-materials.ts';
import type { JudgingParts } from './judge-run.ts';
import { writeLedgerLine } from './write-ledger-line.ts';

/** Writes a line of a roll's or kit's ledger: out, back in, thawed, opened, its room, scrapped. */
export function addItemEvent(parts: JudgingParts, item: string, request: ItemEvent): Promise<readonly number[]> {
  const { at = deedOf(parts).at } = request;
  if (request.kind !== 'scrapped') return addLines(parts, [item], 'add-item-event', { ...request, at }, null);
  return addLines(parts, [item], 'add-item-event', { kind: 'scrapped', at }, request.reason);
}

/** Extends a life by a named authority, for a term. */
export function extendLife(parts: JudgingParts, item: string, request: ExtendLifeRequest): Promise<readonly number[]> {
  const { at = deedOf(parts).at, reason, ...extension } = request;
  if (extension.life === 'out-life' && extension.lifeDays === undefined) {
    throw new DomainError('invalid-request', 'An extended out-life needs its new limit in days', { item });
  }
  if (Date.parse(extension.until) <= Date.parse(at)) {
    throw new DomainError(
      'event-impossible',
      `${item}: the extension would end on ${extension.until}, before it begins`,
      {
        item,
      },
    );
  }
  const event: LedgerEvent = { kind: 'extended', at, ...extension };
  return addLines(parts, [item], 'extend-life', event, reason);
}

/** Writes a freezer's own record into the ledger of everything that lay in it. */
export function recordExcursion(parts: JudgingParts, request: RecordExcursionRequest): Promise<readonly number[]> {
  const { items, points, unit, reason = null } = request;
  const [first] = points;
  const event: LedgerEvent = { kind: 'excursion', at: first?.[0] ?? '', points, unit };
  return addLines(parts, [...new Set(items)], 'record-excursion', event, reason);
}

function addLines(
  parts: JudgingParts,
  items: readonly string[],
  verb: string,
  event: LedgerEvent,
  reason: string | null,
): Promise<readonly number[]> {
  const { db } = parts;
  const rows = items.map((item) => requireItem(db, item));
  return changeMaterials(parts, {
    because: `ledger of ${items.join(', ')}`,
    items,
    runs: runsOfItems(items, Date.parse(event.at)),
    write() {
      for (const row of rows) writeLedgerLine(parts, row, verb, { event, reason });
    },
  });
}
