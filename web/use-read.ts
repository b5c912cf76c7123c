import { useCallback, useEffect, useState } from 'preact/hooks';
import { asProblem, isAborted, readJson } from './api.ts';
import type { ProblemError } from './problem-error.ts';

/** What a page knows of something it asked the server for. `value` stays while it is asked for again. */
export interface Reading<T> {
  readonly value: T | null;
  readonly problem: ProblemError | null;
  readonly isWaiting: boolean;
  readonly again: () => void;
}

/** Reads `path` now and whenever it changes or `again` is called; `null` asks for nothing. */
export function useRead<T>(path: string | null): Reading<T> {
  const [turn, setTurn] = useState(0);
  const [answer, setAnswer] = useState<{ path: string | null; value: T | null; problem: ProblemError | null }>({
    path: null,
    value: null,
    problem: null,
  });
  const again = useCallback(() => setTurn((now) => now + 1), []);
  useEffect(() => {
    if (path === null) return;
    const stop = new AbortController();
    readJson<T>(path, stop.signal).then(
      (value) => setAnswer({ path, value, problem: null }),
      (error: unknown) => {
        if (!isAborted(error)) setAnswer({ path, value: null, problem: asProblem(error) });
      },
    );
    return () => stop.abort();
  }, [path, turn]);
  const isAnswered = answer.path === path;
  return {
    value: isAnswered ? answer.value : null,
    problem: isAnswered ? answer.problem : null,
    isWaiting: path !== null && !isAnswered,
    again,
  };
}
