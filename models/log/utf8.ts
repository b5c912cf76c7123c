/**
 * Where the first byte stands that cannot be UTF-8; `until` where there is none. A character cut off by `until` is no
 * fault.
 *
 * Source: The Unicode Standard 15.0, table 3-7, well-formed UTF-8 byte sequences.
 */
export function firstInvalidUtf8(bytes: Uint8Array, from: number, until: number): number {
  for (let at = endOfAscii(bytes, from, until); at < until; at = endOfAscii(bytes, at, until)) {
    const lead = bytes[at]!;
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

/** Where the first byte stands that is no ASCII; looked for four bytes at a time, as nearly all of a log is ASCII. */
function endOfAscii(bytes: Uint8Array, from: number, until: number): number {
  let at = from;
  while (at < until && (bytes.byteOffset + at) % 4 !== 0) {
    if (bytes[at]! >= 0x80) return at;
    at++;
  }
  if (at === until) return until;
  const words = new Int32Array(bytes.buffer, bytes.byteOffset + at, (until - at) >> 2);
  let word = 0;
  while (word < words.length && (words[word]! & NOT_ASCII) === 0) word++;
  at += word * 4;
  while (at < until && bytes[at]! < 0x80) at++;
  return at;
}

/** The top bit of each of four bytes. */
const NOT_ASCII = 0x80808080 | 0;

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
