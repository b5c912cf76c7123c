import { describe, expect, it } from 'vitest';
import { read, refusalOf, rowsOf } from './logs.ts';

const TEXT = 'Öfen\nStamp;Größe °C;T2 🔥;note\n2026-03-03 08:14:00;20,0;20,5;é\n2026-03-03 08:14:30;20,1;20,6;ü\n';
const CHANGES = {
  delimiter: ';',
  decimal: ',',
  header: 2,
  channels: [
    { column: 'Größe °C', name: 'TC1', role: 'part', unit: '°C' },
    { column: 'T2 🔥', name: 'TC2', role: 'part', unit: '°C' },
  ],
};
const ROWS = [
  ['2026-03-03T08:14:00Z', 20, 20.5],
  ['2026-03-03T08:14:30Z', 20.1, 20.6],
];

// Node's own encoders are the other side: Buffer for UTF-16, one byte a character for Windows-1252 (these letters stand
// there where Latin-1 has them).
const utf8 = (text: string) => new TextEncoder().encode(text);
const utf16le = (text: string) => Uint8Array.from(Buffer.from(text, 'utf16le'));
const utf16be = (text: string) => Uint8Array.from(Buffer.from(text, 'utf16le').swap16());
const windows1252 = (text: string) => Uint8Array.from(Buffer.from(text.replace(' 🔥', ''), 'latin1'));

const encoders = { 'utf-8': utf8, 'utf-16le': utf16le, 'utf-16be': utf16be } as const;

describe('encodings', () => {
  it.each(Object.entries(encoders))(
    'reads %s with and without a byte-order mark, in any window',
    (encoding, encode) => {
      for (const mark of ['', '\ufeff']) {
        for (const windowBytes of [1, 7, 1 << 18]) {
          expect(rowsOf(read(encode(mark + TEXT), { ...CHANGES, encoding }, { windowBytes }))).toEqual(ROWS);
        }
      }
    },
  );

  it('reads windows-1252', () => {
    const channels = [CHANGES.channels[0], { ...CHANGES.channels[1], column: 'T2' }];
    expect(rowsOf(read(windows1252(TEXT), { ...CHANGES, channels, encoding: 'windows-1252' }))).toEqual(ROWS);
  });

  it('takes utf-8 where the layout says nothing', () => {
    expect(rowsOf(read(utf8(TEXT), CHANGES))).toEqual(ROWS);
  });

  it.each([
    ['utf-8', utf16le(`\ufeff${TEXT}`), 'byte-order mark says utf-16le'],
    ['windows-1252', utf8(`\ufeff${TEXT}`), 'byte-order mark says utf-8'],
    ['utf-16le', utf16be(`\ufeff${TEXT}`), 'byte-order mark says utf-16be'],
    ['utf-16be', utf16le(TEXT), 'its bytes are utf-16le'],
    ['utf-8', utf16be(TEXT), 'its bytes are utf-16be'],
    ['utf-16le', utf8(TEXT), 'its bytes are not UTF-16'],
    ['utf-8', Uint8Array.of(0xff, 0xfe, 0, 0, 0x54, 0, 0, 0), 'says utf-32'],
  ])('refuses what contradicts %s', (encoding, bytes, why) => {
    const refusal = refusalOf(() => read(bytes, { ...CHANGES, encoding }));
    expect(refusal.code).toBe('log-encoding-wrong');
    expect(refusal.message).toContain(why);
  });

  it('names the line that is not UTF-8, before or behind the headings', () => {
    const refusal = refusalOf(() => read(windows1252(TEXT), CHANGES));
    expect(refusal).toMatchObject({ code: 'log-encoding-wrong', facts: { line: 1 } });
    for (const windowBytes of [1, 9, 1 << 18]) {
      const late = Buffer.concat([utf8(TEXT), Buffer.from([0x31, 0xe9, 0x0a, 0x32, 0x0a])]);
      const lateRefusal = refusalOf(() => read(late, CHANGES, { windowBytes }));
      expect(lateRefusal).toMatchObject({ code: 'log-encoding-wrong', facts: { line: 5 } });
      expect(lateRefusal.message).toContain('windows-1252');
    }
  });

  // The Unicode Standard 15.0, table 3-7; the examples of 3.9 after it.
  it.each([
    ['overlong /', [0xc0, 0xaf]],
    ['overlong, three bytes', [0xe0, 0x9f, 0x80]],
    ['a surrogate', [0xed, 0xa0, 0x80]],
    ['beyond U+10FFFF', [0xf4, 0x90, 0x80, 0x80]],
    ['a following byte alone', [0x80]],
    ['a lead byte alone', [0xe1, 0x80, 0x41]],
  ])('is not UTF-8: %s', (_, wrong) => {
    expect(() => new TextDecoder('utf-8', { fatal: true }).decode(Uint8Array.from(wrong))).toThrow();
    const bytes = Buffer.concat([utf8(TEXT), Uint8Array.from(wrong), utf8('\n')]);
    expect(refusalOf(() => read(bytes, CHANGES)).code).toBe('log-encoding-wrong');
  });

  it('refuses half a surrogate pair', () => {
    const bytes = Buffer.concat([utf16le(TEXT), Uint8Array.of(0x3d, 0xd8, 0x41, 0x00)]);
    expect(refusalOf(() => read(bytes, { ...CHANGES, encoding: 'utf-16le' })).code).toBe('log-encoding-wrong');
  });
});
