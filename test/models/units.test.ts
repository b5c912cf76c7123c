import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  celsiusDifferenceFrom,
  celsiusFrom,
  celsiusFromKelvin,
  kelvinFromCelsius,
  parsePressureUnit,
  pascalFrom,
  round9,
  temperatureDifferenceFromCelsius,
  temperatureFromCelsius,
} from '../../models/units.ts';

const seed = 20260302;
const pa = (figure: number, unit: string) => pascalFrom(figure, parsePressureUnit(unit));

describe('pascalFrom', () => {
  // NIST SP 811 (2008), app. B.8: factors with the digits printed there; inHg and mmHg are the "conventional"
  // (0 °C) rows. From memory of the table; psi is also checked against its definition below.
  it.each([
    ['bar', 1e5, 0],
    ['mbar', 100, 0],
    ['kPa', 1000, 0],
    ['MPa', 1e6, 0],
    ['psi', 6894.757, 5e-4],
    ['inHg', 3386.389, 0],
    ['mmHg', 133.3224, 0],
    ['torr', 133.3224, 5e-5],
  ])('one %s is %d Pa', (unit, expected, within) => {
    expect(Math.abs(pa(1, unit) - expected)).toBeLessThanOrEqual(within);
  });

  // Definitions: international pound 0.45359237 kg, inch 0.0254 m (1959 agreement); standard gravity 9.80665 m/s².
  it('takes the psi from pound, inch and standard gravity', () => {
    expect(Math.abs(pa(1000, 'psi') - (1000 * 0.45359237 * 9.80665) / 0.0254 ** 2)).toBeLessThan(1e-6);
  });

  // Density of mercury at 0 °C 13 595.1 kg/m³ and 9.80665 m/s²: the conventional millimetre (NIST SP 811, B.8 footnote).
  it('takes mercury at 0 °C', () => {
    expect(pa(1, 'mmHg')).toBeCloseTo(13595.1 * 9.80665 * 1e-3, 3);
    expect(pa(1, 'inHg')).toBeCloseTo(13595.1 * 9.80665 * 0.0254, 2);
  });

  // 760 torr = 101 325 Pa by definition (CIPM standard atmosphere).
  it('makes 760 torr one standard atmosphere', () => {
    expect(pa(760, 'torr abs')).toBe(101325);
  });

  // 22 inHg below ambient is 74.5 kPa, so about 268 mbar absolute at 1013.25 mbar (worked by hand).
  it('turns 22 inHg into 74.5 kPa', () => {
    expect(pa(22, 'inHg') / 1000).toBeCloseTo(74.5, 2);
    expect((101325 - pa(22, 'inHg')) / 100).toBeCloseTo(268, 0);
  });

  it('makes equal figures of decimal units equal, bit for bit', () => {
    fc.assert(
      fc.property(fc.integer({ min: -100_000, max: 10_000_000 }), (tenthsOfMbar) => {
        const expected = tenthsOfMbar * 10;
        expect(pa(tenthsOfMbar / 10, 'mbar')).toBe(expected);
        expect(pa(tenthsOfMbar / 100, 'kPa')).toBe(expected);
        expect(pa(tenthsOfMbar / 10_000, 'bar')).toBe(expected);
        expect(pa(tenthsOfMbar / 100_000, 'MPa')).toBe(expected);
      }),
      { seed },
    );
  });

  it('keeps the order of figures a hundredth apart', () => {
    fc.assert(
      fc.property(
        fc.constantFrom('psi', 'inHg', 'mmHg', 'torr', 'bar'),
        fc.integer({ min: 0, max: 100_000 }),
        (unit, n) => {
          expect(pa(n / 100, unit)).toBeLessThan(pa((n + 1) / 100, unit));
        },
      ),
      { seed },
    );
  });
});

describe('parsePressureUnit', () => {
  it('tells gauge from absolute and keeps the size', () => {
    expect(parsePressureUnit('bar')).toEqual({ paPerUnit: 1e5, absolute: false });
    expect(parsePressureUnit('bar abs')).toEqual({ paPerUnit: 1e5, absolute: true });
  });

  it.each(['Bar', 'psig', 'barabs', 'abs', ' abs', 'bar  abs', '', 'constructor', '°C'])(
    'refuses "%s" by name',
    (unit) => {
      expect(() => parsePressureUnit(unit)).toThrow(expect.objectContaining({ code: 'unit-unknown', facts: { unit } }));
    },
  );
});

describe('temperatures', () => {
  // t/°C = (t/°F − 32)/1.8: NIST SP 811 (2008), app. B.8. −40 is the fixed point of the two scales; ice and steam points.
  it.each([
    [-40, -40],
    [32, 0],
    [212, 100],
    [350, 176.666666667],
    [360, 182.222222222],
  ])('%d °F is %d °C', (fahrenheit, celsius) => {
    expect(celsiusFrom(fahrenheit, '°F')).toBe(celsius);
    expect(temperatureFromCelsius(celsius, '°F')).toBeCloseTo(fahrenheit, 8);
  });

  // NIST SP 811 (2008), app. B.8: a temperature interval of 1 °F is 0.555 555 6 °C; no 32 comes in.
  it('converts a difference without the offset: 10 °F is 5.56 °C', () => {
    expect(celsiusDifferenceFrom(10, '°F')).toBeCloseTo(5.5555556, 7);
    expect(celsiusDifferenceFrom(1, '°F')).toBeCloseTo(0.5555556, 7);
    expect(temperatureDifferenceFromCelsius(5, '°F')).toBe(9);
    expect(celsiusDifferenceFrom(10, '°C')).toBe(10);
  });

  // ASTM E29, absolute method (from memory of its §5): the observed figure is compared as read, unrounded, so any
  // distance outside the limit, however small, is outside, and a figure equal to the limit conforms.
  it('meets 360 °F − 10 °F with a reading of exactly 350 °F and not a hundredth less', () => {
    const lowerC = celsiusFrom(360 - 10, '°F');
    expect(celsiusFrom(350, '°F') >= lowerC).toBe(true);
    expect(celsiusFrom(349.99, '°F') >= lowerC).toBe(false);
    expect(celsiusFrom(349.999999, '°F') >= lowerC).toBe(false);
    expect(celsiusFrom(350.0, '°F') <= lowerC).toBe(true);
  });

  it('compares in °C exactly as the figures compare in °F', () => {
    const hundredths = fc.integer({ min: -10_000, max: 250_000 });
    fc.assert(
      fc.property(hundredths, hundredths, (a, b) => {
        expect(Math.sign(celsiusFrom(a / 100, '°F') - celsiusFrom(b / 100, '°F'))).toBe(Math.sign(a - b));
      }),
      { seed, examples: [[35_000, 35_000]] },
    );
  });

  it('comes back from °C to the figure written', () => {
    fc.assert(
      fc.property(fc.integer({ min: -40_000, max: 250_000 }), (hundredths) => {
        const written = hundredths / 100;
        expect(Math.abs(temperatureFromCelsius(celsiusFrom(written, '°F'), '°F') - written)).toBeLessThan(1e-8);
      }),
      { seed },
    );
  });

  // 0 °C = 273.15 K by definition of the Celsius scale (SI Brochure, 9th ed., §2.3.1).
  it('sets 0 °C at 273.15 K', () => {
    expect(kelvinFromCelsius(0)).toBe(273.15);
    expect(celsiusFromKelvin(273.15)).toBe(0);
  });
});

describe('round9', () => {
  it('takes the dust of binary arithmetic off decimal sums', () => {
    expect(0.1 + 0.2).not.toBe(0.3);
    expect(round9(0.1 + 0.2)).toBe(0.3);
    expect(round9(110 - 1.1)).toBe(108.9);
  });
});
