import { describe, expect, it } from 'vitest';
import { ageingRate } from '../../../models/material/ageing-rate.ts';
import { stepsAbove, timeAbove } from '../../../models/material/profile.ts';
import { TAPE } from './made-ledger.ts';

const HOUR = 3_600_000;
const rate = ageingRate({
  ...TAPE,
  equivalent: { rule: 'arrhenius', approvedBy: 'x', E: 90_000, atMost: 40, colderCountsLess: true },
});

describe('timeAbove', () => {
  it('of a straight rise is the integral of its rate', () => {
    // Ten hours from 10 to 30 °C against a midpoint sum over a hundred thousand steps.
    const n = 100_000;
    let sum = 0;
    for (let k = 0; k < n; k++) sum += (rate.at(10 + (20 * (k + 0.5)) / n)! * 600) / n;
    const { minutes } = timeAbove(
      [
        [0, 10],
        [10 * HOUR, 30],
      ],
      0,
      10 * HOUR,
      -12,
      rate,
    );
    expect(Math.abs(minutes / sum - 1)).toBeLessThan(1e-6);
  });

  it('counts only what lies above the level and within the stretch', () => {
    const plain = ageingRate(TAPE);
    const profile = [
      [0, -20],
      [2 * HOUR, 0],
      [4 * HOUR, -20],
    ] as const;
    expect(timeAbove(profile, 0, 4 * HOUR, -10, plain).minutes).toBeCloseTo(120, 9);
    expect(timeAbove(profile, 1.5 * HOUR, 2 * HOUR, -10, plain).minutes).toBeCloseTo(30, 9);
    expect(timeAbove(profile, 0, 4 * HOUR, 0, plain).minutes).toBe(0);
    const steps = stepsAbove(profile, 0, 4 * HOUR, -10);
    expect(steps.reduce((sum, { seconds }) => sum + seconds, 0)).toBeCloseTo(7200, 6);
  });

  it('tells how long no rule reaches', () => {
    const { beyondMinutes } = timeAbove(
      [
        [0, 20],
        [2 * HOUR, 28],
        [4 * HOUR, 20],
      ],
      0,
      4 * HOUR,
      -12,
      ageingRate(TAPE),
    );
    expect(beyondMinutes).toBeCloseTo(120, 9);
  });
});
