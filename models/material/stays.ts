import { celsiusFrom } from '../units.ts';
import { impossible } from './impossible.ts';
import type { LedgerEvent, Room } from './ledger.ts';
import { dayOf } from './ledger-order.ts';
import type { Period } from './periods.ts';

/** A freezer's own record, [ms, °C], in rising time. */
export type Profile = readonly (readonly [number, number])[];

/** A stretch of an item's life under one condition. */
export type Stay = { readonly fromMs: number; readonly untilMs: number } & (
  | { readonly kind: 'frozen' }
  /** `thawedMs`: when it was said to have warmed; null: nobody said. */
  | {
      readonly kind: 'out';
      readonly room: Room | null;
      readonly beganFrozen: boolean;
      readonly thawedMs: number | null;
    }
  | { readonly kind: 'freezer-record'; readonly profile: Profile }
  /** Somewhere between all of it in the freezer and all of it out. */
  | { readonly kind: 'unknown'; readonly because: string }
);

/** The conditions of a period, freezer records laid over the frozen ones. */
export function staysOf(item: string, period: Period, records: readonly Profile[]): Stay[] {
  const { fromMs, untilMs, uses } = period;
  if (period.place === 'out') {
    const { beganFrozen, thawedMs } = period;
    return period.rooms.flatMap(({ ms, room }, i): Stay[] => {
      const end = period.rooms[i + 1]?.ms ?? untilMs;
      const isLast = i === period.rooms.length - 1;
      return end > ms || isLast ? [{ kind: 'out', fromMs: ms, untilMs: end, room, beganFrozen, thawedMs }] : [];
    });
  }
  const [use] = uses;
  if (use !== undefined) return [{ kind: 'unknown', fromMs, untilMs, because: notTakenOut(item, use) }];
  const stays: Stay[] = [];
  let atMs = fromMs;
  for (const profile of records) {
    const [start, end] = [profile[0]![0], profile.at(-1)![0]];
    const [from, until] = [Math.max(start, fromMs), Math.min(end, untilMs)];
    if (from >= until) continue;
    if (from > atMs) stays.push({ kind: 'frozen', fromMs: atMs, untilMs: from });
    stays.push({ kind: 'freezer-record', fromMs: from, untilMs: until, profile });
    atMs = until;
  }
  if (untilMs > atMs || stays.length === 0) stays.push({ kind: 'frozen', fromMs: atMs, untilMs });
  return stays;
}

/** Why a stay in the freezer that something was used from is open. */
export function notTakenOut(item: string, { ms, what }: { readonly ms: number; readonly what: string }): string {
  return `${what} on ${dayOf(ms)} while the ledger has ${item} in the freezer: taking it out is not on record`;
}

/** Freezer records of an item in order; two that overlap contradict each other. */
export function profilesOf(item: string, events: readonly LedgerEvent[]): Profile[] {
  const profiles = events
    .flatMap((event) => (event.kind === 'excursion' ? [event] : []))
    .map(({ points, unit }): Profile => points.map(([at, figure]) => [Date.parse(at), celsiusFrom(figure, unit)]))
    .sort((a, b) => a[0]![0] - b[0]![0]);
  for (const [i, profile] of profiles.entries()) {
    profile.forEach(([ms], k) => {
      if (k > 0 && ms <= profile[k - 1]![0]) {
        impossible(`${item}: the freezer's record of ${dayOf(ms)} does not rise in time`, { item });
      }
    });
    const before = profiles[i - 1]?.at(-1)?.[0];
    if (before !== undefined && profile[0]![0] < before) {
      impossible(`${item}: two records of the freezer overlap on ${dayOf(before)}`, { item });
    }
  }
  return profiles;
}
