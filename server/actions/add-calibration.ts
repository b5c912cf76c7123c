import { DomainError } from '../../models/errors.ts';
import { isTemperatureUnit } from '../../models/units.ts';
import type { AddCalibrationRequest } from '../contract/instruments.ts';
import { appendAudit } from '../store/audit.ts';
import { insertCalibration, requireCalibration } from '../store/calibrations.ts';
import { dayIn } from '../store/instants.ts';
import { type InstrumentRow, requireInstrument } from '../store/instruments.ts';
import { zoneOfWorkshop } from '../store/workshop.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/**
 * Records a calibration, or what should have been written instead of one. Runs it concerns keep the judgement they
 * have; the instrument's page tells which would be judged otherwise.
 */
export function addCalibration(parts: ActionParts, code: string, request: AddCalibrationRequest): number {
  const { db } = parts;
  const { done, from = done, until, by, certificate = null, unit, points = [], uncertainty = null } = request;
  const { asFound = null, replaces = null, reason = null } = request;
  return db
    .transaction(() => {
      const instrument = requireInstrument(db, code);
      refuseOtherQuantity(instrument, unit);
      refuseDays(parts, { done, from, until });
      if (replaces !== null) {
        requireCalibration(db, instrument.id, replaces);
        if (reason === null)
          throw new DomainError('invalid-request', 'Say why the calibration is corrected', { replaces });
      }
      const deed = deedOf(parts);
      const id = insertCalibration(db, instrument.id, {
        done,
        from,
        until,
        by,
        certificate: certificate || null,
        unit,
        points,
        uncertainty,
        asFound:
          asFound === null
            ? null
            : { outOfTolerance: asFound.outOfTolerance, points: asFound.outOfTolerance ? asFound.points : null },
        replaces,
        reason,
        deed,
      });
      appendAudit(db, {
        ...deed,
        verb: 'add-calibration',
        subject: `instrument/${code}`,
        why: reason,
        details: {
          calibration: id,
          replaces,
          done,
          from,
          until,
          certificate,
          unit,
          points: JSON.stringify(points),
          uncertainty,
          asFound: JSON.stringify(asFound),
        },
      });
      return id;
    })
    .immediate();
}

function refuseOtherQuantity({ instrument, kind }: InstrumentRow, unit: string): void {
  if (isTemperatureUnit(unit) === (kind === 'thermocouple')) return;
  throw new DomainError('unit-unknown', `${instrument} is for ${kind}; ${unit} is no unit of it`, { instrument, unit });
}

function refuseDays(
  { db, clock }: ActionParts,
  { done, from, until }: { readonly done: string; readonly from: string; readonly until: string },
): void {
  const impossible = (why: string) => {
    throw new DomainError('event-impossible', why, { done, from, until });
  };
  if (done > dayIn(zoneOfWorkshop(db), clock()))
    impossible(`A calibration cannot have been done on ${done}, in the future`);
  if (from < done) impossible(`A calibration done on ${done} cannot hold from ${from} on`);
  if (until < from) impossible(`A calibration that holds from ${from} cannot run out on ${until}`);
}
