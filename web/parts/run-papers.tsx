import { runReadingsCsvPath } from '../../server/contract/paths.ts';
import { runPapersPath } from '../../server/contract/record-paths.ts';
import type { EvaluationView, RunView } from '../../server/contract/runs.ts';
import { sentence } from '../words/verdicts.ts';
import type { EstimatesTold } from './estimates-told.tsx';
import { PaperSection } from './papers.tsx';
import { RunEstimates } from './run-estimates.tsx';
import { RunEvaluations } from './run-evaluations.tsx';
import { RunFiles } from './run-files.tsx';
import { RunLoad } from './run-load.tsx';
import { RunNotes } from './run-notes.tsx';
import { RunSensors } from './run-sensors.tsx';

/** Everything a run rests on, below its chart: estimates, load, sensors, files, rules left to a default, who judged. */
export function RunPapers({
  run,
  evaluation,
  estimates = null,
  again,
}: {
  run: RunView;
  evaluation: EvaluationView | null;
  /** What the chart says is estimated of the part in view. */
  estimates?: EstimatesTold | null;
  again: () => void;
}) {
  return (
    <>
      {evaluation && <RunEstimates run={run} evaluation={evaluation.document} told={estimates} />}
      <RunLoad run={run} />
      {evaluation && <RunSensors run={run} evaluation={evaluation.document} />}
      <RunFiles run={run} />
      <PaperSection path={runPapersPath(run.run)} />
      {evaluation && evaluation.document.assumptions.length > 0 && (
        <section class="section">
          <h2>Rules the documents left open</h2>
          <ul>
            {evaluation.document.assumptions.map((said) => (
              <li key={said}>{sentence(said)}</li>
            ))}
          </ul>
        </section>
      )}
      <RunNotes run={run} onAdded={again} />
      {evaluation && <RunEvaluations run={run} onJudged={again} />}
      <section class="section no-print">
        <h2>Take it with you</h2>
        <div class="row">
          <button type="button" onClick={() => window.print()}>
            Print this record
          </button>
          <a class="button" href={runReadingsCsvPath(run.run)} download={`run-${run.run}-readings.csv`}>
            All readings, CSV
          </a>
        </div>
      </section>
    </>
  );
}
