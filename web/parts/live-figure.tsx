import type { ComponentChildren } from 'preact';
import { ageWords } from '../words/live.ts';

/** A figure as it was read; an old one is struck through, with its age. */
export function LiveFigure({
  name,
  text,
  ageMs,
  isStale,
  large = false,
  children,
}: {
  name: ComponentChildren;
  text: string;
  /** Null where it was never read. */
  ageMs: number | null;
  isStale: boolean;
  large?: boolean;
  children?: ComponentChildren;
}) {
  return (
    <div class={large ? 'live-figure large' : 'live-figure'}>
      <dt>{name}</dt>
      <dd>{isStale && ageMs !== null ? <s>{text}</s> : <span>{text}</span>}</dd>
      {isStale && (
        <dd class="age">
          <span class="unseen">Old: </span>
          {ageMs === null ? 'never read' : ageWords(ageMs)}
        </dd>
      )}
      {children}
    </div>
  );
}
