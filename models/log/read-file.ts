import { DomainError } from '../errors.ts';
import { openSource } from './byte-source.ts';
import type { Layout } from './layout.ts';
import type { LogFile } from './log-file.ts';
import { missingCodes } from './missing-codes.ts';
import type { PassedOverList } from './passed-over.ts';
import { BLANK, plainRowReader, READ, UNFINISHED } from './plain-row.ts';
import { readTop } from './read-top.ts';
import { rowCursor } from './row-cursor.ts';
import { nextScan, type ScanTable, scansTaken } from './scan-table.ts';
import { stampsOfLayout } from './stamps-of-layout.ts';
import { unusualRows } from './unusual-rows.ts';

/** Reads one file's scans into the table, in the order of its lines. */
export function readFile(
  file: LogFile,
  layout: Layout,
  table: ScanTable,
  passedOver: PassedOverList,
  windowBytes?: number,
): void {
  const source = openSource(file, layout.encoding ?? 'utf-8', windowBytes);
  try {
    const cursor = rowCursor(source, layout.delimiter ?? ',');
    const top = readTop(cursor, layout);
    const missing = missingCodes(layout.missing ?? [], layout.decimal ?? '.', source.charset);
    const stamps = stampsOfLayout(layout.time, layout.decimal ?? '.', source.charset);
    const plain = plainRowReader(top.plan, layout, missing, stamps, table);
    const unusual = unusualRows(file.name, top, layout, missing, stamps, table, passedOver);
    const firstScan = scansTaken(table);
    const scansToCome = scansToComeOf(file, layout);
    table.scansToCome = () => scansToCome(cursor.passed + cursor.from, scansTaken(table) - firstScan);
    for (;;) {
      const outcome = plain.read(source.bytes, cursor.from, source.end, source.isOver);
      if (outcome === READ) {
        unusual.beforeReading(plain.decimals);
        nextScan(table, cursor.line++);
        cursor.from = plain.next;
      } else if (outcome === BLANK) {
        passedOver.add('blank', cursor.line++);
        cursor.from = plain.next;
      } else if (outcome === UNFINISHED) {
        cursor.more();
      } else {
        const line = cursor.line;
        const row = cursor.nextRow();
        if (!row) break;
        unusual.take(row, line);
      }
    }
    unusual.finish();
    if (scansTaken(table) === firstScan) {
      throw new DomainError('log-no-readings', `${file.name} holds no reading`, { file: file.name });
    }
  } finally {
    source.close();
  }
}

/** How many more scans a file holds if they are as long as those so far; 0 where its length is not known. */
function scansToComeOf({ bytes }: LogFile, { encoding }: Layout): (bytesRead: number, scansRead: number) => number {
  if (bytes === undefined) return () => 0;
  const textBytes = encoding === 'utf-16le' || encoding === 'utf-16be' ? bytes / 2 : bytes;
  return (bytesRead, scansRead) => (Math.max(0, textBytes - bytesRead) / bytesRead) * scansRead * MARGIN;
}

/** Later lines may be shorter than the first. */
const MARGIN = 1.05;
