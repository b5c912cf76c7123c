import type { RunView } from '../../server/contract/runs.ts';
import { shortDay, stretch } from '../words/clock.ts';
import { zone } from '../workshop.ts';
import { PageHead } from './notebook.tsx';
import { aboutRun } from './run-entry.tsx';

export function RunHead({ run }: { run: RunView }) {
  return (
    <PageHead title={`Run ${run.run}`}>
      <p class="soft">
        {aboutRun(run)}
        <span class="print-only">
          {' '}
          · {shortDay(run.from, zone.value)}, {stretch(run.from, run.until, zone.value)}
        </span>
      </p>
    </PageHead>
  );
}
