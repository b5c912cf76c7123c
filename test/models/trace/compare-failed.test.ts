import { describe, expect, it } from 'vitest';
import { compareFailed } from '../../../models/trace/compare-failed.ts';
import { uniformNumbers } from '../../../models/trace/uniform-numbers.ts';
import { bystanders, leakingLine, partsOf, weakVacuum } from './planted.ts';

const seeds = Array.from({ length: 11 }, (_, i) => i + 1);

describe('compareFailed', () => {
  it('ranks a planted bag line first and shows the operator who keeps to it as tied to it', () => {
    let told = 0;
    for (const seed of seeds) {
      const { parts, factors } = leakingLine(seed);
      const { factors: ranked, groups } = compareFailed(parts, factors);
      expect(ranked[0]).toMatchObject({ name: 'bag line', standing: 'stands-out' });
      expect(ranked[0]!.sentence).toMatch(
        /^\d+ of \d+ failed parts were cured on bag line V3, against \d+ of \d+ sound/,
      );
      const tied = groups[0]!.tied.find(({ name }) => name === 'operator');
      expect(groups[0]!.first).toBe('bag line');
      expect(['follows', 'cannot-tell-apart']).toContain(tied?.tie);
      if (tied?.tie === 'follows') told += 1;
    }
    expect(told).toBeGreaterThan(5);
  });

  it('ranks a planted lack of vacuum first and shows the gauge that moves with it as tied to it', () => {
    for (const seed of seeds.slice(0, 8)) {
      const { parts, factors } = weakVacuum(seed);
      const { factors: ranked, groups } = compareFailed(parts, factors);
      const [first] = ranked;
      expect(first).toMatchObject({ name: 'vacuum before gel', standing: 'stands-out' });
      expect(first?.kind === 'number' && first.shift.interval.high! < 0).toBe(true);
      expect(first!.sentence).toMatch(
        /^Failed parts had less vacuum before gel: median 0\.6\d* bar against 0\.\d+ bar/,
      );
      expect(groups[0]).toMatchObject({ first: 'vacuum before gel', tied: [{ name: 'vacuum at the pump' }] });
      expect(['follows', 'cannot-tell-apart']).toContain(groups[0]!.tied[0]!.tie);
    }
  });

  it('ties a common level that only holds the rare one', () => {
    // Line V9 cures 40 of 2000 parts, all of them in spring; half the parts are of spring; only V9 fails.
    const random = uniformNumbers(3);
    const line = Array.from({ length: 2000 }, (_, i) => (i < 40 ? 'V9' : `V${1 + Math.floor(random() * 8)}`));
    const season = line.map((each, i) => (each === 'V9' || i % 2 === 0 ? 'spring' : 'autumn'));
    const { groups } = compareFailed(partsOf(line.map((each) => each === 'V9' && random() < 0.9)), [
      { kind: 'level', name: 'season', values: season },
      { kind: 'level', name: 'bag line', values: line },
    ]);
    expect(groups).toHaveLength(1);
    expect(groups[0]).toMatchObject({ first: 'bag line', tied: [{ name: 'season', tie: 'follows' }] });
    expect(groups[0]!.tied[0]!.association).toBeLessThan(0.5);
    expect(groups[0]!.tied[0]!.sentence).toMatch(
      /^Season \w+ moves with bag line V9 \(association 0\.\d+\)\. With bag line held fixed, too few parts differ in season \w+ to show anything .*by itself\.$/,
    );
  });

  it('puts a cause on record for fewer parts before the one that only follows it', () => {
    const { parts, factors } = weakVacuum(1);
    const sparse = factors.map((factor) =>
      factor.kind === 'number' && factor.name === 'vacuum before gel'
        ? { ...factor, values: factor.values.map((value, i) => (i % 5 < 2 ? null : value)) }
        : factor,
    );
    const { factors: ranked, groups } = compareFailed(parts, sparse);
    const p = new Map(ranked.map((factor) => [factor.name, factor.p.p]));
    expect(p.get('vacuum at the pump')).toBeLessThan(p.get('vacuum before gel')!);
    expect(ranked[0]!.name).toBe('vacuum before gel');
    expect(groups[0]).toMatchObject({
      first: 'vacuum before gel',
      tied: [{ name: 'vacuum at the pump', tie: 'follows' }],
    });
  });

  it('says that a copy cannot be told apart, by any name', () => {
    const { parts, factors } = leakingLine(1);
    const line = factors.find(({ name }) => name === 'bag line')!;
    const copy = { kind: 'level' as const, name: 'pump', values: line.values.map((value) => `P${value}`) };
    const { groups } = compareFailed(parts, [line, copy] as typeof factors);
    expect(groups).toHaveLength(1);
    expect(groups[0]!.tied[0]).toMatchObject({ name: 'pump', tie: 'cannot-tell-apart' });
    expect(groups[0]!.tied[0]!.withFirstFixed).toMatchObject({ value: { p: 1 }, leastP: 1 });
    expect(groups[0]!.tied[0]!.sentence).toContain('cannot be told apart on these parts');
    expect(groups[0]!.tied[0]!.sentence).toContain('too few parts differ');
  });

  it('keeps two causes apart, and finds both', () => {
    const random = uniformNumbers(2);
    const tool = Array.from({ length: 300 }, () => `T${Math.floor(random() * 6)}`);
    const roll = Array.from({ length: 300 }, () => `R${Math.floor(random() * 6)}`);
    const isFailed = tool.map((each, i) => random() < (each === 'T1' ? 0.5 : 0) + (roll[i] === 'R4' ? 0.4 : 0));
    const { groups, factors } = compareFailed(partsOf(isFailed), [
      ...bystanders(300, 10, random),
      { kind: 'level', name: 'tool', values: tool },
      { kind: 'level', name: 'roll', values: roll },
    ]);
    expect(
      factors
        .filter(({ standing }) => standing === 'stands-out')
        .map(({ name }) => name)
        .sort(),
    ).toEqual(['roll', 'tool']);
    expect(groups.filter(({ tied }) => tied.length > 0)).toEqual([]);
  });

  it('finds one roll among several a part came from', () => {
    const random = uniformNumbers(5);
    const rolls = Array.from({ length: 120 }, () => [
      `R${Math.floor(random() * 8)}`,
      `R${8 + Math.floor(random() * 8)}`,
    ]);
    const isFailed = rolls.map((of) => random() < (of.includes('R11') ? 0.6 : 0.02));
    const [roll] = compareFailed(partsOf(isFailed), [{ kind: 'level', name: 'roll', values: rolls }]).factors;
    expect(roll?.kind === 'level' && [roll.levels[0]?.level, roll.overall]).toEqual(['R11', null]);
    expect(roll?.standing).toBe('stands-out');
  });

  it('holds false alarms to what it says', () => {
    // 200 comparisons in which nothing goes with failure: Holm's p is 0.05 or less in at most 5 %, + 3 standard errors.
    let alarms = 0;
    for (let trial = 0; trial < 200; trial += 1) {
      const random = uniformNumbers(1000 + trial);
      const isFailed = Array.from({ length: 40 }, (_, i) => i < 6).sort(() => random() - 0.5);
      const { factors } = compareFailed(partsOf(isFailed), bystanders(40, 8, random));
      if (factors.some(({ standing }) => standing === 'stands-out')) alarms += 1;
    }
    expect(alarms).toBeLessThanOrEqual(19);
  });
});
