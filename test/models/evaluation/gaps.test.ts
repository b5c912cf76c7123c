import { describe, expect, it } from 'vitest';
import type { Cycle, DwellStage } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dipTo,
  dwell,
  findingOf,
  heldWith,
  type MadeRun,
  part,
  partOf,
  QUICK,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, What is missing). The clock runs from 77.5 to 202.5 min;
// a gap is over 5 min (5 intervals of 1 min), and a temperature changes 20 °C/min at most where nothing else is written.

interface Asked {
  readonly absent: readonly [number, number];
  readonly history?: readonly Vertex[];
  readonly stage?: Partial<DwellStage>;
  readonly more?: Partial<Cycle>;
  readonly others?: Partial<MadeRun>;
}

function runOf({ absent, history = QUICK, stage = {}, more = {}, others = {} }: Asked): MadeRun {
  return { channels: { TC1: part(history, { absent: [absent] }) }, cycle: cycleOf([dwell(stage)], more), ...others };
}

const time = (asked: Asked) => findingOf(runOf(asked), 'dwell/time')!;

describe('a gap inside a dwell, both of whose ends are in band', () => {
  const absent = [120, 140] as const;

  it('is credited whole at best and not at all at worst: 62.5 min from 140 to 202.5, or 125', () => {
    expect(time({ absent })).toMatchObject({ outcome: 'cannot-tell', observed: 62.5, possible: 125 });
    expect(time({ absent, stage: { counting: 'accumulated' } })).toMatchObject({ observed: 105, possible: 125 });
    expect(time({ absent, stage: { counting: 'each' } })).toMatchObject({ observed: 105, possible: 125 });
  });

  it.each([
    [{ atLeast: 62.5 }, 'met'],
    [{ atLeast: 62.6 }, 'cannot-tell'],
    [{ atLeast: 125 }, 'cannot-tell'],
    [{ atLeast: 125.1 }, 'not-met'],
    [{ atMost: 125 }, 'met'],
    [{ atMost: 124.9 }, 'cannot-tell'],
    [{ atMost: 62.4 }, 'not-met'],
  ] as const)('against %o is %s', (bounds, outcome) => {
    expect(time({ absent, stage: { time: bounds } }).outcome).toBe(outcome);
  });

  it('does not end the dwell: the clock closes at 202.5 min all the same', () => {
    const { closes } = partOf(runOf({ absent })).stages[0]!;
    expect(closes).toBe(partOf(runOf({ absent: [0, 0] })).stages[0]!.closes);
  });

  it('of 5 min is none, of 6 min is one: 125 min, or 76.5 from 126 min on', () => {
    expect(time({ absent: [120, 125] })).toMatchObject({ outcome: 'met', observed: 125, possible: 125 });
    expect(time({ absent: [120, 126] })).toMatchObject({ outcome: 'cannot-tell', observed: 76.5, possible: 125 });
  });

  it('is over 60 s however often the recorder scans: at a scan every 6 s, 1 min is none, 1.1 min is one', () => {
    const others = { every: 0.1 };
    expect(time({ absent: [120, 121], others }).observed).toBe(125);
    expect(time({ absent: [120, 121.1], others }).observed).toBeCloseTo(81.4, 6);
  });

  it.each([
    [19, 'cannot-tell'],
    [20, 'met'],
  ] as const)('is over what the cycle writes: 20 min where %d are allowed is %s', (longestGap, outcome) => {
    expect(time({ absent, more: { log: { longestGap } } }).outcome).toBe(outcome);
  });

  it('of the recorder is a gap as well', () => {
    const others = { silent: [[120, 140]] } as const;
    expect(time({ absent: [0, 0], others })).toMatchObject({ observed: 62.5, possible: 125 });
  });
});

describe('a gap in which the dwell is entered, 160 °C at 70 min to 180 °C at 90 min', () => {
  const absent = [70, 90] as const;

  it('opens at best as soon as 175 °C is reachable, 15 °C at 20 °C/min, at 70.75 min; at worst at 90 min', () => {
    expect(time({ absent })).toMatchObject({ observed: 112.5, possible: 131.75 });
  });

  it('opens at best at 73 min where 5 °C/min is all that is possible', () => {
    expect(time({ absent, more: { log: { changesAtMost: 5 } } })).toMatchObject({ observed: 112.5, possible: 129.5 });
  });

  it('follows the straight line where its ends are further apart than is possible: 175 °C at 85 min', () => {
    expect(time({ absent, more: { log: { changesAtMost: 0.5 } } })).toMatchObject({ observed: 112.5, possible: 117.5 });
  });
});

describe('a gap in which the dwell is left, 180 °C at 195 min to 160 °C at 210 min', () => {
  it('closes at worst at 195 min, at best as late as 175 °C may still have been, 15 °C at 20 °C/min: 209.25 min', () => {
    expect(time({ absent: [195, 210] })).toMatchObject({ observed: 117.5, possible: 131.75 });
  });
});

describe('a gap neither of whose ends is in band', () => {
  it('is credited nothing, though the sensor was in band inside it: 160 °C at 70 and at 100 min', () => {
    const history: Vertex[] = [
      [0, 20],
      [80, 180],
      [90, 180],
      [170, 20],
    ];
    expect(time({ absent: [70, 100], history })).toMatchObject({ outcome: 'not-met', observed: 0, possible: 0 });
  });
});

describe('missing ends of a record', () => {
  const longer = { TC2: QUICK };
  const of = (absent: readonly [number, number], stage: Partial<DwellStage> = {}) => {
    const channels = { TC1: part(QUICK, { absent: [absent] }), ...longer };
    return findingOf({ channels, cycle: cycleOf([dwell(stage)]) }, 'dwell/time')!;
  };

  it('are gaps: TC1 read from 100 min on is credited from the start at best, and TC2 holds the clock to 77.5 min', () => {
    expect(of([-1, 100])).toMatchObject({ outcome: 'cannot-tell', observed: 102.5, possible: 125 });
  });

  it('of TC1 read until 150 min only: 72.5 min seen, and 125 possible, since TC2 closes the clock at 202.5 min', () => {
    expect(of([150, 300])).toMatchObject({ outcome: 'cannot-tell', observed: 72.5, possible: 125 });
    const alone = time({ absent: [150, 300] });
    expect(alone).toMatchObject({ outcome: 'cannot-tell', observed: 72.5, possible: null });
  });

  it('leave all open where there is no reading', () => {
    expect(of([-1, 300]).outcome).toBe('cannot-tell');
  });
});

describe('what a gap does not touch, or cannot hide', () => {
  it('a limit whose stretch it lies outside of stays as it is: 40 min in the heating, the time is 125 min', () => {
    expect(time({ absent: [20, 60] })).toMatchObject({ outcome: 'met', observed: 125, possible: 125 });
  });

  it('a breach seen in readings stays one: 188 °C at 124 min, a gap from 150 to 170 min', () => {
    const asked = { absent: [150, 170], history: heldWith(...dipTo(188, 120)) } as const;
    expect(findingOf(runOf(asked), 'dwell/upper')!.outcome).toBe('not-met');
  });

  // From 180 °C at both ends of 10 min: 185 °C at 1 °C/min.
  it.each([
    [1, 'met'],
    [1.1, 'cannot-tell'],
    [20, 'cannot-tell'],
  ] as const)('upper is open only where it may have been passed: at %d °C/min %s', (changesAtMost, outcome) => {
    const asked = { absent: [120, 130], more: { log: { changesAtMost } } } as const;
    expect(findingOf(runOf(asked), 'dwell/upper')!.outcome).toBe(outcome);
  });

  it('what would be forgiven is not held against it: 185.5 °C for less than 10 min, where 0.5 for 10 is', () => {
    const asked = {
      absent: [120, 130],
      stage: { forgive: { above: { by: 0.5, for: 10 } } },
      more: { log: { changesAtMost: 1.1 } },
    } as const;
    expect(findingOf(runOf(asked), 'dwell/upper')!.outcome).toBe('met');
  });

  it('below: "not-allowed" is open where a gap may hide the dip, and broken where one is seen', () => {
    const lower = (history: readonly Vertex[]) =>
      findingOf(runOf({ absent: [150, 170], history, stage: { below: 'not-allowed' } }), 'dwell/lower')!.outcome;
    expect(lower(QUICK)).toBe('cannot-tell');
    expect(lower(heldWith(...dipTo(172, 120)))).toBe('not-met');
  });

  it('longest is from opening to closing: a gap between them costs nothing, one around the closing leaves it open', () => {
    const longest = { atMost: 130, clock: { opens: 'leading-enters', closes: 'last-leaves' } } as const;
    const of = (absent: readonly [number, number]) =>
      findingOf(runOf({ absent, stage: { longest } }), 'dwell/longest')!;
    expect(of([120, 140])).toMatchObject({ outcome: 'met', observed: 125 });
    expect(of([195, 210])).toMatchObject({ outcome: 'cannot-tell', observed: 117.5 });
  });
});
