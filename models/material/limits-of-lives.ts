import { celsiusFrom } from '../units.ts';
import type { Course, ExtensionRecord } from './course.ts';
import type { BatchRecord, ExtendedLife } from './ledger.ts';
import { dayOf, durationWords } from './ledger-order.ts';
import type { Material } from './material.ts';

const DAY_MS = 86_400_000;

/** The out-life that holds at an instant: the document's, or that of an extension whose term has not passed. */
export function limitOfOutLife(
  course: Course,
  material: Material,
  atMs: number,
): { readonly minutes: number; readonly why: readonly string[] } {
  const { granted, why } = extensionsOf(course, material, 'out-life');
  const last = granted.at(-1);
  const minutes = material.out.lifeDays * 1440;
  if (last === undefined || last.lifeDays === null) return { minutes, why };
  if (last.untilMs < atMs) {
    return { minutes, why: [...why, `The extension by ${last.authority} held until ${dayOf(last.untilMs)}.`] };
  }
  const words = durationWords(last.lifeDays * 1440);
  const said = `Extended to ${words} by ${last.authority}, until ${dayOf(last.untilMs)}.`;
  return { minutes: last.lifeDays * 1440, why: [...why, said] };
}

/**
 * When a shelf life ends: at the earlier of the maker's last day and the document's life from the day of manufacture,
 * or at an extension's end. A day named is usable to its end (UTC).
 */
export function shelfEnd(
  course: Course,
  material: Material,
  { made, expires }: BatchRecord,
  atMs: number,
): { readonly endMs: number | null; readonly colder: string | null; readonly why: readonly string[] } {
  const { granted, why } = extensionsOf(course, material, 'shelf-life');
  const last = granted.at(-1);
  const ends = [
    ...(made === undefined ? [] : [Date.parse(made) + material.storage.lifeDays * DAY_MS]),
    ...(expires === undefined ? [] : [Date.parse(expires) + DAY_MS]),
  ];
  const colder = tooCold(course, material, atMs);
  if (last === undefined) return { endMs: ends.length === 0 ? null : Math.min(...ends), colder, why };
  const said = `Shelf life extended to ${dayOf(last.untilMs)} by ${last.authority}.`;
  return { endMs: last.untilMs, colder, why: [...why, said] };
}

/** The extensions that the document provides for, in the order they were granted; the rest are named. */
function extensionsOf(
  { item, extensions }: Course,
  { code, issue, extension }: Material,
  life: ExtendedLife,
): { readonly granted: readonly ExtensionRecord[]; readonly why: readonly string[] } {
  const all = extensions.filter((one) => one.life === life);
  const times = extension?.times ?? 0;
  const beyond = all.slice(times);
  return {
    granted: all.slice(0, times),
    why: beyond.map(
      ({ authority, ms }) =>
        `The extension of ${item} by ${authority} on ${dayOf(ms)} does not count: ${code} issue ${issue} provides for ${times === 0 ? 'none' : times}.`,
    ),
  };
}

function tooCold({ item, stays }: Course, { storage, units }: Material, atMs: number): string | null {
  const { atLeast } = storage;
  if (atLeast === undefined) return null;
  const leastC = celsiusFrom(atLeast, units.temperature);
  for (const stay of stays) {
    if (stay.kind !== 'freezer-record') continue;
    const cold = stay.profile.find(([ms, c]) => ms >= stay.fromMs && ms <= Math.min(stay.untilMs, atMs) && c < leastC);
    if (cold !== undefined) {
      return `${item} was kept colder than ${atLeast} ${units.temperature} on ${dayOf(cold[0])}, the least it may be kept at.`;
    }
  }
  return null;
}
