import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { programmeCorners } from '../../../models/cycle/programme.ts';
import { parseProgrammeText, programmeText } from '../../../models/cycle/programme-text.ts';
import { figureFrom, readProgramme, type TypedProgramme, typedFrom } from '../../../models/cycle/read-programme.ts';
import { referenceSets } from '../../reference/cure/reference-sets.ts';

const TWO_DWELL: TypedProgramme = {
  unit: '°C',
  start: '20',
  steps: [
    { kind: 'ramp', rate: '2', to: '110' },
    { kind: 'hold', minutes: '60' },
    { kind: 'ramp', rate: '2', to: '180' },
    { kind: 'hold', minutes: '120' },
    { kind: 'ramp', rate: '3', to: '60' },
  ],
};

function cornersOf(typed: TypedProgramme) {
  const { programme, refusals } = readProgramme(typed);
  expect(refusals).toEqual([]);
  return programmeCorners(programme!);
}

describe('programmeCorners', () => {
  it('gives the two-dwell history of the reference cases', () => {
    // Source: test/reference/cure/kinetics.json, case two_dwell.
    const reference = referenceSets.hubert_8552!.cases.two_dwell!.history_s_C!;
    const { timeS, temperatureK } = cornersOf(TWO_DWELL);
    expect([...timeS]).toEqual(reference.map(([s]) => s));
    expect([...temperatureK]).toEqual(reference.map(([, c]) => c + 273.15));
  });

  it('gives the same history written in °F', () => {
    const inFahrenheit: TypedProgramme = {
      unit: '°F',
      start: '68',
      steps: [
        { kind: 'ramp', rate: '3.6', to: '230' },
        { kind: 'hold', minutes: '60' },
        { kind: 'ramp', rate: '3,6', to: '356' },
        { kind: 'hold', minutes: '120' },
        { kind: 'ramp', rate: '5.4', to: '140' },
      ],
    };
    const [celsius, fahrenheit] = [cornersOf(TWO_DWELL), cornersOf(inFahrenheit)];
    for (const [i, s] of celsius.timeS.entries()) expect(fahrenheit.timeS[i]).toBeCloseTo(s, 8);
    for (const [i, k] of celsius.temperatureK.entries()) expect(fahrenheit.temperatureK[i]).toBeCloseTo(k, 8);
  });
});

describe('readProgramme', () => {
  const refused = (start: string, steps: TypedProgramme['steps'], unit: TypedProgramme['unit'] = '°C') =>
    readProgramme({ unit, start, steps }).refusals;
  const hold = { kind: 'hold', minutes: '10' } as const;

  it('refuses field by field, in words', () => {
    expect(refused('-280', [hold])).toMatchObject([
      { step: null, field: 'start', because: expect.stringMatching(/absolute zero, −273.15 °C/) },
    ]);
    expect(refused('-460', [hold], '°F')).toMatchObject([
      { field: 'start', because: expect.stringMatching(/absolute zero, −459.67 °F/) },
    ]);
    // Room temperature in K, and a dwell in K.
    expect(refused('293', [hold])).toMatchObject([{ field: 'start', because: expect.stringMatching(/in K or °F\?/) }]);
    expect(refused('20', [{ kind: 'ramp', rate: '2', to: '453' }])).toMatchObject([
      { step: 0, field: 'to', because: expect.stringMatching(/−100 °C to 450 °C. Is it in K or °F\?/) },
    ]);
    for (const rate of ['0', '-2']) {
      expect(refused('20', [hold, { kind: 'ramp', rate, to: '100' }])).toMatchObject([
        { step: 1, field: 'rate', because: expect.stringMatching(/above 0 °C\/min/) },
      ]);
    }
    expect(refused('20', [{ kind: 'hold', minutes: '0' }])).toMatchObject([{ step: 0, field: 'minutes' }]);
    expect(refused('20', [{ kind: 'ramp', rate: '2', to: '20' }])).toMatchObject([
      { field: 'to', because: expect.stringMatching(/already/) },
    ]);
    expect(refused('20', [{ kind: 'ramp', rate: '', to: '350 °F' }])).toMatchObject([
      { field: 'rate', because: expect.stringMatching(/nothing is typed/) },
      { field: 'to', because: expect.stringMatching(/"350 °F" is no figure; expected one in °C/) },
    ]);
    expect(refused('20', [])).toMatchObject([{ step: null, field: 'steps', because: expect.stringMatching(/empty/) }]);
    expect(refused('20', [{ kind: 'hold', minutes: '43201' }])).toMatchObject([
      { field: 'steps', because: expect.stringMatching(/30 days/) },
    ]);
  });

  it('reads no figure where a figure only begins', () => {
    for (const text of ['', ' ', '1e3', '12 min', '1.2.3', 'NaN', 'Infinity', '0x10'])
      expect(figureFrom(text)).toBeNull();
    expect([figureFrom(' 1,5 '), figureFrom('\u22125'), figureFrom('.5')]).toEqual([1.5, -5, 0.5]);
  });
});

describe('programmeText', () => {
  it('writes what an address can hold, and reads it back', () => {
    expect(programmeText(TWO_DWELL)).toBe('20C_2to110_hold60_2to180_hold120_3to60');
    const figures = fc.integer({ min: -99999, max: 99999 }).map((n) => n / 100);
    const step = fc.oneof(
      fc.record({ kind: fc.constant('ramp' as const), rate: figures, to: figures }),
      fc.record({ kind: fc.constant('hold' as const), minutes: figures }),
    );
    fc.assert(
      fc.property(fc.constantFrom('°C' as const, '°F' as const), figures, fc.array(step), (unit, start, steps) => {
        const typed = typedFrom({ unit, start, steps });
        const text = programmeText(typed);
        expect(parseProgrammeText(text)).toEqual(typed);
        // As it stands in an address: nothing is escaped.
        expect(new URLSearchParams({ programme: text }).toString()).toBe(`programme=${text}`);
      }),
    );
  });

  it('is null for any other text', () => {
    for (const text of ['', '20', '20K', '20C_', '20C_2', '20C_hold60x', '20C_2to110_<b>', 'C20_hold60']) {
      expect(parseProgrammeText(text)).toBeNull();
    }
  });
});
