import { describe, expect, it } from 'vitest';
import type { DwellStage, Forgiveness } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dipTo,
  dwell,
  findingOf,
  heldWith,
  type MadeRun,
  minutesTo,
  partOf,
  QUICK,
  SLOW,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Dwells: time). The clock runs from 77.5 to 202.5 min.

function run(history: readonly Vertex[], more: Partial<DwellStage> = {}, others: Partial<MadeRun> = {}): MadeRun {
  return { channels: { TC1: history }, cycle: cycleOf([dwell(more)]), ...others };
}

const time = (history: readonly Vertex[], more: Partial<DwellStage> = {}) =>
  findingOf(run(history, more), 'dwell/time')!;

function dips(history: readonly Vertex[], more: Partial<DwellStage>) {
  return partOf(run(history, more)).stages[0]!.dips.map(({ from, until, minutes, depth, forgiven }) => {
    expect(minutesTo(until)! - minutesTo(from)!).toBeCloseTo(minutes, 9);
    return [minutesTo(from), minutes, depth, forgiven];
  });
}

/** Below 175 °C from 122.5 to 125.5 min, 3 °C deep. */
const ONE_DIP = heldWith(...dipTo(172, 120));
/** And again from 152.5 to 155.5 min. */
const TWO_DIPS = heldWith(...dipTo(172, 120), ...dipTo(172, 150));

describe('the time of a dwell', () => {
  it.each([
    [{ atLeast: 125 }, 'met', 0],
    [{ atLeast: 125.1 }, 'not-met', -0.1],
    [{ atMost: 125 }, 'met', 0],
    [{ atMost: 124.9 }, 'not-met', -0.1],
    [{ atLeast: 120, atMost: 140 }, 'met', 5],
    [{ atLeast: 100, atMost: 128 }, 'met', 3],
  ] as const)('of 125 min against %o is %s, margin %d', (bounds, outcome, margin) => {
    const finding = time(QUICK, { time: bounds });
    expect(finding).toMatchObject({ outcome, observed: 125, possible: 125, unit: 'min' });
    expect(finding.margin).toBeCloseTo(margin, 6);
  });

  it('above upper counts: 190 °C for a while changes no minute', () => {
    expect(time(heldWith(...dipTo(190, 120)))).toMatchObject({ outcome: 'met', observed: 125 });
  });

  it.each([
    ['contiguous', 77], // 125.5 to 202.5
    ['accumulated', 122], // 125 less 3
    ['each', 122],
  ] as const)('with a dip of 3 min that stops the clock, counted %s, is %d min', (counting, minutes) => {
    expect(time(ONE_DIP, { counting }).observed).toBe(minutes);
    expect(dips(ONE_DIP, { counting })).toEqual([[122.5, 3, 3, false]]);
  });

  it('contiguous tells the longest unbroken stretch, 125.5 to 202.5 min', () => {
    const { from, until } = time(ONE_DIP);
    expect([minutesTo(from), minutesTo(until)]).toEqual([125.5, 202.5]);
  });
});

describe('a dip of 3 °C for 3 min', () => {
  it.each<[Forgiveness, boolean]>([
    [{ by: 3, for: 3 }, true],
    [{ by: 2.9, for: 3 }, false],
    [{ by: 3, for: 2.9 }, false],
    [{ by: 3, for: 3, times: 1 }, true],
    [{ by: 3, for: 3, inTotal: 3 }, true],
    [{ by: 3, for: 3, inTotal: 2.9 }, false],
  ])('under %o is forgiven: %s', (below, isForgiven) => {
    expect(time(ONE_DIP, { forgive: { below } }).observed).toBe(isForgiven ? 125 : 77);
    expect(dips(ONE_DIP, { forgive: { below } })).toEqual([[122.5, 3, 3, isForgiven]]);
  });

  it.each<[Forgiveness, boolean[], number]>([
    [{ by: 3, for: 3 }, [true, true], 125],
    [{ by: 3, for: 3, times: 1 }, [true, false], 122],
    [{ by: 3, for: 3, inTotal: 6 }, [true, true], 125],
    [{ by: 3, for: 3, inTotal: 5 }, [true, false], 122],
  ])('twice under %o: forgiven %o, %d min', (below, forgiven, minutes) => {
    const more = { counting: 'accumulated', forgive: { below } } as const;
    expect(time(TWO_DIPS, more).observed).toBe(minutes);
    expect(dips(TWO_DIPS, more).map((dip) => dip[3])).toEqual(forgiven);
  });

  it('does not use up what is forgiven where it is too deep itself: the second one still is', () => {
    const history = heldWith(...dipTo(170, 110), ...dipTo(172, 150));
    // 5 min at 115 min, from 112.5 on.
    const more = { counting: 'accumulated', forgive: { below: { by: 3, for: 3, times: 1 } } } as const;
    expect(dips(history, more)).toEqual([
      [112.5, 5, 5, false],
      [152.5, 3, 3, true],
    ]);
    expect(time(history, more).observed).toBe(120);
  });
});

describe('two dips close together', () => {
  // 1 °C deep for 1 min from 122.5 and from 126.5 min: 3 min apart.
  const close = heldWith([120, 180], [123, 174], [125, 178], [127, 174], [130, 180]);

  it('at least `for` apart are two, each forgiven on its own', () => {
    expect(dips(close, { forgive: { below: { by: 1, for: 3 } } })).toEqual([
      [122.5, 1, 1, true],
      [126.5, 1, 1, true],
    ]);
  });

  it('less than `for` apart are one, judged by its whole 5 min: too long for 4, short enough for 5', () => {
    expect(dips(close, { forgive: { below: { by: 1, for: 4 } } })).toEqual([[122.5, 5, 1, false]]);
    expect(dips(close, { forgive: { below: { by: 1, for: 5, times: 1 } } })).toEqual([[122.5, 5, 1, true]]);
    expect(time(close, { forgive: { below: { by: 1, for: 4 } } }).observed).toBe(75); // 127.5 to 202.5
  });

  it('have the greater depth of the two: 2 °C', () => {
    const uneven = heldWith([120, 180], [123, 174], [125, 178], [127.5, 173], [131, 180]);
    const merged = partOf({ ...run(uneven, { forgive: { below: { by: 2, for: 9 } } }), every: 0.5 }).stages[0]!.dips;
    expect(merged).toMatchObject([{ depth: 2, forgiven: true }]);
  });
});

describe('dips of two sensors at different times', () => {
  const channels = { TC1: heldWith(...dipTo(172, 120)), TC2: heldWith(...dipTo(172, 150)) };
  const minutes = (clock: DwellStage['clock'], counting: DwellStage['counting']) =>
    findingOf({ channels, cycle: cycleOf([dwell({ clock: clock!, counting: counting! })]) }, 'dwell/time')!.observed;

  it('are both dips of a lagging clock: 125 − 3 − 3 min', () => {
    expect(minutes({ opens: 'lagging-enters', closes: 'first-leaves' }, 'accumulated')).toBe(119);
  });

  it('are none of a leading clock, which one sensor keeps running: 125 min', () => {
    expect(minutes({ opens: 'leading-enters', closes: 'first-leaves' }, 'accumulated')).toBe(125);
  });

  it('are none of a mean clock: (172 + 180) / 2 = 176 °C', () => {
    expect(minutes({ opens: 'mean-enters', closes: 'mean-leaves' }, 'contiguous')).toBe(125);
  });

  it('cost each sensor its own: 122 min', () => {
    expect(minutes({ opens: 'lagging-enters', closes: 'first-leaves' }, 'each')).toBe(122);
  });

  it('counted each, every sensor has its own entering and leaving: 115.625 min of TC2, not 105.625 between them', () => {
    const two = { TC1: QUICK, TC2: SLOW };
    expect(findingOf({ channels: two, cycle: cycleOf([dwell({ counting: 'each' })]) }, 'dwell/time')!.observed).toBe(
      115.625,
    );
  });
});

describe('below: "not-allowed"', () => {
  it.each([
    ['an unforgiven dip to 172 °C breaks lower by 3 °C', {}, 'not-met', -3],
    ['a forgiven one does not', { forgive: { below: { by: 3, for: 3 } } }, 'met', -3],
  ] as const)('%s', (_, more, outcome, margin) => {
    const finding = findingOf(run(ONE_DIP, { below: 'not-allowed', ...more }), 'dwell/lower')!;
    expect(finding).toMatchObject({ outcome, observed: 172, atLeast: 175, margin, sensor: 'TC1', unit: '°C' });
    expect(finding.forgiven).toBe(outcome === 'met' ? true : undefined);
  });

  it('without a dip is met, and the time is the same finding as ever', () => {
    expect(findingOf(run(QUICK, { below: 'not-allowed' }), 'dwell/lower')).toMatchObject({
      outcome: 'met',
      observed: null,
    });
    expect(findingOf(run(ONE_DIP, { below: 'not-allowed' }), 'dwell/time')!.observed).toBe(77);
  });

  it('is a finding only where it is written', () => {
    expect(findingOf(run(ONE_DIP), 'dwell/lower')).toBeUndefined();
    expect(findingOf(run(ONE_DIP, { below: 'stops-clock' }), 'dwell/lower')).toBeUndefined();
  });
});

describe('a log that stops inside the dwell, 72.5 min in', () => {
  const stopped: Vertex[] = [
    [0, 20],
    [80, 180],
    [150, 180],
  ];
  it.each([
    [{ atLeast: 120 }, 'cannot-tell', 'pending'],
    [{ atLeast: 60, atMost: 80 }, 'cannot-tell', 'pending'],
    [{ atMost: 72.5 }, 'cannot-tell', 'pending'],
    [{ atMost: 72 }, 'not-met', 'not-met'],
    [{ atLeast: 72.5 }, 'met', 'met'],
  ] as const)('against %o is %s, and %s while the run goes on', (bounds, outcome, outcomeOpen) => {
    const closed = findingOf(run(stopped, { time: bounds }), 'dwell/time')!;
    expect(closed).toMatchObject({ outcome, observed: 72.5, possible: null });
    expect(findingOf(run(stopped, { time: bounds }, { open: true }), 'dwell/time')!.outcome).toBe(outcomeOpen);
  });

  it('says so', () => {
    expect(time(stopped).because).toBe(
      'At least 72.5 min seen; the log stops inside the dwell; at least 120 min asked.',
    );
  });
});

describe('longest', () => {
  const longest = (atMost: number) =>
    ({ longest: { atMost, clock: { opens: 'leading-enters', closes: 'last-leaves' } } }) as const;
  const two = (atMost: number) => ({ channels: { TC1: QUICK, TC2: SLOW }, cycle: cycleOf([dwell(longest(atMost))]) });

  it.each([
    [135, 'met'],
    [134.9, 'not-met'],
  ] as const)(
    'is from opening to closing by its own clock, 77.5 to 212.5 min: at most %d min is %s',
    (atMost, outcome) => {
      expect(findingOf(two(atMost), 'dwell/longest')).toMatchObject({ outcome, observed: 135, sensor: 'TC1' });
    },
  );

  it('counts dips: 125 min, though the clock of the time counts 77', () => {
    expect(findingOf(run(ONE_DIP, longest(130)), 'dwell/longest')).toMatchObject({ outcome: 'met', observed: 125 });
  });

  it.each([
    [100, 'cannot-tell', 'pending'],
    [72, 'not-met', 'not-met'],
  ] as const)(
    'of at most %d min is %s where the log stops 72.5 min in, and %s while the run goes on',
    (atMost, ...outcomes) => {
      const stopped = [...QUICK.slice(0, 2), [150, 180]] as const;
      expect(findingOf(run(stopped, longest(atMost)), 'dwell/longest')!.outcome).toBe(outcomes[0]);
      expect(findingOf(run(stopped, longest(atMost), { open: true }), 'dwell/longest')!.outcome).toBe(outcomes[1]);
    },
  );
});
