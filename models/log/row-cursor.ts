import type { ByteSource } from './byte-source.ts';
import { type Row, splitRow } from './split-row.ts';

/** A place in a file's text, moved forward row by row. */
export interface RowCursor {
  readonly source: ByteSource;
  /** Where the next row begins in `source.bytes`. */
  from: number;
  /** Bytes of text that have left the window. */
  passed: number;
  /** Its line, counted from 1. */
  line: number;
  isAtEnd(): boolean;
  /** Brings more of the file behind what is unread. */
  more(): void;
  /** The row at the cursor, which then stands behind it; null at the end. */
  nextRow(): Row | null;
  /** Passes over one line of the file, whatever it holds; false at the end. */
  skipLine(): boolean;
}

export function rowCursor(source: ByteSource, delimiter: string): RowCursor {
  const decoder = new TextDecoder(source.charset);
  const decode = (bytes: Uint8Array) => decoder.decode(bytes);
  const delimiterByte = delimiter.charCodeAt(0);
  const cursor: RowCursor = { source, from: 0, passed: 0, line: 1, isAtEnd, more, nextRow, skipLine };
  return cursor;

  function isAtEnd(): boolean {
    if (cursor.from === source.end && !source.isOver) more();
    return cursor.from === source.end && source.isOver;
  }

  function more(): void {
    source.more(cursor.from, cursor.line);
    cursor.passed += cursor.from;
    cursor.from = 0;
  }

  function nextRow(): Row | null {
    if (isAtEnd()) return null;
    for (;;) {
      const row = splitRow(source.bytes, cursor.from, source.end, source.isOver, delimiterByte, decode);
      if (row) {
        cursor.from = row.next;
        cursor.line += row.lines;
        return row;
      }
      more();
    }
  }

  function skipLine(): boolean {
    if (isAtEnd()) return false;
    for (;;) {
      const { bytes, end, isOver } = source;
      let at = cursor.from;
      while (bytes[at] !== 10 && bytes[at] !== 13) at++;
      if (at < end && (bytes[at] === 10 || at + 1 < end || isOver)) {
        cursor.from = bytes[at] === 13 && at + 1 < end && bytes[at + 1] === 10 ? at + 2 : at + 1;
        cursor.line++;
        return true;
      }
      if (isOver) {
        cursor.from = end;
        cursor.line++;
        return true;
      }
      more();
    }
  }
}
