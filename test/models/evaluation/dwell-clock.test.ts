import { describe, expect, it } from 'vitest';
import type { Clock, Stage } from '../../../models/cycle/cycle.ts';
import {
  air,
  cycleOf,
  dwell,
  findingOf,
  type MadeRun,
  minutesTo,
  partOf,
  QUICK,
  SLOW,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Dwells); every figure is worked out by hand.

const AIR = air([
  [0, 20],
  [40, 180], // 4 °C/min: 175 °C at 38.75 min
  [190, 180],
  [230, 20], // 175 °C at 191.25 min
]);
const TWO_AND_AIR = { TC1: QUICK, TC2: SLOW, air: AIR };

type Histories = Readonly<Record<string, readonly Vertex[]>>;

function clockRun(
  opens: Clock['opens'],
  closes: Clock['closes'],
  channels: MadeRun['channels'] = TWO_AND_AIR,
): MadeRun {
  return { channels, cycle: cycleOf([dwell({ clock: { opens, closes } })]) };
}

function course(run: MadeRun, at = 0) {
  const { opens, closes, minutes, openedBy, closedBy } = partOf(run).stages[at]!;
  return { opens: minutesTo(opens), closes: minutesTo(closes), minutes, openedBy, closedBy };
}

describe('the clock of a dwell at 175 to 185 °C', () => {
  // TC1 is in from 77.5 to 202.5 min, TC2 from 96.875 to 212.5 min. Their mean: 100 + 0.8 t reaches 175 at 93.75 min,
  // 180 − (t − 200) comes down to it at 205 min. Time counts only while the condition of the opening still holds.
  it.each<[Clock['opens'], Clock['closes'], number, string, number, string, number]>([
    ['lagging-enters', 'first-leaves', 96.875, 'TC2', 202.5, 'TC1', 105.625],
    ['lagging-enters', 'last-leaves', 96.875, 'TC2', 212.5, 'TC2', 105.625],
    ['lagging-enters', 'mean-leaves', 96.875, 'TC2', 205, 'mean', 105.625],
    ['lagging-enters', 'air-leaves', 96.875, 'TC2', 191.25, 'air', 94.375],
    ['leading-enters', 'first-leaves', 77.5, 'TC1', 202.5, 'TC1', 125],
    ['leading-enters', 'last-leaves', 77.5, 'TC1', 212.5, 'TC2', 135],
    ['leading-enters', 'mean-leaves', 77.5, 'TC1', 205, 'mean', 127.5],
    ['leading-enters', 'air-leaves', 77.5, 'TC1', 191.25, 'air', 113.75],
    ['mean-enters', 'first-leaves', 93.75, 'mean', 202.5, 'TC1', 108.75],
    ['mean-enters', 'last-leaves', 93.75, 'mean', 212.5, 'TC2', 111.25],
    ['mean-enters', 'mean-leaves', 93.75, 'mean', 205, 'mean', 111.25],
    ['mean-enters', 'air-leaves', 93.75, 'mean', 191.25, 'air', 97.5],
    ['air-enters', 'first-leaves', 38.75, 'air', 202.5, 'TC1', 152.5],
    ['air-enters', 'last-leaves', 38.75, 'air', 212.5, 'TC2', 152.5],
    ['air-enters', 'mean-leaves', 38.75, 'air', 205, 'mean', 152.5],
    ['air-enters', 'air-leaves', 38.75, 'air', 191.25, 'air', 152.5],
  ])('%s, %s: opens at %d min by %s, closes at %d min by %s, %d min', (opens, closes, ...figures) => {
    const [opensAt, openedBy, closesAt, closedBy, minutes] = figures;
    const run = clockRun(opens, closes);
    expect(course(run)).toEqual({ opens: opensAt, closes: closesAt, minutes, openedBy, closedBy });
    expect(findingOf(run, 'dwell/time')).toMatchObject({ observed: minutes, possible: minutes, sensor: openedBy });
  });

  it('takes the coldest of several air channels: the slower comes in at 77.5 min, the quicker leaves at 191.25', () => {
    const channels = { TC1: QUICK, air: AIR, 'air 2': air(QUICK) };
    expect(course(clockRun('air-enters', 'air-leaves', channels))).toEqual({
      opens: 77.5,
      closes: 191.25,
      minutes: 113.75,
      openedBy: 'coldest air',
      closedBy: 'coldest air',
    });
  });

  it.each(['air-enters', 'leading-enters'] as const)('%s with air-leaves: without air nobody can tell', (opens) => {
    const finding = findingOf(clockRun(opens, 'air-leaves', { TC1: QUICK }), 'dwell/time')!;
    expect(finding).toMatchObject({ outcome: 'cannot-tell' });
    expect(finding.because).toContain('no air channel');
  });

  it('last-leaves waits for every sensor: TC2 still in when the log stops, the clock has not closed', () => {
    const stopped = { TC1: [...QUICK.slice(0, 3), [205, 170]], TC2: [...SLOW.slice(0, 2), [205, 180]] } as Histories;
    expect(course(clockRun('leading-enters', 'last-leaves', stopped)).closes).toBeNull();
    expect(course(clockRun('leading-enters', 'first-leaves', stopped)).closes).toBe(202.5);
  });

  it.each([0.5, 1, 4, 5, 20])('does not depend on a scan every %d min: 77.5 to 202.5 min', (every) => {
    const run = { ...clockRun('lagging-enters', 'first-leaves', { TC1: QUICK }), every };
    expect(course(run)).toMatchObject({ opens: 77.5, closes: 202.5, minutes: 125 });
  });

  it('opens with the log where every sensor is already in the band, 178 °C until 120 min: 121.5 min', () => {
    const history = [
      [0, 178],
      [120, 178],
      [200, 18],
    ] as const;
    const run = clockRun('lagging-enters', 'first-leaves', { TC1: history });
    expect(course(run)).toMatchObject({ opens: 0, closes: 121.5, minutes: 121.5 });
  });
});

describe('leaving downwards', () => {
  const COOL_TO_60: Stage = { name: 'cool-down', kind: 'cool', until: 60 };
  // Cools to 50 °C at 265 min, is heated once more to 180 °C (in at 327.5 min) and leaves again at 332.5 min.
  const heatedAgain = [...QUICK.slice(0, 3), [265, 50], [330, 180], [395, 50]] as const;
  const stagesOf = (...after: Stage[]) => [dwell({ counting: 'accumulated' }), ...after];

  it('is the last crossing of lower before the sensor has cooled to until: at 202.5 min, though heated once more', () => {
    const run = { channels: { TC1: heatedAgain }, cycle: cycleOf(stagesOf(COOL_TO_60)) };
    expect(course(run)).toMatchObject({ closes: 202.5, minutes: 125 });
  });

  it('is the last crossing before the log ends where no until is written: at 332.5 min, 125 + 5 min in band', () => {
    const run = { channels: { TC1: heatedAgain }, cycle: cycleOf(stagesOf()) };
    expect(course(run)).toMatchObject({ closes: 332.5, minutes: 130 });
  });
});

describe('a clock that never opened', () => {
  /** Heats at 2 °C/min to a peak, and cools at 1 °C/min to an end. */
  const peaking = (peak: number, end: number) =>
    [
      [0, 20],
      [(peak - 20) / 2, peak],
      [(peak - 20) / 2 + peak - end, end],
    ] as const;
  const run = (end: number, after: Stage[] = []): MadeRun => ({
    channels: { TC1: QUICK, TC2: peaking(170, end), TC3: peaking(172, end) },
    cycle: cycleOf([dwell(), ...after]),
  });

  it('gives no time, and names the sensor that stayed coldest: TC2 reached 170 °C, 5 °C short of 175', () => {
    const finding = findingOf(run(20), 'dwell/time')!;
    expect(finding).toMatchObject({ outcome: 'not-met', observed: 0, sensor: 'TC2' });
    expect(finding.because).toContain('TC2 stayed coldest and reached 170 °C, 5 °C short');
  });

  it.each([
    [154, 'not-met'], // 16 °C below its hottest
    [155, 'not-met'], // 15 °C
    [156, 'cannot-tell'], // 14 °C
  ] as const)('shows its cooling once the sensor is 15 °C below its hottest: ends at %d °C, %s', (end, outcome) => {
    const alone = { ...run(20), channels: { TC2: peaking(170, end) } };
    expect(findingOf(alone, 'dwell/time')).toMatchObject({ outcome, observed: 0 });
  });

  it('shows its cooling once the sensor is down at the last until, 165 °C after 170', () => {
    const alone = (until: number): MadeRun => ({
      channels: { TC2: peaking(170, 165) },
      cycle: cycleOf([dwell(), { name: 'cool-down', kind: 'cool', until }]),
    });
    expect(findingOf(alone(165), 'dwell/time')!.outcome).toBe('not-met');
    expect(findingOf(alone(164), 'dwell/time')!.outcome).toBe('cannot-tell');
  });

  it('gives no time where the sensors were in one after the other: TC1 out at 102.5 min, TC2 in at 155 min', () => {
    const held = (from: number, until: number) =>
      [
        [0, 20],
        [from, 180],
        [until, 180],
        [until + 80, 20],
      ] as const;
    const channels = { TC1: held(80, 100), TC2: held(160, 200) };
    const finding = findingOf(clockRun('lagging-enters', 'first-leaves', channels), 'dwell/time')!;
    expect(finding).toMatchObject({ outcome: 'not-met', observed: 0 });
    expect(finding.because).toContain('never all of them at once');
  });

  it.each([
    ['mean-enters', 'the mean reached 174 °C, 1 °C short'], // of 178 and 170 °C
    ['air-enters', 'air reached 160 °C, 15 °C short'],
  ] as const)('%s is told by what it waits for: %s', (opens, words) => {
    const closes = opens === 'mean-enters' ? 'mean-leaves' : 'air-leaves';
    const peak = (at: number) => [...peaking(at, at), ...[[120, at] as const, [220, 20] as const]];
    const channels = { TC1: peak(178), TC2: peak(170), air: air(peak(160)) };
    const finding = findingOf(clockRun(opens, closes, channels), 'dwell/time')!;
    expect(finding).toMatchObject({ outcome: 'not-met', observed: 0 });
    expect(finding.because.toLowerCase()).toContain(words.toLowerCase());
  });
});
