import { DomainError } from '../../models/errors.ts';
import type { Warning } from '../contract/live.ts';
import type { Db } from './database.ts';

export interface NewWarning {
  readonly kind: Warning['kind'];
  readonly vesselId: number | null;
  readonly run: number | null;
  readonly subject: string;
  readonly text: string;
}

/** A warning with the row of its vessel. */
export interface WarningRow extends Warning {
  readonly vesselId: number | null;
}

export function insertWarning(db: Db, { kind, vesselId, run, subject, text }: NewWarning, began: string): number {
  const { lastInsertRowid } = db
    .prepare('INSERT INTO warnings (kind, vessel_id, run_id, subject, text, began) VALUES (?, ?, ?, ?, ?, ?)')
    .run(kind, vesselId, run, subject, text, began);
  return Number(lastInsertRowid);
}

export function endWarning(db: Db, id: number, over: string): void {
  db.prepare('UPDATE warnings SET over = ? WHERE id = ? AND over IS NULL').run(over, id);
}

export function acknowledgeWarning(db: Db, id: number, text: string | null, at: string, by: string): void {
  const warning = requireWarning(db, id);
  if (warning.acknowledged !== null) {
    throw new DomainError('state-conflict', `${warning.acknowledged.by} acknowledged this warning already`, {
      warning: id,
    });
  }
  db.prepare('INSERT INTO warning_acknowledgements (warning_id, text, at, by) VALUES (?, ?, ?, ?)').run(
    id,
    text,
    at,
    by,
  );
}

export function requireWarning(db: Db, id: number): WarningRow {
  const row = db.prepare<[number], Row>(`${SELECT} WHERE warnings.id = ?`).get(id);
  if (row === undefined) throw new DomainError('not-found', `There is no warning ${id}`, { warning: id });
  return warningOf(row);
}

/** Warnings that last, the oldest first. */
export function listLasting(db: Db): WarningRow[] {
  return db.prepare<[], Row>(`${SELECT} WHERE over IS NULL ORDER BY warnings.id`).all().map(warningOf);
}

/** Warnings, those that last first, then the latest; at most so many. */
export function listWarnings(db: Db, limit: number): WarningRow[] {
  return db
    .prepare<[number], Row>(`${SELECT} ORDER BY over IS NOT NULL, warnings.id DESC LIMIT ?`)
    .all(limit)
    .map(warningOf);
}

const SELECT = `
  SELECT warnings.id, warnings.kind, vessel_id, vessels.name AS vessel, run_id, subject, warnings.text, began, over,
         acknowledged.at AS acknowledged_at, acknowledged.by AS acknowledged_by
  FROM warnings LEFT JOIN vessels ON vessels.id = vessel_id
  LEFT JOIN warning_acknowledgements AS acknowledged ON acknowledged.warning_id = warnings.id`;

interface Row {
  readonly id: number;
  readonly kind: Warning['kind'];
  readonly vessel_id: number | null;
  readonly vessel: string | null;
  readonly run_id: number | null;
  readonly subject: string;
  readonly text: string;
  readonly began: string;
  readonly over: string | null;
  readonly acknowledged_at: string | null;
  readonly acknowledged_by: string | null;
}

function warningOf({ vessel_id, run_id, acknowledged_at, acknowledged_by, ...row }: Row): WarningRow {
  const acknowledged =
    acknowledged_at === null || acknowledged_by === null ? null : { at: acknowledged_at, by: acknowledged_by };
  return { ...row, vesselId: vessel_id, run: run_id, acknowledged };
}
