import type { Cycle } from '../cycle/cycle.ts';
import { gapsOf } from '../run/gaps.ts';
import type { Interval } from '../run/intervals.ts';
import { celsiusFrom } from '../units.ts';
import type { Dwells } from './dwells.ts';
import { type EventSources, eventTime, heatOnMs } from './events.ts';
import { type Found, sayBeside, unfinished } from './finding.ts';
import { isExcluded, type Judgement } from './judgement.ts';
import { channelsFor } from './pressure-scale.ts';

/** `log/gap`, where the cycle writes how long a gap may be: nobody can tell while a longer one lies on a used channel. */
export function logGapLimit(sources: EventSources): Found[] {
  const { j } = sources;
  const longest = j.cycle.log?.longestGap;
  if (longest === undefined) return [];
  const span = { from: heatOnMs(j) ?? j.log.from, until: lastEndMs(sources) };
  let worst: { name: string; gap: Interval } | null = null;
  for (const { name, gaps } of usedChannels(j)) {
    for (const gap of gaps) {
      const isLong = gap.until - gap.from > j.longestGapMs;
      if (!isLong || gap.from >= span.until || gap.until <= span.from) continue;
      if (worst === null || gap.until - gap.from > worst.gap.until - worst.gap.from) worst = { name, gap };
    }
  }
  const observed = worst === null ? null : (worst.gap.until - worst.gap.from) / 60_000;
  return [
    {
      limit: 'log/gap',
      outcome: worst !== null ? 'cannot-tell' : j.isOpen ? unfinished(j) : 'met',
      observed,
      possible: observed,
      bounds: { atMost: longest },
      unit: 'min',
      sensor: worst?.name ?? null,
      fromMs: worst?.gap.from ?? null,
      untilMs: worst?.gap.until ?? null,
      because:
        worst === null
          ? `No channel that a limit uses was silent for more than ${longest} min ${j.isOpen ? 'since heat-on' : 'between heat-on and the end of the cycle'}.`
          : `${worst.name} has no reading for ${sayBeside(observed!, { atMost: longest })} min; at most ${longest} min allowed.`,
    },
  ];
}

/** The end of the last window or stage; the log's end where one is not seen to end. */
function lastEndMs(sources: EventSources): number {
  const { j, dwells } = sources;
  const ends = [
    stagesEndMs(j, dwells),
    ...(j.cycle.windows ?? []).map(({ until }) => eventTime(sources, until).lateMs),
  ];
  return ends.some((end) => end === null) ? j.log.until : Math.max(...ends.map((end) => end!));
}

function stagesEndMs(j: Judgement, dwells: Dwells): number | null {
  const last = j.cycle.stages.at(-1);
  if (last?.kind === 'cool' && last.until !== undefined) {
    const untilC = celsiusFrom(last.until, j.cycle.units.temperature);
    const ends = j.sensors
      .filter((s) => !isExcluded(s) && s.track.length > 0)
      .map(({ track }) =>
        track.crossings(untilC, '<=').firstOn(track.timeMs(track.highestBetween(j.log.from, j.log.until))),
      );
    return ends.length === 0 || ends.some((end) => end === null) ? null : Math.max(...ends.map((end) => end!));
  }
  return last?.kind === 'dwell' ? dwells.closesMs(dwells.stages.length - 1, 'least') : null;
}

function usedChannels(j: Judgement): { name: string; gaps: readonly Interval[] }[] {
  const { cycle } = j;
  const events = (cycle.windows ?? []).flatMap(({ from, until }) => [from.at, until.at]);
  const uses = (quantity: 'pressure' | 'vacuum') =>
    (cycle.windows ?? []).some((window) => window.quantity === quantity) ||
    events.some((at) => at.startsWith(quantity));
  const usesPressure = uses('pressure') || cycle.cure?.pressureBeforeGel !== undefined;
  const others = [
    ...(usesPressure ? channelsFor(j, 'pressure') : []),
    ...(uses('vacuum') ? channelsFor(j, 'vacuum') : []),
  ];
  return [
    ...j.sensors,
    ...(usesAir(cycle) ? j.air : []),
    ...others.map(({ layout, track }) => ({ name: layout.name, gaps: gapsOf(track, j.longestGapMs, j.log) })),
  ];
}

/** Whether a clock or a rate of the cycle looks at the air. */
export function usesAir({ stages }: Cycle): boolean {
  return stages.some((stage) => {
    if (stage.kind !== 'dwell') return stage.rate?.of === 'air';
    return [stage.clock, stage.longest?.clock].some(
      (clock) => clock?.opens === 'air-enters' || clock?.closes === 'air-leaves',
    );
  });
}
