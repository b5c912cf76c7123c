import { believableRange } from './channel-range.ts';
import type { Layout } from './layout.ts';
import type { MissingCodes } from './missing-codes.ts';
import { scaledReading } from './readings.ts';
import { type RowPlan, SKIPPED } from './row-plan.ts';
import type { ScanTable } from './scan-table.ts';
import type { StampReader } from './stamp-reader.ts';

/** What a try at one row came to. */
export const READ = 0;
export const BLANK = 1;
/** The row runs past the window. */
export const UNFINISHED = 2;
/** Anything out of the ordinary: to be taken apart as text. */
export const NOT_PLAIN = 3;
export type RowOutcome = typeof READ | typeof BLANK | typeof UNFINISHED | typeof NOT_PLAIN;

/** Reads the rows that are as they should be without making a single string: almost all of a log. */
export interface PlainRowReader {
  /**
   * Tries the row at `from`. A row that is `READ` stands in the table's next place, not yet counted. `bytes[end]` must
   * be a line feed.
   */
  read(bytes: Uint8Array, from: number, end: number, isOver: boolean): RowOutcome;
  /** Where the next row begins, after `READ` and `BLANK`. */
  next: number;
  /** Decimals of the figure read last; −1 where it was absent. */
  decimals: number;
}

const ZERO = 0x30;
const QUOTE = 0x22;
const SPACE = 0x20;
const PLUS = 0x2b;
const MINUS = 0x2d;
const LINE_FEED = 10;
const CARRIAGE_RETURN = 13;
/** So many digits are a whole number that is exact in a double; divided by an exact power of ten it is rounded once. */
const MOST_DIGITS = 15;
/** So many bytes of digits and mark are a whole number that is exact in 32 bits. */
const MOST_INTEGER_BYTES = 9;
const TEN_TO = Float64Array.from({ length: MOST_DIGITS + 1 }, (_, power) => 10 ** power);
const MOST_STAMP_BYTES = 128;

export function plainRowReader(
  plan: RowPlan,
  layout: Layout,
  missing: MissingCodes,
  stamps: Pick<StampReader, 'read'>,
  table: ScanTable,
): PlainRowReader {
  const { targets, cells } = plan;
  const delimiter = (layout.delimiter ?? ',').charCodeAt(0);
  const decimal = (layout.decimal ?? '.').charCodeAt(0);
  const isSpaced = delimiter === SPACE;
  const channels = layout.channels;
  const isScaled = channels.map(({ scale = 1, offset = 0 }) => scale !== 1 || offset !== 0);
  const ranges = channels.map(believableRange);
  const least = Float64Array.from(ranges, ([low]) => low);
  const greatest = Float64Array.from(ranges, ([, high]) => high);
  const partFrom = new Int32Array(layout.time.columns.length);
  const partUntil = new Int32Array(layout.time.columns.length);
  const stamp = new Uint8Array(MOST_STAMP_BYTES);

  // From here up a figure is a reading without another look: nowhere where it is scaled or may be a missing code.
  const plainLeast = Float64Array.from(ranges, ([low, high], k) => {
    const mayBeMissing = missing.figures.some((figure) => figure >= low && figure <= high);
    return isScaled[k] || mayBeMissing ? Infinity : low;
  });
  /** The decimal mark where it needs no quotes around it; no byte at all where it does. */
  const plainDecimal = decimal === delimiter ? -1 : decimal;
  const reader: PlainRowReader = { read, next: 0, decimals: 0 };
  return reader;

  function read(bytes: Uint8Array, from: number, end: number, isOver: boolean): RowOutcome {
    const figures = table.blockFigures;
    const base = table.place * table.channels;
    let at = isSpaced ? endOfSpaces(bytes, from) : from;
    if (isLineEnd(bytes[at]!)) return endRow(bytes, at, end, isOver, BLANK);
    for (let column = 0; ; column++) {
      const target = column < cells ? targets[column]! : SKIPPED;
      if (target >= 0) {
        // As nearly all figures are: digits, perhaps a mark and digits, the delimiter. Anything else is read anew below.
        let last = at;
        let byte = bytes[at]!;
        let figure = 0;
        for (let digit = byte - ZERO; digit >>> 0 <= 9; digit = byte - ZERO) {
          figure = (Math.imul(figure, 10) + digit) | 0;
          byte = bytes[++last]!;
        }
        let decimals = 0;
        if (byte === plainDecimal && last > at) {
          byte = bytes[++last]!;
          const decimalsFrom = last;
          for (let digit = byte - ZERO; digit >>> 0 <= 9; digit = byte - ZERO) {
            figure = (Math.imul(figure, 10) + digit) | 0;
            byte = bytes[++last]!;
          }
          decimals = last - decimalsFrom;
        }
        const value = figure / TEN_TO[decimals]!;
        const isShort = last > at && last - at <= MOST_INTEGER_BYTES && isCellEnd(byte);
        if (isShort && value >= plainLeast[target]! && value <= greatest[target]!) {
          figures[base + target] = value;
          reader.decimals = decimals;
          at = last;
        } else {
          at = readFigure(bytes, at, target);
        }
      } else if (target < SKIPPED) at = readTimePart(bytes, at, -2 - target);
      else at = column < cells ? skipCell(bytes, at) : endOfSpaces(bytes, at);
      if (at < 0) return NOT_PLAIN;
      const byte = bytes[at]!;
      if (byte === delimiter) {
        at++;
        if (isSpaced) at = endOfSpaces(bytes, at);
      } else if (isLineEnd(byte)) {
        if (at < end && column < cells - 1) return NOT_PLAIN;
        break;
      } else return NOT_PLAIN;
    }
    if (at >= end) return isOver ? NOT_PLAIN : UNFINISHED;
    const stampMs = joinedStamp(bytes);
    if (Number.isNaN(stampMs)) return NOT_PLAIN;
    table.blockStampMs[table.place] = stampMs;
    return endRow(bytes, at, end, isOver, READ);
  }

  /** Reads any figure, a missing code or nothing into the table; returns where the cell ends, or −1. */
  function readFigure(bytes: Uint8Array, from: number, channel: number): number {
    const place = table.place * table.channels + channel;
    let at = isSpaced ? from : endOfSpaces(bytes, from);
    const isQuoted = bytes[at] === QUOTE && at === from;
    if (isQuoted) at++;
    const isNegative = bytes[at] === MINUS;
    if (isNegative || bytes[at] === PLUS) at++;
    let figure = 0;
    let digits = 0;
    let decimals = -1;
    for (; ; at++) {
      const digit = bytes[at]! - ZERO;
      if (digit >>> 0 <= 9) {
        figure = figure * 10 + digit;
        digits++;
        if (decimals >= 0) decimals++;
      } else if (bytes[at] === decimal && decimals < 0 && (isQuoted || decimal !== delimiter)) decimals = 0;
      else break;
    }
    if (isQuoted && bytes[at++] !== QUOTE) return -1;
    if (digits === 0 || digits > MOST_DIGITS || !isCellEnd(bytes[at]!)) {
      table.blockFigures[place] = Number.NaN;
      reader.decimals = -1;
      return isQuoted ? -1 : endOfMissing(bytes, from);
    }
    const size = figure / TEN_TO[Math.max(0, decimals)]!;
    const value = isNegative ? 0 - size : size;
    reader.decimals = Math.max(0, decimals);
    table.blockFigures[place] = isReading(bytes, from, at, value, channel) ? value : Number.NaN;
    return at;
  }

  /** Whether a figure is a reading: within the channel's range, and no missing code. */
  function isReading(bytes: Uint8Array, from: number, until: number, value: number, channel: number): boolean {
    if (missing.figures.includes(value) && missing.has(textOf(bytes, from, until))) return false;
    const reading = scaledReading(value, channels[channel]!);
    return reading >= least[channel]! && reading <= greatest[channel]!;
  }

  /** Where a cell ends that holds a missing code or nothing; −1 for any other. */
  function endOfMissing(bytes: Uint8Array, from: number): number {
    const start = isSpaced ? from : endOfSpaces(bytes, from);
    if (isCellEnd(bytes[start]!)) return start;
    for (const code of missing.bytes) {
      let at = start;
      let i = 0;
      while (i < code.length && bytes[at] === code[i]) {
        at++;
        i++;
      }
      if (i < code.length) continue;
      if (!isSpaced) at = endOfSpaces(bytes, at);
      if (isCellEnd(bytes[at]!)) return at;
    }
    return -1;
  }

  function readTimePart(bytes: Uint8Array, from: number, part: number): number {
    const isQuoted = bytes[from] === QUOTE;
    let at = isQuoted ? from + 1 : isSpaced ? from : endOfSpaces(bytes, from);
    partFrom[part] = at;
    if (isQuoted) {
      while (bytes[at] !== QUOTE && !isLineEnd(bytes[at]!)) at++;
      partUntil[part] = at;
      return bytes[at] === QUOTE ? at + 1 : -1;
    }
    while (!isCellEnd(bytes[at]!)) at++;
    let until = at;
    while (until > partFrom[part]! && bytes[until - 1] === SPACE) until--;
    partUntil[part] = until;
    return at;
  }

  function joinedStamp(bytes: Uint8Array): number {
    let length = 0;
    for (let part = 0; part < partFrom.length; part++) {
      if (part > 0) stamp[length++] = SPACE;
      const until = partUntil[part]!;
      if (length + until - partFrom[part]! >= MOST_STAMP_BYTES) return Number.NaN;
      for (let at = partFrom[part]!; at < until; at++) stamp[length++] = bytes[at]!;
    }
    return stamps.read(stamp, length);
  }

  function skipCell(bytes: Uint8Array, from: number): number {
    let at = from;
    if (bytes[at] === QUOTE) {
      do at++;
      while (bytes[at] !== QUOTE && !isLineEnd(bytes[at]!));
      return bytes[at] === QUOTE && isCellEnd(bytes[at + 1]!) ? at + 1 : -1;
    }
    while (!isCellEnd(bytes[at]!)) at++;
    return at;
  }

  function isCellEnd(byte: number): boolean {
    return byte === delimiter || byte === LINE_FEED || byte === CARRIAGE_RETURN;
  }

  function endRow(bytes: Uint8Array, at: number, end: number, isOver: boolean, outcome: RowOutcome): RowOutcome {
    if (at >= end) return isOver ? NOT_PLAIN : UNFINISHED;
    reader.next = at + 1;
    if (bytes[at] !== CARRIAGE_RETURN) return outcome;
    if (at + 1 === end && !isOver) return UNFINISHED;
    if (at + 1 < end && bytes[at + 1] === LINE_FEED) reader.next = at + 2;
    return outcome;
  }
}

function isLineEnd(byte: number): boolean {
  return byte === LINE_FEED || byte === CARRIAGE_RETURN;
}

/** A cell's text without its quotes; ASCII only. */
function textOf(bytes: Uint8Array, from: number, until: number): string {
  const isQuoted = bytes[from] === QUOTE;
  return String.fromCharCode(...bytes.subarray(isQuoted ? from + 1 : from, isQuoted ? until - 1 : until)).trim();
}

function endOfSpaces(bytes: Uint8Array, from: number): number {
  let at = from;
  while (bytes[at] === SPACE) at++;
  return at;
}
