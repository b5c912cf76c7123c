import { describe, expect, it } from 'vitest';
import { encodeText } from '../../../server/practice/simulator/encode-text.ts';
import { stampBy, wallClockIn } from '../../../server/practice/simulator/wall-clock.ts';

function shown(zone: string, pattern: string, ...instants: string[]): string[] {
  const clock = wallClockIn(zone);
  const write = stampBy(pattern);
  return instants.map((instant) => write(clock(Date.parse(instant))));
}

describe('the clock on the wall', () => {
  // IANA time zone database: Europe/London changes at 01:00 UTC on 29 March and 25 October 2026.
  it('skips an hour in spring and shows one twice in autumn', () => {
    const spring = shown('Europe/London', 'HH:mm', '2026-03-29T00:59:00Z', '2026-03-29T01:00:00Z');
    expect(spring).toEqual(['00:59', '02:00']);
    const autumn = shown('Europe/London', 'HH:mm', '2026-10-25T00:59:00Z', '2026-10-25T01:00:00Z');
    expect(autumn).toEqual(['01:59', '01:00']);
  });

  // IANA: Lord Howe Island goes back by half an hour, from +11 to +10:30, at 15:00 UTC on 4 April 2026.
  it('knows a zone that moves by half an hour', () => {
    expect(shown('Australia/Lord_Howe', 'HH:mm', '2026-04-04T14:59:00Z', '2026-04-04T15:00:00Z')).toEqual([
      '01:59',
      '01:30',
    ]);
  });

  it('counts twelve hours from 12, in the morning as after noon', () => {
    expect(
      shown('UTC', 'M/d/yyyy hh:mm:ss a', '2026-03-02T00:05:09Z', '2026-03-02T12:00:00Z', '2026-03-02T23:59:59Z'),
    ).toEqual(['3/2/2026 12:05:09 AM', '3/2/2026 12:00:00 PM', '3/2/2026 11:59:59 PM']);
  });

  it('keeps a fixed offset and writes quoted letters as they stand', () => {
    expect(shown('+05:30', "yyyy-MM-dd'T'HH:mm", '2026-03-02T20:00:00Z')).toEqual(['2026-03-03T01:30']);
  });
});

describe('encodeText', () => {
  it('writes the degree sign as each code page does', () => {
    // Unicode: U+00B0; Windows-1252 0xB0; UTF-8 C2 B0; UTF-16LE B0 00 after the mark FF FE.
    expect([...encodeText('°C', 'windows-1252', false)]).toEqual([0xb0, 0x43]);
    expect([...encodeText('°', 'utf-8', true)]).toEqual([0xef, 0xbb, 0xbf, 0xc2, 0xb0]);
    expect([...encodeText('°', 'utf-16le', true)]).toEqual([0xff, 0xfe, 0xb0, 0x00]);
    expect([...encodeText('°', 'utf-16be', true)]).toEqual([0xfe, 0xff, 0x00, 0xb0]);
  });

  it('refuses what the code page has not', () => {
    expect(() => encodeText('α', 'windows-1252', false)).toThrow(/windows-1252/);
  });
});
