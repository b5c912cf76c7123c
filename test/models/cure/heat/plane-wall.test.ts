import { describe, expect, it } from 'vitest';
import { heatThrough } from '../../../../models/cure/heat/heat-through.ts';
import type { Face } from '../../../../models/cure/heat/layer.ts';
import { readReference, recalledResin } from '../../../reference/cure/reference-sets.ts';

// Source: test/reference/cure/plane-wall.json (exact series, mpmath at 40 digits).
interface Walls {
  roots: { rows: { Bi: number; zeta: number[]; C: number[] }[] };
  theta: { Bi: number; Fo: number; theta_center: number; theta_mid: number; theta_surface: number }[];
  step_surface: { Fo: number; theta_center: number }[];
  surface_ramp_lag: { rows: { r_K_s: number; L: number; a: number; steady_centre_lag_K: number }[] };
  lumped_ramp_lag: { example: { C_J_m2K: number; h: number; r_K_s: number; tau_s: number; steady_lag_K: number } };
}
const walls = readReference<Walls>('plane-wall.json');

/** Half of a wall 20 mm thick, its middle insulated by symmetry: a = k/(ρ c) = 1e-6 m²/s, so that Fo is t/100 s. */
const HALF_M = 0.01;
const half = {
  thicknessM: HALF_M,
  densityKgM3: 1000,
  specificHeatJKgK: 1000,
  conductivityWMK: 1,
  reactionHeatJM3: 0,
  intervals: 80,
};
const inert = recalledResin('dusi_976');
const [STARTS_K, GAS_K] = [300, 400];

/** (T − T_gas)/(T_0 − T_gas) at the given Fourier numbers: in the middle, half way out and at the face. */
function theta(face: Face, fourier: readonly number[], startK = STARTS_K): [number, number, number][] {
  const atS = Float64Array.from(fourier, (Fo) => 100 * Fo);
  const timeS = Float64Array.of(0, atS.at(-1)! + 1);
  const { profiles } = heatThrough([half], [face, { meets: 'insulation' }], timeS, startK, inert, {
    atS,
    toleranceK: 2e-4,
  });
  const of = (kelvin: number) => (kelvin - GAS_K) / (startK - GAS_K);
  return profiles.map(({ temperatureK: t }) => [of(t[80]!), of(t[40]!), of(t[0]!)]);
}

describe('heatThrough, a plane wall', () => {
  it.each([...new Set(walls.theta.map(({ Bi }) => Bi))])('in a gas, Biot number %d: the series within 2e-4', (Bi) => {
    const rows = walls.theta.filter((row) => row.Bi === Bi);
    const gas: Face = { meets: 'gas', coefficientWM2K: Bi / HALF_M, gasK: Float64Array.of(GAS_K, GAS_K) };
    const found = theta(
      gas,
      rows.map(({ Fo }) => Fo),
    );
    for (const [i, { theta_center, theta_mid, theta_surface }] of rows.entries()) {
      expect(Math.abs(found[i]![0] - theta_center)).toBeLessThan(2e-4);
      expect(Math.abs(found[i]![1] - theta_mid)).toBeLessThan(2e-4);
      expect(Math.abs(found[i]![2] - theta_surface)).toBeLessThan(2e-4);
    }
  });

  it.each(walls.roots.rows.filter(({ Bi }) => Bi <= 10))('decays late by its first root, Biot number $Bi', (row) => {
    const { Bi, zeta, C } = row;
    const late = [1.2, 1.5];
    const gas: Face = { meets: 'gas', coefficientWM2K: Bi / HALF_M, gasK: Float64Array.of(GAS_K, GAS_K) };
    const found = theta(gas, late);
    for (const [i, Fo] of late.entries()) {
      // Of the series only its first term is left: the second is below 3e-7.
      expect(Math.abs(found[i]![0] - C[0]! * Math.exp(-(zeta[0]! ** 2) * Fo))).toBeLessThan(2e-4);
    }
  });

  it('whose face steps to a temperature: the series within 3e-4', () => {
    const face: Face = { meets: 'thermocouple', temperatureK: Float64Array.of(GAS_K, GAS_K) };
    const found = theta(
      face,
      walls.step_surface.map(({ Fo }) => Fo),
    );
    for (const [i, { theta_center }] of walls.step_surface.entries()) {
      expect(Math.abs(found[i]![0] - theta_center)).toBeLessThan(3e-4);
    }
  });

  it.each(walls.surface_ramp_lag.rows)('lags by $steady_centre_lag_K K in its middle behind a steady ramp', (row) => {
    const { r_K_s, L, a, steady_centre_lag_K } = row;
    const endS = (6 * L * L) / a;
    const face: Face = { meets: 'thermocouple', temperatureK: Float64Array.of(300, 300 + r_K_s * endS) };
    const layer = { ...half, thicknessM: L, conductivityWMK: a * 1e6 };
    const { end } = heatThrough([layer], [face, { meets: 'insulation' }], Float64Array.of(0, endS), 300, inert, {
      toleranceK: 1e-4,
    });
    expect(Math.abs(end.temperatureK[0]! - end.temperatureK[80]! - steady_centre_lag_K)).toBeLessThan(1e-3);
  });

  it('lags behind the gas as one lump where it conducts well', () => {
    const { C_J_m2K, h, r_K_s, tau_s, steady_lag_K } = walls.lumped_ramp_lag.example;
    const endS = 3 * tau_s;
    const gas: Face = { meets: 'gas', coefficientWM2K: h, gasK: Float64Array.of(300, 300 + r_K_s * endS) };
    const lump = { ...half, thicknessM: 0.01, densityKgM3: C_J_m2K / 10, conductivityWMK: 1e4, intervals: 4 };
    const { end } = heatThrough([lump], [gas, { meets: 'insulation' }], Float64Array.of(0, endS), 300, inert, {
      toleranceK: 1e-3,
    });
    const lagK = 300 + r_K_s * endS - end.temperatureK[2]!;
    expect(Math.abs(lagK - steady_lag_K * (1 - Math.exp(-3)))).toBeLessThan(0.01);
  });
});
