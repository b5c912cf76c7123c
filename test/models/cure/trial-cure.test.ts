import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import { parseResin } from '../../../models/cure/parse-resin.ts';
import { trialCure } from '../../../models/cure/trial-cure.ts';
import { DomainError } from '../../../models/errors.ts';
import { historyOf, readReference, recalledResin, referenceSets } from '../../reference/cure/reference-sets.ts';

describe('trialCure', () => {
  it.each(Object.keys(referenceSets))('ends where the reference ends, with its events: %s', (set) => {
    // Source: test/reference/cure/kinetics.json (SciPy), case two_dwell: degree to 1e-6, events to 1e-3 s.
    const reference = referenceSets[set]!.cases.two_dwell!;
    const cure = trialCure(...historyOf(set, 'two_dwell'), recalledResin(set));
    expect(cure.stopped).toBeNull();
    expect(Math.abs(cure.alpha.at(-1)! - reference.final_alpha)).toBeLessThan(1e-6);
    const { gel = null, vitrification = null, switch: switches = null } = reference.events_s;
    for (const [found, wanted] of [
      [cure.gelS, gel],
      [cure.switchesS, switches],
      [cure.vitrifiesS, vitrification],
    ] as const) {
      if (wanted === null) expect(found).toBeNull();
      else expect(Math.abs(found! - wanted)).toBeLessThan(1e-3);
    }
  });

  it('tells the least viscosity of the reference, to its 10 s grid', () => {
    // Source: test/reference/cure/viscosity.json (SciPy), 8552 after Hubert et al.
    const { minima } = readReference<{ minima: { set: string; t_min_s: number; mu_min_Pa_s: number }[] }>(
      'viscosity.json',
    );
    const minimum = minima.find(({ set }) => set === 'hubert_8552')!;
    const viscosity = { law: 'castro-macosko', A: 3.45e-10, E: 76536, gelDegree: 0.47, a: 3.8, b: 2.5 };
    const resin = parseResin({ ...recalledResin('hubert_8552'), viscosity });
    const { viscosity: found } = trialCure(...historyOf('hubert_8552', 'two_dwell'), resin);
    expect(found!.least.timeS).toBeCloseTo(minimum.t_min_s, 6);
    expect(found!.least.viscosityPaS / minimum.mu_min_Pa_s).toBeCloseTo(1, 5);
    expect(found!.flows).toBeNull();
    const flowing = parseResin({ ...resin, viscosity: { ...viscosity, flowsBelow: 20 } });
    const { flows } = trialCure(...historyOf('hubert_8552', 'two_dwell'), flowing).viscosity!;
    expect(flows!.fromS).toBeLessThan(minimum.t_min_s);
    expect(flows!.untilS).toBeGreaterThan(minimum.t_min_s);
  });

  it('tells the stretches outside the range of the fit, as long as the integrator counts', () => {
    const resin = parseResin({ ...recalledResin('hubert_8552'), validC: [60, 175] });
    const history = historyOf('hubert_8552', 'two_dwell');
    const { outside } = trialCure(...history, resin);
    // 20 to 60 °C at 2 °C/min; over 175 °C from 32.5 min into the second ramp, 120 min, and 5 °C of cooling at 3.
    expect(outside!.map(({ side, fromS, untilS }) => [side, Math.round(fromS), Math.round(untilS)])).toEqual([
      ['below', 0, 1200],
      ['above', 8250, 15700],
    ]);
    const total = outside!.reduce((sum, { fromS, untilS }) => sum + untilS - fromS, 0);
    expect(total).toBeCloseTo(cureAlong(...history, resin).outsideValidS, 6);
  });

  it('stops where the law stalls, and says why, and keeps what came before', () => {
    const resin = recalledResin('lls_3501_6');
    const timeS = Float64Array.of(0, 600, 1200, 7200);
    const temperatureK = Float64Array.of(293.15, 293.15, 278.15, 278.15);
    const cure = trialCure(timeS, temperatureK, resin, { startDegree: 0.2985 });
    expect(cure.stopped!.because).toContain('where it never passes degree 0.29');
    // Lee, Loos and Springer: k1 + k2 α = 0 at −k1/k2, by hand from the constants where it stopped.
    const { A1, E1, A2, E2 } = resin.kinetics as unknown as Record<string, number>;
    const rt = 8.314462618 * (293.15 - (15 * (cure.stopped!.timeS - 600)) / 600);
    const stall = -(A1! * Math.exp(-E1! / rt)) / (A2! * Math.exp(-E2! / rt));
    expect(cure.stopped!.timeS).toBeGreaterThan(600);
    expect(cure.stopped!.timeS).toBeLessThan(1200);
    expect(cure.alpha.at(-1)! / stall).toBeCloseTo(0.999, 3);
    expect(cure.timeS.at(-1)).toBeLessThanOrEqual(cure.stopped!.timeS);
    expect(cure.alpha.length).toBe(cure.timeS.length);
  });

  it('refuses a start degree as the model does', () => {
    const history = historyOf('dusi_976', 'two_dwell');
    for (const startDegree of [-0.1, 1, Number.NaN]) {
      expect(() => trialCure(...history, recalledResin('dusi_976'), { startDegree })).toThrow(DomainError);
    }
  });
});
