import { useState } from 'preact/hooks';
import { asProblem } from './api.ts';
import type { ProblemError } from './problem-error.ts';

/** Something that is being handed over: whether it is on its way, and why it was refused. */
export interface Posting<A extends unknown[]> {
  readonly isUnderWay: boolean;
  readonly problem: ProblemError | null;
  /** Resolves to whether it was taken. */
  readonly post: (...args: A) => Promise<boolean>;
  readonly forget: () => void;
}

export function usePost<A extends unknown[]>(work: (...args: A) => Promise<void>): Posting<A> {
  const [isUnderWay, setIsUnderWay] = useState(false);
  const [problem, setProblem] = useState<ProblemError | null>(null);
  const post = async (...args: A) => {
    setIsUnderWay(true);
    setProblem(null);
    try {
      await work(...args);
      return true;
    } catch (error) {
      setProblem(asProblem(error));
      return false;
    } finally {
      setIsUnderWay(false);
    }
  };
  return { isUnderWay, problem, post, forget: () => setProblem(null) };
}
