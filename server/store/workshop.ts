import type { SetWorkshopRequest, Units, Workshop } from '../contract/workshop.ts';
import type { Db } from './database.ts';

export interface WorkshopRow {
  readonly name: string;
  readonly zone: string;
  readonly units: Units;
  readonly practice: string | null;
}

/** What the workshop is called and how it counts; null before anyone has said. */
export function findWorkshop(db: Db): WorkshopRow | null {
  const row = db
    .prepare<
      [],
      {
        name: string;
        zone: string;
        temperature_unit: string;
        pressure_unit: string;
        vacuum_unit: string;
        practice: string | null;
      }
    >('SELECT name, zone, temperature_unit, pressure_unit, vacuum_unit, practice FROM workshop')
    .get();
  if (row === undefined) return null;
  const units = {
    temperature: row.temperature_unit,
    pressure: row.pressure_unit,
    vacuum: row.vacuum_unit,
  } as Units;
  return { name: row.name, zone: row.zone, units, practice: row.practice };
}

/** The zone of the workshop's clock; that of this machine before anyone has said. */
export function zoneOfWorkshop(db: Db): string {
  return findWorkshop(db)?.zone ?? Intl.DateTimeFormat().resolvedOptions().timeZone;
}

/** Writes the workshop's one row; `practice` is set when the row is made and never after. */
export function writeWorkshop(db: Db, { name, zone, units }: SetWorkshopRequest, practice: string | null = null): void {
  db.prepare(
    `INSERT INTO workshop (id, name, zone, temperature_unit, pressure_unit, vacuum_unit, practice)
     VALUES (1, @name, @zone, @temperature, @pressure, @vacuum, @practice)
     ON CONFLICT (id) DO UPDATE SET name = @name, zone = @zone, temperature_unit = @temperature,
       pressure_unit = @pressure, vacuum_unit = @vacuum`,
  ).run({ name, zone, ...units, practice });
}

export function countRecords(db: Db): Workshop['counts'] {
  const counts = db
    .prepare<[], Workshop['counts']>(
      `SELECT (SELECT count(*) FROM runs) AS runs, (SELECT count(*) FROM parts) AS parts,
              (SELECT count(*) FROM cycles) AS cycles, (SELECT count(*) FROM resins) AS resins,
              (SELECT count(*) FROM recorders) AS recorders, (SELECT count(*) FROM vessels) AS vessels`,
    )
    .get();
  return counts ?? { runs: 0, parts: 0, cycles: 0, resins: 0, recorders: 0, vessels: 0 };
}
