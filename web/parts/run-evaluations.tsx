import { runEvaluationsPath } from '../../server/contract/paths.ts';
import type { EvaluationView, JudgeAgainRequest, RunView } from '../../server/contract/runs.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { sentence } from '../words/verdicts.ts';
import { Entry } from './notebook.tsx';
import { VerdictLine } from './outcome-mark.tsx';
import { Problem } from './problem.tsx';
import { When } from './when.tsx';

/** Every judgement of the run that was given; an old one is never changed. */
export function RunEvaluations({ run, onJudged }: { run: RunView; onJudged: () => void }) {
  const judging = usePost(async () => {
    await postJson<EvaluationView>(runEvaluationsPath(run.run), {} satisfies JudgeAgainRequest);
    onJudged();
  });
  return (
    <section class="section">
      <h2>Judged</h2>
      <ul class="entries">
        {run.evaluations.map((line) => (
          <Entry key={line.id} when={<When at={line.deed.at} />}>
            <div class="head">
              <VerdictLine verdict={line.verdict} />
              <span class="soft">
                {line.deed.by} · engine {line.engine}
              </span>
            </div>
            <p>{sentence(line.because)}</p>
            <p class="soft small breakable">
              SHA-256 <code>{line.sha256}</code>
            </p>
          </Entry>
        ))}
      </ul>
      <div class="stack section no-print">
        {judging.problem && <Problem problem={judging.problem} />}
        <button type="button" class="quiet" disabled={judging.isUnderWay} onClick={() => void judging.post()}>
          Judge it again from the same inputs
        </button>
      </div>
    </section>
  );
}
