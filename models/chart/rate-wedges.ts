import type { CoolStage, Cycle, HeatStage, RateLimit } from '../cycle/cycle.ts';
import { bandWords, rateUnitOf } from '../cycle/words-of-figures.ts';
import type { PartEvaluation } from '../evaluation/evaluation.ts';
import type { Corner, Wedge } from './chart.ts';
import type { DrawnChannel } from './drawn-channel.ts';
import { worstOf } from './outcomes.ts';
import { runOverRange } from './run-over-range.ts';
import { drawn } from './shown-unit.ts';
import { hoursAt, type TimeScale } from './time-scale.ts';

/**
 * Rates as wedges over the temperatures and times they cover.
 *
 * Every judged sensor starts its range between the first and the last of them; one that keeps to the rates stays
 * between the fastest way from the first start and the slowest from the last. The wedge ends where the last of them
 * got through the range.
 */
export function rateWedges(
  cycle: Cycle,
  part: PartEvaluation,
  channels: readonly DrawnChannel[],
  scale: TimeScale,
): Wedge[] {
  return cycle.stages.flatMap((stage, i): Wedge[] => {
    if (stage.kind === 'dwell' || stage.rate === undefined) return [];
    const sinceMs = openingBefore(cycle, part, i) ?? scale.logFromMs;
    const { over } = stage.rate;
    const runs = subjects(stage.rate, part, channels).flatMap((channel) => runOverRange(channel, over, sinceMs) ?? []);
    if (runs.length === 0) return [];
    const limits = [`${stage.name}/slowest`, `${stage.name}/fastest`];
    return [
      {
        stage: stage.name,
        corners: corners(cycle, stage, over, runs).map(([ms, value]): Corner => [hoursAt(scale, ms), drawn(value)]),
        text: bandWords(stage.rate, rateUnitOf(cycle)),
        limits,
        outcome: worstOf(part, limits),
      },
    ];
  });
}

/** Opening of the dwell before a stage, ms. */
function openingBefore(cycle: Cycle, part: PartEvaluation, index: number): number | null {
  const dwell = cycle.stages.slice(0, index).findLast((stage) => stage.kind === 'dwell');
  const opens = part.stages.find(({ name }) => name === dwell?.name)?.opens;
  return opens == null ? null : Date.parse(opens);
}

function subjects(rate: RateLimit, part: PartEvaluation, channels: readonly DrawnChannel[]): DrawnChannel[] {
  return channels.filter(({ layout }) =>
    rate.of === 'air' ? layout.role === 'air' : part.judgedBy.includes(layout.name),
  );
}

function corners(
  cycle: Cycle,
  stage: HeatStage | CoolStage,
  [from, to]: readonly [number, number],
  runs: readonly { readonly startMs: number; readonly endMs: number }[],
): [number, number][] {
  const { atLeast, atMost } = stage.rate ?? {};
  const minutesPerUnit = rateUnitOf(cycle).endsWith('/h') ? 60 : 1;
  const lastsMs = (rate: number) => (Math.abs(to - from) / rate) * minutesPerUnit * 60_000;
  const firstMs = Math.min(...runs.map(({ startMs }) => startMs));
  const lastMs = Math.max(...runs.map(({ startMs }) => startMs));
  const endMs = Math.max(...runs.map((run) => run.endMs));
  const fastMs = atMost === undefined ? firstMs : firstMs + lastsMs(atMost);
  const untilMs = Math.max(endMs, fastMs);
  const fast: [number, number][] = [
    [firstMs, from],
    [fastMs, to],
  ];
  // Without a slowest rate a sensor may take any time; with one, what it allows beyond the last sensor is of no use.
  const slowMs = atLeast === undefined || atLeast === 0 ? Number.POSITIVE_INFINITY : lastMs + lastsMs(atLeast);
  if (slowMs <= untilMs) return [...fast, [slowMs, to], [lastMs, from]];
  const reached = from + (to - from) * ((untilMs - lastMs) / (slowMs - lastMs));
  return [
    ...fast,
    [untilMs, to],
    [untilMs, reached],
    ...(reached === from ? [] : [[lastMs, from] as [number, number]]),
  ];
}
