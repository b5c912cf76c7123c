import { describe, expect, it } from 'vitest';
import type { DwellStage, Stage } from '../../../models/cycle/cycle.ts';
import { cycleOf, dwell, findingOf, type MadeRun, minutesTo, partOf, type Vertex } from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Dwells: entering and leaving).

const FIRST: DwellStage = dwell({ name: 'dwell 1', target: 110, time: { atLeast: 60 } });
const HEAT: Stage = { name: 'heat-up 2', kind: 'heat' };
const SECOND: DwellStage = dwell({ name: 'dwell 2' });
const HOTTER = cycleOf([FIRST, HEAT, SECOND]);

/** 2 °C/min to 110 °C (in at 42.5 min), then as written, then to 180 °C, 120 min there, and down. */
function towardsHotter(...held: Vertex[]): Vertex[] {
  const [at, from] = held.at(-1)!;
  const top = at + (180 - from) / 2;
  return [[0, 20], [45, 110], ...held, [top, 180], [top + 120, 180], [top + 200, 20]];
}

function course(run: MadeRun, at: number) {
  const { opens, closes, minutes, openedBy } = partOf(run).stages[at]!;
  return { opens: minutesTo(opens), closes: minutesTo(closes), minutes, openedBy };
}

describe('leaving a dwell at 105 to 115 °C towards one at 175 to 185 °C', () => {
  it('is the upward crossing of upper: in at 42.5 min, out at 115 °C at 107.5 min, 65 min', () => {
    const run = { channels: { TC1: towardsHotter([105, 110]) }, cycle: HOTTER };
    expect(course(run, 0)).toMatchObject({ opens: 42.5, closes: 107.5, minutes: 65 });
    expect(course(run, 2)).toMatchObject({ opens: 137.5, closes: 262.5, minutes: 125 });
  });

  it('is not an overshoot to 118 °C that comes back: still out at 107.5 min', () => {
    const held = towardsHotter([60, 110], [64, 118], [70, 110], [105, 110]);
    expect(course({ channels: { TC1: held }, cycle: HOTTER }, 0)).toMatchObject({ closes: 107.5, minutes: 65 });
  });

  it('is not the last crossing of all: a return after the midpoint of 145 °C does not come back in', () => {
    // Out at 107.5 min, 150 °C at 125 min, back to 110 °C at 145 min, and up once more.
    const held = towardsHotter([105, 110], [125, 150], [145, 110]);
    expect(course({ channels: { TC1: held }, cycle: HOTTER }, 0)).toMatchObject({ closes: 107.5, minutes: 65 });
  });

  it('is the later crossing where the midpoint of 145 °C was not reached: 144 °C, back, out at 147.5 min', () => {
    const held = towardsHotter([105, 110], [122, 144], [145, 110]);
    expect(course({ channels: { TC1: held }, cycle: HOTTER }, 0)).toMatchObject({ closes: 147.5, minutes: 105 });
  });

  it.each([
    [145, 105 + (5 * 17) / 35], // 35 °C in 17 min: 5 °C of them
    [144.5, 147.5], // back at 110 °C at 145 min, and up again at 2 °C/min
  ])('takes exactly the midpoint as reached: up to %d °C and back, out at %d min', (turn, closes) => {
    const held = towardsHotter([105, 110], [122, turn], [145, 110]);
    expect(course({ channels: { TC1: held }, cycle: HOTTER }, 0).closes).toBeCloseTo(closes, 3);
  });

  it('takes no notice of chatter of less than 1 °C: 116 °C, 114.5 °C, up; out at 100 min', () => {
    // 1 °C/min from 95 min on: 114 °C at 99 min, 115 °C at 100 min.
    const held = towardsHotter([95, 110], [101, 116], [103, 114.5], [104, 116.5]);
    expect(course({ channels: { TC1: held }, cycle: HOTTER }, 0)).toMatchObject({ closes: 100, minutes: 57.5 });
  });

  it('takes a return to upper − 1 °C for one: 116 °C, 113.5 °C, up at 1 °C/min; out at 104.5 min', () => {
    const held = towardsHotter([95, 110], [101, 116], [103, 113.5], [106, 116.5]);
    expect(course({ channels: { TC1: held }, cycle: HOTTER }, 0)).toMatchObject({ closes: 104.5, minutes: 62 });
  });

  it.each([
    [114, 'out again at 105 min'],
    [114.1, 'out at 100 min'],
  ])('draws that line at exactly upper − 1 °C: back to %d °C, %s', (back) => {
    const held = towardsHotter([95, 110], [101, 116], [104, back], [106, back + 2]);
    expect(course({ channels: { TC1: held }, cycle: HOTTER }, 0).closes).toBe(back === 114 ? 105 : 100);
  });

  it('is downwards where it never reached the midpoint and cooled: lower at 107.5 min', () => {
    const history: Vertex[] = [
      [0, 20],
      [45, 110],
      [105, 110],
      [145, 30],
    ];
    expect(course({ channels: { TC1: history }, cycle: HOTTER }, 0)).toMatchObject({ closes: 107.5, minutes: 65 });
  });

  it.each([
    [false, 'cannot-tell'],
    [true, 'pending'],
  ] as const)(
    'is not settled where the record stops at 120 °C, short of the midpoint (--open: %s)',
    (open, outcome) => {
      const history: Vertex[] = [
        [0, 20],
        [45, 110],
        [105, 110],
        [110, 120],
      ];
      const judgedOf = (time: DwellStage['time']) =>
        findingOf(
          { channels: { TC1: history }, cycle: cycleOf([{ ...FIRST, time: time! }, HEAT, SECOND]), open },
          'dwell 1/time',
        );
      // It has left for now at 107.5 min: 65 min may still become more.
      expect(judgedOf({ atLeast: 70 })).toMatchObject({ outcome, observed: 65, possible: null });
      expect(judgedOf({ atMost: 80 })!.outcome).toBe(outcome);
      expect(judgedOf({ atMost: 60 })!.outcome).toBe('not-met');
      expect(judgedOf({ atLeast: 60 })!.outcome).toBe('met');
    },
  );
});

describe('a dwell colder than the one before, at 115 to 125 °C', () => {
  const COOL: Stage = { name: 'cool-down 1', kind: 'cool' };
  const colder = (opens: 'lagging-enters' | 'leading-enters') =>
    cycleOf([
      dwell({ name: 'dwell 1' }),
      COOL,
      dwell({ name: 'dwell 2', target: 120, time: { atLeast: 60 }, clock: { opens, closes: 'first-leaves' } }),
    ]);
  const falling = (from: number): Vertex[] => [
    [0, 20],
    [80, 180],
    [from, 180],
    [from + 30, 120],
    [290, 120],
    [340, 20],
  ];
  const channels = { TC1: falling(200), TC2: falling(210) };

  it('is entered downwards through upper: the last one in is the hottest, TC2 at 237.5 min, out at 292.5 min', () => {
    expect(course({ channels, cycle: colder('lagging-enters') }, 2)).toEqual({
      opens: 237.5,
      closes: 292.5,
      minutes: 55,
      openedBy: 'TC2',
    });
  });

  it('is led by the coldest: TC1 at 227.5 min', () => {
    expect(course({ channels, cycle: colder('leading-enters') }, 2)).toEqual({
      opens: 227.5,
      closes: 292.5,
      minutes: 65,
      openedBy: 'TC1',
    });
  });

  it('ends the hotter dwell: TC1 came down through 175 °C at 202.5 min and that stands, though it is 175 °C no more', () => {
    expect(course({ channels, cycle: colder('lagging-enters') }, 0)).toMatchObject({ closes: 202.5, minutes: 125 });
  });
});

describe('a dwell that was left before the last sensor came in', () => {
  it('gives no time: TC1 out upwards at 107.5 min, TC2 in at 127.5 min at 2/3 °C/min', () => {
    const late: Vertex[] = [
      [0, 20],
      [135, 110],
      [170, 180],
      [290, 180],
      [370, 20],
    ];
    const run = { channels: { TC1: towardsHotter([105, 110]), TC2: late }, cycle: HOTTER };
    const finding = findingOf(run, 'dwell 1/time')!;
    expect(finding).toMatchObject({ outcome: 'not-met', observed: 0, sensor: 'TC2' });
    expect(finding.because).toContain('TC1 left dwell 1 before TC2 came in');
  });
});

describe('a dwell colder than one that never opened', () => {
  const cycle = cycleOf([
    dwell({ name: 'dwell 1' }),
    { name: 'cool-down 1', kind: 'cool' },
    dwell({ name: 'dwell 2', target: 120, time: { atLeast: 60 } }),
  ]);

  it('is not entered by being colder than its band at the start: 160 °C at most, in at 125 °C at 107.5 min', () => {
    const history: Vertex[] = [
      [0, 20],
      [70, 160],
      [90, 160],
      [110, 120],
      [180, 120],
      [230, 20],
    ];
    const run = { channels: { TC1: history }, cycle };
    expect(course(run, 0)).toMatchObject({ opens: null, minutes: 0 });
    expect(course(run, 2)).toMatchObject({ opens: 107.5, closes: 182.5, minutes: 75 });
  });

  it('where no sensor came down, tells which stayed hottest: TC2 at 130 °C, 5 °C above the band', () => {
    const staying = (end: number): Vertex[] => [
      [0, 20],
      [80, 180],
      [200, 180],
      [230, end],
      [300, end],
    ];
    const finding = findingOf({ channels: { TC1: staying(128), TC2: staying(130) }, cycle }, 'dwell 2/time')!;
    expect(finding).toMatchObject({ observed: 0, sensor: 'TC2' });
    expect(finding.because).toContain('TC2 stayed hottest and came down to 130 °C, 5 °C above the band');
  });
});

describe('three dwells', () => {
  it('each open after the first sensor left the one before: 105 °C, 145 °C and 175 °C on the way up', () => {
    const cycle = cycleOf([
      FIRST,
      HEAT,
      dwell({ name: 'dwell 2', target: 150 }),
      { name: 'heat-up 3', kind: 'heat' },
      dwell({ name: 'dwell 3' }),
    ]);
    const history: Vertex[] = [
      [0, 20],
      [45, 110],
      [105, 110],
      [125, 150],
      [185, 150],
      [200, 180],
      [320, 180],
      [400, 20],
    ];
    const run = { channels: { TC1: history }, cycle };
    expect([0, 2, 4].map((at) => course(run, at))).toMatchObject([
      { opens: 42.5, closes: 107.5, minutes: 65 },
      { opens: 122.5, closes: 187.5, minutes: 65 },
      { opens: 197.5, closes: 322.5, minutes: 125 },
    ]);
  });
});
