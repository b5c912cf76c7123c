import { DomainError } from '../errors.ts';
import { checkEncoding } from './check-encoding.ts';
import type { LogEncoding } from './layout.ts';
import type { LogFile } from './log-file.ts';

/** How much of a file is looked at before its encoding is believed. */
const HEAD_BYTES = 4096;

/**
 * A file's text without its byte-order mark: UTF-8 or Windows-1252 as it came, UTF-16 turned into UTF-8.
 *
 * @throws {DomainError} `log-empty`, `log-not-text` or `log-encoding-wrong`.
 */
export function* textBytes(file: LogFile, encoding: LogEncoding): Generator<Uint8Array, void> {
  const isUtf16 = encoding === 'utf-16le' || encoding === 'utf-16be';
  const decode = isUtf16 ? utf8FromUtf16(encoding === 'utf-16be', file.name) : (bytes: Uint8Array) => bytes;
  let isHead = true;
  for (const chunk of withHead(file.chunks)) {
    const skipped = isHead ? checkEncoding(chunk, encoding, file.name) : 0;
    if (isHead && skipped === chunk.length) break;
    isHead = false;
    yield decode(chunk.subarray(skipped));
  }
  if (isHead) throw new DomainError('log-empty', `${file.name} is empty`, { file: file.name });
}

/** The same bytes, their first piece at least `HEAD_BYTES` long where there are so many; never an empty piece. */
function* withHead(chunks: Iterable<Uint8Array>): Generator<Uint8Array, void> {
  const head = new Uint8Array(HEAD_BYTES);
  let length = 0;
  let isHead = true;
  for (const chunk of chunks) {
    if (!isHead) {
      if (chunk.length > 0) yield chunk;
      continue;
    }
    const taken = Math.min(chunk.length, HEAD_BYTES - length);
    head.set(chunk.subarray(0, taken), length);
    length += taken;
    if (length < HEAD_BYTES) continue;
    isHead = false;
    yield head;
    if (taken < chunk.length) yield chunk.subarray(taken);
  }
  if (isHead && length > 0) yield head.subarray(0, length);
}

/** Turns pieces of UTF-16 into UTF-8, whatever stands across their edges; half a character at the file's end is dropped. */
function utf8FromUtf16(bigEndian: boolean, file: string): (bytes: Uint8Array) => Uint8Array {
  const first = bigEndian ? 8 : 0;
  const second = bigEndian ? 0 : 8;
  let half = -1;
  let highSurrogate = 0;
  return (bytes) => {
    const text = new Uint8Array(Math.ceil((bytes.length + 1) / 2) * 3 + 3);
    let length = 0;
    let at = 0;
    while (at < bytes.length) {
      if (half < 0) half = bytes[at++]!;
      if (at >= bytes.length) break;
      const unit = (half << first) | (bytes[at++]! << second);
      half = -1;
      const isLow = (unit & 0xfc00) === 0xdc00;
      if (isLow !== highSurrogate > 0) throw surrogateAlone(file);
      if (unit < 0x80) {
        text[length++] = unit;
      } else if (unit < 0x800) {
        text[length++] = 0xc0 | (unit >> 6);
        text[length++] = 0x80 | (unit & 0x3f);
      } else if ((unit & 0xfc00) === 0xd800) {
        highSurrogate = unit;
      } else if (isLow) {
        const point = 0x10000 + ((highSurrogate & 0x3ff) << 10) + (unit & 0x3ff);
        highSurrogate = 0;
        text[length++] = 0xf0 | (point >> 18);
        text[length++] = 0x80 | ((point >> 12) & 0x3f);
        text[length++] = 0x80 | ((point >> 6) & 0x3f);
        text[length++] = 0x80 | (point & 0x3f);
      } else {
        text[length++] = 0xe0 | (unit >> 12);
        text[length++] = 0x80 | ((unit >> 6) & 0x3f);
        text[length++] = 0x80 | (unit & 0x3f);
      }
    }
    return text.subarray(0, length);
  };
}

function surrogateAlone(file: string): DomainError {
  return new DomainError('log-encoding-wrong', `${file} is not UTF-16: half a character stands alone`, { file });
}
