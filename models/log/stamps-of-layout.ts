import { figureFromText } from './figure.ts';
import type { TimeLayout } from './layout.ts';
import { type StampReader, stampReader } from './stamp-reader.ts';

const MS_PER: Readonly<Record<'s' | 'min' | 'h', number>> = { s: 1000, min: 60_000, h: 3_600_000 };
const DAY_MS = 86_400_000;
/** Day 0 of the 1900 system of spreadsheets, right from 1 March 1900 on: ISO/IEC 29500-1:2016, 18.17.4.1. */
const SERIAL_DAY_ZERO_MS = Date.UTC(1899, 11, 30);
/** How a workbook's cells come that are shown as dates, whatever they look like there. */
const SHOWN_DATE = 'yyyy-MM-dd HH:mm:ss.SSS';
const LAST_SERIAL_DAY = 2_958_465; // 9999-12-31

/** Reads the stamps of a layout: local times as the clock showed them, or instants where `isAbsolute`. */
export function stampsOfLayout(time: TimeLayout, decimal: '.' | ',', charset: 'utf-8' | 'windows-1252'): StampReader {
  if ('pattern' in time) return stampReader(time.pattern, charset);
  if ('elapsed' in time) {
    const startMs = Date.parse(time.startsAt);
    const unitMs = MS_PER[time.elapsed];
    return {
      isAbsolute: true,
      read: (bytes, length) => startMs + Math.round(sumOfFigures(bytes, length, decimal) * unitMs),
    };
  }
  const shown = stampReader(SHOWN_DATE, charset);
  return {
    isAbsolute: false,
    read(bytes, length) {
      const days = sumOfFigures(bytes, length, decimal);
      if (Number.isNaN(days)) return shown.read(bytes, length);
      return days >= 1 && days <= LAST_SERIAL_DAY + 1 ? SERIAL_DAY_ZERO_MS + Math.round(days * DAY_MS) : Number.NaN;
    },
  };
}

/** What is expected in the time columns, for a refusal. */
export function expectedStamp(time: TimeLayout, decimal: '.' | ','): string {
  if ('pattern' in time) return `a time written ${time.pattern}`;
  const mark = decimal === ',' ? 'comma' : 'point';
  if ('elapsed' in time) return `a number of ${time.elapsed} with decimal ${mark}`;
  return `a number of days since 1899-12-30 with decimal ${mark}`;
}

/** One figure, or two with a space between, as where date and time of day have a column each; NaN for anything else. */
function sumOfFigures(bytes: Uint8Array, length: number, decimal: '.' | ','): number {
  let sum = 0;
  const text = String.fromCharCode(...bytes.subarray(0, length));
  for (const figure of text.split(' ')) sum += figureFromText(figure, decimal);
  return sum;
}
