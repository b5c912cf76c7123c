import type { Bounds, DwellStage } from '../cycle/cycle.ts';
import { bandInWords, DEFAULT_CLOCK, lacksAir, runClock } from './clock.ts';
import { type DwellTime, showsCooling } from './dwell-time.ts';
import type { Dwells } from './dwells.ts';
import type { Outcome } from './evaluation.ts';
import { type Found, isAtLeast, isAtMost, say, sayBounds, unfinished } from './finding.ts';
import type { Fill } from './holding.ts';
import type { Judgement } from './judgement.ts';
import { neverOpened } from './never-opened.ts';

/** `<dwell>/time`: the minutes a dwell's clock counted, in the worst case that gaps and a guarded decision leave open. */
export function dwellTimeLimit(j: Judgement, dwells: Dwells, index: number): Found[] {
  const stage = dwells.stages[index]!;
  const bounds = stage.time;
  if (bounds === undefined) return [];
  if (lacksAir(j, stage.clock ?? DEFAULT_CLOCK)) return [withoutAir(j, `${stage.name}/time`, bounds)];
  const seen = dwells.at(index, 'least').time;
  const cases = dwells.shifts.map((shift) => ({
    least: dwells.at(index, 'least', shift).time,
    most: dwells.at(index, 'most', shift).time,
  }));
  const low = Math.min(...cases.map(({ least, most }) => Math.min(least.minutes, most.minutes)));
  const high = cases.every(({ least, most }) => least.hasEnded && most.hasEnded)
    ? Math.max(...cases.map(({ least, most }) => Math.max(least.minutes, most.minutes)))
    : null;
  const outcome = decide(j, low, high, bounds);
  const asWritten = dwells.at(index, 'most').time;
  const hasEnded = seen.hasEnded && asWritten.hasEnded;
  const { openedBy } = dwells.at(index, 'least').clock;
  const hasOpened = seen.opensMs !== null || asWritten.opensMs !== null;
  return [
    {
      limit: `${stage.name}/time`,
      outcome,
      observed: seen.minutes,
      possible: hasEnded ? Math.max(seen.minutes, asWritten.minutes) : null,
      bounds,
      unit: 'min',
      sensor: hasOpened ? openedBy : neverOpened(j, dwells.at(index, 'least').course).sensor,
      fromMs: seen.counted?.from ?? seen.opensMs,
      untilMs: seen.counted?.until ?? seen.closesMs ?? (seen.opensMs === null ? null : j.log.until),
      because: sentence(j, dwells, index, outcome),
    },
  ];
}

function decide(
  j: Judgement,
  low: number,
  high: number | null,
  bounds: { atLeast?: number; atMost?: number },
): Outcome {
  const { atLeast, atMost } = bounds;
  if (!isAtMost(low, atMost)) return 'not-met';
  if (high === null) return isAtLeast(low, atLeast) && atMost === undefined ? 'met' : unfinished(j);
  if (!isAtLeast(high, atLeast)) return 'not-met';
  return isAtLeast(low, atLeast) && isAtMost(high, atMost) ? 'met' : 'cannot-tell';
}

function withoutAir(j: Judgement, limit: string, bounds: Bounds): Found {
  const because = `The log has no air channel, which the clock waits for; ${sayBounds(bounds, 'min')} asked.`;
  return { limit, outcome: unfinished(j), bounds, unit: 'min', because };
}

function sentence(j: Judgement, dwells: Dwells, index: number, outcome: Outcome): string {
  const stage = dwells.stages[index]!;
  const { time: seen, clock } = dwells.at(index, 'least');
  const most = dwells.at(index, 'most').time;
  const unit = j.cycle.units.temperature;
  const asked = `${sayBounds(stage.time!, 'min')} asked`;
  if (seen.opensMs === null && most.opensMs === null) {
    const end = showsCooling(j) ? '' : '; the record does not show the cooling';
    return `${neverOpened(j, dwells.at(index, 'least').course).because}${end}; ${asked}.`;
  }
  if (seen.opensMs !== null && seen.closesMs !== null && seen.closesMs < seen.opensMs) {
    return `${clock.closing?.by ?? 'A sensor'} left ${stage.name} before ${clock.openedBy ?? 'the last'} came in, so no time counts; ${asked}.`;
  }
  if (!seen.hasEnded && outcome !== 'not-met' && outcome !== 'met') {
    const stopped = j.isOpen ? 'the dwell goes on' : 'the log stops inside the dwell';
    return `At least ${say(seen.minutes)} min seen; ${stopped}; ${asked}.`;
  }
  if (outcome === 'cannot-tell') {
    const upTo =
      most.minutes > seen.minutes ? `, and up to ${say(most.minutes)} min if what gaps hide was in band` : '';
    return `${say(seen.minutes)} min seen inside ${bandInWords(stage, unit)}${upTo}; ${asked}.`;
  }
  const opened = clock.openedBy === null ? '' : ` The clock opened when ${clock.openedBy} came in`;
  const closed = clock.closing === null ? '' : ` and closed when ${clock.closing.by ?? 'the last'} left`;
  return `${countedInWords(seen, stage)}; ${asked}.${opened}${closed}${opened === '' ? '' : '.'}`;
}

function countedInWords(seen: DwellTime, stage: DwellStage): string {
  const stops = seen.dips.filter(({ isForgiven }) => !isForgiven).length;
  const forgiven = seen.dips.length - stops;
  const dips = (count: number) => (count === 1 ? 'one dip' : `${count} dips`);
  const notes = [
    ...(stops > 0 ? [`${dips(stops)} stopped the clock`] : []),
    ...(forgiven > 0 ? [`${dips(forgiven)} forgiven`] : []),
  ];
  const how = { contiguous: 'unbroken', accumulated: 'altogether', each: 'on the sensor that gathered least' };
  const note = notes.length === 0 ? '' : ` (${notes.join(', ')})`;
  return `${say(seen.minutes)} min ${how[stage.counting ?? 'contiguous']}${note}`;
}

/** `<dwell>/longest`: from opening to closing by a clock of its own, dips included. */
export function dwellLongestLimit(j: Judgement, dwells: Dwells, index: number): Found[] {
  const stage = dwells.stages[index]!;
  const { longest } = stage;
  if (longest === undefined) return [];
  if (lacksAir(j, longest.clock)) return [withoutAir(j, `${stage.name}/longest`, { atMost: longest.atMost })];
  const run = (fill: Fill) => {
    const clock = runClock(j, dwells.at(index, fill).course, longest.clock);
    const { opensMs, closing } = clock;
    const isNone = opensMs === null || (closing !== null && closing.ms < opensMs);
    const untilMs = closing?.ms ?? j.log.until;
    const hasEnded = isNone ? showsCooling(j) : closing?.isFinal === true;
    return { clock, opensMs, untilMs, hasEnded, minutes: isNone ? 0 : (untilMs - opensMs) / 60_000 };
  };
  const least = run('least');
  const most = run('most');
  const bounds = { atMost: longest.atMost };
  const high = least.hasEnded && most.hasEnded ? Math.max(least.minutes, most.minutes) : null;
  const outcome = decide(j, Math.min(least.minutes, most.minutes), high, bounds);
  const { openedBy, closing } = least.clock;
  const between = `opened by ${openedBy ?? 'none'}, ${closing === null ? 'not closed yet' : `closed by ${closing.by ?? 'none'}`}`;
  return [
    {
      limit: `${stage.name}/longest`,
      outcome,
      observed: least.minutes,
      possible: high === null ? null : Math.min(least.minutes, most.minutes),
      bounds,
      unit: 'min',
      sensor: openedBy,
      fromMs: least.opensMs,
      untilMs: least.opensMs === null ? null : least.untilMs,
      because:
        least.opensMs === null
          ? `The clock never opened; at most ${longest.atMost} min allowed.`
          : `${say(least.minutes)} min from opening to closing (${between}); at most ${longest.atMost} min allowed.`,
    },
  ];
}
