import { useState } from 'preact/hooks';

/** The stretch of time in view, in ms since 1970. */
export interface View {
  readonly fromMs: number;
  readonly untilMs: number;
}

const LEAST_MS = 60_000;

/**
 * The view of a run's chart and the ways it moves; never beyond the log, never shorter than a minute.
 *
 * Where the log grows, a view of the whole grows with it and any other stays where it is.
 */
export function useView(whole: View): {
  view: View;
  isWhole: boolean;
  show: (next: View) => void;
  zoom: (factor: number, aroundMs?: number) => void;
  pan: (part: number) => void;
  showAll: () => void;
} {
  const [stretch, setStretch] = useState<View | null>(null);
  const view = stretch === null ? whole : bounded(stretch, whole);
  const isWhole = view.fromMs <= whole.fromMs && view.untilMs >= whole.untilMs;
  const show = (next: View) => {
    const { fromMs, untilMs } = bounded(next, whole);
    setStretch(fromMs <= whole.fromMs && untilMs >= whole.untilMs ? null : { fromMs, untilMs });
  };
  return {
    view,
    isWhole,
    show,
    zoom: (factor, aroundMs = (view.fromMs + view.untilMs) / 2) =>
      show({
        fromMs: aroundMs - (aroundMs - view.fromMs) / factor,
        untilMs: aroundMs + (view.untilMs - aroundMs) / factor,
      }),
    pan: (part) => {
      const by = (view.untilMs - view.fromMs) * part;
      show({ fromMs: view.fromMs + by, untilMs: view.untilMs + by });
    },
    showAll: () => setStretch(null),
  };
}

export function bounded(next: View, whole: View): View {
  const most = whole.untilMs - whole.fromMs;
  const span = Math.min(Math.max(next.untilMs - next.fromMs, Math.min(LEAST_MS, most)), most);
  const middle = (next.fromMs + next.untilMs) / 2;
  const fromMs = Math.min(Math.max(middle - span / 2, whole.fromMs), whole.untilMs - span);
  return { fromMs, untilMs: fromMs + span };
}
