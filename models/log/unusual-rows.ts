import type { DomainError } from '../errors.ts';
import { checkUnits } from './check-units.ts';
import type { Layout } from './layout.ts';
import type { MissingCodes } from './missing-codes.ts';
import type { PassedOverList } from './passed-over.ts';
import { firstReadingLine, type Top } from './read-top.ts';
import { rowErrors } from './row-errors.ts';
import { nextScan, type ScanTable, scansTaken } from './scan-table.ts';
import type { Row } from './split-row.ts';
import type { StampReader } from './stamp-reader.ts';
import { beginsStamp, type JudgedRow, judgeRow, looksStamped } from './text-row.ts';

/**
 * Decides about rows that are not plain readings: taken all the same, passed over, or refused.
 *
 * A row that might be a footer is refused only when a reading follows it, so the decision waits.
 */
export interface UnusualRows {
  /** Called for every reading before it counts, with the decimals of its last figure; −1 where that is absent. */
  beforeReading(decimals: number): void;
  take(row: Row, line: number): void;
  /** Called at the file's end. */
  finish(): void;
}

/** Of figures whose closing zeros are dropped one in ten has fewer decimals: this many alike were not so by chance. */
const ENOUGH_FIGURES = 40;

/** Rows that hold no reading so far as is known: a footer, if nothing follows. */
interface Waiting {
  readonly from: number;
  until: number;
  readonly error: DomainError;
  /** The refusal of the first row that was begun as a reading and broke off, which no footer does. */
  brokenOff: DomainError | null;
}

export function unusualRows(
  file: string,
  top: Top,
  layout: Layout,
  missing: MissingCodes,
  stamps: StampReader,
  table: ScanTable,
  passedOver: PassedOverList,
): UnusualRows {
  const { plan } = top;
  const errors = rowErrors(file, plan, layout);
  const lastTarget = plan.targets[plan.cells - 1] ?? -1;
  const linesOfTop = firstReadingLine(layout) - layout.header;
  let waiting: Waiting | null = null;
  /** First line behind a repeated header and the lines that belong to it. */
  let topUntil = 0;
  /** Decimals of every figure of the last column so far, −2 where they differ, and how many there were. */
  let decimalsOfLast = 0;
  let figuresOfLast = 0;

  return { beforeReading, take, finish };

  function beforeReading(decimals: number): void {
    if (waiting) throw waiting.error;
    if (lastTarget < 0 || decimals === -1) return;
    if (decimals !== decimalsOfLast) decimalsOfLast = figuresOfLast === 0 ? decimals : -2;
    figuresOfLast++;
  }

  function take(row: Row, line: number): void {
    const until = line + row.lines - 1;
    if (row.cells.every((cell) => cell === '') && row.badQuote === null) passedOver.add('blank', line, until);
    else if (isSameRow(row.cells, plan.headings)) {
      topUntil = line + linesOfTop;
      passOverTop(line, until);
    } else if (top.units.length > 0 && isSameRow(row.cells, top.units)) passOverTop(line, until);
    else {
      if (line < topUntil && line === topUntil - linesOfTop + (layout.units ?? 0) - layout.header) {
        checkUnits(row.cells, layout.channels, plan, file, line);
      }
      takeJudged(row, judgeRow(row.cells, plan, layout, missing, stamps, table), line, until);
    }
  }

  function takeJudged(row: Row, judged: JudgedRow, line: number, until: number): void {
    const hasStamp = !Number.isNaN(judged.stampMs);
    const isGood = judged.isWhole && hasStamp && judged.badCell === null && row.badQuote === null;
    if (isGood && (!row.isCutOff || isProvedWhole(row))) {
      const last = row.cells[plan.cells - 1]!;
      beforeReading(missing.has(last) ? -1 : decimalsOf(last));
      nextScan(table, line);
      return;
    }
    if (isGood) {
      passOverCutOff(judged, line, until);
      return;
    }
    const error = errorOf(row, judged, line);
    const isNumeric = judged.badCell === null && judged.figures > 0;
    const isReading = judged.isWhole && looksStamped(judged) && (hasStamp || isNumeric);
    const isCutInside = row.isCutOff && (judged.badCell ?? row.cells.length - 1) === row.cells.length - 1;
    if ((isReading && !isCutInside) || (row.badQuote !== null && row.lines > 1)) throw error;
    if (row.isCutOff) passOverCutOff(judged, line, until);
    else if (line < topUntil && !looksStamped(judged)) passOverTop(line, until);
    else {
      const isBrokenOff = judged.cells < plan.cells && beginsStamp(judged) && judged.badCell === null;
      waiting ??= { from: line, until, error, brokenOff: null };
      waiting.until = until;
      if (isBrokenOff) waiting.brokenOff ??= error;
    }
  }

  /** A header that comes again ends what waits before it: the recorder was started anew. */
  function passOverTop(line: number, until: number): void {
    if (waiting?.brokenOff) throw waiting.brokenOff;
    passedOver.add('repeated-header', waiting?.from ?? line, until);
    waiting = null;
  }

  function passOverCutOff(judged: JudgedRow, line: number, until: number): void {
    if (waiting) waiting.until = until;
    else
      passedOver.add(/^ *(?:\d|$)/.test(judged.stampText) ? 'truncated-last-line' : 'after-last-reading', line, until);
  }

  function finish(): void {
    if (!waiting) return;
    const isOneLine = waiting.from === waiting.until;
    if (scansTaken(table) === table.firstOfFile.at(-1)) throw waiting.error;
    if (waiting.brokenOff && !isOneLine) throw waiting.brokenOff;
    passedOver.add(waiting.brokenOff ? 'truncated-last-line' : 'after-last-reading', waiting.from, waiting.until);
  }

  function errorOf(row: Row, judged: JudgedRow, line: number): DomainError {
    if (row.badQuote !== null) return errors.quote(line, row.badQuote);
    if (!judged.isWhole) return errors.ragged(line, judged);
    if (Number.isNaN(judged.stampMs)) return errors.time(line, judged);
    return errors.cell(line, judged.badCell!, row.cells[judged.badCell!]!);
  }

  /**
   * Whether a row that ends with the file, without a line end, cannot have lost anything: `18` may be what is left of
   * `180,4`. Its last cell must be none of ours, closed by a delimiter or a quote, a missing code that is no beginning of
   * a number, or have as many decimals as every one of enough figures above it.
   */
  function isProvedWhole(row: Row): boolean {
    if (row.cells.length > plan.cells || lastTarget === -1 || (row.endsQuoted && lastTarget >= 0)) return true;
    if (lastTarget < -1) return false;
    const cell = row.cells[plan.cells - 1]!;
    if (missing.has(cell)) return /^[^\d+.,-]/.test(cell);
    return figuresOfLast >= ENOUGH_FIGURES && decimalsOfLast > 0 && decimalsOf(cell) === decimalsOfLast;
  }
}

function isSameRow(cells: readonly string[], others: readonly string[]): boolean {
  const length = Math.max(cells.length, others.length);
  for (let i = 0; i < length; i++) if ((cells[i] ?? '') !== (others[i] ?? '')) return false;
  return true;
}

/** Digits after the decimal mark; −2 where the cell has an exponent or is no figure. */
function decimalsOf(cell: string): number {
  return /^[+-]?\d*(?:[.,](\d*))?$/.test(cell) ? (cell.split(/[.,]/)[1]?.length ?? 0) : -2;
}
