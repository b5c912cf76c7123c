import { DomainError } from '../../models/errors.ts';
import type { SetInstrumentRequest } from '../contract/instruments.ts';
import { appendAudit } from '../store/audit.ts';
import { findInstrument, insertInstrument } from '../store/instruments.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Records an instrument, or corrects what was said of it. */
export function setInstrument(parts: ActionParts, request: SetInstrumentRequest): void {
  const { db } = parts;
  const { instrument, kind, type = null, makerNumber = null, outOfUse = false, reason = null } = request;
  if (type !== null && kind !== 'thermocouple') {
    throw new DomainError('invalid-request', `Only a thermocouple has a type; ${instrument} is for ${kind}`, {
      instrument,
    });
  }
  db.transaction(() => {
    if (findInstrument(db, instrument) !== undefined && reason === null) {
      throw new DomainError('already-recorded', `Instrument ${instrument} is on record; say why it is corrected`, {
        instrument,
      });
    }
    const deed = deedOf(parts);
    const row = { instrument, kind, type, makerNumber: makerNumber || null, outOfUse, reason, ...deed };
    insertInstrument(db, row);
    appendAudit(db, {
      ...deed,
      verb: 'set-instrument',
      subject: `instrument/${instrument}`,
      why: reason,
      details: { kind, type, makerNumber: row.makerNumber, outOfUse },
    });
  }).immediate();
}
