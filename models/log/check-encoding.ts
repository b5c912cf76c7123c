import { DomainError } from '../errors.ts';
import type { LogEncoding } from './layout.ts';

/** Byte-order marks, the longer first where one begins like another. */
const MARKS: readonly { readonly encoding: LogEncoding | 'utf-32'; readonly bytes: readonly number[] }[] = [
  { encoding: 'utf-8', bytes: [0xef, 0xbb, 0xbf] },
  { encoding: 'utf-32', bytes: [0xff, 0xfe, 0x00, 0x00] },
  { encoding: 'utf-32', bytes: [0x00, 0x00, 0xfe, 0xff] },
  { encoding: 'utf-16le', bytes: [0xff, 0xfe] },
  { encoding: 'utf-16be', bytes: [0xfe, 0xff] },
];

/** The encoding that a byte-order mark announces, and its length in bytes. */
export function findMark(head: Uint8Array): { encoding: LogEncoding | 'utf-32'; length: number } | null {
  for (const { encoding, bytes } of MARKS) {
    if (bytes.every((byte, i) => head[i] === byte)) return { encoding, length: bytes.length };
  }
  return null;
}

/**
 * Holds the first bytes of a file against the encoding its layout names.
 *
 * @returns how many bytes of byte-order mark to pass over.
 * @throws {DomainError} `log-encoding-wrong` when a mark or the zero bytes of UTF-16 say otherwise; `log-not-text` when
 *   the file is no text at all.
 */
export function checkEncoding(head: Uint8Array, encoding: LogEncoding, file: string): number {
  const mark = findMark(head);
  if (mark && mark.encoding !== encoding) {
    throw wrongEncoding(file, encoding, `its byte-order mark says ${mark.encoding}`);
  }
  const looks = looksLikeUtf16(head);
  if (encoding === 'utf-16le' || encoding === 'utf-16be') {
    if (!mark && looks !== encoding) {
      throw wrongEncoding(file, encoding, looks ? `its bytes are ${looks}` : 'its bytes are not UTF-16');
    }
  } else {
    if (looks) throw wrongEncoding(file, encoding, `its bytes are ${looks}`);
    if (isBinary(head)) throw new DomainError('log-not-text', `${file} is not a text file`, { file });
  }
  return mark?.length ?? 0;
}

/** UTF-16 of a log is mostly ASCII: every other byte is zero. */
export function looksLikeUtf16(head: Uint8Array): 'utf-16le' | 'utf-16be' | null {
  const units = Math.min(head.length, 4096) >> 1;
  let zerosFirst = 0;
  let zerosSecond = 0;
  for (let i = 0; i < units; i++) {
    if (head[2 * i] === 0) zerosFirst++;
    if (head[2 * i + 1] === 0) zerosSecond++;
  }
  if (units > 0 && zerosSecond > 0.7 * units && zerosFirst < 0.1 * units) return 'utf-16le';
  if (units > 0 && zerosFirst > 0.7 * units && zerosSecond < 0.1 * units) return 'utf-16be';
  return null;
}

/** A zero byte, or more than one control character in a hundred bytes (tab, line ends, form feed, Ctrl-Z aside). */
export function isBinary(head: Uint8Array): boolean {
  let controls = 0;
  for (const byte of head) {
    if (byte === 0) return true;
    if (byte < 0x20 && byte !== 9 && byte !== 10 && byte !== 13 && byte !== 12 && byte !== 0x1a) controls++;
  }
  return controls * 100 > head.length;
}

function wrongEncoding(file: string, encoding: LogEncoding, why: string): DomainError {
  return new DomainError('log-encoding-wrong', `${file} is not ${encoding}, as its layout says: ${why}`, {
    file,
    encoding,
  });
}
