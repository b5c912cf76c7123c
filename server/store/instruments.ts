import { DomainError } from '../../models/errors.ts';
import type { ThermocoupleType } from '../../models/log/layout.ts';
import type { InstrumentLine } from '../contract/instruments.ts';
import type { Db } from './database.ts';

/** What is known of an instrument. */
export interface InstrumentRow {
  readonly id: number;
  readonly instrument: string;
  readonly kind: InstrumentLine['kind'];
  readonly type: ThermocoupleType | null;
  readonly makerNumber: string | null;
  readonly outOfUse: boolean;
  readonly reason: string | null;
  readonly at: string;
  readonly by: string;
}

/** Writes what is known of an instrument from now on; makes it where its code is new. */
export function insertInstrument(db: Db, { instrument, outOfUse, ...row }: Omit<InstrumentRow, 'id'>): void {
  const known = findInstrument(db, instrument)?.id;
  const id = known ?? Number(db.prepare('INSERT INTO instruments (code) VALUES (?)').run(instrument).lastInsertRowid);
  db.prepare(
    `INSERT INTO instrument_particulars (instrument_id, kind, type, maker_number, out_of_use, reason, at, by)
     VALUES (@id, @kind, @type, @makerNumber, @outOfUse, @reason, @at, @by)`,
  ).run({ id, ...row, outOfUse: outOfUse ? 1 : 0 });
}

export function listInstruments(db: Db): InstrumentRow[] {
  return db.prepare<[], StoredRow>(`${SELECT} ORDER BY code`).all().map(rowOf);
}

export function findInstrument(db: Db, instrument: string): InstrumentRow | undefined {
  const row = db.prepare<[string], StoredRow>(`${SELECT} WHERE code = ?`).get(instrument);
  return row === undefined ? undefined : rowOf(row);
}

/** An instrument that must be there. */
export function requireInstrument(db: Db, instrument: string): InstrumentRow {
  const row = findInstrument(db, instrument);
  if (row === undefined) throw new DomainError('not-found', `There is no instrument "${instrument}"`, { instrument });
  return row;
}

type StoredRow = Omit<InstrumentRow, 'outOfUse'> & { readonly outOfUse: number };

const SELECT = `
  SELECT instruments.id, code AS instrument, kind, type, maker_number AS makerNumber, out_of_use AS outOfUse, reason,
    about.at, about.by
  FROM instruments JOIN instrument_particulars AS about
    ON about.id = (SELECT max(id) FROM instrument_particulars WHERE instrument_id = instruments.id)`;

function rowOf({ outOfUse, ...row }: StoredRow): InstrumentRow {
  return { ...row, outOfUse: outOfUse === 1 };
}
