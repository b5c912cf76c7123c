import { describe, expect, it } from 'vitest';
import { leastVoidPressurePa, voidTemperatureK } from '../../../models/cure/void-pressure.ts';
import { DomainError } from '../../../models/errors.ts';
import { readReference } from '../../reference/cure/reference-sets.ts';

interface Row {
  T_C: number;
  psat_IAPWS_kPa: number;
  kardos_RH100_atm: number;
  Pmin_RH50_kPa: number;
}
// Source: test/reference/cure/void-growth.json (IAPWS saturation line beside the formula).
const { rows, examples_inverse } = readReference<{
  rows: Row[];
  examples_inverse: { P_atm: number; RH: number; T_C: number }[];
}>('void-growth.json');
const usable = rows.filter(({ T_C }) => T_C >= 0 && T_C <= 200);

describe('leastVoidPressurePa', () => {
  it.each(usable)('$Pmin_RH50_kPa kPa at $T_C °C and 50 %', ({ T_C, Pmin_RH50_kPa }) => {
    expect(Math.abs(leastVoidPressurePa(T_C + 273.15, 50) / (1000 * Pmin_RH50_kPa) - 1)).toBeLessThan(1e-12);
  });

  it('is saturation at 100 %: within 3 % of steam tables from 80 to 180 °C, and never 0.2 % below them', () => {
    const hot = usable.filter(({ T_C }) => T_C >= 80 && T_C <= 180);
    expect(hot.length).toBeGreaterThan(4);
    for (const { T_C, psat_IAPWS_kPa } of hot) {
      const ratio = leastVoidPressurePa(T_C + 273.15, 100) / (1000 * psat_IAPWS_kPa);
      expect(ratio).toBeGreaterThan(0.998);
      expect(ratio).toBeLessThan(1.03);
    }
  });

  it.each(examples_inverse)('and its inverse: $P_atm atm at $RH % holds up to $T_C °C', ({ P_atm, RH, T_C }) => {
    expect(voidTemperatureK(P_atm * 101325, RH) - 273.15).toBeCloseTo(T_C, 9);
  });

  it('refuses temperatures in °C, humidities above 100 % and pressures that are none', () => {
    expect(() => leastVoidPressurePa(180, 50)).toThrow(DomainError);
    expect(() => leastVoidPressurePa(453, 101)).toThrow(DomainError);
    expect(() => voidTemperatureK(0, 50)).toThrow(DomainError);
  });
});
