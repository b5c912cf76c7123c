import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { THERMOCOUPLE_TYPES, type ThermocoupleType } from '../../../../models/log/layout.ts';
import { emfMillivolt, temperatureFromEmf } from '../../../../models/log/thermocouple/emf.ts';
import { INVERSE_FUNCTIONS } from '../../../../models/log/thermocouple/inverse-functions.ts';
import { REFERENCE_FUNCTIONS } from '../../../../models/log/thermocouple/reference-functions.ts';

interface Printed {
  fromC: number;
  microvolt: number[];
  inverseErrorsC: [number, number, number, number][];
}
// Source: test/reference/thermocouples/its90.json (NIST ITS-90 Thermocouple Database, as printed).
const { tables } = JSON.parse(
  readFileSync(new URL('../../../reference/thermocouples/its90.json', import.meta.url), 'utf8'),
) as { tables: Record<ThermocoupleType, Printed> };

describe('emfMillivolt', () => {
  it('has tables of 1643, 1411, 671, 1571 and 1271 figures to be held against', () => {
    expect(THERMOCOUPLE_TYPES.map((type) => tables[type].microvolt.length)).toEqual([1643, 1411, 671, 1571, 1271]);
  });

  it.each(THERMOCOUPLE_TYPES)('type %s: every printed figure after rounding to 1 µV', (type) => {
    const { fromC, microvolt } = tables[type];
    const ours = microvolt.map((_, i) => Math.round(1000 * emfMillivolt(type, fromC + i)) + 0);
    expect(ours).toEqual(microvolt);
    expect(emfMillivolt(type, fromC - 0.001)).toBeNaN();
    expect(emfMillivolt(type, fromC + microvolt.length - 0.999)).toBeNaN();
  });
});

describe('temperatureFromEmf', () => {
  it.each(THERMOCOUPLE_TYPES)('type %s: inverts the reference function to 1e-6 °C over its whole range', (type) => {
    const [coldestC, hottestC] = REFERENCE_FUNCTIONS[type].rangeC;
    fc.assert(
      fc.property(fc.double({ min: coldestC + 1e-6, max: hottestC - 1e-6, noNaN: true }), (temperatureC) => {
        const back = temperatureFromEmf(type, emfMillivolt(type, temperatureC));
        // At the joins of its pieces type K jumps by 2e-9 mV and type J by 7e-8 mV, which is 1.2e-6 °C there.
        const isJoin = Math.abs(temperatureC - 760) < 1e-5 || Math.abs(temperatureC) < 1e-6;
        expect(Math.abs(back - temperatureC)).toBeLessThan(isJoin ? 2e-6 : 1e-6);
      }),
      { seed: 20260302, numRuns: 2000 },
    );
    for (const endC of [coldestC, -200, 0, hottestC]) {
      expect(temperatureFromEmf(type, emfMillivolt(type, endC))).toBeCloseTo(endC, 6);
    }
  });

  it.each(THERMOCOUPLE_TYPES)('type %s: reads no emf outside its range', (type) => {
    const [coldestC, hottestC] = REFERENCE_FUNCTIONS[type].rangeC;
    for (const emf of [emfMillivolt(type, coldestC) - 1e-6, emfMillivolt(type, hottestC) + 1e-6, 1e9, Number.NaN]) {
      expect(temperatureFromEmf(type, emf)).toBeNaN();
    }
  });

  it.each(THERMOCOUPLE_TYPES)('type %s: the approximate inverse errs by no more than is printed with it', (type) => {
    const pieces = INVERSE_FUNCTIONS[type];
    expect(pieces).toHaveLength(tables[type].inverseErrorsC.length);
    for (const [n, [fromC, untilC, least, greatest]] of tables[type].inverseErrorsC.entries()) {
      for (let temperatureC = fromC; temperatureC <= untilC; temperatureC += 0.5) {
        const emf = emfMillivolt(type, temperatureC);
        const error = pieces[n]!.coefficients.reduceRight((sum, d) => sum * emf + d, 0) - temperatureC;
        // Printed to one figure; half of its last place is rounding.
        expect(error).toBeGreaterThan(least - 0.005);
        expect(error).toBeLessThan(greatest + 0.005);
      }
    }
  });
});
