import { useEffect, useState } from 'preact/hooks';
import type { Layout } from '../models/log/layout.ts';
import type { Preview } from '../server/contract/imports.ts';
import { importPreviewPath } from '../server/contract/paths.ts';
import { asProblem, isAborted, postJson } from './api.ts';
import type { ProblemError } from './problem-error.ts';

export interface Previewing {
  readonly preview: Preview | null;
  readonly problem: ProblemError | null;
  readonly isReading: boolean;
}

/** Reads the file by a layout a moment after it last changed; `null` while a question is open. */
export function usePreview(id: number, layout: Layout | null): Previewing {
  const [state, setState] = useState<Previewing>({ preview: null, problem: null, isReading: false });
  useEffect(() => {
    if (!layout) {
      setState({ preview: null, problem: null, isReading: false });
      return;
    }
    const stop = new AbortController();
    const timer = setTimeout(() => {
      setState((before) => ({ ...before, isReading: true }));
      postJson<Preview>(importPreviewPath(id), { layout }, stop.signal).then(
        (preview) => setState({ preview, problem: null, isReading: false }),
        (error: unknown) => {
          if (!isAborted(error)) setState({ preview: null, problem: asProblem(error), isReading: false });
        },
      );
    }, 300);
    return () => {
      clearTimeout(timer);
      stop.abort();
    };
  }, [id, layout]);
  return state;
}
