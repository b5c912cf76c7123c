import { DomainError } from '../../models/errors.ts';
import type { Db } from '../store/database.ts';
import { isoFromMs } from '../store/instants.ts';
import { findLoadClash } from '../store/load-clashes.ts';

/** Refuses a load that puts a part in two vessels at once; part of a larger write. */
export function refuseTwoPlaces(db: Db, run: number): void {
  const clash = findLoadClash(db, run);
  if (clash === undefined) return;
  const { part, vessel, fromMs, untilMs } = clash;
  const until = untilMs === null ? 'and still is' : `until ${isoFromMs(untilMs)}`;
  throw new DomainError(
    'event-impossible',
    `Part ${part} was in ${vessel} from ${isoFromMs(fromMs)} ${until} (run ${clash.run}); it cannot lie in two vessels at once`,
    { part, run: clash.run, vessel },
  );
}
