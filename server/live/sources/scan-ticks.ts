import type { SourceParts } from './source.ts';

/** Calls one after another, at whole multiples of an interval by a clock. */
export interface Ticks {
  /** Ends them, once the call that is under way is done. */
  close(): Promise<void>;
}

/** A call this little early or late, ms, counts as on time: the timer's own jitter. */
const ON_TIME_MS = 50;

/**
 * Calls `scan` at each multiple of the interval with the instant it stands for. Never two at once: a call that takes
 * longer than the interval leaves out those that would have begun meanwhile.
 */
export function scanTicks(
  intervalMs: number,
  { now, fault }: Pick<SourceParts, 'now' | 'fault'>,
  scan: (atMs: number) => Promise<void>,
): Ticks {
  let isOver = false;
  let timer: NodeJS.Timeout | undefined;
  let wake: () => void = () => undefined;
  const wait = (ms: number) =>
    new Promise<void>((resolve) => {
      wake = resolve;
      timer = setTimeout(resolve, ms);
    });
  const turn = async () => {
    let lastTick = -Infinity;
    while (!isOver) {
      const next = Math.ceil(now() / intervalMs);
      // A timer may fire a little early; a tick that lies further back is a clock that was set.
      const tick = next === lastTick ? next + 1 : next;
      await wait(Math.max(0, tick * intervalMs - now()));
      if (isOver) return;
      lastTick = tick;
      const instant = Math.round(now());
      const meant = Math.round(tick * intervalMs);
      await scan(Math.abs(instant - meant) <= ON_TIME_MS ? meant : instant).catch(fault);
    }
  };
  const over = turn();
  return {
    async close() {
      isOver = true;
      clearTimeout(timer);
      wake();
      await over;
    },
  };
}
