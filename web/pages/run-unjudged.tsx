import type { RunView } from '../../server/contract/runs.ts';
import { RunChart } from '../charts/run-chart.tsx';
import { RunHead } from '../parts/run-head.tsx';
import { RunMargin } from '../parts/run-margin.tsx';
import { RunPapers } from '../parts/run-papers.tsx';

/** A run nobody has said the load or the cycle of yet: its curves, and the one thing to do. */
export function RunUnjudged({ run, again }: { run: RunView; again: () => void }) {
  const awaitsCycle = run.state === 'awaiting-cycle';
  return (
    <div class="notebook run-book">
      <div class="margin">
        <RunMargin run={run} part={null} />
      </div>
      <div class="leaf">
        <RunHead run={run} />
        <div class="notice amber">
          <h2>{awaitsCycle ? 'This run awaits its cycle' : 'This run awaits its load'}</h2>
          <p>
            {awaitsCycle
              ? 'Its load is on record. It is judged as soon as somebody says which issue of which cycle it was cured to.'
              : 'It is judged as soon as somebody says which parts were in it, which thermocouple was on which, and to which cycle it was cured.'}
          </p>
          <a class="button primary" href={`/runs/${run.run}/load`}>
            {awaitsCycle ? 'Say which cycle' : 'Say what was in it'}
          </a>
        </div>
        <RunChart run={run} part={null} lit={null} onNext={() => undefined} />
      </div>
      <div class="rest">
        <RunPapers run={run} evaluation={null} again={again} />
      </div>
    </div>
  );
}
