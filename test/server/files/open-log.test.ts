import { createHash } from 'node:crypto';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { parseLayout } from '../../../models/log/parse-layout.ts';
import { readLog } from '../../../models/log/read-log.ts';
import { openLog } from '../../../server/files/open-log.ts';
import { makeXlsx, type SheetCell } from './make-xlsx.ts';

let folder = '';
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'open-log-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

function write(name: string, bytes: string | Uint8Array): string {
  const path = join(folder, name);
  writeFileSync(path, bytes);
  return path;
}

const layoutWith = (time: object) =>
  parseLayout({
    format: 'dwellbook-layout/1',
    name: 'trial',
    header: 1,
    time,
    channels: [{ column: 'T1', name: 'TC1', role: 'part', unit: '°C' }],
    missing: ['#N/A'],
  });

/** Serial day of an instant: days since 1899-12-30 (ISO/IEC 29500-1:2016, 18.17.4.1). */
const serialOf = (iso: string) => (Date.parse(iso) - Date.UTC(1899, 11, 30)) / 86_400_000;

describe('openLog', () => {
  it('reads a text file in pieces and hashes the bytes as they came', async () => {
    const lines = Array.from(
      { length: 40_000 },
      (_, i) => `${new Date(i * 1000).toISOString().slice(0, 19)},${i % 100}.5`,
    );
    const text = `t,T1\n${lines.join('\n')}\n`;
    const log = await openLog(write('long.csv', text));
    expect(() => log.sha256()).toThrow('not read to its end');
    const layout = layoutWith({ columns: ['t'], pattern: "yyyy-MM-dd'T'HH:mm:ss", zone: 'UTC' });
    const { readings } = readLog([log], layout);
    expect(readings.timeMs).toEqual(Float64Array.from(lines, (_, i) => i * 1000));
    expect(log.sha256()).toBe(createHash('sha256').update(text).digest('hex'));
    expect(log.name).toBe('long.csv');
  });

  it.each([
    ['no-such.csv', 'there is no such file'],
    ['.', 'it is a folder'],
  ])('refuses %s: %s', async (name, why) => {
    const error = await openLog(join(folder, name)).catch((refusal) => refusal);
    expect(error).toBeInstanceOf(DomainError);
    expect(error.code).toBe('file-unreadable');
    expect(error.message).toContain(why);
  });

  it('refuses an old workbook and what only looks like a new one', async () => {
    const old = write('old.xls', Uint8Array.of(0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1));
    await expect(openLog(old)).rejects.toMatchObject({ code: 'log-not-text' });
    const torn = makeXlsx([['t', 'T1']]).subarray(0, 700);
    await expect(openLog(write('torn.xlsx', torn))).rejects.toMatchObject({ code: 'log-not-text' });
    await expect(openLog(write('zip.xlsx', 'PK\x03\x04 and nothing else'))).rejects.toMatchObject({
      code: 'log-not-text',
    });
  });
});

describe('a workbook', () => {
  const instants = Array.from({ length: 2000 }, (_, i) => Date.UTC(2026, 2, 3, 8, 14, 0) + i * 7010);

  it.each([false, true])('keeps every instant to the ms (dates from 1904: %s)', async (date1904) => {
    const shiftDays = date1904 ? 1462 : 0; // days from 1899-12-30 to 1904-01-01
    const rows: SheetCell[][] = instants.map((at, i) => [
      { serial: serialOf(new Date(at).toISOString()) - shiftDays },
      i % 2 ? 20.1 + 0.2 : { error: '#N/A' },
    ]);
    const path = write('run.xlsx', makeXlsx([['Stamp', 'T1'], ...rows], { date1904 }));
    const log = await openLog(path);
    const layout = layoutWith({ columns: ['Stamp'], pattern: 'yyyy-MM-dd HH:mm:ss.SSS', zone: 'UTC' });
    const { readings } = readLog([log], layout);
    expect([...readings.timeMs]).toEqual(instants);
    expect([...readings.channels[0]!.value.subarray(0, 2)]).toEqual([Number.NaN, 20.1 + 0.2]);
    expect(log.sha256()).toMatch(/^[0-9a-f]{64}$/);
  });

  it('is read by a layout of serial days too, shown as dates or as figures', async () => {
    for (const cell of [(serial: number) => ({ serial }), (serial: number) => serial]) {
      const rows = instants.map((at): SheetCell[] => [cell(serialOf(new Date(at).toISOString())), 20]);
      const log = await openLog(write('serial.xlsx', makeXlsx([['Stamp', 'T1'], ...rows])));
      const layout = layoutWith({ columns: ['Stamp'], serialDays: true, zone: 'UTC' });
      expect([...readLog([log], layout).readings.timeMs]).toEqual(instants);
    }
  });

  it('joins a column of days with a column of times of day, rows keeping their numbers', async () => {
    const rows: SheetCell[][] = [
      ['Day', 'Time', 'T1'],
      [{ serial: 46084 }, { serial: 0.5 }, 20],
      [],
      [{ serial: 46084 }, { serial: 0.75 }, 'hot'],
    ];
    const log = await openLog(write('two.xlsx', makeXlsx(rows)));
    const layout = layoutWith({ columns: ['Day', 'Time'], pattern: 'yyyy-MM-dd HH:mm:ss.SSS', zone: 'UTC' });
    expect(() => readLog([log], layout)).toThrow('two.xlsx, line 4, column "T1": "hot" is not a number');
  });
});
