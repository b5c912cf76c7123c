/** A stretch of time in ms, ends included. */
export interface Interval {
  readonly from: number;
  readonly until: number;
}

/** Sorted stretches that do not touch one another: the instants at which something holds. */
export type Intervals = readonly Interval[];

/** Instants in both. */
export function intersection(a: Intervals, b: Intervals): Interval[] {
  const both: Interval[] = [];
  let i = 0;
  let j = 0;
  while (i < a.length && j < b.length) {
    const from = Math.max(a[i]!.from, b[j]!.from);
    const until = Math.min(a[i]!.until, b[j]!.until);
    if (from <= until) both.push({ from, until });
    if (a[i]!.until < b[j]!.until) i++;
    else j++;
  }
  return both;
}

/** Instants in either. */
export function union(a: Intervals, b: Intervals): Interval[] {
  const either: Interval[] = [];
  for (const next of [...a, ...b].sort((p, q) => p.from - q.from)) {
    const last = either.at(-1);
    if (last !== undefined && next.from <= last.until) {
      if (next.until > last.until) either[either.length - 1] = { from: last.from, until: next.until };
    } else {
      either.push(next);
    }
  }
  return either;
}

/** What of `stretch` is not in `a`. */
export function remainder(stretch: Interval, a: Intervals): Interval[] {
  const rest: Interval[] = [];
  let from = stretch.from;
  for (const held of a) {
    if (held.until <= from) continue;
    if (held.from >= stretch.until) break;
    if (held.from > from) rest.push({ from, until: held.from });
    from = held.until;
  }
  if (from < stretch.until) rest.push({ from, until: stretch.until });
  return rest;
}

/** What of `a` lies inside `stretch`. */
export function within(a: Intervals, stretch: Interval): Interval[] {
  return stretch.from > stretch.until ? [] : intersection(a, [stretch]);
}

/** First instant at or after `fromMs` at which `a` holds; null where there is none. */
export function firstHold(a: Intervals, fromMs: number): number | null {
  for (const held of a) if (held.until >= fromMs) return Math.max(held.from, fromMs);
  return null;
}

/** Whether `a` holds at an instant, ends included. */
export function holdsAt(a: Intervals, instantMs: number): boolean {
  return a.some((held) => held.from <= instantMs && instantMs <= held.until);
}

/** Whether `a` and `stretch` share more than an instant. */
export function overlaps(a: Intervals, stretch: Interval): boolean {
  return a.some((held) => held.from < stretch.until && stretch.from < held.until);
}

/** Ms altogether. */
export function totalMs(a: Intervals): number {
  return a.reduce((sum, held) => sum + (held.until - held.from), 0);
}
