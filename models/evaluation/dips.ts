import type { Forgiveness } from '../cycle/cycle.ts';
import { type Interval, remainder } from '../run/intervals.ts';

/** A stretch between opening and closing at which the clock's condition did not hold. */
export interface ClockDip extends Interval {
  /** Furthest below the band in °C; null where a gap hides it. */
  readonly depthC: number | null;
  readonly sensor: string | null;
  readonly isForgiven: boolean;
}

/** How deep the clock's subjects went below the band in a stretch, and which of them. */
export type Depth = (stretch: Interval) => { readonly depthC: number | null; readonly sensor: string | null };

/** Computed lengths and depths are compared with this allowance, as a part of the figure. */
export const ALLOWANCE = 1e-9;

export interface ForgivenessC {
  readonly byC: number;
  readonly forMs: number;
  readonly times: number;
  readonly inTotalMs: number;
}

/** What is forgiven, in °C (or whatever `byC` converts to) and ms; null where nothing is. */
export function forgivenessC(forgive: Forgiveness | undefined, byC: (by: number) => number): ForgivenessC | null {
  if (forgive === undefined) return null;
  return {
    byC: byC(forgive.by),
    forMs: forgive.for * 60_000,
    times: forgive.times ?? Number.POSITIVE_INFINITY,
    inTotalMs: (forgive.inTotal ?? Number.POSITIVE_INFINITY) * 60_000,
  };
}

/**
 * The dips of a clock in a stretch, in order; those closer than `for` are one, judged by its whole length and greatest
 * depth. Of the forgivable ones the first are forgiven, as far as `times` and `inTotal` go.
 */
export function dipsIn(
  stretch: Interval,
  holding: readonly Interval[],
  forgive: ForgivenessC | null,
  depth: Depth,
): ClockDip[] {
  const merged: Interval[] = [];
  for (const dip of remainder(stretch, holding)) {
    const last = merged.at(-1);
    if (last !== undefined && forgive !== null && dip.from - last.until < forgive.forMs) {
      merged[merged.length - 1] = { from: last.from, until: dip.until };
    } else {
      merged.push(dip);
    }
  }
  const isForgiven = forgiver(forgive);
  return merged.map((dip) => {
    const { depthC, sensor } = depth(dip);
    return { ...dip, depthC, sensor, isForgiven: isForgiven(dip.until - dip.from, depthC) };
  });
}

/** Decides on excursions one after the other: no longer and no deeper than allowed, and not too many of them. */
export function forgiver(forgive: ForgivenessC | null): (lastsMs: number, depthC: number | null) => boolean {
  let times = 0;
  let totalMs = 0;
  return (lastsMs, depthC) => {
    if (forgive === null || depthC === null) return false;
    const isSmall =
      lastsMs <= forgive.forMs * (1 + ALLOWANCE) && depthC <= forgive.byC + ALLOWANCE * Math.max(1, forgive.byC);
    if (!isSmall || times + 1 > forgive.times || totalMs + lastsMs > forgive.inTotalMs * (1 + ALLOWANCE)) return false;
    times++;
    totalMs += lastsMs;
    return true;
  };
}

/** What is left of a stretch when the dips that stop the clock are taken out. */
export function countedIn(stretch: Interval, dips: readonly ClockDip[]): Interval[] {
  return remainder(
    stretch,
    dips.filter(({ isForgiven }) => !isForgiven),
  );
}
