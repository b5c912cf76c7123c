import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readLog } from '../../../models/log/read-log.ts';
import type { ReadLog } from '../../../models/log/readings.ts';
import { fileOfScans, layout, listed, times, values } from './scans.ts';

// The repairs and their order: the cycle and verdict rules, log layout, time repairs. Zone facts: IANA time zone database.

describe('scans of one stamp', () => {
  const minutes = 'yyyy-MM-dd HH:mm';
  const read = (scans: string) => readLog([fileOfScans(scans)], layout('UTC', minutes));

  it('are spread evenly where the stamps are coarser than the scans', () => {
    const log = read('08:00 1, 08:00 2, 08:00 3, 08:01 4, 08:01 5, 08:01 5, 08:02 7, 08:02 8');
    expect(times(log)).toEqual([
      '08:00:00Z',
      '08:00:20Z',
      '08:00:40Z',
      '08:01:00Z',
      '08:01:20Z',
      '08:01:40Z',
      '08:02:00Z',
      '08:02:20Z',
    ]);
    expect(listed(log)).toEqual(['stamps-spread 0:3-9 5']);
  });

  it('are spread no further than a stamp reaches before a pause', () => {
    const log = read('08:00 1, 08:00 2, 08:01 3, 08:01 4, 09:00 5, 09:00 6, 09:01 7');
    expect(times(log)).toEqual([
      '08:00:00Z',
      '08:00:30Z',
      '08:01:00Z',
      '08:01:30Z',
      '09:00:00Z',
      '09:00:30Z',
      '09:01:00Z',
    ]);
  });

  it('keep the first where that is the exception', () => {
    const log = read('08:00 1, 08:01 2, 08:01 9, 08:02 3, 08:03 4, 08:04 5, 08:05 6');
    expect(values(log)).toEqual([1, 2, 3, 4, 5, 6]);
    expect(listed(log)).toEqual(['stamp-kept-first 0:4-4 1']);
  });

  it('keep the first where there is one stamp only', () => {
    expect(values(read('08:00 1, 08:00 2'))).toEqual([1]);
  });

  it('keep the first where two files meet in one stamp', () => {
    const a = fileOfScans('08:00:00 1, 08:01:00 2, 08:02:00 3, 08:03:00 4', '2026-03-03', 'a');
    const b = fileOfScans('08:03:00 9, 08:04:00 5, 08:05:00 6, 08:06:00 7', '2026-03-03', 'b');
    const log = readLog([a, b], layout());
    expect(values(log)).toEqual([1, 2, 3, 4, 5, 6, 7]);
    expect(listed(log)).toEqual(['stamp-kept-first 1:2-2 1']);
  });
});

describe('all repairs together', () => {
  it('leave the times strictly rising, whatever the stamps', () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.integer({ min: 0, max: 40 }), fc.integer({ min: 0, max: 3 })), {
          minLength: 1,
          maxLength: 40,
        }),
        (scans) => {
          const words = scans.map(([minute, value]) => `08:${String(minute).padStart(2, '0')}:00 ${value}`).join(', ');
          let log: ReadLog;
          try {
            log = readLog([fileOfScans(words)], layout('Europe/Lisbon'));
          } catch (error) {
            expect(error).toMatchObject({ code: 'log-time-ambiguous' });
            return;
          }
          const { timeMs } = log.readings;
          for (let i = 1; i < timeMs.length; i++) expect(timeMs[i]!).toBeGreaterThan(timeMs[i - 1]!);
          const dropped = log.repairs.filter(({ kind }) => kind === 'scan-left-out' || kind === 'stamp-kept-first');
          expect(timeMs.length + dropped.reduce((sum, { scans: count }) => sum + count, 0)).toBe(scans.length);
        },
      ),
      { seed: 20260303, numRuns: 600 },
    );
  });
});
