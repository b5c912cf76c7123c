import { describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { readLog } from '../../../models/log/read-log.ts';
import type { ReadLog } from '../../../models/log/readings.ts';
import { layoutOf } from './logs.ts';

/** A small log with all that makes one untidy: preamble, units, quotes, codes, blank lines, a repeated header, a footer. */
const LINES = [
  'Forno 2;é',
  'Lote;"SR-0417;B"',
  '',
  'Date;Time;T1;note;T2',
  ';;°C;;°C',
  '24/10/2026;22:30:00;20,0;"a;b";180,5',
  '24/10/2026;22:30:30;OPEN;;-1,25',
  '',
  '24/10/2026;22:31:00;20,2;"two\r\nlines";99,75',
  'Date;Time;T1;note;T2',
  ';;°C;;°C',
  '24/10/2026;22:31:30;"20,3";x;1372,0',
  '24/10/2026;22:32:00;20,4;;',
  '24/10/2026;22:32:30;9999;°;100,25',
];
/** Enough scans with two decimals for a last line to be proved whole. */
const MANY = Array.from({ length: 45 }, (_, i) => `24/10/2026;22:33:${String(i).padStart(2, '0')};20,5;;${100 + i},25`);
const FOOTER = ['', 'Fim;24/10/2026', 'Max;;20,4'];

const LAYOUT = layoutOf({
  delimiter: ';',
  decimal: ',',
  header: 4,
  units: 5,
  time: { columns: ['Date', 'Time'], pattern: 'dd/MM/yyyy HH:mm:ss', zone: 'Europe/Lisbon' },
  missing: ['OPEN', '9999'],
});
const SCANS: readonly (readonly [string, number, number])[] = [
  ['21:30:00', 20, 180.5],
  ['21:30:30', Number.NaN, -1.25],
  ['21:31:00', 20.2, 99.75],
  ['21:31:30', 20.3, 1372],
  ['21:32:00', 20.4, Number.NaN],
  ['21:32:30', Number.NaN, 100.25],
];

const encodings = {
  'utf-8': (text: string) => new TextEncoder().encode(text),
  'utf-16be': (text: string) => Uint8Array.from(Buffer.from(text, 'utf16le').swap16()),
  'windows-1252': (text: string) => Uint8Array.from(Buffer.from(text, 'latin1')),
} as const;

function readPieces(chunks: Iterable<Uint8Array>, encoding: keyof typeof encodings, windowBytes?: number): ReadLog {
  return readLog([{ name: 'run.csv', chunks }], { ...LAYOUT, encoding }, windowBytes ? { windowBytes } : {});
}

function scansOf({ readings }: ReadLog) {
  return [...readings.timeMs].map((timeMs, i) => [
    new Date(timeMs).toISOString().slice(11, 19),
    ...readings.channels.map(({ value }) => value[i]!),
  ]);
}

describe.each(Object.entries(encodings))('a log in %s', (name, encode) => {
  const encoding = name as keyof typeof encodings;

  it.each(['\r\n', '\n', '\r'])('reads the same in pieces of any size, lines ended %j', (lineEnd) => {
    const bytes = encode([...LINES, ...FOOTER, ''].join(lineEnd));
    const whole = readPieces([bytes], encoding);
    expect(scansOf(whole)).toEqual(SCANS);
    for (const size of [1, 3, 17, 1000]) {
      for (const windowBytes of [1, 13, 1 << 18]) {
        const chunks = Array.from({ length: Math.ceil(bytes.length / size) }, (_, i) =>
          bytes.subarray(i * size, (i + 1) * size),
        );
        expect(readPieces(chunks, encoding, windowBytes)).toEqual(whole);
      }
    }
  });

  it.each([
    ['with a footer', [...LINES, ...FOOTER, ''].join('\r\n')],
    ['without one', [...LINES, ''].join('\n')],
  ])('cut at any byte gives no wrong reading and no crash, %s', (_, text) => {
    const bytes = encode(text);
    let mostScans = 0;
    for (let length = 0; length <= bytes.length; length++) {
      let log: ReadLog;
      try {
        log = readPieces([bytes.subarray(0, length)], encoding);
      } catch (error) {
        expect(error).toBeInstanceOf(DomainError);
        continue;
      }
      const scans = scansOf(log);
      expect(scans).toEqual(SCANS.slice(0, scans.length));
      expect(scans.length).toBeGreaterThanOrEqual(mostScans);
      mostScans = scans.length;
    }
    expect(mostScans).toBe(SCANS.length);
  });

  it('cut anywhere in its last lines loses no more than the line it is cut in', () => {
    const regular = [...LINES.slice(0, 5), ...MANY].join('\r\n');
    const bytes = encode(regular);
    const scans = scansOf(readPieces([bytes], encoding));
    expect(scans.length).toBe(MANY.length);
    for (let length = bytes.length - 200; length < bytes.length; length++) {
      const cut = scansOf(readPieces([bytes.subarray(0, length)], encoding));
      expect(cut).toEqual(scans.slice(0, cut.length));
      const wholeLines = encode(regular.slice(0, regular.lastIndexOf('\r\n'))).length;
      if (length >= wholeLines) expect(cut.length).toBe(MANY.length - 1);
    }
  });
});

describe('a damaged log', () => {
  it('gives readings or a refusal, never a crash', () => {
    const bytes = encodings['utf-8']([...LINES, ...FOOTER, ''].join('\r\n'));
    for (let at = 0; at < bytes.length; at++) {
      for (const byte of [0x00, 0x0a, 0x22, 0x2c, 0x3b, 0x39, 0x80, 0xff]) {
        const damaged = Uint8Array.from(bytes);
        damaged[at] = byte;
        try {
          const { timeMs } = readPieces([damaged], 'utf-8').readings;
          for (let i = 1; i < timeMs.length; i++) expect(timeMs[i]!).toBeGreaterThan(timeMs[i - 1]!);
        } catch (error) {
          expect(error).toBeInstanceOf(DomainError);
        }
      }
    }
  });
});

describe('the zone of the process', () => {
  it('does not matter', () => {
    const bytes = encodings['utf-8']([...LINES, ''].join('\n'));
    const before = process.env.TZ;
    try {
      for (const zone of ['UTC', 'America/New_York', 'Asia/Kathmandu']) {
        process.env.TZ = zone;
        expect(scansOf(readPieces([bytes], 'utf-8'))).toEqual(SCANS);
      }
    } finally {
      if (before === undefined) delete process.env.TZ;
      else process.env.TZ = before;
    }
  });
});
