import type { Factor, TracedPart } from '../../../models/trace/factor.ts';
import { type UniformNumbers, uniformNumbers } from '../../../models/trace/uniform-numbers.ts';

/** Invented parts of Skerry Row whose failures were planted, and what was recorded of them. */
export interface Planted {
  readonly parts: readonly TracedPart[];
  readonly factors: readonly Factor[];
}

export function partsOf(isFailed: readonly boolean[]): TracedPart[] {
  return isFailed.map((failed, i) => ({ id: `strut ${i + 1}`, failed }));
}

/** Factors that have nothing to do with failure: some by part, some the same over a load of eight. */
export function bystanders(parts: number, howMany: number, random: UniformNumbers): Factor[] {
  return Array.from({ length: howMany }, (_, n): Factor => {
    const levels = 2 + Math.floor(random() * 5);
    const level = () => `L${Math.floor(random() * levels)}`;
    const tenth = () => Math.round(random() * 400) / 10;
    const perLoad = Array.from({ length: Math.ceil(parts / 8) }, () => ({ level: level(), number: tenth() }));
    const each = <T>(one: () => T, ofLoad: (load: number) => T) =>
      Array.from({ length: parts }, (_part, i) => (n % 4 < 2 ? one() : ofLoad(Math.floor(i / 8))));
    return n % 2 === 0
      ? { kind: 'level', name: `bystander ${n}`, values: each(level, (load) => perLoad[load]!.level) }
      : { kind: 'number', name: `bystander ${n}`, unit: 'min', values: each(tenth, (load) => perLoad[load]!.number) };
  });
}

/** 48 struts: most of those on bag line V3 fail; the operator mostly keeps to a line; twelve bystanders. */
export function leakingLine(seed: number): Planted {
  const random = uniformNumbers(seed);
  const line = Array.from({ length: 48 }, (_, i) => `V${1 + (i % 4)}`);
  const operator = line.map((each) => (random() < 0.8 ? `of ${each}` : `of V${1 + Math.floor(random() * 4)}`));
  const isFailed = line.map((each) => random() < (each === 'V3' ? 0.7 : 0.03));
  return {
    parts: partsOf(isFailed),
    factors: [
      ...bystanders(48, 6, random),
      { kind: 'level', name: 'operator', values: operator },
      { kind: 'level', name: 'bag line', says: 'were cured on bag line', values: line },
      ...bystanders(48, 6, random).map((factor) => ({ ...factor, name: `more ${factor.name}` })),
    ],
  };
}

/** 400 domes: the lower the vacuum before gel, the likelier to fail; what the gauge at the pump says moves with it. */
export function weakVacuum(seed: number): Planted {
  const random = uniformNumbers(seed);
  const vacuum = Array.from({ length: 400 }, () => 0.6 + 0.35 * random());
  const pump = vacuum.map((bar) => bar + 0.1 * (random() + random() - 1));
  const isFailed = vacuum.map((bar) => random() < (bar < 0.68 ? 0.5 : bar < 0.72 ? 0.15 : 0.004));
  return {
    parts: partsOf(isFailed),
    factors: [
      { kind: 'number', name: 'vacuum at the pump', unit: 'bar', values: pump },
      ...bystanders(400, 20, random),
      {
        kind: 'number',
        name: 'vacuum before gel',
        unit: 'bar',
        says: { lower: 'had less vacuum before gel', higher: 'had more vacuum before gel' },
        values: vacuum,
      },
    ],
  };
}
