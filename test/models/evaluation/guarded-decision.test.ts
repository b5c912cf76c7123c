import { describe, expect, it } from 'vitest';
import type { Cycle, DwellStage, WindowLimit } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dipTo,
  dwell,
  findingOf,
  heldWith,
  judged,
  type MadeRun,
  part,
  pressure,
  QUICK,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Decision rule), after ISO 14253-1 and JCGM 106: inside by
// at least U is met, outside by at least U is not met, between the two nobody can tell.

const GUARDED = { decision: { rule: 'guarded' } } as const;
const AS_INDICATED = { decision: { rule: 'as-indicated' } } as const;

function runOf(
  history: readonly Vertex[],
  more: Partial<Cycle>,
  stage: Partial<DwellStage> = {},
  uncertainty = 2,
): MadeRun {
  return { channels: { TC1: part(history, { uncertainty }) }, cycle: cycleOf([dwell(stage)], { ...GUARDED, ...more }) };
}

const peaking = (peak: number) => heldWith([120, 180], [121, peak], [122, 180]);

describe('guarded', () => {
  it.each([
    [188, 'met'], // inside 190 °C by exactly U
    [188.1, 'cannot-tell'],
    [190, 'cannot-tell'],
    [191.9, 'cannot-tell'],
    [192, 'not-met'], // outside by exactly U
  ] as const)('ceiling of 190 °C with U = 2 °C: %d °C is %s', (peak, outcome) => {
    const finding = findingOf(runOf(peaking(peak), { ceiling: 190 }), 'ceiling')!;
    expect(finding).toMatchObject({ outcome, observed: peak, uncertainty: 2 });
    const asIndicated = findingOf(runOf(peaking(peak), { ceiling: 190, ...AS_INDICATED }), 'ceiling')!;
    expect(asIndicated).toMatchObject({ outcome: peak > 190 ? 'not-met' : 'met', uncertainty: 2 });
  });

  it.each([
    [183, 'met'],
    [183.1, 'cannot-tell'],
    [186.9, 'cannot-tell'],
    [187, 'not-met'],
  ] as const)('upper of 185 °C with U = 2 °C: %d °C is %s', (peak, outcome) => {
    expect(findingOf(runOf(peaking(peak), {}), 'dwell/upper')!.outcome).toBe(outcome);
  });

  it('counts what is forgiven from the moved limit: 3 °C above 183 °C is 186 °C', () => {
    // At 2 °C/min to 186 °C: over 183 °C for 3 min, over 185 °C for 1 min, and over 187 °C never.
    const above = (by: number) => ({ forgive: { above: { by, for: 3 } } });
    expect(findingOf(runOf(heldWith(...dipTo(186, 120)), {}, above(3)), 'dwell/upper')!.outcome).toBe('met');
    expect(findingOf(runOf(heldWith(...dipTo(186, 120)), {}, above(2.9)), 'dwell/upper')!.outcome).toBe('cannot-tell');
  });

  // The band moved in by 2 °C is entered at 177 °C: 78.5 to 201.5 min, 123 min; as written 125; moved out 127 min.
  it.each([
    [{ atLeast: 123 }, 'met'],
    [{ atLeast: 123.1 }, 'cannot-tell'],
    [{ atLeast: 127 }, 'cannot-tell'],
    [{ atLeast: 127.1 }, 'not-met'],
    [{ atMost: 127 }, 'met'],
    [{ atMost: 126.9 }, 'cannot-tell'],
    [{ atMost: 122.9 }, 'not-met'],
  ] as const)('time of 123 to 127 min against %o is %s', (bounds, outcome) => {
    expect(findingOf(runOf(QUICK, {}, { time: bounds }), 'dwell/time')).toMatchObject({ outcome, observed: 125 });
  });

  it.each([
    [6.6, 'met'],
    [6.59, 'cannot-tell'],
    [6.41, 'cannot-tell'],
    [6.4, 'not-met'],
  ] as const)('window of at least 6.5 bar with U = 0.1 bar: %d bar is %s', (bar, outcome) => {
    const windows: WindowLimit[] = [
      { name: 'w', quantity: 'pressure', atLeast: 6.5, from: { at: 'start' }, until: { at: 'end' } },
    ];
    const channels = { TC1: QUICK, P: pressure([[280, bar]], { uncertainty: 0.1 }) };
    const finding = findingOf({ channels, cycle: cycleOf([dwell()], { ...GUARDED, windows }) }, 'window/w')!;
    expect(finding).toMatchObject({ outcome, observed: bar });
    expect(finding.uncertainty).toBeCloseTo(0.1, 9);
  });

  // U of 3 and 4 °C: the difference has 5 °C.
  it.each([
    [15, 'met'],
    [14.9, 'cannot-tell'],
    [5.1, 'cannot-tell'],
    [5, 'not-met'],
  ] as const)('spread of 10 °C with two U against at most %d °C is %s', (atMost, outcome) => {
    const channels = {
      TC1: part(
        [
          [0, 100],
          [60, 100],
        ],
        { uncertainty: 3 },
      ),
      TC2: part(
        [
          [0, 110],
          [60, 110],
        ],
        { uncertainty: 4 },
      ),
    };
    const cycle = cycleOf([dwell()], { ...GUARDED, spread: { atMost, during: 'run' } });
    expect(findingOf({ channels, cycle }, 'spread')).toMatchObject({ outcome, observed: 10, uncertainty: 5 });
  });

  it('a mean has the largest U of its sensors: 4 °C, so 79.5 to 200.5 min at worst', () => {
    const clock = { opens: 'mean-enters', closes: 'mean-leaves' } as const;
    const channels = { TC1: part(QUICK, { uncertainty: 1 }), TC2: part(QUICK, { uncertainty: 4 }) };
    const of = (atLeast: number) =>
      findingOf({ channels, cycle: cycleOf([dwell({ clock, time: { atLeast } })], GUARDED) }, 'dwell/time')!.outcome;
    expect([of(121), of(121.1)]).toEqual(['met', 'cannot-tell']);
  });

  it('moves neither rates nor events', () => {
    const heat = {
      name: 'heat',
      kind: 'heat',
      rate: { atMost: 2, over: [50, 100], average: 'chord', of: 'every' },
    } as const;
    const windows: WindowLimit[] = [
      { name: 'w', quantity: 'pressure', atMost: 10, from: { at: 'first-reaches', value: 100 }, until: { at: 'end' } },
    ];
    const channels = { TC1: part(QUICK, { uncertainty: 2 }), P: pressure([[280, 7]]) };
    const run = { channels, cycle: cycleOf([heat, dwell()], { ...GUARDED, windows }) };
    expect(findingOf(run, 'heat/fastest')).toMatchObject({ outcome: 'met', observed: 2, uncertainty: null });
    expect(judged(run).parts[0]!.windows[0]!.from).toBe('2026-03-02T08:40:00.000Z');
  });

  it('a reading without a known U is judged as indicated, and the record says so', () => {
    const run = (peak: number) => ({
      channels: { TC1: peaking(peak) },
      cycle: cycleOf([dwell()], { ...GUARDED, ceiling: 190 }),
    });
    expect(findingOf(run(190), 'ceiling')).toMatchObject({ outcome: 'met', uncertainty: null });
    expect(findingOf(run(190.1), 'ceiling')!.outcome).toBe('not-met');
    expect(judged(run(190)).assumptions.join(' ')).toContain('no uncertainty is known: TC1');
  });

  it('each sensor has its own U: 189 °C of one known to 0.5 °C holds, of one known to 2 °C is open', () => {
    const run = (uncertainty: number) => ({
      channels: { TC1: part(QUICK, { uncertainty: 2 }), TC2: part(peaking(189), { uncertainty }) },
      cycle: cycleOf([dwell({ plus: 20 })], { ...GUARDED, ceiling: 190 }),
    });
    expect(findingOf(run(0.5), 'ceiling')!.outcome).toBe('met');
    expect(findingOf(run(2), 'ceiling')!.outcome).toBe('cannot-tell');
  });
});
