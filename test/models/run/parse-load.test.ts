import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseBarometer, parseExclusion, parseLoad } from '../../../models/run/parse-load.ts';
import { withValue } from '../cycle/example-cycle.ts';

const seed = 20260302;

/** The example of the cycle and verdict rules, with a second part. */
function exampleLoad() {
  return structuredClone({
    format: 'dwellbook-load/1',
    workOrder: 'W-2231',
    barometer: '1009 mbar',
    parts: [
      {
        part: 'SR-0417',
        quantity: 1,
        bagLine: 'V1',
        startDegree: 0.012,
        humidity: 45,
        leakTest: { start: 0.88, end: 0.85, minutes: 5 },
      },
      { part: 'SR-0418' },
    ],
    sensors: [
      {
        channel: 'TC1',
        parts: ['SR-0417'],
        place: 'lag',
        uncertainty: 2.2,
        corrections: [
          [100, -0.4],
          [180, -0.7],
        ],
      },
      { channel: 'TC2' },
    ],
    exclusions: [{ channel: 'TC4', from: '2026-03-02T10:22:00Z', reason: 'open circuit', by: 'inspector 2' }],
  });
}

function refusal(read: () => unknown): { code: string; key: unknown; message: string } {
  try {
    read();
  } catch (error) {
    const { code, facts, message } = error as { code: string; facts: { key?: unknown }; message: string };
    return { code, key: facts.key, message };
  }
  return { code: 'none', key: null, message: '' };
}

describe('parseLoad', () => {
  it('returns the example of the rules as it is written', () => {
    expect(parseLoad(exampleLoad())).toEqual(exampleLoad());
  });

  it('reads a load whose sensors are nobody’s in particular', () => {
    expect(parseLoad({ format: 'dwellbook-load/1', parts: [{ part: 'P-A' }] }).sensors).toEqual([]);
  });

  it.each([
    ['format'],
    ['parts'],
    ['parts[0].part'],
    ['parts[0].leakTest.start'],
    ['parts[0].leakTest.minutes'],
    ['sensors[0].channel'],
    ['exclusions[0].channel'],
    ['exclusions[0].from'],
    ['exclusions[0].reason'],
    ['exclusions[0].by'],
  ])('refuses a load without %s', (path) => {
    expect(refusal(() => parseLoad(withValue(exampleLoad(), path, undefined)))).toMatchObject({
      code: 'document-missing-key',
      key: path,
    });
  });

  it.each([
    ['an unknown key', 'parts[0].serial', 'x', 'document-unknown-key', 'parts[0].serial'],
    ['a part twice', 'parts[1].part', 'SR-0417', 'document-name-twice', 'parts[1].part'],
    ['a sensor twice', 'sensors[1].channel', 'TC1', 'document-name-twice', 'sensors[1].channel'],
    ['a sensor on a part that is not in the load', 'sensors[0].parts', ['SR-9'], 'part-unknown', 'sensors[0].parts[0]'],
    ['half a part', 'parts[0].quantity', 1.5, 'document-wrong-value', 'parts[0].quantity'],
    ['a humidity of none at all', 'parts[0].humidity', 0, 'document-wrong-value', 'parts[0].humidity'],
    ['a humidity beyond saturation', 'parts[0].humidity', 100.5, 'document-wrong-value', 'parts[0].humidity'],
    ['a start that is fully cured', 'parts[0].startDegree', 1, 'document-wrong-value', 'parts[0].startDegree'],
    ['a leak test of no length', 'parts[0].leakTest.minutes', 0, 'document-wrong-value', 'parts[0].leakTest.minutes'],
    ['an uncertainty of nothing', 'sensors[0].uncertainty', 0, 'document-wrong-value', 'sensors[0].uncertainty'],
    [
      'corrections that fall back',
      'sensors[0].corrections',
      [
        [180, 1],
        [100, 1],
      ],
      'document-wrong-value',
      'sensors[0].corrections[1]',
    ],
    [
      'corrections at one reading twice',
      'sensors[0].corrections',
      [
        [100, 1],
        [100, 2],
      ],
      'document-wrong-value',
      'sensors[0].corrections[1]',
    ],
    [
      'a correction of one figure',
      'sensors[0].corrections',
      [[100]],
      'document-wrong-value',
      'sensors[0].corrections[0]',
    ],
    [
      'an instant without an offset',
      'exclusions[0].from',
      '2026-03-02T10:22:00',
      'document-wrong-value',
      'exclusions[0].from',
    ],
    ['31 April', 'exclusions[0].from', '2026-04-31T10:22:00Z', 'document-wrong-value', 'exclusions[0].from'],
    ['a decision of nobody', 'exclusions[0].by', ' ', 'document-wrong-value', 'exclusions[0].by'],
    ['another format', 'format', 'dwellbook-cycle/1', 'document-wrong-format', 'format'],
  ])('refuses %s', (_, path, value, code, key) => {
    expect(refusal(() => parseLoad(withValue(exampleLoad(), path, value)))).toMatchObject({ code, key });
  });

  it('refuses a barometer without a unit', () => {
    expect(refusal(() => parseLoad(withValue(exampleLoad(), 'barometer', '1009'))).code).toBe('barometer-malformed');
  });
});

describe('parseExclusion', () => {
  it('reads channel, instant, reason and name', () => {
    expect(parseExclusion('TC4@2026-03-02T10:22:00Z:open circuit (inspector 2)')).toEqual({
      channel: 'TC4',
      from: '2026-03-02T10:22:00Z',
      reason: 'open circuit',
      by: 'inspector 2',
    });
  });

  it.each([
    [
      'TC 4@2026-03-02T10:22:00+01:00:lead: crushed (A. Reid)',
      'TC 4',
      '2026-03-02T10:22:00+01:00',
      'lead: crushed',
      'A. Reid',
    ],
    ['TC4@2026-03-02T10:22Z:3 wires loose (again) (QA)', 'TC4', '2026-03-02T10:22Z', '3 wires loose (again)', 'QA'],
  ])('reads %s', (words, channel, from, reason, by) => {
    expect(parseExclusion(words)).toEqual({ channel, from, reason, by });
  });

  it.each([
    'TC4@2026-03-02T10:22:00Z:open circuit',
    'TC4@2026-03-02T10:22:00Z:open circuit ()',
    'TC4@2026-03-02T10:22:00Z:open circuit ( )',
    'TC4@2026-03-02T10:22:00Z: (inspector 2)',
    'TC4@2026-03-02T10:22:00:open circuit (inspector 2)',
    'TC4@2026-02-30T10:22:00Z:open circuit (inspector 2)',
    'TC4@10:22:00Z:open circuit (inspector 2)',
    '@2026-03-02T10:22:00Z:open circuit (inspector 2)',
    'TC4',
    '',
  ])('refuses "%s" and shows how it is written', (words) => {
    const { code, message } = refusal(() => parseExclusion(words));
    expect(code).toBe('exclusion-malformed');
    expect(message).toContain('(inspector 2)');
  });

  it('reads back whatever was put together', () => {
    const word = fc.stringMatching(/^[A-Za-z][A-Za-z0-9 :.,-]{0,14}[A-Za-z0-9]$/);
    fc.assert(
      fc.property(word, fc.date({ min: new Date(0), noInvalidDate: true }), word, word, (channel, at, reason, by) => {
        fc.pre(at.getUTCFullYear() < 10_000);
        const from = at.toISOString();
        expect(parseExclusion(`${channel}@${from}:${reason} (${by})`)).toEqual({ channel, from, reason, by });
      }),
      { seed },
    );
  });
});

describe('parseBarometer', () => {
  // NIST SP 811 (2008), app. B.8: 1 mbar = 100 Pa; 1 inHg (0 °C) = 3386.389 Pa. 29.92 inHg is the standard atmosphere
  // as altimeters are set (common practice), 1013.2 mbar.
  it.each([
    ['1009 mbar', 100_900],
    ['1009.25mbar', 100_925],
    [' 101.325 kPa ', 101_325],
    ['1013 hPa', 101_300],
    ['1.009 bar abs', 100_900],
    ['29.92 inHg', 101_320.75888],
  ])('reads "%s"', (words, pressurePa) => {
    expect(parseBarometer(words)).toBe(pressurePa);
  });

  it.each([
    '1009',
    'mbar',
    '1009 mb',
    '1,009 bar',
    '-1009 mbar',
    '1009 mbar today',
    '',
    '1009 °C',
    '1009 kPa',
    '1009 Pa',
  ])('refuses "%s"', (words) => {
    expect(refusal(() => parseBarometer(words)).code).toBe('barometer-malformed');
  });
});
