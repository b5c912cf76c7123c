import { impossible } from './impossible.ts';
import type { ExtendedLife, LedgerEvent, LedgerItem, MaterialRecords } from './ledger.ts';
import { dayOf, sortedEvents } from './ledger-order.ts';
import { type Beginning, periodsOf } from './periods.ts';
import { notTakenOut, profilesOf, type Stay, staysOf } from './stays.ts';

export interface ExtensionRecord {
  readonly ms: number;
  readonly life: ExtendedLife;
  readonly lifeDays: number | null;
  readonly untilMs: number;
  readonly authority: string;
}

/** What happened to an item up to an instant, its forebears' part of it included. */
export interface Course {
  readonly item: string;
  readonly kind: LedgerItem['kind'];
  readonly batch: string;
  /** From its roll's first day on, without a hole. */
  readonly stays: readonly Stay[];
  /** Out-time that the maker or carrier stated, in minutes. */
  readonly statedMinutes: number;
  readonly refreezings: number;
  readonly openedMs: number | null;
  readonly extensions: readonly ExtensionRecord[];
  readonly scrappedMs: number | null;
}

/**
 * What happened to an item up to an instant. A child begins with all that its parent had been through when it was cut.
 *
 * @throws {DomainError} `event-impossible` naming the item and the line that cannot be true.
 */
export function courseOf(
  records: MaterialRecords,
  code: string,
  untilMs: number,
  below: readonly string[] = [],
): Course {
  const item = records.items.find((one) => one.item === code);
  if (item === undefined) return impossible(`${code} is not on record`, { item: code });
  if (below.includes(code)) impossible(`${code} is cut from itself, by way of ${below.join(', ')}`, { item: code });
  const [birth] = sortedEvents(item.events);
  if (birth === undefined || (birth.kind !== 'received' && birth.kind !== 'cut')) {
    const told =
      birth === undefined
        ? 'nothing is on record of it'
        : `its ledger begins with "${birth.kind}" on ${dayOf(birth.at)}`;
    return impossible(`${code} was used before it was received or cut: ${told}`, { item: code });
  }
  const ms = Date.parse(birth.at);
  if (ms > untilMs) {
    const verb = birth.kind === 'received' ? 'received' : 'cut';
    impossible(`${code} was used on ${dayOf(untilMs)}, before it was ${verb} on ${dayOf(ms)}`, {
      item: code,
      at: birth.at,
    });
  }
  return birth.kind === 'received'
    ? courseOfRoll(item, birth, ms, untilMs)
    : courseOfKit(records, item, birth, ms, untilMs, below);
}

/** Material taken from an item at an instant, and out of the freezer from then on. */
export function takenFrom(whole: Course, what: string, ms: number, untilMs: number): Course {
  const course = asUsed(whole, what, ms);
  const { stays } = course;
  const last = stays.at(-1);
  const laid: Stay = {
    kind: 'out',
    fromMs: ms,
    untilMs,
    room: last?.kind === 'out' ? last.room : null,
    beganFrozen: last?.kind === 'out' && last.beganFrozen,
    thawedMs: last?.kind === 'out' ? last.thawedMs : null,
  };
  return { ...course, stays: untilMs > ms ? [...stays, laid] : stays };
}

function courseOfRoll(
  item: LedgerItem,
  birth: LedgerEvent & { kind: 'received' },
  ms: number,
  untilMs: number,
): Course {
  const place = birth.as;
  const begun: Beginning = { ms, place, room: birth.room ?? null, beganFrozen: false, thawedMs: null };
  const empty: Course = {
    item: item.item,
    kind: item.kind,
    batch: birth.batch,
    stays: [],
    statedMinutes: birth.outMinutesBefore ?? 0,
    refreezings: 0,
    openedMs: null,
    extensions: [],
    scrappedMs: null,
  };
  return goOn(empty, item, begun, untilMs);
}

function courseOfKit(
  records: MaterialRecords,
  item: LedgerItem,
  birth: LedgerEvent & { kind: 'cut' },
  ms: number,
  untilMs: number,
  below: readonly string[],
): Course {
  if (birth.from === item.item) impossible(`${item.item} is cut from itself`, { item: item.item });
  const parent = courseOf(records, birth.from, ms, [...below, item.item]);
  if (parent.scrappedMs !== null && parent.scrappedMs < ms) {
    impossible(`${item.item} is cut from ${birth.from}, which was scrapped on ${dayOf(parent.scrappedMs)}`, {
      item: item.item,
      from: birth.from,
    });
  }
  const used = asUsed(parent, `${item.item} was cut from it`, ms);
  const { stays } = used;
  const last = stays.at(-1);
  const begun: Beginning = {
    ms,
    place: 'out',
    room: birth.room ?? (last?.kind === 'out' ? last.room : null),
    beganFrozen: last?.kind === 'out' && last.beganFrozen,
    thawedMs: last?.kind === 'out' ? last.thawedMs : null,
  };
  return goOn({ ...used, item: item.item, kind: item.kind, scrappedMs: null }, item, begun, untilMs);
}

/** Whoever used an item had it out of the freezer, whatever the ledger says. */
function asUsed(course: Course, what: string, ms: number): Course {
  const { item, stays, refreezings } = course;
  const last = stays.at(-1);
  if (last === undefined || (last.kind !== 'frozen' && last.kind !== 'freezer-record')) return course;
  // Put back the minute it was used: the use came first.
  if (last.fromMs === ms && stays.at(-2)?.kind === 'out') {
    return { ...course, stays: stays.slice(0, -1), refreezings: refreezings - 1 };
  }
  const because = notTakenOut(item, { ms, what });
  return { ...course, stays: [...stays.slice(0, -1), { kind: 'unknown', fromMs: last.fromMs, untilMs: ms, because }] };
}

function goOn(begun: Course, item: LedgerItem, beginning: Beginning, untilMs: number): Course {
  const events = item.events.filter(({ at }) => Date.parse(at) <= untilMs);
  const profiles = profilesOf(item.item, events);
  const periods = periodsOf(item, beginning, untilMs);
  const ms = (kind: LedgerEvent['kind']) =>
    events.filter((event) => event.kind === kind).map(({ at }) => Date.parse(at));
  const opened = [...(begun.openedMs === null ? [] : [begun.openedMs]), ...ms('opened')];
  return {
    ...begun,
    stays: [...begun.stays, ...periods.flatMap((period) => staysOf(item.item, period, profiles))],
    refreezings: begun.refreezings + ms('in').length,
    openedMs: opened.length === 0 ? null : Math.min(...opened),
    extensions: [...begun.extensions, ...sortedEvents(events).flatMap(extensionOf)],
    scrappedMs: ms('scrapped')[0] ?? null,
  };
}

function extensionOf(event: LedgerEvent): ExtensionRecord[] {
  if (event.kind !== 'extended') return [];
  const { life, lifeDays = null, until, authority } = event;
  return [{ ms: Date.parse(event.at), life, lifeDays, untilMs: Date.parse(until), authority }];
}
