import { describe, expect, it } from 'vitest';
import { reactionHeatJM3 } from '../../../../models/cure/heat/layer.ts';
import { laminateOf, transverseConductivityWMK } from '../../../../models/cure/heat/mixture.ts';
import { DomainError } from '../../../../models/errors.ts';
import { recalledResin } from '../../../reference/cure/reference-sets.ts';

describe('laminateOf', () => {
  it('conducts across the fibres as Springer and Tsai have it', () => {
    // 0.646 W/(m K) for k_r 0.167, k_f 26, V 0.6: evaluated by hand from the formula; the cylinder model gives 0.652.
    expect(transverseConductivityWMK(26, 0.167, 0.6)).toBeCloseTo(0.646, 3);
    // Towards equal conductivities it is that conductivity.
    expect(transverseConductivityWMK(0.1671, 0.167, 0.6)).toBeCloseTo(0.167, 3);
  });

  it('weighs density by volume and heat capacity by mass', () => {
    // Loos & Springer's constituents; ρ = 0.6 · 1790 + 0.4 · 1260, c = (0.6 · 1790 · 712 + 0.4 · 1260 · 1260)/ρ.
    const laminate = laminateOf({
      fibreDensityKgM3: 1790,
      resinDensityKgM3: 1260,
      fibreSpecificHeatJKgK: 712,
      resinSpecificHeatJKgK: 1260,
      fibreConductivityWMK: 26,
      resinConductivityWMK: 0.167,
      fibreFraction: 0.6,
    });
    expect(laminate.densityKgM3).toBeCloseTo(1578, 9);
    expect(laminate.specificHeatJKgK).toBeCloseTo((1074 * 712 + 504 * 1260) / 1578, 9);
  });
});

describe('reactionHeatJM3', () => {
  const laminate = { densityKgM3: 1520, resinDensityKgM3: 1260, fibreFraction: 0.6 };

  it('takes the heat by the mass it is stated for', () => {
    // 473.6 kJ/kg of resin is 198.9 kJ/kg of laminate for 3501-6 at a resin mass fraction of 0.42 (Lee et al. 1982 and
    // Bogetti & Gillespie 1991 give one each).
    const heat = (heatOfReaction: number, basis: 'resin' | 'composite') =>
      reactionHeatJM3({ ...recalledResin('lls_3501_6'), thermal: { heatOfReaction, basis } }, laminate);
    expect(heat(473600, 'resin')).toBeCloseTo(1260 * 0.4 * 473600, 3);
    expect(heat(198900, 'composite')).toBeCloseTo(1520 * 198900, 3);
  });

  it('refuses a resin without a heat', () => {
    expect(() => reactionHeatJM3(recalledResin('lls_3501_6'), laminate)).toThrow(DomainError);
  });
});
