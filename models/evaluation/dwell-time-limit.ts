import type { Bounds } from '../cycle/cycle.ts';
import { bandWords } from '../cycle/words-of-figures.ts';
import { DEFAULT_CLOCK, lacksAir, runClock } from './clock.ts';
import { showsCooling } from './dwell-time.ts';
import { dwellTimeInWords } from './dwell-time-words.ts';
import type { Dwells } from './dwells.ts';
import type { Outcome } from './evaluation.ts';
import { type Found, isAtLeast, isAtMost, sayBeside, unfinished } from './finding.ts';
import type { Fill } from './holding.ts';
import type { Judgement } from './judgement.ts';
import { neverOpened } from './never-opened.ts';

/** `<dwell>/time`: the minutes a dwell's clock counted, in the worst case that gaps and a guarded decision leave open. */
export function dwellTimeLimit(j: Judgement, dwells: Dwells, index: number): Found[] {
  const stage = dwells.stages[index]!;
  const bounds = stage.time;
  if (bounds === undefined) return [];
  if (lacksAir(j, stage.clock ?? DEFAULT_CLOCK)) return [withoutAir(`${stage.name}/time`, bounds)];
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
      because: dwellTimeInWords(j, dwells, index, { outcome, low, high }),
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

function withoutAir(limit: string, bounds: Bounds): Found {
  const because = `The log has no air channel, which the clock waits for; ${bandWords(bounds, 'min')} asked.`;
  return { limit, outcome: 'cannot-tell', bounds, unit: 'min', because };
}

/** `<dwell>/longest`: from opening to closing by a clock of its own, dips included. */
export function dwellLongestLimit(j: Judgement, dwells: Dwells, index: number): Found[] {
  const stage = dwells.stages[index]!;
  const { longest } = stage;
  if (longest === undefined) return [];
  if (lacksAir(j, longest.clock)) return [withoutAir(`${stage.name}/longest`, { atMost: longest.atMost })];
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
          : `${sayBeside(least.minutes, bounds)} min from opening to closing (${between}); at most ${longest.atMost} min allowed.`,
    },
  ];
}
