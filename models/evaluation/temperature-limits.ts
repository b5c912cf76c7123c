import { furthest } from '../run/gaps.ts';
import type { Interval } from '../run/intervals.ts';
import type { Track } from '../run/track.ts';
import {
  celsiusDifferenceFrom,
  celsiusFrom,
  temperatureDifferenceFromCelsius,
  temperatureFromCelsius,
} from '../units.ts';
import { knownUncertainty } from './dwell-band-limits.ts';
import type { Dwells } from './dwells.ts';
import type { Outcome } from './evaluation.ts';
import { heatOnMs } from './events.ts';
import { type Found, sayBeside, unfinished } from './finding.ts';
import { guarded } from './guarded.ts';
import type { Fill } from './holding.ts';
import { type JudgedSensor, type Judgement, openingGaps, someBelieved } from './judgement.ts';
import { whatIsOpen } from './what-is-open.ts';

/** `ceiling`: no judged sensor above it, over the whole log. */
export function ceilingLimit(j: Judgement): Found[] {
  const { ceiling, units } = j.cycle;
  if (ceiling === undefined) return [];
  const unit = units.temperature;
  const ceilingC = celsiusFrom(ceiling, unit);
  const seen = j.sensors.flatMap((sensor) => {
    const at = sensor.track.highestBetween(j.log.from, sensor.lastMs);
    return at < 0 ? [] : [{ sensor, readingC: sensor.track.reading(at), ms: sensor.track.timeMs(at) }];
  });
  const known = { limit: 'ceiling', bounds: { atMost: ceiling }, unit };
  const first = seen[0];
  if (first === undefined) return [{ ...known, outcome: 'cannot-tell', because: 'No reading to judge by.' }];
  const highest = seen.reduce((a, b) => (b.readingC > a.readingC ? b : a), first);
  const outcome = guarded(
    j.sensors.some(({ uncertaintyC }) => uncertaintyC > 0),
    (shift) => {
      const limit = (s: JudgedSensor) => ceilingC - shift * s.uncertaintyC;
      const isOver = ({ sensor, readingC }: (typeof seen)[number]) =>
        shift === -1
          ? readingC >= limit(sensor) && (sensor.uncertaintyC > 0 || readingC > ceilingC)
          : readingC > limit(sensor);
      if (seen.some(isOver)) return 'not-met';
      if (j.sensors.some((s) => mayExceed(j, s, limit(s)))) return 'cannot-tell';
      return j.isOpen || !someBelieved(j) ? unfinished(j) : 'met';
    },
  );
  const observed = temperatureFromCelsius(highest.readingC, unit);
  const mayHide = () => j.sensors.some((s) => mayExceed(j, s, ceilingC));
  return [
    {
      ...known,
      outcome,
      observed,
      possible: observed,
      uncertainty: knownUncertainty(j, highest.sensor),
      sensor: highest.sensor.name,
      fromMs: highest.ms,
      untilMs: highest.ms,
      because: `${highest.sensor.name} was hottest with ${sayBeside(observed, { atMost: ceiling }, 2)} ${unit}; at most ${ceiling} ${unit} allowed${whatIsOpen(j, outcome, !j.isOpen, mayHide)}.`,
    },
  ];
}

/** Whether a gap of the sensor leaves room for a temperature above a limit. */
function mayExceed(j: Judgement, s: JudgedSensor, limitC: number): boolean {
  return openingGaps(j, s.gaps).some(
    (gap) => (furthest(gap, 1, j.changesAtMost, gap) ?? Number.POSITIVE_INFINITY) > limitC,
  );
}

/** `spread`: hottest minus coldest judged sensor at every scan of the stretches it covers. */
export function spreadLimit(j: Judgement, dwells: Dwells): Found[] {
  const { spread, units } = j.cycle;
  if (spread === undefined) return [];
  const unit = units.temperature;
  const known = { limit: 'spread', bounds: { atMost: spread.atMost }, unit };
  const asked = `at most ${spread.atMost} ${unit} allowed`;
  if (j.sensors.length < 2) {
    return [{ ...known, outcome: 'cannot-tell', because: `One sensor has no spread; ${asked}.` }];
  }
  const { stretches, isComplete } = coveredBySpread(j, dwells, 'least');
  // Where gaps leave an opening or a closing open, what lies between may or may not be looked at.
  const atWidest = coveredBySpread(j, dwells, 'most').stretches;
  const track = j.digest.derived('spread', j.sensors);
  let widest: { spreadC: number; ms: number } | null = null;
  for (const { from, until } of stretches) {
    const at = track.highestBetween(from, until);
    if (at >= 0 && (widest === null || track.reading(at) > widest.spreadC)) {
      widest = { spreadC: track.reading(at), ms: track.timeMs(at) };
    }
  }
  const limitC = celsiusDifferenceFrom(spread.atMost, unit);
  const u = rootSumOfTwoSquares(j.sensors.map(({ uncertaintyC }) => uncertaintyC));
  const outcome = guarded(u > 0, (shift): Outcome => {
    const limit = limitC - shift * u;
    const isOver = widest !== null && (shift === -1 ? widest.spreadC >= limit : widest.spreadC > limit + 1e-9);
    if (isOver) return 'not-met';
    if (widest === null) return unfinished(j);
    const isDoubtful = atWidest.some((stretch) => mayPart(j, stretch, limit) || parts(track, stretch) > limit + 1e-9);
    if (isDoubtful) return 'cannot-tell';
    return isComplete && someBelieved(j) ? 'met' : unfinished(j);
  });
  const mayHide = () => atWidest.some((stretch) => mayPart(j, stretch, limitC));
  const observed = widest === null ? null : temperatureDifferenceFromCelsius(widest.spreadC, unit);
  const during = { heating: 'while heating', dwells: 'in the dwells', run: 'over the run' }[spread.during];
  return [
    {
      ...known,
      outcome,
      observed,
      possible: observed,
      uncertainty: u > 0 ? temperatureDifferenceFromCelsius(u, unit) : null,
      sensor: widest === null ? null : extremesAt(j, widest.ms),
      fromMs: widest?.ms ?? null,
      untilMs: widest?.ms ?? null,
      because:
        widest === null
          ? `No scan with all judged sensors lies ${during}; ${asked}.`
          : `Hottest and coldest sensor were ${sayBeside(observed!, { atMost: spread.atMost }, 2)} ${unit} apart at most ${during}; ${asked}${whatIsOpen(j, outcome, isComplete, mayHide)}.`,
    },
  ];
}

/** The widest spread seen in a stretch; 0 where there is none. */
function parts(track: Track, { from, until }: Interval): number {
  const at = track.highestBetween(from, until);
  return at < 0 ? 0 : track.reading(at);
}

interface Covered {
  readonly stretches: Interval[];
  readonly isComplete: boolean;
}

/** The stretches a spread is looked at in, and whether all of them are over. */
function coveredBySpread(j: Judgement, dwells: Dwells, fill: Fill): Covered {
  const { during, after = 0 } = j.cycle.spread!;
  if (during === 'run') return { stretches: [j.log], isComplete: !j.isOpen };
  const stretches: Interval[] = [];
  let isComplete = true;
  const add = (from: number | null, until: number | null, isFinal: boolean): void => {
    if (from === null || until === null || !isFinal) isComplete = false;
    if (from !== null && from <= (until ?? j.log.until)) stretches.push({ from, until: until ?? j.log.until });
  };
  let sinceMs = heatOnMs(j);
  dwells.stages.forEach((_, i) => {
    const { clock } = dwells.at(i, fill);
    const opensMs = dwells.opensMs(i, fill);
    const closesMs = opensMs === null ? null : (clock.closing?.ms ?? null);
    if (during === 'heating') add(sinceMs, opensMs, true);
    else add(opensMs === null ? null : opensMs + after * 60_000, closesMs, clock.closing?.isFinal === true);
    sinceMs = closesMs;
  });
  return { stretches, isComplete };
}

/** Whether a gap of one sensor leaves room for it to be further than the limit from another. */
function mayPart(j: Judgement, stretch: Interval, limitC: number): boolean {
  return j.sensors.some((s) =>
    openingGaps(j, s.gaps).some((gap) => {
      const from = Math.max(gap.from, stretch.from);
      const until = Math.min(gap.until, stretch.until);
      if (from >= until) return false;
      const hottest = furthest(gap, 1, j.changesAtMost, { from, until });
      const coldest = furthest(gap, -1, j.changesAtMost, { from, until });
      if (hottest === null || coldest === null) return true;
      const others = j.sensors.filter((other) => other !== s && other.untilMs > from && other.track.length > 0);
      return others.some(({ track }) => {
        const ends = [track.valueAt(from), track.valueAt(until)];
        const [low, high] = [track.lowestBetween(from, until), track.highestBetween(from, until)];
        const coldestOther = Math.min(...ends, low < 0 ? ends[0]! : track.reading(low));
        const hottestOther = Math.max(...ends, high < 0 ? ends[0]! : track.reading(high));
        return hottest - coldestOther > limitC || hottestOther - coldest > limitC;
      });
    }),
  );
}

function rootSumOfTwoSquares(uncertainties: readonly number[]): number {
  const [first = 0, second = 0] = [...uncertainties].sort((a, b) => b - a);
  return Math.hypot(first, second);
}

function extremesAt(j: Judgement, ms: number): string {
  const believed = j.sensors.filter(({ lastMs, track }) => lastMs >= ms && track.length > 0);
  const hottest = believed.reduce((a, b) => (b.track.valueAt(ms) > a.track.valueAt(ms) ? b : a));
  return hottest.name;
}
