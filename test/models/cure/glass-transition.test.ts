import { describe, expect, it } from 'vitest';
import { degreeFromGlassTransition, glassTransitionK } from '../../../models/cure/glass-transition.ts';
import { readReference } from '../../reference/cure/reference-sets.ts';

interface Row {
  Tg0: number;
  Tginf: number;
  lam: number;
  alpha: number;
  Tg: number;
}

// Source: test/reference/cure/closed-forms.json, mpmath at 40 digits.
const { rows } = readReference<{ dibenedetto: { rows: Row[] } }>('closed-forms.json').dibenedetto;

describe('glassTransitionK', () => {
  it.each(rows)('Tg0 $Tg0, Tg∞ $Tginf, λ $lam: $Tg °C at $alpha, and back', ({ Tg0, Tginf, lam, alpha, Tg }) => {
    const set = { law: 'dibenedetto', tg0C: Tg0, tgInfC: Tginf, lambda: lam } as const;
    const tgK = glassTransitionK(alpha, set);
    expect(Math.abs(tgK - (Tg + 273.15))).toBeLessThan(1e-12 * tgK);
    expect(Math.abs(degreeFromGlassTransition(tgK, set) - alpha)).toBeLessThan(1e-12);
  });
});
