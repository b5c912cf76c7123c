import { TABLE_FIELDS, type TableField, type TableKind } from '../contract/tables.ts';
import type { CsvRow } from '../files/csv-rows.ts';
import { batchesKnown, codesKnown } from '../store/table-rows.ts';
import { zoneOfWorkshop } from '../store/workshop.ts';
import type { ActionParts } from './action-parts.ts';
import { readCell } from './table-fields.ts';

type Cells = Readonly<Record<string, string | number>>;
export type ReadRow = { readonly cells: Cells } | Refused;
interface Refused {
  readonly column: string | null;
  readonly value: string;
  readonly because: string;
}

/** Reads one row after another: what it would make, or the first thing that is wrong with it. */
export function rowReader(
  { db, clock }: ActionParts,
  kind: TableKind,
  headings: readonly string[],
  columns: readonly (TableField | null)[],
): (row: CsvRow) => ReadRow {
  const zone = zoneOfWorkshop(db);
  const known = codesKnown(db, kind);
  const batches = kind === 'rolls' ? batchesKnown(db) : new Map<string, string | null>();
  const now = new Date(clock()).toISOString();
  const [by] = TABLE_FIELDS[kind];
  const needed: readonly TableField[] = kind === 'parts' ? ['serial'] : ['roll', 'batch', 'received'];
  const lineOf = new Map<string, number>();
  const headingOf = (field: TableField) => headings[columns.indexOf(field)] ?? field;

  return ({ line, cells: texts, isBroken }) => {
    if (isBroken)
      return { column: null, value: texts.join(' '), because: 'a quoted cell is not closed as it should be' };
    if (texts.length !== headings.length) {
      return {
        column: null,
        value: texts.join(' '),
        because: `${texts.length} cells, and the heading has ${headings.length}`,
      };
    }
    const cells: Record<string, string | number> = {};
    for (const [n, field] of columns.entries()) {
      const text = texts[n] ?? '';
      if (field === null || text === '') continue;
      const cell = readCell(field, text, zone);
      if ('because' in cell) return { column: headings[n] ?? '', value: text, because: cell.because };
      cells[field] = cell.value;
    }
    const refuse = (field: TableField, because: string): Refused => ({
      column: headingOf(field),
      value: String(cells[field] ?? ''),
      because,
    });
    for (const field of needed) if (cells[field] === undefined) return refuse(field, 'nothing stands there');
    const code = String(cells[by]);
    if (known.has(code)) return refuse(by, 'is on record already');
    const earlier = lineOf.get(code);
    if (earlier !== undefined) return refuse(by, `stands in line ${earlier} already`);
    const because = kind === 'rolls' ? impossibleRoll(cells, batches, now) : null;
    if (because !== null) return refuse(because.field, because.because);
    lineOf.set(code, line);
    return { cells };
  };
}

function impossibleRoll(
  { batch = '', received = '' }: Cells,
  batches: ReadonlyMap<string, string | null>,
  now: string,
): { readonly field: TableField; readonly because: string } | null {
  const made = batches.get(String(batch));
  if (made === undefined) return { field: 'batch', because: 'there is no such batch; record it first' };
  if (String(received) > now) return { field: 'received', because: 'lies in the future' };
  // A day's difference is left to zones.
  if (made !== null && Date.parse(String(received)) + 86_400_000 < Date.parse(made)) {
    return { field: 'received', because: `its batch was made on ${made}` };
  }
  return null;
}
