import { useState } from 'preact/hooks';
import { useRoute } from 'preact-iso';
import type { CycleView } from '../../server/contract/cycles.ts';
import { cyclePath } from '../../server/contract/paths.ts';
import { CyclePicture } from '../charts/cycle-picture.tsx';
import { usePageTitle } from '../page-title.ts';
import { CycleStatus } from '../parts/cycle-status.tsx';
import { CycleWordsView } from '../parts/cycle-words.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { ResinOfCycle } from '../parts/resin-of-cycle.tsx';
import { RunEntry } from '../parts/run-entry.tsx';
import { Shown } from '../parts/shown.tsx';
import { StatusTag } from '../parts/status-tag.tsx';
import { When } from '../parts/when.tsx';
import { Wide } from '../parts/wide.tsx';
import { useRead } from '../use-read.ts';
import { CycleEntry } from './cycles.tsx';

/** One issue of a cycle, in picture and in words beside it. */
export default function CyclePage() {
  const { params } = useRoute();
  const code = params.code ?? '';
  const issue = params.issue ?? '';
  usePageTitle(`${code} issue ${issue}`);
  const reading = useRead<CycleView>(cyclePath(code, issue));
  const view = reading.value;
  return (
    <Notebook margin={view && <History view={view} />}>
      <PageHead title={`${code} issue ${issue}`}>
        {view && (
          <div class="row">
            <p class="lead">{view.title}</p>
            <StatusTag status={view.status} />
          </div>
        )}
      </PageHead>
      <Shown reading={reading} what="Reading the cycle">
        {(cycle) => <Body view={cycle} again={reading.again} />}
      </Shown>
    </Notebook>
  );
}

function Body({ view, again }: { view: CycleView; again: () => void }) {
  const [lit, setLit] = useState<string | null>(null);
  return (
    <>
      <div class="cycle-sheet">
        <div class="drawn">
          <CyclePicture cycle={view.document} lit={lit} />
        </div>
        <CycleWordsView cycle={view.document} onLight={setLit} />
      </div>
      {view.document.cure && <ResinOfCycle code={view.document.cure.resin} />}
      <CycleStatus view={view} onChanged={again} />
      <section class="section">
        <h2>Runs judged by this issue</h2>
        {view.latestRuns.length === 0 ? (
          <p class="soft">None yet.</p>
        ) : (
          <ul class="entries">
            {view.latestRuns.map((line) => (
              <RunEntry key={line.run} line={line} />
            ))}
          </ul>
        )}
      </section>
      {view.issues.length > 0 && (
        <section class="section">
          <h2>Other issues of {view.code}</h2>
          <ul class="entries">
            {view.issues.map((cycle) => (
              <CycleEntry key={cycle.issue} cycle={cycle} />
            ))}
          </ul>
        </section>
      )}
      <section class="section">
        <h2>The document</h2>
        <p class="soft breakable">
          SHA-256 <code>{view.sha256}</code>
        </p>
        <details>
          <summary>As it was written</summary>
          <Wide label="The document as it was written">
            <pre>{JSON.stringify(view.document, null, 2)}</pre>
          </Wide>
        </details>
      </section>
    </>
  );
}

function History({ view }: { view: CycleView }) {
  return (
    <dl class="marks">
      {view.history.map((entry) => (
        <div key={entry.deed.at + entry.status}>
          <dt>{entry.status}</dt>
          <dd>
            <When at={entry.deed.at} />
            <br />
            {entry.deed.by}
            {entry.reason && <> · {entry.reason}</>}
          </dd>
        </div>
      ))}
    </dl>
  );
}
