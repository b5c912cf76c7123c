import type { CycleLine, Cycles } from '../../server/contract/cycles.ts';
import { CYCLES_PATH } from '../../server/contract/paths.ts';
import { usePageTitle } from '../page-title.ts';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { StatusTag } from '../parts/status-tag.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';
import { count } from '../words/figures.ts';

/** Cycles by code, each with its issues. */
export function CyclesPage() {
  usePageTitle('Cycles');
  const reading = useRead<Cycles>(CYCLES_PATH);
  return (
    <Notebook>
      <PageHead title="Cycles">
        <div class="row">
          <p class="soft">What is asked of a cure, issue by issue. A released issue is frozen.</p>
          <a class="button primary" href="/cycles/import">
            Bring in a cycle
          </a>
        </div>
      </PageHead>
      <Shown reading={reading} what="Reading the cycles">
        {({ cycles }) =>
          cycles.length === 0 ? (
            <div class="empty">
              <h2>No cycle is on record yet</h2>
              <p>
                A run can be kept without one, but not judged. Bring in the cycle as a document: limits, stage by stage,
                in the units of the specification it comes from.
              </p>
            </div>
          ) : (
            <ul class="entries">
              {cycles.map((cycle) => (
                <CycleEntry key={`${cycle.code} ${cycle.issue}`} cycle={cycle} />
              ))}
            </ul>
          )
        }
      </Shown>
    </Notebook>
  );
}

export function CycleEntry({ cycle }: { cycle: CycleLine }) {
  return (
    <Entry when={<When at={cycle.imported.at} />}>
      <div class="head">
        <a href={`/cycles/${encodeURIComponent(cycle.code)}/${encodeURIComponent(cycle.issue)}`}>
          {cycle.code} issue {cycle.issue}
        </a>
        <StatusTag status={cycle.status} />
        <span class="soft">{count(cycle.runs, 'run')}</span>
      </div>
      <p class="soft">{cycle.title}</p>
    </Entry>
  );
}
