import { describe, expect, it } from 'vitest';
import { readLog } from '../../../models/log/read-log.ts';
import { fileOf } from './logs.ts';
import { fileOfScans, layout, listed, times, values } from './scans.ts';

// The repairs and their order: the cycle and verdict rules, log layout, time repairs. Zone facts: IANA time zone database.

describe('scans sent twice', () => {
  it('are left out where files overlap', () => {
    const a = fileOfScans('08:00:00 1, 08:01:00 2, 08:02:00 3', '2026-03-03', 'a');
    const b = fileOfScans('08:01:00 2, 08:02:00 3, 08:03:00 4', '2026-03-03', 'b');
    const log = readLog([a, b], layout());
    expect(times(log)).toEqual(['08:00:00Z', '08:01:00Z', '08:02:00Z', '08:03:00Z']);
    expect(listed(log)).toEqual(['scan-left-out 1:2-3 2']);
  });

  it('are left out whichever file comes first', () => {
    const a = fileOfScans('08:00:00 1, 08:01:00 2, 08:02:00 3', '2026-03-03', 'a');
    const b = fileOfScans('08:01:00 2, 08:02:00 3, 08:03:00 4', '2026-03-03', 'b');
    const log = readLog([b, a], layout());
    expect(times(log)).toEqual(['08:00:00Z', '08:01:00Z', '08:02:00Z', '08:03:00Z']);
    expect(values(log)).toEqual([1, 2, 3, 4]);
    expect(listed(log)[0]).toBe('scan-left-out 1:3-4 2');
  });

  it('are left out where a block was sent again', () => {
    const log = readLog(
      [fileOfScans('08:00:00 1, 08:01:00 2, 08:02:00 3, 08:01:00 2, 08:02:00 3, 08:03:00 4')],
      layout(),
    );
    expect(values(log)).toEqual([1, 2, 3, 4]);
    expect(listed(log)).toEqual(['scan-left-out 0:5-6 2']);
  });

  it('are left out within the time a test has where every other line comes again', () => {
    const time = (i: number) => new Date(Date.UTC(2026, 2, 3) + i * 1000).toISOString().slice(11, 19);
    const scans = Array.from({ length: 20_000 }, (_, i) => 2 * i).flatMap((i) => [i, i + 1, i, i + 1]);
    const log = readLog([fileOfScans(scans.map((i) => `${time(i)} ${i % 100}`).join(','), '2026-03-03')], layout());
    expect(log.readings.timeMs.length).toBe(40_000);
  });

  it('are left out where a whole file was given twice', () => {
    const log = readLog([fileOfScans('08:00:00 1, 08:01:00 2'), fileOfScans('08:00:00 1, 08:01:00 2')], layout());
    expect(values(log)).toEqual([1, 2]);
  });

  it('are left out where every line comes twice', () => {
    const log = readLog(
      [fileOfScans('08:00:00 1, 08:00:00 1, 08:01:00 2, 08:01:00 2, 08:02:00 3, 08:02:00 3')],
      layout(),
    );
    expect(values(log)).toEqual([1, 2, 3]);
    expect(listed(log)).toEqual(['scan-left-out 0:3-7 3']);
  });

  it('count absent readings as equal', () => {
    const a = fileOf('Stamp,v\n2026-03-03 08:00:00,1\n2026-03-03 08:01:00,OPEN\n', 'a');
    const b = fileOf('Stamp,v\n2026-03-03 08:01:00,\n2026-03-03 08:02:00,3\n', 'b');
    expect(values(readLog([a, b], layout()))).toEqual([1, Number.NaN, 3]);
  });

  it('show that both files were written by one clock: what lies between is put in its place', () => {
    const a = fileOfScans('08:00:00 1, 08:01:00 2, 08:03:00 4, 08:04:00 5', '2026-03-03', 'a');
    const b = fileOfScans('08:01:00 2, 08:02:00 3, 08:03:00 4, 08:04:00 9, 08:05:00 6', '2026-03-03', 'b');
    const log = readLog([a, b], layout());
    expect(times(log)).toEqual(['08:00:00Z', '08:01:00Z', '08:02:00Z', '08:03:00Z', '08:04:00Z', '08:05:00Z']);
    expect(values(log)).toEqual([1, 2, 3, 4, 5, 6]);
    expect(listed(log)).toContain('stamp-kept-first 1:5-5 1');
  });

  it('are kept where a clock set back only happens to meet equal values', () => {
    const before = '08:00:00 1, 08:01:00 2, 08:02:00 3, 08:03:00 4, 08:04:00 5';
    const log = readLog([fileOfScans(`${before}, 08:02:00 3, 08:03:00 7, 08:04:00 8, 08:05:00 9`)], layout());
    expect(values(log)).toEqual([1, 2, 3, 4, 5, 3, 7, 8, 9]);
    expect(listed(log)).toEqual(['clock-set-back 0:7-10 4']);
  });
});
