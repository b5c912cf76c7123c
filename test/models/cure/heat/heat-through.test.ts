import { describe, expect, it } from 'vitest';
import { heatThrough } from '../../../../models/cure/heat/heat-through.ts';
import type { Face, Layer } from '../../../../models/cure/heat/layer.ts';
import type { Resin } from '../../../../models/cure/resin.ts';
import { DomainError } from '../../../../models/errors.ts';
import { readReference, recalledResin } from '../../../reference/cure/reference-sets.ts';

// Source: test/reference/cure/thermal.json (SciPy Radau on 401 nodes, extrapolated; series for the checks).
type Row = Record<string, number>;
interface Reference {
  air_vertices_s_C: [number, number][];
  cases: Record<
    '5mm' | '25mm',
    {
      L: number;
      rows_401_nodes: Row[];
      richardson: Row[];
      peak_anywhere: { t_s: number; T_C: number; x_from_tool_m: number };
    }
  >;
  checks: Record<string, { rows: Row[]; face_vertices_s_C?: [number, number][] }>;
}
const reference = readReference<Reference>('thermal.json');

const resin = recalledResin('hubert_8552');
const airS = Float64Array.from(reference.air_vertices_s_C, ([s]) => s);
const airK = Float64Array.from(reference.air_vertices_s_C, ([, c]) => c + 273.15);
const inert = { densityKgM3: 1580, specificHeatJKgK: 1080, conductivityWMK: 0.65, reactionHeatJM3: 0 };
const reacting = { ...inert, reactionHeatJM3: 1300 * (1 - 0.573) * 540000 };
const tool = { densityKgM3: 8150, specificHeatJKgK: 515, conductivityWMK: 11, reactionHeatJM3: 0, thicknessM: 0.01 };

function laminateOnTool(name: '5mm' | '25mm', intervals: number, toleranceK: number) {
  const layers: Layer[] = [
    { ...reacting, thicknessM: reference.cases[name].L, intervals },
    { ...tool, intervals: intervals / 4 },
  ];
  const faces: [Face, Face] = [
    { meets: 'gas', coefficientWM2K: 80, gasK: airK },
    { meets: 'gas', coefficientWM2K: 50, gasK: airK },
  ];
  const atS = Float64Array.from(reference.cases[name].rows_401_nodes, ({ t_s }) => t_s!);
  return heatThrough(layers, faces, airS, 293.15, resin, { atS, toleranceK });
}

/** Greatest differences from the extrapolated reference over all its moments and places. */
function apart(name: '5mm' | '25mm', intervals: number, toleranceK: number) {
  const { profiles } = laminateOnTool(name, intervals, toleranceK);
  const rows = reference.cases[name].richardson;
  expect(profiles).toHaveLength(rows.length);
  const places = [
    ['bag', 0],
    ['mid', intervals / 2],
    ['interface', intervals],
    ['tool_bottom', intervals + intervals / 4],
  ] as const;
  let temperatureK = 0;
  let alpha = 0;
  for (const [i, row] of rows.entries()) {
    const profile = profiles[i]!;
    for (const [place, node] of places) {
      temperatureK = Math.max(temperatureK, Math.abs(profile.temperatureK[node]! - 273.15 - row[`T_${place}`]!));
    }
    alpha = Math.max(
      alpha,
      Math.abs(profile.alpha[0]! - row.a_bag!),
      Math.abs(profile.alpha[intervals / 2]! - row.a_mid!),
      Math.abs(profile.alpha[intervals]! - row.a_tool!),
    );
  }
  return { temperatureK, alpha };
}

describe('heatThrough, laminate on a tool', () => {
  it.each(['5mm', '25mm'] as const)('%s: within 0.05 K and 1e-3 in degree at 80 intervals', (name) => {
    const { temperatureK, alpha } = apart(name, 80, 0.02);
    expect(temperatureK).toBeLessThan(0.05);
    expect(alpha).toBeLessThan(1e-3);
  });

  it.each(['5mm', '25mm'] as const)('%s: the hottest point, where and when', (name) => {
    const { hottest } = laminateOnTool(name, 80, 0.005);
    const { T_C, t_s, x_from_tool_m } = reference.cases[name].peak_anywhere;
    expect(Math.abs(hottest.temperatureK - 273.15 - T_C)).toBeLessThan(0.05);
    expect(Math.abs(hottest.timeS - t_s)).toBeLessThan(5);
    expect(Math.abs(reference.cases[name].L - hottest.positionM - x_from_tool_m)).toBeLessThan(2e-4);
  });

  it('converges with order two in the width of its intervals', () => {
    const errors = [8, 16, 32].map((intervals) => apart('25mm', intervals, 0.0002).temperatureK);
    expect(Math.log2(errors[0]! / errors[1]!)).toBeGreaterThan(1.8);
    expect(Math.log2(errors[1]! / errors[2]!)).toBeGreaterThan(1.8);
  });

  it('converges with order two in its steps', () => {
    // An error estimate of order two: a tolerance sixteen times smaller makes steps four times shorter.
    const finest = laminateOnTool('25mm', 20, 1e-5).hottest.temperatureK;
    const errors = [0.08, 0.005].map((toleranceK) =>
      Math.abs(laminateOnTool('25mm', 20, toleranceK).hottest.temperatureK - finest),
    );
    expect(Math.log2(errors[0]! / errors[1]!) / 2).toBeGreaterThan(1.7);
  });

  it('says which place is least and which most cured', () => {
    const { leastCured, mostCured, end, endTgK } = laminateOnTool('25mm', 40, 0.02);
    const cured = [...end.alpha].filter((degree) => !Number.isNaN(degree));
    expect(leastCured.alpha).toBe(Math.min(...cured));
    expect(mostCured.alpha).toBe(Math.max(...cured));
    expect(mostCured.positionM).toBeGreaterThan(0.005);
    expect(end.alpha.at(-1)).toBeNaN();
    expect(endTgK!.at(-1)).toBeNaN();
  });
});

describe('heatThrough against exact solutions', () => {
  it('heats a slab between two gases as the series has it', () => {
    const { rows } = reference.checks.nonreacting_slab_convective!;
    const gasK = Float64Array.of(453.15, 453.15);
    const gas: Face = { meets: 'gas', coefficientWM2K: 52, gasK };
    const atS = Float64Array.from(rows, ({ t_s }) => t_s!);
    const history = Float64Array.of(0, atS.at(-1)! + 1);
    const layers = [{ ...inert, thicknessM: 0.025, intervals: 160 }];
    const { profiles } = heatThrough(layers, [gas, gas], history, 293.15, resin, { atS, toleranceK: 0.005 });
    for (const [i, row] of rows.entries()) {
      expect(Math.abs(profiles[i]!.temperatureK[80]! - 273.15 - row.T_centre_series!)).toBeLessThan(0.02);
      expect(Math.abs(profiles[i]!.temperatureK[0]! - 273.15 - row.T_surface_series!)).toBeLessThan(0.02);
    }
  });

  it('lags behind its faces as the series has it', () => {
    const { rows } = reference.checks.surface_ramp_slab!;
    const endS = rows.at(-1)!.t_s!;
    const face: Face = { meets: 'thermocouple', temperatureK: Float64Array.of(293.15, 293.15 + endS / 30) };
    const atS = Float64Array.from(rows, ({ t_s }) => t_s!);
    const layers = [{ ...inert, thicknessM: 0.025, intervals: 80 }];
    const { profiles } = heatThrough(layers, [face, face], Float64Array.of(0, endS), 293.15, resin, {
      atS,
      toleranceK: 0.001,
    });
    for (const [i, row] of rows.entries()) {
      const lagK = profiles[i]!.temperatureK[0]! - profiles[i]!.temperatureK[40]!;
      expect(Math.abs(lagK - row.centre_lag_series_K!)).toBeLessThan(5e-3);
    }
  });

  it('heats itself by Q/(ρ c) Δα where nothing leaves', () => {
    const { rows } = reference.checks.adiabatic_8552_type!;
    for (const row of rows) {
      const startK = row.T0_C! + 273.15;
      const layers = [{ ...reacting, reactionHeatJM3: 299754000, thicknessM: 0.01, intervals: 4 }];
      const { end } = heatThrough(
        layers,
        [{ meets: 'insulation' }, { meets: 'insulation' }],
        Float64Array.of(0, row.t_s!),
        startK,
        resin,
        { toleranceK: 2e-5 },
      );
      expect(Math.abs(end.temperatureK[2]! - 273.15 - row.T_C!)).toBeLessThan(0.01);
      // Energy is kept to rounding, whatever the step: 175.66 K from α = 0.01 to 1.
      const riseK = ((end.alpha[2]! - 0.01) * 299754000) / (1580 * 1080);
      expect(Math.abs(end.temperatureK[2]! - startK - riseK)).toBeLessThan(1e-6);
    }
  });

  it('follows a thick polyester slab between driven faces', () => {
    const { rows, face_vertices_s_C } = reference.checks.thick_glass_polyester_fixed_faces!;
    const timeS = Float64Array.from(face_vertices_s_C!, ([s]) => s);
    const temperatureK = Float64Array.from(face_vertices_s_C!, ([, c]) => c + 273.15);
    const face: Face = { meets: 'thermocouple', temperatureK };
    const layer = {
      densityKgM3: 1890,
      specificHeatJKgK: 1260,
      conductivityWMK: 0.2163,
      reactionHeatJM3: 1890 * 77500,
      thicknessM: 0.0254,
      intervals: 80,
    };
    const atS = Float64Array.from(rows, ({ t_s }) => t_s!);
    const { profiles } = heatThrough([layer], [face, face], timeS, 293.15, recalledResin('bogetti_polyester'), {
      atS,
      toleranceK: 0.005,
    });
    for (const [i, row] of rows.entries()) {
      expect(Math.abs(profiles[i]!.temperatureK[40]! - 273.15 - row.T_mid!)).toBeLessThan(0.05);
      expect(Math.abs(profiles[i]!.alpha[40]! - row.a_mid!)).toBeLessThan(1e-3);
      expect(Math.abs(profiles[i]!.alpha[0]! - row.a_face!)).toBeLessThan(1e-3);
    }
  });
});

describe('heatThrough on a recorder’s history', () => {
  const timeS = Float64Array.from({ length: 18001 }, (_, i) => i);
  const straight = (s: number) => {
    const next = Math.max(
      1,
      airS.findIndex((at) => at >= s),
    );
    return (
      airK[next - 1]! + ((airK[next]! - airK[next - 1]!) * (s - airS[next - 1]!)) / (airS[next]! - airS[next - 1]!)
    );
  };
  const noisyK = timeS.map((s) => straight(s) + 0.5 * Math.sin(12.9898 * s) * Math.cos(4.1414 * s));
  const layers: Layer[] = [
    { ...reacting, thicknessM: 0.025, intervals: 40 },
    { ...tool, intervals: 10 },
  ];
  const between = (historyS: Float64Array, gasK: Float64Array) =>
    heatThrough(
      layers,
      [
        { meets: 'gas', coefficientWM2K: 80, gasK },
        { meets: 'gas', coefficientWM2K: 50, gasK },
      ],
      historyS,
      293.15,
      resin,
    );

  it('is not led astray by noise at 1 Hz', () => {
    const [noisy, smooth] = [between(timeS, noisyK), between(airS, airK)];
    expect(Math.abs(noisy.hottest.temperatureK - smooth.hottest.temperatureK)).toBeLessThan(0.05);
    expect(Math.abs(noisy.leastCured.alpha - smooth.leastCured.alpha)).toBeLessThan(3e-4);
  });

  it('refuses stacks, faces and histories that are none', () => {
    const gas: Face = { meets: 'gas', coefficientWM2K: 80, gasK: airK };
    const refused = (
      stack: Layer[],
      face: Face,
      historyS: Float64Array = airS,
      startK = 293.15,
      options: Parameters<typeof heatThrough>[5] = {},
    ) => expect(() => heatThrough(stack, [face, face], historyS, startK, resin, options)).toThrow(DomainError);
    refused([], gas);
    refused([{ ...layers[0]!, conductivityWMK: 0 }], gas);
    refused([{ ...layers[0]!, intervals: 1 }], gas);
    refused([{ ...layers[0]!, reactionHeatJM3: -1 }], gas);
    refused(layers, { meets: 'gas', coefficientWM2K: 0, gasK: airK });
    refused(layers, { meets: 'gas', coefficientWM2K: 80, gasK: airK.map((k) => k - 273.15) });
    refused(layers, { meets: 'thermocouple', temperatureK: airK.slice(1) });
    refused(layers, gas, airS.slice().reverse());
    refused(layers, gas, airS, 20);
    refused(layers, gas, airS, 293.15, { startDegree: 0 });
    refused(layers, gas, airS, 293.15, { toleranceK: 0 });
  });

  it('refuses a law that stalls', () => {
    const frozen: Resin = recalledResin('lls_3501_6');
    const coldK = Float64Array.of(255, 255);
    expect(() =>
      heatThrough(
        layers,
        [{ meets: 'gas', coefficientWM2K: 80, gasK: coldK }, { meets: 'insulation' }],
        Float64Array.of(0, 3600),
        255,
        frozen,
        { startDegree: 0.29 },
      ),
    ).toThrow(DomainError);
  });
});
