import type { Resin, ResinStatus } from '../../models/cure/resin.ts';
import { isForTrials } from '../../models/cure/standing.ts';
import type { Db } from '../store/database.ts';
import { readResinDocument } from '../store/resins.ts';
import { findWorkshop } from '../store/workshop.ts';

/** A set as this workshop may judge by it: in a real one, a set for trials gives estimates and never a limit. */
export function resinOfWorkshop(db: Db, line: { readonly sha256: string; readonly status: ResinStatus }): Resin {
  const resin = readResinDocument(db, line);
  return mayBeLimit(db, line.status) ? resin : { ...resin, forTrialsOnly: true };
}

/** Whether sets of a status may stand behind a limit here: in a practice workshop all may. */
export function mayBeLimit(db: Db, status: ResinStatus): boolean {
  return !isForTrials(status) || findWorkshop(db)?.practice != null;
}
