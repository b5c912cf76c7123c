import { describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { compareFailed } from '../../../models/trace/compare-failed.ts';
import type { Comparison } from '../../../models/trace/comparison.ts';
import type { Factor } from '../../../models/trace/factor.ts';
import { leakingLine, partsOf, weakVacuum } from './planted.ts';

const first = (failed: number, of: number) => partsOf(Array.from({ length: of }, (_, i) => i < failed));
const level = (name: string, values: (string | readonly string[] | null)[]): Factor => ({
  kind: 'level',
  name,
  values,
});
const number = (name: string, values: (number | null)[]): Factor => ({ kind: 'number', name, unit: 'K', values });
const refusal = (work: () => unknown) => {
  try {
    work();
  } catch (error) {
    if (error instanceof DomainError) return error;
    throw error;
  }
  throw new Error('nothing was refused');
};
const wordsOf = (found: Comparison) => [
  ...found.words,
  ...found.factors.flatMap(({ sentence, evidence }) => [sentence, evidence]),
  ...found.groups.flatMap(({ tied }) => tied.map(({ sentence }) => sentence)),
  ...found.untested.map(({ sentence }) => sentence),
];

describe('a comparison', () => {
  it('counts, corrects and speaks the example by hand', () => {
    // 6 of 7 failed parts and 4 of 41 sound ones on V3: Fisher's p = Σ C(10, x) C(38, 7 − x) / C(48, 7), x = 6, 7.
    const line = Array.from({ length: 48 }, (_, i) => (i < 6 || (i >= 7 && i < 11) ? 'V3' : 'V1'));
    const heating = Array.from({ length: 48 }, (_, i) => (i < 7 ? 1 : 2) + i / 100);
    const found = compareFailed(first(7, 48), [
      { kind: 'level', name: 'bag line', says: 'were cured on bag line', values: line },
      {
        kind: 'number',
        name: 'heating rate',
        unit: 'K/min',
        says: { lower: 'heated slower', higher: 'heated faster' },
        values: heating,
      },
    ]);
    const p = (210 * 38 + 120) / 73_629_072;
    const [rate, bagLine] = found.factors;
    expect(found).toMatchObject({ parts: { failed: 7, sound: 41 }, tests: 2 });
    expect(bagLine).toMatchObject({
      name: 'bag line',
      missing: { failed: 0, sound: 0 },
      sentence: '6 of 7 failed parts were cured on bag line V3, against 4 of 41 sound ones.',
      evidence: expect.stringMatching(
        /^Goes with failure, also after correction\. p = 0\.00011; corrected for 2 tests: /,
      ),
    });
    expect(bagLine!.p.p).toBeCloseTo(p, 12);
    expect(bagLine!.p.holm).toBeCloseTo(p, 12);
    expect(bagLine!.strength).toBeCloseTo(6 / 7 - 4 / 41, 14);
    // All 7 slowest of 48: 2 / C(48, 7).
    expect(rate!.p.p).toBeCloseTo(2 / 73_629_072, 15);
    expect(rate!.sentence).toBe(
      'Failed parts heated slower: median 1.03 K/min against 2.27 K/min of sound ones; shift −1.24 K/min (95 % interval −1.34 to −1.14 K/min).',
    );
  });

  it('tests each level of many against the rest, counts those tests, and all levels at once', () => {
    const values = Array.from({ length: 40 }, (_, i) => (i < 5 ? 'A' : i < 10 ? 'B' : i < 39 ? 'C' : 'D'));
    const { factors, tests } = compareFailed(first(5, 40), [level('tool', values)]);
    const [tool] = factors;
    if (tool?.kind !== 'level') throw new Error('a factor of levels');
    // A, B, C and the overall test; D is on one part.
    expect(tests).toBe(4);
    expect(tool.levels.map(({ level: name, test }) => [name, test !== null])).toEqual([
      ['A', true],
      ['C', true],
      ['B', true],
      ['D', false],
    ]);
    expect(tool.overall?.method).toBe('exact');
    // One choice of the five failed among C(40, 5).
    expect(tool.levels[0]!.test!.p.p).toBeCloseTo(1 / 658_008, 15);
    expect(tool.levels[0]!.test!.oddsRatio.estimate).toBeNull();
    expect(tool.levels[0]!.test!.riskDifference.estimate).toBe(1);
  });

  it('never takes missing for a level or a number, and says what is missing', () => {
    const values = Array.from({ length: 30 }, (_, i) => (i % 3 === 0 ? null : i < 6 ? 'A' : 'B'));
    const numbers = values.map((value, i) => (value === null ? null : i));
    const { factors } = compareFailed(first(6, 30), [level('tool', values), number('age', numbers)]);
    for (const factor of factors) {
      expect(factor).toMatchObject({ onRecord: { failed: 4, sound: 16 }, missing: { failed: 2, sound: 8 } });
      expect(factor.evidence).toContain('Not on record for 2 of 6 failed and 8 of 24 sound parts.');
      // 4 of 20 on record: 1/C(20, 4) for the level, two-sided twice that for the number.
      expect(factor.p.p * 4845).toBeCloseTo(factor.kind === 'level' ? 1 : 2, 9);
    }
    const without = [0, 1].map((i) => factors[i]!.p.p);
    const onRecord = values.flatMap((value, i) => (value === null ? [] : [i]));
    const only = compareFailed(partsOf(onRecord.map((i) => i < 6)), [
      level(
        'tool',
        onRecord.map((i) => values[i]!),
      ),
      number('age', onRecord),
    ]);
    expect(only.factors.map(({ p }) => p.p)).toEqual(without);
  });

  it('lists what cannot be tested, with the reason', () => {
    const { untested, tests, factors, words } = compareFailed(first(2, 6), [
      level('vessel', ['A', 'A', 'A', null, 'A', 'A']),
      number('dwell', [5, 5, 5, 5, 5, 5]),
      level('serial', ['a', 'b', 'c', 'd', 'e', 'f']),
      level('rolls', [
        ['R', '1'],
        ['R', '2'],
        ['R', '3'],
        ['R', '4'],
        ['R', '5'],
        ['R', '6'],
      ]),
      number('humidity', [null, null, 1, 2, 3, 4]),
      level('tool', ['x', 'y', null, null, null, null]),
    ]);
    expect([tests, factors]).toEqual([0, []]);
    expect(words[0]).toContain('0 factors compared in 0 tests, 6 not tested');
    expect(untested.map(({ name, why }) => [name, why])).toEqual([
      ['vessel', 'same-in-all'],
      ['dwell', 'same-in-all'],
      ['serial', 'none-shared'],
      ['rolls', 'none-shared'],
      ['humidity', 'no-failed-on-record'],
      ['tool', 'no-sound-on-record'],
    ]);
    expect(untested[0]!.sentence).toBe(
      'Vessel is the same in all parts on record. Not on record for 0 of 2 failed and 1 of 4 sound parts.',
    );
  });

  it('tells nothing of one failed part, and lists by rarity', () => {
    const tools = Array.from({ length: 40 }, (_, i) => (i === 0 ? 'rare' : i < 4 ? 'few' : 'T'));
    const ovens = tools.map((_, i) => (i < 20 ? 'O1' : 'O2'));
    const { factors, words, groups, leastP } = compareFailed(first(1, 40), [
      level('oven', ovens),
      level('tool', tools),
    ]);
    expect(leastP).toBeCloseTo(1 / 40, 15);
    expect(words[1]).toBe(
      'With 1 failed part nothing can be told apart: the least possible p is 0.025, before correction. Listed by rarity.',
    );
    expect(factors.map(({ name, standing }) => [name, standing])).toEqual([
      ['tool', 'too-few'],
      ['oven', 'too-few'],
    ]);
    expect(factors[0]!.sentence).toBe('1 of 1 failed parts have tool rare, against 0 of 39 sound ones.');
    expect(factors[0]!.evidence).toMatch(/^Too few to tell; listed by rarity/);
    expect(groups.flatMap(({ tied }) => tied)).toEqual([]);
  });

  it('says when nothing could stand out however well it matched', () => {
    const factors = Array.from({ length: 20 }, (_, n) =>
      number(
        `f${n}`,
        Array.from({ length: 10 }, (_part, i) => i * n + (i % 3)),
      ),
    );
    const { words, leastP } = compareFailed(first(2, 10), factors);
    expect(leastP).toBeCloseTo(1 / 45, 15);
    expect(words[1]).toMatch(
      /^With 2 failed parts nothing could stand out: the least possible p is 0\.022, 0\.44 corrected for 20 tests\.$/,
    );
  });

  it('does not depend on names of levels, order of parts or which other factors there are', () => {
    const { parts, factors } = leakingLine(2);
    const plain = compareFailed(parts, factors);
    const pOf = (found: Comparison) => new Map(found.factors.map(({ name, p }) => [name, p.p]));
    const order = parts.map((_, i) => (i * 7) % parts.length);
    const shuffled = compareFailed(
      order.map((i) => parts[i]!),
      factors.map((factor) => ({ ...factor, values: order.map((i) => factor.values[i]!) }) as Factor),
    );
    const renamed = compareFailed(
      parts,
      factors.map((factor) =>
        factor.kind === 'level'
          ? { ...factor, values: factor.values.map((value) => `z${String(value).slice(-1)}`) }
          : factor,
      ),
    );
    for (const other of [shuffled, renamed]) {
      for (const [name, p] of pOf(other)) expect(p).toBeCloseTo(pOf(plain).get(name)!, 10);
    }
    const alone = compareFailed(parts, factors.slice(0, 1));
    expect(alone.factors[0]!.p.p).toBe(pOf(plain).get(factors[0]!.name));
  });

  it('is plain data, says "goes with" and never names a cause', () => {
    for (const { parts, factors } of [leakingLine(1), weakVacuum(1)]) {
      const found = compareFailed(parts, factors);
      expect(structuredClone(found)).toEqual(found);
      expect(JSON.parse(JSON.stringify(found))).toEqual(found);
      expect(wordsOf(found).join(' ')).toContain('oes with failure');
      expect(wordsOf(found).join(' ')).not.toMatch(/caus|because|due to/i);
    }
  });

  it('gives the same answer to the same seed', () => {
    const { parts, factors } = weakVacuum(3);
    expect(compareFailed(parts, factors, { seed: 5 })).toEqual(compareFailed(parts, factors, { seed: 5 }));
  });

  it.each([
    ['no failed part', first(0, 3), []],
    ['no sound part', first(3, 3), []],
    ['a part twice', [...first(1, 2), ...first(1, 2)], []],
    ['a factor twice', first(1, 2), [level('tool', ['a', 'b']), level('tool', ['a', 'b'])]],
    ['a short row', first(1, 3), [level('tool', ['a', 'b'])]],
    ['NaN', first(1, 2), [number('dwell', [1, Number.NaN])]],
    ['a number for a level', first(1, 2), [{ kind: 'level', name: 'tool', values: [1, 'a'] } as unknown as Factor]],
    ['an empty level', first(1, 2), [level('tool', ['', 'a'])]],
    ['no levels', first(1, 2), [level('tool', [[], 'a'])]],
  ])('refuses %s', (_, parts, factors) => {
    expect(refusal(() => compareFailed(parts, factors)).code).toBe('option-out-of-range');
  });

  it('refuses a confidence or a seed that is none', () => {
    const tool = [number('dwell', [1, 2])];
    expect(refusal(() => compareFailed(first(1, 2), tool, { confidence: 1.5 })).code).toBe('option-out-of-range');
    expect(refusal(() => compareFailed(first(1, 2), tool, { seed: -1 })).code).toBe('option-out-of-range');
  });
});
