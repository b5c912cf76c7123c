import { parse } from 'date-fns';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseLayout } from '../../../models/log/parse-layout.ts';
import { readLog } from '../../../models/log/read-log.ts';

// date-fns 4.4.0 reads the same Unicode TR 35 letters. Winter days only, so that the zone of the process, which its
// answers are given in, skips no hour.
const PATTERNS = [
  'yyyy-MM-dd HH:mm:ss',
  'dd/MM/yyyy HH:mm',
  'MM/dd/yyyy hh:mm:ss a',
  'd.M.yy H:mm:ss',
  'dd MMM yyyy HH:mm:ss.SSS',
  "yyyy-MM-dd'T'HH:mm:ss",
] as const;

const stamps = fc.record({
  day: fc.integer({ min: 1, max: 28 }),
  month: fc.constantFrom(1, 2, 12),
  hour: fc.integer({ min: 0, max: 23 }),
  minute: fc.integer({ min: 0, max: 59 }),
  second: fc.integer({ min: 0, max: 59 }),
  ms: fc.integer({ min: 0, max: 999 }),
});

describe('a stamp pattern', () => {
  it.each(PATTERNS)('%s reads what date-fns reads', (pattern) => {
    fc.assert(
      fc.property(stamps, (stamp) => {
        const text = written(pattern, stamp);
        const there = parse(text, pattern, new Date(2026, 0, 1));
        const expected = Date.UTC(
          there.getFullYear(),
          there.getMonth(),
          there.getDate(),
          there.getHours(),
          there.getMinutes(),
          there.getSeconds(),
          there.getMilliseconds(),
        );
        expect(instantOf(text, pattern)).toBe(expected);
      }),
      { numRuns: 60, seed: 11 },
    );
  });
});

type Stamp = typeof stamps extends fc.Arbitrary<infer T> ? T : never;

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

function written(pattern: string, { day, month, hour, minute, second, ms }: Stamp): string {
  const two = (value: number) => String(value).padStart(2, '0');
  const letters: Record<string, string> = {
    yyyy: '2026',
    yy: '26',
    MMM: MONTHS[month - 1]!,
    MM: two(month),
    M: String(month),
    dd: two(day),
    d: String(day),
    HH: two(hour),
    H: String(hour),
    hh: two(hour % 12 || 12),
    mm: two(minute),
    SSS: String(ms).padStart(3, '0'),
    ss: two(second),
    a: hour < 12 ? 'AM' : 'PM',
    "'T'": 'T',
  };
  return pattern.replace(/'T'|yyyy|yy|MMM|MM|M|dd|d|HH|H|hh|mm|SSS|ss|a/g, (letter) => letters[letter]!);
}

function instantOf(text: string, pattern: string): number {
  const layout = parseLayout({
    format: 'dwellbook-layout/1',
    name: 'one stamp',
    delimiter: ';',
    header: 1,
    time: { columns: ['Stamp'], pattern, zone: 'UTC' },
    channels: [{ column: 'T1', name: 'TC1', role: 'part', unit: '°C' }],
  });
  const bytes = new TextEncoder().encode(`Stamp;T1\n${text};20.0\n`);
  return readLog([{ name: 'stamp.csv', chunks: [bytes] }], layout).readings.timeMs[0]!;
}
