import { type CellValue, InvalidInputError, InvalidSpreadsheetError, readSheet } from 'read-excel-file/node';
import { DomainError } from '../../models/errors.ts';
import { unpackedBytes } from './unpacked-bytes.ts';

/** Largest workbook taken, unpacked. */
const MOST_UNPACKED_BYTES = 2 ** 30;

/**
 * The first sheet of a workbook as comma-delimited UTF-8 with decimal point: row n of the sheet is line n.
 *
 * A date becomes `2026-03-03 08:14:30.000`; in a column of nothing but days only `2026-03-03`, of nothing but times of day
 * only `08:14:30.000`.
 *
 * @throws {DomainError} `log-not-text` when it is no workbook, `too-large` when it unpacks to more than 1 GiB.
 */
export async function delimitedFromXlsx(bytes: Uint8Array, name: string): Promise<Uint8Array> {
  if (unpackedBytes(bytes) > MOST_UNPACKED_BYTES) {
    throw new DomainError('too-large', `${name} unpacks to more than ${MOST_UNPACKED_BYTES} bytes`, {
      file: name,
      mostBytes: MOST_UNPACKED_BYTES,
    });
  }
  const rows = await rowsOf(bytes, name);
  const dateForms = dateFormsOf(rows);
  const text = rows.map((row) => row.map((cell, column) => cellText(cell, dateForms[column] ?? 'both')).join(','));
  return new TextEncoder().encode(`${text.join('\n')}\n`);
}

type Row = readonly (CellValue | null)[];

async function rowsOf(bytes: Uint8Array, name: string): Promise<readonly Row[]> {
  try {
    return await readSheet(Buffer.from(bytes));
  } catch (cause) {
    // The library refuses what is no workbook with these two, and with a plain Error where its parts are missing.
    const isRefusal = cause instanceof InvalidInputError || cause instanceof InvalidSpreadsheetError;
    const why = isRefusal || cause instanceof Error ? cause.message : String(cause);
    throw new DomainError('log-not-text', `${name} is no readable workbook (.xlsx): ${why}`, { file: name }, { cause });
  }
}

type DateForm = 'day' | 'time' | 'both';

const DAY_MS = 86_400_000;
/** Times of day are fractions of day 0, 1899-12-30 (1899-12-31 for those who count from 1). */
const FIRST_DAY_MS = Date.UTC(1900, 0, 1);

function dateFormsOf(rows: readonly Row[]): DateForm[] {
  const forms: (DateForm | undefined)[] = [];
  for (const row of rows) {
    for (const [column, cell] of row.entries()) {
      if (!(cell instanceof Date)) continue;
      const timeMs = exactMs(cell);
      const form = timeMs < FIRST_DAY_MS ? 'time' : timeMs % DAY_MS === 0 ? 'day' : 'both';
      forms[column] = forms[column] === undefined || forms[column] === form ? form : 'both';
    }
  }
  return Array.from(forms, (form) => form ?? 'both');
}

/**
 * A cell's time on the wall clock, as if in UTC. The library rounds the serial number down to a ms, so that a time which is
 * not exact in binary comes out one ms early; recorders write whole hundredths of a second.
 */
function exactMs(date: Date): number {
  const timeMs = date.getTime();
  return (timeMs + 1) % 10 === 0 ? timeMs + 1 : timeMs;
}

function cellText(cell: CellValue | null, form: DateForm): string {
  if (cell === null) return '';
  if (cell instanceof Date) {
    const iso = new Date(exactMs(cell)).toISOString();
    if (form === 'day') return iso.slice(0, 10);
    return form === 'time' ? iso.slice(11, 23) : `${iso.slice(0, 10)} ${iso.slice(11, 23)}`;
  }
  const text = String(cell).replace(/[\r\n]+/g, ' ');
  return /[",]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
