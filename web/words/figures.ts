/** Figures as they are shown: sensible digits for the unit, a true minus sign, the unit with a space that does not break. */

const NARROW = '\u00a0';

/** `111.8 min`, `7.0 bar`, `−0.4 °C`; a dash where there is none. */
export function figure(value: number | null | undefined, unit: string, digits = digitsOf(unit)): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return '–';
  const name = unitName(unit);
  return name === '' ? plain(value, digits) : `${plain(value, digits)}${NARROW}${name}`;
}

/** Just as many digits as keep it apart from the limits it is compared with, and never fewer than the unit's own. */
export function figureAgainst(value: number | null, unit: string, limits: readonly (number | null)[]): string {
  if (value === null) return '–';
  let digits = unit === '' && Number.isInteger(value) ? 0 : digitsOf(unit);
  const isTooCoarse = () =>
    limits.some((limit) => limit !== null && limit !== value && plain(limit, digits) === plain(value, digits));
  while (digits < 6 && isTooCoarse()) digits += 1;
  return figure(value, unit, digits);
}

/** A figure as a document wrote it: no digit added, none taken. */
export function asWritten(value: number, unit = ''): string {
  const text = String(value).replace('-', '−');
  const name = unitName(unit);
  return name === '' ? text : `${text}${NARROW}${name}`;
}

/** `60 to 100 min`, `at least 0.75 bar`, `at most 190 °C`; empty where nothing was asked. */
export function band(atLeast: number | null | undefined, atMost: number | null | undefined, unit: string): string {
  const hasLeast = atLeast !== null && atLeast !== undefined;
  const hasMost = atMost !== null && atMost !== undefined;
  if (hasLeast && hasMost) return `${asWritten(atLeast)} to ${asWritten(atMost, unit)}`;
  if (hasLeast) return `at least ${asWritten(atLeast, unit)}`;
  if (hasMost) return `at most ${asWritten(atMost, unit)}`;
  return '';
}

export function plain(value: number, digits: number): string {
  const text = value.toFixed(digits);
  return Number(text) === 0 ? text.replace('-', '') : text.replace('-', '−');
}

/** `1 part`, `4 parts`. */
export function count(n: number, one: string, many = `${one}s`): string {
  return `${n}${NARROW}${n === 1 ? one : many}`;
}

/** `TC1, TC2 and TC3` */
export function listed(names: readonly string[]): string {
  if (names.length < 2) return names[0] ?? '';
  return `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
}

/** First letter raised: a sentence begins with it. */
export function raised(sentence: string): string {
  return sentence.charAt(0).toUpperCase() + sentence.slice(1);
}

export function bytes(n: number): string {
  if (n < 1024) return `${n} B`;
  if (n < 1024 * 1024) return `${(n / 1024).toFixed(0)} kB`;
  return `${(n / 1024 / 1024).toFixed(1)} MB`;
}

const DIGITS: Readonly<Record<string, number>> = {
  '°C': 1,
  '°F': 1,
  '°C/min': 2,
  '°F/min': 2,
  '°C/h': 0,
  '°F/h': 0,
  min: 1,
  bar: 2,
  psi: 1,
  kPa: 0,
  MPa: 3,
  mbar: 0,
  inHg: 1,
  mmHg: 0,
  torr: 0,
  'Pa s': 2,
};

export function digitsOf(unit: string): number {
  return DIGITS[unit.replace(/ abs$/, '')] ?? (unit === '' || unit === '1' ? 3 : 0);
}

function unitName(unit: string): string {
  return unit === '1' ? '' : unit;
}
