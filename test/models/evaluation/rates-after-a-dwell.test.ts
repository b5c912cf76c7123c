import { describe, expect, it } from 'vitest';
import { CHORD, cool, heat, LIMITS } from '../../support/made-ramps.ts';
import { cycleOf, dwell, findingOf, minutesTo, QUICK, type Vertex } from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Rates).

describe('a range after a dwell', () => {
  // 30 °C at 5 min and 130 °C at 55 min (2 °C/min) are before dwell 1 is entered for the second time; the range of
  // the second heat is looked for from the entering of dwell 1 (42.5 min) on.
  it('is looked for after the dwell before was entered: 120 to 170 °C at 3 °C/min, whatever the first heat did', () => {
    const history: Vertex[] = [
      [0, 20],
      [45, 110],
      [105, 110],
      [110, 125],
      [130, 185],
      [260, 185],
      [340, 25],
    ];
    const cycle = cycleOf([
      heat({ ...CHORD, over: [30, 100] }),
      dwell({ name: 'dwell 1', target: 110 }),
      { name: 'heat 2', kind: 'heat', rate: { ...LIMITS, over: [120, 170], ...CHORD, of: 'every' } },
      dwell(),
    ]);
    const run = { channels: { TC1: history }, cycle };
    expect(findingOf(run, 'heat/fastest')).toMatchObject({ outcome: 'met', observed: 2 });
    expect(findingOf(run, 'heat 2/fastest')).toMatchObject({ outcome: 'met', observed: 3 });
  });

  it('while cooling too: 170 to 70 °C after the dwell was entered, not the start below 70 °C', () => {
    const run = { channels: { TC1: QUICK }, cycle: cycleOf([dwell(), cool({ atMost: 1.9 })]) };
    const finding = findingOf(run, 'cool/fastest')!;
    expect(finding).toMatchObject({ outcome: 'not-met', observed: 2 });
    expect([minutesTo(finding.from), minutesTo(finding.until)]).toEqual([205, 255]);
  });

  it.each([
    [false, 'cannot-tell'],
    [true, 'pending'],
  ] as const)('is open where the log stops before it (--open: %s)', (open, outcome) => {
    const run = { channels: { TC1: QUICK.slice(0, 3) }, cycle: cycleOf([dwell(), cool({})]), open };
    expect(findingOf(run, 'cool/slowest')!.outcome).toBe(outcome);
    expect(findingOf(run, 'cool/fastest')!.outcome).toBe(outcome);
  });
});
