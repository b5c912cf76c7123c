import { DomainError } from '../errors.ts';
import { checkUnits } from './check-units.ts';
import type { Layout } from './layout.ts';
import type { RowCursor } from './row-cursor.ts';
import { planRow, type RowPlan } from './row-plan.ts';

/** What the lines above the readings say. */
export interface Top {
  readonly plan: RowPlan;
  /** Cells of the units row; empty where there is none. */
  readonly units: readonly string[];
}

/** Line of the first reading where the layout leaves it out: the one after headings and units. */
export function firstReadingLine({ header, units, firstReading }: Layout): number {
  return firstReading ?? Math.max(header, units ?? 0) + 1;
}

/** Reads headings and units and leaves the cursor at the first reading. */
export function readTop(cursor: RowCursor, layout: Layout): Top {
  const file = cursor.source.file;
  let headings: readonly string[] = [];
  let units: readonly string[] = [];
  const rows = [
    { line: layout.header, keep: (cells: readonly string[]) => (headings = cells), what: 'the headings' },
    { line: layout.units ?? 0, keep: (cells: readonly string[]) => (units = cells), what: 'the units' },
  ].filter(({ line }) => line > 0);
  for (const { line, keep, what } of rows.sort((a, b) => a.line - b.line)) {
    skipTo(line, cursor, what);
    const row = cursor.nextRow();
    if (!row) throw endsTooEarly(file, cursor.line - 1, line, what);
    keep(row.cells);
  }
  const plan = planRow(headings, layout, file, layout.header);
  if (layout.units !== undefined) checkUnits(units, layout.channels, plan, file, layout.units);
  skipTo(firstReadingLine(layout), cursor, 'the first reading');
  return { plan, units };
}

function skipTo(line: number, cursor: RowCursor, what: string): void {
  while (cursor.line < line) {
    if (!cursor.skipLine()) throw endsTooEarly(cursor.source.file, cursor.line - 1, line, what);
  }
}

function endsTooEarly(file: string, lastLine: number, line: number, what: string): DomainError {
  return new DomainError(
    'log-no-readings',
    `${file} ends at line ${lastLine}; its layout expects ${what} in line ${line}`,
    { file, line: lastLine, expectedLine: line },
  );
}
