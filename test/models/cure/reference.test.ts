import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import { beginCure, type CureOptions } from '../../../models/cure/cure-progress.ts';
import type { Resin } from '../../../models/cure/resin.ts';
import { historyOf, recalledResin, referenceSets } from '../../reference/cure/reference-sets.ts';

// Source of every figure: test/reference/cure/kinetics.json (SciPy DOP853 and LSODA, agreeing to 1.2e-11).

const cases = Object.entries(referenceSets).flatMap(([set, { cases }]) =>
  Object.entries(cases).map(([name, expected]) => ({ set, name, expected })),
);

/** Degrees at given moments of a history, asked for between its scans. */
function degreesAt(atS: number[], timeS: Float64Array, temperatureK: Float64Array, resin: Resin, options: CureOptions) {
  const progress = beginCure(resin, options);
  const degrees: number[] = [];
  for (let i = 0; i < timeS.length; i += 1) {
    while (degrees.length < atS.length && i > 0 && atS[degrees.length]! < timeS[i]!) {
      const at = atS[degrees.length]!;
      const share = (at - timeS[i - 1]!) / (timeS[i]! - timeS[i - 1]!);
      const thereK = temperatureK[i - 1]! + share * (temperatureK[i]! - temperatureK[i - 1]!);
      degrees.push(progress.alphaAt(at, thereK));
    }
    progress.accept(timeS[i]!, temperatureK[i]!);
  }
  while (degrees.length < atS.length) degrees.push(progress.alpha());
  return degrees;
}

function worstError(set: string, name: string, options: CureOptions): number {
  const { t_s, alpha } = referenceSets[set]!.cases[name]!;
  const degrees = degreesAt(t_s, ...historyOf(set, name), recalledResin(set), options);
  return Math.max(...degrees.map((degree, i) => Math.abs(degree - alpha[i]!)));
}

describe('cureAlong against solutions by SciPy', () => {
  it('sees every matching set and case', () => {
    expect(cases).toHaveLength(14 * 7);
  });

  it.each(cases)('$set $name: degree within 1e-8 at tight tolerance', ({ set, name }) => {
    expect(worstError(set, name, { tolerance: 1e-11 })).toBeLessThanOrEqual(1e-8);
  });

  it.each(cases)('$set $name: degree within 1e-6 at the default tolerance', ({ set, name }) => {
    expect(worstError(set, name, {})).toBeLessThanOrEqual(1e-6);
  });

  it.each(cases)('$set $name: Tg, gel and vitrification within 1e-3 s', ({ set, name, expected }) => {
    const { gelS, vitrifiesS, finalTgK } = cureAlong(...historyOf(set, name), recalledResin(set), { tolerance: 1e-11 });
    expect(finalTgK! - 273.15).toBeCloseTo(expected.final_Tg_C, 6);
    const { gel, vitrification } = expected.events_s;
    if (gel === undefined) expect(gelS).toBeNull();
    else expect(Math.abs(gelS! - gel)).toBeLessThan(1e-3);
    if (vitrification === undefined) {
      // The reference looked for vitrification on smooth histories only.
      if (name !== 'noisy_two_dwell_1Hz') expect(vitrifiesS).toBeNull();
    } else if (isCooling(set, name, vitrification)) {
      // The reference takes the first Tg = T, also on cooling; there a cure does not vitrify, it cools through its Tg.
      expect(vitrifiesS).toBeNull();
    } else expect(Math.abs(vitrifiesS! - vitrification)).toBeLessThan(1e-3);
  });
});

function isCooling(set: string, name: string, atS: number): boolean {
  const vertices = referenceSets[set]!.cases[name]!.history_s_C!;
  const next = vertices.findIndex(([s]) => s >= atS);
  return vertices[next]![1] < vertices[next - 1]![1];
}
