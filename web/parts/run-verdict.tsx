import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import { partName, verdictSentences } from '../words/verdicts.ts';
import { MARK_OF_VERDICT, OutcomeMark, VERDICT_WORDS } from './outcome-mark.tsx';

/** The verdict as a stranger reads it in ten seconds: a word, a shape, and why. */
export function RunVerdict({ evaluation }: { evaluation: Evaluation }) {
  const mark = MARK_OF_VERDICT[evaluation.verdict];
  const changed = evaluation.parts.filter((part) => part.verdict !== part.withoutEstimates);
  return (
    <section class="verdict" aria-label="Verdict">
      <h2 class={`outcome-line outcome-${mark}`}>
        <OutcomeMark mark={mark} />
        {VERDICT_WORDS[evaluation.verdict]}
      </h2>
      <p class="lead">{verdictSentences(evaluation).join(' ')}</p>
      {changed.map((part) => (
        <p key={partName(part)}>
          {partName(part)}: {VERDICT_WORDS[part.verdict].toLowerCase()} with the estimates of the cure model,{' '}
          {VERDICT_WORDS[part.withoutEstimates].toLowerCase()} without them.
        </p>
      ))}
    </section>
  );
}
