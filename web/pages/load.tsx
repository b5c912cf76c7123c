import { useRoute } from 'preact-iso';
import { runPath } from '../../server/contract/paths.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { usePageTitle } from '../page-title.ts';
import { LoadFormView } from '../parts/load-form.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { aboutRun } from '../parts/run-entry.tsx';
import { Shown } from '../parts/shown.tsx';
import { useRead } from '../use-read.ts';
import { clock, day } from '../words/clock.ts';
import { zone } from '../workshop.ts';

/** Says who was where in a run: parts, their bags, and which thermocouple was on which part. */
export default function LoadPage() {
  const { params } = useRoute();
  const run = Number(params.run);
  usePageTitle(`Load of run ${run}`);
  const reading = useRead<RunView>(runPath(run));
  const view = reading.value;
  return (
    <Notebook
      margin={
        view && (
          <dl class="marks">
            <div>
              <dt>{day(view.from, zone.value)}</dt>
            </div>
            <div>
              <dt>{clock(view.from, zone.value)}</dt>
              <dd>logging began</dd>
            </div>
            <div>
              <dt>{clock(view.until, zone.value)}</dt>
              <dd>log ends</dd>
            </div>
          </dl>
        )
      }
    >
      <PageHead
        title={
          <>
            What was in <a href={`/runs/${run}`}>run {run}</a>
          </>
        }
      >
        {view && <p class="soft">{aboutRun(view)}</p>}
      </PageHead>
      <Shown reading={reading} what="Reading the run">
        {(found) => <LoadFormView key={found.run} run={found} />}
      </Shown>
    </Notebook>
  );
}
