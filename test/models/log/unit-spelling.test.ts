import { describe, expect, it } from 'vitest';
import { unitFromSpelling } from '../../../models/log/unit-spelling.ts';

// Spellings seen on recorders: common practice.
describe('unitFromSpelling', () => {
  it.each([
    [
      '°C',
      [
        '°C',
        'ºC',
        '˚C',
        '℃',
        'C',
        'c',
        'degC',
        'deg C',
        'Deg. C',
        '[°C]',
        '(C)',
        'Celsius',
        '?C',
        'Â°C',
        '\ufffdC',
        ' °C ',
      ],
    ],
    ['°F', ['°F', 'degF', 'deg. F', 'F', '℉', 'Fahrenheit']],
    ['K', ['K', 'kelvin']],
    ['mV', ['mV', '[mV]', '(mV)', 'millivolts']],
    ['µV', ['µV', 'μV', 'uV', '(µV)']],
  ])('reads %s', (unit, spellings) => {
    for (const spelling of spellings) expect([spelling, unitFromSpelling(spelling)?.unit]).toEqual([spelling, unit]);
  });

  it.each([
    ['bar', null, ['bar', 'Bar', 'BAR', '[bar]', 'bar vac', 'bar (vac)']],
    ['bar', 'gauge', ['barg', 'bar(g)', 'bar (g)', 'bar g', 'barG', 'bar rel']],
    ['bar', 'absolute', ['bara', 'bar(a)', 'bar abs', 'bar(abs)', 'bar absolute']],
    ['psi', null, ['psi', 'PSI', 'lbf/in²', 'lb/in2']],
    ['psi', 'gauge', ['psig', 'PSI(g)']],
    ['psi', 'absolute', ['psia']],
    ['mbar', 'absolute', ['mbara', 'mbar abs', 'mbar(a)']],
    ['inHg', null, ['inHg', 'in Hg', 'in. Hg', '"Hg', 'inHg vac']],
    ['mmHg', null, ['mmHg', 'mm Hg']],
    ['kPa', null, ['kPa', 'KPA']],
    ['Pa', 'absolute', ['Pa abs', 'Pa(a)']],
    ['torr', null, ['Torr']],
  ])('reads %s, %s', (unit, reference, spellings) => {
    for (const spelling of spellings) {
      expect([spelling, unitFromSpelling(spelling)]).toEqual([spelling, { unit, reference, quantity: 'pressure' }]);
    }
  });

  it.each(['', 'rpm', '%', 'V', 'constructor', 'toString', '-', 'g', 'a'])('knows no unit "%s"', (spelling) => {
    expect(unitFromSpelling(spelling)).toBeNull();
  });
});
