import { describe, expect, it } from 'vitest';
import type { Cycle } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dwell,
  excluded,
  findingOf,
  judged,
  type MadeRun,
  minutesTo,
  partOf,
  QUICK,
  SLOW,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§1, exclusion, and §2, Sensors that lie).
// TC1 is in from 77.5 to 202.5 min, TC2 from 96.875 to 212.5 min.

function runOf(second: readonly Vertex[], at: number, more: Partial<Cycle> = {}): MadeRun {
  return {
    channels: { TC1: QUICK, TC2: second },
    cycle: cycleOf([dwell()], more),
    exclusions: [excluded('TC2', at)],
  };
}

const time = (run: MadeRun) => findingOf(run, 'dwell/time')!;

/** As `SLOW`, and cold from 150 min on, where its lead comes off. */
const LOST: Vertex[] = [...SLOW.slice(0, 2), [150, 180], [155, 30], [290, 20]];

describe('an exclusion', () => {
  it('before the dwell: the sensor opens, holds and closes nothing, 77.5 to 202.5 min', () => {
    expect(time(runOf(SLOW, 60))).toMatchObject({ outcome: 'met', observed: 125, sensor: 'TC1' });
  });

  it('in the dwell: it opened the clock at 96.875 min, and its fall afterwards neither stops nor closes it', () => {
    expect(time(runOf(LOST, 151))).toMatchObject({ observed: 105.625, sensor: 'TC2' });
    expect(time(runOf(LOST, 999)).observed).toBeLessThan(60);
  });

  it('while it was the last one out: the clock opens at that instant, 90 min, since all who are left are in', () => {
    const run = runOf(SLOW, 90);
    expect(minutesTo(partOf(run).stages[0]!.opens)).toBe(90);
    expect(time(run)).toMatchObject({ observed: 112.5 });
  });

  it('after the dwell: nothing changes', () => {
    expect(time(runOf(SLOW, 250))).toEqual(time({ ...runOf(SLOW, 250), exclusions: [] }));
  });

  it('leaves earlier readings counting: 191 °C at 120 min breaks the ceiling though excluded at 130, not at 110', () => {
    const hot: Vertex[] = [...SLOW.slice(0, 2), [119, 180], [120, 191], [121, 180], ...SLOW.slice(2)];
    const outcome = (at: number) => findingOf(runOf(hot, at, { ceiling: 190 }), 'ceiling')!.outcome;
    expect([outcome(130), outcome(110)]).toEqual(['not-met', 'met']);
  });

  it('ends what hangs on its sensor in upper: 188 °C after it is nobody’s', () => {
    const hot: Vertex[] = [...SLOW.slice(0, 2), [150, 180], [154, 188], [158, 180], ...SLOW.slice(2)];
    const outcome = (at: number) => findingOf(runOf(hot, at), 'dwell/upper')!.outcome;
    expect([outcome(170), outcome(140)]).toEqual(['not-met', 'met']);
  });

  it('of a sensor already cooling keeps its leaving: TC2 out at 120 min and 60 °C below its hottest at 150', () => {
    const early: Vertex[] = [
      [0, 20],
      [80, 180],
      [117.5, 180],
      [147.5, 120],
      [290, 20],
    ];
    const run = { ...runOf(early, 150), every: 0.5 };
    // It left at 120 min by the record, 15 °C and more below its hottest: that is settled.
    expect(minutesTo(partOf(run).stages[0]!.closes)).toBe(120);
    expect(time(run)).toMatchObject({ outcome: 'not-met', observed: 42.5 });
  });

  it('of all sensors leaves nothing to tell by, save what was broken before', () => {
    const run: MadeRun = {
      ...runOf(SLOW, 150, { ceiling: 190 }),
      exclusions: [excluded('TC1', 150), excluded('TC2', 150)],
    };
    expect(time(run).outcome).toBe('cannot-tell');
    expect(findingOf(run, 'ceiling')!.outcome).toBe('cannot-tell');
    expect(findingOf(run, 'dwell/upper')!.outcome).toBe('cannot-tell');
    const hot: Vertex[] = [...SLOW.slice(0, 2), [119, 180], [120, 191], [121, 180], ...SLOW.slice(2)];
    expect(findingOf({ ...run, channels: { TC1: QUICK, TC2: hot } }, 'ceiling')!.outcome).toBe('not-met');
  });

  it('stands in the record with its reason and name, the earliest of two holding', () => {
    const run = { ...runOf(SLOW, 90), exclusions: [excluded('TC2', 150), excluded('TC2', 60)] };
    expect(time(run).observed).toBe(125);
    expect(judged(run).sensors[1]).toMatchObject({ channel: 'TC2', state: 'excluded' });
  });

  it('of a channel that the log has not is refused by name', () => {
    const run = { ...runOf(SLOW, 90), exclusions: [excluded('TC9', 90)] };
    expect(() => judged(run)).toThrow(expect.objectContaining({ code: 'channel-unknown' }));
  });
});
