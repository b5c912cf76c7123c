import type { LogEncoding } from '../../../models/log/layout.ts';

const LINE_FEED = 10;

/** Where the last whole line of some bytes ends; 0 where none does. Bytes begin at a character. */
export function endOfLastLine(bytes: Uint8Array, encoding: LogEncoding): number {
  const step = encoding === 'utf-16le' || encoding === 'utf-16be' ? 2 : 1;
  for (let at = bytes.length - (bytes.length % step) - step; at >= 0; at -= step) {
    if (isLineFeed(bytes, at, encoding)) return at + step;
  }
  return 0;
}

/** Where each line of some bytes begins, and behind the last where they end. */
export function lineStarts(bytes: Uint8Array, encoding: LogEncoding): number[] {
  const step = encoding === 'utf-16le' || encoding === 'utf-16be' ? 2 : 1;
  const starts = [0];
  for (let at = 0; at + step <= bytes.length; at += step) {
    if (isLineFeed(bytes, at, encoding)) starts.push(at + step);
  }
  return starts;
}

function isLineFeed(bytes: Uint8Array, at: number, encoding: LogEncoding): boolean {
  if (encoding === 'utf-16le') return bytes[at] === LINE_FEED && bytes[at + 1] === 0;
  if (encoding === 'utf-16be') return bytes[at] === 0 && bytes[at + 1] === LINE_FEED;
  return bytes[at] === LINE_FEED;
}
