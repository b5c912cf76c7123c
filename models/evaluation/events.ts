import type { CycleEvent } from '../cycle/cycle.ts';
import { gapsOf } from '../run/gaps.ts';
import { firstHold, within } from '../run/intervals.ts';
import { celsiusFrom } from '../units.ts';
import type { Dwells } from './dwells.ts';
import type { GelTimes } from './gel-times.ts';
import { allStand, type Fill, oneStands, sensorStanding, standing } from './holding.ts';
import { type Judgement, ruleFigures } from './judgement.ts';
import { channelsFor, pressureScale, type Quantity, unitOf } from './pressure-scale.ts';

/** When an event happened: no sooner than `earlyMs`, no later than `lateMs`; null where it is not seen to happen. */
export interface EventTime {
  readonly earlyMs: number | null;
  readonly lateMs: number | null;
  /** Why it cannot be told at all: no barometer, no resin set, no channel. */
  readonly unknown: string | null;
}

/** What events are worked out from. */
export interface EventSources {
  readonly j: Judgement;
  readonly dwells: Dwells;
  readonly gel: GelTimes;
}

/** When an event of the cycle happened, as early and as late as gaps allow. */
export function eventTime(sources: EventSources, event: CycleEvent): EventTime {
  const { j } = sources;
  const unknown = unknownBecause(sources, event);
  if (unknown !== null) return { earlyMs: null, lateMs: null, unknown };
  const plusMs = (event.plus ?? 0) * 60_000;
  const at = (fill: Fill): number | null => {
    const ms = instant(sources, event, fill);
    const shifted = ms === null ? null : ms + plusMs;
    return shifted === null || shifted > j.log.until ? null : shifted;
  };
  const least = at('least');
  const most = at('most');
  if (least === null || most === null) return { earlyMs: least ?? most, lateMs: null, unknown };
  return { earlyMs: Math.min(least, most), lateMs: Math.max(least, most), unknown };
}

function unknownBecause({ j, gel }: EventSources, event: CycleEvent): string | null {
  if (event.at === 'gel') return gel.unknown;
  const quantity = quantityOf(event);
  if (quantity === null) return null;
  const channels = channelsFor(j, quantity);
  if (channels.length === 0) return `the log has no ${quantity} channel for this part`;
  return channels.some((channel) => pressureScale(j, quantity, channel) === null)
    ? `the barometer is not recorded, so ${unitOf(j, quantity)} and the log's unit cannot be compared`
    : null;
}

function quantityOf(event: CycleEvent): Quantity | null {
  if (event.at === 'pressure-reaches' || event.at === 'pressure-falls-to') return 'pressure';
  return event.at === 'vacuum-reaches' || event.at === 'vacuum-falls-to' ? 'vacuum' : null;
}

function instant({ j, dwells, gel }: EventSources, event: CycleEvent, fill: Fill): number | null {
  switch (event.at) {
    case 'start':
      return j.log.from;
    case 'end':
      return j.isOpen ? null : j.log.until;
    case 'heat-on':
      return heatOnMs(j, fill);
    case 'gel':
      return fill === 'least' ? gel.lateMs : gel.earlyMs;
    case 'opens':
    case 'closes': {
      const index = dwells.stages.findIndex(({ name }) => name === event.stage);
      return event.at === 'opens' ? dwells.opensMs(index, fill) : dwells.closesMs(index, fill);
    }
    case 'first-reaches':
    case 'all-reach':
      return reach(
        j,
        celsiusFrom(event.value, j.cycle.units.temperature),
        1,
        event.at === 'all-reach',
        j.log.from,
        fill,
      );
    case 'first-cools-to':
    case 'all-cool-to': {
      const sinceMs = coolingSinceMs(j, dwells, fill);
      if (sinceMs === null) return null;
      return reach(
        j,
        celsiusFrom(event.value, j.cycle.units.temperature),
        -1,
        event.at === 'all-cool-to',
        sinceMs,
        fill,
      );
    }
    default:
      return pressureMs(j, event, fill);
  }
}

/** The first instant at which a judged sensor stands 5 °C (9 °F) above its first reading. */
export function heatOnMs(j: Judgement, fill: Fill = 'least'): number | null {
  const { heatOnC } = ruleFigures(j.cycle.units.temperature);
  const instants = j.sensors.flatMap((s) => {
    if (s.track.length === 0) return [];
    const ms = firstHold(sensorStanding(j, s, s.track.reading(0) + heatOnC, 1, fill), j.log.from);
    return ms === null ? [] : [ms];
  });
  return instants.length === 0 ? null : Math.min(...instants);
}

function reach(j: Judgement, levelC: number, sign: 1 | -1, isAll: boolean, sinceMs: number, fill: Fill): number | null {
  if (j.sensors.length === 0) return null;
  const standings = j.sensors.map((s) => {
    const stands = sensorStanding(j, s, levelC, sign, fill);
    if (sign > 0 || s.track.length === 0) return stands;
    // Cooling to a level is coming down to it: a sensor that was never above it has not.
    const aboveMs = s.track.crossings(levelC, '>').firstOn(j.log.from);
    return aboveMs === null ? [] : within(stands, { from: aboveMs, until: Number.POSITIVE_INFINITY });
  });
  return firstHold(isAll ? allStand(j.sensors, standings) : oneStands(standings), sinceMs);
}

/** After the last dwell closed; where it never opened, after the hottest reading of any judged sensor. */
function coolingSinceMs(j: Judgement, dwells: Dwells, fill: Fill): number | null {
  const last = dwells.stages.length - 1;
  if (last >= 0 && dwells.opensMs(last, fill) !== null) return dwells.closesMs(last, fill);
  let hottest: { readingC: number; ms: number } | null = null;
  for (const { track, lastMs } of j.sensors) {
    const at = track.highestBetween(j.log.from, lastMs);
    if (at >= 0 && (hottest === null || track.reading(at) > hottest.readingC)) {
      hottest = { readingC: track.reading(at), ms: track.timeMs(at) };
    }
  }
  return hottest?.ms ?? null;
}

/** Of several channels, the last to get there. */
function pressureMs(j: Judgement, event: Extract<CycleEvent, { value: number }>, fill: Fill): number | null {
  const quantity = quantityOf(event)!;
  const isReaching = event.at === 'pressure-reaches' || event.at === 'vacuum-reaches';
  const isAbsoluteVacuum = quantity === 'vacuum' && unitOf(j, 'vacuum').endsWith(' abs');
  let lastMs = j.log.from;
  for (const channel of channelsFor(j, quantity)) {
    const scale = pressureScale(j, quantity, channel)!;
    const level = scale.paFrom(event.value);
    const sign = isAbsoluteVacuum !== scale.isFlipped ? -1 : 1;
    const gaps = gapsOf(channel.track, j.longestGapMs, j.log);
    const stands = (side: 1 | -1) => standing(channel.track, gaps, level, side, fill, Number.POSITIVE_INFINITY);
    let ms = firstHold(stands(sign), j.log.from);
    if (!isReaching && ms !== null) {
      const above = channel.track.crossings(level, sign > 0 ? '>' : '<').firstOn(j.log.from);
      ms = above === null ? null : (stands(sign > 0 ? -1 : 1).find(({ from }) => from > above)?.from ?? null);
    }
    if (ms === null) return null;
    lastMs = Math.max(lastMs, ms);
  }
  return lastMs;
}
