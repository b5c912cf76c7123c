/**
 * Reads a Code 128 from the widths of its bars and spaces.
 *
 * Widths by symbol value: ISO/IEC 15417:2007, table 1 (from memory, and checked by what the table itself promises: every
 * character has 11 modules in three bars and three spaces, bars of an even sum). Check digit: the same, Annex A.
 */
const WIDTHS =
  '212222 222122 222221 121223 121322 131222 122213 122312 132212 221213 221312 231212 112232 122132 122231 113222 123122 123221 223211 221132 221231 213212 223112 312131 311222 321122 321221 312212 322112 322211 212123 212321 232121 111323 131123 131321 112313 132113 132311 211313 231113 231311 112133 112331 132131 113123 113321 133121 313121 211331 231131 213113 213311 213131 311123 311321 331121 312113 312311 332111 314111 221411 431111 111224 111422 121124 121421 141122 141221 112214 112412 122114 122411 142112 142211 241211 221114 413111 241112 134111 111242 121142 121241 114212 124112 124211 411212 421112 421211 212141 214121 412121 111143 111341 131141 114113 114311 411113 411311 113141 114131 311141 411131 211412 211214 211232'.split(
    ' ',
  );
const STOP = '2331112';
const CODE_C = 99;
const CODE_B = 100;
const CODE_A = 101;
const STARTS: Readonly<Record<number, 'A' | 'B' | 'C'>> = { 103: 'A', 104: 'B', 105: 'C' };

export function widthTable(): readonly string[] {
  return WIDTHS;
}

/** Symbol values from start to check digit. */
export function code128Values(widths: readonly number[]): number[] {
  const text = widths.join('');
  if (!text.endsWith(STOP)) throw new Error('no stop pattern');
  const inner = text.slice(0, -STOP.length);
  return (inner.match(/.{6}/g) ?? []).map((character) => {
    const value = WIDTHS.indexOf(character);
    if (value < 0) throw new Error(`no such character: ${character}`);
    return value;
  });
}

export function readCode128(widths: readonly number[]): string {
  const values = code128Values(widths);
  const check = values.pop();
  const [start = 0, ...rest] = values;
  const sum = rest.reduce((total, value, n) => total + value * (n + 1), start) % 103;
  if (sum !== check) throw new Error(`check digit ${check}, expected ${sum}`);
  let set = STARTS[start];
  if (set === undefined) throw new Error(`no start: ${start}`);
  let text = '';
  for (const value of rest) {
    if (set === 'C' && value < CODE_C) text += String(value).padStart(2, '0');
    else if (value === CODE_C) set = 'C';
    else if (value === CODE_B && set !== 'B') set = 'B';
    else if (value === CODE_A && set !== 'A') set = 'A';
    else if (value > 95) throw new Error(`function character ${value}`);
    else text += String.fromCharCode(set === 'A' && value >= 64 ? value - 64 : value + 32);
  }
  return text;
}
