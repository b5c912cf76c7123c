import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import { parseResin } from '../../../models/cure/parse-resin.ts';
import { softening } from '../../../models/cure/softening.ts';
import { viscosityPaS } from '../../../models/cure/viscosity.ts';
import { historyOf, recalledResin } from '../../reference/cure/reference-sets.ts';

// The figures of the 8552-type set: see test/reference/cure/viscosity.json.
const castroMacosko = { law: 'castro-macosko', A: 3.45e-10, E: 76536, gelDegree: 0.47, a: 3.8, b: 2.5 } as const;
const minutesOf = (count: number) => Float64Array.from({ length: count }, (_, i) => 60 * i);
const heatedUp = (count: number, perMin: number, fromC: number) =>
  Float64Array.from({ length: count }, (_, i) => fromC + perMin * i + 273.15);

describe('softening', () => {
  it('is where the viscosity falls to what its set states, by the law put the other way round', () => {
    const resin = parseResin({ ...recalledResin('hubert_8552'), viscosity: { ...castroMacosko, flowsBelow: 100 } });
    const timeS = minutesOf(60);
    const temperatureK = heatedUp(60, 1, 20);
    // Nothing has reacted yet: μ = A exp(E/(R T)) at α = 0, so T = E / (R ln(100/A)).
    const softens = softening(timeS, temperatureK, new Float64Array(60), resin)!;
    const byHandK = 76536 / (8.314462618 * Math.log(100 / 3.45e-10));
    expect(softens).toMatchObject({ by: 'viscosity', isFromStart: false });
    expect(softens.timeS).toBeCloseTo(60 * (byHandK - 293.15), 0);
  });

  it('is where the temperature passes Tg where the set states none', () => {
    const resin = recalledResin('hubert_8552');
    const { tg0C } = resin.glassTransition!;
    const softens = softening(minutesOf(60), heatedUp(60, 1, -20), new Float64Array(60), resin)!;
    expect(softens).toMatchObject({ by: 'glass-transition', isFromStart: false });
    expect(softens.timeS).toBeCloseTo(60 * (tg0C + 20), 9);
    const warm = softening(minutesOf(60), heatedUp(60, 1, 20), new Float64Array(60), resin);
    expect(warm).toEqual({ timeS: 0, by: 'glass-transition', isFromStart: true });
  });

  it('comes before gel on the two-dwell cycle, and the viscosity is above its mark until then', () => {
    const resin = parseResin({ ...recalledResin('hubert_8552'), viscosity: { ...castroMacosko, flowsBelow: 50 } });
    const [timeS, temperatureK] = historyOf('hubert_8552', 'noisy_two_dwell_1Hz');
    const { alpha, gelS } = cureAlong(timeS, temperatureK, resin);
    const softens = softening(timeS, temperatureK, alpha, resin)!;
    expect(softens.timeS).toBeLessThan(gelS!);
    const first = Math.ceil(softens.timeS);
    const along = (i: number) => viscosityPaS(temperatureK[i]!, alpha[i]!, castroMacosko, 8.314462618);
    for (let i = 0; i < first; i += 1) expect(along(i)).toBeGreaterThan(50);
    expect(along(first)).toBeLessThanOrEqual(50);
  });

  it('never comes to what stays cold, and is not told without a sign of it', () => {
    const { glassTransition: _, ...bare } = recalledResin('hubert_8552');
    expect(softening(minutesOf(9), heatedUp(9, 0, -30), new Float64Array(9), recalledResin('hubert_8552'))).toBeNull();
    expect(softening(minutesOf(9), heatedUp(9, 1, 20), new Float64Array(9), bare)).toBeNull();
  });

  it('reads `flowsBelow` as a viscosity above 0', () => {
    const of = (flowsBelow: unknown) => () =>
      parseResin({ ...recalledResin('hubert_8552'), viscosity: { ...castroMacosko, flowsBelow } });
    expect(of(0)).toThrow(/viscosity\.flowsBelow/);
    expect(of('100 Pa s')).toThrow(/viscosity\.flowsBelow/);
  });
});
