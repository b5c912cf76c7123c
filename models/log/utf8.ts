/**
 * Where the first byte stands that cannot be UTF-8 text, or is zero; `until` where there is none. A character cut off by
 * `until` is no fault.
 *
 * Source: The Unicode Standard 15.0, table 3-7, well-formed UTF-8 byte sequences.
 */
export function firstInvalidUtf8(bytes: Uint8Array, from: number, until: number): number {
  for (let at = endOfAscii(bytes, from, until); at < until; at = endOfAscii(bytes, at, until)) {
    const lead = bytes[at]!;
    if (lead === 0) return at;
    const length = lengthFrom(lead);
    if (length === 0) return at;
    for (let i = 1; i < length; i++) {
      if (at + i >= until) return until;
      const byte = bytes[at + i]!;
      const [least, greatest] = i === 1 ? secondByte(lead) : ANY_FOLLOWING;
      if (byte < least || byte > greatest) return at;
    }
    at += length;
  }
  return until;
}

/** Where the first zero byte stands; `until` where there is none. */
export function firstZero(bytes: Uint8Array, from: number, until: number): number {
  let at = endOfAscii(bytes, from, until);
  while (at < until && bytes[at] !== 0) at = endOfAscii(bytes, at + 1, until);
  return at;
}

/**
 * Where the first byte stands that is zero or no ASCII; looked for four bytes at a time, as nearly all of a log is ASCII.
 *
 * Source: the test of a word for a zero byte: Warren, Hacker's Delight, 2nd ed., §6-1.
 */
function endOfAscii(bytes: Uint8Array, from: number, until: number): number {
  let at = from;
  while (at < until && (bytes.byteOffset + at) % 4 !== 0) {
    if (isOdd(bytes[at]!)) return at;
    at++;
  }
  if (at === until) return until;
  const words = new Int32Array(bytes.buffer, bytes.byteOffset + at, (until - at) >> 2);
  let word = 0;
  while (word < words.length && ((words[word]! | ((words[word]! - ONES) & ~words[word]!)) & TOPS) === 0) word++;
  at += word * 4;
  while (at < until && !isOdd(bytes[at]!)) at++;
  return at;
}

/** The top and the bottom bit of each of four bytes. */
const TOPS = 0x80808080 | 0;
const ONES = 0x01010101;

function isOdd(byte: number): boolean {
  return byte >= 0x80 || byte === 0;
}

/** Where the character begins that `until` cuts off; `until` where it cuts none. */
export function startOfCutCharacter(bytes: Uint8Array, until: number): number {
  for (let back = 1; back <= 3 && back <= until; back++) {
    const byte = bytes[until - back]!;
    if ((byte & 0xc0) !== 0x80) return lengthFrom(byte) > back ? until - back : until;
  }
  return until;
}

function lengthFrom(lead: number): number {
  if (lead < 0x80) return 1;
  if (lead >= 0xc2 && lead <= 0xdf) return 2;
  if (lead >= 0xe0 && lead <= 0xef) return 3;
  return lead >= 0xf0 && lead <= 0xf4 ? 4 : 0;
}

const ANY_FOLLOWING: readonly [number, number] = [0x80, 0xbf];
/** Second bytes that would write a character longer than need be, a surrogate, or one beyond U+10FFFF are left out. */
const SECOND_BYTES: ReadonlyMap<number, readonly [number, number]> = new Map([
  [0xe0, [0xa0, 0xbf]],
  [0xed, [0x80, 0x9f]],
  [0xf0, [0x90, 0xbf]],
  [0xf4, [0x80, 0x8f]],
]);

function secondByte(lead: number): readonly [number, number] {
  return SECOND_BYTES.get(lead) ?? ANY_FOLLOWING;
}
