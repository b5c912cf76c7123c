import { DomainError } from '../errors.ts';
import type { Layout } from './layout.ts';

/** Which column of a file holds what. */
export interface RowPlan {
  /** [columns]: a channel's index; `SKIPPED`; or −2 − k for the k-th part of the time. */
  readonly targets: Int32Array;
  /** Columns up to the last that has a heading; a row has as many cells, and perhaps empty ones behind. */
  readonly cells: number;
  readonly headings: readonly string[];
}

export const SKIPPED = -1;

/** Finds the layout's columns among the headings of one file. */
export function planRow(headings: readonly string[], layout: Layout, file: string, line: number): RowPlan {
  const cells = headings.findLastIndex((heading) => heading !== '') + 1;
  const targets = new Int32Array(cells).fill(SKIPPED);
  const claim = (column: string, target: number) => {
    const at = findColumn(column, headings, file, line);
    if (targets[at] !== SKIPPED) {
      const why = `"${column}" is column ${at + 1}, which the layout also reads as another`;
      throw columnError('log-column-twice', why, { file, line, column });
    }
    targets[at] = target;
  };
  for (const [k, column] of layout.time.columns.entries()) claim(column, -2 - k);
  for (const [k, { column }] of layout.channels.entries()) claim(column, k);
  return { targets, cells, headings };
}

/** A column by its heading, or by its number as `#5` where no heading says so. */
function findColumn(name: string, headings: readonly string[], file: string, line: number): number {
  const wanted = name.trim();
  const at = headings.indexOf(wanted);
  const facts = { file, line, column: name };
  if (at >= 0) {
    const again = headings.indexOf(wanted, at + 1);
    if (again < 0) return at;
    const numbers = `columns ${at + 1} and ${again + 1}`;
    throw columnError(
      'log-column-twice',
      `"${name}" is the heading of ${numbers}; name the one that is meant as "#${at + 1}" or "#${again + 1}"`,
      facts,
    );
  }
  const number = /^#(\d{1,4})$/.exec(wanted);
  const column = Number(number?.[1] ?? 0);
  if (column >= 1 && column <= headings.findLastIndex((heading) => heading !== '') + 1) return column - 1;
  const list = headings.filter((heading) => heading !== '').map((heading) => `"${heading}"`);
  throw columnError(
    'log-column-missing',
    `there is no column "${name}"; the headings are ${list.length > 0 ? list.join(', ') : 'all empty'}`,
    facts,
  );
}

function columnError(
  code: 'log-column-twice' | 'log-column-missing',
  why: string,
  facts: { file: string; line: number; column: string },
): DomainError {
  return new DomainError(code, `${facts.file}, line ${facts.line}: ${why}`, facts);
}
