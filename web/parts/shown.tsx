import type { ComponentChildren } from 'preact';
import type { Reading } from '../use-read.ts';
import { Problem } from './problem.tsx';
import { Waiting } from './waiting.tsx';

/** Shows what was read, or the refusal, or that it is still being read. */
export function Shown<T>({
  reading,
  what,
  children,
}: {
  reading: Reading<T>;
  /** "Reading the run": said when it takes longer than half a second. */
  what: string;
  children: (value: T) => ComponentChildren;
}) {
  if (reading.problem) return <Problem problem={reading.problem} again={reading.again} />;
  if (reading.value === null) return <Waiting what={what} />;
  return <>{children(reading.value)}</>;
}
