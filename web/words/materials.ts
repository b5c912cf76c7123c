import type { LedgerEvent } from '../../models/material/ledger.ts';
import { durationWords } from '../../models/material/ledger-order.ts';
import type { Life } from '../../models/material/lives.ts';
import type { MaterialState } from '../../models/material/material-state.ts';
import type { ItemLine } from '../../server/contract/materials.ts';
import { dayAndClock } from './clock.ts';
import { asWritten } from './figures.ts';

export const LIFE_NAMES: Readonly<Record<Life['name'], string>> = {
  'out-life': 'Out-life',
  'shelf-life': 'Shelf life',
  'tack-life': 'Tack life',
  're-freezing': 'Re-freezing',
};

/** What an outcome means of a life. */
export const IN_LIFE_WORDS: Readonly<Record<Life['outcome'], string>> = {
  met: 'in life',
  'not-met': 'out of life',
  'cannot-tell': 'cannot tell',
};

/** `4 d 6 h left`, `3 h over`; what is left of its re-freezings; null where that cannot be told. */
export function leftWords({ name, leftMinutes, used, atMost }: Life): string | null {
  if (name === 're-freezing' && atMost !== null) {
    const left = atMost - used;
    return left >= 0 ? `${left} left` : `${-left} over`;
  }
  if (leftMinutes === null) return null;
  return leftMinutes >= 0 ? `${durationWords(leftMinutes)} left` : `${durationWords(-leftMinutes)} over`;
}

/** Where an item is and since when. */
export function placeWords({ place, since }: MaterialState, zone: string): string {
  const when = dayAndClock(since, zone);
  if (place === 'scrapped') return `Scrapped on ${when}.`;
  return place === 'room' ? `Out of the freezer since ${when}.` : `In the freezer since ${when}.`;
}

/** What happens next to it if nobody does anything. */
export function dueWords({ dueAt, at, place, outcome }: MaterialState, zone: string): string | null {
  if (place === 'scrapped' || dueAt === null) return null;
  if (outcome === 'not-met' || Date.parse(dueAt) < Date.parse(at)) return null;
  return place === 'room'
    ? `Until ${dayAndClock(dueAt, zone)} if it stays out.`
    : `Keeps until ${dayAndClock(dueAt, zone)}.`;
}

/** The page of a roll or kit. */
export function itemPage({ item, kind }: Pick<ItemLine, 'item' | 'kind'>): string {
  return `/${kind}s/${encodeURIComponent(item)}`;
}

/** A line of a ledger in words. */
export function eventWords(event: LedgerEvent, zone: string): string {
  switch (event.kind) {
    case 'received':
      return `Received ${event.as === 'frozen' ? 'frozen' : 'warm'}, of batch ${event.batch}${statedWords(event.outMinutesBefore)}`;
    case 'cut':
      return `Cut from ${event.from}${roomWords(event.room)}`;
    case 'out':
      return `Out of the freezer${roomWords(event.room)}`;
    case 'in':
      return 'Back in the freezer';
    case 'room':
      return `Room measured:${roomWords(event.room).replace(' into', '')}`;
    case 'thawed':
      return 'Warmed through';
    case 'opened':
      return 'Wrapping opened';
    case 'excursion': {
      const figures = event.points.map(([, figure]) => figure);
      const end = event.points.at(-1)?.[0] ?? event.at;
      const [low, high] = [Math.min(...figures), Math.max(...figures)];
      return `Freezer between ${asWritten(low)} and ${asWritten(high, event.unit)}, until ${dayAndClock(end, zone)}`;
    }
    case 'extended':
      return `${event.life === 'out-life' ? 'Out-life' : 'Shelf life'} extended by ${event.authority}${event.lifeDays === undefined ? '' : ` to ${event.lifeDays} days`}, until ${dayAndClock(event.until, zone)} (${event.tests})`;
    default:
      return 'Scrapped';
  }
}

function statedWords(minutes: number | undefined): string {
  return minutes === undefined || minutes === 0 ? '' : `; out for ${durationWords(minutes)} before`;
}

function roomWords(
  room: { temperature?: number | undefined; unit: string; humidity?: number | undefined } | undefined,
): string {
  if (room?.temperature === undefined) return ', room temperature not said';
  const humidity = room.humidity === undefined ? '' : `, ${asWritten(room.humidity)} % RH`;
  return ` into ${asWritten(room.temperature, room.unit)}${humidity}`;
}
