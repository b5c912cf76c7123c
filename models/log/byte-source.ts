import { DomainError } from '../errors.ts';
import { textBytes } from './decode-bytes.ts';
import type { LogEncoding } from './layout.ts';
import type { LogFile } from './log-file.ts';
import { firstInvalidUtf8, firstZero, startOfCutCharacter } from './utf8.ts';

/** A window on a file's text, as bytes of UTF-8 or Windows-1252, moved forward by whoever reads it. */
export interface ByteSource {
  readonly file: string;
  readonly charset: 'utf-8' | 'windows-1252';
  /** `bytes[end]` is always a line feed, so that a search for a line's end cannot run past the window. */
  readonly bytes: Uint8Array;
  readonly end: number;
  /** Nothing comes after `end`. */
  readonly isOver: boolean;
  /**
   * Keeps the bytes from `from` on, moves them to the window's start and reads more behind them. `line` is the number
   * of the line that begins at `from`.
   */
  more(from: number, line: number): void;
  close(): void;
}

/** Longest line that is read: 1 MiB, some thousand times what a recorder writes. */
export const LONGEST_LINE_BYTES = 1 << 20;

/** Many files are small: the first window is. */
const FIRST_WINDOW_BYTES = 1 << 13;

const LINE_FEED = 10;
const CARRIAGE_RETURN = 13;

/** Opens a file's text. `windowBytes` is how much is read at a time; any size reads the same. */
export function openSource(file: LogFile, encoding: LogEncoding, windowBytes = 1 << 18): ByteSource {
  const pieces = textBytes(file, encoding);
  const charset = encoding === 'windows-1252' ? 'windows-1252' : 'utf-8';
  let waiting: Uint8Array = new Uint8Array(0);
  let bytes = new Uint8Array(Math.min(windowBytes, FIRST_WINDOW_BYTES) + 1);
  let end = 0;
  let isOver = false;

  function keep(from: number): void {
    const kept = end - from;
    const isSmall = bytes.length <= windowBytes && end > 0;
    const length = isSmall ? windowBytes + 1 : kept * 2 >= bytes.length ? bytes.length * 2 : bytes.length;
    const next = length === bytes.length ? bytes : new Uint8Array(length);
    next.set(bytes.subarray(from, end));
    bytes = next;
    end = kept;
  }

  function fill(): void {
    const last = bytes.length - 1;
    while (end < last) {
      if (waiting.length === 0) {
        const next = pieces.next();
        if (next.done) {
          isOver = true;
          break;
        }
        waiting = next.value;
      }
      const taken = Math.min(waiting.length, last - end);
      bytes.set(waiting.subarray(0, taken), end);
      waiting = waiting.subarray(taken);
      end += taken;
    }
    bytes[end] = LINE_FEED;
  }

  return {
    file: file.name,
    charset,
    get bytes() {
      return bytes;
    },
    get end() {
      return end;
    },
    get isOver() {
      return isOver;
    },
    more(from, line) {
      keep(from);
      if (end >= LONGEST_LINE_BYTES) throw lineTooLong(file.name, line);
      const checkFrom = charset === 'utf-8' ? startOfCutCharacter(bytes, end) : end;
      fill();
      const wrong = (charset === 'utf-8' ? firstInvalidUtf8 : firstZero)(bytes, checkFrom, end);
      if (wrong === end) return;
      const wrongLine = line + countLineEnds(bytes, wrong);
      throw bytes[wrong] === 0 ? zeroByte(file.name, wrongLine) : notUtf8(file.name, wrongLine);
    },
    close: () => void pieces.return(),
  };
}

/** How many lines end before `until`; CR LF is one end. */
function countLineEnds(bytes: Uint8Array, until: number): number {
  let count = 0;
  for (let i = 0; i < until; i++) {
    if (bytes[i] === LINE_FEED || (bytes[i] === CARRIAGE_RETURN && bytes[i + 1] !== LINE_FEED)) count++;
  }
  return count;
}

function lineTooLong(file: string, line: number): DomainError {
  return new DomainError(
    'log-line-too-long',
    `${file}, line ${line} is longer than ${LONGEST_LINE_BYTES} bytes; no recorder writes such lines`,
    { file, line },
  );
}

function zeroByte(file: string, line: number): DomainError {
  return new DomainError('log-not-text', `${file}, line ${line} holds a zero byte: it is damaged, or not a text file`, {
    file,
    line,
  });
}

function notUtf8(file: string, line: number): DomainError {
  return new DomainError(
    'log-encoding-wrong',
    `${file}, line ${line} is not UTF-8; a recorder that is not told otherwise often writes windows-1252`,
    { file, line, encoding: 'utf-8' },
  );
}
