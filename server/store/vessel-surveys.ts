import { DomainError } from '../../models/errors.ts';
import type { AccuracyTest, QualifiedRange, Survey } from '../contract/surveys.ts';
import type { Db } from './database.ts';

export function insertSurvey(db: Db, vesselId: number, { deed, ...row }: Omit<Survey, 'id' | 'replacedBy'>): void {
  db.prepare(
    `INSERT INTO vessel_surveys (vessel_id, done_on, valid_until, zone, unit, lowest, highest, uniformity, certificate,
       replaces_id, reason, at, by)
     VALUES (@vesselId, @done, @until, @zone, @unit, @lowest, @highest, @uniformity, @certificate, @replaces, @reason,
       @at, @by)`,
  ).run({ vesselId, ...row, ...deed });
}

export function insertAccuracyTest(
  db: Db,
  vesselId: number,
  { deed, ...row }: Omit<AccuracyTest, 'id' | 'replacedBy'>,
): void {
  db.prepare(
    `INSERT INTO vessel_accuracy_tests (vessel_id, done_on, valid_until, channel, unit, difference, temperature,
       certificate, replaces_id, reason, at, by)
     VALUES (@vesselId, @done, @until, @channel, @unit, @difference, @temperature, @certificate, @replaces, @reason, @at,
       @by)`,
  ).run({ vesselId, ...row, ...deed });
}

export function insertRange(db: Db, vesselId: number, { deed, ...row }: QualifiedRange): void {
  db.prepare(
    `INSERT INTO vessel_ranges (vessel_id, unit, lowest, highest, document, reason, at, by)
     VALUES (@vesselId, @unit, @lowest, @highest, @document, @reason, @at, @by)`,
  ).run({ vesselId, ...row, ...deed });
}

/** Uniformity surveys of a vessel, latest first, those that were replaced among them. */
export function readSurveys(db: Db, vesselId: number): Survey[] {
  return db
    .prepare<[number], Row<Survey>>(
      `SELECT id, done_on AS done, valid_until AS until, zone, unit, lowest, highest, uniformity, certificate,
         ${REPLACED('vessel_surveys')}, reason, at, by
       FROM vessel_surveys WHERE vessel_id = ? ORDER BY done_on DESC, id DESC`,
    )
    .all(vesselId)
    .map(withDeed);
}

export function readAccuracyTests(db: Db, vesselId: number): AccuracyTest[] {
  return db
    .prepare<[number], Row<AccuracyTest>>(
      `SELECT id, done_on AS done, valid_until AS until, channel, unit, difference, temperature, certificate,
         ${REPLACED('vessel_accuracy_tests')}, reason, at, by
       FROM vessel_accuracy_tests WHERE vessel_id = ? ORDER BY done_on DESC, id DESC`,
    )
    .all(vesselId)
    .map(withDeed);
}

/** Qualified ranges of a vessel, latest first: the first holds. */
export function readRanges(db: Db, vesselId: number): QualifiedRange[] {
  return db
    .prepare<[number], Row<QualifiedRange>>(
      'SELECT unit, lowest, highest, document, reason, at, by FROM vessel_ranges WHERE vessel_id = ? ORDER BY id DESC',
    )
    .all(vesselId)
    .map(withDeed);
}

/** Refuses to replace a row that is not there, or that was replaced. */
export function requireReplaceable(
  rows: readonly { readonly id: number; readonly replacedBy: number | null }[],
  id: number,
): void {
  const row = rows.find((one) => one.id === id);
  if (row === undefined) throw new DomainError('not-found', `The vessel has no such record ${id}`, { id });
  if (row.replacedBy !== null) {
    throw new DomainError('state-conflict', `Record ${id} was replaced by ${row.replacedBy} already`, { id });
  }
}

type Row<T> = Omit<T, 'deed'> & { readonly at: string; readonly by: string };

const REPLACED = (table: string) =>
  `replaces_id AS replaces, (SELECT id FROM ${table} AS later WHERE later.replaces_id = ${table}.id) AS replacedBy`;

function withDeed<T>({ at, by, ...row }: Row<T>): T {
  return { ...row, deed: { at, by } } as T;
}
