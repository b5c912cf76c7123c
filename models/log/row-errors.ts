import { DomainError } from '../errors.ts';
import type { Layout } from './layout.ts';
import type { RowPlan } from './row-plan.ts';
import { expectedStamp } from './stamps-of-layout.ts';
import type { JudgedRow } from './text-row.ts';

/** Refusals of one row: file, line, column, what stands there, what was expected, and what may be done. */
export interface RowErrors {
  cell(line: number, column: number, cell: string): DomainError;
  quote(line: number, column: number): DomainError;
  ragged(line: number, row: JudgedRow): DomainError;
  time(line: number, row: JudgedRow): DomainError;
}

export function rowErrors(file: string, plan: RowPlan, layout: Layout): RowErrors {
  const decimal = layout.decimal ?? '.';
  const mark = decimal === ',' ? 'comma' : 'point';
  const nameOf = (column: number) => plan.headings[column] || `#${column + 1}`;
  return {
    cell(line, column, cell) {
      const where = `${file}, line ${line}, column "${nameOf(column)}"`;
      return new DomainError(
        'log-cell-unreadable',
        `${where}: "${shortened(cell)}" is not a number with decimal ${mark}${hintOn(cell)}. ` +
          'If it means "no reading", add it to the missing codes of the layout.',
        { file, line, column: nameOf(column), cell: shortened(cell), expected: `a number with decimal ${mark}` },
      );
    },
    quote(line, column) {
      return new DomainError(
        'log-cell-unreadable',
        `${file}, line ${line}, column "${nameOf(column)}": a quoted cell is not closed, or something follows its closing quote`,
        { file, line, column: nameOf(column), expected: 'a closing quote, then the delimiter' },
      );
    },
    ragged(line, row) {
      return new DomainError(
        'log-row-ragged',
        `${file}, line ${line} has ${row.cells} cells; expected ${plan.cells}, as there are headings`,
        { file, line, cells: row.cells, expected: plan.cells },
      );
    },
    time(line, row) {
      const expected = expectedStamp(layout.time, decimal);
      const column = layout.time.columns.join(' ');
      return new DomainError(
        'log-time-unreadable',
        `${file}, line ${line}, column "${column}": "${shortened(row.stampText.trim())}" is not ${expected}`,
        { file, line, column, cell: shortened(row.stampText.trim()), expected },
      );
    },
  };
}

function hintOn(cell: string): string {
  if (/^[+-]?\d{1,3}(?:[.,'’\s]\d{3})+(?:[.,]\d+)?$/u.test(cell)) return ' (thousands separators are not read)';
  if (/^[+-]?\d+[.,]\d+$/.test(cell)) return ' (the layout names another decimal mark)';
  if (/^[+-]?\d+(?:[.,]\d+)?\s*\D+$/u.test(cell)) return ' (something stands behind the figure)';
  return '';
}

function shortened(cell: string): string {
  return cell.length <= 40 ? cell : `${cell.slice(0, 39)}…`;
}
