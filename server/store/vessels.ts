import { DomainError } from '../../models/errors.ts';
import type { AddVesselRequest, Vessel } from '../contract/workshop.ts';
import type { Db } from './database.ts';

export function listVessels(db: Db): Vessel[] {
  return db
    .prepare<[], Vessel>(
      `SELECT name, kind, (SELECT count(*) FROM runs WHERE vessel_id = vessels.id) AS runs
       FROM vessels ORDER BY name`,
    )
    .all();
}

export function insertVessel(db: Db, { name, kind }: AddVesselRequest): void {
  if (db.prepare('SELECT 1 FROM vessels WHERE name = ?').get(name) !== undefined) {
    throw new DomainError('already-recorded', `There is a vessel called "${name}" already`, { vessel: name });
  }
  db.prepare('INSERT INTO vessels (name, kind) VALUES (?, ?)').run(name, kind);
}

/** The row of the vessel a run was in; null where none is named. */
export function vesselOfRun(db: Db, run: number): number | null {
  return db.prepare<[number], number>('SELECT vessel_id FROM runs WHERE id = ?').pluck().get(run) ?? null;
}

/** The row of a vessel that must be there. */
export function requireVessel(db: Db, name: string): number {
  const id = db.prepare<[string], number>('SELECT id FROM vessels WHERE name = ?').pluck().get(name);
  if (id === undefined) throw new DomainError('not-found', `There is no vessel called "${name}"`, { vessel: name });
  return id;
}
