import { believableRange } from './channel-range.ts';
import { figureFromText } from './figure.ts';
import type { Layout } from './layout.ts';
import type { MissingCodes } from './missing-codes.ts';
import { scaledReading } from './readings.ts';
import type { RowPlan } from './row-plan.ts';
import type { ScanTable } from './scan-table.ts';
import type { StampReader } from './stamp-reader.ts';

/** What a row taken apart as text turned out to hold. */
export interface JudgedRow {
  /** NaN where the time cells are no stamp. */
  readonly stampMs: number;
  readonly stampText: string;
  /** As many cells as there are headings, and none with anything in it behind them. */
  readonly isWhole: boolean;
  readonly cells: number;
  /** First cell, counted from 0, that is neither a number nor a missing code. */
  readonly badCell: number | null;
  readonly figures: number;
}

/** Reads a row's stamp and figures as text, into the table's next place. */
export function judgeRow(
  cells: readonly string[],
  plan: RowPlan,
  layout: Layout,
  missing: MissingCodes,
  stamps: StampReader,
  table: ScanTable,
): JudgedRow {
  const decimal = layout.decimal ?? '.';
  const timeParts: string[] = layout.time.columns.map(() => '');
  let badCell: number | null = null;
  let figures = 0;
  for (const [column, target] of plan.targets.entries()) {
    const cell = cells[column];
    if (cell === undefined) break;
    const channel = layout.channels[target];
    if (target < -1) timeParts[-2 - target] = cell;
    if (!channel) continue;
    let value = Number.NaN;
    if (!missing.has(cell)) {
      value = figureFromText(cell, decimal);
      if (Number.isNaN(value)) badCell ??= column;
      else figures++;
      const [least, greatest] = believableRange(channel);
      const reading = scaledReading(value, channel);
      if (!(reading >= least && reading <= greatest)) value = Number.NaN;
    }
    table.blockFigures[table.place * table.channels + target] = value;
  }
  const stampText = timeParts.join(' ');
  const stamp = new TextEncoder().encode(stampText);
  const stampMs = timeParts.includes('') ? Number.NaN : stamps.read(stamp, stamp.length);
  table.blockStampMs[table.place] = stampMs;
  const isWhole = cells.length >= plan.cells && cells.slice(plan.cells).every((cell) => cell === '');
  return { stampMs, stampText, isWhole, cells: cells.length, badCell, figures };
}

/** Whether the time cells must have been meant as a stamp: they begin with a figure and hold at least four. */
export function looksStamped(row: JudgedRow): boolean {
  if (!Number.isNaN(row.stampMs)) return true;
  return /^ *\d/.test(row.stampText) && row.stampText.replace(/\D/g, '').length >= 4;
}

/** Whether the time cells are a stamp, whole or broken off: what a footer's words behind a date are not. */
export function beginsStamp(row: JudgedRow): boolean {
  return !Number.isNaN(row.stampMs) || (looksStamped(row) && /^[\d\s:/.,+-]*$/.test(row.stampText));
}
