import { describe, expect, it } from 'vitest';
import type { Cycle } from '../../../models/cycle/cycle.ts';
import type { LeakTestRecord } from '../../../models/run/load.ts';
import { cycleOf, dwell, findingOf, QUICK } from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, The other limits, and §4).

function leak(record: LeakTestRecord | undefined, leakTest: NonNullable<Cycle['leakTest']>, vacuum = 'bar') {
  const units = { temperature: '°C', vacuum } as const;
  const parts = [{ part: 'A', ...(record === undefined ? {} : { leakTest: record }) }];
  const run = {
    channels: { TC1: QUICK },
    cycle: cycleOf([dwell()], { units, leakTest }),
    load: { parts, sensors: [] },
  };
  return findingOf(run, 'leak-test')!;
}

const ASKED = { startAtLeast: 0.85, over: 5, lossAtMost: 0.07 };

describe('leak-test', () => {
  it.each([
    [{ start: 0.88, end: 0.85, minutes: 5 }, 0.03, 'met'],
    [{ start: 0.88, end: 0.81, minutes: 5 }, 0.07, 'met'], // exactly what is allowed
    [{ start: 0.88, end: 0.8, minutes: 5 }, 0.08, 'not-met'],
    [{ start: 0.88, end: 0.76, minutes: 10 }, 0.06, 'met'], // 0.12 bar in 10 min
    [{ start: 0.88, end: 0.84, minutes: 2 }, 0.1, 'not-met'], // 0.04 bar in 2 min
    [{ start: 0.85, end: 0.85, minutes: 5 }, 0, 'met'],
    [{ start: 0.84, end: 0.84, minutes: 5 }, 0, 'not-met'], // not deep enough at the start
  ] as const)('of %o loses %d bar in 5 min: %s', (record, loss, outcome) => {
    const finding = leak(record, ASKED);
    expect(finding).toMatchObject({ outcome, unit: 'bar', atMost: 0.07 });
    expect(finding.observed).toBeCloseTo(loss, 6);
  });

  it('says what was measured and what it comes to over the asked time', () => {
    expect(leak({ start: 0.88, end: 0.76, minutes: 10 }, ASKED).because).toBe(
      'The bag lost 0.12 bar in 10 min, as much as 0.06 bar in 5 min; at most 0.07 bar in 5 min allowed.',
    );
  });

  it.each([
    [{ start: 50, end: 90, minutes: 5 }, 40, 'met'],
    [{ start: 50, end: 111, minutes: 5 }, 61, 'not-met'],
    [{ start: 101, end: 101, minutes: 5 }, 0, 'not-met'],
  ] as const)('in mbar abs rises as the bag leaks: %o loses %d mbar, %s', (record, loss, outcome) => {
    const finding = leak(record, { startAtLeast: 100, over: 5, lossAtMost: 60 }, 'mbar abs');
    expect(finding).toMatchObject({ outcome, observed: loss });
  });

  it('that nobody recorded cannot be told', () => {
    expect(leak(undefined, ASKED)).toMatchObject({ outcome: 'cannot-tell', observed: null, because: 'Not recorded.' });
  });
});

describe('limits whose records are not in the load document', () => {
  it('cannot be told: not recorded', () => {
    const cycle = cycleOf([dwell()], { material: { outLife: true }, instruments: { calibration: true } });
    const run = { channels: { TC1: QUICK }, cycle };
    for (const limit of ['material/out-life', 'instruments/calibration']) {
      expect(findingOf(run, limit)).toMatchObject({ outcome: 'cannot-tell', because: 'Not recorded.' });
    }
  });

  it('are absent where the cycle does not ask', () => {
    expect(findingOf({ channels: { TC1: QUICK }, cycle: cycleOf([dwell()]) }, 'material/out-life')).toBeUndefined();
  });
});
