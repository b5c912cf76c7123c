/** One row taken apart into the texts of its cells. */
export interface Row {
  /** Unquoted and trimmed. */
  readonly cells: readonly string[];
  /** Where the next row begins. */
  readonly next: number;
  /** How many lines of the file it takes: more than one where a quoted cell holds line ends. */
  readonly lines: number;
  /** It ends with the file, not with a line end. */
  readonly isCutOff: boolean;
  /** Its last cell was quoted and the quote was closed. */
  readonly endsQuoted: boolean;
  /** The cell, counted from 0, whose quotes are wrong: text behind the closing quote, or never closed. */
  readonly badQuote: number | null;
}

const QUOTE = 0x22;
const SPACE = 0x20;
const LINE_FEED = 10;
const CARRIAGE_RETURN = 13;

/**
 * Takes the row that begins at `from` apart: RFC 4180, where a quote counts only at the very start of a cell.
 *
 * @returns null where the row runs past `end` and the file goes on.
 */
export function splitRow(
  bytes: Uint8Array,
  from: number,
  end: number,
  isOver: boolean,
  delimiter: number,
  decode: (bytes: Uint8Array) => string,
): Row | null {
  const cells: string[] = [];
  let badQuote: number | null = null;
  let endsQuoted = false;
  let lines = 1;
  let at = from;
  if (delimiter === SPACE) at = endOfSpaces(bytes, at, end);
  for (;;) {
    let cell = '';
    endsQuoted = false;
    if (at < end && bytes[at] === QUOTE) {
      const close = closingQuote(bytes, at + 1, end);
      if (close === end && !isOver) return null;
      lines += lineEndsBetween(bytes, at, close);
      cell = decode(bytes.subarray(at + 1, close)).replaceAll('""', '"');
      at = Math.min(end, close + 1);
      endsQuoted = close < end;
      if (!endsQuoted) badQuote ??= cells.length;
    }
    const start = at;
    while (at < end && bytes[at] !== delimiter && bytes[at] !== LINE_FEED && bytes[at] !== CARRIAGE_RETURN) at++;
    if (at === end && !isOver) return null;
    const bare = decode(bytes.subarray(start, at));
    if (endsQuoted && bare.trim() !== '') badQuote ??= cells.length;
    cells.push((cell + bare).trim());
    if (at === end || bytes[at] !== delimiter) break;
    at++;
    if (delimiter === SPACE) at = endOfSpaces(bytes, at, end);
  }
  const isCutOff = at === end;
  if (!isCutOff && bytes[at] === CARRIAGE_RETURN) {
    if (at + 1 === end && !isOver) return null;
    if (at + 1 < end && bytes[at + 1] === LINE_FEED) at++;
  }
  return { cells, next: isCutOff ? end : at + 1, lines, isCutOff, endsQuoted, badQuote };
}

/** Where the quote that closes a cell stands; `end` where there is none. A doubled quote is one quote of the text. */
function closingQuote(bytes: Uint8Array, from: number, end: number): number {
  for (let at = from; at < end; at++) {
    if (bytes[at] !== QUOTE) continue;
    if (at + 1 < end && bytes[at + 1] === QUOTE) at++;
    else return at;
  }
  return end;
}

function lineEndsBetween(bytes: Uint8Array, from: number, until: number): number {
  let count = 0;
  for (let i = from; i < until; i++) {
    if (bytes[i] === LINE_FEED || (bytes[i] === CARRIAGE_RETURN && bytes[i + 1] !== LINE_FEED)) count++;
  }
  return count;
}

function endOfSpaces(bytes: Uint8Array, from: number, end: number): number {
  let at = from;
  while (at < end && bytes[at] === SPACE) at++;
  return at;
}
