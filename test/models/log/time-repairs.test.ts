import { describe, expect, it } from 'vitest';
import { readLog } from '../../../models/log/read-log.ts';
import type { ReadLog } from '../../../models/log/readings.ts';
import { fileOf, layoutOf, refusalOf } from './logs.ts';

// The repairs and their order: the cycle and verdict rules, log layout, time repairs. Zone facts: IANA time zone database.

const channels = [{ column: 'v', name: 'TC1', role: 'part', unit: '°C' }];

/** One file of `HH:mm:ss value` words on 25 October 2026 (or the day of `day`), the day clocks go back in Lisbon. */
function fileOfScans(scans: string, day = '2026-10-25', name = 'run.csv') {
  const lines = scans.split(/\s*,\s*/).map((scan) => {
    const [time, value] = scan.trim().split(/\s+/);
    return `${day} ${time},${value}`;
  });
  return fileOf(`Stamp,v\n${lines.join('\n')}\n`, name);
}

function layout(zone = 'UTC', pattern = 'yyyy-MM-dd HH:mm:ss') {
  return layoutOf({ channels, time: { columns: ['Stamp'], pattern, zone } });
}

function times({ readings }: ReadLog): string[] {
  return [...readings.timeMs].map((timeMs) => new Date(timeMs).toISOString().slice(11).replace('.000Z', 'Z'));
}

function values({ readings }: ReadLog): number[] {
  return [...readings.channels[0]!.value];
}

function listed({ repairs }: ReadLog): string[] {
  return repairs.map(({ kind, file, lines, scans }) => `${kind} ${file}:${lines[0]}-${lines[1]} ${scans}`);
}

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
  it('leave the times strictly rising, whatever the stamps', async () => {
    const fc = await import('fast-check');
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
      { seed: 20260303, numRuns: 2000 },
    );
  });
});
