import { useRoute } from 'preact-iso';
import { runPath } from '../../server/contract/paths.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { usePageTitle } from '../page-title.ts';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { useRead } from '../use-read.ts';
import { RunJudged } from './run-judged.tsx';
import { RunLive } from './run-live.tsx';
import { RunUnjudged } from './run-unjudged.tsx';

/** One run: what it came to, why, and all it rests on. */
export default function RunPage() {
  const { params } = useRoute();
  const run = Number(params.run);
  usePageTitle(`Run ${run}`);
  const reading = useRead<RunView>(runPath(run));
  if (!reading.value) {
    return (
      <Notebook>
        <PageHead title={`Run ${run}`} />
        <Shown reading={reading} what="Reading the run">
          {() => null}
        </Shown>
      </Notebook>
    );
  }
  const view = reading.value;
  if (view.live !== null) return <RunLive key={view.run} run={view} again={reading.again} />;
  return view.evaluation ? (
    <RunJudged key={view.run} run={view} evaluation={view.evaluation} again={reading.again} />
  ) : (
    <RunUnjudged key={view.run} run={view} again={reading.again} />
  );
}
