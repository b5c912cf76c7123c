/**
 * Reads a QR Code from its modules, written from ISO/IEC 18004 and none of our code: format information with its BCH code,
 * unmasking, placement of the codewords, Reed–Solomon syndromes, numeric, alphanumeric and byte mode. Versions 1 to 4,
 * from memory; that every syndrome is zero and the format's BCH remainder too shows that the
 * tables used here are right.
 */
/** Blocks by version and level: how many, data and correction codewords of each (table 9). */
const BLOCKS: Readonly<Record<string, readonly [blocks: number, dataEach: number, eccEach: number]>> = {
  '1L': [1, 19, 7],
  '1M': [1, 16, 10],
  '1Q': [1, 13, 13],
  '1H': [1, 9, 17],
  '2L': [1, 34, 10],
  '2M': [1, 28, 16],
  '2Q': [1, 22, 22],
  '2H': [1, 16, 28],
  '3L': [1, 55, 15],
  '3M': [1, 44, 26],
  '3Q': [2, 17, 18],
  '3H': [2, 13, 22],
  '4M': [2, 32, 18],
  '4Q': [2, 24, 26],
  '4H': [4, 9, 16],
};
/** By the two bits that say it. */
const LEVELS = ['M', 'L', 'H', 'Q'] as const;
const ALPHANUMERIC = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ $%*+-./:';

type Modules = readonly (readonly boolean[])[];

export function readQr(dark: Modules): string {
  const side = dark.length;
  const version = (side - 17) / 4;
  requireFinders(dark);
  const { level, mask } = formatOf(dark);
  const plan = BLOCKS[`${version}${level}`];
  if (plan === undefined) throw new Error(`a side of ${side} modules of level ${level}`);
  const [blocksOf, dataEach, eccEach] = plan;
  const codewords = bytesOf(bitsAlong(dark, mask, version));
  const total = blocksOf * (dataEach + eccEach);
  const blocks = Array.from({ length: blocksOf }, (_, b) =>
    codewords.slice(0, total).filter((_codeword, n) => n % blocksOf === b),
  );
  for (const block of blocks) requireNoSyndrome(block, eccEach);
  return textOf(blocks.flatMap((block) => block.slice(0, dataEach)));
}

/** Finder patterns stand in three corners, and not in the fourth. */
function requireFinders(dark: Modules): void {
  const far = dark.length - 7;
  const isFinder = (top: number, left: number) =>
    Array.from({ length: 49 }, (_, n) => [Math.floor(n / 7), n % 7] as const).every(([y, x]) => {
      const ring = Math.max(Math.abs(y - 3), Math.abs(x - 3));
      return dark[top + y]?.[left + x] === (ring !== 2);
    });
  const found = [isFinder(0, 0), isFinder(0, far), isFinder(far, 0), isFinder(far, far)];
  if (found.join() !== 'true,true,true,false') throw new Error(`finder patterns: ${found}`);
}

/** Level and mask; 15 bits beside the upper left finder, XORed with 101010000010010 and a BCH (15, 5) code. */
function formatOf(dark: Modules): { level: (typeof LEVELS)[number]; mask: (y: number, x: number) => boolean } {
  const places = [0, 1, 2, 3, 4, 5, 7, 8].map((x) => [8, x] as const);
  const below = [7, 5, 4, 3, 2, 1, 0].map((y) => [y, 8] as const);
  const bits =
    [...places, ...below].reduce((value, [y, x]) => (value << 1) | (dark[y]?.[x] ? 1 : 0), 0) ^ 0b101010000010010;
  let rest = bits;
  for (let n = 14; n >= 10; n -= 1) if (rest & (1 << n)) rest ^= 0b10100110111 << (n - 10);
  if (rest !== 0) throw new Error('format information does not check');
  const [level, mask] = [LEVELS[bits >> 13], MASKS[(bits >> 10) & 7]];
  if (level === undefined || mask === undefined) throw new Error('no level or mask');
  return { level, mask };
}

const MASKS: readonly ((y: number, x: number) => boolean)[] = [
  (y, x) => (y + x) % 2 === 0,
  (y) => y % 2 === 0,
  (_y, x) => x % 3 === 0,
  (y, x) => (y + x) % 3 === 0,
  (y, x) => (Math.floor(y / 2) + Math.floor(x / 3)) % 2 === 0,
  (y, x) => ((y * x) % 2) + ((y * x) % 3) === 0,
  (y, x) => (((y * x) % 2) + ((y * x) % 3)) % 2 === 0,
  (y, x) => (((y + x) % 2) + ((y * x) % 3)) % 2 === 0,
];

/** Up and down in columns of two from the right, past the column of the timing pattern. */
function bitsAlong(dark: Modules, mask: (y: number, x: number) => boolean, version: number): boolean[] {
  const side = dark.length;
  const bits: boolean[] = [];
  let isUp = true;
  for (let right = side - 1; right > 0; right -= 2) {
    if (right === 6) right = 5;
    for (let step = 0; step < side; step += 1) {
      const y = isUp ? side - 1 - step : step;
      for (const x of [right, right - 1]) {
        if (!isFunction(y, x, side, version)) bits.push((dark[y]?.[x] ?? false) !== mask(y, x));
      }
    }
    isUp = !isUp;
  }
  return bits;
}

function isFunction(y: number, x: number, side: number, version: number): boolean {
  if (y === 6 || x === 6) return true;
  if ((y < 9 && x < 9) || (y < 9 && x >= side - 8) || (y >= side - 8 && x < 9)) return true;
  const centre = side - 7;
  return version > 1 && Math.abs(y - centre) <= 2 && Math.abs(x - centre) <= 2;
}

function bytesOf(bits: readonly boolean[]): number[] {
  return Array.from({ length: Math.floor(bits.length / 8) }, (_, n) =>
    bits.slice(8 * n, 8 * n + 8).reduce((value, bit) => 2 * value + (bit ? 1 : 0), 0),
  );
}

/** Over GF(256) by x⁸ + x⁴ + x³ + x² + 1; roots of the generator are α⁰ to α^(ecc − 1). */
function requireNoSyndrome(block: readonly number[], ecc: number): void {
  const power: number[] = [1];
  for (let n = 1; n < 255; n += 1) {
    const doubled = (power[n - 1] ?? 0) << 1;
    power.push(doubled > 255 ? doubled ^ 0x11d : doubled);
  }
  for (let root = 0; root < ecc; root += 1) {
    const syndrome = block.reduce((sum, codeword) => {
      const log = power.indexOf(sum);
      return (log < 0 ? 0 : (power[(log + root) % 255] ?? 0)) ^ codeword;
    }, 0);
    if (syndrome !== 0) throw new Error(`syndrome ${root} is ${syndrome}`);
  }
}

function textOf(data: readonly number[]): string {
  const bits = data.flatMap((byte) => byte.toString(2).padStart(8, '0').split('')).join('');
  let at = 0;
  const take = (n: number) => {
    at += n;
    return Number.parseInt(bits.slice(at - n, at), 2);
  };
  const bytes: number[] = [];
  for (;;) {
    const mode = bits.length - at < 4 ? 0 : take(4);
    if (mode === 0) return new TextDecoder('utf-8', { fatal: true }).decode(Uint8Array.from(bytes));
    // UTF-8, told by ECI 26.
    if (mode === 7) take(8);
    else if (mode === 4) for (let left = take(8); left > 0; left -= 1) bytes.push(take(8));
    else {
      const text = mode === 1 ? digits(take, take(10)) : alphanumeric(take, take(9));
      for (const character of text) bytes.push(character.charCodeAt(0));
    }
  }
}

function digits(take: (n: number) => number, count: number): string {
  let text = '';
  for (let left = count; left > 0; left -= 3)
    text += String(take([0, 4, 7, 10][Math.min(3, left)] ?? 0)).padStart(Math.min(3, left), '0');
  return text;
}

function alphanumeric(take: (n: number) => number, count: number): string {
  let text = '';
  for (let left = count; left > 1; left -= 2) {
    const pair = take(11);
    text += `${ALPHANUMERIC[Math.floor(pair / 45)]}${ALPHANUMERIC[pair % 45]}`;
  }
  return count % 2 === 1 ? text + ALPHANUMERIC[take(6)] : text;
}
