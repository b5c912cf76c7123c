import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import type { LiveRun } from '../../server/contract/live.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { clock } from '../words/clock.ts';
import { SOURCE_STATE_WORDS } from '../words/live.ts';
import { sentence, verdictSentences } from '../words/verdicts.ts';
import { zone } from '../workshop.ts';
import { MARK_OF_VERDICT, OutcomeMark, VERDICT_WORDS } from './outcome-mark.tsx';

/** What the run came to so far, and what its sources do. */
export function LiveState({
  run,
  state,
  evaluation,
}: {
  run: RunView;
  state: LiveRun | null;
  evaluation: Evaluation | null;
}) {
  const ended = state?.ended ?? null;
  const troubled = (state?.sources ?? []).filter((one) => one.state !== 'sending' && one.state !== 'resting');
  return (
    <section class="verdict" aria-label="Verdict so far">
      {evaluation ? <SoFar evaluation={evaluation} hasEnded={ended !== null} /> : <NotJudged run={run} />}
      {troubled.map((source) => (
        <p key={source.id}>
          <b>
            {source.name}: {SOURCE_STATE_WORDS[source.state]} since {clock(source.since, zone.value)}.
          </b>{' '}
          {source.because && sentence(source.because)}
        </p>
      ))}
    </section>
  );
}

function SoFar({ evaluation, hasEnded }: { evaluation: Evaluation; hasEnded: boolean }) {
  const mark = MARK_OF_VERDICT[evaluation.verdict];
  const word = evaluation.verdict === 'pending' && hasEnded ? 'Ended' : VERDICT_WORDS[evaluation.verdict];
  return (
    <>
      <h2 class={`outcome-line outcome-${mark}`}>
        <OutcomeMark mark={mark} />
        {word}
      </h2>
      <p>{verdictSentences(evaluation).join(' ')}</p>
    </>
  );
}

function NotJudged({ run }: { run: RunView }) {
  if (run.load !== null && run.cycleIssue !== null) {
    return (
      <>
        <h2 class="outcome-line outcome-pending">
          <OutcomeMark mark="pending" />
          Nothing to judge yet
        </h2>
        <p>It is judged from its first scans on.</p>
      </>
    );
  }
  const isCycleMissing = run.load !== null && run.cycleIssue === null;
  return (
    <>
      <h2 class="outcome-line outcome-awaits">
        <OutcomeMark mark="awaits" />
        {isCycleMissing ? 'Its cycle is not said yet' : 'Its load is not said yet'}
      </h2>
      <p>
        Every scan is kept all the same; it is judged as soon as that is known.{' '}
        <a href={`/runs/${run.run}/load`}>{isCycleMissing ? 'Say which cycle' : 'Say what is in it'}</a>
      </p>
    </>
  );
}
