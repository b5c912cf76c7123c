import type { ThroughPart } from '../../models/cure/heat/through-part.ts';
import type { Cycle } from '../../models/cycle/cycle.ts';
import type { ReadingsInTime } from '../../models/run/common-history.ts';
import { celsiusFromKelvin, temperatureFromCelsius } from '../../models/units.ts';
import type { ThicknessAsked } from '../actions/ask-thickness.ts';
import type { ThicknessRecords } from '../actions/thickness-records.ts';
import type { Thickness, ThicknessCase } from '../contract/thickness.ts';
import { isoFromMs } from '../store/instants.ts';
import { assumptionsOf } from './thickness-assumptions.ts';
import { thicknessGaps } from './thickness-gaps.ts';

export interface ThicknessFound {
  readonly part: string;
  readonly run: number;
  readonly cycle: Cycle | null;
  readonly records: ThicknessRecords;
  readonly asked: ThicknessAsked;
  readonly through: readonly ThroughPart[];
  /** Channels of the run that nobody has decided on yet. */
  readonly suspects: readonly string[];
}

/** Every figure with its unit, the range over all cases, and what it rests on. */
export function thicknessView(found: ThicknessFound): Thickness {
  const { part, run, records, asked, through } = found;
  const { beginsMs, timeS } = asked.history;
  const untilMs = beginsMs + 1000 * (timeS.at(-1) ?? 0);
  const cases = through.map((one, n) => caseOf(one, asked.choices[n]?.name ?? '', beginsMs));
  const tgs = (tg: (one: ThicknessCase) => number | null) => rangeOf(cases.flatMap((one) => tg(one) ?? []));
  return {
    part,
    run,
    from: isoFromMs(beginsMs),
    until: isoFromMs(untilMs),
    layers: layersOf(found),
    resin: resinOf(found),
    startDegree: asked.startDegree,
    sensors: asked.sensors
      .filter(({ against }) => against !== 'of another part')
      .map(({ channel, place, role, side }) => ({
        channel,
        place,
        role,
        side,
        isUsed: asked.channels.includes(channel),
      })),
    measured: measuredOf(asked, beginsMs, untilMs),
    cases,
    peakC: rangeOf(cases.map(({ peak }) => peak.temperatureC)) ?? [0, 0],
    middleDegree: rangeOf(cases.map(({ middle }) => middle.degree)) ?? [0, 0],
    middleTgC: tgs(({ middle }) => middle.tgC),
    leastDegree: rangeOf(cases.map(({ least }) => least.degree)) ?? [0, 0],
    leastTgC: tgs(({ least }) => least.tgC),
    reached: reachedOf(found, cases),
    ceiling: ceilingOf(found, cases),
    assumptions: assumptionsOf(found, records),
  };
}

function caseOf(one: ThroughPart, name: string, beginsMs: number): ThicknessCase {
  const at = (timeS: number) => isoFromMs(Math.round(beginsMs + 1000 * timeS));
  const placeAt = (i: number) => ({
    degree: one.alpha[i] ?? Number.NaN,
    tgC: one.tgK === null ? null : celsiusFromKelvin(one.tgK[i] ?? Number.NaN),
    depthMm: 1000 * (one.positionM[i] ?? Number.NaN),
  });
  const first = (isBetter: (a: number, b: number) => boolean) =>
    placeAt(one.alpha.reduce((best, degree, i) => (isBetter(degree, one.alpha[best] ?? Number.NaN) ? i : best), 0));
  return {
    name,
    minutes: rounded(one.atS, 1 / 60, 2),
    hottestC: celsius(one.hottestK),
    coldestC: celsius(one.coldestK),
    middleC: celsius(one.middleK),
    peak: {
      temperatureC: celsiusFromKelvin(one.peak.temperatureK),
      depthMm: 1000 * one.peak.positionM,
      at: at(one.peak.timeS),
    },
    middlePeak: { temperatureC: celsiusFromKelvin(one.middlePeak.temperatureK), at: at(one.middlePeak.timeS) },
    overshootC: one.overshootK,
    lagC: one.lagK,
    depthMm: rounded(one.positionM, 1000, 4),
    degree: rounded(one.alpha, 1, 6),
    tgC: one.tgK === null ? null : celsius(one.tgK),
    middle: placeAt((one.alpha.length - 1) / 2),
    least: first((a, b) => a < b),
    most: first((a, b) => a > b),
  };
}

function layersOf({ records, asked }: ThicknessFound): Thickness['layers'] {
  const { layup, toolRecord, toolCode } = records;
  const layers: Thickness['layers'] = [];
  if (layup.laminate !== null && layup.thicknessMm !== null) {
    const { name, densityKgM3, specificHeatJKgK, conductivityWMK, source } = layup.laminate;
    layers.push({ name, thicknessMm: layup.thicknessMm, densityKgM3, specificHeatJKgK, conductivityWMK, source });
  }
  const material = toolRecord?.material;
  if (asked.asked.cases.some(({ withTool }) => withTool) && material && toolRecord.thicknessMm !== null) {
    const { name, ...figures } = material;
    layers.push({ name: `tool ${toolCode}, ${name}`, thicknessMm: toolRecord.thicknessMm, ...figures });
  }
  return layers;
}

function resinOf({ cycle, records: { resin, document } }: ThicknessFound): Thickness['resin'] {
  const { code, name, status, citation, sha256 } = resin;
  const { heatOfReaction = 0, basis = 'resin' } = document.thermal ?? {};
  return {
    code,
    name,
    status,
    citation,
    sha256,
    heatJKg: heatOfReaction,
    basis,
    isCycles: cycle?.cure?.resin === code,
  };
}

/** What the estimate is held against: only where the cycle asks by this very set. */
function reachedOf(found: ThicknessFound, cases: readonly ThicknessCase[]): Thickness['reached'] {
  const { cycle } = found;
  if (cycle?.cure === undefined || cycle.cure.resin !== found.records.resin.code) return [];
  const isOpen = thicknessGaps(found).length > 0;
  const outcome = (figures: readonly (number | null)[], atLeast: number) => {
    const known = figures.filter((figure) => figure !== null);
    if (isOpen || known.length < figures.length) return 'cannot-tell' as const;
    if (known.every((figure) => figure >= atLeast)) return 'reached' as const;
    return known.every((figure) => figure < atLeast) ? ('not-reached' as const) : ('cannot-tell' as const);
  };
  const { degreeAtLeast, tgAtLeast } = cycle.cure;
  const { temperature } = cycle.units;
  const tg = (tgC: number | null) => (tgC === null ? null : temperatureFromCelsius(tgC, temperature));
  const reached: Thickness['reached'] = [];
  if (degreeAtLeast !== undefined) {
    reached.push({
      what: 'degree',
      atLeast: degreeAtLeast,
      unit: '',
      middle: outcome(
        cases.map(({ middle }) => middle.degree),
        degreeAtLeast,
      ),
      throughout: outcome(
        cases.map(({ least }) => least.degree),
        degreeAtLeast,
      ),
    });
  }
  if (tgAtLeast !== undefined) {
    reached.push({
      what: 'tg',
      atLeast: tgAtLeast,
      unit: temperature,
      middle: outcome(
        cases.map(({ middle }) => tg(middle.tgC)),
        tgAtLeast,
      ),
      throughout: outcome(
        cases.map(({ least }) => tg(least.tgC)),
        tgAtLeast,
      ),
    });
  }
  return reached;
}

function ceilingOf(found: ThicknessFound, cases: readonly ThicknessCase[]): Thickness['ceiling'] {
  const { cycle } = found;
  if (cycle?.ceiling === undefined) return null;
  const { ceiling: atMost } = cycle;
  const unit = cycle.units.temperature;
  const peaks = cases.map(({ peak }) => temperatureFromCelsius(peak.temperatureC, unit));
  const isAbove = peaks.every((peak) => peak > atMost);
  const isBelow = peaks.every((peak) => peak <= atMost) && thicknessGaps(found).length === 0;
  return { atMost, unit, stayed: isAbove ? 'above' : isBelow ? 'below' : 'cannot-tell' };
}

/** The thermocouples that a face was taken from, and those said to be inside, over the stretch. */
function measuredOf({ sensors, channels }: ThicknessAsked, fromMs: number, untilMs: number): Thickness['measured'] {
  return sensors
    .filter(({ channel, side, against }) => channels.includes(channel) || (side === 'inside' && against === null))
    .map(({ channel, side, readings }) => ({
      channel,
      isInside: side === 'inside' && !channels.includes(channel),
      ...thinned(readings, fromMs, untilMs),
    }));
}

/** Figures that are drawn: no more of them than the courses beside them have. */
const MOST_DRAWN = 240;

function thinned({ timeMs, value }: ReadingsInTime, fromMs: number, untilMs: number) {
  const there: number[] = [];
  value.forEach((figure, i) => {
    const at = timeMs[i] ?? Number.NaN;
    if (!Number.isNaN(figure) && at >= fromMs && at <= untilMs) there.push(i);
  });
  const count = Math.min(MOST_DRAWN, there.length);
  const kept = Array.from({ length: count }, (_, k) => there[Math.round((k * (there.length - 1)) / (count - 1))] ?? 0);
  return {
    minutes: kept.map((i) => Number((((timeMs[i] ?? 0) - fromMs) / 60_000).toFixed(2))),
    temperatureC: kept.map((i) => Number((value[i] ?? Number.NaN).toFixed(2))),
  };
}

function rangeOf(figures: readonly number[]): [number, number] | null {
  return figures.length === 0 ? null : [Math.min(...figures), Math.max(...figures)];
}

function celsius(kelvin: Float64Array): number[] {
  return Array.from(kelvin, (one) => Number(celsiusFromKelvin(one).toFixed(3)));
}

function rounded(figures: Float64Array, factor: number, digits: number): number[] {
  return Array.from(figures, (one) => Number((factor * one).toFixed(digits)));
}
