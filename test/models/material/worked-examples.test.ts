import { describe, expect, it } from 'vitest';
import type { LedgerEvent } from '../../../models/material/ledger.ts';
import type { Material } from '../../../models/material/material.ts';
import { at21, kit, lifeOf, receivedFrozen, recordsOf, roll, TAPE } from './made-ledger.ts';

// The accounting of kits is common practice: a child inherits its parent's out-time at the cut, then each runs its own
// clock; a roll put back stops only its own. Figures below are added up by hand.
describe('a roll cut into three kits, one of them re-frozen', () => {
  const records = recordsOf([
    roll('K-1', { kind: 'out', at: '2026-03-03T08:00:00Z', room: at21 }, { kind: 'in', at: '2026-03-03T13:00:00Z' }),
    kit('K-1A', 'K-1', '2026-03-03T12:00:00Z'),
    kit(
      'K-1B',
      'K-1',
      '2026-03-03T12:00:00Z',
      { kind: 'in', at: '2026-03-03T16:00:00Z' },
      { kind: 'out', at: '2026-03-10T08:00:00Z', room: at21 },
    ),
    kit('K-1C', 'K-1', '2026-03-03T12:30:00Z'),
  ]);
  it.each([
    ['K-1', 5 * 60],
    ['K-1A', 4 * 60 + 7 * 1440],
    ['K-1B', 4 * 60 + 4 * 60 + 4 * 60],
    ['K-1C', 4.5 * 60 + 7 * 1440 - 30],
  ])('%s had been out for %d min a week later', (item, minutes) => {
    const life = lifeOf(records, item, '2026-03-10T12:00:00Z');
    expect(life).toMatchObject({
      outcome: 'met',
      used: minutes,
      usedAtMost: minutes,
      leftMinutes: 30 * 1440 - minutes,
    });
  });

  it('says it in one sentence', () => {
    expect(lifeOf(records, 'K-1B', '2026-03-10T12:00:00Z').because).toBe('K-1B was out for 12 h; 30 d allowed.');
  });
});

// Common practice: time that a freezer spends above −12 or −15 °C counts as out-time.
describe('a freezer at −8 °C for a night', () => {
  const night: LedgerEvent = {
    kind: 'excursion',
    at: '2026-03-05T20:00:00Z',
    points: [
      ['2026-03-05T20:00:00Z', -18],
      ['2026-03-05T22:00:00Z', -8],
      ['2026-03-06T06:00:00Z', -8],
      ['2026-03-06T08:00:00Z', -18],
    ],
    unit: '°C',
  };
  it('counts from where it crossed −12 °C to where it was back: 21:12 to 06:48', () => {
    const life = lifeOf(recordsOf([roll('K-1', night)]), 'K-1', '2026-03-07T08:00:00Z');
    expect(life.used).toBeCloseTo(9 * 60 + 36, 9);
    expect(life.usedAtMost).toBe(life.used);
  });

  it('counts what had passed of it by then, and a kit cut before it has none', () => {
    const records = recordsOf([
      roll(
        'K-1',
        { kind: 'out', at: '2026-03-04T08:00:00Z', room: at21 },
        { kind: 'in', at: '2026-03-04T09:00:00Z' },
        night,
      ),
      kit('K-1A', 'K-1', '2026-03-04T08:30:00Z', { kind: 'in', at: '2026-03-04T08:40:00Z' }),
    ]);
    expect(lifeOf(records, 'K-1', '2026-03-05T23:12:00Z').used).toBeCloseTo(60 + 120, 9);
    expect(lifeOf(records, 'K-1A', '2026-03-07T08:00:00Z').used).toBeCloseTo(40, 9);
  });

  it('does not count again what lay in the room that night', () => {
    const out: LedgerEvent = { kind: 'out', at: '2026-03-05T18:00:00Z', room: at21 };
    expect(lifeOf(recordsOf([roll('K-1', out, night)]), 'K-1', '2026-03-06T18:00:00Z').used).toBe(1440);
  });

  it('leaves open how long it was warm where its record ends warm', () => {
    const cutOff = { ...night, points: night.points.slice(0, 3) } as LedgerEvent;
    const life = lifeOf(recordsOf([roll('K-1', cutOff)]), 'K-1', '2026-03-07T08:00:00Z');
    expect(life).toMatchObject({ outcome: 'cannot-tell', usedAtMost: null, leftMinutes: null });
    expect(life.because).toContain('begins or ends warmer than -12 °C');
  });
});

// Out-life of a 120 °C film adhesive as its maker's sheet gives it (FM 300): 30 days at 24 °C, 10 days at 32 °C.
describe('30 days at 24 °C against 10 at 32 °C', () => {
  const twoLives: Material = {
    ...TAPE,
    equivalent: {
      rule: 'two-lives',
      approvedBy: 'process engineer 1',
      lives: [
        [24, 30],
        [32, 10],
      ],
    },
  };
  const outAt = (temperature: number, at = '2026-03-03T08:00:00Z'): LedgerEvent => ({
    kind: 'out',
    at,
    room: { temperature, unit: '°C' },
  });

  it.each([
    [24, '2026-04-02T08:00:00Z', 'met'], // exactly 30 days
    [24, '2026-04-02T08:01:00Z', 'not-met'],
    [32, '2026-03-13T08:00:00Z', 'met'], // exactly 10 days
    [32, '2026-03-13T08:01:00Z', 'not-met'],
  ])('at %d °C until %s: %s', (temperature, at, outcome) => {
    expect(lifeOf(recordsOf([roll('K-1', outAt(temperature))], twoLives), 'K-1', at)).toMatchObject({ outcome });
  });

  it('adds up: half of each is the whole life', () => {
    const later: LedgerEvent = { kind: 'room', at: '2026-03-18T08:00:00Z', room: { temperature: 32, unit: '°C' } };
    const life = lifeOf(recordsOf([roll('K-1', outAt(24), later)], twoLives), 'K-1', '2026-03-23T08:00:00Z');
    expect(life.used).toBeCloseTo(30 * 1440, 6);
    expect(life.outcome).toBe('met');
  });

  it('goes between the two as Arrhenius does', () => {
    // exp(ln 3 · (1/297.15 − 1/301.15)/(1/297.15 − 1/305.15)) = 1.7444, worked out by hand.
    const life = lifeOf(recordsOf([roll('K-1', outAt(28))], twoLives), 'K-1', '2026-03-04T08:00:00Z');
    expect(life.used / 1440).toBeCloseTo(1.7444, 3);
  });

  it('counts colder time in full unless the rule says otherwise', () => {
    const used = (material: Material) =>
      lifeOf(recordsOf([roll('K-1', outAt(16))], material), 'K-1', '2026-03-04T08:00:00Z').used;
    expect(used(twoLives)).toBe(1440);
    const less = { ...twoLives, equivalent: { ...twoLives.equivalent!, colderCountsLess: true } };
    expect(used(less)).toBeLessThan(1440 / 2);
  });

  it('says nothing beyond the warmer of the two', () => {
    const life = lifeOf(recordsOf([roll('K-1', outAt(33))], twoLives), 'K-1', '2026-03-04T08:00:00Z');
    expect(life).toMatchObject({ outcome: 'cannot-tell', usedAtMost: null });
  });

  it('without an approved rule cannot be told above 24 °C, until 30 days have passed all the same', () => {
    const records = recordsOf([roll('K-1', outAt(32))]);
    expect(lifeOf(records, 'K-1', '2026-03-04T08:00:00Z').because).toBe(
      'Whether K-1 was within its out-life cannot be told: the room was at 32 °C for 1 d from 2026-03-03; its out-life is stated at up to 24 °C and no rule reaches so far.',
    );
    expect(lifeOf(records, 'K-1', '2026-04-03T08:00:00Z').outcome).toBe('not-met');
  });
});

describe('material that warmed up in its wrapping', () => {
  const material: Material = { ...TAPE, thaw: { from: 'temperature', above: 10 } };
  const out: LedgerEvent = { kind: 'out', at: '2026-03-03T08:00:00Z', room: at21 };
  const thawed: LedgerEvent = { kind: 'thawed', at: '2026-03-03T14:00:00Z' };

  it('counts from when it had warmed, where its document says so', () => {
    const records = recordsOf([roll('K-1', out, thawed)], material);
    expect(lifeOf(records, 'K-1', '2026-03-03T20:00:00Z')).toMatchObject({ used: 360, usedAtMost: 360 });
    expect(lifeOf(records, 'K-1', '2026-03-03T11:00:00Z')).toMatchObject({ used: 0, usedAtMost: 180 });
  });

  it('counts from removal at most where nobody wrote down when', () => {
    const records = recordsOf([roll('K-1', out)], material);
    expect(lifeOf(records, 'K-1', '2026-03-03T20:00:00Z')).toMatchObject({ outcome: 'met', used: 0, usedAtMost: 720 });
    expect(lifeOf(records, 'K-1', '2026-04-20T20:00:00Z')).toMatchObject({ outcome: 'cannot-tell', used: 0 });
  });

  it('counts from removal by default', () => {
    expect(lifeOf(recordsOf([roll('K-1', out, thawed)]), 'K-1', '2026-03-03T20:00:00Z').used).toBe(720);
  });
});

describe('what was not recorded', () => {
  it('of the room leaves the out-life open', () => {
    const life = lifeOf(
      recordsOf([roll('K-1', { kind: 'out', at: '2026-03-03T08:00:00Z' })]),
      'K-1',
      '2026-03-03T09:00:00Z',
    );
    expect(life).toMatchObject({ outcome: 'cannot-tell', used: 60, usedAtMost: null, leftMinutes: null });
    expect(life.because).toContain('the temperature of the room is not on record for 1 h from 2026-03-03');
  });

  it('of its humidity does too, where the life is stated at one', () => {
    const material: Material = { ...TAPE, out: { ...TAPE.out, humidityAtMost: 60 } };
    const outcomeAt = (humidity?: number) => {
      const room = { ...at21, ...(humidity === undefined ? {} : { humidity }) };
      return lifeOf(
        recordsOf([roll('K-1', { kind: 'out', at: '2026-03-03T08:00:00Z', room })], material),
        'K-1',
        '2026-03-03T09:00:00Z',
      ).outcome;
    };
    expect([outcomeAt(60), outcomeAt(61), outcomeAt()]).toEqual(['met', 'cannot-tell', 'cannot-tell']);
  });

  it('of taking a roll out before a kit was cut leaves both open, and names it', () => {
    const cut = { at: '2026-03-05T10:00:00Z', what: 'K-1A was cut from it' };
    const records = recordsOf([{ ...roll('K-1'), uses: [cut] }, kit('K-1A', 'K-1', cut.at)]);
    for (const item of ['K-1', 'K-1A']) {
      const life = lifeOf(records, item, '2026-03-06T10:00:00Z');
      expect(life.outcome).toBe('cannot-tell');
      expect(life.because).toContain('K-1A was cut from it on 2026-03-05 while the ledger has K-1 in the freezer');
    }
  });

  it('of manufacture and last day leaves the shelf life open', () => {
    const records = {
      ...recordsOf([roll('K-1')]),
      batches: [{ batch: 'B-1', material: { code: 'tape', issue: 'A' } }],
    };
    expect(lifeOf(records, 'K-1', '2026-03-06T10:00:00Z', 'shelf-life').outcome).toBe('cannot-tell');
  });
});

describe('other lives', () => {
  it('shelf life runs from manufacture, or to the maker’s own last day where that is sooner, to its end', () => {
    const records = recordsOf([roll('K-1')]);
    const shelf = (at: string, expires?: string) => {
      const [batch] = records.batches;
      const batches = [{ ...batch!, ...(expires === undefined ? {} : { expires }) }];
      return lifeOf({ ...records, batches }, 'K-1', at, 'shelf-life').outcome;
    };
    expect(shelf('2027-02-20T00:00:00Z')).toBe('met'); // 365 days after 2026-02-20
    expect(shelf('2027-02-20T00:01:00Z')).toBe('not-met');
    expect(shelf('2026-09-30T23:59:00Z', '2026-09-30')).toBe('met');
    expect(shelf('2026-10-01T00:01:00Z', '2026-09-30')).toBe('not-met');
    expect(shelf('2027-02-20T00:01:00Z', '2028-01-01')).toBe('not-met');
  });

  it('an extension gives a new limit for its term, as often as the document provides for', () => {
    const material: Material = { ...TAPE, extension: { times: 1, tests: ['DSC', 'tack'] } };
    const extended = (at: string, until: string): LedgerEvent => ({
      kind: 'extended',
      at,
      life: 'out-life',
      lifeDays: 40,
      until,
      authority: 'materials engineer 1',
      tests: 'DSC, tack',
    });
    const out: LedgerEvent = { kind: 'out', at: '2026-03-03T08:00:00Z', room: at21 };
    const once = recordsOf([roll('K-1', out, extended('2026-04-01T08:00:00Z', '2026-04-10T08:00:00Z'))], material);
    expect(lifeOf(once, 'K-1', '2026-04-09T08:00:00Z')).toMatchObject({ outcome: 'met', atMost: 40 * 1440 });
    expect(lifeOf(once, 'K-1', '2026-04-11T08:00:00Z')).toMatchObject({ outcome: 'not-met', atMost: 30 * 1440 });
    const none = lifeOf(
      recordsOf([roll('K-1', out, extended('2026-04-01T08:00:00Z', '2026-04-10T08:00:00Z'))]),
      'K-1',
      '2026-04-09T08:00:00Z',
    );
    expect(none.outcome).toBe('not-met');
    expect(none.why.join(' ')).toContain('provides for none');
  });

  it('tack runs from the opening of the wrapping, re-freezing is counted, too cold a freezer is a breach', () => {
    const material: Material = {
      ...TAPE,
      storage: { ...TAPE.storage, atLeast: -30 },
      tack: { lifeDays: 10 },
      refreezing: { atMost: 1 },
    };
    const events: LedgerEvent[] = [
      { kind: 'out', at: '2026-03-03T08:00:00Z', room: at21 },
      { kind: 'opened', at: '2026-03-04T08:00:00Z' },
      { kind: 'in', at: '2026-03-05T08:00:00Z' },
      { kind: 'out', at: '2026-03-06T08:00:00Z', room: at21 },
      { kind: 'in', at: '2026-03-07T08:00:00Z' },
      {
        kind: 'excursion',
        at: '2026-03-08T08:00:00Z',
        points: [
          ['2026-03-08T08:00:00Z', -20],
          ['2026-03-08T09:00:00Z', -34],
          ['2026-03-08T10:00:00Z', -20],
        ],
        unit: '°C',
      },
    ];
    const records = recordsOf([roll('K-1', ...events)], material);
    const life = (name: 'tack-life' | 're-freezing' | 'shelf-life') =>
      lifeOf(records, 'K-1', '2026-03-09T08:00:00Z', name);
    expect(life('tack-life')).toMatchObject({ outcome: 'met', used: 2 * 1440 });
    expect(life('re-freezing')).toMatchObject({ outcome: 'not-met', used: 2, atMost: 1 });
    expect(life('shelf-life')).toMatchObject({ outcome: 'not-met' });
    expect(life('shelf-life').because).toContain('colder than -30 °C');
  });

  it('out-time stated by the carrier comes first', () => {
    const records = recordsOf([
      { item: 'K-1', kind: 'roll', events: [{ ...receivedFrozen(), outMinutesBefore: 300 } as LedgerEvent] },
    ]);
    expect(lifeOf(records, 'K-1', '2026-03-09T08:00:00Z').used).toBe(300);
  });
});
