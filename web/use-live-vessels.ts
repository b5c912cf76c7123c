import { useEffect, useState } from 'preact/hooks';
import type { LiveVessels } from '../server/contract/live.ts';
import { LIVE_EVENTS_PATH, LIVE_PATH } from '../server/contract/paths.ts';
import { asProblem, isAborted, readJson } from './api.ts';
import { listenTo } from './event-feed.ts';
import type { ProblemError } from './problem-error.ts';

/** What was heard last, and whether the server is still heard. */
export interface Heard<T> {
  readonly value: T | null;
  /** By the browser's clock. */
  readonly heardMs: number;
  readonly isHeard: boolean;
  readonly problem: ProblemError | null;
}

/** Every vessel as it is now, told anew as it changes. */
export function useLiveVessels(): Heard<LiveVessels> {
  const [heard, setHeard] = useState<Heard<LiveVessels>>({ value: null, heardMs: 0, isHeard: false, problem: null });
  useEffect(() => {
    const stop = new AbortController();
    const take = (value: LiveVessels) => setHeard({ value, heardMs: Date.now(), isHeard: true, problem: null });
    // Asked for once besides: a refusal says why, where a feed only says that it was refused.
    readJson<LiveVessels>(LIVE_PATH, stop.signal).then(take, (error: unknown) => {
      if (!isAborted(error)) setHeard((before) => ({ ...before, problem: asProblem(error) }));
    });
    const close = listenTo(LIVE_EVENTS_PATH, {
      events: { vessels: take },
      onLine: (isHeard) => setHeard((before) => ({ ...before, isHeard })),
      onLost: () => undefined,
    });
    return () => {
      stop.abort();
      close();
    };
  }, []);
  return heard;
}
