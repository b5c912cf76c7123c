import type { Outcome, Verdict } from '../../models/evaluation/evaluation.ts';

export type Mark = Outcome | 'awaits';

export const OUTCOME_WORDS: Readonly<Record<Mark, string>> = {
  met: 'met',
  'not-met': 'not met',
  'cannot-tell': 'cannot tell',
  pending: 'pending',
  awaits: 'awaits its load',
};

export const VERDICT_WORDS: Readonly<Record<Verdict, string>> = {
  conforms: 'Conforms',
  'does-not-conform': 'Does not conform',
  'cannot-tell': 'Cannot tell',
  pending: 'Still running',
};

export const MARK_OF_VERDICT: Readonly<Record<Verdict, Outcome>> = {
  conforms: 'met',
  'does-not-conform': 'not-met',
  'cannot-tell': 'cannot-tell',
  pending: 'pending',
};

/** The shape of an outcome. The word stands beside it, so the shape itself is silent unless `alone`. */
export function OutcomeMark({ mark, alone = false }: { mark: Mark; alone?: boolean }) {
  const told = alone ? { role: 'img' as const, 'aria-label': OUTCOME_WORDS[mark] } : { 'aria-hidden': true as const };
  return (
    // biome-ignore lint/a11y/noSvgWithoutTitle: named by aria-label where no word stands beside it
    <svg
      class={`outcome outcome-${mark}`}
      viewBox="0 0 20 20"
      fill="none"
      stroke="currentColor"
      stroke-width="2"
      {...told}
    >
      {SHAPES[mark]}
    </svg>
  );
}

const SHAPES = {
  met: <circle cx="10" cy="10" r="7.5" fill="currentColor" stroke="none" />,
  'not-met': (
    <>
      <rect x="1.5" y="1.5" width="17" height="17" rx="2.5" />
      <path d="M6 6l8 8M14 6l-8 8" stroke-width="2.4" stroke-linecap="round" />
    </>
  ),
  'cannot-tell': <path d="M10 1.5 18.5 10 10 18.5 1.5 10Z" stroke-linejoin="round" />,
  pending: (
    <>
      <circle cx="10" cy="10" r="8" />
      <path d="M10 5.5V10l3.2 2.2" stroke-linecap="round" />
    </>
  ),
  awaits: <rect x="2" y="4" width="16" height="12" rx="2" stroke-dasharray="3.5 2.5" />,
};

export function VerdictLine({ verdict }: { verdict: Verdict }) {
  const mark = MARK_OF_VERDICT[verdict];
  return (
    <span class={`outcome-line outcome-${mark}`}>
      <OutcomeMark mark={mark} />
      {VERDICT_WORDS[verdict]}
    </span>
  );
}
