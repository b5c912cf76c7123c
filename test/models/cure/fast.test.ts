import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import { beginCure } from '../../../models/cure/cure-progress.ts';
import {
  expandShape,
  powerShape,
  reachOf,
  stoichiometricShape,
  type TermShape,
} from '../../../models/cure/fast/term-shape.ts';
import type { Resin } from '../../../models/cure/resin.ts';
import { recalledResin, referenceSets } from '../../reference/cure/reference-sets.ts';

/** Below 1e-7 the step-by-step integrator does all the work: it is what the fast one is held against. */
const stepByStep = { tolerance: 1e-10 };
const sets = Object.keys(referenceSets);

/** A cheap repeatable noise in [−1, 1]: the fractional parts of a sine's digits. */
const noise = (i: number) =>
  2 * (Math.sin(i * 12.9898) * 43758.5453 - Math.floor(Math.sin(i * 12.9898) * 43758.5453)) - 1;

/** Two dwells at 1 Hz with noise of an amplitude in K, and steps where the recorder was switched. */
function history(seconds: number, amplitudeK: number, jumpK: number): [Float64Array, Float64Array] {
  const timeS = Float64Array.from({ length: seconds + 1 }, (_, i) => i);
  const temperatureK = timeS.map((s) => {
    const share = s / seconds;
    const rising = 293 + 90 * Math.min(1, share / 0.2) + 70 * Math.max(0, Math.min(1, (share - 0.4) / 0.2));
    const falling = share > 0.85 ? 160 * ((share - 0.85) / 0.15) : 0;
    return rising - falling + amplitudeK * noise(s) + (s % 997 > 900 ? jumpK : 0);
  });
  return [timeS, temperatureK];
}

function worst(resin: Resin, timeS: Float64Array, temperatureK: Float64Array) {
  const fast = cureAlong(timeS, temperatureK, resin);
  const slow = cureAlong(timeS, temperatureK, resin, stepByStep);
  let alpha = 0;
  for (let i = 0; i < timeS.length; i += 1) alpha = Math.max(alpha, Math.abs(fast.alpha[i]! - slow.alpha[i]!));
  const apart = (a: number | null, b: number | null) => {
    expect(a === null).toBe(b === null);
    return Math.abs((a ?? 0) - (b ?? 0));
  };
  return {
    alpha,
    gelS: apart(fast.gelS, slow.gelS),
    vitrifiesS: apart(fast.vitrifiesS, slow.vitrifiesS),
    outsideS: Math.abs(fast.outsideValidS - slow.outsideValidS),
  };
}

describe('the fast integrator against the step-by-step one', () => {
  it.each(sets.flatMap((set) => [0, 0.2, 1].map((amplitudeK) => ({ set, amplitudeK }))))(
    '$set with $amplitudeK K of noise: within 1e-6 at every scan, events within 0.01 s',
    ({ set, amplitudeK }) => {
      const resin: Resin = { ...recalledResin(set), validC: [80, 170] };
      const apart = worst(resin, ...history(12000, amplitudeK, 0));
      expect(apart.alpha).toBeLessThan(1e-6);
      expect(apart.gelS).toBeLessThan(0.01);
      expect(apart.vitrifiesS).toBeLessThan(0.01);
      expect(apart.outsideS).toBe(0);
    },
  );

  it.each(sets)('%s with jumps of 6 K: within 1e-6 at every scan', (set) => {
    expect(worst(recalledResin(set), ...history(9000, 0.3, 6)).alpha).toBeLessThan(1e-6);
  });

  it('agrees on any set, scan interval and noise', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...sets),
        fc.double({ min: 0.2, max: 30, noNaN: true }),
        fc.double({ min: 0, max: 4, noNaN: true }),
        fc.double({ min: 0.002, max: 0.6, noNaN: true }),
        (set, intervalS, amplitudeK, startDegree) => {
          const [timeS, temperatureK] = history(600, amplitudeK, 0);
          const resin = { ...recalledResin(set), initialDegree: startDegree };
          const apart = worst(
            resin,
            timeS.map((s) => s * intervalS),
            temperatureK,
          );
          expect(apart.alpha).toBeLessThan(1e-6);
        },
      ),
      { seed: 20260302 },
    );
  });

  it('gives the same bytes scan by scan, in one go, in pieces and in a copy', () => {
    for (const set of sets) {
      const resin: Resin = { ...recalledResin(set), validC: [80, 170] };
      const [timeS, temperatureK] = history(6000, 0.4, 3);
      const whole = cureAlong(timeS, temperatureK, resin);
      const single = beginCure(resin);
      const alpha = timeS.map((s, i) => {
        single.accept(s, temperatureK[i]!);
        return single.alpha();
      });
      expect(alpha).toEqual(whole.alpha);
      let pieces = beginCure(resin);
      for (let from = 0; from < timeS.length; from += 701) {
        const to = Math.min(from + 701, timeS.length);
        const out = new Float64Array(to - from);
        pieces.acceptAll(timeS.slice(from, to), temperatureK.slice(from, to), out);
        expect(out).toEqual(whole.alpha.slice(from, to));
        pieces = pieces.copy();
      }
      for (const progress of [single, pieces]) {
        expect([progress.gelS, progress.vitrifiesS, progress.outsideValidS]).toEqual([
          whole.gelS,
          whole.vitrifiesS,
          whole.outsideValidS,
        ]);
      }
    }
  });
});

describe('a term’s shape', () => {
  const shapes: [string, TermShape, (a: number) => number][] = [
    ['α^0.51 (1 − α)^1.49', powerShape(0.51, 1.49), (a) => a ** 0.51 * (1 - a) ** 1.49],
    ['(1 − α)^21.11', powerShape(0, 21.11), (a) => (1 - a) ** 21.11],
    ['α^2.4 (1 − α)^0.7', powerShape(2.4, 0.7), (a) => a ** 2.4 * (1 - a) ** 0.7],
    ['(1 − α)(0.47 − α)', stoichiometricShape(0.47, false), (a) => (1 - a) * (0.47 - a)],
    ['α(1 − α)(0.47 − α)', stoichiometricShape(0.47, true), (a) => a * (1 - a) * (0.47 - a)],
  ];

  it.each(shapes)('%s is met to 2e-8 within its reach', (_, shape, exact) => {
    for (const center of [1e-6, 0.01, 0.2, 0.45, 0.9, 0.999]) {
      const taylor = new Float64Array(5);
      expandShape(shape, center, taylor, 0);
      const reach = reachOf(shape, center);
      for (const share of [-1, -0.5, 0, 0.5, 1]) {
        const d = share * reach;
        const value = taylor.reduceRight((sum, coefficient) => sum * d + coefficient, 0);
        // (1 − α)(B − α) passes through zero, so the largest value about the centre is the measure.
        const scale = Math.max(Math.abs(exact(center - reach)), Math.abs(exact(center + reach)));
        expect(Math.abs(value - exact(center + d))).toBeLessThan(2e-8 * scale);
      }
    }
  });
});
