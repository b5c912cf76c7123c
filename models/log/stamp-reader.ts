import { monthFromName } from './month-names.ts';
import { type PatternElement, parsePattern } from './stamp-pattern.ts';
import { offsetFromText } from './time-zone.ts';

/** Reads time stamps written in one pattern, straight from bytes. */
export interface StampReader {
  /**
   * Local time in ms since 1970-01-01 as the clock showed it; an instant where stamps carry their offset; NaN where
   * the bytes are not a stamp of this pattern.
   */
  read(bytes: Uint8Array, length: number): number;
  readonly isAbsolute: boolean;
}

/** What has been read of one stamp. */
interface Stamp {
  year: number;
  month: number;
  day: number;
  hour: number;
  afternoonHours: number;
  minute: number;
  second: number;
  fractionMs: number;
  offsetMs: number;
}

/** Reads one element into `stamp`; returns where it ends, or −1. */
type ElementReader = (stamp: Stamp, bytes: Uint8Array, from: number, length: number) => number;

/**
 * A reader of one Unicode TR 35 pattern, joined from several columns by a space where the time stands in several.
 *
 * A field of two letters also takes one digit, unless the next field follows without anything between. Two-digit years
 * 69 to 99 are 1969 to 1999, 00 to 68 are 2000 to 2068.
 *
 * Source: Unicode TR 35 part 4; two-digit years: POSIX.1-2017, strptime, `%y`.
 */
export function stampReader(pattern: string, charset: 'utf-8' | 'windows-1252'): StampReader {
  const elements = parsePattern(pattern, 'time.pattern');
  const readers = elements.map((element, i) => elementReader(element, elements[i + 1], charset));
  const stamp: Stamp = {
    year: 0,
    month: 0,
    day: 0,
    hour: 0,
    afternoonHours: 0,
    minute: 0,
    second: 0,
    fractionMs: 0,
    offsetMs: 0,
  };
  let day = -1;
  let dayMs = 0;
  const begun = reusableStart(elements);
  const last = new Uint8Array(MOST_REUSED_BYTES);
  let lastLength = 0;
  const ends = new Int32Array(readers.length);

  /** How many bytes stand as in the stamp read before. */
  function sameBytes(bytes: Uint8Array, length: number): number {
    const most = Math.min(length, lastLength);
    let same = 0;
    while (same < most && bytes[same] === last[same]) same++;
    return same;
  }

  return {
    isAbsolute: elements.some(({ field }) => field === 'offset'),
    read(bytes, length) {
      // Most of a stamp is as in the one before: what was read of it there still stands in `stamp`.
      const same = sameBytes(bytes, length);
      let element = 0;
      while (element < begun && ends[element]! + MOST_AHEAD_BYTES <= same) element++;
      let at = element === 0 ? 0 : ends[element - 1]!;
      lastLength = 0;
      for (; element < readers.length; element++) {
        at = readers[element]!(stamp, bytes, at, length);
        if (at < 0) return Number.NaN;
        ends[element] = at;
      }
      if (at !== length) return Number.NaN;
      if (length <= MOST_REUSED_BYTES) {
        for (let i = same; i < length; i++) last[i] = bytes[i]!;
        lastLength = length;
      }
      const dayRead = (stamp.year * 16 + stamp.month) * 32 + stamp.day;
      if (dayRead !== day) {
        dayMs = startOfDay(stamp.year, stamp.month, stamp.day);
        day = dayRead;
      }
      const minutes = (stamp.hour + stamp.afternoonHours) * 60 + stamp.minute;
      return dayMs + (minutes * 60 + stamp.second) * 1000 + stamp.fractionMs - stamp.offsetMs;
    },
  };
}

const MOST_REUSED_BYTES = 64;
/** How far behind its end an element looks: a no-break space is three bytes of UTF-8. */
const MOST_AHEAD_BYTES = 3;

/** How many elements in front end where their bytes say so: figures, spaces and other literals. */
function reusableStart(elements: readonly PatternElement[]): number {
  const other = elements.findIndex(
    ({ field, ...rest }) =>
      field === 'offset' || field === 'half-day' || (field === 'month' && 'letters' in rest && rest.letters.length > 2),
  );
  return other < 0 ? elements.length : other;
}

/** Ms from 1970-01-01 to the start of a day of the Gregorian calendar; NaN where there is no such day, or before 1900. */
function startOfDay(year: number, month: number, day: number): number {
  const startMs = Date.UTC(year, month - 1, day);
  const isDay = year >= 1900 && month >= 1 && month <= 12 && new Date(startMs).getUTCDate() === day;
  return isDay ? startMs : Number.NaN;
}

function elementReader(
  element: PatternElement,
  next: PatternElement | undefined,
  charset: 'utf-8' | 'windows-1252',
): ElementReader {
  if (element.field === null)
    return element.literal === ' ' ? spaceReader(charset) : literalReader(element.literal, charset);
  const { field, letters, abutsNext } = element;
  const most = abutsNext ? letters.length : Math.max(2, letters.length);
  const least = abutsNext ? letters.length : 1;
  switch (field) {
    case 'year':
      return letters.length === 2
        ? figure(2, 2, 0, 99, (stamp, year) => (stamp.year = year < 69 ? 2000 + year : 1900 + year))
        : figure(4, 4, 0, 9999, (stamp, year) => (stamp.year = year));
    case 'month':
      if (letters.length > 2) return monthNameReader(charset, !(next?.field === null && next.literal.startsWith('.')));
      return figure(least, most, 1, 12, (stamp, month) => (stamp.month = month));
    case 'day':
      return figure(least, most, 1, 31, (stamp, day) => (stamp.day = day));
    case 'hour-0-23':
      return figure(least, most, 0, 23, (stamp, hour) => (stamp.hour = hour));
    case 'hour-1-24':
      return figure(least, most, 1, 24, (stamp, hour) => (stamp.hour = hour % 24));
    case 'hour-0-11':
      return figure(least, most, 0, 11, (stamp, hour) => (stamp.hour = hour));
    case 'hour-1-12':
      return figure(least, most, 1, 12, (stamp, hour) => (stamp.hour = hour % 12));
    case 'minute':
      return figure(least, most, 0, 59, (stamp, minute) => (stamp.minute = minute));
    case 'second':
      return figure(least, most, 0, 59, (stamp, second) => (stamp.second = second));
    case 'fraction':
      return readFraction;
    case 'half-day':
      return readHalfDay;
    case 'offset':
      return readOffset;
  }
}

/** A number of `least` to `most` digits, padded with spaces where it may have fewer. */
function figure(
  least: number,
  most: number,
  smallest: number,
  greatest: number,
  keep: (stamp: Stamp, value: number) => void,
): ElementReader {
  return (stamp, bytes, from, length) => {
    let at = from;
    if (least < most) while (at < length && bytes[at] === 0x20) at++;
    const last = Math.min(length, at + most);
    const first = at;
    let value = 0;
    for (; at < last; at++) {
      const digit = bytes[at]! - 0x30;
      if (digit < 0 || digit > 9) break;
      value = value * 10 + digit;
    }
    if (at - first < least || value < smallest || value > greatest) return -1;
    keep(stamp, value);
    return at;
  };
}

/** Digits after the second, as many as stand there; to the nearest ms. */
const readFraction: ElementReader = (stamp, bytes, from, length) => {
  let at = from;
  let value = 0;
  for (; at < length && at - from < 9; at++) {
    const digit = bytes[at]! - 0x30;
    if (digit < 0 || digit > 9) break;
    value = value * 10 + digit;
  }
  stamp.fractionMs = Math.round((value * 1000) / 10 ** (at - from));
  return at === from ? -1 : at;
};

/** `AM`, `pm`, `a.m.`, `p`. */
const readHalfDay: ElementReader = (stamp, bytes, from, length) => {
  const words = text(bytes, from, Math.min(length, from + 4));
  const match = /^([ap])(?:\.?m\.?)?/i.exec(words);
  if (!match) return -1;
  stamp.afternoonHours = match[1]!.toLowerCase() === 'p' ? 12 : 0;
  return from + match[0].length;
};

/** `Z`, `+01`, `+0100`, `+01:00`. */
const readOffset: ElementReader = (stamp, bytes, from, length) => {
  const match = /^(?:Z|[+-]\d\d(?::?\d\d)?)/.exec(text(bytes, from, Math.min(length, from + 6)));
  const offsetMs = match ? offsetFromText(match[0]) : null;
  if (!match || offsetMs === null) return -1;
  stamp.offsetMs = offsetMs;
  return from + match[0].length;
};

/** Letters, any accent, and a dot of abbreviation; looked up once per spelling. */
function monthNameReader(charset: 'utf-8' | 'windows-1252', takesDot: boolean): ElementReader {
  const decoder = new TextDecoder(charset);
  let lastName = '';
  let lastMonth = 0;
  return (stamp, bytes, from, length) => {
    let at = from;
    while (at < length && (bytes[at]! >= 0x80 || (bytes[at]! | 0x20) >= 0x61)) at++;
    const name = decoder.decode(bytes.subarray(from, at));
    if (name !== lastName) {
      lastMonth = monthFromName(name);
      lastName = name;
    }
    if (takesDot && at < length && bytes[at] === 0x2e) at++;
    stamp.month = lastMonth;
    return lastMonth > 0 ? at : -1;
  };
}

function literalReader(literal: string, charset: 'utf-8' | 'windows-1252'): ElementReader {
  const wanted =
    charset === 'utf-8' ? new TextEncoder().encode(literal) : Uint8Array.from(literal, (one) => one.charCodeAt(0));
  return (_stamp, bytes, from, length) => {
    if (from + wanted.length > length) return -1;
    for (let i = 0; i < wanted.length; i++) if (bytes[from + i] !== wanted[i]) return -1;
    return from + wanted.length;
  };
}

/** One or more spaces, tabs or no-break spaces (U+00A0, U+202F), as some writers put before AM and PM. */
function spaceReader(charset: 'utf-8' | 'windows-1252'): ElementReader {
  return (_stamp, bytes, from, length) => {
    let at = from;
    for (;;) {
      const byte = at < length ? bytes[at]! : 0;
      if (byte === 0x20 || byte === 0x09 || (byte === 0xa0 && charset === 'windows-1252')) at++;
      else if (byte === 0xc2 && bytes[at + 1] === 0xa0 && charset === 'utf-8') at += 2;
      else if (byte === 0xe2 && bytes[at + 1] === 0x80 && bytes[at + 2] === 0xaf && charset === 'utf-8') at += 3;
      else return at === from ? -1 : at;
    }
  };
}

function text(bytes: Uint8Array, from: number, until: number): string {
  return String.fromCharCode(...bytes.subarray(from, until));
}
