import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { read } from './logs.ts';

// csv-parse reads the same text into cells; JavaScript's Number reads the cells. Both are independent of the reader here.

interface Dialect {
  delimiter: string;
  decimal: '.' | ',';
  lineEnd: string;
  encoding: 'utf-8' | 'utf-16le';
  hasMark: boolean;
  quotesAll: boolean;
}

const dialects: fc.Arbitrary<Dialect> = fc.record({
  delimiter: fc.constantFrom(',', ';', '\t', '|'),
  decimal: fc.constantFrom<'.' | ','>('.', ','),
  lineEnd: fc.constantFrom('\n', '\r\n', '\r'),
  encoding: fc.constantFrom<'utf-8' | 'utf-16le'>('utf-8', 'utf-16le'),
  hasMark: fc.boolean(),
  quotesAll: fc.boolean(),
});

const figure = fc.oneof(
  fc.integer({ min: -2000, max: 13_720 }).map((tenths) => (tenths / 10).toFixed(1)),
  fc.integer({ min: 0, max: 1372 }).map(String),
  fc.double({ min: -200, max: 1372, noNaN: true }).map(String),
  fc.constantFrom('', 'OPEN', '-0.0', '+1.5', '0.000', '99999', '1E2', '.5'),
);
const note = fc.string({
  unit: fc.constantFrom('a', '"', ',', ';', ' ', '\n', 'é', '°', '🔥', '|', '\t'),
  maxLength: 8,
});
const rows = fc.array(fc.tuple(figure, note, figure), { minLength: 1, maxLength: 25 });

describe('a generated file', () => {
  it('reads as csv-parse and Number read it', () => {
    fc.assert(
      fc.property(dialects, rows, fc.integer({ min: 1, max: 400 }), (dialect, scans, windowBytes) => {
        const { delimiter, decimal, lineEnd, encoding, hasMark, quotesAll } = dialect;
        const cell = (text: string) =>
          quotesAll || text.includes('"') || text.includes(delimiter) || /[\r\n]/.test(text) || text !== text.trim()
            ? `"${text.replaceAll('"', '""')}"`
            : text;
        const lines = [
          ['t', 'T1', 'note', 'T2'],
          ...scans.map(([a, words, b], i) => [String(i), a.replace('.', decimal), words, b.replace('.', decimal)]),
        ];
        const text = lines.map((line) => line.map(cell).join(delimiter) + lineEnd).join('');

        const expected = parse(text, { delimiter, from_line: 1, record_delimiter: lineEnd }) as string[][];
        const wanted = (column: number) =>
          expected.slice(1).map((row) => {
            const words = (row[column] ?? '').trim().replace(',', '.');
            const value = words === '' || words === 'OPEN' ? Number.NaN : Number(words) + 0;
            return value >= -200 && value <= 1372 ? value : Number.NaN;
          });

        const marked = (hasMark ? '\ufeff' : '') + text;
        const bytes = encoding === 'utf-8' ? new TextEncoder().encode(marked) : Buffer.from(marked, 'utf16le');
        const time = { columns: ['t'], elapsed: 's', startsAt: '2026-03-03T00:00:00Z' };
        const log = read(bytes, { delimiter, decimal, encoding, time }, { windowBytes });
        expect([...log.readings.channels[0]!.value]).toEqual(wanted(1));
        expect([...log.readings.channels[1]!.value]).toEqual(wanted(3));
        expect(log.readings.timeMs.length).toBe(expected.length - 1);
      }),
      { seed: 20260303, numRuns: 600 },
    );
  });
});
