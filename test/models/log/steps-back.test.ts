import { describe, expect, it } from 'vitest';
import { readLog } from '../../../models/log/read-log.ts';
import { fileOf, refusalOf } from './logs.ts';
import { fileOfScans, layout, listed, times, values } from './scans.ts';

// The repairs and their order: the cycle and verdict rules, log layout, time repairs. Zone facts: IANA time zone database.

describe('pieces out of order', () => {
  it('are put in order: files given the wrong way round', () => {
    const a = fileOfScans('08:00:00 1, 08:01:00 2', '2026-03-03', 'a');
    const b = fileOfScans('08:02:00 3, 08:03:00 4', '2026-03-03', 'b');
    const log = readLog([b, a], layout());
    expect(values(log)).toEqual([1, 2, 3, 4]);
    expect(listed(log)).toEqual(['pieces-put-in-order 0:2-3 2', 'pieces-put-in-order 1:2-3 2']);
  });

  it('are cut at long steps forward too: a block that belongs between two others', () => {
    const a = '08:00:00 1, 08:01:00 2';
    const b = '08:02:00 3, 08:03:00 4, 08:04:00 5, 08:05:00 6, 08:06:00 7, 08:07:00 8';
    const c = '08:08:00 9, 08:09:00 10';
    const log = readLog([fileOfScans(`${a}, ${c}, ${b}`)], layout());
    expect(values(log)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
    expect(listed(log)).toEqual(['pieces-put-in-order 0:4-11 8']);
  });

  it('are put in order where the newest scan stands first', () => {
    const log = readLog([fileOfScans('08:03:00 4, 08:02:00 3, 08:01:00 2, 08:00:00 1')], layout());
    expect(values(log)).toEqual([1, 2, 3, 4]);
    expect(listed(log)).toEqual(['pieces-put-in-order 0:2-5 4']);
  });

  it('are refused where the order alone would make a pause longer than a day and the log', () => {
    const text =
      'Stamp,v\n2026-03-03 08:00:00,1\n2026-03-03 08:01:00,2\n2000-01-01 00:00:00,3\n2000-01-01 00:01:00,4\n';
    expect(refusalOf(() => readLog([fileOf(text)], layout()))).toMatchObject({
      code: 'log-time-ambiguous',
      facts: { line: 4 },
    });
  });

  it('leave a pause as it is', () => {
    const log = readLog([fileOfScans('08:00:00 1, 08:01:00 2, 09:30:00 3, 09:31:00 4')], layout());
    expect(times(log)).toEqual(['08:00:00Z', '08:01:00Z', '09:30:00Z', '09:31:00Z']);
    expect(log.repairs).toEqual([]);
  });
});

describe('a clock set back', () => {
  const minutes = (from: number, count: number, value: number) =>
    Array.from({ length: count }, (_, i) => `08:${String(from + i).padStart(2, '0')}:00 ${value + i}`).join(', ');

  it('is put right from there on, the next stamp one interval after the latest', () => {
    const log = readLog([fileOfScans(`${minutes(0, 10, 1)}, ${minutes(5, 8, 11)}`)], layout());
    expect(times(log)).toEqual(Array.from({ length: 18 }, (_, i) => `08:${String(i).padStart(2, '0')}:00Z`));
    expect(values(log)).toEqual(Array.from({ length: 18 }, (_, i) => i + 1));
    expect(listed(log)).toEqual(['clock-set-back 0:12-19 8']);
    expect(log.repairs[0]!.because).toContain('set back here by 5 min');
  });

  it('may happen twice', () => {
    const log = readLog([fileOfScans(`${minutes(0, 10, 1)}, ${minutes(5, 8, 11)}, ${minutes(3, 8, 19)}`)], layout());
    expect(times(log)).toEqual(Array.from({ length: 26 }, (_, i) => `08:${String(i).padStart(2, '0')}:00Z`));
    expect(listed(log)).toEqual(['clock-set-back 0:12-19 8', 'clock-set-back 0:20-27 8']);
  });

  it('shifts what comes after a pause as well', () => {
    const log = readLog([fileOfScans(`${minutes(0, 10, 1)}, ${minutes(5, 8, 11)}, ${minutes(30, 3, 19)}`)], layout());
    expect(times(log).slice(-4)).toEqual(['08:17:00Z', '08:35:00Z', '08:36:00Z', '08:37:00Z']);
  });

  it('need not fall on the old stamps', () => {
    const scans = `${minutes(0, 10, 1)}, 08:05:20 11, 08:06:20 12, 08:07:20 13`;
    expect(times(readLog([fileOfScans(scans)], layout())).slice(-3)).toEqual(['08:10:00Z', '08:11:00Z', '08:12:00Z']);
  });

  it('is refused where the time steps back more often than anyone sets a clock', () => {
    const scans = Array.from({ length: 22 }, (_, i) => minutes(0, 4, i * 4)).join(', ');
    expect(refusalOf(() => readLog([fileOfScans(scans)], layout())).code).toBe('log-time-ambiguous');
  });

  it('is refused where it may as well be a line out of order', () => {
    const swapped = '08:00:00 1, 08:02:00 3, 08:01:00 2, 08:03:00 4, 08:04:00 5, 08:05:00 6, 08:06:00 7';
    expect(refusalOf(() => readLog([fileOfScans(swapped)], layout()))).toMatchObject({
      code: 'log-time-ambiguous',
      facts: { file: 'run.csv', line: 4 },
    });
  });

  it('is refused where one piece overlaps and another may be out of order', () => {
    const scans = `${minutes(20, 10, 1)}, ${minutes(25, 8, 11)}, ${minutes(0, 5, 19)}`;
    expect(refusalOf(() => readLog([fileOfScans(scans)], layout())).facts.line).toBe(20);
  });
});
