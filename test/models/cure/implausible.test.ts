import { describe, expect, it } from 'vitest';
import { parseResin } from '../../../models/cure/parse-resin.ts';
import type { Resin } from '../../../models/cure/resin.ts';
import { DomainError } from '../../../models/errors.ts';
import { recalledResin, referenceSets } from '../../reference/cure/reference-sets.ts';

// Source of the sets: test/reference/cure/kinetics.json. What is done to them are the slips that published tables invite:
// rate constants per minute, energies in kJ, cal or K, logarithms, temperatures in K or °F (common experience).

const sets = Object.keys(referenceSets);
const RANGES: readonly (readonly [number, number] | undefined)[] = [undefined, [60, 200]];

type Change = (resin: Resin) => object;
const constants =
  (names: RegExp, change: (value: number) => number): Change =>
  (resin) => {
    const changed = Object.entries(resin.kinetics).map(([name, value]) => [
      name,
      names.test(name) && typeof value === 'number' ? change(value) : value,
    ]);
    return { ...resin, kinetics: Object.fromEntries(changed) };
  };

/** What the author is told; null where the set is taken. */
function toldOf(set: string, validC: readonly [number, number] | undefined, change: Change): string | null {
  const resin = validC === undefined ? recalledResin(set) : { ...recalledResin(set), validC };
  try {
    parseResin(JSON.parse(JSON.stringify(change(resin))));
    return null;
  } catch (error) {
    if (error instanceof DomainError) return error.message;
    throw error;
  }
}

describe.each(RANGES)('a published set, validC %j', (...range) => {
  const validC = range.length === 2 ? (range as unknown as readonly [number, number]) : undefined;
  const taken = (change: Change) => sets.filter((set) => toldOf(set, validC, change) === null);

  it('is taken as it stands: also a negative A2, 6e20 1/s with 167 kJ/mol, and a frontal resin', () => {
    expect(taken((resin) => resin)).toEqual(sets);
  });

  it('is asked about with rate constants per minute, in every set for autoclave and oven', () => {
    const slow = ['lls_3501_6', 'hubert_8552', 'johnston_8552', 'dusi_976', 'kratz_5320', 'kratz_mtm45_1'];
    for (const set of [...slow, 'bogetti_polyester']) {
      expect(
        toldOf(
          set,
          validC,
          constants(/^A\d?$/, (A) => 60 * A),
        ),
      ).toMatch(/^kinetics .*1\/min\? Then divide them by 60/);
    }
  });

  it.each([
    ['energies in kJ/mol', constants(/^E\d?$/, (E) => E / 1000), /^kinetics\.E.* J\/mol/],
    ['energies in kcal/mol', constants(/^E\d?$/, (E) => E / 4184), /^kinetics\.E.* J\/mol/],
    ['energies in mJ/mol', constants(/^E\d?$/, (E) => E * 1000), /^kinetics\.E.* J\/mol/],
    ['energies of the wrong sign', constants(/^E\d?$/, (E) => -E), /^kinetics\.E/],
    ['energies in cal/mol', constants(/^E\d?$/, (E) => E / 4.184), /^kinetics .*cal\/mol|^kinetics\.E.* J\/mol/],
    ['energies divided by R', constants(/^E\d?$/, (E) => E / 8.314), /^kinetics .*divided by R|^kinetics\.E.* J\/mol/],
    ['energies converted twice', constants(/^E\d?$/, (E) => E * 4.184), /^kinetics .*multiplied twice|stalls/],
    ['rate constants of the wrong sign', constants(/^A\d?$/, (A) => -A), /^kinetics\.A/],
    ['a gas constant in cal', (resin: Resin) => ({ ...resin, gasConstant: 1.987 }), /^gasConstant .*J\/\(mol K\)/],
    ['a start of 100 %', (resin: Resin) => ({ ...resin, initialDegree: 1 }), /^initialDegree .*below 1/],
    ['a start below nothing', (resin: Resin) => ({ ...resin, initialDegree: -0.01 }), /^initialDegree .*at least 0/],
    [
      'a gel degree in %',
      ({ gel, ...resin }: Resin) => ({ ...resin, gel: { degree: 100 * gel!.degree } }),
      /^gel\.degree/,
    ],
    ['a range in K', (resin: Resin) => ({ ...resin, validC: [333, 473] }), /^validC .*K/],
    ['a range in °F', (resin: Resin) => ({ ...resin, validC: [140, 392] }), /^validC .*°F/],
    [
      'a Tg in K',
      ({ glassTransition: g, ...resin }: Resin) => ({
        ...resin,
        glassTransition: { ...g, tg0C: g!.tg0C + 273.15, tgInfC: g!.tgInfC + 273.15 },
      }),
      /^glassTransition\.tg(0|Inf)C/,
    ],
  ] as [string, Change, RegExp][])('is refused with %s, by place', (slip, change, told) => {
    // A Tg of −100 °C, that of the frontal resin before its cure, may be one of 173 °C.
    const asked = slip === 'a Tg in K' ? sets.filter((set) => set !== 'goli_dcpd') : sets;
    for (const set of asked) expect([set, toldOf(set, validC, change)]).toEqual([set, expect.stringMatching(told)]);
  });

  it('is refused with a diffusion line for °C, by place', () => {
    for (const set of ['hubert_8552', 'johnston_8552', 'kratz_5320', 'kratz_mtm45_1']) {
      const inCelsius: Change = ({ diffusion, ...resin }) =>
        diffusion === undefined
          ? constants(/^alphaC0$/, (alphaC0) => alphaC0 + 273.15 * 0.0045)(resin as Resin)
          : { ...resin, diffusion: { ...diffusion, alphaC0: diffusion.alphaC0 + 273.15 * diffusion.alphaCT } };
      expect(toldOf(set, validC, inCelsius)).toMatch(/^(diffusion|kinetics)\.alphaC0 .*Is it for °C\?/);
    }
  });

  it('is asked about with logarithms in place of rate constants, where the energy is that of a latent resin', () => {
    const told = toldOf('hubert_8552', validC, constants(/^A\d?$/, Math.log10));
    expect(told).toMatch(/^kinetics .*logarithm/);
  });
});

describe('source.confirmed', () => {
  it.each([
    constants(/^A\d?$/, (A) => 60 * A),
    constants(/^A\d?$/, Math.log10),
    (resin: Resin) => ({ ...resin, validC: [140, 392] }),
  ])('takes what was asked about', (change) => {
    const asked = change(recalledResin('hubert_8552')) as Resin;
    expect(() => parseResin(asked)).toThrow(/if the source prints it so, say so in source\.confirmed/);
    const source = { ...asked.source, confirmed: 'table 3 prints it so; measured again in 2024' };
    expect(parseResin({ ...asked, source }).kinetics).toEqual(asked.kinetics);
  });
});
