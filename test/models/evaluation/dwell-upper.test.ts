import { describe, expect, it } from 'vitest';
import type { DwellStage, Forgiveness } from '../../../models/cycle/cycle.ts';
import { cycleOf, dipTo, dwell, findingOf, heldWith, QUICK, type Vertex } from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Dwells: upper). The band ends at 185 °C.

const upper = (history: readonly Vertex[], more: Partial<DwellStage> = {}, open = false) =>
  findingOf({ channels: { TC1: history }, cycle: cycleOf([dwell(more)]), open }, 'dwell/upper');

/** Above 185 °C for 3 min, 3 °C at most. */
const HUMP = heldWith(...dipTo(188, 120));

describe('the upper limit of a dwell', () => {
  it.each([
    [185, 'met', 0],
    [185.1, 'not-met', -0.1],
  ] as const)('compares the highest reading as read: %d °C is %s', (peak, outcome, margin) => {
    const finding = upper(heldWith([120, 180], [121, peak], [122, 180]))!;
    expect(finding).toMatchObject({ outcome, observed: peak, atMost: 185, sensor: 'TC1', unit: '°C' });
    expect(finding.margin).toBeCloseTo(margin, 6);
  });

  it.each<[Forgiveness, boolean]>([
    [{ by: 3, for: 3 }, true],
    [{ by: 2.9, for: 3 }, false],
    [{ by: 3, for: 2.9 }, false],
    [{ by: 3, for: 3, inTotal: 2.9 }, false],
  ])('3 °C above for 3 min under %o is forgiven: %s', (above, isForgiven) => {
    const finding = upper(HUMP, { forgive: { above } })!;
    expect(finding.outcome).toBe(isForgiven ? 'met' : 'not-met');
    expect(finding.forgiven).toBe(isForgiven ? true : undefined);
    // To the forgiven limit of 188 °C, or to that of 185 °C.
    expect(finding.margin).toBe(isForgiven ? 0 : -3);
  });

  it('forgives so many times and no more', () => {
    const twice = heldWith(...dipTo(188, 110), ...dipTo(188, 150));
    const forgive = (times: number) => ({ forgive: { above: { by: 3, for: 3, times } } });
    expect(upper(twice, forgive(2))!.outcome).toBe('met');
    expect(upper(twice, forgive(1))!.outcome).toBe('not-met');
  });

  it('looks no further than the leaving: 190 °C after it has cooled to until is nobody’s', () => {
    const again = [...QUICK.slice(0, 3), [265, 50], [335, 190], [405, 50]] as const;
    const cooled = { name: 'cool-down', kind: 'cool', until: 60 } as const;
    const outcome = (cycle: ReturnType<typeof cycleOf>) =>
      findingOf({ channels: { TC1: again }, cycle }, 'dwell/upper')!.outcome;
    expect(outcome(cycleOf([dwell(), cooled]))).toBe('met');
    expect(outcome(cycleOf([dwell()]))).toBe('not-met');
  });

  it('is absent where no sensor entered, and of those that did where one did not', () => {
    const cold: Vertex[] = [
      [0, 20],
      [70, 160],
      [140, 20],
    ];
    expect(upper(cold)).toBeUndefined();
    const two = { channels: { TC1: cold, TC2: HUMP }, cycle: cycleOf([dwell()]) };
    expect(findingOf(two, 'dwell/upper')).toMatchObject({ outcome: 'not-met', sensor: 'TC2' });
  });

  it('is open while the dwell goes on, unless broken already', () => {
    const stopped = (...held: readonly Vertex[]) => [...QUICK.slice(0, 2), ...held, [150, 180]] as const;
    expect(upper(stopped())!.outcome).toBe('cannot-tell');
    expect(upper(stopped(), {}, true)!.outcome).toBe('pending');
    expect(upper(stopped(...dipTo(188, 100)), {}, true)!.outcome).toBe('not-met');
  });
});

describe('the upper limit of a dwell at 105 to 115 °C, towards a hotter one', () => {
  const cycle = cycleOf([dwell({ name: 'dwell 1', target: 110 }), { name: 'heat-up 2', kind: 'heat' }, dwell()]);
  const towardsHotter = (...held: readonly Vertex[]) => ({
    channels: { TC1: [[0, 20], [45, 110], ...held, [105, 110], [140, 180], [260, 180], [340, 20]] as Vertex[] },
    cycle,
  });

  it('reads on the way out no further than upper − 1 °C: 114 °C at 107 min', () => {
    for (const every of [1, 0.5]) {
      const run = { ...towardsHotter(), every };
      expect(findingOf(run, 'dwell 1/upper')).toMatchObject({ outcome: 'met', observed: 114 });
    }
  });

  it('sees an overshoot to 118 °C that came back', () => {
    expect(findingOf(towardsHotter([60, 110], [64, 118], [70, 110]), 'dwell 1/upper')).toMatchObject({
      outcome: 'not-met',
      observed: 118,
    });
  });
});
