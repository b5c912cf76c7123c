import type { Course } from './course.ts';
import type { BatchRecord } from './ledger.ts';
import { dayOf, durationWords } from './ledger-order.ts';
import { limitOfOutLife, shelfEnd } from './limits-of-lives.ts';
import type { Material } from './material.ts';
import { outTime } from './out-time.ts';

/** One clock of a material: what is used, what is left, and how that stands against its limit. */
export interface Life {
  readonly name: 'out-life' | 'shelf-life' | 'tack-life' | 're-freezing';
  readonly outcome: 'met' | 'not-met' | 'cannot-tell';
  /** Used for certain; of re-freezing how often. */
  readonly used: number;
  /** Used at most; null where nothing bounds it. */
  readonly usedAtMost: number | null;
  readonly atMost: number | null;
  readonly unit: 'min' | '';
  /** Left for certain; negative when over; null where that cannot be told. */
  readonly leftMinutes: number | null;
  /** One sentence. */
  readonly because: string;
  /** Everything behind it, as sentences. */
  readonly why: readonly string[];
}

export const LIFE_WORDS: Readonly<Record<Life['name'], string>> = {
  'out-life': 'out-life',
  'shelf-life': 'shelf life',
  'tack-life': 'tack life',
  're-freezing': 're-freezings',
};

// As in judging: computed figures are compared with an allowance of 1e-9 of the figure.
const ALLOWANCE = 1e-9;

export function outLife(course: Course, material: Material, atMs: number): Life {
  const { least, most, unknown } = outTime(course, material);
  const limit = limitOfOutLife(course, material, atMs);
  const rule = material.equivalent === undefined ? '' : ` as at ${material.out.atMost} ${material.units.temperature}`;
  return clock('out-life', least, most, limit.minutes, {
    used: (words) => `${course.item} was out for ${words}${rule}; ${durationWords(limit.minutes)} allowed.`,
    unknown,
    why: [...statedSentences(course), ...limit.why],
    item: course.item,
  });
}

/** Tack is needed while material is laid; it runs from the opening of its wrapping. */
export function tackLife(course: Course, lifeDays: number, neededMs: number): Life {
  const fromMs = course.openedMs;
  let least = 0;
  let most = 0;
  for (const stay of course.stays) {
    if (stay.kind === 'frozen' || stay.kind === 'freezer-record') continue;
    const until = Math.min(stay.untilMs, neededMs);
    const minutes = (from: number) => Math.max(0, until - from) / 60_000;
    if (stay.kind === 'unknown') most += minutes(Math.max(stay.fromMs, fromMs ?? stay.fromMs));
    else if (fromMs === null) most += minutes(stay.fromMs);
    else {
      least += minutes(Math.max(stay.fromMs, fromMs));
      most += minutes(Math.max(stay.fromMs, fromMs));
    }
  }
  const unknown = [
    ...(fromMs === null ? ['when its wrapping was opened is not on record'] : []),
    ...course.stays.flatMap((stay) => (stay.kind === 'unknown' ? [stay.because] : [])),
  ];
  return clock('tack-life', least, most, lifeDays * 1440, {
    used: (words) => `${course.item} was open in the room for ${words}; ${durationWords(lifeDays * 1440)} of tack.`,
    unknown,
    why: fromMs === null ? ['Taken as opened when it was first out, because nobody wrote it down.'] : [],
    item: course.item,
  });
}

export function shelfLife(course: Course, material: Material, batch: BatchRecord, atMs: number): Life {
  const { endMs, colder, why } = shelfEnd(course, material, batch, atMs);
  const known = { name: 'shelf-life', used: 0, usedAtMost: null, atMost: null, unit: 'min', why } as const;
  if (colder !== null) return { ...known, outcome: 'not-met', leftMinutes: null, because: colder };
  if (endMs === null) {
    const because = `Neither the day batch ${batch.batch} was made nor its maker's last day is on record.`;
    return { ...known, outcome: 'cannot-tell', leftMinutes: null, because };
  }
  const leftMinutes = (endMs - atMs) / 60_000;
  const because =
    leftMinutes >= 0
      ? `The shelf life of ${course.item} runs to ${dayOf(endMs - 1)}.`
      : `The shelf life of ${course.item} ended on ${dayOf(endMs - 1)}, ${durationWords(-leftMinutes)} before.`;
  return { ...known, outcome: leftMinutes >= 0 ? 'met' : 'not-met', leftMinutes, because };
}

export function refreezing({ item, refreezings }: Course, atMost: number): Life {
  const isKept = refreezings <= atMost;
  return {
    name: 're-freezing',
    outcome: isKept ? 'met' : 'not-met',
    used: refreezings,
    usedAtMost: refreezings,
    atMost,
    unit: '',
    leftMinutes: null,
    because: `${item} was re-frozen ${timesWords(refreezings)}; ${atMost === 0 ? 'never' : timesWords(atMost)} allowed.`,
    why: [],
  };
}

function clock(
  name: Life['name'],
  least: number,
  most: number,
  limit: number,
  said: {
    readonly used: (words: string) => string;
    readonly unknown: readonly string[];
    readonly why: readonly string[];
    readonly item: string;
  },
): Life {
  const keeps = (used: number) => Number.isFinite(used) && used <= limit + ALLOWANCE * used;
  const outcome = !keeps(least) ? 'not-met' : keeps(most) ? 'met' : 'cannot-tell';
  const words = most === least ? durationWords(least) : `at least ${durationWords(least)}`;
  const open = said.unknown.map((reason) => `${reason.charAt(0).toUpperCase()}${reason.slice(1)}.`);
  const because =
    outcome === 'cannot-tell'
      ? `Whether ${said.item} was within its ${LIFE_WORDS[name]} cannot be told: ${said.unknown[0] ?? 'its ledger is not whole'}.`
      : said.used(outcome === 'met' && most !== least ? `at most ${durationWords(most)}` : words);
  return {
    name,
    outcome,
    used: least,
    usedAtMost: Number.isFinite(most) ? most : null,
    atMost: limit,
    unit: 'min',
    leftMinutes: Number.isFinite(most) ? limit - most : null,
    because,
    why: [said.used(words), ...open, ...said.why],
  };
}

function statedSentences({ statedMinutes }: Course): string[] {
  return statedMinutes === 0 ? [] : [`${durationWords(statedMinutes)} of it were stated when it came in.`];
}

function timesWords(times: number): string {
  return times === 0 ? 'never' : times === 1 ? 'once' : times === 2 ? 'twice' : `${times} times`;
}
