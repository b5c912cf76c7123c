import { describe, expect, it } from 'vitest';
import type { Cycle, DwellStage, Stage } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dwell,
  findingOf,
  type MadeRun,
  minutesTo,
  part,
  partOf,
  type Vertex,
} from '../../support/made-run.ts';

// The figures of the rules for a cycle written in °F (cycle and verdict document, §2): heat-on 9 °F, a return of 2 °F,
// cooling of 27 °F, changes of 36 °F/min at most.

const UNITS: Cycle['units'] = { temperature: '°F' };
const BAND: Partial<DwellStage> = { target: 356, plus: 9, minus: 9 }; // 347 to 365 °F, 175 to 185 °C

function runOf(
  history: readonly Vertex[],
  stages: readonly Stage[] = [dwell(BAND)],
  absent: readonly [number, number] = [0, 0],
): MadeRun {
  return {
    channels: { TC1: part(history, { unit: '°F', absent: [absent] }) },
    cycle: cycleOf(stages, { units: UNITS }),
  };
}

/** 3.6 °F/min up to 356 °F at 80 min, 120 min there, and down. */
const QUICK_F: Vertex[] = [
  [0, 68],
  [80, 356],
  [200, 356],
  [280, 68],
];

describe('a cycle in °F', () => {
  it('has heat-on at 9 °F above the first reading: 77 °F at 2.5 min', () => {
    expect(minutesTo(partOf(runOf(QUICK_F)).heatOn)).toBe(2.5);
  });

  it.each([
    [311, 'not-met'],
    [312, 'cannot-tell'],
  ] as const)('shows the cooling 27 °F below the hottest: 338 °F and then %d °F is %s', (end, outcome) => {
    const cold: Vertex[] = [
      [0, 68],
      [75, 338],
      [105, end],
    ];
    expect(findingOf(runOf(cold), 'dwell/time')!.outcome).toBe(outcome);
  });

  it('enters in a gap at 36 °F/min at best: 320 °F at 70 min, 347 °F at 70.75 min', () => {
    expect(findingOf(runOf(QUICK_F, [dwell(BAND)], [70, 90]), 'dwell/time')).toMatchObject({
      observed: 112.5,
      possible: 131.75,
    });
  });

  it.each([
    [237, 'out again at 107 min', 107],
    [237.1, 'out at 100 min', 100],
  ])('takes a return to 2 °F below upper for one: back to %d of 239 °F, %s', (back, _, closes) => {
    const first = dwell({ name: 'dwell 1', target: 230, plus: 9, minus: 9 });
    const history: Vertex[] = [
      [0, 68],
      [45, 230],
      [91, 230],
      [102, 241], // 1 °F/min: 239 °F at 100 min
      [106, back],
      [107, back + 2],
      [108, back + 4],
      [150, 356],
      [270, 356],
      [350, 68],
    ];
    const run = runOf(history, [first, { name: 'heat-up 2', kind: 'heat' }, dwell(BAND)]);
    expect(minutesTo(partOf(run).stages[0]!.closes)).toBe(closes);
  });
});
