import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseCycle } from '../../../models/cycle/parse-cycle.ts';
import type { ErrorCode } from '../../../models/errors.ts';
import { exampleCycle, exampleWith, withValue } from './example-cycle.ts';

const seed = 20260302;
const cyclesFolder = join(import.meta.dirname, '../../reference/cycles');

function refusal(document: unknown): { code: string; key: unknown; message: string } {
  try {
    parseCycle(document);
  } catch (error) {
    const { code, facts, message } = error as { code: string; facts: { key?: unknown }; message: string };
    return { code, key: facts.key, message };
  }
  return { code: 'none', key: null, message: '' };
}

/** Paths of every object in a document, the document itself as ''. */
function objectPaths(value: unknown, path = ''): string[] {
  if (typeof value !== 'object' || value === null) return [];
  const below = Array.isArray(value)
    ? value.flatMap((item, i) => objectPaths(item, `${path}[${i}]`))
    : Object.entries(value).flatMap(([key, item]) => objectPaths(item, path === '' ? key : `${path}.${key}`));
  return Array.isArray(value) ? below : [path, ...below];
}

describe('parseCycle', () => {
  it('returns the example of the rules as it is written', () => {
    expect(parseCycle(exampleCycle())).toEqual(exampleCycle());
  });

  it('leaves the document it was given alone', () => {
    const document = exampleCycle();
    parseCycle(document);
    expect(document).toEqual(exampleCycle());
  });

  const files = readdirSync(cyclesFolder).filter((name) => name.endsWith('.json'));

  it('was given the recorded cycles', () => {
    expect(files.length).toBeGreaterThan(20);
  });

  it.each(files)('reads %s as it is written', (name) => {
    const document: unknown = JSON.parse(readFileSync(join(cyclesFolder, name), 'utf8'));
    expect(parseCycle(document)).toEqual(document);
  });

  it('refuses an unknown key in any object, by its path', () => {
    const paths = objectPaths(exampleCycle());
    expect(paths.length).toBeGreaterThan(30);
    fc.assert(
      fc.property(
        fc.constantFrom(...paths),
        fc.constantFrom('toleranse', 'at-least', '__proto', 'Name'),
        (path, key) => {
          const full = path === '' ? key : `${path}.${key}`;
          expect(refusal(withValue(exampleCycle(), full, 1))).toMatchObject({
            code: 'document-unknown-key',
            key: full,
          });
        },
      ),
      { seed, numRuns: 200 },
    );
  });

  it.each([
    'format',
    'code',
    'issue',
    'title',
    'units',
    'units.temperature',
    'judgedBy',
    'stages',
    'stages[0].name',
    'stages[0].kind',
    'stages[0].rate.over',
    'stages[0].rate.average',
    'stages[0].rate.of',
    'stages[0].rate.window',
    'stages[1].target',
    'stages[1].plus',
    'stages[1].minus',
    'stages[1].clock',
    'stages[1].clock.opens',
    'stages[1].clock.closes',
    'stages[1].counting',
    'stages[1].longest.atMost',
    'stages[1].longest.clock',
    'stages[1].forgive.below.by',
    'stages[1].forgive.below.for',
    'windows[0].name',
    'windows[0].quantity',
    'windows[0].from',
    'windows[0].until',
    'windows[0].from.at',
    'windows[0].until.value',
    'origin.document',
    'spread.atMost',
    'spread.during',
    'leakTest.over',
    'leakTest.lossAtMost',
    'cure.resin',
    'decision.rule',
    'units.pressure',
    'units.vacuum',
  ])('refuses a cycle without %s', (path) => {
    expect(refusal(withValue(exampleCycle(), path, undefined))).toMatchObject({
      code: 'document-missing-key',
      key: path,
    });
  });

  const wrong: readonly (readonly [string, Record<string, unknown>, ErrorCode, string])[] = [
    ['another format', { format: 'dwellbook-cycle/2' }, 'document-wrong-format', 'format'],
    ['no stage at all', { stages: [] }, 'document-wrong-value', 'stages'],
    ['a stage of an unknown kind', { 'stages[0].kind': 'soak' }, 'document-wrong-value', 'stages[0].kind'],
    ['a blank name', { 'stages[0].name': ' ' }, 'document-wrong-value', 'stages[0].name'],
    ['a figure written as text', { 'stages[1].target': '110' }, 'document-wrong-value', 'stages[1].target'],
    ['a time of neither end', { 'stages[1].time': {} }, 'document-wrong-value', 'stages[1].time'],
    ['a rate of neither end', { 'stages[4].rate.atMost': undefined }, 'document-wrong-value', 'stages[4].rate'],
    ['a window of neither end', { 'windows[0].atLeast': undefined }, 'document-wrong-value', 'windows[0]'],
    ['ends the wrong way round', { 'stages[1].time.atLeast': 81 }, 'document-wrong-value', 'stages[1].time.atLeast'],
    ['a window upside down', { 'windows[1].atMost': 6 }, 'document-wrong-value', 'windows[1].atLeast'],
    ['a minus below zero', { 'stages[1].minus': -5 }, 'document-wrong-value', 'stages[1].minus'],
    ['a band of no width', { 'stages[1].plus': 0, 'stages[1].minus': 0 }, 'document-wrong-value', 'stages[1].plus'],
    ['a rate that must be nothing', { 'stages[4].rate.atMost': 0 }, 'document-wrong-value', 'stages[4].rate.atMost'],
    [
      'a time that must be nothing',
      { 'stages[1].time': { atMost: 0 } },
      'document-wrong-value',
      'stages[1].time.atMost',
    ],
    ['a negative cooling rate', { 'stages[4].rate.atMost': -3 }, 'document-wrong-value', 'stages[4].rate.atMost'],
    ['a range of no width', { 'stages[0].rate.over': [50, 50] }, 'document-wrong-value', 'stages[0].rate.over'],
    ['a heating range downwards', { 'stages[0].rate.over': [100, 50] }, 'document-wrong-value', 'stages[0].rate.over'],
    ['a cooling range upwards', { 'stages[4].rate.over': [70, 170] }, 'document-wrong-value', 'stages[4].rate.over'],
    ['a chord with a window', { 'stages[0].rate.average': 'chord' }, 'document-wrong-value', 'stages[0].rate.average'],
    [
      'half a forgiven time',
      { 'stages[1].forgive.below.times': 1.5 },
      'document-wrong-value',
      'stages[1].forgive.below.times',
    ],
    ['forgiveness of nothing', { 'stages[1].forgive': {} }, 'document-wrong-value', 'stages[1].forgive'],
    ['an empty block', { sensors: {} }, 'document-wrong-value', 'sensors'],
    ['a place named twice', { 'sensors.mustWork': ['lag', 'lag'] }, 'document-name-twice', 'sensors.mustWork[1]'],
    ['half a sensor', { 'sensors.workingAtLeast': 0.5 }, 'document-wrong-value', 'sensors.workingAtLeast'],
    ['a degree above one', { 'cure.degreeAtLeast': 90 }, 'document-wrong-value', 'cure.degreeAtLeast'],
    ['minutes after openings while heating', { 'spread.after': 5 }, 'document-wrong-value', 'spread.during'],
    ['an unknown event', { 'windows[0].from.at': 'vent' }, 'document-wrong-value', 'windows[0].from.at'],
    ['an event with too much', { 'windows[0].from.value': 3 }, 'document-unknown-key', 'windows[0].from.value'],
    ['a unit of the wrong quantity', { 'units.pressure': '°C' }, 'document-wrong-value', 'units.pressure'],
    ['torr without abs', { 'units.vacuum': 'torr' }, 'document-wrong-value', 'units.vacuum'],
    ['a vacuum with a minus sign', { 'windows[0].atLeast': -0.75 }, 'document-wrong-value', 'windows[0].atLeast'],
    ['a ceiling below a dwell', { ceiling: 174 }, 'document-wrong-value', 'ceiling'],
    ['a stage named twice', { 'stages[2].name': 'heat-up 1' }, 'document-name-twice', 'stages[2].name'],
    [
      'a window named twice',
      { 'windows[1].name': 'bag vacuum until venting' },
      'document-name-twice',
      'windows[1].name',
    ],
    [
      'a stage whose finding would bear a window’s name',
      { 'stages[1].name': 'window', 'windows[0].name': 'time' },
      'document-name-twice',
      'the limit window/time',
    ],
    [
      'an event of no stage',
      { 'windows[0].from': { at: 'opens', stage: 'dwell 3' } },
      'document-wrong-value',
      'windows[0].from.stage',
    ],
    [
      'an event of a heat-up',
      { 'windows[0].from': { at: 'closes', stage: 'heat-up 1' } },
      'document-wrong-value',
      'windows[0].from.stage',
    ],
    [
      'an event of a dwell without a clock',
      {
        'stages[3].time': undefined,
        'stages[3].clock': undefined,
        'windows[0].from': { at: 'opens', stage: 'dwell 2' },
        spread: undefined,
      },
      'document-missing-key',
      'stages[3].clock',
    ],
    [
      'a pressure for the gel without its unit',
      { 'units.pressure': undefined, windows: [] },
      'document-missing-key',
      'units.pressure',
    ],
    [
      'a leak test without the unit of vacuum',
      { 'units.vacuum': undefined, windows: [] },
      'document-missing-key',
      'units.vacuum',
    ],
    [
      'an absolute pressure below zero',
      { 'units.pressure': 'bar abs', 'windows[1].atLeast': -1 },
      'document-wrong-value',
      'windows[1].atLeast',
    ],
    [
      'a spread by openings of a dwell without a clock',
      { 'stages[3].time': undefined, 'stages[3].clock': undefined },
      'document-missing-key',
      'stages[3].clock',
    ],
    [
      'dips forgiven without a clock',
      { 'stages[1].time': undefined, 'stages[1].clock': undefined, 'stages[1].below': undefined },
      'document-missing-key',
      'stages[1].clock',
    ],
  ];

  it.each(wrong)('refuses %s', (_, changes, code, key) => {
    const { code: found, key: at, message } = refusal(exampleWith(changes));
    expect({ code: found, key: at }).toEqual({ code, key });
    expect(message).toContain(key);
  });

  it.each([null, [], 'SR-180', 1, undefined])('refuses %j, which is no document', (document) => {
    expect(refusal(document).code).toBe('document-wrong-value');
  });

  it('refuses two dwells with no heat or cool stage between them, by both names', () => {
    const { stages } = exampleCycle();
    const { code, key, message } = refusal({ ...exampleCycle(), stages: [stages[0], stages[1], stages[3], stages[4]] });
    expect(code).toBe('cycle-stages-out-of-order');
    expect(key).toBe('stages[2]');
    expect(message).toContain('"dwell 1" and "dwell 2"');
  });

  it('refuses two dwells of one temperature with no stage between them', () => {
    const { stages } = exampleCycle();
    const document = { ...exampleCycle(), stages: [stages[1], { ...stages[1], name: 'dwell 1b' }] };
    expect(refusal(document)).toMatchObject({ code: 'cycle-stages-out-of-order', key: 'stages[1]' });
  });

  it('refuses a hotter dwell reached only by cooling', () => {
    const { stages } = exampleCycle();
    const cooling = { name: 'cool', kind: 'cool' };
    expect(refusal({ ...exampleCycle(), stages: [stages[1], cooling, stages[3]] }).code).toBe(
      'cycle-stages-out-of-order',
    );
    expect(refusal({ ...exampleCycle(), stages: [stages[3], cooling, stages[1]], windows: [] }).code).toBe('none');
  });
});

describe('an absolute vacuum', () => {
  const absolute = (changes: Record<string, unknown>) =>
    exampleWith({ 'units.vacuum': 'mbar abs', 'leakTest.startAtLeast': undefined, ...changes });

  it('has its limit in atMost', () => {
    expect(refusal(absolute({ 'windows[0].atLeast': undefined, 'windows[0].atMost': 200 })).code).toBe('none');
    expect(refusal(absolute({ 'windows[0].atLeast': 50, 'windows[0].atMost': 200 })).code).toBe('none');
  });

  it('may be kept from being too deep, and a leak test may start at one', () => {
    expect(refusal(absolute({ 'windows[0].atLeast': 50 })).code).toBe('none');
    expect(refusal(absolute({ 'windows[0].atLeast': 50, 'leakTest.startAtLeast': 120 })).code).toBe('none');
  });
});
