import { describe, expect, it } from 'vitest';
import { CHORD, cool, heat } from '../../support/made-ramps.ts';
import {
  air,
  cycleOf,
  dwell,
  excluded,
  findingOf,
  type MadeRun,
  minutesTo,
  part,
  QUICK,
  SLOW,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Rates).

const WINDOW = { average: 'window', window: 10 } as const;

function heating(channels: MadeRun['channels'], rate: Parameters<typeof heat>[0], more: Partial<MadeRun> = {}) {
  const run = { channels, cycle: cycleOf([heat(rate), dwell()]), ...more };
  return { slowest: findingOf(run, 'heat/slowest'), fastest: findingOf(run, 'heat/fastest') };
}

/** 2 °C/min to 50 °C at 15 min, 3 °C/min to 80 °C at 25 min, 1 °C/min to 100 °C at 45 min and on. */
const BENT: Vertex[] = [
  [0, 20],
  [15, 50],
  [25, 80],
  [125, 180],
  [200, 180],
  [280, 20],
];

describe('the average of a rate from 50 to 100 °C', () => {
  it('as a chord is the two ends: 50 °C in 30 min', () => {
    const { slowest, fastest } = heating({ TC1: BENT }, CHORD);
    expect(slowest!.observed).toBeCloseTo(50 / 30, 6);
    expect(fastest!.observed).toBeCloseTo(50 / 30, 6);
    expect([minutesTo(slowest!.from), minutesTo(slowest!.until)]).toEqual([15, 45]);
  });

  it('in windows of 10 min is fastest from 15 to 25 min, 3 °C/min, and slowest later, 1 °C/min', () => {
    const { slowest, fastest } = heating({ TC1: BENT }, WINDOW);
    expect(fastest).toMatchObject({ outcome: 'met', observed: 3, sensor: 'TC1', unit: '°C/min', margin: 2 });
    expect([minutesTo(fastest!.from), minutesTo(fastest!.until)]).toEqual([15, 25]);
    expect(slowest).toMatchObject({ outcome: 'met', observed: 1, margin: 0.5 });
    expect([minutesTo(slowest!.from), minutesTo(slowest!.until)]).toEqual([25, 35]);
  });

  it('in a window is the least-squares slope: of 50, 50, 53, 53 °C (−150 − 50 + 53 + 159) / 10 = 1.2 °C/min', () => {
    const history: Vertex[] = [
      [0, 48],
      [1, 50],
      [2, 50],
      [3, 53],
      [4, 53],
      [5, 56],
      [67, 180],
      [200, 180],
      [280, 20],
    ];
    // 54 °C is reached a third of a minute after the fourth reading: one window fits.
    const { slowest, fastest } = heating({ TC1: history }, { ...WINDOW, window: 3, over: [50, 54] });
    expect(slowest!.observed).toBeCloseTo(1.2, 6);
    expect(fastest!.observed).toBeCloseTo(1.2, 6);
  });

  it('is the chord of a window with fewer than 3 readings: (66 − 52) / 10 and 3 °C/min at a scan every 8 min', () => {
    const history: Vertex[] = [
      [0, 20],
      [16, 52],
      [24, 60],
      [56, 156],
      [64, 180],
      [200, 180],
      [280, 20],
    ];
    const { slowest, fastest } = heating({ TC1: history }, WINDOW, { every: 8 });
    expect(slowest!.observed).toBeCloseTo(1.4, 6);
    expect(fastest!.observed).toBeCloseTo(3, 6);
  });

  it('is the chord where the stretch is shorter than a window: 50 to 60 °C in 3 + 4 min', () => {
    const history: Vertex[] = [
      [0, 20],
      [15, 50],
      [18, 56],
      [22, 60],
      [82, 180],
      [200, 180],
      [280, 20],
    ];
    const { slowest, fastest } = heating({ TC1: history }, { ...WINDOW, over: [50, 60] });
    expect(slowest!.observed).toBeCloseTo(10 / 7, 6);
    expect(fastest!.observed).toBeCloseTo(10 / 7, 6);
  });

  it('runs from the last crossing of the first temperature: back to 40 °C, then 50 °C at 35 min, 100 °C at 60 min', () => {
    const history: Vertex[] = [
      [0, 20],
      [20, 60],
      [30, 40],
      [100, 180],
      [200, 180],
      [280, 20],
    ];
    expect(heating({ TC1: history }, CHORD).slowest!.observed).toBe(2);
  });

  it.each([
    [{ atLeast: 2, atMost: 2 }, 'met', 'met'],
    [{ atLeast: 2.01, atMost: 3 }, 'not-met', 'met'],
    [{ atLeast: 1, atMost: 1.99 }, 'met', 'not-met'],
  ] as const)('of exactly 2 °C/min against %o is %s and %s', (bounds, slow, fast) => {
    const { slowest, fastest } = heating({ TC1: QUICK }, { ...WINDOW, ...bounds });
    expect([slowest!.outcome, fastest!.outcome]).toEqual([slow, fast]);
  });

  it('is written in °C/h where the cycle says so: 2 °C/min is 120 °C/h', () => {
    const units = { temperature: '°C', rate: '°C/h', pressure: 'bar', vacuum: 'bar' } as const;
    const cycle = cycleOf([heat({ ...CHORD, atLeast: 120, atMost: 119 + 1 }), dwell()], { units });
    const run = { channels: { TC1: QUICK }, cycle };
    expect(findingOf(run, 'heat/slowest')).toMatchObject({ outcome: 'met', observed: 120, unit: '°C/h' });
    expect(findingOf(run, 'heat/fastest')).toMatchObject({ outcome: 'met', observed: 120 });
  });
});

describe('the sentence of a rate', () => {
  const because = (rate: Parameters<typeof heat>[0], channels: MadeRun['channels'] = { TC1: BENT }) =>
    heating(channels, rate).slowest!.because;

  it('says over how long', () => {
    expect(because(WINDOW)).toBe(
      'TC1 was slowest with 1 °C/min over 10 min from 50 to 100 °C; at least 0.5 °C/min asked.',
    );
    expect(because({ ...WINDOW, window: 60 })).toContain('slowest with 1.67 °C/min from 50 to 100 °C');
  });

  it('says of whom', () => {
    expect(because({ ...CHORD, of: 'lagging' })).toMatch(/^The lagging sensor was slowest/);
    expect(because({ ...CHORD, of: 'mean' })).toMatch(/^The mean was slowest/);
  });
});

describe('whose rate', () => {
  // TC1 2 °C/min, TC2 1.6 °C/min, their mean 1.8 °C/min, the air 4 °C/min.
  const AIR = air([
    [0, 20],
    [40, 180],
    [190, 180],
    [230, 20],
  ]);
  const channels = { TC1: QUICK, TC2: SLOW, air: AIR };

  it.each([
    ['every', 1.6, 'TC2', 2, 'TC1'],
    ['leading', 2, 'leading', 2, 'leading'],
    ['lagging', 1.6, 'lagging', 1.6, 'lagging'],
    ['mean', 1.8, 'mean', 1.8, 'mean'],
    ['air', 4, 'air', 4, 'air'],
  ] as const)(
    'of %s while heating: slowest %d °C/min (%s), fastest %d °C/min (%s)',
    (of, slow, slowBy, fast, fastBy) => {
      const { slowest, fastest } = heating(channels, { ...CHORD, of });
      expect(slowest!.observed).toBeCloseTo(slow, 6);
      expect(fastest!.observed).toBeCloseTo(fast, 6);
      expect([slowest!.sensor, fastest!.sensor]).toEqual([slowBy, fastBy]);
    },
  );

  // TC1 cools at 2 °C/min from 200 min, TC2 at 1 °C/min from 210 min. The mean is at 170 °C at 210 min (160 and 180 °C)
  // and falls 1.5 °C/min from there.
  it.each([
    ['every', 1, 2],
    ['leading', 2, 2], // the coldest
    ['lagging', 1, 1], // the hottest
    ['mean', 1.5, 1.5],
  ] as const)('of %s while cooling, written positive: slowest %d, fastest %d °C/min', (of, slow, fast) => {
    const lagging: Vertex[] = [...SLOW.slice(0, 3), [370, 20]];
    const run = { channels: { TC1: QUICK, TC2: lagging }, cycle: cycleOf([dwell(), cool({ of })]) };
    expect(findingOf(run, 'cool/slowest')!.observed).toBeCloseTo(slow, 6);
    expect(findingOf(run, 'cool/fastest')!.observed).toBeCloseTo(fast, 6);
  });
});

describe('a sensor that never ran the range', () => {
  const peaking: Vertex[] = [
    [0, 20],
    [30, 80],
    [90, 20],
  ];

  it('is judged fastest on what it ran, 50 °C to its turning point at 2 °C/min; its slowest nobody can tell', () => {
    expect(heating({ TC1: peaking }, { ...CHORD, atMost: 3 })).toMatchObject({
      slowest: { outcome: 'cannot-tell', observed: null },
      fastest: { outcome: 'met', observed: 2 },
    });
    expect(heating({ TC1: peaking }, { ...CHORD, atMost: 1.9 }).fastest!.outcome).toBe('not-met');
  });

  it('leaves the slowest open even where another ran it', () => {
    expect(heating({ TC1: peaking, TC2: QUICK }, CHORD).slowest!.outcome).toBe('cannot-tell');
  });

  it('that starts above the first temperature is judged from its start: 60 to 100 °C in 20 min', () => {
    const warm: Vertex[] = [
      [0, 60],
      [60, 180],
      [200, 180],
      [280, 20],
    ];
    expect(heating({ TC1: warm }, CHORD)).toMatchObject({
      slowest: { outcome: 'cannot-tell' },
      fastest: { outcome: 'met', observed: 2 },
    });
  });

  it('because it was excluded at 25 min costs nothing where another ran the range', () => {
    const run = (lagging: readonly Vertex[]) =>
      heating({ TC1: QUICK, TC2: lagging }, CHORD, { exclusions: [excluded('TC2', 25)] });
    expect(run(SLOW)).toMatchObject({ slowest: { outcome: 'met' }, fastest: { outcome: 'met', observed: 2 } });
    // 0.4 °C/min from 50 °C at 15 min to 54 °C at 25 min is slow, and it was believed then.
    const crawling: Vertex[] = [
      [0, 20],
      [15, 50],
      [25, 54],
      [88, 180],
      [200, 180],
      [280, 20],
    ];
    expect(run(crawling).slowest).toMatchObject({ outcome: 'not-met', sensor: 'TC2' });
    expect(run(crawling).slowest!.observed).toBeCloseTo(0.4, 6);
  });
});

describe('a gap in the range, which is run from 15 to 40 min', () => {
  const silent = (from: number, until: number, every = 1) =>
    heating({ TC1: part(QUICK, { absent: [[from, until]] }) }, WINDOW, { every });

  it('of 10 min leaves windows that touch it out, and the finding open', () => {
    expect(silent(20, 30)).toMatchObject({ slowest: { outcome: 'cannot-tell' }, fastest: { outcome: 'cannot-tell' } });
  });

  it('of 5 min is none, and bridged by a straight line', () => {
    expect(silent(20, 25)).toMatchObject({ slowest: { outcome: 'met', observed: 2 }, fastest: { outcome: 'met' } });
  });

  it('hides no breach that is seen: 3 °C/min from 15 to 25 min, where 2.5 is allowed', () => {
    const run = heating({ TC1: part(BENT, { absent: [[30, 40]] }) }, { ...WINDOW, atMost: 2.5 });
    expect(run.fastest).toMatchObject({ outcome: 'not-met', observed: 3 });
  });

  it.each([
    [20, 30, 'met'], // only in its middle
    [10, 20, 'cannot-tell'], // over 50 °C at 15 min
    [35, 45, 'cannot-tell'], // over 100 °C at 40 min
  ] as const)('from %d to %d min leaves a chord %s', (from, until, outcome) => {
    const { slowest } = heating({ TC1: part(QUICK, { absent: [[from, until]] }) }, CHORD);
    expect(slowest).toMatchObject({ outcome, observed: 2 });
  });

  it('only in the middle of a stretch shorter than a window leaves its chord exact: 50 to 66 °C from 15 to 23 min', () => {
    const { slowest } = heating({ TC1: part(QUICK, { absent: [[16, 22]] }) }, { ...WINDOW, over: [50, 66] });
    expect(slowest).toMatchObject({ outcome: 'met', observed: 2 });
  });
});
