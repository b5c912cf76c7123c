import { describe, expect, it } from 'vitest';
import { readLog } from '../../../models/log/read-log.ts';
import { fileOf, refusalOf } from './logs.ts';
import { fileOfScans, layout, listed, times } from './scans.ts';

// The repairs and their order: the cycle and verdict rules, log layout, time repairs. Zone facts: IANA time zone database.

describe('an hour that comes twice', () => {
  it('is read by its order: the first instant not before the scan above', () => {
    const log = readLog(
      [fileOfScans('00:30:00 1, 01:00:00 2, 01:30:00 3, 01:00:00 4, 01:30:00 5, 02:00:00 6')],
      layout('Europe/Lisbon'),
    );
    expect(times(log)).toEqual(['23:30:00Z', '00:00:00Z', '00:30:00Z', '01:00:00Z', '01:30:00Z', '02:00:00Z']);
    expect(listed(log)).toEqual(['repeated-hour 0:3-6 4']);
  });

  it('may be half an hour', () => {
    // Australia/Lord_Howe, 5 April 2026: 02:00 +11 becomes 01:30 +10:30.
    const scans = '01:20:00 1, 01:40:00 2, 01:59:00 3, 01:35:00 4, 01:59:00 5, 02:05:00 6';
    const log = readLog([fileOfScans(scans, '2026-04-05')], layout('Australia/Lord_Howe'));
    expect(times(log)).toEqual(['14:20:00Z', '14:40:00Z', '14:59:00Z', '15:05:00Z', '15:29:00Z', '15:35:00Z']);
    expect(listed(log)).toEqual(['repeated-hour 0:3-6 4']);
  });

  it('takes the first instant where the log runs through it once', () => {
    const log = readLog([fileOfScans('00:30:00 1, 01:15:00 2, 02:10:00 3')], layout('Europe/Lisbon'));
    expect(times(log)).toEqual(['23:30:00Z', '00:15:00Z', '02:10:00Z']);
  });

  it('is proved by a step back where the log begins in it', () => {
    const log = readLog(
      [fileOfScans('01:10:00 1, 01:40:00 2, 01:10:00 3, 01:40:00 4, 02:10:00 5')],
      layout('Europe/Lisbon'),
    );
    expect(times(log)).toEqual(['00:10:00Z', '00:40:00Z', '01:10:00Z', '01:40:00Z', '02:10:00Z']);
  });

  it.each([
    ['ends in it', '01:10:00 1, 01:40:00 2'],
    ['runs on past it', '01:10:00 1, 01:40:00 2, 02:10:00 3'],
  ])('is refused where the log begins in it, never steps back and %s', (_, scans) => {
    const refusal = refusalOf(() => readLog([fileOfScans(scans)], layout('Europe/Lisbon')));
    expect(refusal).toMatchObject({ code: 'log-time-ambiguous', facts: { line: 2, zone: 'Europe/Lisbon' } });
  });

  it('is refused where a file out of order begins in it and nothing proves which', () => {
    const files = [
      fileOfScans('05:00:00 9, 05:30:00 9', '2026-10-25', 'b.csv'),
      fileOfScans('01:10:00 1, 01:40:00 2', '2026-10-25', 'a.csv'),
    ];
    expect(refusalOf(() => readLog(files, layout('Europe/Lisbon'))).facts).toMatchObject({ file: 'a.csv', line: 2 });
  });

  it('goes on in the next file, also where that begins with scans of the one before', () => {
    const first = fileOfScans('00:30:00 1, 01:00:00 2, 01:30:00 3', '2026-10-25', 'a');
    const next = fileOfScans('01:00:00 4, 01:30:00 5, 02:00:00 6', '2026-10-25', 'b');
    const overlapping = fileOfScans('01:00:00 2, 01:30:00 3, 01:00:00 4, 01:30:00 5, 02:00:00 6', '2026-10-25', 'b');
    for (const second of [next, overlapping]) {
      const log = readLog([first, second], layout('Europe/Lisbon'));
      expect(times(log)).toEqual(['23:30:00Z', '00:00:00Z', '00:30:00Z', '01:00:00Z', '01:30:00Z', '02:00:00Z']);
    }
  });

  it('does not come where stamps carry their offset', () => {
    const text = 'Stamp,v\n2026-10-25 01:30:00+01:00,1\n2026-10-25 01:30:00Z,2\n';
    const log = readLog([fileOf(text)], layout('Europe/Lisbon', 'yyyy-MM-dd HH:mm:ssXXX'));
    expect(times(log)).toEqual(['00:30:00Z', '01:30:00Z']);
    expect(log.repairs).toEqual([]);
  });
});

describe('a time that the zone skips', () => {
  it.each([
    ['Europe/Lisbon', '2026-03-29', '00:59:00 1, 01:00:00 2'],
    ['America/New_York', '2026-03-08', '01:59:00 1, 02:59:59 2'],
    ['Australia/Lord_Howe', '2026-10-04', '01:59:00 1, 02:29:00 2'],
  ])('is refused in %s', (zone, day, scans) => {
    const refusal = refusalOf(() => readLog([fileOfScans(scans, day)], layout(zone)));
    expect(refusal).toMatchObject({ code: 'log-time-skipped', facts: { line: 3, zone } });
  });

  it('is read where the zone is given as an offset', () => {
    const log = readLog([fileOfScans('00:59:00 1, 01:00:00 2', '2026-03-29')], layout('+00:00'));
    expect(times(log)).toEqual(['00:59:00Z', '01:00:00Z']);
  });
});
