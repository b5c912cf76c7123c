import type { WindowLimit } from '../cycle/cycle.ts';
import { betweenWords, whenWords } from '../cycle/words-of-event.ts';
import { bandWords } from '../cycle/words-of-figures.ts';
import type { RunChannel } from '../run/channel.ts';
import { gapsOf } from '../run/gaps.ts';
import { type Interval, overlaps } from '../run/intervals.ts';
import { parsePressureUnit } from '../units.ts';
import { type ForgivenessC, forgivenessC, forgiver } from './dips.ts';
import type { Outcome } from './evaluation.ts';
import { type EventSources, type EventTime, eventTime } from './events.ts';
import { capitalised, type Found, marginTo, sayBeside, unfinished, worst } from './finding.ts';
import { guarded } from './guarded.ts';
import { type Judgement, openingGaps } from './judgement.ts';
import { channelsFor, decimalsOf, type PressureScale, pressureScale, unitOf } from './pressure-scale.ts';

/** Where a window lay: the stretch that is certain, the widest it may have been, and whether it has closed. */
export interface WindowStretch {
  readonly sure: Interval;
  readonly widest: Interval;
  readonly hasClosed: boolean;
}

/** `window/<name>`: every reading from one event to another keeps its limits, save what is forgiven. */
export function windowLimit(sources: EventSources, window: WindowLimit): Found {
  const { j } = sources;
  const unit = unitOf(j, window.quantity);
  const bounds = boundsOf(window);
  const known = { limit: `window/${window.name}`, bounds, unit };
  const asked = `${bandWords(bounds, unit)} asked`;
  const from = eventTime(sources, window.from);
  const until = eventTime(sources, window.until);
  const cannot = (because: string, outcome: Outcome = 'cannot-tell'): Found => ({ ...known, outcome, because });
  const unknown = from.unknown ?? until.unknown;
  if (unknown !== null) return cannot(`${capitalised(unknown)}; ${asked}.`);
  if (from.earlyMs === null) {
    return cannot(
      `It begins ${whenWords(j.cycle, window.from)}, which is not seen to happen; ${asked}.`,
      unfinished(j),
    );
  }
  const channels = channelsFor(j, window.quantity);
  if (channels.length === 0) return cannot(`The log has no ${window.quantity} channel for this part; ${asked}.`);
  const stretch = windowStretch(j, from, until);
  if (stretch.widest.from > stretch.widest.until) {
    return cannot(
      `The window closes ${whenWords(j.cycle, window.until)}, before it opens ${whenWords(j.cycle, window.from)}; ${asked}.`,
    );
  }
  const each = channels.map((channel) => channelInWindow(j, window, channel, stretch));
  return { ...known, ...worstChannel(j, window, each, stretch, asked) };
}

/** What lies between two events, as sure and as wide as their times allow. */
export function windowStretch(j: Judgement, from: EventTime, until: EventTime): WindowStretch {
  return {
    sure: { from: from.lateMs ?? Number.POSITIVE_INFINITY, until: until.earlyMs ?? j.log.until },
    widest: { from: from.earlyMs!, until: until.lateMs ?? j.log.until },
    hasClosed: from.lateMs !== null && until.lateMs !== null,
  };
}

function boundsOf({ atLeast, atMost }: WindowLimit): { atLeast?: number; atMost?: number } {
  return { ...(atLeast === undefined ? {} : { atLeast }), ...(atMost === undefined ? {} : { atMost }) };
}

interface InWindow {
  readonly channel: RunChannel;
  readonly outcome: Outcome;
  readonly observed: number | null;
  readonly atMs: number | null;
  readonly isForgiven: boolean;
  readonly margin: number | null;
  readonly because: string;
}

function channelInWindow(j: Judgement, window: WindowLimit, channel: RunChannel, stretch: WindowStretch): InWindow {
  const scale = pressureScale(j, window.quantity, channel);
  const nothing = {
    channel,
    outcome: 'cannot-tell' as const,
    observed: null,
    atMs: null,
    isForgiven: false,
    margin: null,
  };
  if (scale === null) return { ...nothing, because: 'the barometer is not recorded' };
  const { track } = channel;
  const highest = track.highestBetween(stretch.widest.from, stretch.widest.until);
  if (highest < 0) return { ...nothing, because: 'no reading lies in the window' };
  const lowest = track.lowestBetween(stretch.widest.from, stretch.widest.until);
  if (track.reading(highest) > scale.greatestPa || track.reading(lowest) < scale.leastPa)
    return { ...nothing, because: 'barometer or gauge is wrong: the conversion gives less than nothing' };
  const forgive = forgivenessC(window.forgive, (by) => by * parsePressureUnit(unitOf(j, window.quantity)).paPerUnit);
  const uncertaintyPa = j.cycle.decision?.rule === 'guarded' ? (channel.uncertainty ?? 0) : 0;
  const hidden =
    stretch.widest.from < j.log.from || overlaps(openingGaps(j, gapsOf(track, j.longestGapMs, j.log)), stretch.widest);
  const decide = (shift: -1 | 0 | 1): Outcome => {
    const limits = limitsOf(window, scale, shift * uncertaintyPa);
    if (breaks(channel, stretch.sure, limits, forgive, shift)) return 'not-met';
    if (breaks(channel, stretch.widest, limits, forgive, shift) || hidden) return 'cannot-tell';
    return stretch.hasClosed ? 'met' : unfinished(j);
  };
  const outcome = guarded(uncertaintyPa > 0, decide);
  const seen = worstReading(window, channel, scale, outcome === 'not-met' ? stretch.sure : stretch.widest);
  if (seen === null) return { ...nothing, because: 'no reading lies in the window' };
  const by = window.forgive?.by ?? 0;
  const strict = marginTo(boundsOf(window), seen.observed) ?? 0;
  const isForgiven = outcome === 'met' && strict < -1e-9;
  const because = hidden && outcome === 'cannot-tell' ? 'part of the window lies in a gap of the log' : '';
  return { channel, outcome, ...seen, isForgiven, margin: isForgiven ? strict + by : strict, because };
}

interface LimitsPa {
  readonly lowPa: number;
  readonly highPa: number;
}

/** The band as the channel would read it, moved inwards by so many Pa. */
function limitsOf({ atLeast, atMost }: WindowLimit, scale: PressureScale, inwardsPa: number): LimitsPa {
  const [low, high] = scale.isFlipped ? [atMost, atLeast] : [atLeast, atMost];
  return {
    lowPa: low === undefined ? Number.NEGATIVE_INFINITY : scale.paFrom(low) + inwardsPa,
    highPa: high === undefined ? Number.POSITIVE_INFINITY : scale.paFrom(high) - inwardsPa,
  };
}

/** Whether a reading in the stretch breaks the band by more than is forgiven. */
function breaks(
  { track }: RunChannel,
  stretch: Interval,
  { lowPa, highPa }: LimitsPa,
  forgive: ForgivenessC | null,
  shift: -1 | 0 | 1,
): boolean {
  if (stretch.from > stretch.until) return false;
  const excursions: { from: number; until: number; depth: number }[] = [];
  const collect = (level: number, sign: 1 | -1): void => {
    if (!Number.isFinite(level)) return;
    const side = sign > 0 ? (shift === -1 ? '>=' : '>') : shift === -1 ? '<=' : '<';
    for (const out of track.crossings(level, side).intervals()) {
      const from = Math.max(out.from, stretch.from);
      const until = Math.min(out.until, stretch.until);
      if (from > until) continue;
      const at = sign > 0 ? track.highestBetween(from, until) : track.lowestBetween(from, until);
      if (at < 0) continue;
      const depth = sign * (track.reading(at) - level);
      if (depth > 0 || (depth === 0 && shift === -1)) excursions.push({ from, until, depth });
    }
  };
  collect(lowPa, -1);
  collect(highPa, 1);
  excursions.sort((a, b) => a.from - b.from);
  const isForgiven = forgiver(forgive);
  return excursions.some(({ from, until, depth }) => !isForgiven(until - from, Math.round(depth * 1e6) / 1e6));
}

/** The reading nearest to, or furthest beyond, a limit. */
function worstReading(
  window: WindowLimit,
  { track }: RunChannel,
  scale: PressureScale,
  stretch: Interval,
): { observed: number; atMs: number } | null {
  const ends = [track.lowestBetween(stretch.from, stretch.until), track.highestBetween(stretch.from, stretch.until)];
  let best: { observed: number; atMs: number; margin: number } | null = null;
  for (const at of ends) {
    if (at < 0) return null;
    const observed = scale.figureFrom(track.reading(at));
    const margin = marginTo(boundsOf(window), observed) ?? 0;
    if (best === null || margin < best.margin) best = { observed, atMs: track.timeMs(at), margin };
  }
  return best;
}

function worstChannel(
  j: Judgement,
  window: WindowLimit,
  each: readonly InWindow[],
  stretch: WindowStretch,
  asked: string,
): Omit<Found, 'limit' | 'unit'> {
  const outcome = worst(each.map((one) => one.outcome));
  const deciding = each.filter((one) => one.outcome === outcome);
  const shown = deciding.reduce((a, b) =>
    (b.margin ?? Number.NEGATIVE_INFINITY) < (a.margin ?? Number.NEGATIVE_INFINITY) ? b : a,
  );
  const { observed } = shown;
  const channelU = shown.channel.uncertainty;
  return {
    outcome,
    observed,
    possible: observed,
    margin: shown.margin,
    uncertainty: channelU === null ? null : channelU / parsePressureUnit(unitOf(j, window.quantity)).paPerUnit,
    sensor: shown.channel.layout.name,
    fromMs: outcome === 'not-met' ? shown.atMs : stretch.widest.from,
    untilMs: outcome === 'not-met' ? shown.atMs : stretch.widest.until,
    isForgiven: shown.isForgiven,
    because: sentence(j, window, shown, outcome, asked, stretch.hasClosed),
  };
}

function sentence(
  j: Judgement,
  window: WindowLimit,
  shown: InWindow,
  outcome: Outcome,
  asked: string,
  hasClosed: boolean,
): string {
  const unit = unitOf(j, window.quantity);
  const between = betweenWords(j.cycle, window.from, window.until);
  const name = shown.channel.layout.name;
  if (shown.observed === null) return `${capitalised(name)}: ${shown.because}; ${asked} ${between}.`;
  const figure = `${sayBeside(shown.observed, boundsOf(window), decimalsOf(unit))} ${unit}`;
  const read = `${capitalised(name)} read ${figure} at its nearest to the limit`;
  if (outcome === 'not-met') return `${capitalised(name)} went to ${figure}; ${asked} ${between}.`;
  if (outcome === 'met')
    return `${read}${shown.isForgiven ? ', briefly enough to be forgiven' : ''}; ${asked} ${between}.`;
  const why =
    shown.because !== ''
      ? shown.because
      : hasClosed
        ? 'its bounds, or the uncertainty of the reading, leave it open'
        : j.isOpen
          ? 'the run goes on'
          : 'its end is not seen';
  return `${read}; ${asked} ${between}; ${why}.`;
}
