import { DomainError } from '../../models/errors.ts';
import type { LedgerEvent } from '../../models/material/ledger.ts';
import { appendAudit } from '../store/audit.ts';
import { type ItemRow, insertLine, type NewLine } from '../store/material-items.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Writes one line of an item's ledger with its place in the audit trail; part of a larger write. */
export function writeLedgerLine(
  parts: ActionParts,
  item: Pick<ItemRow, 'id' | 'item' | 'kind'>,
  verb: string,
  line: Pick<NewLine, 'event' | 'lengthM' | 'replaces' | 'reason'>,
): number {
  if (line.event?.kind === 'cut' && line.event.from === item.item) {
    throw new DomainError('event-impossible', `${item.item} cannot be cut from itself`, { item: item.item });
  }
  const deed = deedOf(parts);
  const id = insertLine(parts.db, { itemId: item.id, ...line, ...deed });
  appendAudit(parts.db, {
    ...deed,
    verb,
    subject: `${item.kind}/${item.item}`,
    why: line.reason ?? null,
    details: { line: id, replaces: line.replaces?.id ?? null, ...factsOf(line.event) },
  });
  return id;
}

function factsOf(event: LedgerEvent | null): Record<string, string | number | null> {
  if (event === null) return { kind: 'void' };
  const facts: Record<string, string | number | null> = {};
  for (const [key, value] of Object.entries(event)) {
    facts[key] = typeof value === 'string' || typeof value === 'number' ? value : JSON.stringify(value);
  }
  return facts;
}
