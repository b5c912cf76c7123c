import { useCallback, useEffect, useRef, useState } from 'preact/hooks';
import { asProblem, isAborted, readJson } from './api.ts';
import type { ProblemError } from './problem-error.ts';

/** Like a reading, but the last good answer stays in view while the next is fetched, a moment after `path` settles. */
export function useLatest<T>(
  path: string,
  version: unknown,
): { value: T | null; problem: ProblemError | null; isWaiting: boolean; again: () => void } {
  const [turn, setTurn] = useState(0);
  const [state, setState] = useState<{ value: T | null; problem: ProblemError | null; isWaiting: boolean }>({
    value: null,
    problem: null,
    isWaiting: true,
  });
  const isFirst = useRef(true);
  const again = useCallback(() => setTurn((now) => now + 1), []);
  useEffect(() => {
    const stop = new AbortController();
    setState((before) => ({ ...before, isWaiting: true }));
    const timer = setTimeout(
      () => {
        readJson<T>(path, stop.signal).then(
          (value) => setState({ value, problem: null, isWaiting: false }),
          (error: unknown) => {
            if (!isAborted(error)) setState((before) => ({ ...before, problem: asProblem(error), isWaiting: false }));
          },
        );
      },
      isFirst.current ? 0 : 120,
    );
    isFirst.current = false;
    return () => {
      clearTimeout(timer);
      stop.abort();
    };
  }, [path, version, turn]);
  return { ...state, again };
}
