import { DomainError } from '../../models/errors.ts';
import type { CalibrationLine } from '../contract/instruments.ts';
import type { Db } from './database.ts';
import { prepared } from './prepared.ts';

export type NewCalibration = Omit<CalibrationLine, 'id' | 'replacedBy'>;

export function insertCalibration(db: Db, instrumentId: number, row: NewCalibration): number {
  const { points, asFound, deed, ...plain } = row;
  const { lastInsertRowid } = db
    .prepare(
      `INSERT INTO calibrations (instrument_id, done_on, valid_from, valid_until, calibrated_by, certificate, unit,
         points, uncertainty, found_out, found_points, replaces_id, reason, at, by)
       VALUES (@instrumentId, @done, @from, @until, @calibratedBy, @certificate, @unit, @points, @uncertainty, @foundOut,
         @foundPoints, @replaces, @reason, @at, @actor)`,
    )
    .run({
      instrumentId,
      ...plain,
      calibratedBy: row.by,
      points: JSON.stringify(points),
      foundOut: asFound === null ? null : asFound.outOfTolerance ? 1 : 0,
      foundPoints: asFound?.points == null ? null : JSON.stringify(asFound.points),
      at: deed.at,
      actor: deed.by,
    });
  return Number(lastInsertRowid);
}

/** Every calibration of an instrument, the latest first, those that were replaced among them. */
export function readCalibrations(db: Db, instrumentId: number): CalibrationLine[] {
  return prepared<[number], StoredRow>(
    db,
    `${SELECT} WHERE instrument_id = ? ORDER BY done_on DESC, calibrations.id DESC`,
  )
    .all(instrumentId)
    .map(lineOf);
}

/** Those that hold on some day: none that was replaced. */
export function readCalibrationsNow(db: Db, instrumentId: number): CalibrationLine[] {
  return readCalibrations(db, instrumentId).filter(({ replacedBy }) => replacedBy === null);
}

/** A calibration of an instrument that must be there, and not replaced. */
export function requireCalibration(db: Db, instrumentId: number, id: number): CalibrationLine {
  const line = readCalibrations(db, instrumentId).find((one) => one.id === id);
  if (line === undefined) throw new DomainError('not-found', `The instrument has no calibration ${id}`, { id });
  if (line.replacedBy === null) return line;
  throw new DomainError('state-conflict', `Calibration ${id} was replaced by ${line.replacedBy} already`, {
    id,
    replacedBy: line.replacedBy,
  });
}

interface StoredRow {
  readonly id: number;
  readonly done: string;
  readonly from: string;
  readonly until: string;
  readonly calibratedBy: string;
  readonly certificate: string | null;
  readonly unit: string;
  readonly points: string;
  readonly uncertainty: number | null;
  readonly foundOut: number | null;
  readonly foundPoints: string | null;
  readonly replaces: number | null;
  readonly replacedBy: number | null;
  readonly reason: string | null;
  readonly at: string;
  readonly by: string;
}

const SELECT = `
  SELECT calibrations.id, done_on AS done, valid_from AS "from", valid_until AS until, calibrated_by AS calibratedBy,
    certificate, unit, points, uncertainty, found_out AS foundOut, found_points AS foundPoints, replaces_id AS replaces,
    (SELECT id FROM calibrations AS later WHERE later.replaces_id = calibrations.id) AS replacedBy, reason, at, by
  FROM calibrations`;

function lineOf({ calibratedBy, foundOut, foundPoints, points, at, by, ...row }: StoredRow): CalibrationLine {
  return {
    ...row,
    by: calibratedBy,
    points: JSON.parse(points),
    asFound:
      foundOut === null
        ? null
        : { outOfTolerance: foundOut === 1, points: foundPoints === null ? null : JSON.parse(foundPoints) },
    deed: { at, by },
  };
}
