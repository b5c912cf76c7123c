import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { stampReader } from '../../../models/log/stamp-reader.ts';

function read(pattern: string, stamp: string): string | null {
  const bytes = new TextEncoder().encode(stamp);
  const timeMs = stampReader(pattern, 'utf-8').read(bytes, bytes.length);
  return Number.isNaN(timeMs) ? null : new Date(timeMs).toISOString();
}

describe('stampReader', () => {
  // Meaning of the letters: Unicode TR 35 part 4, Date Format Patterns.
  it.each([
    ['dd/MM/yyyy HH:mm:ss', '03/04/2026 08:14:30', '2026-04-03T08:14:30.000Z'],
    ['MM/dd/yyyy HH:mm:ss', '03/04/2026 08:14:30', '2026-03-04T08:14:30.000Z'],
    ['d/M/yyyy H:mm', '3/4/2026 8:14', '2026-04-03T08:14:00.000Z'],
    ['dd/MM/yyyy HH:mm', '3/4/2026  8:14', '2026-04-03T08:14:00.000Z'],
    ['dd.MM.yy HH:mm', '03.04.26 08:14', '2026-04-03T08:14:00.000Z'],
    ['yyyyMMddHHmmss', '20260403081430', '2026-04-03T08:14:30.000Z'],
    ["yyyy-MM-dd'T'HH:mm:ss.SSSXXX", '2026-04-03T08:14:30.250+01:00', '2026-04-03T07:14:30.250Z'],
    ["yyyy-MM-dd'T'HH:mm:ssX", '2026-04-03T08:14:30Z', '2026-04-03T08:14:30.000Z'],
    ['yyyy-MM-dd HH:mm:ss Z', '2026-04-03 08:14:30 -0330', '2026-04-03T11:44:30.000Z'],
    ['yyyy-MM-dd HH:mm:ss,S', '2026-04-03 08:14:30,5', '2026-04-03T08:14:30.500Z'],
    ['MM/dd/yyyy hh:mm:ss a', '04/03/2026 12:00:00 AM', '2026-04-03T00:00:00.000Z'],
    ['MM/dd/yyyy hh:mm:ss a', '04/03/2026 12:00:00 PM', '2026-04-03T12:00:00.000Z'],
    ['MM/dd/yyyy h:mm:ss a', '04/03/2026 1:05:09 p.m.', '2026-04-03T13:05:09.000Z'],
    ['MM/dd/yyyy h:mm a', '04/03/2026 11:59\u202fPM', '2026-04-03T23:59:00.000Z'],
    ['yyyy-MM-dd kk:mm', '2026-04-03 24:10', '2026-04-03T00:10:00.000Z'],
    ['yyyy-MM-dd KK:mm a', '2026-04-03 00:10 PM', '2026-04-03T12:10:00.000Z'],
    ['dd-MMM-yyyy HH:mm', '03-Apr-2026 08:14', '2026-04-03T08:14:00.000Z'],
    ['dd MMM yyyy HH:mm', '03 März 2026 08:14', '2026-03-03T08:14:00.000Z'],
    ['dd. MMM. yyyy HH:mm', '03. Okt. 2026 08:14', '2026-10-03T08:14:00.000Z'],
    ['dd MMM yyyy HH:mm', '03 sept. 2026 08:14', '2026-09-03T08:14:00.000Z'],
    ["yyyy-MM-dd HH 'o''clock' mm", "2026-04-03 08 o'clock 14", '2026-04-03T08:14:00.000Z'],
    ['dd/MM/yyyy HH:mm', '29/02/2028 08:14', '2028-02-29T08:14:00.000Z'],
  ])('reads %s: %s', (pattern, stamp, instant) => {
    expect(read(pattern, stamp)).toBe(instant);
  });

  it.each([
    ['dd/MM/yyyy HH:mm:ss', '31/04/2026 08:14:30'],
    ['dd/MM/yyyy HH:mm', '29/02/2026 08:14'],
    ['dd/MM/yyyy HH:mm', '29/02/2100 08:14'],
    ['dd/MM/yyyy HH:mm', '00/04/2026 08:14'],
    ['dd/MM/yyyy HH:mm', '03/13/2026 08:14'],
    ['dd/MM/yyyy HH:mm', '03/04/2026 24:00'],
    ['dd/MM/yyyy HH:mm', '03/04/2026 08:60'],
    ['dd/MM/yyyy HH:mm:ss', '03/04/2026 08:14:60'],
    ['dd/MM/yyyy HH:mm', '03/04/2026 08:14:30'],
    ['dd/MM/yyyy HH:mm', '03/04/26 08:14'],
    ['dd/MM/yyyy HH:mm', '03-04-2026 08:14'],
    ['dd/MM/yyyy HH:mm', ' 03/04/2026 08:14 x'],
    ['yyyyMMddHHmmss', '2026040381430'],
    ['MM/dd/yyyy hh:mm a', '04/03/2026 13:00 PM'],
    ['MM/dd/yyyy hh:mm a', '04/03/2026 00:30 AM'],
    ['dd-MMM-yyyy HH:mm', '03-Foo-2026 08:14'],
    ['yyyy-MM-dd HH:mmXXX', '2026-04-03 08:14'],
    ['dd/MM/yyyy HH:mm', ''],
  ])('does not read %s: %s', (pattern, stamp) => {
    expect(read(pattern, stamp)).toBeNull();
  });

  // POSIX.1-2017, strptime, %y: 69 to 99 are 1969 to 1999, 00 to 68 are 2000 to 2068.
  it('reads two-digit years as POSIX does', () => {
    expect(read('yy-MM-dd HH:mm', '69-01-01 00:00')).toBe('1969-01-01T00:00:00.000Z');
    expect(read('yy-MM-dd HH:mm', '68-01-01 00:00')).toBe('2068-01-01T00:00:00.000Z');
  });

  it('reads whatever Date writes', () => {
    fc.assert(
      fc.property(
        fc.date({ min: new Date('1900-01-01'), max: new Date('9999-12-31'), noInvalidDate: true }),
        (date) => {
          const iso = date.toISOString();
          expect(read("yyyy-MM-dd'T'HH:mm:ss.SSSX", iso)).toBe(iso);
        },
      ),
      { seed: 20260303 },
    );
  });

  it('reads a stamp the same whatever it read before', () => {
    const digits = fc.integer({ min: 0, max: 15 }).map(String);
    const parts = fc.tuple(digits, fc.constantFrom('/', '-'), digits, fc.constantFrom(' ', '  ', '\u202f', ''), digits);
    const stamp = parts.map(([day, mark, month, gap, hour]) => `${day}${mark}${month}/2026${gap}${hour}:05:0${hour}`);
    fc.assert(
      fc.property(fc.array(stamp, { minLength: 2, maxLength: 8 }), (stamps) => {
        const one = stampReader('dd/MM/yyyy HH:mm:ss', 'utf-8');
        for (const text of stamps) {
          const bytes = new TextEncoder().encode(text);
          const alone = stampReader('dd/MM/yyyy HH:mm:ss', 'utf-8').read(bytes, bytes.length);
          expect(one.read(bytes, bytes.length)).toBe(alone);
        }
      }),
      { seed: 20260303, numRuns: 2000 },
    );
  });

  it('never throws, whatever the bytes', () => {
    const reader = stampReader('d MMM yy h:mm:ss.S a XXX', 'windows-1252');
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 40 }), (bytes) => {
        expect(typeof reader.read(bytes, bytes.length)).toBe('number');
      }),
      { seed: 20260303 },
    );
  });
});
