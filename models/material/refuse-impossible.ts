import { courseOf } from './course.ts';
import { impossible } from './impossible.ts';
import type { MaterialRecords } from './ledger.ts';

/**
 * Refuses ledgers that cannot be true, as seen from an instant: lines in the future, out while out, back before out,
 * used before received or after scrapped, cut from itself or from what was not there yet.
 *
 * @throws {DomainError} `event-impossible` naming the item and the line.
 */
export function refuseImpossible(records: MaterialRecords, nowMs: number): void {
  for (const { item, events, uses = [] } of records.items) {
    // Everything that was written of it was taken back.
    if (events.length === 0 && uses.length === 0) continue;
    for (const event of events) {
      const lastly = event.kind === 'excursion' ? (event.points.at(-1)?.[0] ?? event.at) : event.at;
      if (Date.parse(lastly) > nowMs) {
        impossible(`${item}: the line of ${lastly} lies in the future`, { item, at: lastly });
      }
    }
    courseOf(records, item, nowMs);
  }
}
