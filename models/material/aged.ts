import { type AgeingSpan, agedDegree } from '../cure/aged-degree.ts';
import type { Resin } from '../cure/resin.ts';
import { celsiusFrom, kelvinFromCelsius } from '../units.ts';
import type { Course } from './course.ts';
import type { Material } from './material.ts';
import { outTime } from './out-time.ts';
import { stepsAbove } from './profile.ts';

/** The degree of cure that material had aged to, and by which rule; or why there is none. */
export type Aged =
  | { readonly degree: number; readonly basis: 'resin-set' | 'equivalent-time'; readonly because: string }
  | { readonly degree: null; readonly basis: null; readonly because: string };

/**
 * Degree of cure that material has aged to along its course, to start its cure from.
 *
 * By the resin set's own kinetics where the set was fitted at every temperature the material was out at; otherwise
 * linearly in its used out-life between two measured degrees, where its document has them.
 *
 * @param resin The set its material document names; null where there is none.
 * @returns See {@link Aged}; a sentence says which rule it was, or why neither.
 *
 * Limits: past the out-life no degree was measured, so none is given. Time in a freezer that was cold enough is taken as none. A line of diffusion that was fitted at cure temperatures shuts the
 *   reaction down at room temperature, so a set is refused where its `validC` does not reach there.
 * Source: Grunenfelder, Centea, Hubert & Nutt, Composites Part A 45 (2013) 119–126: room-temperature ageing raises the
 *   degree of cure and can end in vitrification (abstract).
 */
export function agedOf(course: Course, material: Material, resin: Resin | null): Aged {
  const time = outTime(course, material);
  if (!Number.isFinite(time.most)) return none(`No aged degree: ${time.unknown[0] ?? 'its ledger is not whole'}.`);
  const spans = spansOf(course, material);
  const refusal = whyNotBySet(spans, material, resin);
  if (refusal === null && resin !== null) {
    const { degree } = agedDegree(spans, resin);
    const because = `Aged to ${degree.toFixed(4)} by the kinetics of the set ${resin.code}, fitted at these temperatures.`;
    return { degree, basis: 'resin-set', because };
  }
  const { ageing, out } = material;
  if (ageing === undefined) return none(`No aged degree: ${refusal}, and its document gives no measured degrees.`);
  const share = time.most / (out.lifeDays * 1440);
  if (share > 1 + 1e-9)
    return none(`No aged degree: ${course.item} is past its out-life, and none was measured beyond it.`);
  const degree = ageing.freshDegree + share * (ageing.degreeAtOutLife - ageing.freshDegree);
  const rule = material.equivalent === undefined ? 'minute for minute' : 'by the equivalent-time rule';
  const because = `Aged to ${degree.toFixed(4)} by its used out-life, ${rule}, between two measured degrees (${ageing.source}); ${refusal}.`;
  return { degree, basis: 'equivalent-time', because };
}

function none(because: string): Aged {
  return { degree: null, basis: null, because };
}

function whyNotBySet(spans: readonly AgeingSpan[], { resin: named }: Material, resin: Resin | null): string | null {
  if (named === undefined) return 'its document names no resin set';
  if (resin === null) return `the resin set ${named} is not here`;
  if (resin.validC === undefined) return `the set ${resin.code} does not say at which temperatures it was fitted`;
  const [lowest, highest] = resin.validC;
  const outside = spans.find(({ temperatureK }) => {
    const [low, high] = [kelvinFromCelsius(lowest), kelvinFromCelsius(highest)];
    return temperatureK < low - 1e-9 || temperatureK > high + 1e-9;
  });
  if (outside === undefined) return null;
  const fitted = `the set ${resin.code} was fitted from ${lowest} to ${highest} °C, not at ${(outside.temperatureK - 273.15).toFixed(0)} °C`;
  return resin.diffusion === undefined ? fitted : `${fitted}, where its diffusion line would shut the reaction down`;
}

/** Time that aged it, each stretch at its temperature; what was stated when it came in, at the warmest it has seen since. */
function spansOf({ stays, statedMinutes }: Course, { storage, units }: Material): AgeingSpan[] {
  const aboveC = celsiusFrom(storage.outAbove ?? storage.atMost, units.temperature);
  const spans = stays.flatMap((stay): AgeingSpan[] => {
    if (stay.kind === 'freezer-record') {
      return stepsAbove(stay.profile, stay.fromMs, stay.untilMs, aboveC).map(({ seconds, temperatureC }) => ({
        seconds,
        temperatureK: kelvinFromCelsius(temperatureC),
      }));
    }
    if (stay.kind !== 'out' || stay.room?.temperature === undefined) return [];
    const temperatureK = kelvinFromCelsius(celsiusFrom(stay.room.temperature, stay.room.unit));
    return [{ seconds: (stay.untilMs - stay.fromMs) / 1000, temperatureK }];
  });
  const warmestK = Math.max(...spans.map(({ temperatureK }) => temperatureK));
  const isStated = statedMinutes > 0 && Number.isFinite(warmestK);
  return isStated ? [{ seconds: statedMinutes * 60, temperatureK: warmestK }, ...spans] : spans;
}
